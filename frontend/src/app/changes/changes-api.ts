import { HttpClient } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import type { ChangeSheet, ChangesView, Command, EditAnswer, QuantitiesView, RequirementsView } from '@shared/contract';
import { type Observable } from 'rxjs';
import { Edits } from '../core/study/edits';
import { StudyContext } from '../core/study/study-context';

/** What the person types to write a change request. */
export interface ChangeWords {
  readonly title: string;
  readonly reason: string;
  /** A day, or null when nothing is due. */
  readonly due: string | null;
}

/** Change requests of the open study, and the steps of procedure on them. */
@Injectable({ providedIn: 'root' })
export class ChangesApi {
  private readonly http = inject(HttpClient);
  private readonly edits = inject(Edits);
  private readonly context = inject(StudyContext);

  list(): Observable<ChangesView> {
    return this.http.get<ChangesView>(this.context.api('changes'), { params: this.params() });
  }

  sheet(key: string): Observable<ChangeSheet> {
    return this.http.get<ChangeSheet>(this.context.api('changes', key), { params: this.params() });
  }

  /** Quantities as the draft of a change request leaves them: further edits follow on from those versions. */
  quantitiesIn(key: string): Observable<QuantitiesView> {
    return this.http.get<QuantitiesView>(this.context.api('quantities'), { params: { at: `draft:${key}` } });
  }

  /** Requirements as the draft of a change request leaves them. */
  requirementsIn(key: string): Observable<RequirementsView> {
    return this.http.get<RequirementsView>(this.context.api('requirements'), { params: { at: `draft:${key}` } });
  }

  /** Writes a change request that proposes nothing yet. */
  write(words: ChangeWords): Observable<EditAnswer> {
    return this.step({ type: 'change.write', ...words, edits: [] });
  }

  /** Gives one step of procedure, which is never part of a draft. */
  step(command: Command): Observable<EditAnswer> {
    return this.edits.give([command], { draft: null });
  }

  /** Adds an edit to what a change request proposes. */
  propose(key: string, edit: Command): Observable<EditAnswer> {
    return this.edits.give([edit], { draft: key });
  }

  /** A request is looked at where its edits are not applied yet: from its own draft that is now. */
  private params(): Record<string, string> {
    return this.context.standpoint().kind === 'draft' ? {} : this.context.readParams();
  }
}
