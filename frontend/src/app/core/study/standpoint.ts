import type { Standpoint } from '@shared/contract';

export const NOW: Standpoint = { kind: 'now' };

/** Reads the `at` query parameter; anything not understood is now. */
export function parseStandpoint(at: string | null | undefined): Standpoint {
  const [kind, ...rest] = (at ?? 'now').split(':');
  const name = rest.join(':');
  if (kind === 'revision' && /^\d+$/.test(name)) return { kind, revision: Number(name) };
  if ((kind === 'baseline' || kind === 'draft') && name !== '') return { kind, key: name };
  return NOW;
}

/** The `at` query parameter for a standpoint; undefined for now, which is written by leaving it out. */
export function standpointParam(standpoint: Standpoint): string | undefined {
  switch (standpoint.kind) {
    case 'now':
      return undefined;
    case 'revision':
      return `revision:${standpoint.revision}`;
    case 'baseline':
    case 'draft':
      return `${standpoint.kind}:${standpoint.key}`;
  }
}

/** A standpoint in words: "Now · r418", "Revision r377", "Baseline B2", "Draft CR-024". */
export function describeStandpoint(standpoint: Standpoint, revision: number | undefined): string {
  switch (standpoint.kind) {
    case 'now':
      return revision === undefined ? 'Now' : `Now · r${revision}`;
    case 'revision':
      return `Revision r${standpoint.revision}`;
    case 'baseline':
      return `Baseline ${standpoint.key}`;
    case 'draft':
      return `Draft ${standpoint.key}`;
  }
}

/** True when nothing that happens later can change what is read from there. */
export function isFrozen(standpoint: Standpoint): boolean {
  return standpoint.kind === 'revision' || standpoint.kind === 'baseline';
}
