import { z } from 'zod';

/** Every kind of work that is done off the request, with what a job of it must say. */
export const JOB_PAYLOADS = {
  /** Read an uploaded file: fills the score's row or says why it was refused. */
  read_score: z.object({ scoreId: z.uuid() }),
  /** Fill a reading that is `proposing` with the engine's labels. */
  propose_reading: z.object({ readingId: z.uuid() }),
  /** Engrave a handout: pages and PDF into the store. */
  print_handout: z.object({ printId: z.uuid() }),
} as const;

export type JobKind = keyof typeof JOB_PAYLOADS;
export type JobPayload<K extends JobKind> = z.output<(typeof JOB_PAYLOADS)[K]>;

export function isJobKind(kind: string): kind is JobKind {
  return Object.hasOwn(JOB_PAYLOADS, kind);
}
