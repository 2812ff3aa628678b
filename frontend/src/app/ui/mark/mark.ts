import { ChangeDetectionStrategy, Component } from '@angular/core';

/** The product's mark: a delta with a check inside. Decorative; the name stands beside it. */
@Component({
  selector: 'dp-mark',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <svg viewBox="0 0 24 24" width="22" height="22" aria-hidden="true" focusable="false">
      <path class="delta" d="M12 3.4 22 21H2Z" />
      <path class="check" d="m7.4 15.6 3.2 3 5-6.8" />
    </svg>
  `,
  styles: `
    :host {
      display: inline-flex;
    }
    path {
      fill: none;
      stroke-width: 2.2;
    }
    .delta {
      stroke: var(--ink);
    }
    .check {
      stroke: var(--cobalt);
      stroke-width: 2.4;
    }
  `,
})
export class Mark {}
