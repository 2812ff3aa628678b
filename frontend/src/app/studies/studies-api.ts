import { HttpClient } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import type { StudySummary } from '@shared/contract';
import { type Observable, map } from 'rxjs';

/** What a new study starts with. */
export interface NewStudy {
  readonly key: string;
  readonly name: string;
  readonly summary: string;
  readonly concept: string;
}

/** The studies on the server that the person takes part in. */
@Injectable({ providedIn: 'root' })
export class StudiesApi {
  private readonly http = inject(HttpClient);

  list(): Observable<readonly StudySummary[]> {
    return this.http.get<{ studies: readonly StudySummary[] }>('/api/studies').pipe(map((answer) => answer.studies));
  }

  create(study: NewStudy): Observable<{ readonly key: string }> {
    return this.http.post<{ key: string }>('/api/studies', study);
  }
}
