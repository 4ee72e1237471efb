import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { performance } from 'node:perf_hooks';
import { type Decoded, decode, readingOf } from '../harmony/propose';
import { prepareSlices } from '../harmony/prepare';
import { rankStates } from '../harmony/read-out';
import { reportOf } from '../harmony/report';
import { alignGold, creditOf } from '../harmony/train/gold';
import { LEARNING } from '../harmony/train/learn';
import { CORPUS, type DevItem, SCORER, assignFolds, hasCorpus, loadCorpus } from './dev-corpus';
import { Reliability } from './reliability';
import { trainOn } from './train';

const FOLDS = 5;

const USAGE = `usage: npm run accuracy [-- --folds 0,1,2,3,4] [--keep FOLDER]
Cross-validation on the development corpus beside the repository: the scores of each fold are analysed with weights learned
on the other folds alone. Folds are grouped by set and book (songs of one opus or collection stay together, all preludes of
the book lie in one fold, 92A and 92B of an exercise are one piece). Prints the scorer's table, the confusions that cost
most, the reliability of the certainties, and the time per 1,000 notes. --keep leaves the reports in a folder.`;

interface Options {
  readonly folds: readonly number[];
  readonly keep: string | null;
}

function readOptions(args: readonly string[]): Options | null {
  let folds = [...Array(FOLDS).keys()];
  let keep: string | null = null;
  for (let i = 0; i < args.length; i += 2) {
    const value = args[i + 1];
    if (value === undefined) return null;
    if (args[i] === '--folds') folds = value.split(',').map(Number);
    else if (args[i] === '--keep') keep = value;
    else return null;
  }
  return folds.length > 0 && folds.every((fold) => Number.isInteger(fold) && fold >= 0 && fold < FOLDS) ? { folds, keep } : null;
}

/** What is known of an analysis beyond its report: agreement by certainty, and whether the reference is among the first three. */
function judge(item: DevItem, decoded: Decoded, reliability: Reliability): void {
  const gold = alignGold(item.slices, item.reference);
  for (const span of decoded.spans) {
    const first = rankStates(span, decoded.states, item.slices).slice(0, 3);
    for (let i = span.from; i < span.to; i++) {
      const label = gold[i];
      if (!label) continue;
      const time = ((item.slices.end[i] ?? 0) - (item.slices.start[i] ?? 0)) / item.score.ticksPerQuarter;
      reliability.add(span.certainty, time, creditOf(span.state, label) === 1, first.some(([state]) => creditOf(state, label) === 1));
    }
  }
}

function analyseFold(items: readonly DevItem[], fold: number, folds: ReadonlyMap<string, number>, out: string, reliability: Reliability) {
  const training = items.filter((item) => folds.get(item.set) !== fold);
  const { weights, choosing } = trainOn(training, LEARNING, (text) => console.error(`fold ${fold + 1}, ${text}`));
  let time = 0;
  let notes = 0;
  for (const item of items.filter(({ set }) => folds.get(set) === fold)) {
    const started = performance.now();
    const decoded = decode(prepareSlices(item.score, item.slices, choosing), weights, item.score.ticksPerQuarter);
    time += performance.now() - started;
    notes += item.score.notes.length;
    judge(item, decoded, reliability);
    writeFileSync(path.join(out, `${item.slug}.json`), JSON.stringify(reportOf(item.score, readingOf(decoded, item.slices, item.score))));
  }
  return { time, notes };
}

function main(args: readonly string[]): number {
  const options = readOptions(args);
  if (!options) {
    console.error(USAGE);
    return 2;
  }
  if (!hasCorpus()) {
    console.error(`The development corpus is not there: ${path.relative(process.cwd(), CORPUS)}`);
    return 1;
  }
  const items = loadCorpus();
  const folds = assignFolds(items, FOLDS);
  const out = options.keep ?? mkdtempSync(path.join(tmpdir(), 'understave-accuracy-'));
  const reliability = new Reliability();
  const parts = options.folds.map((fold) => analyseFold(items, fold, folds, out, reliability));
  const skip = options.folds.length < FOLDS ? ['--skip-missing'] : [];
  console.log(execFileSync('python3', [SCORER, '--corpus', CORPUS, '--hyp', out, '--errors', '25', ...skip], { encoding: 'utf8', maxBuffer: 1 << 26 }));
  console.log(reliability.format());
  const time = parts.reduce((sum, part) => sum + part.time, 0);
  const notes = parts.reduce((sum, part) => sum + part.notes, 0);
  console.log(`time per 1,000 notes (without reading the score): ${((time / notes) * 1000).toFixed(0)} ms`);
  if (!options.keep) rmSync(out, { recursive: true });
  return 0;
}

process.exitCode = main(process.argv.slice(2));
