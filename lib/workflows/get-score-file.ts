import { findScore } from '@/db/queries/scores';
import type { Actor } from '@/lib/auth/actor';
import { type AppError, appError } from '@/lib/errors';
import { type Result, err, ok } from '@/lib/result';
import type { Deps } from './deps';
import type { ScoreInput } from './library-input';

/** A file of a score, or made of one, under the name it is to be saved under. */
export interface ScoreFile {
  readonly bytes: Uint8Array<ArrayBuffer>;
  readonly fileName: string;
  readonly mediaType: string;
}

/** Source: W3C MusicXML 4.0, media types of compressed and of plain files. */
export const MXL_MEDIA_TYPE = 'application/vnd.recordare.musicxml';
export const MUSICXML_MEDIA_TYPE = 'application/vnd.recordare.musicxml+xml';

/** The uploaded file of a score, byte for byte. */
export async function getScoreFile(deps: Deps, actor: Actor, { scoreId }: ScoreInput): Promise<Result<ScoreFile, AppError>> {
  const score = await findScore(deps.db, actor, scoreId);
  const bytes = score ? await deps.storage.get(score.sha256) : null;
  if (!score || !bytes) return err(appError('not_found'));
  return ok({ bytes, fileName: score.fileName, mediaType: /\.mxl$/i.test(score.fileName) ? MXL_MEDIA_TYPE : MUSICXML_MEDIA_TYPE });
}
