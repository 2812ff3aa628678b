import { ChangeDetectionStrategy, Component, DestroyRef, computed, inject, signal } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import {
  MatDialogActions,
  MatDialogClose,
  MatDialogContent,
  MatDialogRef,
  MatDialogTitle,
} from '@angular/material/dialog';
import { firstValueFrom } from 'rxjs';
import { Drafts } from '../core/drafts/drafts';
import { type ProblemError, toProblem } from '../core/http/problem-error';
import { StudyContext } from '../core/study/study-context';
import { Control, Field } from '../ui/field/field';
import { ChangesApi } from './changes-api';

/** Writes a change request; closes with its key. The edits themselves are added on its sheet. */
@Component({
  selector: 'dp-write-change-dialog',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [
    Control,
    Field,
    MatButton,
    MatDialogActions,
    MatDialogClose,
    MatDialogContent,
    MatDialogTitle,
    ReactiveFormsModule,
  ],
  template: `
    <form [formGroup]="form" (ngSubmit)="write()">
      <h2 mat-dialog-title>Write a change request</h2>
      <mat-dialog-content>
        <div class="form">
          <dp-field
            label="Title"
            hint="What it changes, in a few words: Lower the radiator temperature to 760 K"
            [error]="messages().title"
          >
            <input dpControl formControlName="title" />
          </dp-field>
          <dp-field
            label="Reason"
            hint="Why the change is needed. The board reads it first; it can wait until the request is submitted."
            [error]="messages().reason"
          >
            <textarea dpControl formControlName="reason" rows="5"></textarea>
          </dp-field>
          <dp-field label="Decision due" optional [error]="messages().due">
            <input dpControl type="date" formControlName="due" />
          </dp-field>
          @if (problem(); as problem) {
            <div class="note bad" role="alert">
              <strong>{{ problem.title }}</strong> {{ problem.detail }}
            </div>
          }
        </div>
      </mat-dialog-content>
      <mat-dialog-actions align="end">
        <button matButton="text" type="button" [mat-dialog-close]="undefined">Leave it</button>
        <button matButton="filled" type="submit" [disabled]="busy()">Write it</button>
      </mat-dialog-actions>
    </form>
  `,
})
export class WriteChangeDialog {
  private readonly api = inject(ChangesApi);
  private readonly drafts = inject(Drafts);
  private readonly dialog = inject<MatDialogRef<WriteChangeDialog, string>>(MatDialogRef);
  private readonly slot = `change-request.${inject(StudyContext).study() ?? ''}`;

  protected readonly form = inject(NonNullableFormBuilder).group({ title: '', reason: '', due: '' });
  private readonly typed = toSignal(this.form.valueChanges, { initialValue: this.form.value });
  private readonly asked = signal(false);
  protected readonly problem = signal<ProblemError | null>(null);
  protected readonly busy = signal(false);

  protected readonly messages = computed(() => {
    const refused = (field: string): string => this.problem()?.fieldMessage(field) ?? '';
    const untitled = this.asked() && (this.typed().title ?? '').trim() === '';
    return {
      title: untitled ? 'A change request needs a title.' : refused('title'),
      reason: refused('reason'),
      due: refused('due'),
    };
  });

  constructor() {
    this.drafts.follow(this.slot, this.form, inject(DestroyRef));
  }

  protected async write(): Promise<void> {
    this.asked.set(true);
    this.problem.set(null);
    const { title, reason, due } = this.form.getRawValue();
    if (title.trim() === '') return;
    this.busy.set(true);
    try {
      const answer = await firstValueFrom(this.api.write({ title, reason, due: due || null }));
      this.drafts.discard(this.slot);
      this.dialog.close(answer.created[0]?.key);
    } catch (error) {
      this.problem.set(toProblem(error));
    } finally {
      this.busy.set(false);
    }
  }
}
