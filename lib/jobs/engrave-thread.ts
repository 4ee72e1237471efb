/**
 * The engraving thread's side of engrave.ts. It lives on between handouts, as the engraver takes a second to start, and
 * may be killed at any moment.
 */
import { type HandoutDocument, composeHandout } from '@/lib/handout/compose';
import type { HandoutOrder } from '@/lib/handout/order';
import { writePdf } from '@/lib/handout/pdf';
import { type Result, ok } from '@/lib/result';
import { openScoreFile } from '@/lib/score/open-score-file';
import { readScore } from '@/lib/score/read-score';
import type { ScoreError } from '@/lib/score/score';

/** A handout order whose score is still the uploaded file. */
export interface EngravingTask {
  readonly bytes: Uint8Array;
  readonly order: Omit<HandoutOrder, 'xml' | 'score'>;
  readonly createdAt: Date;
  readonly author: string;
}

export interface EngravedHandout {
  readonly document: HandoutDocument;
  readonly pdf: Uint8Array;
}

export default async function engraveHandout(task: EngravingTask): Promise<Result<EngravedHandout, ScoreError>> {
  const file = openScoreFile(task.bytes);
  if (!file.ok) return file;
  const score = readScore(task.bytes);
  if (!score.ok) return score;
  const document = await composeHandout({ ...task.order, xml: file.value.xml, score: score.value });
  const pdf = await writePdf(document, { createdAt: task.createdAt, author: task.author });
  return ok({ document, pdf });
}
