import { HttpClient } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import type { AnalysesView, AnalysisSheet, BindableView, ProductTreeView } from '@shared/contract';
import type { Constant } from '@shared/constants';
import type { Method } from '@shared/methods';
import { type Observable, shareReplay } from 'rxjs';
import { StudyContext } from '../core/study/study-context';

/** A method as it travels: everything but what computes. */
export type MethodView = Omit<Method, 'compute' | 'proofFor'>;

/** What the build brings along for every study. */
export interface Library {
  readonly methods: readonly MethodView[];
  readonly constants: readonly Constant[];
}

/** Analyses of the open study, from the standpoint one looks from, and the library of methods and constants. */
@Injectable({ providedIn: 'root' })
export class AnalysesApi {
  private readonly http = inject(HttpClient);
  private readonly context = inject(StudyContext);
  /** The library belongs to the build: read once. */
  readonly library: Observable<Library> = this.http.get<Library>('/api/methods').pipe(shareReplay(1));

  list(): Observable<AnalysesView> {
    return this.read<AnalysesView>('analyses');
  }

  sheet(key: string): Observable<AnalysisSheet> {
    return this.read<AnalysisSheet>('analyses', key);
  }

  /** Everything in the study that an input can be bound to. */
  bindable(): Observable<BindableView> {
    return this.read<BindableView>('bindable');
  }

  productTree(): Observable<ProductTreeView> {
    return this.read<ProductTreeView>('product-tree');
  }

  private read<T>(...segments: readonly string[]): Observable<T> {
    return this.http.get<T>(this.context.api(...segments), { params: this.context.readParams() });
  }
}
