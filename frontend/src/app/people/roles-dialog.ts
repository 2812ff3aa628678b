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
import type { PeopleAnswer, PersonAnswer } from '@shared/contract';
import { firstValueFrom } from 'rxjs';
import { type ProblemError, toProblem } from '../core/http/problem-error';
import { PeopleApi } from './people-api';
import { RoleMatrix, type RolesByStudy } from './role-matrix';

export interface RolesQuestion {
  readonly person: PersonAnswer;
  readonly studies: PeopleAnswer['studies'];
}

/** Grants and revokes a person's roles; closes with true when something changed. */
@Component({
  selector: 'dp-roles-dialog',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, MatDialogActions, MatDialogClose, MatDialogContent, MatDialogTitle, RoleMatrix],
  template: `
    <h2 mat-dialog-title>Roles of {{ question.person.name }}</h2>
    <mat-dialog-content>
      <dp-role-matrix [studies]="question.studies" [(value)]="roles" />
      <p class="small faint">
        Who wrote an analysis cannot sign its check, and who raised a change request does not vote on it, whatever their
        roles.
      </p>
      @if (problem(); as problem) {
        <div class="note bad" role="alert">
          <strong>{{ problem.title }}</strong> {{ problem.detail }}
        </div>
      }
    </mat-dialog-content>
    <mat-dialog-actions align="end">
      <button type="button" matButton="text" [mat-dialog-close]="false">Leave it</button>
      <button type="button" matButton="filled" [disabled]="busy()" (click)="save()">Set the roles</button>
    </mat-dialog-actions>
  `,
})
export class RolesDialog {
  private readonly api = inject(PeopleApi);
  private readonly dialog = inject<MatDialogRef<RolesDialog, boolean>>(MatDialogRef);
  protected readonly question = inject<RolesQuestion>(MAT_DIALOG_DATA);
  private readonly before: RolesByStudy = Object.fromEntries(
    this.question.person.memberships.map((membership) => [membership.study.key, membership.roles]),
  );
  protected readonly roles = signal<RolesByStudy>(this.before);
  protected readonly problem = signal<ProblemError | null>(null);
  protected readonly busy = signal(false);

  protected async save(): Promise<void> {
    this.problem.set(null);
    this.busy.set(true);
    try {
      const changed = Object.entries(this.roles()).filter(
        ([study, roles]) => roles.join() !== (this.before[study] ?? []).join(),
      );
      for (const [study, roles] of changed)
        await firstValueFrom(this.api.setRoles(this.question.person.id, study, roles));
      this.dialog.close(changed.length > 0);
    } catch (error) {
      this.problem.set(toProblem(error));
    } finally {
      this.busy.set(false);
    }
  }
}
