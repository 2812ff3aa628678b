import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { ProofLine, Shown, Verdict } from '@shared/contract';
import { formatSi } from '@shared/units';
import type { ShowNumber } from '../measure/show-number';
import { VerdictMark } from '../verdict/verdict-mark';
import { Tex } from './tex';

/** The comparison that ends a proof: formula, the words beside it, and the verdict. */
export interface Comparison {
  readonly tex: string;
  readonly text: string;
}

/** The chain behind a verdict: numbered lines, each formula with its symbols and then with the numbers, result at the right. */
@Component({
  selector: 'dp-proof-lines',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Tex, VerdictMark],
  template: `
    <ol>
      @for (line of numbered(); track line.number) {
        @if (line.startsAnalysis) {
          <li class="of">{{ line.analysis }}</li>
        }
        <li class="line" [class.last]="$last">
          <span class="index">{{ line.number }}</span>
          <span class="formula">
            @if (line.symbols) {
              <dp-tex [tex]="line.symbols" />
            } @else {
              {{ line.label }}
            }
            @if (line.numbers) {
              <dp-tex [tex]="'{} = ' + line.numbers" />
            }
            @if (line.symbols && line.label) {
              <span class="faint small">{{ line.label }}</span>
            }
          </span>
          @if (line.failure) {
            <span class="failure">{{ line.failure }}</span>
          } @else {
            <span class="result">{{ line.shown }}</span>
          }
        </li>
      }
    </ol>
    @if (comparison(); as comparison) {
      <div class="comparison">
        <dp-tex [tex]="comparison.tex" />
        <span>{{ comparison.text }}</span>
        @if (verdict(); as verdict) {
          <dp-verdict-mark [verdict]="verdict" />
        }
      </div>
    }
  `,
  styleUrl: './proof-lines.scss',
})
export class ProofLines {
  readonly lines = input.required<readonly ProofLine[]>();
  readonly comparison = input<Comparison | null>(null);
  readonly verdict = input<Verdict | null>(null);
  readonly show = input<ShowNumber>(formatSi);
  /** Writes the analysis above its lines where the proof runs through more than one. */
  readonly nameAnalyses = input(true);

  protected readonly numbered = computed(() => {
    const lines = this.lines();
    const several = this.nameAnalyses() && new Set(lines.map((line) => line.analysis)).size > 1;
    return lines.map((line, index) => ({
      ...line,
      startsAnalysis: several && line.analysis !== '' && line.analysis !== lines[index - 1]?.analysis,
      shown: line.result === null ? '—' : this.said(line.result),
    }));
  });

  private said({ si, unit, difference }: Shown): string {
    return this.show()(si, unit, difference ? { temperature: 'difference' } : {});
  }
}
