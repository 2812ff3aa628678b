import { Injectable, inject } from '@angular/core';
import type { Command, EditAnswer } from '@shared/contract';
import { firstValueFrom } from 'rxjs';
import { ErrorLine } from '../errors/error-line';
import { toProblem } from '../http/problem-error';
import { type EditOptions, Edits } from '../study/edits';
import { StudyContext } from '../study/study-context';

/** Gives edits from buttons: says what came of it in the quiet line, also when it was refused. */
@Injectable({ providedIn: 'root' })
export class Acts {
  private readonly edits = inject(Edits);
  private readonly line = inject(ErrorLine);
  private readonly context = inject(StudyContext);

  /** The answer, or undefined when it was refused; `done` is said with what turned. */
  async give(commands: readonly Command[], done: string, options: EditOptions = {}): Promise<EditAnswer | undefined> {
    try {
      const answer = await firstValueFrom(this.edits.give(commands, options));
      this.tell(answer, done);
      return answer;
    } catch (error) {
      this.line.report(error);
      // What stands is newer than what was on screen: read it, so that the next try starts from there.
      if (toProblem(error).code === 'stale') this.context.head.reload();
      return undefined;
    }
  }

  /** Says that an edit was accepted, where it went, and what it turned. */
  tell(answer: EditAnswer, done: string): void {
    const standpoint = this.context.standpoint();
    const where = standpoint.kind === 'draft' ? `in ${standpoint.key}` : `r${answer.revision}`;
    const turned = answer.turned
      .filter((turn) => turn.from !== null && turn.to !== null)
      .map((turn) => `${turn.key} ${turn.from} → ${turn.to}`);
    const news =
      turned.length === 0 ? '' : ` Turned: ${turned.slice(0, 4).join(', ')}${turned.length > 4 ? ' …' : ''}.`;
    const warnings = answer.warnings.length === 0 ? '' : ` ${answer.warnings.join(' ')}`;
    this.line.tell(`${done}, ${where}.${news}${warnings}`);
  }
}
