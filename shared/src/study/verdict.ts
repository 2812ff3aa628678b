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

/** One edge of a limit as x sees it: signed distance in SI, positive on the good side, and the size that "at the edge" is relative to. */
interface Edge {
  readonly distance: number;
  readonly scale: number;
}

/** The edges of a limit; what lies on the good side of all of them meets it. */
function edgesOf(limit: Limit, x: number): readonly Edge[] {
  const value = limit.value.si;
  const below: Edge = { distance: x - value, scale: Math.abs(value) };
  switch (limit.relation) {
    case 'at least':
      return [below];
    case 'at most':
      return [{ distance: value - x, scale: Math.abs(value) }];
    case 'between': {
      const upper = limit.upper?.si ?? value;
      return [below, { distance: upper - x, scale: Math.abs(upper) }];
    }
    case 'equal within': {
      const tolerance = limit.tolerance?.si ?? 0;
      return [{ distance: tolerance - Math.abs(x - value), scale: Math.max(Math.abs(value), tolerance) }];
    }
  }
}

/** Signed distance of x from the limit in SI, positive on the good side; within 1e-9 of the limit it is 0. */
export function marginOf(limit: Limit, x: number): number {
  return Math.min(
    ...edgesOf(limit, x).map(({ distance, scale }) => (Math.abs(distance) <= AT_LIMIT * scale ? 0 : distance)),
  );
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
  const edges = edgesOf(limit, x);
  // Touching counts through rounding; the edge itself is on the good side.
  const rounding = ({ scale }: Edge): number => AT_LIMIT * Math.max(scale, expanded);
  if (edges.every((edge) => edge.distance >= expanded - rounding(edge))) {
    const short = required && edges.some((edge) => edge.distance < required.absolute - AT_LIMIT * edge.scale);
    return short ? 'short margin' : 'compliant';
  }
  const wrong = edges.some((edge) => -edge.distance > expanded + rounding(edge));
  return wrong ? 'non-compliant' : 'indeterminate';
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
