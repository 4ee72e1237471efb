const FIRST_WAIT_MS = 5_000;
const LONGEST_WAIT_MS = 15 * 60_000;

/** When to try again after the `attempt`th try (counted from 1) failed at `now`: 5 s, 10 s, 20 s … at most 15 min. */
export function retryAfter(attempt: number, now: Date): Date {
  const wait = Math.min(FIRST_WAIT_MS * 2 ** Math.max(attempt - 1, 0), LONGEST_WAIT_MS);
  return new Date(now.getTime() + wait);
}

const MESSAGE_LENGTH = 500;

/** What a row keeps of a failure: class and first line. The lines after it may hold a query's parameters. */
export function formatFailure(error: unknown): string {
  if (!(error instanceof Error)) return 'unknown';
  const [firstLine = ''] = error.message.split('\n');
  const cause = error.cause instanceof Error ? ` (${error.cause.name}: ${error.cause.message.split('\n')[0]})` : '';
  return `${error.name}: ${firstLine}${cause}`.slice(0, MESSAGE_LENGTH);
}
