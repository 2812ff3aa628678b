import { ChangeDetectionStrategy, Component, input } from '@angular/core';

/** Says what is not there yet and what to do first; actions go inside. */
@Component({
  selector: 'dp-empty-state',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <svg viewBox="0 0 120 44" width="120" height="44" aria-hidden="true" focusable="false">
      <path class="edge" d="M1 8V1h7M112 1h7v7M119 36v7h-7M8 43H1v-7" />
      <path class="axis" d="M14 22h92M60 12v20" />
    </svg>
    <h2>{{ title() }}</h2>
    <p>{{ first() }}</p>
    <div class="actions-row"><ng-content /></div>
  `,
  styles: `
    :host {
      display: block;
      max-width: 60ch;
      padding: 40px 0;
    }
    path {
      fill: none;
      stroke: var(--edge);
    }
    .axis {
      stroke-dasharray: 9 3 2 3;
    }
    h2 {
      margin-top: 16px;
    }
    p {
      margin: 4px 0 16px;
      color: var(--ink-2);
    }
  `,
})
export class EmptyState {
  /** What is not there: "No requirements yet." */
  readonly title = input.required<string>();
  /** What to do first. */
  readonly first = input.required<string>();
}
