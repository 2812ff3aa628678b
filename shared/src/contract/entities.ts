import type { Command } from './commands';
import type { Limit, Measure, Uncertainty } from './measure';
import type { BASES, BUDGET_RULES, BUDGET_SENSES, Compliance, VERIFICATION_METHODS } from './vocabulary';

/** Fields every entity of a study has: a sortable identifier and a version that each accepted edit raises. */
interface Entity {
  readonly id: string;
  readonly version: number;
}

/** The study's own settings. `counters` holds the last number issued for each key prefix; keys are never reused. */
export interface StudySettings extends Entity {
  readonly key: string;
  readonly name: string;
  readonly summary: string;
  readonly phase: string;
  readonly concept: string;
  readonly levels: readonly string[];
  readonly maturity: string;
  /** Coverage factor of the expanded uncertainty in verdicts. */
  readonly k: number;
  /** Votes for a change that its approval needs. */
  readonly quorum: number;
  readonly counters: Readonly<Record<string, number>>;
}

/** One row of the margin policy: what margin is asked for, by parameter and maturity, and how it is defined. */
export interface Policy extends Entity {
  readonly parameter: string;
  readonly maturity: string;
  readonly percent: number;
  /**
   * Required margin as a difference from the limit, for limits of its dimension; it goes before the per cent. Rows
   * written before there were absolute margins come without it.
   */
  readonly absolute: Measure | null;
  readonly definition: string;
  readonly source: string;
}

export interface Element extends Entity {
  /** Short code, also the prefix of the keys of requirements allocated to it. */
  readonly key: string;
  readonly name: string;
  readonly parentId: string | null;
  readonly description: string;
}

export type RequirementState = 'in preparation' | 'in review' | 'baselined' | 'withdrawn';
export interface Budget {
  readonly rule: (typeof BUDGET_RULES)[number];
  readonly sense: (typeof BUDGET_SENSES)[number];
}
/** What is still to be resolved about a requirement, with its five fields. */
export interface OpenItem {
  readonly kind: 'TBR' | 'TBD';
  readonly estimate: string;
  readonly action: string;
  readonly personId: string;
  readonly due: string;
  readonly rationale: string;
}
export interface Requirement extends Entity {
  readonly key: string;
  readonly title: string;
  readonly text: string;
  readonly rationale: string;
  readonly level: string;
  readonly elementId: string | null;
  /** What the limit is about, for the margin policy: "delta-v", "mass", "power" … */
  readonly parameter: string | null;
  readonly limit: Limit | null;
  readonly budget: Budget | null;
  readonly openItem: OpenItem | null;
  readonly ownerId: string;
  readonly coOwnerIds: readonly string[];
  readonly state: RequirementState;
}

/** Parent→child link of the flow-down; `share` says whether the child's limit counts in the parent's budget. */
export interface Trace extends Entity {
  readonly parentId: string;
  readonly childId: string;
  readonly share: 'none' | 'proposed' | 'adopted';
}

export interface Quantity extends Entity {
  readonly key: string;
  /** Name in formulas and in typeset proofs, such as I_sp. */
  readonly symbol: string;
  readonly name: string;
  /** Kind with physical bounds (see the method library), or null for a plain quantity. */
  readonly kind: string | null;
  /** Unit that fixes the dimension and the default display. */
  readonly unit: string;
  readonly temperature: 'absolute' | 'difference';
  readonly value: Measure | null;
  readonly uncertainty: Uncertainty | null;
  readonly basis: (typeof BASES)[number];
  readonly source: string;
  readonly ownerId: string;
  readonly elementId: string | null;
  readonly state: 'working' | 'controlled';
}

export type BindingSource =
  | { readonly quantityId: string }
  | { readonly analysisId: string; readonly output: string }
  | { readonly constant: string };
export interface Binding {
  readonly name: string;
  readonly from: BindingSource;
}
/** One named line of a formula analysis; every line is an output. */
export interface FormulaLine {
  readonly name: string;
  readonly expression: string;
  readonly unit: string;
  readonly label: string;
}
/** A result brought in from outside, with where it comes from. */
export interface ExternalResult {
  readonly name: string;
  readonly label: string;
  readonly value: Measure;
  readonly uncertainty: Uncertainty | null;
  readonly document: string;
}
export interface Analysis extends Entity {
  readonly key: string;
  readonly name: string;
  readonly purpose: string;
  readonly kind: 'formula' | 'method' | 'external';
  readonly elementId: string | null;
  readonly authorId: string;
  readonly inputs: readonly Binding[];
  readonly lines: readonly FormulaLine[];
  readonly method: { readonly id: string; readonly version: string } | null;
  readonly results: readonly ExternalResult[];
  readonly assumptions: string;
  /** Signature of somebody other than the author over a digest of the definition; any edit voids it. */
  readonly check: {
    readonly personId: string;
    readonly at: string;
    readonly digest: string;
    readonly remark: string;
  } | null;
}

export interface Finding {
  readonly met: boolean;
  readonly document: string;
  readonly issue: string;
  readonly note: string;
  readonly personId: string;
  readonly at: string;
}
export interface Verification extends Entity {
  readonly requirementId: string;
  readonly method: (typeof VERIFICATION_METHODS)[number];
  readonly level: string;
  readonly stage: string;
  readonly gate: string;
  readonly criterion: string;
  readonly analysisId: string | null;
  readonly output: string | null;
  readonly deciding: boolean;
  readonly finding: Finding | null;
}

/** What people said about a matrix row: compliance lowered with a reason, close-out by signature over a digest. */
export interface Assessment extends Entity {
  readonly requirementId: string;
  readonly lowered: {
    readonly to: Compliance;
    readonly reason: string;
    readonly personId: string;
    readonly at: string;
  } | null;
  readonly closed: {
    readonly reason: string;
    readonly personId: string;
    readonly at: string;
    readonly digest: string;
  } | null;
}

export interface Departure extends Entity {
  readonly key: string;
  readonly kind: 'deviation' | 'waiver';
  readonly class: 'major' | 'minor';
  readonly requirementId: string;
  readonly title: string;
  readonly reason: string;
  readonly effectivity: string;
  readonly expires: string | null;
  readonly state: 'requested' | 'in force' | 'refused' | 'expired';
  readonly requestedBy: string;
  readonly decision: { readonly personId: string; readonly at: string; readonly reason: string } | null;
}

export type ChangeState =
  'draft' | 'submitted' | 'in assessment' | 'before the board' | 'approved' | 'rejected' | 'deferred' | 'withdrawn';
export interface Vote {
  readonly personId: string;
  readonly vote: 'for' | 'against';
  readonly remark: string;
  readonly at: string;
}
export interface ChangeRequest extends Entity {
  readonly key: string;
  readonly title: string;
  readonly reason: string;
  readonly class: 1 | 2;
  readonly authorId: string;
  readonly due: string | null;
  readonly state: ChangeState;
  readonly edits: readonly Command[];
  readonly votes: readonly Vote[];
  readonly disposition: {
    readonly decision: 'approved' | 'rejected' | 'deferred';
    readonly personId: string;
    readonly at: string;
    readonly reason: string;
  } | null;
}

export interface Baseline extends Entity {
  readonly key: string;
  readonly name: string;
  readonly review: string;
  readonly note: string;
  readonly takenBy: string;
  readonly at: string;
  readonly revision: number;
  /** SHA-256 of the canonical snapshot; empty only while the commit is being written. */
  readonly digest: string;
  readonly openItems: 'listed' | 'refused';
}

/** Every kind of entity in a study. */
export interface EntityKinds {
  study: StudySettings;
  policy: Policy;
  element: Element;
  requirement: Requirement;
  trace: Trace;
  quantity: Quantity;
  analysis: Analysis;
  verification: Verification;
  assessment: Assessment;
  departure: Departure;
  change: ChangeRequest;
  baseline: Baseline;
}
export type EntityKind = keyof EntityKinds;
/** In order of dependence: a kind refers only to itself and to kinds before it. */
export const ENTITY_KINDS = [
  'study',
  'policy',
  'element',
  'requirement',
  'trace',
  'quantity',
  'analysis',
  'verification',
  'assessment',
  'departure',
  'change',
  'baseline',
] as const satisfies readonly EntityKind[];

/** One entry of a patch: what one entity was before and is after; null means it did not or does not exist. */
export type PatchEntry = {
  [K in EntityKind]: {
    readonly kind: K;
    readonly id: string;
    readonly before: EntityKinds[K] | null;
    readonly after: EntityKinds[K] | null;
  };
}[EntityKind];
export type Patch = readonly PatchEntry[];
