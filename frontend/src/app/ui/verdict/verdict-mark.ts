import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { Verdict } from '@shared/contract';
import { verdictTone, verdictWord } from './verdict-words';

/** A verdict as a small drawn mark with its word, both in its colour, never by colour alone. */
@Component({
  selector: 'dp-verdict-mark',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <svg viewBox="0 0 12 12" width="12" height="12" aria-hidden="true" focusable="false">
      @switch (verdict()) {
        @case ('compliant') {
          <path d="M1.5 6.4 4.6 9.6 10.4 2.4" />
        }
        @case ('short margin') {
          <path d="M1 8.6h10M4.6 8.6V4.4" />
        }
        @case ('indeterminate') {
          <path d="M1 6h10M1 3.6v4.8M11 3.6v4.8M6 2v8" />
        }
        @case ('non-compliant') {
          <path d="M1.6 2.8h8.8M6 2.8V11" />
        }
        @case ('not computable') {
          <path class="dots" d="M3.6 6h.01M8.4 6h.01" />
        }
        @case ('no evidence') {
          <path d="M2.2 2.2h7.6v7.6H2.2Z" />
        }
      }
    </svg>
    <span class="word" [class.only-heard]="!showWord()">{{ word() }}</span>
  `,
  styles: `
    :host {
      display: inline-flex;
      align-items: center;
      gap: 6px;
      position: relative;
      color: var(--unknown);
      font-size: 13px;
      line-height: 18px;
      font-weight: 660;
      white-space: nowrap;
    }
    :host(.compliant) {
      color: var(--compliant);
    }
    :host(.short) {
      color: var(--short);
    }
    :host(.indeterminate) {
      color: var(--indeterminate);
    }
    :host(.non-compliant) {
      color: var(--non-compliant);
    }
    svg {
      flex: none;
    }
    path {
      fill: none;
      stroke: currentColor;
      stroke-width: 2;
    }
    .dots {
      stroke-width: 2.6;
      stroke-linecap: round;
    }
  `,
  host: { '[class]': 'tone()' },
})
export class VerdictMark {
  readonly verdict = input.required<Verdict>();
  /** False where the column or line already says the word; it is still read out. */
  readonly showWord = input(true);
  protected readonly word = computed(() => verdictWord(this.verdict()));
  protected readonly tone = computed(() => verdictTone(this.verdict()));
}
