import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';

const WIDTH = 160;
const HEIGHT = 16;
const CENTRE = WIDTH / 2;

/** One input's way to its turning point: the dot is where it stands, the tick where the verdict turns. Changes in per cent of the input. */
@Component({
  selector: 'dp-turning-line',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <svg [attr.viewBox]="viewBox" [attr.width]="width" [attr.height]="height" aria-hidden="true" focusable="false">
      <path class="axis" [attr.d]="axis" />
      @if (required() !== null) {
        <path class="required" [attr.d]="'M' + x(required()) + ' 4v8'" />
      }
      @if (limit() !== null) {
        <path class="way" [attr.d]="way()" />
      }
      <circle [attr.cx]="centre" cy="8" r="4" />
    </svg>
  `,
  styles: `
    :host {
      display: inline-flex;
    }
    path {
      fill: none;
    }
    .axis {
      stroke: var(--hair);
      stroke-width: 2;
    }
    .way {
      stroke: var(--non-compliant-fill);
      stroke-width: 2.6;
    }
    .required {
      stroke: var(--short-fill);
      stroke-width: 2;
    }
    circle {
      fill: var(--ink);
    }
  `,
})
export class TurningLine {
  /** Change at which the limit is reached; null where it cannot be. */
  readonly limit = input.required<number | null>();
  /** Change at which the required margin is reached. */
  readonly required = input<number | null>(null);
  /** Change at the ends of the line; the same for all lines of a table. */
  readonly full = input(10);

  protected readonly viewBox = `0 0 ${WIDTH} ${HEIGHT}`;
  protected readonly width = WIDTH;
  protected readonly height = HEIGHT;
  protected readonly centre = CENTRE;
  protected readonly axis = `M0 8H${WIDTH}`;
  protected readonly way = computed(() => {
    const end = this.x(this.limit());
    return `M${CENTRE} 8H${end}M${end} 2v12`;
  });

  /** Signed square root, as on the margin gauge: small ways stay visible beside long ones. */
  protected x(change: number | null): number {
    const share = (change ?? 0) / this.full();
    const place = Math.sign(share) * Math.min(1, Math.sqrt(Math.abs(share)));
    return Math.round((CENTRE + place * (CENTRE - 3)) * 10) / 10;
  }
}
