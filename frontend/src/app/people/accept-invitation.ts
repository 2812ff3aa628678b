import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
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

/** Where an invited person, or the first administrator, chooses a password. */
@Component({
  selector: 'dp-accept-invitation',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Control, Field, MatButton, ReactiveFormsModule, RouterLink],
  template: `
    <section class="sheet">
      @if (token === null) {
        <h1>This link carries no code.</h1>
        <p class="lead">Open the link in the invitation mail, whole, or ask an administrator to invite you again.</p>
        <a routerLink="/sign-in">Go to sign in</a>
      } @else {
        <div class="sheet-head">
          <h1>Welcome. Choose a password.</h1>
          <p class="faint">The link works once. Afterwards you sign in with your mail address and this password.</p>
        </div>
        <form class="form" [formGroup]="form" (ngSubmit)="accept()">
          @if (asksWho()) {
            <dp-field label="Your name" [error]="refused('name')">
              <input dpControl formControlName="name" autocomplete="name" />
            </dp-field>
            <dp-field label="Your mail address" [error]="refused('email')">
              <input dpControl type="email" formControlName="email" autocomplete="username" />
            </dp-field>
          }
          <dp-field
            label="Password"
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
      }
    </section>
  `,
})
export class AcceptInvitation {
  private readonly api = inject(PeopleApi);
  private readonly router = inject(Router);
  private readonly line = inject(ErrorLine);

  protected readonly token = takeLinkToken();
  protected readonly form = inject(NonNullableFormBuilder).group({ name: '', email: '', password: '', again: '' });
  private readonly typed = toSignal(this.form.valueChanges, { initialValue: this.form.value });
  private readonly asked = signal(false);
  protected readonly problem = signal<ProblemError | null>(null);
  protected readonly busy = signal(false);
  private readonly wrong = computed(() => passwordProblem(this.typed().password ?? '', this.typed().again ?? ''));
  protected readonly shown = computed(() => (this.asked() ? this.wrong() : { password: '', again: '' }));
  /** The first administrator's link belongs to nobody yet; it also asks for name and address. */
  readonly asksWho = input(false);

  protected refused(field: string): string {
    return this.problem()?.fieldMessage(field) ?? '';
  }

  protected async accept(): Promise<void> {
    this.asked.set(true);
    this.problem.set(null);
    const { password, again, name, email } = this.form.getRawValue();
    if (this.token === null || this.wrong().password !== '' || again !== password) return;
    this.busy.set(true);
    try {
      const who = this.asksWho() ? { name, email: email.trim() } : {};
      await firstValueFrom(this.api.acceptInvitation({ token: this.token, password, ...who }));
      this.line.tell('Your password is set. Sign in with it.');
      await this.router.navigate(['/sign-in']);
    } catch (error) {
      this.problem.set(toProblem(error));
    } finally {
      this.busy.set(false);
    }
  }
}
