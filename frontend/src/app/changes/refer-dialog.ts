import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import {
  MAT_DIALOG_DATA,
  MatDialogActions,
  MatDialogClose,
  MatDialogContent,
  MatDialogRef,
  MatDialogTitle,
} from '@angular/material/dialog';
import { Control, Field } from '../ui/field/field';

/** Which request goes before the board, and when its decision is due so far. */
export interface ReferQuestion {
  readonly key: string;
  readonly due: string | null;
}

/** Asks by when the board is to decide; closes with the day, or with null when none is set. */
@Component({
  selector: 'dp-refer-dialog',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Control, Field, MatButton, MatDialogActions, MatDialogClose, MatDialogContent, MatDialogTitle],
  template: `
    <h2 mat-dialog-title>Put {{ question.key }} before the board?</h2>
    <mat-dialog-content>
      <p>From now on its members vote, and what it proposes stays as it is.</p>
      <dp-field label="Decision due" optional>
        <input dpControl type="date" #day [value]="due()" (input)="due.set(day.value)" />
      </dp-field>
    </mat-dialog-content>
    <mat-dialog-actions align="end">
      <button type="button" matButton="text" [mat-dialog-close]="undefined">Leave it</button>
      <button type="button" matButton="filled" (click)="answer()">Put before the board</button>
    </mat-dialog-actions>
  `,
})
export class ReferDialog {
  private readonly dialog = inject<MatDialogRef<ReferDialog, { readonly due: string | null }>>(MatDialogRef);
  protected readonly question = inject<ReferQuestion>(MAT_DIALOG_DATA);
  protected readonly due = signal(this.question.due ?? '');

  protected answer(): void {
    this.dialog.close({ due: this.due() || null });
  }
}
