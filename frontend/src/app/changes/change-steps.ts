import { Injectable, inject, signal } from '@angular/core';
import type { ChangeSheet, Command } from '@shared/contract';
import { firstValueFrom } from 'rxjs';
import { type ProblemError, toProblem } from '../core/http/problem-error';
import { ChangesApi } from './changes-api';

/** Gives steps of procedure for one sheet and keeps what was refused, for the page to show. */
@Injectable()
export class ChangeSteps {
  private readonly api = inject(ChangesApi);
  readonly problem = signal<ProblemError | null>(null);
  readonly busy = signal(false);

  /**
   * Gives a step on the version that the person looked at; true when it was taken. Where only votes came in between, so
   * that what the person judged still stands word for word, it is given once more on the newer version.
   */
  async give(seen: ChangeSheet, step: (version: number) => Command): Promise<boolean> {
    if (this.busy()) return false;
    this.busy.set(true);
    this.problem.set(null);
    try {
      await this.giveOnCurrent(seen, step);
      return true;
    } catch (error) {
      this.problem.set(toProblem(error));
      return false;
    } finally {
      this.busy.set(false);
    }
  }

  private async giveOnCurrent(seen: ChangeSheet, step: (version: number) => Command): Promise<void> {
    try {
      await firstValueFrom(this.api.step(step(seen.version)));
    } catch (error) {
      if (toProblem(error).code !== 'stale') throw error;
      const current = await firstValueFrom(this.api.sheet(seen.key));
      if (content(current) !== content(seen)) throw error;
      await firstValueFrom(this.api.step(step(current.version)));
    }
  }
}

/** What a person judges: the words and the proposed edits, without versions and votes. */
function content({ title, reason, state, summaries }: ChangeSheet): string {
  return JSON.stringify([title, reason, state, summaries.map(({ command }) => command)]);
}
