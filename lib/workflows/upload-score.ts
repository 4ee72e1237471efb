import { z } from 'zod';
import { noteAudit } from '@/db/queries/audit';
import { findScoreOfFile, insertScore } from '@/db/queries/scores';
import type { Actor } from '@/lib/auth/actor';
import { type AppError, appError } from '@/lib/errors';
import { enqueue } from '@/lib/jobs/queue';
import { type Result, err, ok } from '@/lib/result';
import { DEFAULT_LIMITS } from '@/lib/score/limits';
import { sha256Of } from '@/lib/storage/object-store';
import { type Deps, inTransaction } from './deps';
import { scoreWords } from './library-input';

const ENDINGS = /\.(musicxml|xml|mxl)$/i;
const MXL = 'application/vnd.recordare.musicxml';

/** A form with one file. The file's own title and composer fill what is left empty, once it has been read. */
export const uploadScoreInput = scoreWords.extend({
  file: z.instanceof(File, { message: 'Choose a file.' }),
});
export type UploadScoreInput = z.infer<typeof uploadScoreInput>;

export interface UploadedScore {
  readonly scoreId: string;
  readonly title: string;
  /** The department holds the same file already; nothing was added. */
  readonly existing: boolean;
}

/** Title until the file has told its own: the file's name without its ending. */
export function titleOfFile(fileName: string): string {
  return fileName.replace(ENDINGS, '').slice(0, 300) || fileName.slice(0, 300);
}

function checkFile(file: File): AppError | null {
  if (!ENDINGS.test(file.name)) {
    return appError('bad_input', `“${file.name}” is not a MusicXML file: its name must end in .musicxml, .xml or .mxl.`);
  }
  if (file.size === 0) return appError('bad_input', `“${file.name}” is empty. Export it again and drop it here once more.`);
  if (file.size > DEFAULT_LIMITS.fileBytes) {
    return appError('too_large', `“${file.name}” is larger than 10 MB. Save it compressed (.mxl), or split the score.`);
  }
  return null;
}

/** Stores the file under its SHA-256, adds the score and queues its reading. The same file is not added twice. */
export async function uploadScore(deps: Deps, actor: Actor, input: UploadScoreInput): Promise<Result<UploadedScore, AppError>> {
  const { file, ...words } = input;
  const wrong = checkFile(file);
  if (wrong) return err(wrong);
  const bytes = new Uint8Array(await file.arrayBuffer());
  const sha256 = sha256Of(bytes);
  const same = await findScoreOfFile(deps.db, actor, sha256);
  if (same) return ok({ scoreId: same.id, title: same.title, existing: true });
  await deps.storage.put(sha256, bytes, MXL);
  const title = words.title || titleOfFile(file.name);
  const scoreId = await addScore(deps, actor, { ...words, title, fileName: file.name.slice(-255), sha256, byteSize: bytes.byteLength });
  return ok({ scoreId, title, existing: false });
}

type ScoreToAdd = Omit<Parameters<typeof insertScore>[2], 'id'>;

function addScore(deps: Deps, actor: Actor, score: ScoreToAdd): Promise<string> {
  return inTransaction(deps, async (inside) => {
    const scoreId = inside.newId();
    await insertScore(inside.db, actor, { id: scoreId, ...score });
    await enqueue(inside.db, 'read_score', { scoreId }, { id: inside.newId(), now: inside.now() });
    await noteAudit(inside, actor, { verb: 'upload', subjectKind: 'score', subjectId: scoreId });
    return scoreId;
  });
}
