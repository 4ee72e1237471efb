import { setTimeout as sleep } from 'node:timers/promises';

/** Waits; returns at once when the signal says stop. */
export async function pause(milliseconds: number, signal: AbortSignal): Promise<void> {
  try {
    await sleep(milliseconds, undefined, { signal });
  } catch (error) {
    if (!signal.aborted) throw error;
  }
}

export interface RepeatOptions {
  readonly every: number;
  readonly signal: AbortSignal;
  readonly onError: (error: unknown) => void;
}

const LONGEST_PAUSE_MS = 30_000;

/**
 * Repeats `work` until the signal says stop: at once while it returns true (there may be more), else after `every`
 * milliseconds. While it throws (the database is away) it is tried ever less often, twice a minute at the least.
 */
export async function repeat(work: () => Promise<boolean>, { every, signal, onError }: RepeatOptions): Promise<void> {
  let failures = 0;
  while (!signal.aborted) {
    try {
      const isMore = await work();
      failures = 0;
      if (isMore) continue;
    } catch (error) {
      failures += 1;
      onError(error);
    }
    await pause(Math.min(every * 2 ** failures, LONGEST_PAUSE_MS), signal);
  }
}
