import { HttpErrorResponse } from '@angular/common/http';

/** One field that was refused: which, what was typed, and what would be right. */
export interface FieldProblem {
  readonly field: string;
  readonly value?: unknown;
  readonly message: string;
  /** What would be right, where it can be said. */
  readonly expected?: string;
}

interface ProblemDocument {
  readonly code?: unknown;
  readonly title?: unknown;
  readonly detail?: unknown;
  readonly fields?: unknown;
  readonly current?: unknown;
}

/** A refusal or failure of the server (RFC 9457 problem+json), or of the way to it (status 0). */
export class ProblemError extends Error {
  override readonly name = 'ProblemError';

  constructor(
    readonly status: number,
    readonly code: string,
    readonly title: string,
    readonly detail: string,
    readonly fields: readonly FieldProblem[] = [],
    /** The present state of what was edited, when the edit was stale (409). */
    readonly current?: unknown,
  ) {
    super(detail || title);
  }

  /** The sentence for one field, or undefined when it was not refused. `limit.value` also means `commands.0.limit.value`. */
  fieldMessage(field: string): string | undefined {
    const problem = this.fields.find((candidate) => candidate.field === field || candidate.field.endsWith(`.${field}`));
    return problem === undefined ? undefined : fieldSentence(problem);
  }

  /** True when the edit was refused because somebody else changed the same thing first. */
  get isConflict(): boolean {
    return this.status === 409;
  }
}

/** Turns whatever a request failed with into a ProblemError. */
export function toProblem(error: unknown): ProblemError {
  if (error instanceof ProblemError) return error;
  if (!(error instanceof HttpErrorResponse)) {
    return new ProblemError(
      0,
      'unexpected',
      'Something went wrong on this page.',
      error instanceof Error ? error.message : '',
    );
  }
  if (error.status === 0) {
    return new ProblemError(
      0,
      'unreachable',
      'The server cannot be reached.',
      'Nothing you typed is lost. Try again in a moment.',
    );
  }
  const problem: ProblemDocument = isRecord(error.error) ? error.error : {};
  const detail = typeof problem.detail === 'string' ? problem.detail : '';
  return new ProblemError(
    error.status,
    typeof problem.code === 'string' ? problem.code : `http-${error.status}`,
    typeof problem.title === 'string' ? problem.title : `The server answered ${error.status}.`,
    detail,
    Array.isArray(problem.fields) ? problem.fields.filter(isFieldProblem) : [],
    problem.current,
  );
}

/** A refused field in a sentence: what is wrong with it and what would be right. */
export function fieldSentence(problem: FieldProblem): string {
  const fault = problem.message.replace(/\.$/, '');
  const sentence = `${fault.charAt(0).toUpperCase()}${fault.slice(1)}.`;
  const expected = problem.expected?.replace(/\.$/, '') ?? '';
  // Many refusals say already what would be right.
  return expected === '' || fault.includes(expected) ? sentence : `${sentence} Right would be ${expected}.`;
}

function isRecord(value: unknown): value is Record<string, unknown> {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}

function isFieldProblem(value: unknown): value is FieldProblem {
  return isRecord(value) && typeof value['field'] === 'string' && typeof value['message'] === 'string';
}
