import type { Study } from '../study';
import { takeBaseline } from '../testing/baselines';
import {
  ANALYST,
  CHAIR,
  edit,
  emptyStudy,
  formulaAnalysis,
  ID,
  idOf,
  limit,
  MEMBER,
  OWNER,
  quantity,
  READER,
  requirement,
  smallStudy,
  verifiedBy,
  viewOf,
  type Somebody,
} from '../testing/small-study';
import { overviewView } from './overview-view';
import type { ViewContext } from './view-context';

function overview(study: Study, person: Somebody = READER, over: Partial<ViewContext> = {}) {
  return overviewView(viewOf(study, person, over), { edits: 3 });
}

describe('the overview', () => {
  it('says whether the study closes: every requirement in force holds with margin', () => {
    const study = smallStudy();
    expect(overview(study)).toMatchObject({
      closes: false,
      total: 3,
      counts: { 'short margin': 1, 'non-compliant': 1, 'no evidence': 1, compliant: 0 },
    });
    edit(
      study,
      OWNER,
      { type: 'requirement.revise', id: ID.mass, version: 1, changes: { limit: limit('at most', '130', 't') } },
      {
        type: 'policy.revise',
        id: ID.policy,
        version: 1,
        percent: 2,
        absolute: null,
        definition: 'of the limit',
        source: '',
      },
      { type: 'requirement.withdraw', id: ID.outbound, version: 1, reason: 'not needed' },
    );
    expect(overview(study)).toMatchObject({ closes: true, total: 2 });
    expect(overview(emptyStudy()).closes).toBe(false);
  });

  it('marks every requirement at its margin', () => {
    const { marks } = overview(smallStudy());
    expect(marks.map(({ key, verdict }) => [key, verdict])).toEqual([
      ['PRP-001', 'no evidence'],
      ['VEH-001', 'short margin'],
      ['VEH-002', 'non-compliant'],
    ]);
    expect(marks[0]!.percent).toBeNull();
    // 1 − 120/116
    expect(marks[2]!.percent).toBeCloseTo(-3.448, 3);
  });

  it('weighs what drives the worst requirements; each column adds up to 1', () => {
    const { drivers } = overview(smallStudy());
    expect(drivers.requirements.map(({ key }) => key)).toEqual(['VEH-002', 'VEH-001']);
    const column = (index: number): number => drivers.inputs.reduce((sum, input) => sum + input.influence[index]!, 0);
    expect(column(0)).toBeCloseTo(1, 9);
    expect(column(1)).toBeCloseTo(1, 9);
    const influence = Object.fromEntries(drivers.inputs.map((input) => [input.symbol, input.influence]));
    // Mass: 65 and 55 of 120 t
    expect(influence['m_dry']![0]).toBeCloseTo(65 / 120, 6);
    expect(influence['m_p']![0]).toBeCloseTo(55 / 120, 6);
    expect(influence['I_sp']![0]).toBe(0);
    // Δv = w I ln(1 + p/d), shares of I ∂/∂I = Δv, p ∂/∂p = −d ∂/∂d = w I p/(d + p), with w I left out:
    const [ln, part] = [Math.log(120 / 65), 55 / 120];
    expect(influence['I_sp']![1]).toBeCloseTo(ln / (ln + 2 * part), 6);
    expect(influence['m_p']![1]).toBeCloseTo(part / (ln + 2 * part), 6);
    expect(influence['m_dry']![1]).toBeCloseTo(part / (ln + 2 * part), 6);
  });

  it('names for each failing requirement the two inputs that would have to move least, to what policy requires', () => {
    const { moves } = overview(smallStudy());
    expect(moves.map(({ key, quantityKey, to, decades }) => [key, quantityKey, Math.round(to.si), decades])).toEqual([
      // 61 t is a factor 65/61 = 1.066 away, 51 t one of 55/51 = 1.078
      ['VEH-002', 'Q-002', 61_000, null],
      ['VEH-002', 'Q-003', 51_000, null],
      // 39 900/(9.80665 ln(120/65)) = 6636 s, a factor 1.021. Dry mass and propellant count by their ratio and are
      // equally far, 65/63.217 = 56.551/55 = 1.0282: the key decides.
      ['VEH-001', 'Q-001', 6636, null],
      ['VEH-001', 'Q-002', 63_217, null],
    ]);
  });

  it('counts orders of magnitude where a move is a factor of ten or more', () => {
    const study = emptyStudy();
    edit(study, OWNER, requirement({ id: ID.mass, title: 'reject heat', limit: limit('at least', '79', 'MW') }));
    edit(
      study,
      ANALYST,
      quantity(idOf(81), 'A', '1', 'MW'),
      formulaAnalysis(idOf(85), 'Radiator', [{ name: 'A', from: { quantityId: idOf(81) } }], [['Q = A', 'MW']]),
      verifiedBy(idOf(86), ID.mass, idOf(85), 'Q'),
    );
    const [move] = overview(study).moves;
    expect(move!.to).toEqual({ si: expect.closeTo(79e6, 0), unit: 'MW' });
    expect(move!.decades).toBeCloseTo(Math.log10(79), 9);
  });

  it('compares with the baseline: verdicts that turned, rows that reopened', () => {
    const study = smallStudy();
    const baseline = {
      key: 'B1',
      revision: 2,
      verdicts: new Map([
        [ID.mass, 'compliant' as const],
        [ID.deltaV, 'short margin' as const],
      ]),
    };
    expect(overview(study).since).toEqual({ baseline: null, edits: 3, turned: [], reopened: [] });
    expect(overview(study, READER, { baseline }).since).toEqual({
      baseline: 'B1',
      edits: 3,
      turned: [{ key: 'VEH-002', from: 'compliant', to: 'non-compliant' }],
      reopened: [],
    });
  });

  it('warns of a quantity that is possible and unusual', () => {
    const study = smallStudy();
    edit(study, ANALYST, quantity(idOf(81), 'rho', '25', 'g/cm^3', { name: 'shield density', kind: 'density' }));
    expect(overview(study).warnings).toEqual([
      { key: 'Q-004', text: expect.stringMatching(/^shield density is 25 g\/cm³; it should be at most 23 g\/cm³ \(/) },
    ]);
  });

  it('repeats what methods warn of, such as leaving their range of validity', () => {
    const study = smallStudy();
    edit(study, ANALYST, quantity(idOf(81), 'v_e', '0.5', 'c'), {
      type: 'analysis.create',
      id: idOf(85),
      kind: 'method',
      name: 'Fast',
      purpose: '',
      elementId: null,
      inputs: [
        { name: 'v_e', from: { quantityId: idOf(81) } },
        { name: 'm_0', from: { analysisId: ID.rollUp, output: 'm_0' } },
        { name: 'm_p', from: { quantityId: ID.propellant } },
      ],
      lines: [],
      method: { id: 'rocket-equation-exhaust-speed', version: '1.0.0' },
      results: [],
      assumptions: '',
    });
    expect(overview(study).warnings).toEqual([
      { key: 'AN-003', text: 'The delta-v is above 0.1 c; use the relativistic rocket equation.' },
    ]);
  });
});

describe('what waits for me', () => {
  const waits = (study: Study, person: Somebody) =>
    overview(study, person).waits.map(({ key, what, note }) => [key, what, note]);

  it('is planning the verification of my requirements, and those of mine in review', () => {
    const study = smallStudy();
    expect(waits(study, OWNER)).toEqual([
      ['PRP-001', 'Plan the verification: meet the outbound demand', 'no evidence'],
    ]);
    edit(study, OWNER, { type: 'requirement.submit', id: ID.mass, version: 1 });
    expect(waits(study, OWNER)).toContainEqual(['VEH-002', 'keep initial mass in low orbit', 'in review']);
    expect(waits(study, READER)).toEqual([]);
  });

  it('is signing the checks of analyses that verify something and that others wrote', () => {
    const study = smallStudy();
    expect(waits(study, MEMBER)).toEqual([
      ['AN-001', 'Check signature on Mass roll-up', 'written by Mika Sato'],
      ['AN-002', 'Check signature on Transfer delta-v', 'written by Mika Sato'],
    ]);
    expect(waits(study, ANALYST)).toEqual([]);
    edit(study, MEMBER, { type: 'analysis.check', id: ID.rollUp, version: 1, remark: '' });
    expect(waits(study, MEMBER).map(([key]) => key)).toEqual(['AN-002']);
  });

  it('is voting on what is before the board, disposing when the quorum is reached, and never on one’s own', () => {
    const study = smallStudy();
    const change = idOf(96);
    edit(study, ANALYST, {
      type: 'change.write',
      id: change,
      title: 'More propellant',
      reason: 'delta-v is short',
      due: '2026-12-09',
      edits: [{ type: 'quantity.set', id: ID.propellant, version: 1, value: { text: '58', unit: 't' } }],
    });
    edit(study, ANALYST, { type: 'change.submit', id: change, version: 1 });
    expect(waits(study, CHAIR)).toEqual([]);
    edit(study, MEMBER, { type: 'change.refer', id: change, version: 2, due: null });
    expect(waits(study, CHAIR)).toEqual([['CR-001', 'Vote: More propellant', 'due 2026-12-09']]);
    expect(waits(study, { ...ANALYST, roles: ['board-member'] })).toEqual([]);
    edit(study, MEMBER, { type: 'change.vote', id: change, version: 3, vote: 'for', remark: '' });
    expect(waits(study, MEMBER).map(([key]) => key)).not.toContain('CR-001');
    expect(waits(study, CHAIR)).toContainEqual([
      'CR-001',
      'Dispose of: More propellant',
      '1 voted, quorum of 1 reached',
    ]);
    edit(study, CHAIR, {
      type: 'change.dispose',
      id: change,
      version: 4,
      decision: 'deferred',
      reason: 'tank drawing',
    });
    expect(waits(study, ANALYST)).toEqual([['CR-001', 'Supply what is awaited: More propellant', 'tank drawing']]);
    edit(study, ANALYST, { type: 'quantity.set', id: ID.propellant, version: 1, value: { text: '56', unit: 't' } });
    expect(waits(study, ANALYST)).toEqual([
      ['CR-001', 'Resolve the conflict: More propellant', 'what it edits has moved since'],
    ]);
  });

  it('is deciding on departures that others asked for', () => {
    const study = smallStudy();
    takeBaseline(study, [ID.mass]);
    edit(study, ANALYST, {
      type: 'departure.request',
      kind: 'waiver',
      class: 'minor',
      requirementId: ID.mass,
      title: 'heavier',
      reason: 'first flight',
      effectivity: 'first flight',
      expires: null,
    });
    expect(waits(study, CHAIR)).toEqual([['WAV-001', 'Decide on waiver from VEH-002: heavier', 'asked by Mika Sato']]);
    expect(waits(study, { ...ANALYST, roles: ['board-chair'] })).toEqual([]);
  });
});
