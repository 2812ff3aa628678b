/** Why a value could not be computed, and which node failed first. */
export interface Failure {
  readonly code: 'missing' | 'domain' | 'division-by-zero' | 'overflow' | 'refused';
  readonly message: string;
  /** Identifier of the first culprit; for a formula evaluated on its own, the name at fault or ''. */
  readonly origin: string;
}

/** A computed value in SI, or the reason there is none. NaN and Infinity never appear as values. */
export type Outcome = { readonly ok: true; readonly value: number } | { readonly ok: false; readonly failure: Failure };
