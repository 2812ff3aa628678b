import { Injectable, inject } from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import { firstValueFrom } from 'rxjs';
import { FieldsDialog, type FieldsQuestion } from './fields-dialog';

/** Asks for a few fields in a dialog. */
@Injectable({ providedIn: 'root' })
export class AskFields {
  private readonly dialog = inject(MatDialog);

  /** True when it was sent and accepted, false when the person left it. */
  async ask(question: FieldsQuestion): Promise<boolean> {
    const open = this.dialog.open<FieldsDialog, FieldsQuestion, true>(FieldsDialog, { data: question, width: '620px' });
    return (await firstValueFrom(open.afterClosed())) === true;
  }
}
