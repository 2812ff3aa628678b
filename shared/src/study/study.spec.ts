import { ID, idOf, smallStudy } from './testing/small-study';
import { inversePatch } from './study';

const element = (number: number, key: string, parentId: string | null) => ({
  id: idOf(number),
  version: 1,
  key,
  name: key,
  parentId,
  description: '',
});

describe('a study and its forks', () => {
  it('a fork sees its base, keeps what differs, and leaves the base alone', () => {
    const study = smallStudy();
    const fork = study.fork();
    fork.put('element', element(80, 'RAD', ID.vehicle));
    fork.remove('element', ID.propulsion);
    expect(fork.find('element', 'parentId', ID.vehicle).map(({ key }) => key)).toEqual(['RAD']);
    expect(study.find('element', 'parentId', ID.vehicle).map(({ key }) => key)).toEqual(['PRP']);
    expect(fork.all('element').map(({ key }) => key)).toEqual(['VEH', 'RAD']);
    expect(fork.byKey('element', 'PRP')).toBeUndefined();
    expect(study.byKey('element', 'PRP')).toBeDefined();
  });

  it('finds by the present value of a field only', () => {
    const fork = smallStudy().fork();
    fork.put('element', { ...fork.held('element', ID.propulsion), key: 'ENG', parentId: null });
    expect(fork.byKey('element', 'PRP')).toBeUndefined();
    expect(fork.byKey('element', 'ENG')!.id).toBe(ID.propulsion);
    fork.put('element', { ...fork.held('element', ID.propulsion), key: 'PRP' });
    expect(fork.byKey('element', 'ENG')).toBeUndefined();
    expect(fork.find('element', 'parentId', ID.vehicle)).toEqual([]);
  });

  it('gives its difference as a patch that can be taken in and turned round', () => {
    const study = smallStudy();
    const before = JSON.stringify(study.all('element'));
    const fork = study.fork();
    fork.put('element', element(80, 'RAD', ID.vehicle));
    fork.remove('element', ID.propulsion);
    const patch = fork.patch();
    expect(patch.map(({ kind, before: was, after }) => [kind, was !== null, after !== null])).toEqual([
      ['element', true, false],
      ['element', false, true],
    ]);
    study.absorb(patch);
    expect(study.all('element').map(({ key }) => key)).toEqual(['VEH', 'RAD']);
    study.absorb(inversePatch(patch));
    expect(JSON.stringify(study.all('element'))).toBe(before);
  });

  it('puts and removes within a fork without a trace', () => {
    const fork = smallStudy().fork();
    fork.put('element', element(80, 'RAD', ID.vehicle));
    fork.remove('element', idOf(80));
    expect(fork.patch()).toEqual([]);
  });

  it('a copy no longer sees what it was copied from', () => {
    const study = smallStudy();
    const copy = study.fork().detached();
    study.remove('element', ID.propulsion);
    expect(copy.byKey('element', 'PRP')).toBeDefined();
  });

  it('says when it is asked for something that a reference promised', () => {
    expect(() => smallStudy().held('element', idOf(777))).toThrow('does not hold');
  });
});
