import { HttpClient } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import type { ProductTreeView, QuantitiesView } from '@shared/contract';
import type { QuantityKind } from '@shared/methods';
import { type Observable, map, shareReplay } from 'rxjs';
import { StudyContext } from '../core/study/study-context';

/** Quantities of the open study, from the standpoint one looks from. */
@Injectable({ providedIn: 'root' })
export class QuantitiesApi {
  private readonly http = inject(HttpClient);
  private readonly context = inject(StudyContext);
  /** The kinds belong to the build, not to a study: read once. */
  readonly kinds: Observable<readonly QuantityKind[]> = this.http
    .get<{ readonly kinds: readonly QuantityKind[] }>('/api/methods')
    .pipe(
      map(({ kinds }) => kinds),
      shareReplay(1),
    );

  register(): Observable<QuantitiesView> {
    return this.read<QuantitiesView>('quantities');
  }

  /** The product tree, to say which element a quantity belongs to. */
  productTree(): Observable<ProductTreeView> {
    return this.read<ProductTreeView>('product-tree');
  }

  private read<T>(...segments: readonly string[]): Observable<T> {
    return this.http.get<T>(this.context.api(...segments), { params: this.context.readParams() });
  }
}
