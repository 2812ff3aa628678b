import { ChangeDetectionStrategy, Component, input, output } from '@angular/core';

/** One word of a filter with how many rows it would leave. */
export interface FilterWord {
  /** What stands in the address; empty for all. */
  readonly value: string;
  readonly label: string;
  readonly count: number;
}

/** A filter as plain words with counts in a line; the one that holds is underlined in ink. */
@Component({
  selector: 'dp-word-filter',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @for (word of words(); track word.value) {
      <button type="button" [attr.aria-pressed]="word.value === chosen()" (click)="choose.emit(word.value)">
        {{ word.label }} <span class="mono">{{ word.count }}</span>
      </button>
    }
  `,
  styles: `
    :host {
      display: flex;
      flex-wrap: wrap;
      gap: 0 18px;
    }
    button {
      min-height: 28px;
      padding: 2px 0;
      border: 0;
      border-bottom: 2px solid transparent;
      background: none;
      color: var(--cobalt);
      font-weight: 560;
      cursor: pointer;
    }
    button:hover {
      border-bottom-color: var(--rule);
    }
    button[aria-pressed='true'] {
      border-bottom-color: var(--line);
      color: var(--ink);
      font-weight: 680;
    }
    .mono {
      color: var(--ink-2);
      font-weight: 450;
    }
  `,
  host: { role: 'group', '[attr.aria-label]': 'label()' },
})
export class WordFilter {
  readonly label = input.required<string>();
  readonly words = input.required<readonly FilterWord[]>();
  readonly chosen = input.required<string>();
  readonly choose = output<string>();
}
