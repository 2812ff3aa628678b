import type { ProblemCode, ProblemField } from '@shared/contract';

interface ProblemOptions {
  readonly fields?: readonly ProblemField[];
  readonly current?: unknown;
  readonly retryAfterSeconds?: number;
}

/** A refusal that a handler or service throws; the last middleware turns it into problem+json. */
export class ProblemError extends Error {
  readonly fields: readonly ProblemField[] | undefined;
  readonly current: unknown;
  readonly retryAfterSeconds: number | undefined;

  constructor(
    readonly status: number,
    readonly code: ProblemCode,
    readonly title: string,
    detail: string,
    options: ProblemOptions = {},
  ) {
    super(detail);
    this.name = 'ProblemError';
    this.fields = options.fields;
    this.current = options.current;
    this.retryAfterSeconds = options.retryAfterSeconds;
  }
}

/** 404. Says the same for what does not exist and for what is none of the person's business. */
export class NotFound extends ProblemError {
  constructor(detail = 'There is nothing here, or nothing that you may see.') {
    super(404, 'not-found', 'Not found', detail);
  }
}

/** 401: nobody is signed in, or the session has ended. */
export class NotSignedIn extends ProblemError {
  constructor() {
    super(401, 'not-signed-in', 'Not signed in', 'Sign in first; the session may have ended.');
  }
}

/** 403: the person is known and lacks the right; the detail says which role would have it. */
export class Forbidden extends ProblemError {
  constructor(detail: string, options: ProblemOptions = {}) {
    super(403, 'forbidden', 'Not allowed', detail, options);
  }
}

/** 409: the edit was made on a state that has moved since; carries the current state, and nothing was applied. */
export class Stale extends ProblemError {
  constructor(current: unknown, detail = 'This has changed since it was read. Nothing was applied.') {
    super(409, 'stale', 'Changed meanwhile', detail, { current });
  }
}

/** 409: the request contradicts the state of things in a way that its sender can resolve. */
export class Conflict extends ProblemError {
  constructor(detail: string, fields?: readonly ProblemField[]) {
    super(409, 'conflict', 'In conflict', detail, { fields });
  }
}

/** 400: one or more fields are refused; each says what came and what would be right. */
export class Invalid extends ProblemError {
  constructor(fields: readonly ProblemField[], detail?: string) {
    super(400, 'bad-input', 'Not accepted', detail ?? sentence(fields), { fields });
  }
}

/** 429 with the time after which another attempt is possible. */
export class TooMany extends ProblemError {
  constructor(retryAfterSeconds: number, detail: string) {
    super(429, 'too-many', 'Too many attempts', detail, { retryAfterSeconds });
  }
}

function sentence(fields: readonly ProblemField[]): string {
  return fields.map((field) => (field.field === '' ? field.message : `${field.field}: ${field.message}`)).join('; ');
}
