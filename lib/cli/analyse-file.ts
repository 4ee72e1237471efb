import { readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { proposeReading } from '../harmony/propose';
import { reportOf } from '../harmony/report';
import { readScore } from '../score/read-score';
import { type ScoreError } from '../score/score';

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
  const read = readScore(readFileSync(job.file));
  if (!read.ok) {
    writeFileSync(target, `${JSON.stringify({ error: describe(read.error) }, null, 1)}\n`);
    return { name: job.name, refused: read.error.message };
  }
  const reading = proposeReading(read.value);
  writeFileSync(target, `${JSON.stringify(reportOf(read.value, reading), null, 1)}\n`);
  return { name: job.name, refused: null };
}

function describe({ code, message, line, element }: ScoreError): Partial<ScoreError> {
  return { code, message, ...(line === undefined ? {} : { line }), ...(element === undefined ? {} : { element }) };
}
