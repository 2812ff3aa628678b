import type { ProblemField } from '@shared/contract';
import type * as z from 'zod';
import { Invalid } from './problems';

const LONGEST_ECHO = 200;

/** Parses one part of a request by its schema; throws Invalid with every refused field. `place` prefixes the field names. */
export function parseBy<S extends z.ZodType>(schema: S, input: unknown, place: '' | 'query' | 'path'): z.output<S> {
  const parsed = schema.safeParse(input, { reportInput: false });
  if (parsed.success) return parsed.data;
  throw new Invalid(fieldsOf(parsed.error, input, place));
}

/** The refused fields of a failed parse: path, value as sent (secrets left out), message, what would be right. */
export function fieldsOf(error: z.ZodError, input: unknown, place: '' | 'query' | 'path' = ''): ProblemField[] {
  const prefix = place === '' ? [] : [place];
  return error.issues.flatMap(closestAlternative).flatMap((issue): ProblemField[] => {
    const path = issue.path.map(String);
    if (issue.code === 'unrecognized_keys') {
      return issue.keys.map((key) => ({
        field: [...prefix, ...path, key].join('.'),
        message: 'is not a field of this request',
        expected: 'leave it out',
      }));
    }
    const value = valueAt(input, path);
    return [
      {
        field: [...prefix, ...path].join('.'),
        ...(isSecret(path) || value === undefined ? {} : { value: shortened(value) }),
        message: value === undefined && issue.code === 'invalid_type' ? 'is missing' : plain(issue.message),
        ...expectation(issue),
      },
    ];
  });
}

/** Of a failed union the faults of the alternative that came closest, so that the field at fault is named. */
function closestAlternative(issue: z.core.$ZodIssue): z.core.$ZodIssue[] {
  if (issue.code !== 'invalid_union') return [issue];
  const [closest] = [...issue.errors].sort((a, b) => a.length - b.length || deepest(b) - deepest(a));
  if (closest === undefined || closest.length === 0) return [issue];
  return closest.map((inner) => ({ ...inner, path: [...issue.path, ...inner.path] })).flatMap(closestAlternative);
}

function deepest(issues: readonly z.core.$ZodIssue[]): number {
  return Math.max(0, ...issues.map((issue) => issue.path.length));
}

function plain(message: string): string {
  return message.replace(/^Invalid input: /, '');
}

function expectation(issue: z.core.$ZodIssue): { expected?: string } {
  switch (issue.code) {
    case 'invalid_value':
      return { expected: `one of ${issue.values.map(String).join(', ')}` };
    case 'invalid_type':
      return { expected: `a value of type ${issue.expected}` };
    case 'too_small':
      return { expected: `at least ${String(issue.minimum)}` };
    case 'too_big':
      return { expected: `at most ${String(issue.maximum)}` };
    default:
      return {};
  }
}

function valueAt(input: unknown, path: readonly string[]): unknown {
  let value = input;
  for (const step of path) {
    if (typeof value !== 'object' || value === null || !Object.hasOwn(value, step)) return undefined;
    value = (value as Record<string, unknown>)[step];
  }
  return value;
}

function isSecret(path: readonly string[]): boolean {
  return path.some((step) => /password|token/i.test(step));
}

/** Only scalars are echoed: an object could carry a secret further down. */
function shortened(value: unknown): unknown {
  if (typeof value === 'string') return value.length > LONGEST_ECHO ? `${value.slice(0, LONGEST_ECHO)}…` : value;
  if (typeof value === 'object' && value !== null) return Array.isArray(value) ? '[list]' : '[object]';
  return value;
}
