import { HttpClient } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import type { BaselinesView, EditAnswer } from '@shared/contract';
import { type Observable } from 'rxjs';
import { Edits } from '../core/study/edits';
import { StudyContext } from '../core/study/study-context';

/** What a new baseline takes in, and what it is called. */
export interface NewBaseline {
  readonly name: string;
  readonly review: string;
  readonly note: string;
  readonly requirementIds: string[];
  readonly quantityIds: string[];
  readonly openItems: 'listed' | 'refused';
}

/** Baselines of the open study. */
@Injectable({ providedIn: 'root' })
export class BaselinesApi {
  private readonly http = inject(HttpClient);
  private readonly edits = inject(Edits);
  private readonly context = inject(StudyContext);

  list(): Observable<BaselinesView> {
    return this.http.get<BaselinesView>(this.context.api('baselines'), { params: this.context.readParams() });
  }

  take(baseline: NewBaseline): Observable<EditAnswer> {
    return this.edits.give([{ type: 'baseline.take', ...baseline }], { draft: null });
  }
}
