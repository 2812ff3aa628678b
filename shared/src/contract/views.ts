import type {
  Analysis,
  Baseline,
  Binding,
  ChangeRequest,
  ChangeState,
  Departure,
  FormulaLine,
  Policy,
  Requirement,
  RequirementState,
  StudySettings,
  Verification,
} from './entities';
import type { Compliance, Verdict } from './vocabulary';
import type { Command, CommandType } from './commands';
import type { Limit, Measure, Uncertainty } from './measure';
import type { Role } from './roles';

/** Read models: what the screens and exports show. Every one is computed from the study at a standpoint. Numbers are SI with a unit to show them in. */

/** A number to show: SI value, the unit its author thinks in, and whether it is a temperature difference. */
export interface Shown {
  readonly si: number;
  readonly unit: string;
  readonly difference?: boolean;
}
export interface PersonRef {
  readonly id: string;
  readonly name: string;
}

/** Which required margin applied and how it is defined. */
export interface RequiredMargin {
  /** Of what the margin's per cent is of; null where the limit has no per cent. */
  readonly percent: number | null;
  readonly absolute: number;
  readonly definition: string;
  readonly source: string;
}
/** Margin of a computed value against a limit. Absolute in SI of the limit's dimension, positive on the good side. */
export interface MarginView {
  readonly absolute: number;
  readonly percent: number | null;
  /** Said beside the per cent where it is of kelvin, of a half-width or of a tolerance. */
  readonly percentOf: string;
  readonly atLimit: boolean;
}
export interface VerdictView {
  readonly verdict: Verdict;
  readonly value: Shown | null;
  /** Expanded uncertainty U in SI; null when none is stated. */
  readonly expanded: number | null;
  readonly k: number;
  readonly margin: MarginView | null;
  readonly required: RequiredMargin | null;
  /** Why, where there is no number: which input is missing or wrong. */
  readonly reason: string;
  readonly warnings: readonly string[];
  readonly basis: 'predicted' | 'demonstrated' | null;
  readonly compliance: Compliance;
  /** Compliance as computed, before a person lowered it. */
  readonly computedCompliance: Compliance;
  readonly closeOut: 'open' | 'closed' | 'reopened';
}

export interface StudySummary {
  readonly key: string;
  readonly name: string;
  readonly summary: string;
  readonly concept: string;
  readonly phase: string;
  readonly revision: number;
  readonly roles: readonly Role[];
  readonly counts: Readonly<Record<Verdict, number>>;
}

/** GET /studies/:study — what the title block needs at a standpoint. */
export interface StudyHead {
  readonly study: StudySettings;
  readonly standpoint: {
    readonly text: string;
    readonly label: string;
    readonly revision: number;
    readonly editable: boolean;
  };
  readonly revision: number;
  readonly baselineInForce: { readonly key: string; readonly name: string; readonly review: string } | null;
  readonly baselines: readonly {
    readonly key: string;
    readonly name: string;
    readonly review: string;
    readonly revision: number;
  }[];
  readonly drafts: readonly {
    readonly key: string;
    readonly title: string;
    readonly state: ChangeState;
    readonly mine: boolean;
  }[];
  readonly provedAt: string;
  readonly verdicts: number;
  readonly roles: readonly Role[];
  readonly me: PersonRef;
  readonly members: readonly (PersonRef & { readonly roles: readonly Role[] })[];
  readonly policies: readonly Policy[];
}

/** GET /studies/:study/overview */
export interface OverviewView {
  readonly closes: boolean;
  readonly counts: Readonly<Record<Verdict, number>>;
  readonly total: number;
  readonly marks: readonly {
    readonly key: string;
    readonly title: string;
    readonly verdict: Verdict;
    readonly percent: number | null;
  }[];
  /** Requirements that do not hold with margin, worst first, and how strongly each input drives them (0…1 by row share). */
  readonly drivers: {
    readonly requirements: readonly { readonly key: string; readonly title: string; readonly verdict: Verdict }[];
    readonly inputs: readonly {
      readonly quantityKey: string;
      readonly symbol: string;
      readonly name: string;
      readonly influence: readonly number[];
    }[];
  };
  /** What one input alone would have to become for one failing requirement to hold. `decades` is set when that is a factor of ten or more. */
  readonly moves: readonly {
    readonly key: string;
    readonly title: string;
    readonly quantityKey: string;
    readonly name: string;
    readonly from: Shown;
    readonly to: Shown;
    readonly decades: number | null;
  }[];
  readonly waits: readonly {
    readonly key: string;
    readonly what: string;
    readonly note: string;
    readonly route: string;
  }[];
  readonly since: {
    readonly baseline: string | null;
    readonly edits: number;
    readonly turned: readonly { readonly key: string; readonly from: Verdict; readonly to: Verdict }[];
    readonly reopened: readonly string[];
  };
  readonly warnings: readonly { readonly key: string; readonly text: string }[];
}

export interface BudgetShare {
  readonly traceId: string;
  readonly traceVersion: number;
  readonly key: string;
  readonly title: string;
  readonly value: number | null;
  /** Unit to show it in where its dimension is not the budget's, as in a product. */
  readonly unit?: string;
  readonly status: 'adopted' | 'proposed';
}
export interface BudgetView {
  readonly rule: string;
  readonly sense: string;
  readonly unit: string;
  readonly difference: boolean;
  readonly limit: number;
  readonly shares: readonly BudgetShare[];
  /** Combined adopted shares and what is left; null when a share has no limit or another dimension. */
  readonly allocated: number | null;
  readonly reserve: number | null;
  /** The same with the proposed shares counted in. */
  readonly reserveIfAdopted: number | null;
  readonly closes: boolean | null;
  readonly problem: string;
}

/** One line of the flow-down. A requirement with several parents appears under each; `path` is unique. */
export interface FlowRow extends VerdictView {
  readonly path: string;
  readonly depth: number;
  readonly hasChildren: boolean;
  readonly id: string;
  readonly version: number;
  readonly key: string;
  readonly title: string;
  readonly level: string;
  readonly state: RequirementState;
  readonly changePending: readonly string[];
  readonly toBeResolved: boolean;
  readonly limit: Limit | null;
  readonly element: { readonly key: string; readonly name: string } | null;
  readonly budget: BudgetView | null;
  readonly share: 'none' | 'proposed' | 'adopted';
}
/** GET /studies/:study/requirements */
export interface RequirementsView {
  readonly rows: readonly FlowRow[];
  readonly counts: { readonly inForce: number; readonly inPreparation: number; readonly toBeResolved: number };
}

/** One numbered line of a proof. */
export interface ProofLine {
  readonly number: number;
  readonly label: string;
  /** TeX with symbols and, after it, with the numbers. */
  readonly symbols: string;
  readonly numbers: string;
  readonly result: Shown | null;
  readonly failure: string;
  readonly analysis: string;
}
export interface TurningPoint {
  readonly quantityKey: string;
  readonly symbol: string;
  readonly tex: string;
  readonly name: string;
  readonly now: Shown;
  /** Value at which the limit is reached, and at which the required margin is; null when not reachable. */
  readonly atLimit: number | null;
  readonly atRequired: number | null;
  /** Change to the limit in per cent of the present value. */
  readonly percent: number | null;
}
export interface VerificationView extends Verification {
  readonly verdict: VerdictView;
  readonly analysisKey: string | null;
  readonly analysisName: string | null;
  readonly person: PersonRef | null;
}
export interface RequirementLink {
  readonly id: string;
  readonly key: string;
  readonly title: string;
  readonly depth: number;
  readonly here: boolean;
  readonly verdict: Verdict;
  readonly traceId: string | null;
  readonly traceVersion: number;
  readonly share: 'none' | 'proposed' | 'adopted';
}
/** GET /studies/:study/requirements/:key */
export interface RequirementSheet extends FlowRow {
  readonly text: string;
  readonly rationale: string;
  readonly parameter: string | null;
  readonly elementId: string | null;
  readonly openItem: Requirement['openItem'];
  readonly owner: PersonRef;
  readonly coOwners: readonly PersonRef[];
  readonly baselinedIn: string | null;
  readonly verifications: readonly VerificationView[];
  readonly proof: readonly ProofLine[];
  readonly comparison: { readonly tex: string; readonly text: string } | null;
  readonly proofNote: string;
  readonly cautions: readonly string[];
  readonly turningPoints: readonly TurningPoint[];
  readonly flowDown: readonly RequirementLink[];
  readonly departures: readonly Departure[];
  readonly lowered: {
    readonly to: Compliance;
    readonly reason: string;
    readonly person: PersonRef;
    readonly at: string;
  } | null;
  readonly closed: { readonly reason: string; readonly person: PersonRef; readonly at: string } | null;
  readonly moves: readonly {
    readonly revision: number;
    readonly what: string;
    readonly verdict: Verdict;
    readonly percent: number | null;
    readonly by: string;
    readonly at: string;
  }[];
  readonly turnedBy: { readonly revision: number; readonly direct: boolean; readonly baselineVerdict: Verdict } | null;
  readonly may: readonly CommandType[];
  /** Wording findings on the statement: blocking ones stop submission. */
  readonly findings: readonly { readonly code: string; readonly blocks: boolean; readonly message: string }[];
}

/** GET /studies/:study/product-tree */
export interface ElementRow {
  readonly id: string;
  readonly version: number;
  readonly key: string;
  readonly name: string;
  readonly description: string;
  readonly parentId: string | null;
  readonly depth: number;
  readonly requirements: readonly { readonly key: string; readonly title: string; readonly verdict: Verdict }[];
  readonly quantities: number;
  /** Worst verdict of what is allocated here and below. */
  readonly worst: Verdict | null;
}
export interface ProductTreeView {
  readonly rows: readonly ElementRow[];
  readonly unallocated: readonly { readonly key: string; readonly title: string; readonly verdict: Verdict }[];
}

/** GET /studies/:study/quantities */
export interface QuantityRow {
  readonly id: string;
  readonly version: number;
  readonly key: string;
  readonly symbol: string;
  readonly tex: string;
  readonly name: string;
  readonly kind: string | null;
  readonly kindName: string;
  readonly dimension: string;
  readonly unit: string;
  readonly temperature: 'absolute' | 'difference';
  readonly value: Measure | null;
  readonly uncertainty: Uncertainty | null;
  readonly basis: string;
  readonly source: string;
  readonly elementId: string | null;
  readonly element: string;
  readonly owner: PersonRef;
  readonly state: 'working' | 'controlled';
  /** Keys of analyses that use it and of requirements whose verdict rests on it. */
  readonly usedBy: readonly string[];
  readonly bearsOn: readonly string[];
  readonly changePending: readonly string[];
}
export interface QuantitiesView {
  readonly rows: readonly QuantityRow[];
}

/** GET /studies/:study/analyses and /analyses/:key */
export interface AnalysisRow {
  readonly id: string;
  readonly version: number;
  readonly key: string;
  readonly name: string;
  readonly kind: Analysis['kind'];
  readonly methodName: string;
  readonly element: string;
  readonly author: PersonRef;
  readonly state: 'draft' | 'checked';
  readonly controlled: boolean;
  readonly verifies: readonly { readonly key: string; readonly title: string; readonly verdict: Verdict }[];
  readonly outputs: readonly OutputView[];
}
export interface OutputView {
  readonly name: string;
  readonly tex: string;
  readonly label: string;
  readonly dimension: string;
  readonly shown: Shown | null;
  readonly standard: number | null;
  readonly failure: string;
}
export interface InputView extends Binding {
  readonly tex: string;
  readonly label: string;
  readonly sourceKey: string;
  readonly dimension: string;
  readonly shown: Shown | null;
  readonly uncertainty: Uncertainty | null;
  readonly failure: string;
}
export interface AnalysisSheet extends AnalysisRow {
  readonly purpose: string;
  readonly elementId: string | null;
  readonly assumptions: string;
  readonly inputs: readonly InputView[];
  readonly lines: readonly FormulaLine[];
  readonly results: Analysis['results'];
  readonly method: Analysis['method'];
  readonly newerMethod: string | null;
  readonly proof: readonly ProofLine[];
  readonly warnings: readonly string[];
  readonly cautions: readonly string[];
  readonly validity: string;
  readonly reference: string;
  readonly check: {
    readonly person: PersonRef;
    readonly at: string;
    readonly remark: string;
    readonly digest: string;
    readonly valid: boolean;
  } | null;
  /** Requirements of a matching dimension that an output could verify. */
  readonly couldVerify: readonly {
    readonly id: string;
    readonly version: number;
    readonly key: string;
    readonly title: string;
    readonly output: string;
    readonly verdict: Verdict;
    readonly percent: number | null;
  }[];
  readonly changePending: readonly string[];
  readonly may: readonly CommandType[];
}
export interface AnalysesView {
  readonly rows: readonly AnalysisRow[];
}
/** Everything an analysis input can be bound to, for pickers: quantities, outputs of analyses, constants. */
export interface BindableView {
  readonly quantities: readonly {
    readonly id: string;
    readonly key: string;
    readonly symbol: string;
    readonly name: string;
    readonly unit: string;
    readonly dimension: string;
    readonly si: number | null;
    readonly temperature: 'absolute' | 'difference';
  }[];
  readonly outputs: readonly {
    readonly analysisId: string;
    readonly key: string;
    readonly output: string;
    readonly name: string;
    readonly unit: string;
    readonly dimension: string;
    readonly si: number | null;
  }[];
}

/** GET /studies/:study/compliance — one row per requirement, the same as in the exported matrix; worst first. */
export interface MatrixRow {
  readonly id: string;
  readonly version: number;
  readonly key: string;
  readonly title: string;
  readonly text: string;
  readonly parents: readonly string[];
  readonly limit: Limit | null;
  readonly method: string;
  readonly level: string;
  readonly stage: string;
  readonly criterion: string;
  readonly verdict: Verdict;
  readonly value: Shown | null;
  readonly expanded: number | null;
  readonly k: number;
  readonly policy: string;
  readonly margin: MarginView | null;
  readonly required: RequiredMargin | null;
  readonly compliance: Compliance;
  readonly basis: 'predicted' | 'demonstrated' | null;
  readonly evidence: string;
  readonly placard: string;
  readonly departure: string;
  readonly closeOut: 'open' | 'closed' | 'reopened';
  readonly reason: string;
  readonly owner: string;
  readonly signature: string;
  readonly element: string;
  readonly state: RequirementState;
}
export interface MatrixHeader {
  readonly study: string;
  readonly studyKey: string;
  readonly phase: string;
  readonly standpoint: string;
  readonly baseline: string;
  readonly digest: string;
  readonly revision: number;
  readonly ledgerHead: string;
  readonly at: string;
  readonly basis: 'predicted' | 'demonstrated' | 'predicted and demonstrated';
  readonly counts: Readonly<Record<Compliance, number>>;
  readonly verdicts: Readonly<Record<Verdict, number>>;
  readonly closedRows: number;
  readonly openItems: number;
  readonly departuresInForce: number;
  readonly decisionRule: string;
  readonly caution: string;
}
export interface ComplianceView {
  readonly header: MatrixHeader;
  readonly rows: readonly MatrixRow[];
}

/** What approval would do to one verdict, or what an edit has done. */
export interface VerdictMove {
  readonly key: string;
  readonly title: string;
  readonly before: VerdictView | null;
  readonly after: VerdictView | null;
  readonly limit: Limit | null;
}
export interface Impact {
  readonly revision: number;
  readonly total: number;
  readonly turned: readonly VerdictMove[];
  readonly moved: readonly VerdictMove[];
  readonly better: number;
  readonly worse: readonly string[];
  readonly budgets: readonly {
    readonly key: string;
    readonly before: number | null;
    readonly after: number | null;
    readonly unit: string;
  }[];
  /** Set when the edits cannot be applied to the study as it is now. */
  readonly problem: { readonly message: string; readonly edit: number; readonly kind: 'conflict' | 'refused' } | null;
}
/** A proposed edit in words: what, from, to. */
export interface EditSummary {
  readonly index: number;
  readonly type: CommandType;
  readonly key: string;
  readonly what: string;
  readonly before: string;
  readonly after: string;
  /** Field by field, where one edit changes several; absent otherwise. */
  readonly fields?: readonly { readonly field: string; readonly before: string; readonly after: string }[];
  readonly conflict: string;
  readonly command: Command;
}
export interface ChangeRow {
  readonly id: string;
  readonly version: number;
  readonly key: string;
  readonly title: string;
  readonly class: 1 | 2;
  readonly state: ChangeState;
  readonly inConflict: boolean;
  readonly author: PersonRef;
  readonly due: string | null;
  readonly edits: number;
  readonly votesFor: number;
  readonly votesAgainst: number;
  readonly quorum: number;
}
export interface ChangesView {
  readonly rows: readonly ChangeRow[];
}
/** GET /studies/:study/changes/:key */
export interface ChangeSheet extends ChangeRow {
  readonly reason: string;
  readonly summaries: readonly EditSummary[];
  readonly impact: Impact;
  readonly board: readonly (PersonRef & {
    readonly chair: boolean;
    readonly vote: ChangeRequest['votes'][number] | null;
    readonly author: boolean;
  })[];
  readonly disposition:
    | (NonNullable<ChangeRequest['disposition']> & { readonly person: PersonRef; readonly revision: number | null })
    | null;
  readonly may: readonly CommandType[];
}

export interface BaselineRow extends Baseline {
  readonly person: PersonRef;
  readonly counts: Readonly<Record<Verdict, number>>;
}
/** GET /studies/:study/baselines */
export interface BaselinesView {
  readonly rows: readonly BaselineRow[];
  /** What a new baseline would take in: requirements not yet baselined and working quantities that verdicts rest on. */
  readonly candidates: {
    readonly requirements: readonly {
      readonly id: string;
      readonly key: string;
      readonly title: string;
      readonly state: RequirementState;
      readonly toBeResolved: boolean;
    }[];
    readonly quantities: readonly {
      readonly id: string;
      readonly key: string;
      readonly name: string;
      readonly bearsOn: number;
    }[];
  };
}

/** GET /studies/:study/records — the ledger, newest first. */
export interface RecordRow {
  readonly revision: number;
  readonly at: string;
  readonly by: PersonRef;
  readonly summary: string;
  readonly why: string;
  readonly commands: readonly CommandType[];
  readonly changes: readonly {
    readonly kind: string;
    readonly key: string;
    readonly field: string;
    readonly before: string;
    readonly after: string;
  }[];
  readonly moved: readonly {
    readonly key: string;
    readonly from: Verdict | null;
    readonly to: Verdict | null;
    readonly percent: number | null;
  }[];
  readonly digest: string;
  readonly previous: string;
  readonly undoable: boolean;
}
export interface RecordsView {
  readonly rows: readonly RecordRow[];
  readonly next: number | null;
  readonly chain: { readonly head: string; readonly entries: number };
}

/** Answer to POST /studies/:study/edits */
export interface EditAnswer {
  readonly revision: number;
  /** Keys of what was created, by the position of the command. */
  readonly created: readonly { readonly command: number; readonly id: string; readonly key: string }[];
  readonly turned: readonly { readonly key: string; readonly from: Verdict | null; readonly to: Verdict | null }[];
  readonly moved: readonly string[];
  readonly warnings: readonly string[];
}
/** Sent over server-sent events to everybody else in the study. */
export interface StudyEvent {
  readonly revision: number;
  readonly by: string;
  readonly byId: string;
  readonly at: string;
  readonly summary: string;
  readonly moved: readonly { readonly key: string; readonly from: Verdict | null; readonly to: Verdict | null }[];
  readonly touched: readonly string[];
}
/** GET /studies/:study/search?q= */
export interface Hit {
  readonly kind: 'requirement' | 'quantity' | 'analysis' | 'change' | 'baseline' | 'element' | 'departure';
  readonly key: string;
  readonly title: string;
  readonly route: string;
}
/** GET /methods — the library as the picker shows it. */
export interface MethodCard {
  readonly id: string;
  readonly version: string;
  readonly family: string;
  readonly name: string;
  readonly summary: string;
  readonly equation: string;
  readonly validity: string;
  readonly reference: string;
  readonly cautions: readonly string[];
  readonly concepts: readonly string[];
  readonly checks: readonly string[];
}
