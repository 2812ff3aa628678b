import { takeBaseline } from '../testing/baselines';
import { edit, emptyStudy, ID, idOf, limit, OWNER, requirement, smallStudy, viewOf } from '../testing/small-study';
import { requirementsView } from './requirements-view';

const lines = (study: Parameters<typeof viewOf>[0]) =>
  requirementsView(viewOf(study)).rows.map(({ path, depth, share }) => `${'  '.repeat(depth)}${path} ${share}`);

describe('the flow-down', () => {
  it('lists depth first by key, with the share of the trace by which each appears', () => {
    expect(lines(smallStudy())).toEqual(['VEH-001 none', '  VEH-001/PRP-001 adopted', 'VEH-002 none']);
  });

  it('shows a requirement with several parents under each, with a path of its own', () => {
    const study = smallStudy();
    edit(study, OWNER, { type: 'trace.link', parentId: ID.mass, childId: ID.outbound });
    const { rows } = requirementsView(viewOf(study));
    expect(lines(study)).toEqual([
      'VEH-001 none',
      '  VEH-001/PRP-001 adopted',
      'VEH-002 none',
      '  VEH-002/PRP-001 none',
    ]);
    expect(new Set(rows.map(({ path }) => path)).size).toBe(rows.length);
    expect(rows.filter(({ hasChildren }) => hasChildren).map(({ key }) => key)).toEqual(['VEH-001', 'VEH-002']);
  });

  it('sorts keys by their numbers', () => {
    const study = emptyStudy();
    for (let i = 1; i <= 11; i++) edit(study, OWNER, requirement({ id: idOf(300 + i), title: `do ${i}` }));
    study.put('requirement', { ...study.get('requirement', idOf(301))!, key: 'VEH-1000' });
    const keys = requirementsView(viewOf(study)).rows.map(({ key }) => key);
    expect(keys[0]).toBe('VEH-002');
    expect(keys.at(-1)).toBe('VEH-1000');
  });

  it('leaves out what is withdrawn, and counts what is in force, in preparation and to be resolved', () => {
    const study = smallStudy();
    edit(study, OWNER, { type: 'requirement.withdraw', id: ID.outbound, version: 1, reason: 'not needed' });
    edit(study, OWNER, {
      type: 'requirement.revise',
      id: ID.mass,
      version: 1,
      changes: {
        openItem: {
          kind: 'TBR',
          estimate: '116 t',
          action: 'ask the launcher',
          personId: OWNER.id,
          due: '2026-06-01',
          rationale: '',
        },
      },
    });
    takeBaseline(study, [ID.deltaV]);
    const view = requirementsView(viewOf(study));
    expect(view.rows.map(({ key, hasChildren }) => [key, hasChildren])).toEqual([
      ['VEH-001', false],
      ['VEH-002', false],
    ]);
    expect(view.counts).toEqual({ inForce: 2, inPreparation: 1, toBeResolved: 1 });
  });

  it('shows the value in the unit of the limit, the budget, the element and open change requests', () => {
    const study = smallStudy();
    edit(study, OWNER, {
      type: 'change.write',
      title: 'lower the limit',
      reason: 'it does not close',
      due: null,
      edits: [
        {
          type: 'requirement.revise',
          id: ID.deltaV,
          version: study.get('requirement', ID.deltaV)!.version,
          changes: { limit: limit('at least', '37', 'km/s') },
        },
      ],
    });
    const [row] = requirementsView(viewOf(study)).rows;
    expect(row).toMatchObject({
      verdict: 'short margin',
      element: { key: 'VEH', name: 'Vehicle' },
      changePending: ['CR-001'],
      budget: { reserve: 13_500, closes: true },
      compliance: 'partial',
    });
    expect(row!.value!.unit).toBe('km/s');
    // 39 081.26 / 38 000 − 1 = 2.845 %
    expect(row!.margin!.percent).toBeCloseTo(2.845, 3);
    // 5 % of 38 km/s
    expect(row!.required!.absolute).toBeCloseTo(1900, 9);
  });
});
