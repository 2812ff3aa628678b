import { HttpClient } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import type { StudySummary } from '@shared/contract';
import { Observable } from 'rxjs';

/** What a new study starts with. */
export interface NewStudy {
  readonly key: string;
  readonly name: string;
  readonly summary: string;
}

/** The studies on the server that the person takes part in. */
@Injectable({ providedIn: 'root' })
export class StudiesApi {
  private readonly http = inject(HttpClient);

  list(): Observable<readonly StudySummary[]> {
    return this.http.get<readonly StudySummary[]>('/api/studies');
  }

  create(study: NewStudy): Observable<StudySummary> {
    return this.http.post<StudySummary>('/api/studies', study);
  }
}
