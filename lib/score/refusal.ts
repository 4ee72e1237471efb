import type { ScoreError, ScoreErrorCode } from './score';

/**
 * Carries a refusal out of the depths of the reader to `readScore`, which turns it into a Result. It never leaves
 * lib/score: what is thrown past it is a bug.
 */
export class Refusal extends Error {
  constructor(readonly refusal: ScoreError) {
    super(refusal.message);
  }
}

/** Stops reading. `message` is a sentence for people: what is wrong where, and what to do. */
export function refuse(code: ScoreErrorCode, message: string, place: { line?: number; element?: string } = {}): never {
  throw new Refusal({ code, message, ...place });
}
