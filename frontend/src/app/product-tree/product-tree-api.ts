import { HttpClient } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import type { ProductTreeView } from '@shared/contract';
import { type Observable } from 'rxjs';
import { StudyContext } from '../core/study/study-context';

/** The product tree of the open study, from the standpoint one looks from. */
@Injectable({ providedIn: 'root' })
export class ProductTreeApi {
  private readonly http = inject(HttpClient);
  private readonly context = inject(StudyContext);

  tree(): Observable<ProductTreeView> {
    return this.http.get<ProductTreeView>(this.context.api('product-tree'), { params: this.context.readParams() });
  }
}
