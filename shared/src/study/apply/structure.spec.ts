import { refused } from '../testing/refused';
import { seen } from '../testing/reviewed-study';
import { ANALYST, CHAIR, ID, OWNER, edit, idOf, smallStudy } from '../testing/small-study';

const element = (id: string, key: string, parentId: string | null) =>
  ({ type: 'element.create', id, key, name: key, parentId, description: '' }) as const;

describe('the product tree', () => {
  it('refuses a code that is taken or reserved, and a parent of another study', () => {
    const study = smallStudy();
    expect(refused(study, OWNER, element(idOf(80), 'PRP', null)).details).toMatchObject({ field: 'key', value: 'PRP' });
    expect(refused(study, OWNER, element(idOf(80), 'AN', null)).details).toMatchObject({ field: 'key', value: 'AN' });
    expect(refused(study, OWNER, element(idOf(80), 'RAD', idOf(777))).details.field).toBe('parentId');
  });

  it('refuses to move an element below itself', () => {
    const study = smallStudy();
    const refusal = refused(study, OWNER, {
      type: 'element.revise',
      id: ID.vehicle,
      version: 1,
      changes: { parentId: ID.propulsion },
    });
    expect(refusal.code).toBe('cycle');
    expect(refusal.message).toContain('VEH cannot be moved below PRP, which is part of it');
    expect(
      refused(study, OWNER, { type: 'element.revise', id: ID.vehicle, version: 1, changes: { parentId: ID.vehicle } })
        .code,
    ).toBe('cycle');
  });

  it('keeps an element that something is allocated to', () => {
    const study = smallStudy();
    const refusal = refused(study, ANALYST, { type: 'element.remove', ...seen(study, 'element', ID.propulsion) });
    expect(refusal.code).toBe('in-use');
    expect(refusal.message).toContain('PRP-001');
  });
});

describe('settings and margin policy', () => {
  it('are for the requirements owner, one row for a parameter and maturity', () => {
    const study = smallStudy();
    const row = {
      type: 'policy.create',
      parameter: 'delta-v',
      maturity: 'concept',
      percent: 5,
      absolute: null,
      definition: 'd',
      source: 's',
    } as const;
    expect(refused(study, OWNER, row).details).toMatchObject({ field: 'parameter', value: 'delta-v' });
    expect(refused(study, CHAIR, row).code).toBe('forbidden');
    expect(
      refused(study, CHAIR, { type: 'study.configure', id: ID.settings, version: 1, changes: { k: 3 } }).code,
    ).toBe('forbidden');
    edit(study, OWNER, { type: 'study.configure', id: ID.settings, version: 1, changes: { k: 3 } });
    expect(
      refused(study, OWNER, { type: 'study.configure', id: ID.settings, version: 1, changes: { k: 2 } }).code,
    ).toBe('stale');
    expect(study.settings.counters['VEH']).toBe(2);
  });
});
