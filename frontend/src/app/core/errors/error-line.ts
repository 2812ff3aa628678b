import { ErrorHandler, Injectable, inject, signal } from '@angular/core';
import { type ProblemError, fieldSentence, toProblem } from '../http/problem-error';

/** One sentence for the quiet line above the title block. */
export interface Announcement {
  readonly tone: 'error' | 'news';
  readonly text: string;
  readonly action?: { readonly label: string; readonly run: () => void };
}

const NEWS_STAYS = 9000;

/** The quiet line above the title block: failures that belong to no field, and short news. */
@Injectable({ providedIn: 'root' })
export class ErrorLine {
  private timer: ReturnType<typeof setTimeout> | undefined;
  private readonly current = signal<Announcement | null>(null);
  readonly announcement = this.current.asReadonly();

  /** Says what failed; stays until dismissed or replaced. */
  report(error: unknown, action?: Announcement['action']): void {
    const problem = toProblem(error);
    // The sign-in page says this already.
    if (problem.status === 401) return;
    this.dismiss();
    this.current.set({ tone: 'error', text: sentence(problem), ...(action ? { action } : {}) });
  }

  /** Says what happened, such as "Saved as r419"; goes by itself unless it offers something to do. */
  tell(text: string, action?: Announcement['action']): void {
    this.dismiss();
    this.current.set({ tone: 'news', text, ...(action ? { action } : {}) });
    if (action === undefined) this.timer = setTimeout(() => this.dismiss(), NEWS_STAYS);
  }

  dismiss(): void {
    clearTimeout(this.timer);
    this.current.set(null);
  }
}

/** Shows errors that nothing else caught instead of leaving them to the console alone. */
@Injectable()
export class ErrorLineHandler extends ErrorHandler {
  private readonly line = inject(ErrorLine);

  override handleError(error: unknown): void {
    super.handleError(error);
    const cause: unknown =
      typeof error === 'object' && error !== null && 'rejection' in error ? error.rejection : error;
    this.line.report(cause);
  }
}

function sentence(problem: ProblemError): string {
  const fields = problem.fields
    .map((field) => `${field.field ? `${field.field}: ` : ''}${fieldSentence(field)}`)
    .join(' ');
  return [problem.title, problem.detail === problem.title ? '' : problem.detail, fields]
    .filter((part) => part !== '')
    .join(' ');
}
