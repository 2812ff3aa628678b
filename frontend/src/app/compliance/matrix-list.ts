import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import type { MatrixRow } from '@shared/contract';
import { UnitPreferences } from '../core/preferences/unit-preferences';
import { StudyContext } from '../core/study/study-context';
import { KeyLink } from '../ui/key-link/key-link';
import { limitText } from '../ui/limit/limit-text';
import { MarginNumber } from '../ui/margin/margin-number';
import { VerdictMark } from '../ui/verdict/verdict-mark';
import { assessedText } from './matrix-columns';

/** The matrix where there is no room for a grid: each row stacked. */
@Component({
  selector: 'dp-matrix-list',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [KeyLink, MarginNumber, VerdictMark],
  template: `
    <ul class="rows" aria-label="Compliance matrix">
      @for (entry of entries(); track entry.row.id) {
        <li>
          <div class="pair">
            <dp-key-link [key]="entry.row.key" [to]="entry.to" [title]="entry.row.title" />
            <dp-margin-number [margin]="entry.row.margin" [unit]="entry.unit" [show]="show" />
          </div>
          @if (statements()) {
            <p class="small">{{ entry.row.text }}</p>
          }
          <div class="pair small">
            <dp-verdict-mark [verdict]="entry.row.verdict" />
            <span>{{ entry.compliance }}</span>
          </div>
          <p class="small faint">
            @if (entry.limit) {
              <span class="mono">{{ entry.limit }}</span>
            }
            @if (entry.assessed) {
              <span class="mono"> · {{ entry.assessed }}</span>
            }
            @if (entry.row.method) {
              <span> · {{ entry.row.method }}</span>
            }
            @if (entry.row.departure) {
              <span> · {{ entry.row.departure }}</span>
            }
          </p>
        </li>
      } @empty {
        <li class="faint">No row matches. Choose “All” or clear the filters.</li>
      }
    </ul>
  `,
  styles: `
    .pair {
      display: flex;
      justify-content: space-between;
      align-items: baseline;
      gap: 12px;
    }
    p {
      margin: 2px 0;
      overflow-wrap: anywhere;
    }
    li {
      display: grid;
      gap: 2px;
    }
  `,
})
export class MatrixList {
  private readonly units = inject(UnitPreferences);
  private readonly context = inject(StudyContext);
  readonly rows = input.required<readonly MatrixRow[]>();
  readonly statements = input(false);

  protected readonly show = this.units.show.bind(this.units);
  private readonly numbers = { show: this.show, unitFor: this.units.unitFor.bind(this.units) };
  protected readonly entries = computed(() =>
    this.rows().map((row) => ({
      row,
      to: this.context.link('requirements', row.key),
      unit: row.limit?.value.unit ?? '',
      limit: limitText(row.limit, this.show),
      assessed: assessedText(row, this.numbers),
      compliance: [row.compliance, row.basis ?? '', row.closeOut].filter((word) => word !== '').join(' · '),
    })),
  );
}
