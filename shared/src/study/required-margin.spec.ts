import type { CommandOf, Policy } from '@shared/contract';
import { proveAll, type Proven } from './prove';
import { requiredMargin } from './required-margin';
import type { Study } from './study';
import { refused } from './testing/refused';
import {
  ANALYST,
  ID,
  OWNER,
  edit,
  formulaAnalysis,
  idOf,
  limit,
  quantity,
  requirement,
  smallStudy,
  verifiedBy,
  viewOf,
} from './testing/small-study';
import { comparisonOf } from './views/comparison';
import { complianceView } from './views/compliance-view';
import { requirementsView } from './views/requirements-view';

const HELD = idOf(300);
type Asked = Partial<CommandOf<'policy.create'>>;

/** The small study with one more requirement, of a parameter that has its own row of the policy. */
function studyWith(
  asked: Asked,
  held: ReturnType<typeof limit>,
  [text, unit]: readonly [string, string],
  temperature: 'absolute' | 'difference' = 'absolute',
): Study {
  const study = smallStudy();
  edit(
    study,
    OWNER,
    {
      type: 'policy.create',
      id: idOf(301),
      parameter: 'held',
      maturity: 'concept',
      percent: 0,
      absolute: null,
      definition: 'distance from the limit',
      source: 'for tests',
      ...asked,
    },
    requirement({ id: HELD, title: 'hold', prefix: 'HLD', parameter: 'held', limit: held }),
  );
  edit(
    study,
    ANALYST,
    quantity(idOf(302), 'x', text, unit, { temperature }),
    formulaAnalysis(idOf(303), 'Held', [{ name: 'x', from: { quantityId: idOf(302) } }], [['y = x', unit]]),
    verifiedBy(idOf(304), HELD, idOf(303), 'y'),
  );
  return study;
}
const provenIn = (study: Study): Proven => proveAll(study).proven.get(HELD)!;

describe('an absolute required margin', () => {
  const drift = (value: string): Study =>
    studyWith({ absolute: { text: '2', unit: 'mm' } }, limit('at most', '0', 'mm'), [value, 'mm']);

  it.each([
    // margin = 0 − x against 2 mm asked for
    ['-3', 'compliant'],
    ['-2', 'compliant'],
    ['-1.9', 'short margin'],
    ['0.1', 'non-compliant'],
  ])('judges %s mm against a limit of zero: %s', (value, verdict) => {
    const proven = provenIn(drift(value));
    expect(proven).toMatchObject({ verdict, margin: { percent: null }, required: { percent: null } });
    expect(proven.required!.absolute).toBeCloseTo(0.002, 15);
  });

  it('is read out in the unit of the limit where there is no per cent', () => {
    const view = viewOf(drift('-1.9'));
    const row = requirementsView(view).rows.find(({ key }) => key === 'HLD-001')!;
    expect(comparisonOf(row, row)!.text).toBe('margin +1.9 mm, required +2 mm');
    expect(complianceView(view).rows.find(({ key }) => key === 'HLD-001')!.policy).toBe(
      '+2 mm, distance from the limit (for tests)',
    );
  });

  it.each([
    // 10 K − x against 2 K asked for; a margin of 2 °C is a difference of 2 K
    ['8.5', 'short margin'],
    ['7.5', 'compliant'],
  ])('judges a difference of %s K against a limit on a temperature difference: %s', (value, verdict) => {
    const study = studyWith(
      { absolute: { text: '2', unit: 'degC' } },
      limit('at most', '10', 'K', { temperature: 'difference' }),
      [value, 'K'],
      'difference',
    );
    expect(provenIn(study)).toMatchObject({ verdict, required: { percent: null, absolute: 2 } });
  });

  it('goes before the per cent, and says what per cent of the limit it is', () => {
    // 6 t of 120 t is 5 %
    const study = studyWith({ percent: 50, absolute: { text: '6', unit: 't' } }, limit('at most', '120', 't'), [
      '113',
      't',
    ]);
    expect(provenIn(study)).toMatchObject({ verdict: 'compliant', required: { absolute: 6000 } });
    expect(provenIn(study).required!.percent).toBeCloseTo(5, 12);
  });

  it('leaves limits of another dimension to the per cent', () => {
    // 10 % of 120 t = 12 t
    const study = studyWith({ percent: 10, absolute: { text: '2', unit: 'K' } }, limit('at most', '120', 't'), [
      '113',
      't',
    ]);
    expect(provenIn(study)).toMatchObject({ verdict: 'short margin', required: { percent: 10, absolute: 12_000 } });
  });

  it('is not missed where a limit of zero has a row with a per cent alone: nothing can be asked for then', () => {
    const study = studyWith({ percent: 10 }, limit('at most', '0', 'mm'), ['-1', 'mm']);
    expect(provenIn(study)).toMatchObject({ verdict: 'compliant', required: null });
  });

  it('is none in rows written before there were any', () => {
    const study = smallStudy();
    const { absolute: _absolute, ...older } = study.get('policy', ID.policy)!;
    study.put('policy', older as Policy);
    const { limit: atLeast, ...rest } = study.get('requirement', ID.deltaV)!;
    // 5 % of 38 km/s
    expect(requiredMargin(study, { ...rest, limit: atLeast }, atLeast!)).toMatchObject({ percent: 5, absolute: 1900 });
  });
});

describe('a row of the margin policy', () => {
  const row: CommandOf<'policy.create'> = {
    type: 'policy.create',
    id: idOf(301),
    parameter: 'held',
    maturity: 'concept',
    percent: 0,
    absolute: { text: '5', unit: 'K' },
    definition: 'd',
    source: 's',
  };

  it('keeps the absolute margin as typed, and drops it when it is revised without one', () => {
    const study = smallStudy();
    edit(study, OWNER, row);
    expect(study.get('policy', idOf(301))!.absolute).toEqual({ text: '5', unit: 'K', si: 5 });
    const { parameter: _parameter, maturity: _maturity, ...fields } = row;
    const revise = { ...fields, type: 'policy.revise', id: idOf(301), version: 1, absolute: null } as const;
    edit(study, OWNER, revise);
    expect(study.get('policy', idOf(301))!.absolute).toBeNull();
  });

  it.each([
    ['a margin below zero', { text: '-5', unit: 'K' }],
    ['a margin of zero', { text: '0', unit: 'K' }],
    ['an unknown unit', { text: '5', unit: 'sceonds' }],
    ['what is no number', { text: 'some', unit: 'K' }],
  ])('refuses %s', (_what, absolute) => {
    const refusal = refused(smallStudy(), OWNER, { ...row, absolute });
    expect(refusal).toMatchObject({ code: 'invalid', details: { field: 'absolute' } });
  });
});
