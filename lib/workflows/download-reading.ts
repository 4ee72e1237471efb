import { z } from 'zod';
import { unsafeListAccepted } from '@/db/queries/assignments';
import { findReading } from '@/db/queries/readings';
import { unsafeFindScoreFile } from '@/db/queries/score-files';
import type { Actor } from '@/lib/auth/actor';
import { type AppError, appError } from '@/lib/errors';
import { annotationsOf } from '@/lib/harmony/annotations';
import type { Reading } from '@/lib/harmony/reading';
import { reportOf } from '@/lib/harmony/report';
import { type Result, err, ok } from '@/lib/result';
import { annotateFile } from '@/lib/score/annotate-file';
import type { Annotation, KeyedNumeral } from '@/lib/score/annotation';
import { readScore } from '@/lib/score/read-score';
import type { Score } from '@/lib/score/score';
import { formatLabelsAsCsv } from '@/lib/score/write-csv';
import { isZip } from '@/lib/score/zip';
import type { Deps } from './deps';
import { MXL_MEDIA_TYPE, MUSICXML_MEDIA_TYPE, type ScoreFile } from './get-score-file';
import { loadReading } from './read-reading';

export const downloadReadingInput = z.object({
  readingId: z.uuid(),
  /** The uploaded file with the labels in it, a table of them, or the report that `npm run analyse` writes. */
  form: z.enum(['musicxml', 'csv', 'json']),
});
export type DownloadReadingInput = z.infer<typeof downloadReadingInput>;

/** A reading to take along, for whoever may see it. */
export async function downloadReading(deps: Deps, actor: Actor, { readingId, form }: DownloadReadingInput): Promise<Result<ScoreFile, AppError>> {
  const head = await findReading(deps.db, actor, readingId, deps.now());
  const file = head && (await unsafeFindScoreFile(deps.db, head.scoreId));
  const bytes = file && (await deps.storage.get(file.sha256));
  if (!head || !bytes) return err(appError('not_found'));
  if (head.state !== 'open') return err(appError('not_ready', 'The proposal is still being worked out. Wait a moment.'));
  const score = readScore(bytes);
  if (!score.ok) return err(appError('bad_input', score.error.message));
  const accepted = head.kind === 'key' ? await unsafeListAccepted(deps.db, readingId) : [];
  const written = WRITERS[form](bytes, score.value, await loadReading(deps, actor, head), accepted);
  return written.ok ? ok({ ...written.value, fileName: `${head.excerptTitle}, ${head.title}.${written.value.ending}` }) : written;
}

interface Written {
  readonly bytes: Uint8Array<ArrayBuffer>;
  readonly ending: string;
  readonly mediaType: string;
}

/** What counts as right beside the label that starts there. */
interface Accepted {
  readonly startTick: number;
  readonly alternatives: readonly KeyedNumeral[];
}

type Writer = (bytes: Uint8Array, score: Score, reading: Reading, accepted: readonly Accepted[]) => Result<Written, AppError>;

const WRITERS: Readonly<Record<DownloadReadingInput['form'], Writer>> = {
  musicxml: (bytes, score, reading, accepted) => {
    const annotated = annotateFile(bytes, withAccepted(untilTheEnd(score, reading), accepted));
    if (!annotated.ok) return err(appError('bad_input', annotated.error.message));
    const [ending, mediaType] = isZip(bytes) ? ['mxl', MXL_MEDIA_TYPE] : ['musicxml', MUSICXML_MEDIA_TYPE];
    return ok({ bytes: new Uint8Array(annotated.value), ending, mediaType });
  },
  csv: (_, score, reading) => ok(textFile(formatLabelsAsCsv(score, annotationsOf(reading), reading.end), 'csv', 'text/csv; charset=utf-8')),
  json: (_, score, reading) => ok(textFile(`${JSON.stringify(reportOf(score, reading), null, 1)}\n`, 'json', 'application/json')),
};

function textFile(text: string, ending: string, mediaType: string): Written {
  return { bytes: new TextEncoder().encode(text), ending, mediaType };
}

/** In the whole score the last label of an excerpt must not go on past it. */
function untilTheEnd(score: Score, reading: Reading): Annotation[] {
  const labels = annotationsOf(reading);
  const lastBar = score.bars.at(-1);
  const last = labels.at(-1);
  if (!last?.numeral || !lastBar || reading.end >= lastBar.start + lastBar.length) return labels;
  return [...labels, { start: reading.end, key: last.key, numeral: null }];
}

function withAccepted(labels: readonly Annotation[], accepted: readonly Accepted[]): Annotation[] {
  return labels.map((label) => {
    const alternatives = accepted.filter(({ startTick }) => startTick === label.start).flatMap((one) => one.alternatives);
    return label.numeral && alternatives.length > 0 ? { ...label, alternatives } : label;
  });
}
