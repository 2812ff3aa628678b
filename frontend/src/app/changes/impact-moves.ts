import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import type { VerdictMove, VerdictView } from '@shared/contract';
import { UnitPreferences } from '../core/preferences/unit-preferences';
import { StudyContext } from '../core/study/study-context';
import { KeyLink } from '../ui/key-link/key-link';
import { gaugeReading } from '../ui/margin/gauge-reading';
import { MarginGauge } from '../ui/margin/margin-gauge';
import { MarginNumber } from '../ui/margin/margin-number';
import { VerdictMark } from '../ui/verdict/verdict-mark';

/** Verdicts that turn, or margins that move, each as it is now and as it would be. */
@Component({
  selector: 'dp-impact-moves',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [KeyLink, MarginGauge, MarginNumber, VerdictMark],
  template: `
    <table class="ruled" role="table" [attr.aria-label]="caption()">
      <thead role="rowgroup">
        <tr role="row">
          <th role="columnheader" scope="col" class="name">{{ caption() }}</th>
          <th role="columnheader" scope="col" class="verdict">{{ before() }}</th>
          <th role="columnheader" scope="col" class="arrow"><span class="only-heard">becomes</span></th>
          <th role="columnheader" scope="col" class="verdict">{{ after() }}</th>
          <th role="columnheader" scope="col" class="gauge">Margin</th>
          <th role="columnheader" scope="col" class="number"><span class="only-heard">Margin in numbers</span></th>
        </tr>
      </thead>
      <tbody role="rowgroup">
        @for (row of rows(); track row.move.key) {
          <tr role="row">
            <td role="cell" class="name">
              <dp-key-link [key]="row.move.key" [to]="row.to" [title]="row.move.title" />
            </td>
            <td role="cell" class="verdict">
              @if (row.move.before; as was) {
                <dp-verdict-mark [verdict]="was.verdict" />
              } @else {
                <span class="faint small">new</span>
              }
            </td>
            <td role="cell" class="arrow" aria-hidden="true">→</td>
            <td role="cell" class="verdict">
              @if (row.move.after; as is) {
                <dp-verdict-mark [verdict]="is.verdict" />
              } @else {
                <span class="faint small">withdrawn</span>
              }
            </td>
            <td role="cell" class="gauge">
              @if (row.now || row.then) {
                <dp-margin-gauge [reading]="row.now" [proposed]="row.then" [width]="138" />
              }
            </td>
            <td role="cell" class="number">
              <dp-margin-number [margin]="row.margin" [unit]="row.unit" [show]="show" />
            </td>
          </tr>
        }
      </tbody>
    </table>
  `,
  styleUrl: './impact-moves.scss',
})
export class ImpactMoves {
  private readonly units = inject(UnitPreferences);
  private readonly context = inject(StudyContext);
  /** "Turned" or "Moved". */
  readonly caption = input.required<string>();
  readonly moves = input.required<readonly VerdictMove[]>();
  readonly before = input('Now');
  readonly after = input('If approved');

  protected readonly show = this.units.show.bind(this.units);
  protected readonly rows = computed(() =>
    this.moves().map((move) => ({
      move,
      to: this.context.link('requirements', move.key),
      now: reading(move.before),
      then: reading(move.after),
      margin: (move.after ?? move.before)?.margin ?? null,
      unit: move.limit?.value.unit ?? move.after?.value?.unit ?? '',
    })),
  );
}

function reading(view: VerdictView | null) {
  return view === null ? null : gaugeReading(view);
}
