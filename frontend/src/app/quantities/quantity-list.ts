import { ChangeDetectionStrategy, Component, inject, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { QuantityRow } from '@shared/contract';
import { UnitPreferences } from '../core/preferences/unit-preferences';
import { StudyContext } from '../core/study/study-context';
import { shownUncertainty, shownValue } from './quantity-text';

/** The register on a phone: one stacked row for each quantity, a tap opens it to edit. */
@Component({
  selector: 'dp-quantity-list',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [RouterLink],
  template: `
    <ul class="rows" aria-label="Quantities">
      @for (row of rows(); track row.id) {
        <li [class.chosen]="row.key === selected()">
          <a [routerLink]="context.link('quantities', row.key)" [queryParams]="context.readParams()">
            <span class="what"
              ><span class="key">{{ row.key }}</span
              >&ngsp;<span class="name">{{ row.name }}</span></span
            >
            <span class="number">{{ value(row) }}</span>
            <span class="small faint"
              ><span class="mono">{{ row.symbol }}</span> · {{ row.state }} · {{ row.basis }}</span
            >
            <span class="small faint number">{{ uncertainty(row) }}</span>
          </a>
        </li>
      } @empty {
        <li class="faint">No quantity matches. Choose “All” or clear the filters.</li>
      }
    </ul>
  `,
  styles: `
    li.chosen {
      background: var(--chosen);
    }
    a {
      display: grid;
      grid-template-columns: minmax(0, 1fr) auto;
      gap: 2px 12px;
      color: inherit;
      text-decoration: none;
    }
    .key {
      color: var(--cobalt);
    }
    .what {
      min-width: 0;
    }
  `,
})
export class QuantityList {
  private readonly units = inject(UnitPreferences);
  protected readonly context = inject(StudyContext);
  readonly rows = input.required<readonly QuantityRow[]>();
  readonly selected = input('');
  private readonly show = this.units.show.bind(this.units);

  protected value(row: QuantityRow): string {
    return shownValue(row, this.show);
  }

  protected uncertainty(row: QuantityRow): string {
    return row.uncertainty === null ? '' : shownUncertainty(row, this.show);
  }
}
