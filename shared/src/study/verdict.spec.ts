import { COMPLIANCES, VERDICTS, type Limit, type LimitInput, type RequiredMargin } from '@shared/contract';
import { readLimit } from './measures';
import { complianceOf, judge, lowers, marginOf, marginView, percentBase, verdictRank, worseVerdict } from './verdict';

function limitOf(relation: LimitInput['relation'], text: string, unit: string, more: Partial<LimitInput> = {}): Limit {
  return readLimit('limit', { relation, value: { text, unit }, temperature: 'absolute', condition: '', ...more })!;
}
const required = (absolute: number): RequiredMargin => ({
  percent: 5,
  absolute,
  definition: 'of the limit',
  source: '',
});

const atLeast = limitOf('at least', '100', 'm');
const atMost = limitOf('at most', '100', 'm');
const between = limitOf('between', '10', 'm', { upper: { text: '30', unit: 'm' } });
const equal = limitOf('equal within', '50', 'm', { tolerance: { text: '5', unit: 'm' } });

describe('margin', () => {
  it.each([
    // at least: x − L; at most: L − x
    ['at least, above', atLeast, 112, 12, 12],
    ['at least, below', atLeast, 97, -3, -3],
    ['at most, below', atMost, 90, 10, 10],
    ['at most, above', atMost, 103.5, -3.5, -3.5],
    // between: distance to the nearest edge, per cent of the half-width (30 − 10)/2 = 10
    ['between, nearer to the lower edge', between, 14, 4, 40],
    ['between, nearer to the upper edge', between, 27, 3, 30],
    ['between, in the middle', between, 20, 10, 100],
    ['between, below', between, 8, -2, -20],
    ['between, above', between, 31, -1, -10],
    // equal within: tol − |x − target|, per cent of tol = 5
    ['equal within, exact', equal, 50, 5, 100],
    ['equal within, below', equal, 48, 3, 60],
    ['equal within, above', equal, 54, 1, 20],
    ['equal within, outside', equal, 57, -2, -40],
  ])('%s', (_name, limit, x, absolute, percent) => {
    const margin = marginView(limit, x, false);
    expect(margin.absolute).toBeCloseTo(absolute, 12);
    expect(margin.percent).toBeCloseTo(percent, 10);
  });

  it('is of |L|, so that a negative limit keeps the sign of the good side', () => {
    const limit = limitOf('at least', '-40', 'm');
    expect(marginView(limit, -30, false)).toMatchObject({ absolute: 10, percent: 25 });
    expect(marginView(limit, -50, false)).toMatchObject({ absolute: -10, percent: -25 });
  });

  it('has no per cent of a limit of zero', () => {
    const limit = limitOf('at most', '0', 'm');
    expect(marginView(limit, -2, false)).toMatchObject({ absolute: 2, percent: null });
    expect(percentBase(limit, false)).toBeNull();
  });

  it('has no per cent of a limit on a temperature difference', () => {
    const limit = limitOf('at most', '10', 'K', { temperature: 'difference' });
    expect(marginView(limit, 8, true)).toMatchObject({ absolute: 2, percent: null });
  });

  it('is in kelvin for a temperature, and its per cent is of kelvin and says so', () => {
    // 100 °C = 373.15 K; 80 °C leaves 20 K, 20/373.15 = 5.3598 %
    const limit = limitOf('at most', '100', 'degC');
    const margin = marginView(limit, 353.15, true);
    expect(margin.absolute).toBeCloseTo(20, 9);
    expect(margin.percent).toBeCloseTo((20 / 373.15) * 100, 9);
    expect(margin.percentOf).toBe('of the limit in kelvin');
  });

  it('names what its per cent is of', () => {
    expect(marginView(atLeast, 1, false).percentOf).toBe('of the limit');
    expect(marginView(between, 1, false).percentOf).toBe('of the half-width');
    expect(marginView(equal, 1, false).percentOf).toBe('of the tolerance');
  });

  it('is not loosened by a tolerance on a one-sided limit, which is a note on the measurement', () => {
    const noted = limitOf('at least', '100', 'm', { tolerance: { text: '5', unit: 'm' } });
    expect(marginOf(noted, 97)).toBe(-3);
    expect(judge(noted, 97, 0, null)).toBe('non-compliant');
  });
});

describe('equality', () => {
  it.each([
    ['at least', atLeast, 100 * (1 - 0.9e-9), 100 * (1 - 1.2e-9)],
    ['at most', atMost, 100 * (1 + 0.9e-9), 100 * (1 + 1.2e-9)],
    ['between, lower edge', between, 10 * (1 - 0.9e-9), 10 * (1 - 1.2e-9)],
    ['between, upper edge', between, 30 * (1 + 0.9e-9), 30 * (1 + 1.2e-9)],
  ])(
    '%s: within 1e-9 of the limit counts as at it, on the good side; beyond does not',
    (_name, limit, inside, outside) => {
      expect(marginView(limit, inside, false)).toMatchObject({ absolute: 0, atLimit: true });
      expect(judge(limit, inside, 0, null)).toBe('compliant');
      expect(marginView(limit, outside, false).atLimit).toBe(false);
      expect(judge(limit, outside, 0, null)).toBe('non-compliant');
    },
  );

  it('forgives the rounding of a sum of tenths', () => {
    // 0.1 + 0.2 = 0.30000000000000004
    const limit = limitOf('at most', '0.3', 'm');
    expect(judge(limit, 0.1 + 0.2, 0, null)).toBe('compliant');
    expect(marginOf(limit, 0.1 + 0.2)).toBe(0);
  });
});

describe('verdict under uncertainty', () => {
  it.each([
    // limit 100, good side above: all of [x − U, x + U] counts
    ['wholly on the good side', atLeast, 110, 5, 'compliant'],
    ['touching the limit from the good side', atLeast, 105, 5, 'compliant'],
    ['over the limit from the good side', atLeast, 104, 5, 'indeterminate'],
    ['at the limit', atLeast, 100, 5, 'indeterminate'],
    ['over the limit from the bad side', atLeast, 96, 5, 'indeterminate'],
    // The limit itself is on the good side, so touching it from below is not wholly on the bad side.
    ['touching the limit from the bad side', atLeast, 95, 5, 'indeterminate'],
    ['wholly on the bad side', atLeast, 94, 5, 'non-compliant'],
    ['at most, wholly good', atMost, 90, 5, 'compliant'],
    ['at most, touching', atMost, 95, 5, 'compliant'],
    ['at most, across', atMost, 98, 5, 'indeterminate'],
    ['at most, wholly bad', atMost, 106, 5, 'non-compliant'],
    ['between, wholly inside', between, 20, 9, 'compliant'],
    ['between, touching both edges', between, 20, 10, 'compliant'],
    ['between, wider than the range', between, 20, 11, 'indeterminate'],
    ['between, across the upper edge', between, 31, 2, 'indeterminate'],
    ['between, wholly outside', between, 33, 2, 'non-compliant'],
    ['equal within, wholly inside', equal, 51, 4, 'compliant'],
    ['equal within, across', equal, 53, 4, 'indeterminate'],
    ['equal within, wholly outside', equal, 60, 4, 'non-compliant'],
  ] as const)('%s', (_name, limit, x, expanded, verdict) => {
    expect(judge(limit, x, expanded, null)).toBe(verdict);
  });

  it('takes no stated uncertainty as U = 0', () => {
    expect(judge(atLeast, 100.001, 0, null)).toBe('compliant');
    expect(judge(atLeast, 99.999, 0, null)).toBe('non-compliant');
  });

  it('sees touching through rounding', () => {
    // 0.3 − 0.2 = 0.09999999999999998 and 0.1 + 0.2 = 0.30000000000000004: both touch
    expect(judge(limitOf('at least', '0.1', 'm'), 0.3, 0.2, null)).toBe('compliant');
    expect(judge(limitOf('at least', '0.3', 'm'), 0.1, 0.2 * (1 - 1e-12), null)).toBe('indeterminate');
    // at a limit of zero the rounding is that of U: 0.3 against 0.1 + 0.2
    expect(judge(limitOf('at least', '0', 'm'), 0.3, 0.1 + 0.2, null)).toBe('compliant');
  });
});

describe('required margin', () => {
  it.each([
    ['reached', 105, 0, 'compliant'],
    ['within rounding of reached', 105 - 1e-8, 0, 'compliant'],
    ['not reached', 104.9, 0, 'short margin'],
    ['not reached at the limit', 100, 0, 'short margin'],
    ['of no account below the limit', 99, 0, 'non-compliant'],
    // indeterminate comes before short margin
    ['of no account when the limit lies inside U', 102, 3, 'indeterminate'],
    // the margin is that of the value itself, not of its lower end
    ['reached by the value whatever U leaves', 106, 4, 'compliant'],
  ] as const)('%s', (_name, x, expanded, verdict) => {
    expect(judge(atLeast, x, expanded, required(5))).toBe(verdict);
  });
});

describe('precedence', () => {
  it('lets the worse of two decide: no evidence > not computable > non-compliant > indeterminate > short margin > compliant', () => {
    const order = [
      'no evidence',
      'not computable',
      'non-compliant',
      'indeterminate',
      'short margin',
      'compliant',
    ] as const;
    expect([...VERDICTS].sort((a, b) => verdictRank(a) - verdictRank(b))).toEqual(order);
    order.forEach((worse, i) => {
      for (const better of order.slice(i)) {
        expect(worseVerdict(worse, better)).toBe(worse);
        expect(worseVerdict(better, worse)).toBe(worse);
      }
    });
  });
});

describe('compliance', () => {
  it.each([
    ['compliant', 'yes'],
    ['short margin', 'partial'],
    ['indeterminate', 'partial'],
    ['non-compliant', 'no'],
    ['not computable', 'not assessed'],
    ['no evidence', 'not assessed'],
  ] as const)('%s reads %s', (verdict, compliance) => {
    expect(complianceOf(verdict)).toBe(compliance);
  });

  it('is lowered and never raised', () => {
    const allowed = COMPLIANCES.flatMap((from) =>
      COMPLIANCES.filter((to) => lowers(from, to)).map((to) => `${from}→${to}`),
    );
    expect(allowed).toEqual([
      'yes→partial',
      'yes→no',
      'yes→not assessed',
      'partial→no',
      'partial→not assessed',
      'no→not assessed',
    ]);
  });
});
