import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { ChangeSheet } from '@shared/contract';
import { SectionCaption } from '../ui/section-caption/section-caption';

/** The board with what each member said; whoever raised the request is named as not voting. */
@Component({
  selector: 'dp-board-votes',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [SectionCaption],
  template: `
    <dp-section-caption [text]="caption()" />
    <ul class="rows" aria-label="Votes">
      @for (seat of sheet().board; track seat.id) {
        <li>
          <span
            >{{ seat.name }}
            @if (seat.chair) {
              <span class="faint">chair</span>
            }
          </span>
          @if (seat.vote; as vote) {
            <span class="strong"
              >{{ vote.vote === 'for' ? 'For' : 'Against' }}{{ vote.remark ? ', with remark' : '' }}</span
            >
            @if (vote.remark) {
              <span class="remark small">{{ vote.remark }}</span>
            }
          } @else {
            <span class="faint">{{ seat.author ? 'author, does not vote' : missing() }}</span>
          }
        </li>
      } @empty {
        <li class="faint">Nobody is on the board of this study yet.</li>
      }
    </ul>
  `,
  styles: `
    li {
      display: flex;
      flex-wrap: wrap;
      justify-content: space-between;
      gap: 0 16px;
      padding-inline: 10px;
    }
    .remark {
      flex-basis: 100%;
      max-width: 60ch;
      color: var(--ink-2);
      white-space: pre-wrap;
    }
    @media (max-width: 720px) {
      li {
        padding-inline: 0;
      }
    }
  `,
})
export class BoardVotes {
  readonly sheet = input.required<ChangeSheet>();
  protected readonly caption = computed(() => {
    const voting = this.sheet().board.filter(({ author }) => !author).length;
    return `Votes · ${this.sheet().quorum} of ${voting} needed, the author does not vote`;
  });
  protected readonly missing = computed(() => {
    const { state, disposition } = this.sheet();
    return state === 'approved' || state === 'rejected' || disposition !== null ? 'did not vote' : 'not yet';
  });
}
