import type { Limit, MarginView, RequiredMargin, Requirement, VerdictView } from '@shared/contract';
import { formatNumber, fromSi, parseUnit, prettyUnit } from '@shared/units';
import { isTemperature, knownDimension } from '../analysis-ports';
import { numberTex, PROOF_DIGITS, typedTex, unitTex } from './number-tex';

const MINUS = '\u2212';
const MOST_DIGITS = 12;

/** A signed per cent as margins are read: +2.8 %, −3.4 %, 0.0 %; small ones keep one digit. */
export function percentInWords(percent: number): string {
  const size = Math.abs(percent);
  const digits =
    size >= 1000 ? formatNumber(size, 3) : size === 0 || size >= 0.05 ? size.toFixed(1) : formatNumber(size, 1);
  return `${percent > 0 ? '+' : percent < 0 ? MINUS : ''}${digits} %`;
}

/** A margin in words: in per cent where the limit has one, else in the limit's unit. */
export function marginInWords(limit: Limit, margin: MarginView): string {
  if (margin.percent === null) return signedIn(limit, margin.absolute);
  const of = margin.percentOf === 'of the limit' ? '' : ` ${margin.percentOf}`;
  return `${percentInWords(margin.percent)}${of}`;
}

/** A required margin in words: in per cent where the limit has one, else in the limit's unit. */
export function requiredInWords(limit: Limit, required: RequiredMargin): string {
  return required.percent === null ? signedIn(limit, required.absolute) : percentInWords(required.percent);
}

function signedIn(limit: Limit, si: number): string {
  const { unit } = limit.value;
  const parsed = parseUnit(unit);
  const value = parsed.ok ? fromSi(si, parsed.unit, 'difference') : si;
  return `${value > 0 ? '+' : ''}${formatNumber(value, 3)} ${prettyUnit(unit)}`.trim();
}

/** The last line of a proof: the value against the limit as it holds or does not, and the margins in words. */
export function comparisonOf(
  { limit }: Pick<Requirement, 'limit'>,
  verdict: VerdictView,
): { readonly tex: string; readonly text: string } | null {
  const { value, margin, required } = verdict;
  if (!limit || !value || !margin) return null;
  const parts = [`margin ${marginInWords(limit, margin)}`];
  if (required) parts.push(`required ${requiredInWords(limit, required)}`);
  if (margin.atLimit) parts.push('at the limit');
  return { tex: relationTex(limit, value.si, margin.absolute >= 0), text: parts.join(', ') };
}

function relationTex(limit: Limit, si: number, holds: boolean): string {
  const symbol = unitTex(limit.value.unit);
  const unit = symbol ? `\\ ${symbol}` : '';
  const edges = [limit.value.si, limit.upper?.si].filter((edge) => edge !== undefined);
  const x = telling(limit, si, edges);
  const edge = typed(limit, limit.value);
  const le = holds ? '\\le' : '\\nleq';
  switch (limit.relation) {
    case 'at least':
      return `${x} ${holds ? '\\ge' : '\\ngeq'} ${edge}${unit}`;
    case 'at most':
      return `${x} ${le} ${edge}${unit}`;
    case 'between': {
      const upper = limit.upper ? typed(limit, limit.upper) : '';
      if (holds) return `${edge} \\le ${x} \\le ${upper}${unit}`;
      return si < limit.value.si ? `${x} \\ngeq ${edge}${unit}` : `${x} \\nleq ${upper}${unit}`;
    }
    case 'equal within': {
      const tolerance = limit.tolerance ? typed(limit, limit.tolerance, 'difference') : '';
      return `\\left|${x} - ${edge}\\right| ${le} ${tolerance}${unit}`;
    }
  }
}

/** A value of the limit as typed where it is in the limit's own unit, else turned into that unit. */
function typed(limit: Limit, measure: Limit['value'], temperature = temperatureOf(limit)): string {
  const { unit } = limit.value;
  const verbatim = measure.unit === unit ? typedTex(measure.text) : null;
  return verbatim ?? numberTex(formatNumber(inUnit(measure.si, unit, temperature), PROOF_DIGITS));
}

/** A value with as many digits as it takes to tell it from the edges that it differs from. */
function telling(limit: Limit, si: number, edges: readonly number[]): string {
  const { unit } = limit.value;
  const temperature = temperatureOf(limit);
  for (let digits = PROOF_DIGITS; ; digits++) {
    const text = formatNumber(inUnit(si, unit, temperature), digits);
    const blurred = edges.some((edge) => edge !== si && formatNumber(inUnit(edge, unit, temperature), digits) === text);
    if (!blurred || digits >= MOST_DIGITS) return numberTex(text);
  }
}

function temperatureOf(limit: Limit): 'absolute' | 'difference' | undefined {
  return isTemperature(knownDimension(limit.value.unit)) ? limit.temperature : undefined;
}

function inUnit(si: number, unit: string, temperature: 'absolute' | 'difference' | undefined): number {
  const parsed = parseUnit(unit);
  return parsed.ok ? fromSi(si, parsed.unit, temperature) : si;
}
