import { z } from 'zod';
import { noteAudit } from '@/db/queries/audit';
import { findExcerpt } from '@/db/queries/excerpts';
import { insertReading, insertReadingContent } from '@/db/queries/reading-rows';
import { unsafeFindScoreFile } from '@/db/queries/score-files';
import type { Actor } from '@/lib/auth/actor';
import { type AppError, appError } from '@/lib/errors';
import { readingFrom } from '@/lib/harmony/annotations';
import type { Reading } from '@/lib/harmony/reading';
import { type Result, err, ok } from '@/lib/result';
import { ANALYSIS_SOURCES, importAnalysis } from '@/lib/score/import-analysis';
import { openScoreFile } from '@/lib/score/open-score-file';
import { ticks } from '@/lib/score/score';
import { type Deps, inTransaction } from './deps';
import type { StartedReading } from './start-reading';

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
  return inTransaction(deps, async (inside) => {
    const readingId = inside.newId();
    await insertReading(inside.db, {
      id: readingId,
      excerptId,
      departmentId: actor.departmentId,
      ownerId: actor.userId,
      kind: 'person',
      title: TITLES[source],
      state: 'open',
      startTick,
      endTick,
      basedOn: null,
    });
    await insertReadingContent(inside.db, readingId, reading);
    await noteAudit(inside, actor, { verb: 'start', subjectKind: 'reading', subjectId: readingId });
    return ok({ readingId, excerptId });
  });
}

function readFile(deps: Deps, bytes: Uint8Array, source: ImportReadingInput['source'], startTick: number, endTick: number): Reading | null {
  const opened = openScoreFile(bytes);
  const imported = opened.ok ? importAnalysis(opened.value.xml, source) : opened;
  return imported.ok ? readingFrom(imported.value.annotations, ticks(startTick), ticks(endTick), () => deps.newId()) : null;
}
