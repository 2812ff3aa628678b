import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { verdictTone, verdictWord } from '../verdict/verdict-words';
import { type GaugeReading } from './gauge-reading';
import { FULL_SCALE, isBeyondScale, marginPlace } from './margin-scale';
import { percentText } from './margin-text';

interface Drawing {
  readonly tone: string;
  readonly axis: number;
  readonly bar: { readonly x: number; readonly width: number; readonly y: number };
  readonly bracket: string | null;
  readonly whisker: string | null;
  readonly beyond: string | null;
}

const HEIGHT = 22;
const BAR = 7;

/**
 * How far a computed value lies from its limit. The tall tick is the limit, the bracket above it the required margin,
 * the bar runs to the computed value, the whisker is its uncertainty; good is to the right whatever the relation. With
 * `proposed` a second bar below shows what approval would make of it, and the first fades.
 */
@Component({
  selector: 'dp-margin-gauge',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <svg
      [attr.viewBox]="'0 0 ' + width() + ' ' + height()"
      [attr.width]="width()"
      [attr.height]="height()"
      role="img"
      [attr.aria-label]="spoken()"
    >
      @for (drawing of drawings(); track $index; let first = $first) {
        <g [class]="drawing.tone" [class.before]="first && proposed() !== null">
          <path class="axis" [attr.d]="'M0 ' + drawing.axis + 'H' + width()" />
          <rect
            class="bar"
            [attr.x]="drawing.bar.x"
            [attr.y]="drawing.bar.y"
            [attr.width]="drawing.bar.width"
            [attr.height]="barHeight"
          />
          @if (drawing.bracket) {
            <path class="bracket" [attr.d]="drawing.bracket" />
          }
          @if (drawing.whisker) {
            <path class="whisker" [attr.d]="drawing.whisker" />
          }
          @if (drawing.beyond) {
            <path class="beyond" [attr.d]="drawing.beyond" />
          }
        </g>
      }
      <path class="limit" [attr.d]="'M' + centre() + ' 2V' + (height() - 2)" />
    </svg>
  `,
  styles: `
    :host {
      display: inline-flex;
      max-width: 100%;
    }
    svg {
      max-width: 100%;
    }
    path {
      fill: none;
      stroke: var(--ink);
      stroke-width: 1.3;
    }
    .axis {
      stroke: var(--hair);
      stroke-width: 2;
    }
    .limit {
      stroke-width: 2;
    }
    .bracket {
      stroke: var(--ink-2);
    }
    .bar {
      fill: var(--unknown-fill);
    }
    .compliant .bar {
      fill: var(--compliant-fill);
    }
    .short .bar {
      fill: var(--short-fill);
    }
    .indeterminate .bar {
      fill: var(--indeterminate-fill);
    }
    .non-compliant .bar {
      fill: var(--non-compliant-fill);
    }
    .beyond {
      stroke: var(--sheet);
      stroke-width: 2;
    }
    .before {
      opacity: 0.42;
    }
  `,
})
export class MarginGauge {
  readonly reading = input.required<GaugeReading | null>();
  /** What it would be if the open change request were approved. */
  readonly proposed = input<GaugeReading | null>(null);
  readonly width = input(146);
  /** Margin in per cent at the ends. */
  readonly full = input(FULL_SCALE);

  protected readonly barHeight = BAR;
  protected readonly centre = computed(() => this.width() / 2);
  protected readonly height = computed(() => (this.proposed() === null ? HEIGHT : HEIGHT + 13));
  protected readonly drawings = computed<readonly Drawing[]>(() => {
    const now = this.reading();
    const then = this.proposed();
    return [...(now === null ? [] : [this.draw(now, 14)]), ...(then === null ? [] : [this.draw(then, 27)])];
  });
  protected readonly spoken = computed(() => {
    const now = this.reading();
    const then = this.proposed();
    if (then !== null) return `${now === null ? '' : `Now: ${describe(now)}. `}If approved: ${describe(then)}.`;
    return now === null ? 'No margin' : describe(now);
  });

  private draw(reading: GaugeReading, axis: number): Drawing {
    const x = (percent: number): number =>
      round(this.centre() + marginPlace(percent, this.full()) * (this.centre() - 3));
    const end = x(reading.margin);
    const top = axis - BAR / 2 - 4.5;
    const { required, uncertainty } = reading;
    return {
      tone: verdictTone(reading.verdict),
      axis,
      bar: { x: Math.min(this.centre(), end), width: Math.abs(end - this.centre()), y: axis - BAR / 2 },
      bracket: required === null || required <= 0 ? null : `M${this.centre()} ${top}H${x(required)}v4`,
      whisker:
        uncertainty === null || uncertainty <= 0
          ? null
          : `M${x(reading.margin - uncertainty)} ${axis}H${x(reading.margin + uncertainty)}` +
            `M${x(reading.margin - uncertainty)} ${axis - 3}v6M${x(reading.margin + uncertainty)} ${axis - 3}v6`,
      beyond: isBeyondScale(reading.margin, this.full()) ? this.breakMark(end, axis) : null,
    };
  }

  /** A cut through the bar near its end: the value lies beyond the scale. */
  private breakMark(end: number, axis: number): string {
    const at = end > this.centre() ? end - 9 : end + 9;
    return `M${at - 2} ${axis + BAR / 2 + 1}l4 ${-BAR - 2}`;
  }
}

function describe(reading: GaugeReading): string {
  const required = reading.required === null ? '' : `, ${percentText(reading.required)} required`;
  const uncertainty =
    reading.uncertainty === null ? '' : `, uncertainty ±${percentText(reading.uncertainty).replace('+', '')}`;
  return `${verdictWord(reading.verdict)}, margin ${percentText(reading.margin)}${required}${uncertainty}`;
}

function round(value: number): number {
  return Math.round(value * 10) / 10;
}
