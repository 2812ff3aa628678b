import { HttpClient } from '@angular/common/http';
import { Injectable, computed, inject, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { Router } from '@angular/router';
import type { SessionAnswer, SessionPerson } from '@shared/contract';
import { firstValueFrom } from 'rxjs';
import { toProblem } from '../http/problem-error';
import { SignedOut } from './signed-out';

/** Who is signed in here. `undefined` until asked, `null` when nobody is. */
@Injectable({ providedIn: 'root' })
export class SessionStore {
  private readonly http = inject(HttpClient);
  private readonly router = inject(Router);
  private readonly session = signal<SessionAnswer | null | undefined>(undefined);
  private asking: Promise<SessionPerson | null> | undefined;

  readonly person = computed(() => this.session()?.person ?? null);
  readonly isAdministrator = computed(() => this.person()?.administrator ?? false);
  /** True when the server runs with demonstration data, whose mail can be read in the browser. */
  readonly isDemonstration = computed(() => this.session()?.demonstration ?? false);

  constructor() {
    inject(SignedOut)
      .announcements.pipe(takeUntilDestroyed())
      .subscribe(() => this.expired());
  }

  /** The person signed in, asking the server the first time; null when nobody is. */
  async whoAmI(): Promise<SessionPerson | null> {
    if (this.session() !== undefined) return this.person();
    this.asking ??= this.ask().finally(() => (this.asking = undefined));
    return this.asking;
  }

  /** Signs in; throws ProblemError when name or password are refused or tried too often. */
  async signIn(email: string, password: string): Promise<SessionPerson> {
    const session = await firstValueFrom(this.http.post<SessionAnswer>('/api/session', { email, password }));
    this.session.set(session);
    return session.person;
  }

  /** Signs out here and goes to the sign-in page. */
  async signOut(): Promise<void> {
    await firstValueFrom(this.http.delete('/api/session'));
    this.session.set(null);
    await this.router.navigate(['/sign-in']);
  }

  /** Asks the server again, after roles or names may have changed. */
  async refresh(): Promise<void> {
    await this.ask();
  }

  private async ask(): Promise<SessionPerson | null> {
    try {
      this.session.set(await firstValueFrom(this.http.get<SessionAnswer>('/api/session')));
    } catch (error) {
      if (toProblem(error).status !== 401) throw error;
      this.session.set(null);
    }
    return this.person();
  }

  private expired(): void {
    if (this.session() === null) return;
    this.session.set(null);
    void this.router.navigate(['/sign-in'], { queryParams: { from: this.router.url } });
  }
}
