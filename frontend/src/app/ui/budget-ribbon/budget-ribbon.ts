import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import type { BudgetView } from '@shared/contract';
import { formatSi } from '@shared/units';
import type { ShowNumber } from '../measure/show-number';
import { budgetSentence } from './budget-sentence';
import { ribbonOf } from './ribbon';

/** Share of the ribbon below which a segment would be narrower than 24 px on a phone. */
const NARROWEST_TARGET = 0.08;

/** How a parent's limit is shared out: the limit as a bar, children as segments, reserve hatched, overrun in red past the end. */
@Component({
  selector: 'dp-budget-ribbon',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (ribbon(); as ribbon) {
      <div class="ribbon">
        @for (segment of segments(); track $index) {
          @if (segment.opens; as key) {
            <button
              type="button"
              [class]="segment.kind + ' shade-' + segment.shade"
              [style.left.%]="segment.start * 100"
              [style.width.%]="segment.length * 100"
              [attr.title]="segment.spoken"
              [attr.aria-label]="segment.spoken"
              (click)="open.emit(key)"
            >
              {{ segment.label }}
            </button>
          } @else {
            <span
              [class]="segment.kind + ' shade-' + segment.shade"
              [style.left.%]="segment.start * 100"
              [style.width.%]="segment.length * 100"
              [attr.title]="segment.spoken"
              >{{ segment.label }}</span
            >
          }
        }
        @if (ribbon.limit < 1) {
          <i class="limit" [style.left.%]="ribbon.limit * 100" aria-hidden="true"></i>
        }
      </div>
    }
    <p>
      {{ sentence().before }}<strong>{{ sentence().strong }}</strong
      >{{ sentence().after }}
    </p>
  `,
  styleUrl: './budget-ribbon.scss',
})
export class BudgetRibbon {
  readonly budget = input.required<BudgetView>();
  readonly show = input<ShowNumber>(formatSi);
  /** A child's segment was clicked: its key. */
  readonly open = output<string>();

  protected readonly ribbon = computed(() => ribbonOf(this.budget()));
  protected readonly sentence = computed(() => budgetSentence(this.budget(), this.show()));
  protected readonly segments = computed(() => {
    const budget = this.budget();
    return (this.ribbon()?.segments ?? []).map((segment, index) => {
      const number = this.show()(segment.value, budget.unit, {
        temperature: budget.difference ? 'difference' : 'absolute',
      });
      const bare = number.split(/[\s\u00a0]/)[0] ?? number;
      const name = segment.share === null ? 'Reserve' : segment.share.key;
      const how = {
        adopted: '',
        proposed: ', proposed',
        reserve: '',
        overrun: ', past the limit',
        shortfall: ' missing',
      }[segment.kind];
      return {
        ...segment,
        shade: Math.min(3, index + 1),
        // Too narrow to be hit; the child's own row is near by.
        opens: segment.length < NARROWEST_TARGET ? null : (segment.share?.key ?? null),
        // Narrow pieces carry only the number, the narrowest nothing; the full words are on hover and read out.
        label:
          segment.length > 0.16 && segment.share !== null ? `${name} · ${bare}` : segment.length > 0.045 ? bare : '',
        spoken: `${name}${segment.share === null ? '' : ` ${segment.share.title}`}: ${number}${how}`,
      };
    });
  });
}
