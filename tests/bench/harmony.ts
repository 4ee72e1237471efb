import { XMLParser } from 'fast-xml-parser';
import { proposeReading } from '@/lib/harmony/propose';
import { unwrap } from '@/lib/result';
import { openScoreFile } from '@/lib/score/open-score-file';
import { readScoreText } from '@/lib/score/read-score';
import { corpusScores, readCorpusScore } from '../support/shared';

/** Times are the least of this many runs: on a shared machine the others measure the neighbours. */
const RUNS = 5;
const LARGEST = 6;
const LONG_BARS = 600;

function least(work: () => void, runs = RUNS): number {
  const times = Array.from({ length: runs }, () => {
    const start = performance.now();
    work();
    return performance.now() - start;
  });
  return Math.min(...times);
}

/** A text in which the bars of every part stand `times` over. */
function lengthen(xml: string, times: number): string {
  return xml.replace(/(<part id="[^"]*">)([\s\S]*?)(<\/part>)/g, (_, open: string, bars: string, close: string) => open + bars.repeat(times) + close);
}

function measure(name: string, xml: string, runs = RUNS): number {
  const parser = new XMLParser();
  const parse = least(() => void parser.parse(xml), runs);
  const read = least(() => void readScoreText(xml), runs);
  const score = unwrap(readScoreText(xml));
  // A copy each time: what a proposal keeps for the next one of the same score must not count.
  const analyse = least(() => void proposeReading({ ...score }), runs);
  const ratio = ((read + analyse) / parse).toFixed(1);
  console.log(`${name.slice(0, 48).padEnd(50)}${String(score.bars.length).padStart(5)} bars ${String(score.notes.length).padStart(6)} notes  parse ${parse.toFixed(0).padStart(5)}  read ${read.toFixed(0).padStart(5)}  analyse ${analyse.toFixed(0).padStart(6)} ms  ratio ${ratio}`);
  return analyse;
}

/** Fixing one label in the middle of 40 bars and proposing the rest again, as the desk does. */
function measureReproposal(xml: string): void {
  const score = unwrap(readScoreText(xml));
  const end = score.bars[39]?.start;
  const options = end === undefined ? {} : { end };
  const { labels } = proposeReading(score, options);
  const fixed = labels.slice(Math.floor(labels.length / 2), Math.floor(labels.length / 2) + 1);
  console.log(`proposing 40 bars again around a fixed label: ${least(() => void proposeReading(score, { ...options, fixed })).toFixed(0)} ms (wanted: < 50)`);
}

export function run(): Promise<void> {
  const texts = corpusScores().map((name) => ({ name, xml: unwrap(openScoreFile(readCorpusScore(name))).xml }));
  const [first, ...rest] = texts.sort((a, b) => b.xml.length - a.xml.length);
  if (!first) {
    console.log('skipped: ../shared/corpus/dev is not there');
    return Promise.resolve();
  }
  console.log('reading and analysing against the plain XML parse (wanted: ratio ≤ 3)');
  for (const { name, xml } of [first, ...rest.slice(0, LARGEST - 1)]) measure(name, xml);
  console.log('growth with length');
  const base = rest[LARGEST] ?? first;
  for (const times of [1, 2, 4, 8]) measure(`${base.name} ×${times}`, lengthen(base.xml, times), 2);
  const bars = unwrap(readScoreText(base.xml)).bars.length;
  measure('600 bars', lengthen(base.xml, Math.ceil(LONG_BARS / bars)), 2);
  measureReproposal(base.xml);
  console.log(`memory in use at the end: ${(process.memoryUsage().rss / 1048576).toFixed(0)} MB`);
  return Promise.resolve();
}
