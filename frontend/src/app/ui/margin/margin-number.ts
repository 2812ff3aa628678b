import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { MarginView } from '@shared/contract';
import { formatSi } from '@shared/units';
import type { ShowNumber } from '../measure/show-number';
import { marginText } from './margin-text';

/** The number beside a gauge: the margin in per cent, or absolute where per cent has no meaning; the other on hover. */
@Component({
  selector: 'dp-margin-number',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: '{{ text() }}',
  styles: `
    :host {
      font-family: var(--mono);
      font-size: 0.93em;
      letter-spacing: 0;
      white-space: nowrap;
    }
  `,
  host: { '[attr.title]': 'other()' },
})
export class MarginNumber {
  readonly margin = input.required<MarginView | null>();
  /** Unit of the limit, for the absolute margin. */
  readonly unit = input('');
  readonly show = input<ShowNumber>(formatSi);

  protected readonly text = computed(() => marginText(this.margin(), (absolute) => this.absolute(absolute)));
  protected readonly other = computed(() => {
    const margin = this.margin();
    if (margin === null) return null;
    return `${this.absolute(margin.absolute)}${margin.percentOf === '' ? '' : `; per cent ${margin.percentOf}`}`;
  });

  /** A margin is a difference, also where the limit is a temperature. */
  private absolute(si: number): string {
    return this.show()(si, this.unit(), { temperature: 'difference' });
  }
}
