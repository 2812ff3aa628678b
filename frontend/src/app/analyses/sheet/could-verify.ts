import { ChangeDetectionStrategy, Component, computed, inject, input, output, signal } from '@angular/core';
import type { AnalysisSheet } from '@shared/contract';
import { StudyContext } from '../../core/study/study-context';
import { KeyLink } from '../../ui/key-link/key-link';
import { percentText } from '../../ui/margin/margin-text';
import { VerdictMark } from '../../ui/verdict/verdict-mark';

type Offer = AnalysisSheet['couldVerify'][number];
const FIRST = 8;
/** Margins beyond this many per cent compare things that merely share a dimension. */
const FAR = 1000;

/** What this analysis verifies, and which requirements an output of it could verify. */
@Component({
  selector: 'dp-could-verify',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [KeyLink, VerdictMark],
  template: `
    <h2 class="caption" id="verifies">Verifies</h2>
    <ul class="rows" aria-labelledby="verifies">
      @for (row of sheet().verifies; track row.key) {
        <li>
          <dp-key-link [key]="row.key" [to]="context.link('requirements', row.key)" [title]="row.title" />
          <dp-verdict-mark [verdict]="row.verdict" />
        </li>
      } @empty {
        <li class="faint">Nothing yet: no verdict rests on it.</li>
      }
    </ul>
    @if (sheet().couldVerify.length > 0) {
      <h2 class="caption could" id="could">Could verify</h2>
      <ul class="rows" aria-labelledby="could">
        @for (row of offers(); track row.offer.key + row.offer.output) {
          <li>
            <dp-key-link
              [key]="row.offer.key"
              [to]="context.link('requirements', row.offer.key)"
              [title]="row.offer.title"
            />
            <span class="faint">{{ row.words }}</span>
            <dp-verdict-mark [verdict]="row.offer.verdict" />
            @if (mayLink()) {
              <button type="button" class="quiet" (click)="link.emit(row.offer)">
                Link<span class="only-heard"> {{ row.offer.output }} to {{ row.offer.key }}</span>
              </button>
            }
          </li>
        }
      </ul>
      @if (sheet().couldVerify.length > offers().length) {
        <button type="button" class="quiet" (click)="all.set(true)">Show all {{ sheet().couldVerify.length }}</button>
      }
    }
  `,
  styles: `
    :host {
      display: block;
    }
    .caption {
      margin-bottom: 8px;
    }
    .could {
      margin-top: 24px;
    }
    li {
      display: flex;
      flex-wrap: wrap;
      align-items: baseline;
      gap: 0 12px;
    }
    .quiet {
      margin-left: auto;
    }
  `,
})
export class CouldVerify {
  protected readonly context = inject(StudyContext);
  readonly sheet = input.required<AnalysisSheet>();
  readonly mayLink = input(false);
  readonly link = output<Offer>();
  protected readonly all = signal(false);
  protected readonly offers = computed(() =>
    this.sheet()
      .couldVerify.slice(0, this.all() ? undefined : FIRST)
      .map((offer) => ({ offer, words: this.words(offer) })),
  );

  private words({ output: name, percent }: Offer): string {
    const line = this.sheet().lines.findIndex((one) => one.name === name);
    const takes = line < 0 ? `takes ${name}` : `takes line ${line + 1}, ${name}`;
    if (percent !== null && Math.abs(percent) > FAR) return `${takes}, far off`;
    return percent === null ? takes : `${takes}, margin would be ${percentText(percent)}`;
  }
}
