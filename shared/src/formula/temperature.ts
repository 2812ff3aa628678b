import type { TemperatureKind } from '@shared/units';

/** The kind of a temperature while a sum is checked; `negated` is minus an absolute one, undefined is plain kelvin. */
export type Temperature = TemperatureKind | 'negated' | undefined;

type Combined =
  { readonly ok: true; readonly temperature: Temperature } | { readonly ok: false; readonly message: string };

/** A kind of temperature in words. */
export function temperatureWords(kind: Temperature): string {
  switch (kind) {
    case 'absolute':
      return 'an absolute temperature';
    case 'difference':
      return 'a temperature difference';
    case 'negated':
      return 'a negated temperature';
    case undefined:
      return 'a plain number of kelvin';
  }
}

/**
 * The kind of a sum or difference. An absolute temperature counts 1, a difference 0, a negated absolute one -1; a sum
 * has a meaning only when the counts add up to one of these. Plain kelvin goes along as a difference.
 */
export function combineTemperatures(op: '+' | '-', a: Temperature, b: Temperature): Combined {
  if (a === undefined && b === undefined) return { ok: true, temperature: undefined };
  const total = weight(a) + (op === '+' ? 1 : -1) * weight(b);
  if (total === 1) return { ok: true, temperature: 'absolute' };
  if (total === 0) {
    const plain = a === undefined || b === undefined;
    return { ok: true, temperature: plain ? undefined : 'difference' };
  }
  if (total === -1 && op === '+') return { ok: true, temperature: 'negated' };
  if (a === 'absolute' && b === 'absolute') {
    return { ok: false, message: 'adds two absolute temperatures; add a temperature difference to a temperature' };
  }
  const [left, right] = [temperatureWords(a), temperatureWords(b)];
  const message = op === '+' ? `adds ${right} to ${left}` : `subtracts ${right} from ${left}`;
  return { ok: false, message: `${message}, which is no temperature` };
}

function weight(kind: Temperature): number {
  if (kind === 'absolute') return 1;
  return kind === 'negated' ? -1 : 0;
}
