import { readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { annotationsOf } from '../harmony/annotations';
import { proposeReading } from '../harmony/propose';
import { reportOf } from '../harmony/report';
import type { Reading } from '../harmony/reading';
import { unwrap } from '../result';
import { annotateFile } from '../score/annotate-file';
import { readScore } from '../score/read-score';
import { type Score, type ScoreError } from '../score/score';
import { formatLabelsAsCsv } from '../score/write-csv';
import { isZip } from '../score/zip';

export interface AnalyseJob {
  readonly file: string;
  /** Base name of the report. */
  readonly name: string;
  readonly out: string;
  readonly musicxml: boolean;
  readonly csv: boolean;
}

/** `refused` says why a score has no reading, null when it has one. */
export interface AnalyseOutcome {
  readonly name: string;
  readonly refused: string | null;
}

/** Reads and analyses one score and writes its report, or the error in the report's place. */
export function analyseFile(job: AnalyseJob): AnalyseOutcome {
  const target = path.join(job.out, `${job.name}.json`);
  const bytes = readFileSync(job.file);
  const read = readScore(bytes);
  if (!read.ok) {
    writeFileSync(target, `${JSON.stringify({ error: describe(read.error) }, null, 1)}\n`);
    return { name: job.name, refused: read.error.message };
  }
  const reading = proposeReading(read.value);
  writeFileSync(target, `${JSON.stringify(reportOf(read.value, reading), null, 1)}\n`);
  writeBeside(job, bytes, read.value, reading);
  return { name: job.name, refused: null };
}

/** The annotated score in the shape the file came in, under a name that cannot overwrite it, and the table of labels. */
function writeBeside(job: AnalyseJob, bytes: Uint8Array, score: Score, reading: Reading): void {
  const base = path.join(job.out, job.name);
  const annotations = annotationsOf(reading);
  if (job.musicxml) writeFileSync(`${base}.annotated.${isZip(bytes) ? 'mxl' : 'musicxml'}`, unwrap(annotateFile(bytes, annotations)));
  if (job.csv) writeFileSync(`${base}.csv`, formatLabelsAsCsv(score, annotations, reading.end));
}

function describe({ code, message, line, element }: ScoreError): Partial<ScoreError> {
  return { code, message, ...(line === undefined ? {} : { line }), ...(element === undefined ? {} : { element }) };
}
