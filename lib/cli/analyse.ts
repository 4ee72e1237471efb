import { type Dirent, mkdirSync, readdirSync, existsSync, statSync } from 'node:fs';
import { availableParallelism } from 'node:os';
import path from 'node:path';
import { Worker } from 'node:worker_threads';
import { type AnalyseJob, type AnalyseOutcome, analyseFile } from './analyse-file';

const USAGE = `usage: npm run --silent analyse -- FILE|FOLDER --out FOLDER [--musicxml] [--csv]
FILE      a .musicxml, .xml or .mxl score
FOLDER    every such file in it, and the score.mxl of each of its subfolders
--out     where one report (JSON) per score goes; made when it is not there
--musicxml, --csv   also write the annotated score and the table of labels beside each report
Exit status: 0 every score gave a reading, 1 some were refused, 2 wrong usage.`;

interface Options {
  readonly source: string;
  readonly out: string;
  readonly musicxml: boolean;
  readonly csv: boolean;
}

function readOptions(args: readonly string[]): Options | null {
  const flags = new Set<string>(args.filter((arg) => arg === '--musicxml' || arg === '--csv'));
  const rest = args.filter((arg) => !flags.has(arg));
  const at = rest.indexOf('--out');
  const out = at >= 0 ? rest[at + 1] : undefined;
  const sources = rest.filter((_, i) => at < 0 || (i !== at && i !== at + 1));
  const [source] = sources;
  if (!source || sources.length !== 1 || source.startsWith('--') || !out || out.startsWith('--')) return null;
  return { source, out, musicxml: flags.has('--musicxml'), csv: flags.has('--csv') };
}

const SCORE_NAME = /\.(musicxml|xml|mxl)$/i;

/** Scores of a file or folder with the base names of their reports, in the order of their names. */
function findScores(source: string): { file: string; name: string }[] {
  if (!statSync(source).isDirectory()) return [{ file: source, name: path.basename(source).replace(SCORE_NAME, '') }];
  const entries = readdirSync(source, { withFileTypes: true }).sort((a, b) => (a.name < b.name ? -1 : 1));
  return entries.flatMap((entry) => scoreIn(source, entry));
}

function scoreIn(folder: string, entry: Dirent): { file: string; name: string }[] {
  const file = path.join(folder, entry.name);
  if (!statSync(file).isDirectory()) return SCORE_NAME.test(entry.name) ? [{ file, name: entry.name.replace(SCORE_NAME, '') }] : [];
  const inner = path.join(file, 'score.mxl');
  return existsSync(inner) ? [{ file: inner, name: entry.name }] : [];
}

/** Two scores of one base name (`a.xml`, `a.mxl`) would write one report: that is said instead of done. */
function findClash(scores: readonly { name: string }[]): string | null {
  const seen = new Set<string>();
  for (const { name } of scores) {
    if (seen.has(name)) return name;
    seen.add(name);
  }
  return null;
}

/** Runs the jobs over all cores; a worker that dies refuses its score and is replaced. */
async function runJobs(jobs: readonly AnalyseJob[], report: (outcome: AnalyseOutcome) => void): Promise<void> {
  const workers = Math.min(availableParallelism(), jobs.length);
  if (workers <= 1) {
    for (const job of jobs) report(analyseFile(job));
    return;
  }
  let next = 0;
  const take = () => jobs[next++];
  await Promise.all(Array.from({ length: workers }, () => runLane(take, report)));
}

async function runLane(take: () => AnalyseJob | undefined, report: (outcome: AnalyseOutcome) => void): Promise<void> {
  let worker = startWorker();
  for (let job = take(); job; job = take()) {
    const outcome = await ask(worker, job);
    report(outcome.value);
    if (!outcome.alive) worker = startWorker();
  }
  await worker.terminate();
}

function startWorker(): Worker {
  return new Worker(new URL('./analyse-worker.mjs', import.meta.url));
}

function ask(worker: Worker, job: AnalyseJob): Promise<{ value: AnalyseOutcome; alive: boolean }> {
  return new Promise((resolve) => {
    const done = (value: AnalyseOutcome, alive: boolean) => {
      // By name: the worker's own listeners start its port again for the next job.
      for (const event of ['message', 'error', 'exit']) worker.removeAllListeners(event);
      resolve({ value, alive });
    };
    worker.once('message', (value: AnalyseOutcome) => done(value, true));
    worker.once('error', (error) => done({ name: job.name, refused: `stopped: ${error.message}` }, false));
    worker.once('exit', () => done({ name: job.name, refused: 'stopped before it was done' }, false));
    worker.postMessage(job);
  });
}

async function main(args: readonly string[]): Promise<number> {
  const options = readOptions(args);
  if (!options || !existsSync(options.source)) {
    if (options) console.error(`There is no file or folder ${options.source}.`);
    console.error(USAGE);
    return 2;
  }
  const scores = findScores(options.source);
  const clash = findClash(scores);
  if (scores.length === 0 || clash !== null) {
    console.error(clash === null ? `No score in ${options.source}: .musicxml, .xml or .mxl.` : `Two scores are called ${clash}; each needs a report of its own.`);
    return 2;
  }
  mkdirSync(options.out, { recursive: true });
  let done = 0;
  let refused = 0;
  const jobs = scores.map((score) => ({ ...score, out: options.out, musicxml: options.musicxml, csv: options.csv }));
  await runJobs(jobs, (outcome) => {
    done++;
    if (outcome.refused !== null) refused++;
    console.error(`${done}/${jobs.length} ${outcome.name}${outcome.refused === null ? '' : `: ${outcome.refused}`}`);
  });
  return refused > 0 ? 1 : 0;
}

main(process.argv.slice(2)).then(
  (status) => {
    process.exitCode = status;
  },
  (error: unknown) => {
    console.error(error instanceof Error ? error.message : error);
    process.exitCode = 1;
  },
);
