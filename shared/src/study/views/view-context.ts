import type { PersonRef, Role, StudyHead, Verdict } from '@shared/contract';
import type { Proof } from '../prove';

/** Everything a read model is computed from. Facts that only the database has (names, history) come in here. */
export interface ViewContext {
  readonly proof: Proof;
  /** Names by person id. */
  readonly people: ReadonlyMap<string, string>;
  readonly me: PersonRef;
  readonly roles: readonly Role[];
  readonly standpoint: StudyHead['standpoint'];
  /** Revision of the study now, whatever the standpoint. */
  readonly revision: number;
  readonly provedAt: string;
  readonly ledgerHead: string;
  /** The newest baseline taken at or before the standpoint, with the verdicts and values frozen in it by requirement id. */
  readonly baseline: {
    readonly key: string;
    readonly revision: number;
    readonly verdicts: ReadonlyMap<string, Verdict>;
  } | null;
}

/** A person by id; a name that is gone reads as such. */
export function personRef(context: Pick<ViewContext, 'people'>, id: string): PersonRef {
  return { id, name: context.people.get(id) ?? 'a former member' };
}
