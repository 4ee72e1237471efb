/**
 * Structured logs: one JSON object per line, ids and counts only. Student data is personal, so the names of the fields
 * are a closed list: there is none for a text that a person wrote, for an address, or for an error's message (drizzle's
 * carry the query's parameters).
 */
import { type DestinationStream, pino, stdTimeFunctions } from 'pino';

export const LOG_FIELDS = [
  'endpoint',
  'path',
  'method',
  'status',
  'code',
  'userId',
  'departmentId',
  'courseId',
  'scoreId',
  'excerptId',
  'readingId',
  'assignmentId',
  'submissionId',
  'jobId',
  'jobKind',
  'mailId',
  'workerId',
  'part',
  'attempt',
  'count',
  'bytes',
  'milliseconds',
  'signal',
  'error',
  'databaseError',
  'stack',
] as const;

export type LogFields = Readonly<Partial<Record<(typeof LOG_FIELDS)[number], string | number | boolean | null>>>;

/** `message` is a fixed sentence of ours: nothing is put into it. */
type Write = (fields: LogFields, message: string) => void;

export interface Log {
  readonly debug: Write;
  readonly info: Write;
  readonly warn: Write;
  readonly error: Write;
}

/** What may be logged of a thrown error: its class, the driver's code, where it came from; never its message. */
export function describeError(error: unknown): LogFields {
  if (!(error instanceof Error)) return { error: typeof error };
  const frames = (error.stack ?? '').split('\n').filter((line) => /^\s+at /.test(line));
  const code = codeOf(error);
  const names = [error.name];
  for (let cause = error.cause; cause instanceof Error; cause = cause.cause) names.push(cause.name);
  return { error: names.join(' < '), ...(code ? { code } : {}), stack: frames.slice(0, 8).map((line) => line.trim()).join(' < ') };
}

function codeOf(error: unknown): string | undefined {
  for (let current = error; current instanceof Error; current = current.cause) {
    if ('code' in current && typeof current.code === 'string') return current.code;
  }
  return undefined;
}

export function createLog(level: string, destination?: DestinationStream): Log {
  const options = { level, base: null, timestamp: stdTimeFunctions.isoTime, formatters: { level: (label: string) => ({ level: label }) } };
  const logger = destination ? pino(options, destination) : pino(options);
  return {
    debug: (fields, message) => logger.debug(fields, message),
    info: (fields, message) => logger.info(fields, message),
    warn: (fields, message) => logger.warn(fields, message),
    error: (fields, message) => logger.error(fields, message),
  };
}
