import { HttpClient } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import type { EditAnswer, RecordsView } from '@shared/contract';
import { type Observable } from 'rxjs';
import { Edits } from '../core/study/edits';
import { StudyContext } from '../core/study/study-context';

/** The ledger of the open study. */
@Injectable({ providedIn: 'root' })
export class RecordsApi {
  private readonly http = inject(HttpClient);
  private readonly edits = inject(Edits);
  private readonly context = inject(StudyContext);

  /** Entries older than `before`, newest first; without it from the newest on. */
  page(before: number | undefined, limit: number): Observable<RecordsView> {
    const params = { ...this.context.readParams(), limit, ...(before === undefined ? {} : { before }) };
    return this.http.get<RecordsView>(this.context.api('records'), { params });
  }

  /** Takes a direct edit of one's own back, as a new revision. */
  takeBack(revision: number): Observable<EditAnswer> {
    return this.edits.give([{ type: 'edit.undo', revision }], { draft: null });
  }
}
