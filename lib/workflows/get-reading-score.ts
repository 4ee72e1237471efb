import type { z } from 'zod';
import { findReading } from '@/db/queries/readings';
import { unsafeFindScoreFile } from '@/db/queries/score-files';
import type { Actor } from '@/lib/auth/actor';
import { type AppError, appError } from '@/lib/errors';
import { type Result, err, ok } from '@/lib/result';
import type { Deps } from './deps';
import type { readingInput } from './read-reading';

/** The file of the score under a reading, for whoever may see the reading: students reach no score otherwise. */
export async function getReadingScore(deps: Deps, actor: Actor, { readingId }: z.infer<typeof readingInput>): Promise<Result<Uint8Array<ArrayBuffer>, AppError>> {
  const reading = await findReading(deps.db, actor, readingId, deps.now());
  const file = reading && (await unsafeFindScoreFile(deps.db, reading.scoreId));
  const bytes = file && (await deps.storage.get(file.sha256));
  return bytes ? ok(bytes) : err(appError('not_found'));
}
