/** Why a command was refused: a stable code, a sentence for the person, and where it can be said, the field, the value and what would be right. */
export type RefusalCode =
  'forbidden' | 'invalid' | 'not-found' | 'stale' | 'controlled' | 'conflict' | 'in-use' | 'cycle' | 'state';

export interface RefusalDetails {
  readonly field?: string;
  readonly value?: string;
  readonly expected?: string;
  /** Current state of what moved, for a stale edit. */
  readonly current?: unknown;
  /** Character range inside a formula. */
  readonly range?: { readonly from: number; readonly to: number };
}

/** Thrown by rules and commands; nothing is applied once it is. `command` is set by the dispatcher to the position in the batch. */
export class Refusal extends Error {
  command: number | null = null;
  constructor(
    readonly code: RefusalCode,
    message: string,
    readonly details: RefusalDetails = {},
  ) {
    super(message);
    this.name = 'Refusal';
  }
}

/** Refuses bad input: names the field, the value given and what would be right. */
export function invalid(
  field: string,
  value: string | null | undefined,
  expected: string,
  range?: RefusalDetails['range'],
): Refusal {
  const shown = value ? `“${value}”` : 'nothing';
  return new Refusal('invalid', `${field}: ${shown} was given; ${expected}`, {
    field,
    value: value ?? '',
    expected,
    range,
  });
}
