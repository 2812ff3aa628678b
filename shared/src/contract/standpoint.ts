import * as z from 'zod';

/** From where a read looks: now, a past revision, a baseline, or the draft of a change request. */
export type Standpoint =
  | { readonly kind: 'now' }
  | { readonly kind: 'revision'; readonly revision: number }
  | { readonly kind: 'baseline'; readonly key: string }
  | { readonly kind: 'draft'; readonly key: string };

export const StandpointText = z
  .string()
  .regex(
    /^(now|revision:\d{1,12}|baseline:B\d{1,6}|draft:CR-\d{3,9})$/,
    'must be now, revision:418, baseline:B2 or draft:CR-024',
  )
  .default('now');

/** Reads the text form; anything not in it is a programming error because the schema was checked before. */
export function parseStandpoint(text: string): Standpoint {
  const [kind, rest = ''] = text.split(':');
  if (kind === 'revision') return { kind, revision: Number(rest) };
  if (kind === 'baseline' || kind === 'draft') return { kind, key: rest };
  return { kind: 'now' };
}

/** The text form used in addresses: `now`, `revision:418`, `baseline:B2`, `draft:CR-024`. */
export function standpointText(standpoint: Standpoint): string {
  if (standpoint.kind === 'now') return 'now';
  if (standpoint.kind === 'revision') return `revision:${standpoint.revision}`;
  return `${standpoint.kind}:${standpoint.key}`;
}
