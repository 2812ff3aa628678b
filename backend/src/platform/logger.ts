import pino from 'pino';

export type Logger = pino.Logger;

/**
 * The product's log: one JSON line per event on stdout. Nothing that a person typed, no cookie and no token is ever
 * passed to it; redaction is the second wall should a whole object slip in.
 */
export function createLogger(level: string): Logger {
  return pino({
    level,
    base: undefined,
    timestamp: pino.stdTimeFunctions.isoTime,
    redact: {
      paths: ['*.password', '*.passwordHash', '*.token', '*.cookie', '*.authorization', '*.body', 'req', 'res'],
      remove: true,
    },
    serializers: { err: describeError },
  });
}

/** Message, kind and stack; leaves out what a database error carries of the statement and its values. */
function describeError(error: Error): Record<string, unknown> {
  const code = (error as { code?: unknown }).code;
  return { kind: error.name, message: error.message, stack: error.stack, ...(code === undefined ? {} : { code }) };
}
