import { execFileSync } from 'node:child_process';
import { existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { type Slices, gatherSlices } from '../harmony/slices';
import { type ReferenceLabel, type Report, readReference } from '../harmony/train/reference';
import { readScore } from '../score/read-score';
import { type Score } from '../score/score';
import { sliceSonorities } from '../score/sonorities';

/** Where the development corpus and its scorer lie: beside the repository, never in it. */
export const SHARED = path.resolve(import.meta.dirname, '../../../shared');
export const CORPUS = path.join(SHARED, 'corpus/dev');
export const SCORER = path.join(SHARED, 'tools/score_analysis.py');

export const KINDS = ['lieder', 'preludes', 'textbooks'] as const;

/** One analysed score of the corpus. `set` is what must not be divided between training and test. */
export interface DevItem {
  readonly slug: string;
  readonly kind: string;
  readonly set: string;
  readonly score: Score;
  readonly slices: Slices;
  readonly reference: readonly ReferenceLabel[];
}

export function hasCorpus(): boolean {
  return existsSync(path.join(CORPUS, 'INDEX.tsv')) && existsSync(SCORER);
}

/**
 * Songs belong to their opus or collection, preludes to their book. Exercises are split by piece: the two halves of a
 * numbered exercise (92A and 92B, the same chords to a major and to a minor end) count as one.
 */
function setOf(slug: string, kind: string, folder: string): string {
  if (kind === 'textbooks') return slug.replace(/[a-z]$/, '');
  return path.posix.dirname(folder);
}

export function loadCorpus(): readonly DevItem[] {
  const references = mkdtempSync(path.join(tmpdir(), 'understave-references-'));
  try {
    execFileSync('python3', [SCORER, '--corpus', CORPUS, '--export', references], { stdio: ['ignore', 'ignore', 'inherit'] });
    const [, ...rows] = readFileSync(path.join(CORPUS, 'INDEX.tsv'), 'utf8').trim().split('\n');
    return rows.map((row) => readItem(row.split('\t'), references));
  } finally {
    rmSync(references, { recursive: true });
  }
}

function readItem([slug = '', kind = '', , , folder = '']: readonly string[], references: string): DevItem {
  const read = readScore(readFileSync(path.join(CORPUS, slug, 'score.mxl')));
  if (!read.ok) throw new Error(`${slug}: ${read.error.message}`);
  const score = read.value;
  const report = JSON.parse(readFileSync(path.join(references, `${slug}.json`), 'utf8')) as Report;
  const slices = gatherSlices(score, sliceSonorities(score, { atBarlines: true }));
  return { slug, kind, set: setOf(slug, kind, folder), score, slices, reference: readReference(report, score) };
}

/** Divides the sets over `count` folds by their notes, the largest first to the emptiest fold, each kind of music by itself. */
export function assignFolds(items: readonly DevItem[], count: number): ReadonlyMap<string, number> {
  const size = new Map<string, { kind: string; notes: number }>();
  for (const { set, kind, score } of items) size.set(set, { kind, notes: (size.get(set)?.notes ?? 0) + score.notes.length });
  const load = new Map<string, number[]>(KINDS.map((kind) => [kind, new Array<number>(count).fill(0)]));
  const folds = new Map<string, number>();
  for (const [set, { kind, notes }] of [...size].sort((a, b) => b[1].notes - a[1].notes || (a[0] < b[0] ? -1 : 1))) {
    const loads = load.get(kind) ?? [];
    const fold = loads.indexOf(Math.min(...loads));
    folds.set(set, fold);
    loads[fold] = (loads[fold] ?? 0) + notes;
  }
  return folds;
}
