import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { firstValueFrom } from 'rxjs';
import { ErrorLine } from '../core/errors/error-line';
import { type ProblemError, toProblem } from '../core/http/problem-error';
import { Control, Field } from '../ui/field/field';
import { takeLinkToken } from './link-token';
import { passwordProblem } from './new-password';
import { PeopleApi } from './people-api';

/** Asks for a reset mail; with the mailed link, sets a new password. */
@Component({
  selector: 'dp-password-reset',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Control, Field, MatButton, ReactiveFormsModule, RouterLink],
  template: `
    <section class="sheet">
      @if (sentTo()) {
        <h1>Look into your mail.</h1>
        <p class="lead">
          If {{ sentTo() }} belongs to a person here, a link to set a new password is on its way. It works once and for
          a short time.
        </p>
        <a routerLink="/sign-in">Back to sign in</a>
      } @else if (token !== null) {
        <div class="sheet-head"><h1>Choose a new password.</h1></div>
        <form class="form" [formGroup]="form" (ngSubmit)="complete()">
          <dp-field
            label="New password"
            hint="At least 8 characters, any you like."
            [error]="shown().password || refused('password')"
          >
            <input dpControl type="password" formControlName="password" autocomplete="new-password" />
          </dp-field>
          <dp-field label="The same again" [error]="shown().again">
            <input dpControl type="password" formControlName="again" autocomplete="new-password" />
          </dp-field>
          @if (problem(); as problem) {
            <div class="note bad" role="alert">
              <strong>{{ problem.title }}</strong> {{ problem.detail }}
            </div>
          }
          <div class="actions">
            <button matButton="filled" type="submit" [disabled]="busy()">Set password</button>
          </div>
        </form>
      } @else {
        <div class="sheet-head">
          <h1>Set a new password</h1>
          <p class="faint">Type your mail address; a link is sent to it.</p>
        </div>
        <form class="form" [formGroup]="form" (ngSubmit)="request()">
          <dp-field label="Mail address" [error]="refused('email')">
            <input dpControl type="email" formControlName="email" autocomplete="username" />
          </dp-field>
          @if (problem(); as problem) {
            <div class="note bad" role="alert">
              <strong>{{ problem.title }}</strong> {{ problem.detail }}
            </div>
          }
          <div class="actions">
            <button matButton="filled" type="submit" [disabled]="busy()">Send the link</button>
            <a routerLink="/sign-in">Back to sign in</a>
          </div>
        </form>
      }
    </section>
  `,
})
export class PasswordReset {
  private readonly api = inject(PeopleApi);
  private readonly router = inject(Router);
  private readonly line = inject(ErrorLine);

  protected readonly token = takeLinkToken();
  protected readonly form = inject(NonNullableFormBuilder).group({ email: '', password: '', again: '' });
  private readonly typed = toSignal(this.form.valueChanges, { initialValue: this.form.value });
  private readonly asked = signal(false);
  protected readonly problem = signal<ProblemError | null>(null);
  protected readonly busy = signal(false);
  protected readonly sentTo = signal('');
  private readonly wrong = computed(() => passwordProblem(this.typed().password ?? '', this.typed().again ?? ''));
  protected readonly shown = computed(() => (this.asked() ? this.wrong() : { password: '', again: '' }));

  protected refused(field: string): string {
    return this.problem()?.fieldMessage(field) ?? '';
  }

  protected async request(): Promise<void> {
    const email = this.form.getRawValue().email.trim();
    await this.attempt(async () => {
      await firstValueFrom(this.api.requestPasswordReset(email));
      this.sentTo.set(email);
    });
  }

  protected async complete(): Promise<void> {
    this.asked.set(true);
    const { password, again } = this.form.getRawValue();
    const token = this.token;
    if (token === null || this.wrong().password !== '' || again !== password) return;
    await this.attempt(async () => {
      await firstValueFrom(this.api.completePasswordReset(token, password));
      this.line.tell('Your new password is set. Sign in with it.');
      await this.router.navigate(['/sign-in']);
    });
  }

  private async attempt(work: () => Promise<void>): Promise<void> {
    this.problem.set(null);
    this.busy.set(true);
    try {
      await work();
    } catch (error) {
      this.problem.set(toProblem(error));
    } finally {
      this.busy.set(false);
    }
  }
}
