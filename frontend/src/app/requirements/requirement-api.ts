import { HttpClient } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import type { BindableView, ProductTreeView, RequirementSheet, RequirementsView } from '@shared/contract';
import { type Observable } from 'rxjs';
import { StudyContext } from '../core/study/study-context';

/** Requirements of the open study, from the standpoint one looks from. */
@Injectable({ providedIn: 'root' })
export class RequirementApi {
  private readonly http = inject(HttpClient);
  private readonly context = inject(StudyContext);

  flowDown(): Observable<RequirementsView> {
    return this.read<RequirementsView>('requirements');
  }

  sheet(key: string): Observable<RequirementSheet> {
    return this.read<RequirementSheet>('requirements', key);
  }

  /** The product tree, to allocate to. */
  productTree(): Observable<ProductTreeView> {
    return this.read<ProductTreeView>('product-tree');
  }

  /** Outputs of analyses, to verify by. */
  bindable(): Observable<BindableView> {
    return this.read<BindableView>('bindable');
  }

  /** Address of the compliance matrix as a file. */
  exportAddress(format: 'docx' | 'xlsx' | 'csv'): string {
    const at = this.context.at();
    const query = at === undefined ? '' : `?at=${encodeURIComponent(at)}`;
    return `${this.context.api('export', format)}${query}`;
  }

  private read<T>(...segments: readonly string[]): Observable<T> {
    return this.http.get<T>(this.context.api(...segments), { params: this.context.readParams() });
  }
}
