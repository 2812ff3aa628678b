import { ANALYST, ID, OWNER, edit, idOf, quantity, smallStudy, viewOf } from '../testing/small-study';
import { quantitiesView } from './quantities-view';

describe('quantities', () => {
  it('say what uses them and which verdicts rest on them', () => {
    const { rows } = quantitiesView(viewOf(smallStudy()));
    expect(rows.map(({ key, usedBy, bearsOn }) => [key, usedBy, bearsOn])).toEqual([
      ['Q-001', ['AN-002'], ['VEH-001']],
      ['Q-002', ['AN-001'], ['VEH-001', 'VEH-002']],
      ['Q-003', ['AN-001', 'AN-002'], ['VEH-001', 'VEH-002']],
    ]);
    expect(rows[0]).toMatchObject({
      symbol: 'I_sp',
      tex: 'I_{sp}',
      kindName: 'specific impulse',
      dimension: 'time',
      element: 'PRP',
      owner: { name: ANALYST.name },
      state: 'working',
      changePending: [],
    });
  });

  it('bear on nothing when nothing uses them, nor through a requirement that is withdrawn', () => {
    const study = smallStudy();
    edit(study, ANALYST, quantity(idOf(80), 'x', '1', 'm'));
    edit(study, OWNER, { type: 'requirement.withdraw', id: ID.mass, version: 1, reason: 'gone' });
    const { rows } = quantitiesView(viewOf(study));
    expect(rows.find(({ key }) => key === 'Q-004')).toMatchObject({ usedBy: [], bearsOn: [], kindName: '' });
    expect(rows.find(({ key }) => key === 'Q-002')!.bearsOn).toEqual(['VEH-001']);
  });

  it('name the open change requests that propose to edit them', () => {
    const study = smallStudy();
    edit(study, ANALYST, {
      type: 'change.write',
      title: 'Raise it',
      reason: '',
      due: null,
      edits: [{ type: 'quantity.set', id: ID.isp, version: 1, value: { text: '6600', unit: 's' } }],
    });
    expect(quantitiesView(viewOf(study)).rows[0]!.changePending).toEqual(['CR-001']);
  });
});
