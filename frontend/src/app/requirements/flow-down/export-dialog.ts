import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatDialogActions, MatDialogClose, MatDialogContent, MatDialogTitle } from '@angular/material/dialog';
import { StudyContext } from '../../core/study/study-context';
import { RequirementApi } from '../requirement-api';

/** The compliance matrix as a file, from the standpoint one looks from. */
@Component({
  selector: 'dp-export-dialog',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, MatDialogActions, MatDialogClose, MatDialogContent, MatDialogTitle],
  template: `
    <h2 mat-dialog-title>Export the compliance matrix</h2>
    <mat-dialog-content>
      <p>Every requirement in force, as seen from {{ label() }}, bad news first.</p>
      <ul class="rows">
        @for (format of formats; track format.ending) {
          <li>
            <a [href]="api.exportAddress(format.ending)" download mat-dialog-close>{{ format.name }}</a>
            <div class="small faint">{{ format.what }}</div>
          </li>
        }
      </ul>
    </mat-dialog-content>
    <mat-dialog-actions align="end">
      <button type="button" matButton="text" mat-dialog-close>Leave it</button>
    </mat-dialog-actions>
  `,
})
export class ExportDialog {
  private readonly context = inject(StudyContext);
  protected readonly api = inject(RequirementApi);
  protected readonly label = () => this.context.head.value()?.standpoint.label ?? 'now';
  protected readonly formats = [
    {
      ending: 'docx',
      name: 'Word document (DOCX)',
      what: 'For the review board: header, counts, caution and the matrix.',
    },
    {
      ending: 'xlsx',
      name: 'Spreadsheet (XLSX)',
      what: 'Numbers as numbers, with their units in columns of their own.',
    },
    {
      ending: 'csv',
      name: 'Comma-separated values (CSV)',
      what: 'For other programs; text that looks like a formula is inert.',
    },
  ] as const;
}
