import type { Command, EditAnswer, Role } from '@shared/contract';
import type { Study } from '@shared/study';

/** What a demonstration study is called and who takes part in it. */
export interface StudyOpening {
  readonly key: string;
  readonly name: string;
  readonly summary: string;
  readonly concept: string;
  readonly phase: string;
}
export interface Membership {
  readonly email: string;
  readonly roles: readonly Role[];
}
export interface EditOptions {
  readonly why?: string;
  /** Key of a change request that takes the commands instead of the study. */
  readonly draft?: string;
  readonly at: Date;
}

/** How scripts reach a study: the product's own path for edits, or a study in memory for tests. */
export interface SeedExecutor {
  createStudy(opening: StudyOpening, memberships: readonly Membership[]): Promise<void>;
  edit(studyKey: string, actorEmail: string, commands: Command[], options: EditOptions): Promise<EditAnswer>;
  read(studyKey: string): Promise<Study>;
  /** Identifier of a person, for commands that name one. */
  personId(email: string): Promise<string>;
}
