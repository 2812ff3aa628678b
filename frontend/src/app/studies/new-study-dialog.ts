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
import { Control, Field } from '../ui/field/field';
import { StudiesApi } from './studies-api';

const DRAFT = 'new-study';
const KEY = /^[A-Z][A-Z0-9-]{1,30}$/;

/** Starts an empty study; closes with its key. */
@Component({
  selector: 'dp-new-study-dialog',
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
    <form [formGroup]="form" (ngSubmit)="start()">
      <h2 mat-dialog-title>Start a study</h2>
      <mat-dialog-content>
        <div class="form">
          <dp-field
            label="Name"
            hint="What people call it, with the concept: Petrel, nuclear-electric tug"
            [error]="messages().name"
          >
            <input dpControl formControlName="name" />
          </dp-field>
          <dp-field
            label="Key"
            hint="Capital letters, digits and hyphens; it stands in every address and never changes."
            [error]="messages().key"
          >
            <input dpControl class="mono" formControlName="key" placeholder="PETREL" />
          </dp-field>
          <dp-field label="What it is to find out" optional [error]="messages().summary">
            <textarea dpControl formControlName="summary"></textarea>
          </dp-field>
          <dp-field label="Concept" optional hint="nuclear-thermal, fusion, solar sail …" [error]="messages().concept">
            <input dpControl formControlName="concept" />
          </dp-field>
          <p class="small faint">
            You will be its requirements owner and its analyst; an administrator can give roles to others.
          </p>
          @if (problem(); as problem) {
            <div class="note bad" role="alert">
              <strong>{{ problem.title }}</strong> {{ problem.detail }}
            </div>
          }
        </div>
      </mat-dialog-content>
      <mat-dialog-actions align="end">
        <button matButton="text" type="button" [mat-dialog-close]="undefined">Leave it</button>
        <button matButton="filled" type="submit" [disabled]="busy()">Start the study</button>
      </mat-dialog-actions>
    </form>
  `,
})
export class NewStudyDialog {
  private readonly api = inject(StudiesApi);
  private readonly drafts = inject(Drafts);
  private readonly dialog = inject<MatDialogRef<NewStudyDialog, string>>(MatDialogRef);

  protected readonly form = inject(NonNullableFormBuilder).group({ name: '', key: '', summary: '', concept: '' });
  private readonly typed = toSignal(this.form.valueChanges, { initialValue: this.form.value });
  private readonly asked = signal(false);
  protected readonly problem = signal<ProblemError | null>(null);
  protected readonly busy = signal(false);

  protected readonly messages = computed(() => {
    const { name = '', key = '' } = this.typed();
    const refused = (field: string): string => this.problem()?.fieldMessage(field) ?? '';
    return {
      name: this.asked() && name.trim() === '' ? 'A study needs a name.' : refused('name'),
      key:
        this.asked() && !KEY.test(key.trim())
          ? `“${key}” is no key. Right would be 2 to 31 capital letters, digits or hyphens, starting with a letter: PETREL.`
          : refused('key'),
      summary: refused('summary'),
      concept: refused('concept'),
    };
  });

  constructor() {
    this.drafts.follow(DRAFT, this.form, inject(DestroyRef));
  }

  protected async start(): Promise<void> {
    this.asked.set(true);
    this.problem.set(null);
    const value = this.form.getRawValue();
    const study = { ...value, key: value.key.trim(), name: value.name.trim() };
    if (study.name === '' || !KEY.test(study.key)) return;
    this.busy.set(true);
    try {
      const { key } = await firstValueFrom(this.api.create(study));
      this.drafts.discard(DRAFT);
      this.dialog.close(key);
    } catch (error) {
      this.problem.set(toProblem(error));
    } finally {
      this.busy.set(false);
    }
  }
}
