import { Injectable, inject } from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import { firstValueFrom } from 'rxjs';
import { type Answer, AskDialog, type Question } from './ask-dialog';

/** Asks the person a question in a dialog. */
@Injectable({ providedIn: 'root' })
export class Ask {
  private readonly dialog = inject(MatDialog);

  /** The answer, or undefined when the person left it. */
  async ask(question: Question): Promise<Answer | undefined> {
    const open = this.dialog.open<AskDialog, Question, Answer>(AskDialog, {
      data: question,
      width: '560px',
      role: 'alertdialog',
    });
    return firstValueFrom(open.afterClosed());
  }
}
