import { superscript } from './dimension-names';
import { rational } from './rational';

/**
 * A unit text for display: "W/(m^2 K)" → "W/(m² K)", "um" → "µm", "degC" → "°C", "kohm" → "kΩ"; "" for "1".
 * Never fails: what it does not know stays as it is.
 */
export function prettyUnit(unit: string): string {
  const text = unit.trim();
  if (text === '1') return '';
  return text
    .replace(/\^(-?\d+)(?![\d.])/g, (_, exponent: string) => superscript(rational(Number(exponent))))
    .replace(/(?<=\p{L})(?!(?<=(?<!\p{L})g)0(?!\d))(-?\d+)/gu, (_, exponent: string) =>
      superscript(rational(Number(exponent))),
    )
    .replace(/\s*[*·⋅]\s*/g, '·')
    .replace(/degC\b/g, '°C')
    .replace(/(?<!\p{L})([um]?|[kM])ohm\b/gu, '$1Ω')
    .replace(/(?<!\p{L})u(?=(?:m|g|s|N|Pa|bar|J|W|K|A|C|V|Ω|F|H|T|Gy|Sv|rad)(?!\p{L}))/gu, 'µ')
    .replace(/(?<!\p{L})g_?0/gu, 'g₀');
}
