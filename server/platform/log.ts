import { type DestinationStream, type Logger, pino } from 'pino';
import type { LogLevel } from './configuration';

export type Log = Logger;

/** Fields that must never be written down, wherever in a logged object they stand. */
const SECRETS = ['password', 'passwordHash', 'newPassword', 'token', 'tokenHash', 'cookie', 'authorization'];

const redacted = SECRETS.flatMap((name) => [name, `*.${name}`, `*.*.${name}`]);

/** Where logs of commands go, whose standard output is for people or for results. */
export const standardError: DestinationStream = pino.destination({ fd: 2, sync: true });

/**
 * Structured log, one JSON object a line. Errors of the database carry the values that were sent with a
 * statement; those are left out, message and code stay.
 *
 */
export function createLog(level: LogLevel, destination: DestinationStream): Log {
  return pino(
    {
      level,
      base: null,
      timestamp: pino.stdTimeFunctions.isoTime,
      formatters: { level: (label) => ({ level: label }) },
      redact: {
        paths: [...redacted, 'headers["set-cookie"]', '*.headers["set-cookie"]'],
        censor: '[secret]',
      },
      serializers: { error: describeError, err: describeError },
    },
    destination,
  );
}

interface ErrorDescription {
  readonly name: string;
  readonly message: string;
  readonly code?: string;
  readonly stack?: string;
  readonly cause?: ErrorDescription;
}

function describeError(error: unknown): ErrorDescription {
  if (!(error instanceof Error)) return { name: 'thrown', message: String(error) };
  const code = 'code' in error && typeof error.code === 'string' ? { code: error.code } : {};
  const cause = error.cause === undefined ? {} : { cause: describeError(error.cause) };
  // A failed query's message lists its parameters after the statement, and its stack begins with the message.
  const isQuery = 'query' in error && 'params' in error;
  const message = isQuery ? 'a statement to the database failed' : error.message;
  const stack = error.stack === undefined ? {} : { stack: isQuery ? frames(error.stack) : error.stack };
  return { name: error.name, message, ...code, ...stack, ...cause };
}

function frames(stack: string): string {
  return stack
    .split('\n')
    .filter((line) => /^\s+at /.test(line))
    .join('\n');
}
