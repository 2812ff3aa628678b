import type { Limit, MarginView, RequiredMargin, Verdict, Compliance } from '@shared/contract';

/** Relative distance from the limit within which a value counts as at the limit, on the good side. */
export const AT_LIMIT = 1e-9;

/** Order of precedence: the first of several verdicts in this list decides. */
export const PRECEDENCE: readonly Verdict[] = [
  'no evidence',
  'not computable',
  'non-compliant',
  'indeterminate',
  'short margin',
  'compliant',
];

/** The worse of two verdicts by precedence. */
export function worseVerdict(a: Verdict, b: Verdict): Verdict {
  return PRECEDENCE.indexOf(a) <= PRECEDENCE.indexOf(b) ? a : b;
}

/** How good a verdict is, 0 (worst) to 5 (compliant). */
export function verdictRank(verdict: Verdict): number {
  return PRECEDENCE.indexOf(verdict);
}

/** The number that a margin in per cent is of, in SI, with what to call it; null where no per cent can be stated. */
export function percentBase(limit: Limit, temperatureLimit: boolean): { base: number; of: string } | null {
  const value = limit.value.si;
  switch (limit.relation) {
    case 'between': {
      const half = ((limit.upper?.si ?? value) - value) / 2;
      return half > 0 ? { base: half, of: 'of the half-width' } : null;
    }
    case 'equal within': {
      const tolerance = limit.tolerance?.si ?? 0;
      return tolerance > 0 ? { base: tolerance, of: 'of the tolerance' } : null;
    }
    default:
      if (value === 0 || limit.temperature === 'difference') return null;
      return { base: Math.abs(value), of: temperatureLimit ? 'of the limit in kelvin' : 'of the limit' };
  }
}

/** Signed distance of x from the limit in SI, positive on the good side; within 1e-9 of the limit it is 0. */
export function marginOf(limit: Limit, x: number): number {
  const value = limit.value.si;
  switch (limit.relation) {
    case 'at least':
      return snapped(x - value, value);
    case 'at most':
      return snapped(value - x, value);
    case 'between': {
      const upper = limit.upper?.si ?? value;
      const low = snapped(x - value, value);
      const high = snapped(upper - x, upper);
      return Math.min(low, high);
    }
    case 'equal within': {
      const tolerance = limit.tolerance?.si ?? 0;
      return snapped(tolerance - Math.abs(x - value), Math.max(Math.abs(value), tolerance));
    }
  }
}

function snapped(margin: number, scale: number): number {
  return Math.abs(margin) <= AT_LIMIT * Math.abs(scale) ? 0 : margin;
}

/** Margin with its per cent and what the per cent is of. */
export function marginView(limit: Limit, x: number, temperatureLimit: boolean): MarginView {
  const absolute = marginOf(limit, x);
  const base = percentBase(limit, temperatureLimit);
  return {
    absolute,
    percent: base ? (absolute / base.base) * 100 : null,
    percentOf: base?.of ?? 'no per cent of this limit',
    atLimit: absolute === 0,
  };
}

/**
 * The verdict for a value x with expanded uncertainty U (0 when none is stated) against a limit, in SI.
 * [x−U, x+U] wholly on the good side: compliant, or short margin when the required margin is not reached; wholly on the
 * bad side: non-compliant; else indeterminate. Decision rule of this product after JCGM 106 (from memory).
 */
export function judge(limit: Limit, x: number, expanded: number, required: RequiredMargin | null): Verdict {
  const margin = marginOf(limit, x);
  const scale = Math.max(Math.abs(limit.value.si), Math.abs(limit.upper?.si ?? 0));
  const tolerance = AT_LIMIT * scale;
  if (margin >= expanded - tolerance) {
    return required && margin < required.absolute - tolerance ? 'short margin' : 'compliant';
  }
  return margin < 0 && -margin > expanded ? 'non-compliant' : 'indeterminate';
}

/** Compliance that follows from a verdict; a person may lower it, never raise it. */
export function complianceOf(verdict: Verdict): Compliance {
  switch (verdict) {
    case 'compliant':
      return 'yes';
    case 'short margin':
    case 'indeterminate':
      return 'partial';
    case 'non-compliant':
      return 'no';
    case 'not computable':
    case 'no evidence':
      return 'not assessed';
  }
}

const LOWNESS: readonly Compliance[] = ['yes', 'partial', 'no', 'not assessed'];

/** Whether going from the computed compliance to this one lowers it; anything may be lowered to "not assessed". */
export function lowers(from: Compliance, to: Compliance): boolean {
  return LOWNESS.indexOf(to) > LOWNESS.indexOf(from);
}
