import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import type { EditSummary } from '@shared/contract';

/** Longer words than this stand below each other instead of beside. */
const SHORT = 26;

/** What a change request proposes: each edit with the present state struck through and the proposed one in bold. */
@Component({
  selector: 'dp-proposed-edits',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <ol class="rows" aria-label="Proposed edits">
      @for (row of rows(); track row.edit.index) {
        <li [class.long]="row.isLong">
          <span class="what">{{ row.edit.what }}</span>
          <del class="mono"
            ><span class="only-heard">from </span>{{ row.edit.before
            }}<span class="only-heard">{{ row.edit.before ? '' : 'nothing' }}</span></del
          >
          <ins class="mono"><span class="only-heard">to </span>{{ row.edit.after }}</ins>
          @if (mayDrop()) {
            <button type="button" class="quiet" (click)="dropEdit.emit(row.edit)">
              Drop<span class="only-heard"> {{ row.edit.what }}</span>
            </button>
          }
          @if (row.edit.conflict) {
            <span class="conflict small">{{ row.edit.conflict }}</span>
          }
        </li>
      } @empty {
        <li class="none faint">Nothing is proposed yet.</li>
      }
    </ol>
  `,
  styles: `
    li {
      display: grid;
      grid-template-columns: minmax(0, 1fr) auto minmax(84px, auto);
      gap: 0 20px;
      align-items: baseline;
      padding-inline: 10px;
    }
    li:has(button) {
      grid-template-columns: minmax(0, 1fr) auto minmax(84px, auto) auto;
    }
    li.none {
      display: block;
    }
    del {
      color: var(--ink-2);
      text-align: right;
      text-decoration-thickness: 1px;
    }
    ins {
      font-weight: 650;
      text-align: right;
      text-decoration: none;
    }
    .long {
      row-gap: 2px;
    }
    .long .what {
      grid-column: 1 / -2;
    }
    .long:not(:has(button)) .what {
      grid-column: 1 / -1;
    }
    .long del,
    .long ins {
      grid-row: auto;
      grid-column: 1 / -1;
      text-align: left;
      overflow-wrap: anywhere;
    }
    .long del:has(.only-heard:only-child) {
      display: none;
    }
    .long button {
      grid-row: 1;
      grid-column: -2 / -1;
    }
    .conflict {
      grid-column: 1 / -1;
      color: var(--indeterminate);
    }
    @media (max-width: 720px) {
      li {
        padding-inline: 0;
        column-gap: 12px;
      }
    }
  `,
})
export class ProposedEdits {
  readonly edits = input.required<readonly EditSummary[]>();
  readonly mayDrop = input(false);
  readonly dropEdit = output<EditSummary>();
  protected readonly rows = computed(() =>
    this.edits().map((edit) => ({ edit, isLong: edit.before.length > SHORT || edit.after.length > SHORT })),
  );
}
