import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import {
  MAT_DIALOG_DATA,
  MatDialogActions,
  MatDialogClose,
  MatDialogContent,
  MatDialogRef,
  MatDialogTitle,
} from '@angular/material/dialog';
import { Control, Field } from '../field/field';

/** A question before something is done. */
export interface Question {
  readonly title: string;
  /** What will happen, in a sentence or two. */
  readonly text: string;
  /** The verb on the button: "Withdraw VEH-002". */
  readonly action: string;
  /** Asks for words to go on record with it. */
  readonly reason?: { readonly label: string; readonly hint?: string; readonly required: boolean };
  /** True when it cannot be taken back. */
  readonly isFinal?: boolean;
}

/** What was answered; the reason is empty where none was asked for or given. */
export interface Answer {
  readonly reason: string;
}

/** Asks before something is done, and for the reason where the record wants one. */
@Component({
  selector: 'dp-ask-dialog',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Control, Field, MatButton, MatDialogActions, MatDialogClose, MatDialogContent, MatDialogTitle],
  template: `
    <h2 mat-dialog-title>{{ question.title }}</h2>
    <mat-dialog-content>
      <p class="text">{{ question.text }}</p>
      @if (question.reason; as asked) {
        <dp-field [label]="asked.label" [hint]="asked.hint ?? ''" [optional]="!asked.required" [error]="message()">
          <textarea
            dpControl
            #box
            rows="4"
            (input)="reason.set(box.value)"
            (keydown.control.enter)="answer()"
          ></textarea>
        </dp-field>
      }
    </mat-dialog-content>
    <mat-dialog-actions align="end">
      <button type="button" matButton="text" [mat-dialog-close]="undefined">Leave it</button>
      <button type="button" matButton="filled" [class.final]="question.isFinal" (click)="answer()">
        {{ question.action }}
      </button>
    </mat-dialog-actions>
  `,
  styles: `
    .text {
      margin: 0 0 16px;
      max-width: 60ch;
    }
    .final {
      --mat-button-filled-container-color: var(--non-compliant);
      --mat-button-filled-label-text-color: var(--sheet);
    }
  `,
})
export class AskDialog {
  private readonly dialog = inject<MatDialogRef<AskDialog, Answer>>(MatDialogRef);
  protected readonly question = inject<Question>(MAT_DIALOG_DATA);
  protected readonly reason = signal('');
  private readonly wasAsked = signal(false);
  protected readonly message = computed(() =>
    this.wasAsked() && this.isMissing() ? 'A reason is needed here; it goes on record with your name.' : '',
  );

  protected answer(): void {
    this.wasAsked.set(true);
    if (!this.isMissing()) this.dialog.close({ reason: this.reason().trim() });
  }

  private isMissing(): boolean {
    return (this.question.reason?.required ?? false) && this.reason().trim() === '';
  }
}
