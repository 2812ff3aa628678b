import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { QuantityRow } from '@shared/contract';
import type { ICellRendererAngularComp } from 'ag-grid-angular';
import type { ICellRendererParams } from 'ag-grid-community';
import { StudyContext } from '../../core/study/study-context';
import { KeyLink } from '../../ui/key-link/key-link';

/** Which section the keys of a column lead to. */
export interface KeysParams {
  readonly section: 'analyses' | 'requirements' | 'changes';
}

const SHOWN = 3;

/** The key of a quantity, leading to its sheet. */
@Component({
  selector: 'dp-quantity-key-cell',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [KeyLink],
  template: `
    @if (row(); as row) {
      <dp-key-link [key]="row.key" [to]="context.link('quantities', row.key)" />
    }
  `,
})
export class QuantityKeyCell implements ICellRendererAngularComp {
  protected readonly context = inject(StudyContext);
  protected readonly row = signal<QuantityRow | undefined>(undefined);

  agInit(params: ICellRendererParams<QuantityRow>): void {
    this.row.set(params.data);
  }

  refresh(params: ICellRendererParams<QuantityRow>): boolean {
    this.row.set(params.data);
    return true;
  }
}

/** Keys as links, the first few of them. */
@Component({
  selector: 'dp-keys-cell',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [RouterLink],
  template: `
    @for (key of shown(); track key) {
      <a class="key" [routerLink]="context.link(section(), key)" [queryParams]="context.readParams()">{{ key }}</a>
    }
    @if (more() > 0) {
      <span class="faint small">and {{ more() }} more</span>
    }
  `,
  styles: `
    .key {
      margin-right: 8px;
    }
  `,
})
export class KeysCell implements ICellRendererAngularComp {
  protected readonly context = inject(StudyContext);
  protected readonly section = signal<KeysParams['section']>('analyses');
  private readonly keys = signal<readonly string[]>([]);
  protected readonly shown = computed(() => this.keys().slice(0, SHOWN));
  protected readonly more = computed(() => this.keys().length - this.shown().length);

  agInit(params: ICellRendererParams<QuantityRow, readonly string[]> & KeysParams): void {
    this.section.set(params.section);
    this.keys.set(params.value ?? []);
  }

  refresh(params: ICellRendererParams<QuantityRow, readonly string[]> & KeysParams): boolean {
    this.agInit(params);
    return true;
  }
}
