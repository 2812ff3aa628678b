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
        <li>
          @if (row.heading) {
            <span class="heading">{{ row.heading }}</span>
          }
          @for (line of row.lines; track line.what) {
            <span class="line" [class.long]="line.isLong">
              <span [class.faint]="row.heading !== ''">{{ line.what }}</span>
              <del class="mono" [class.words]="line.isLong"
                ><span class="only-heard">{{ line.before ? 'from ' : 'from nothing ' }}</span
                >{{ line.before }}</del
              >
              <ins class="mono" [class.words]="line.isLong"><span class="only-heard">to </span>{{ line.after }}</ins>
            </span>
          }
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
      position: relative;
      display: grid;
      gap: 2px;
      padding-inline: 10px;
    }
    li:has(button) {
      padding-right: 64px;
    }
    button {
      position: absolute;
      top: 7px;
      right: 6px;
    }
    .line {
      display: grid;
      grid-template-columns: minmax(0, 1fr) auto minmax(84px, auto);
      gap: 0 20px;
      align-items: baseline;
    }
    .line.long {
      grid-template-columns: minmax(0, 1fr);
    }
    .heading ~ .line.long {
      grid-template-columns: 92px minmax(0, 1fr);
    }
    .heading ~ .line.long ins {
      grid-column: 2;
    }
    del {
      color: var(--ink-2);
      text-align: right;
      text-decoration-thickness: 1px;
      overflow-wrap: anywhere;
    }
    ins {
      font-weight: 650;
      text-align: right;
      text-decoration: none;
      overflow-wrap: anywhere;
    }
    .words {
      font: inherit;
      font-size: 14px;
      line-height: 20px;
      text-align: left;
    }
    ins.words {
      font-weight: 620;
    }
    .conflict {
      color: var(--indeterminate);
    }
    @media (max-width: 720px) {
      li {
        padding-left: 0;
      }
      li:not(:has(button)) {
        padding-right: 0;
      }
      .line {
        column-gap: 12px;
      }
    }
  `,
})
export class ProposedEdits {
  readonly edits = input.required<readonly EditSummary[]>();
  readonly mayDrop = input(false);
  readonly dropEdit = output<EditSummary>();
  protected readonly rows = computed(() => this.edits().map((edit) => ({ edit, ...linesOf(edit) })));
}

interface EditLine {
  readonly what: string;
  readonly before: string;
  readonly after: string;
  readonly isLong: boolean;
}

/** An edit of several fields has a heading and a line for each of them, another only a line. */
function linesOf(edit: EditSummary): { readonly heading: string; readonly lines: readonly EditLine[] } {
  const line = (what: string, { before, after }: { readonly before: string; readonly after: string }): EditLine => ({
    what,
    before,
    after,
    isLong: before.length > SHORT || after.length > SHORT,
  });
  if (edit.fields === undefined) return { heading: '', lines: [line(edit.what, edit)] };
  const heading = edit.what.slice(0, -`: ${edit.fields.map(({ field }) => field).join(', ')}`.length);
  return { heading, lines: edit.fields.map((field) => line(field.field, field)) };
}
