import { ChangeDetectionStrategy, Component, input } from '@angular/core';

/** The small letter-spaced heading of a part of a sheet; a side note may follow inside. */
@Component({
  selector: 'dp-section-caption',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <h2 class="caption" [id]="anchor()">{{ text() }}</h2>
    <ng-content />
  `,
  styles: `
    :host {
      display: flex;
      align-items: baseline;
      gap: 12px;
      margin-bottom: 8px;
    }
  `,
})
export class SectionCaption {
  readonly text = input.required<string>();
  /** Id of the heading, for aria-labelledby and deep links. */
  readonly anchor = input<string | null>(null);
}
