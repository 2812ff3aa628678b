import { HttpClient } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import type { Command, EditAnswer } from '@shared/contract';
import { type Observable, tap } from 'rxjs';
import { StudyContext } from './study-context';

export interface EditOptions {
  /** Why, for the ledger. */
  readonly why?: string;
  /** Adds the commands to this change request; defaults to the draft one is looking from. Null: steps of procedure, never part of a draft. */
  readonly draft?: string | null;
}

/** The one way in: gives commands to the open study and tells every view of the revision they made. */
@Injectable({ providedIn: 'root' })
export class Edits {
  private readonly http = inject(HttpClient);
  private readonly context = inject(StudyContext);

  /** Applies all commands at once or none; fails with ProblemError (409 with the current state when something moved). */
  give(commands: readonly Command[], options: EditOptions = {}): Observable<EditAnswer> {
    const standpoint = this.context.standpoint();
    const looking = standpoint.kind === 'draft' ? standpoint.key : null;
    const draft = options.draft === undefined ? looking : options.draft;
    const body = { commands, ...(draft === null ? {} : { draft }), ...(options.why ? { why: options.why } : {}) };
    return this.http
      .post<EditAnswer>(this.context.api('edits'), body)
      .pipe(tap((answer) => this.context.saw(answer.revision)));
  }
}
