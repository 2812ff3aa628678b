import { ChangeDetectionStrategy, Component, inject, input, signal } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { type ProblemError, toProblem } from '../core/http/problem-error';
import { SessionStore } from '../core/session/session-store';
import { Control, Field } from '../ui/field/field';

/** Where a person signs in; afterwards they go where they were going. */
@Component({
  selector: 'dp-sign-in',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Control, Field, MatButton, ReactiveFormsModule, RouterLink],
  template: `
    <section class="sheet">
      <h1 class="statement">Does the concept close?</h1>
      <p class="lead">
        Every requirement carries the calculation that verifies it, and the verdict follows whenever an input moves.
        Sign in to open your studies.
      </p>
      <form class="form" [formGroup]="form" (ngSubmit)="signIn()">
        <dp-field label="Mail address" [error]="message('email')">
          <input dpControl type="email" formControlName="email" autocomplete="username" />
        </dp-field>
        <dp-field label="Password" [error]="message('password')">
          <input dpControl type="password" formControlName="password" autocomplete="current-password" />
        </dp-field>
        @if (problem(); as problem) {
          <div class="note bad" role="alert">
            <strong>{{ problem.title }}</strong> {{ problem.detail }}
          </div>
        }
        <div class="actions">
          <button matButton="filled" type="submit" [disabled]="busy()">Sign in</button>
          <a routerLink="/password-reset">I forgot my password</a>
        </div>
      </form>
    </section>
  `,
  styles: `
    .sheet {
      padding-top: 8vh;
    }
    .form {
      max-width: 400px;
      margin-top: 32px;
    }
    .statement {
      margin-bottom: 12px;
    }
  `,
})
export class SignIn {
  private readonly session = inject(SessionStore);
  private readonly router = inject(Router);

  /** Where to go afterwards, from the address. */
  readonly from = input<string>();

  protected readonly form = inject(NonNullableFormBuilder).group({
    email: ['', Validators.required],
    password: ['', Validators.required],
  });
  protected readonly problem = signal<ProblemError | null>(null);
  protected readonly busy = signal(false);
  private readonly asked = signal(false);

  protected message(field: 'email' | 'password'): string {
    if (!this.asked() || this.form.controls[field].value !== '') return '';
    return field === 'email' ? 'Type the mail address you were invited with.' : 'Type your password.';
  }

  protected async signIn(): Promise<void> {
    this.asked.set(true);
    this.problem.set(null);
    if (this.form.invalid) return;
    this.busy.set(true);
    try {
      const { email, password } = this.form.getRawValue();
      await this.session.signIn(email.trim(), password);
      await this.router.navigateByUrl(ownAddress(this.from()));
    } catch (error) {
      this.problem.set(toProblem(error));
    } finally {
      this.busy.set(false);
    }
  }
}

/** Only an address of ours: a link that was prepared elsewhere must not lead away. */
function ownAddress(from: string | undefined): string {
  return from !== undefined && /^\/(?![/\\])/.test(from) ? from : '/';
}
