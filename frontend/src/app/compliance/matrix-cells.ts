import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import type { MatrixRow } from '@shared/contract';
import type { ICellRendererAngularComp } from 'ag-grid-angular';
import type { ICellRendererParams } from 'ag-grid-community';
import { UnitPreferences } from '../core/preferences/unit-preferences';
import { StudyContext } from '../core/study/study-context';
import { KeyLink } from '../ui/key-link/key-link';
import { gaugeReading } from '../ui/margin/gauge-reading';
import { MarginGauge } from '../ui/margin/margin-gauge';
import { MarginNumber } from '../ui/margin/margin-number';
import { VerdictMark } from '../ui/verdict/verdict-mark';

/** What every cell of ours does with the row that the grid hands it. */
abstract class MatrixCell implements ICellRendererAngularComp {
  protected readonly row = signal<MatrixRow | undefined>(undefined);

  agInit(params: ICellRendererParams<MatrixRow>): void {
    this.row.set(params.data);
  }

  refresh(params: ICellRendererParams<MatrixRow>): boolean {
    this.row.set(params.data);
    return true;
  }
}

/** Key and title of the requirement. */
@Component({
  selector: 'dp-requirement-cell',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [KeyLink],
  template: `
    @if (row(); as row) {
      <dp-key-link [key]="row.key" [to]="context.link('requirements', row.key)" [title]="row.title" />
    }
  `,
})
export class RequirementCell extends MatrixCell {
  protected readonly context = inject(StudyContext);
}

/** The verdict as mark and word. */
@Component({
  selector: 'dp-verdict-cell',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [VerdictMark],
  template: `
    @if (row(); as row) {
      <dp-verdict-mark [verdict]="row.verdict" />
    }
  `,
  styles: `
    :host {
      display: flex;
      align-items: center;
      height: var(--row);
    }
  `,
})
export class VerdictCell extends MatrixCell {}

/** The margin as gauge and number. */
@Component({
  selector: 'dp-margin-cell',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MarginGauge, MarginNumber],
  template: `
    @if (row(); as row) {
      @if (reading(row); as drawn) {
        <dp-margin-gauge [reading]="drawn" [width]="112" />
        <dp-margin-number [margin]="row.margin" [unit]="row.limit?.value?.unit ?? ''" [show]="show" />
      }
    }
  `,
  styles: `
    :host {
      display: flex;
      align-items: center;
      justify-content: space-between;
      gap: 8px;
      height: var(--row);
    }
  `,
})
export class MarginCell extends MatrixCell {
  private readonly units = inject(UnitPreferences);
  protected readonly show = this.units.show.bind(this.units);
  protected readonly reading = gaugeReading;
}
