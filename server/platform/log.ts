import { pino, stdSerializers, stdTimeFunctions, type Logger, type LoggerOptions } from 'pino';

export type Log = Logger;

/**
 * Errors without the values of the query that failed: those are names, signatures, hashes of passwords and PINs. Drizzle
 * writes them into the message, the stack and a property, PostgreSQL into the detail.
 */
export function plainError(error: unknown): unknown {
  if (!(error instanceof Error)) return error;
  const { type, message, stack, code, constraint, table, column } = stdSerializers.err(error) as Record<string, unknown>;
  const plain = (text: unknown) => (typeof text === 'string' ? text.replace(/\nparams: [\s\S]*?(?=\n {4}at |\ncaused by: |$)/g, '\nparams: left out').replace(/(invalid input syntax for type [\w ]+|value|Key \([^)]*\)=)[: ]*(?:"[^"]*"|\([^)]*\))/g, '$1 …') : text);
  const cause = error.cause === undefined ? {} : { cause: plainError(error.cause) };
  return { type, message: plain(message), stack: plain(stack), code, constraint, table, column, ...cause };
}

export const logOptions: LoggerOptions = { base: null, timestamp: stdTimeFunctions.isoTime, serializers: { err: plainError } };
/** JSON lines on standard output; secrets never reach it: no headers, no bodies, no values of queries. */
export const createLog = (level: string): Log => pino({ ...logOptions, level });
