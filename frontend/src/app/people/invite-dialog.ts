import { ChangeDetectionStrategy, Component, DestroyRef, computed, inject, signal } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import {
  MAT_DIALOG_DATA,
  MatDialogActions,
  MatDialogClose,
  MatDialogContent,
  MatDialogRef,
  MatDialogTitle,
} from '@angular/material/dialog';
import type { PeopleAnswer } from '@shared/contract';
import { firstValueFrom } from 'rxjs';
import { Drafts } from '../core/drafts/drafts';
import { type ProblemError, toProblem } from '../core/http/problem-error';
import { Control, Field } from '../ui/field/field';
import { PeopleApi } from './people-api';
import { RoleMatrix, type RolesByStudy } from './role-matrix';

const DRAFT = 'invitation';

/** Invites a person by mail, with roles in studies; closes with the name of whom it invited. */
@Component({
  selector: 'dp-invite-dialog',
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
    RoleMatrix,
  ],
  template: `
    <form [formGroup]="form" (ngSubmit)="invite()">
      <h2 mat-dialog-title>Invite a person</h2>
      <mat-dialog-content>
        <div class="form side-by-side">
          <dp-field label="Name" [error]="messages().name"
            ><input dpControl formControlName="name" autocomplete="off"
          /></dp-field>
          <dp-field label="Mail address" [error]="messages().email">
            <input dpControl type="email" formControlName="email" autocomplete="off" />
          </dp-field>
        </div>
        <h3 class="caption part">Roles</h3>
        <dp-role-matrix [studies]="studies" [(value)]="roles" />
        @if (problem(); as problem) {
          <div class="note bad" role="alert">
            <strong>{{ problem.title }}</strong> {{ problem.detail }}
          </div>
        }
      </mat-dialog-content>
      <mat-dialog-actions align="end">
        <button matButton="text" type="button" [mat-dialog-close]="undefined">Leave it</button>
        <button matButton="filled" type="submit" [disabled]="busy()">Send the invitation</button>
      </mat-dialog-actions>
    </form>
  `,
})
export class InviteDialog {
  private readonly api = inject(PeopleApi);
  private readonly drafts = inject(Drafts);
  private readonly dialog = inject<MatDialogRef<InviteDialog, string>>(MatDialogRef);
  protected readonly studies = inject<PeopleAnswer['studies']>(MAT_DIALOG_DATA);

  protected readonly form = inject(NonNullableFormBuilder).group({ name: '', email: '' });
  protected readonly roles = signal<RolesByStudy>({});
  private readonly typed = toSignal(this.form.valueChanges, { initialValue: this.form.value });
  private readonly asked = signal(false);
  protected readonly problem = signal<ProblemError | null>(null);
  protected readonly busy = signal(false);

  protected readonly messages = computed(() => {
    const { name = '', email = '' } = this.typed();
    return {
      name:
        this.asked() && name.trim() === ''
          ? 'Type the name that stands under their signatures.'
          : (this.problem()?.fieldMessage('name') ?? ''),
      email:
        this.asked() && !email.includes('@')
          ? `“${email}” is no mail address. Right would be name@example.org.`
          : (this.problem()?.fieldMessage('email') ?? ''),
    };
  });

  constructor() {
    this.drafts.follow(DRAFT, this.form, inject(DestroyRef));
  }

  protected async invite(): Promise<void> {
    this.asked.set(true);
    this.problem.set(null);
    const { name, email } = this.form.getRawValue();
    if (name.trim() === '' || !email.includes('@')) return;
    this.busy.set(true);
    try {
      const memberships = Object.entries(this.roles())
        .filter(([, roles]) => roles.length > 0)
        .map(([study, roles]) => ({ study, roles: [...roles] }));
      await firstValueFrom(this.api.invite({ name: name.trim(), email: email.trim(), memberships }));
      this.drafts.discard(DRAFT);
      this.dialog.close(name.trim());
    } catch (error) {
      this.problem.set(toProblem(error));
    } finally {
      this.busy.set(false);
    }
  }
}
