import { HttpClient } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import type { OverviewView } from '@shared/contract';
import { type Observable } from 'rxjs';
import { StudyContext } from '../core/study/study-context';

/** How the open study stands, from the standpoint one looks from. */
@Injectable({ providedIn: 'root' })
export class OverviewApi {
  private readonly http = inject(HttpClient);
  private readonly context = inject(StudyContext);

  overview(): Observable<OverviewView> {
    return this.http.get<OverviewView>(this.context.api('overview'), { params: this.context.readParams() });
  }
}
