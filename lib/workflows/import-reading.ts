import { z } from 'zod';
import { findExcerpt } from '@/db/queries/excerpts';
import { unsafeFindScoreFile } from '@/db/queries/score-files';
import type { Actor } from '@/lib/auth/actor';
import { type AppError, appError } from '@/lib/errors';
import { readingFrom } from '@/lib/harmony/annotations';
import type { Reading } from '@/lib/harmony/reading';
import { type Result, err } from '@/lib/result';
import { ANALYSIS_SOURCES, importAnalysis } from '@/lib/score/import-analysis';
import { openScoreFile } from '@/lib/score/open-score-file';
import { ticks } from '@/lib/score/score';
import { type Deps, inTransaction } from './deps';
import { type StartedReading, keepNewReading } from './start-reading';

export const importReadingInput = z.object({
  excerptId: z.uuid(),
  source: z.enum(ANALYSIS_SOURCES),
});
export type ImportReadingInput = z.infer<typeof importReadingInput>;

const TITLES: Readonly<Record<ImportReadingInput['source'], string>> = {
  harmony: 'From the file: harmony',
  'figured-bass': 'From the file: figured bass',
  lyrics: 'From the file: numerals in the lyrics',
};

/**
 * A reading of one's own with the labels that stand in the uploaded file, as far as they lie in the excerpt. A file gets here
 * only after its job has read it in a thread with bounds, so that reading it again is quick and safe.
 */
export async function importReading(deps: Deps, actor: Actor, { excerptId, source }: ImportReadingInput): Promise<Result<StartedReading, AppError>> {
  const excerpt = await findExcerpt(deps.db, actor, excerptId);
  const file = excerpt && (await unsafeFindScoreFile(deps.db, excerpt.scoreId));
  const bytes = file && (await deps.storage.get(file.sha256));
  if (!excerpt || !bytes) return err(appError('not_found'));
  const { startTick, endTick } = excerpt;
  const reading = readFile(deps, bytes, source, startTick, endTick);
  if (!reading) return err(appError('bad_input', 'These bars hold no labels of that kind.'));
  return inTransaction(deps, (inside) => keepNewReading(inside, actor, { excerpt, kind: 'person', title: TITLES[source], basedOn: null, content: reading }));
}

function readFile(deps: Deps, bytes: Uint8Array, source: ImportReadingInput['source'], startTick: number, endTick: number): Reading | null {
  const opened = openScoreFile(bytes);
  const imported = opened.ok ? importAnalysis(opened.value.xml, source) : opened;
  return imported.ok ? readingFrom(imported.value.annotations, ticks(startTick), ticks(endTick), () => deps.newId()) : null;
}
