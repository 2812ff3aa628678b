import * as z from 'zod';

/** Stable codes of refusals; a client decides by these, never by the sentence. */
export const PROBLEM_CODES = [
  'bad-input',
  'malformed-body',
  'unsupported-media-type',
  'too-large',
  'not-signed-in',
  'sign-in-refused',
  'forbidden',
  'cross-site',
  'not-found',
  'method-not-allowed',
  'stale',
  'conflict',
  'refused',
  'controlled',
  'in-use',
  'cycle',
  'state',
  'link-not-valid',
  'idempotency-key-missing',
  'idempotency-key-reused',
  'too-many',
  'busy',
  'internal',
] as const;
export const ProblemCode = z.enum(PROBLEM_CODES);
export type ProblemCode = z.infer<typeof ProblemCode>;

/** One refused field: where it is, what came, and what would be right. */
export const ProblemField = z.strictObject({
  /** Path in the request, e.g. `commands.0.limit.unit`; empty for the request as a whole. */
  field: z.string(),
  /** What was sent, shortened; absent for secrets. */
  value: z.unknown().optional(),
  /** The sentence that names the fault. */
  message: z.string(),
  /** What would be right, where it can be said. */
  expected: z.string().optional(),
  /** Character range inside a formula that is refused. */
  range: z.strictObject({ from: z.int(), to: z.int() }).optional(),
});
export type ProblemField = z.infer<typeof ProblemField>;

/** The body of every refusal: RFC 9457 with our members `code`, `requestId`, `fields` and, for a stale edit, `current`. */
export const Problem = z.object({
  type: z.string(),
  title: z.string(),
  status: z.int(),
  detail: z.string(),
  code: ProblemCode,
  requestId: z.string(),
  fields: z.array(ProblemField).optional(),
  /** The current state of what was edited, when the edit was stale. */
  current: z.unknown().optional(),
});
export type Problem = z.infer<typeof Problem>;
