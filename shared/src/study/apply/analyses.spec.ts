import type { Command, CommandOf } from '@shared/contract';
import { refused } from '../testing/refused';
import { reviewedStudy, seen } from '../testing/reviewed-study';
import {
  ANALYST,
  CHAIR,
  ID,
  MEMBER,
  edit,
  formulaAnalysis,
  idOf,
  quantity,
  smallStudy,
  verifiedBy,
} from '../testing/small-study';
import { definitionDigest } from './analyses';

type Inputs = CommandOf<'analysis.create'>['inputs'];
const A = idOf(80);
const ISP: Inputs = [{ name: 'I_sp', from: { quantityId: ID.isp } }];
const formula = (inputs: Inputs, ...lines: (readonly [string, string])[]): Command =>
  formulaAnalysis(A, 'a', inputs, lines);
const revise = (id: string, version: number, changes: object): Command => ({
  type: 'analysis.revise',
  id,
  version,
  changes,
});
const method = (id: string, version: string, inputs: Inputs): Command => ({
  ...(formulaAnalysis(A, 'a', inputs, []) as CommandOf<'analysis.create'>),
  kind: 'method',
  method: { id, version },
});

describe('writing a formula analysis', () => {
  it('refuses an undeclared name and marks the place', () => {
    const refusal = refused(smallStudy(), ANALYST, formula(ISP, ['v = g_0 * I_sp', 'm/s']));
    expect(refusal).toMatchObject({ code: 'invalid', details: { field: 'lines[0].expression', value: 'g_0 * I_sp' } });
    expect(refusal.message).toContain('g_0');
    const { from, to } = refusal.details.range!;
    expect('g_0 * I_sp'.slice(from, to)).toBe('g_0');
  });

  it('refuses a sum of different dimensions and marks it', () => {
    const refusal = refused(
      smallStudy(),
      ANALYST,
      formula([...ISP, { name: 'm', from: { quantityId: ID.dry } }], ['x = I_sp * 2', 's'], ['y = I_sp + m', '']),
    );
    expect(refusal.details.field).toBe('lines[1].expression');
    expect(refusal.message).toMatch(/Line 2/);
    expect(refusal.message).toMatch(/mass/);
    expect(refusal.details.range).toBeDefined();
  });

  it.each([
    ['a formula that does not parse', [['y = I_sp * ', 's']], 'lines[0].expression'],
    ['a line that uses itself', [['y = y + I_sp', 's']], 'lines[0].expression'],
    [
      'a line that uses a later one',
      [
        ['y = 2 * z', 's'],
        ['z = I_sp', 's'],
      ],
      'lines[0].expression',
    ],
    ['a line named as an input', [['I_sp = 2', '']], 'lines[0].name'],
    [
      'a name used twice',
      [
        ['y = I_sp', 's'],
        ['y = I_sp', 's'],
      ],
      'lines[1].name',
    ],
    ['a line in a unit of another dimension', [['y = I_sp', 'kg']], 'lines[0].unit'],
    ['a line in an unknown unit', [['y = I_sp', 'secs']], 'lines[0].unit'],
    ['no line', [], 'lines'],
  ] as const)('refuses %s', (_case, lines, field) => {
    const refusal = refused(smallStudy(), ANALYST, formula(ISP, ...(lines as unknown as [string, string][])));
    expect(refusal).toMatchObject({ code: 'invalid', details: { field } });
  });

  it.each([
    ['a quantity of another study', { quantityId: idOf(777) }],
    ['an analysis of another study', { analysisId: idOf(777), output: 'x' }],
    ['an output that is not there', { analysisId: ID.rollUp, output: 'x' }],
    ['a constant that is not there', { constant: 'pi_e' }],
  ])('refuses an input from %s', (_case, from) => {
    const refusal = refused(smallStudy(), ANALYST, formula([{ name: 'q', from }], ['y = q', '']));
    expect(refusal.details).toMatchObject({ field: 'inputs[0].from', value: 'q' });
  });

  it('refuses a name bound twice', () => {
    const refusal = refused(smallStudy(), ANALYST, formula([...ISP, ...ISP], ['y = I_sp', 's']));
    expect(refusal.details.field).toBe('inputs[1].name');
  });
});

describe('a circle of analyses', () => {
  it('is refused by its path', () => {
    const study = smallStudy();
    const refusal = refused(
      study,
      ANALYST,
      revise(ID.rollUp, 1, {
        inputs: [
          { name: 'm_dry', from: { quantityId: ID.dry } },
          { name: 'm_p', from: { analysisId: ID.transfer, output: 'm_f' } },
        ],
      }),
    );
    expect(refusal.code).toBe('cycle');
    expect(refusal.message).toContain('AN-001 needs AN-002 needs AN-001');
    expect(refusal.details.value).toBe('AN-001 → AN-002 → AN-001');
  });
});

describe('writing a method analysis', () => {
  const inputs: Inputs = [
    { name: 'I_sp', from: { quantityId: ID.isp } },
    { name: 'm_0', from: { analysisId: ID.rollUp, output: 'm_0' } },
  ];

  it('refuses a method or version that is not in the library', () => {
    const study = smallStudy();
    expect(refused(study, ANALYST, method('perpetual-motion', '1.0.0', [])).details.field).toBe('method');
    expect(refused(study, ANALYST, method('rocket-equation', '99.0.0', [])).details.value).toBe(
      'rocket-equation 99.0.0',
    );
  });

  it('refuses a missing, an unknown and a misfitting input by its port', () => {
    const study = smallStudy();
    const missing = refused(study, ANALYST, method('rocket-equation', '1.0.0', inputs));
    expect(missing.details.field).toBe('inputs.m_p');
    expect(missing.message).toContain('a mass');
    const unknown = [...inputs, { name: 'q', from: { quantityId: ID.dry } }];
    expect(refused(study, ANALYST, method('rocket-equation', '1.0.0', unknown)).details.field).toBe('inputs[2].name');
    const misfit = [...inputs, { name: 'm_p', from: { quantityId: ID.isp } }];
    const refusal = refused(study, ANALYST, method('rocket-equation', '1.0.0', misfit));
    expect(refusal.details).toMatchObject({ field: 'inputs[2].from', value: 'Q-001' });
    expect(refusal.message).toMatch(/a time.*a mass/);
  });

  it('keeps temperatures and their differences apart', () => {
    const study = smallStudy();
    edit(
      study,
      ANALYST,
      quantity(idOf(81), 'T_r', '800', 'K', { temperature: 'difference' }),
      quantity(idOf(82), 'T_s', '50', 'K'),
      quantity(idOf(83), 'P', '1', 'MW'),
      quantity(idOf(84), 'eps', '0.9', '1'),
    );
    const refusal = refused(
      study,
      ANALYST,
      method('radiator-sizing', '1.0.0', [
        { name: 'Q', from: { quantityId: idOf(83) } },
        { name: 'eps', from: { quantityId: idOf(84) } },
        { name: 'T_r', from: { quantityId: idOf(81) } },
        { name: 'T_s', from: { quantityId: idOf(82) } },
      ]),
    );
    expect(refusal.message).toContain('a temperature difference');
  });
});

describe('an external analysis', () => {
  const external = (results: CommandOf<'analysis.create'>['results'], inputs: Inputs = []): Command => ({
    ...(formulaAnalysis(A, 'a', inputs, []) as CommandOf<'analysis.create'>),
    kind: 'external',
    results,
  });
  const result = (name: string, text: string, unit: string) => ({
    name,
    label: '',
    value: { text, unit },
    uncertainty: null,
    document: 'REP-1',
  });

  it('needs a result, each name once, in known units, from this study', () => {
    const study = smallStudy();
    expect(refused(study, ANALYST, external([])).details.field).toBe('results');
    expect(refused(study, ANALYST, external([result('m', '1', 't'), result('m', '2', 't')])).details.value).toBe('m');
    expect(refused(study, ANALYST, external([result('m', '1', 'tt')])).details.field).toBe('results[0].value');
    const foreign: Inputs = [{ name: 'q', from: { quantityId: idOf(777) } }];
    expect(refused(study, ANALYST, external([result('m', '1', 't')], foreign)).details.field).toBe('inputs[0].from');
    edit(study, ANALYST, external([result('m', '1', 't')]));
  });
});

describe('revising an analysis', () => {
  it('keeps what others rest on, in its dimension', () => {
    const study = smallStudy();
    const gone = refused(
      study,
      ANALYST,
      revise(ID.rollUp, 1, { lines: [{ name: 'm', expression: 'm_dry + m_p', unit: 't', label: '' }] }),
    );
    expect(gone).toMatchObject({ code: 'in-use', details: { value: 'm_0' } });
    const other = refused(
      study,
      ANALYST,
      revise(ID.rollUp, 1, { lines: [{ name: 'm_0', expression: 'm_dry / m_p', unit: '', label: '' }] }),
    );
    expect(other.message).toMatch(/AN-002 rests on m_0 as a mass/);
  });

  it('keeps a temperature a temperature for what rests on it', () => {
    const study = smallStudy();
    const T: Inputs = [{ name: 'T', from: { quantityId: idOf(81) } }];
    edit(study, ANALYST, quantity(idOf(81), 'T', '300', 'K'), formulaAnalysis(A, 'a', T, [['y = T', 'K']]));
    edit(
      study,
      ANALYST,
      formulaAnalysis(idOf(82), 'b', [{ name: 'y', from: { analysisId: A, output: 'y' } }], [['z = y', 'K']]),
    );
    const line = { name: 'y', expression: 'T - T', unit: 'K', label: '' };
    const refusal = refused(study, ANALYST, revise(A, 1, { lines: [line] }));
    expect(refusal.message).toContain('it would become a temperature difference');
  });

  it('voids the check and makes the last to write it its author', () => {
    const study = smallStudy();
    edit(study, MEMBER, { type: 'analysis.check', id: ID.rollUp, version: 1, remark: '' });
    edit(study, MEMBER, revise(ID.rollUp, 2, { assumptions: 'no losses' }));
    expect(study.get('analysis', ID.rollUp)).toMatchObject({ check: null, authorId: MEMBER.id, version: 3 });
    expect(refused(study, MEMBER, { type: 'analysis.check', id: ID.rollUp, version: 3, remark: '' }).code).toBe(
      'forbidden',
    );
  });

  it('of one that verifies a baselined requirement needs a change request', () => {
    const study = reviewedStudy();
    const at = seen(study, 'analysis', ID.rollUp);
    const refusal = refused(study, ANALYST, revise(at.id, at.version, { name: 'x' }));
    expect(refusal.code).toBe('controlled');
    expect(refusal.message).toContain('verifies a baselined requirement');
    expect(refused(study, ANALYST, { type: 'analysis.remove', ...at }).code).toBe('controlled');
  });

  it('on a stale version is refused', () => {
    const study = smallStudy();
    edit(study, ANALYST, revise(ID.rollUp, 1, { name: 'x' }));
    expect(refused(study, ANALYST, revise(ID.rollUp, 1, { name: 'y' })).code).toBe('stale');
  });

  it('removes none that something rests on', () => {
    const refusal = refused(smallStudy(), ANALYST, { type: 'analysis.remove', id: ID.rollUp, version: 1 });
    expect(refusal.code).toBe('in-use');
    expect(refusal.message).toContain('AN-002, VEH-002');
  });
});

describe('the check of an analysis', () => {
  it('is refused to its author and a second time, and is bound to the definition', () => {
    const study = smallStudy();
    const check = (version: number): Command => ({ type: 'analysis.check', id: ID.rollUp, version, remark: 'ok' });
    const own = refused(study, ANALYST, check(1));
    expect(own.code).toBe('forbidden');
    expect(own.message).toBe('You wrote AN-001; somebody else signs its check.');
    edit(study, MEMBER, check(1));
    const analysis = study.get('analysis', ID.rollUp)!;
    expect(analysis.check).toMatchObject({ personId: MEMBER.id, digest: definitionDigest(analysis) });
    expect(refused(study, CHAIR, check(2)).code).toBe('state');
  });
});

describe('linking an output to a requirement', () => {
  it('refuses another dimension, an output that is not there and one linked already', () => {
    const study = smallStudy();
    const misfit = refused(study, ANALYST, verifiedBy(A, ID.outbound, ID.rollUp, 'm_0'));
    expect(misfit.details).toMatchObject({ field: 'output', value: 'AN-001 m_0' });
    expect(misfit.message).toMatch(/it is a mass; the limit of PRP-001 is a speed/);
    expect(refused(study, ANALYST, verifiedBy(A, ID.outbound, ID.transfer, 'nothing')).message).toContain(
      'v_e, m_f, Delta_v',
    );
    expect(refused(study, ANALYST, verifiedBy(A, ID.deltaV, ID.transfer, 'Delta_v')).message).toContain(
      'already linked',
    );
    expect(refused(study, ANALYST, verifiedBy(A, ID.outbound, idOf(777), 'x')).details.field).toBe('analysisId');
    expect(refused(study, ANALYST, verifiedBy(A, idOf(777), ID.transfer, 'v_e')).details.field).toBe('requirementId');
  });
});
