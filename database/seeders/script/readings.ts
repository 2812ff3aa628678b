import type { LimitInput, MeasureInput, UncertaintyInput } from '@shared/contract';

/** "812 K" → digits and unit; a plain number has no unit. */
export function measure(text: string): MeasureInput {
  const blank = text.indexOf(' ');
  return blank < 0 ? { text, unit: '' } : { text: text.slice(0, blank), unit: text.slice(blank + 1) };
}

/** "10 K" → normal with that half-width at k = 2; "rect 10 K" → rectangular. */
export function uncertainty(text: string): UncertaintyInput {
  return text.startsWith('rect ')
    ? { distribution: 'rectangular', halfWidth: measure(text.slice(5)), k: 2 }
    : { distribution: 'normal', halfWidth: measure(text), k: 2 };
}

/** "≥ 38.0 km/s", "≤ 6.0 yr", "270 K … 310 K" or "400 V ± 20 V", with an optional condition. */
export function limit(text: string, condition = ''): LimitInput {
  const common = { temperature: 'absolute' as const, condition };
  const [low, high] = text.split(' … ');
  if (low !== undefined && high !== undefined)
    return { ...common, relation: 'between', value: measure(low), upper: measure(high) };
  const [target, tolerance] = text.split(' ± ');
  if (target !== undefined && tolerance !== undefined)
    return { ...common, relation: 'equal within', value: measure(target), tolerance: measure(tolerance) };
  if (text.startsWith('≥ ')) return { ...common, relation: 'at least', value: measure(text.slice(2)) };
  if (text.startsWith('≤ ')) return { ...common, relation: 'at most', value: measure(text.slice(2)) };
  throw new Error(`“${text}” is no limit`);
}
