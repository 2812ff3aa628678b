import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { TurningPoint } from '@shared/contract';
import { formatSi } from '@shared/units';
import { percentText } from '../margin/margin-text';
import type { ShowNumber } from '../measure/show-number';
import { Tex } from '../proof/tex';
import { TurningLine } from './turning-line';

/** How far each input can move before the verdict turns, the nearest first. */
@Component({
  selector: 'dp-turning-points',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Tex, TurningLine],
  template: `
    <table class="ruled">
      <thead class="only-heard">
        <tr>
          <th scope="col">Symbol</th>
          <th scope="col">Input</th>
          <th scope="col">Now</th>
          <th scope="col">Way</th>
          <th scope="col">Where the limit is reached</th>
          <th scope="col">Change</th>
        </tr>
      </thead>
      <tbody>
        @for (row of rows(); track row.point.quantityKey) {
          <tr>
            <td><dp-tex [tex]="row.point.tex" /></td>
            <td>{{ row.point.name }}</td>
            <td class="number">{{ row.now }}</td>
            <td class="way"><dp-turning-line [limit]="row.toLimit" [required]="row.toRequired" [full]="full()" /></td>
            <td class="number">{{ row.atLimit }}</td>
            <td class="number change">{{ row.change }}</td>
          </tr>
        }
      </tbody>
    </table>
  `,
  styles: `
    :host {
      display: block;
      max-width: 780px;
      overflow-x: auto;
    }
    td {
      border-color: var(--hair);
    }
    .change {
      color: var(--non-compliant);
    }
    @media (max-width: 720px) {
      .way {
        display: none;
      }
    }
  `,
})
export class TurningPoints {
  readonly points = input.required<readonly TurningPoint[]>();
  readonly show = input<ShowNumber>(formatSi);

  protected readonly rows = computed(() =>
    this.points()
      .map((point) => ({
        point,
        now: this.said(point, point.now.si),
        atLimit: point.atLimit === null ? 'not reached' : this.said(point, point.atLimit),
        toLimit: change(point, point.atLimit),
        toRequired: change(point, point.atRequired),
        change: point.percent === null ? '' : percentText(point.percent),
      }))
      .sort((a, b) => Math.abs(a.toLimit ?? Infinity) - Math.abs(b.toLimit ?? Infinity)),
  );
  protected readonly full = computed(() => Math.max(5, ...this.rows().map((row) => Math.abs(row.toLimit ?? 0))) * 1.6);

  private said(point: TurningPoint, si: number): string {
    return this.show()(si, point.now.unit, point.now.difference ? { temperature: 'difference' } : {});
  }
}

/** Change from the present value in per cent of it; from zero there is none. */
function change(point: TurningPoint, to: number | null): number | null {
  if (to === null || point.now.si === 0) return null;
  return ((to - point.now.si) / Math.abs(point.now.si)) * 100;
}
