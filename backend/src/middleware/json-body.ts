import express, { type Request, type Response } from 'express';
import { ProblemError } from './problems';

const LIMIT = '256kb';
const DEPTH = 32;

const parse = express.json({ limit: LIMIT, strict: true, type: 'application/json' });

/** Reads a JSON body of at most 256 KB, nested at most 32 deep and without a `__proto__` key; throws a problem otherwise. */
export async function readJsonBody(request: Request, response: Response): Promise<unknown> {
  if (!request.is('application/json')) {
    throw new ProblemError(
      415,
      'unsupported-media-type',
      'Unsupported format',
      `The body must be application/json; it came as ${request.get('content-type') ?? 'nothing'}.`,
    );
  }
  await new Promise<void>((resolve, reject) => {
    parse(request, response, (error?: unknown) => (error === undefined ? resolve() : reject(bodyProblem(error))));
  });
  const body: unknown = request.body;
  refuseHostileShape(body);
  return body;
}

function bodyProblem(error: unknown): ProblemError {
  const type = (error as { type?: unknown }).type;
  if (type === 'entity.too.large') {
    return new ProblemError(413, 'too-large', 'Too large', 'The body is larger than 256 KB.');
  }
  if (type === 'encoding.unsupported' || type === 'charset.unsupported') {
    return new ProblemError(415, 'unsupported-media-type', 'Unsupported format', 'The body must be UTF-8 JSON.');
  }
  return new ProblemError(400, 'malformed-body', 'Not JSON', 'The body is not valid JSON.');
}

/** Walks without recursion: depth must not be able to exhaust the stack that checks it. */
function refuseHostileShape(body: unknown): void {
  const open: { value: unknown; depth: number }[] = [{ value: body, depth: 1 }];
  for (let next = open.pop(); next !== undefined; next = open.pop()) {
    const { value, depth } = next;
    if (typeof value !== 'object' || value === null) continue;
    if (depth > DEPTH) {
      throw new ProblemError(
        400,
        'malformed-body',
        'Nested too deep',
        `The body is nested deeper than ${DEPTH} levels.`,
      );
    }
    if (Object.hasOwn(value, '__proto__')) {
      throw new ProblemError(400, 'malformed-body', 'Not accepted', 'The body has a key named __proto__.');
    }
    for (const child of Object.values(value)) open.push({ value: child, depth: depth + 1 });
  }
}
