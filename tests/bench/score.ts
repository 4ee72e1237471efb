import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { XMLParser } from 'fast-xml-parser';
import { unwrap } from '@/lib/result';
import { openScoreFile } from '@/lib/score/open-score-file';
import { readScoreText } from '@/lib/score/read-score';
import { corpusScores, readCorpusScore } from '../support/shared';

/** Times are the least of this many runs: on a shared machine the others measure the neighbours. */
const RUNS = 7;

interface Timing {
  readonly name: string;
  readonly characters: number;
  readonly ours: number;
  readonly theirs: number;
}

function least(work: () => void): number {
  const times = Array.from({ length: RUNS }, () => {
    const start = performance.now();
    work();
    return performance.now() - start;
  });
  return Math.min(...times);
}

/** fast-xml-parser with its defaults, which leave attributes out: its quickest way. */
function timeScore(name: string): Timing {
  const xml = unwrap(openScoreFile(readCorpusScore(name))).xml;
  const parser = new XMLParser();
  return {
    name,
    characters: xml.length,
    ours: least(() => void readScoreText(xml)),
    theirs: least(() => void parser.parse(xml)),
  };
}

/** A text in which the bars of every part stand `times` over. */
function lengthen(xml: string, times: number): string {
  return xml.replace(/(<part id="[^"]*">)([\s\S]*?)(<\/part>)/g, (_, open: string, bars: string, close: string) => open + bars.repeat(times) + close);
}

/** Whether the work can be done with so small a heap, in megabytes. */
function fits(mode: string, file: string, megabytes: number): boolean {
  const flags = [`--max-old-space-size=${megabytes}`, '--max-semi-space-size=1', '--import', 'tsx'];
  const child = spawnSync(process.execPath, [...flags, path.join(import.meta.dirname, 'score-memory.ts'), mode, file], { stdio: 'ignore' });
  return child.status === 0;
}

/** The smallest heap the work can be done with, in megabytes. */
function smallestHeap(mode: string, file: string): number {
  let [low, high] = [4, 1024];
  while (high - low > Math.max(1, low / 64)) {
    const middle = Math.floor((low + high) / 2);
    if (fits(mode, file, middle)) high = middle;
    else low = middle;
  }
  return high;
}

/** Heap that reading needs beyond the program and the text, per byte of text. */
function memoryRatio(folder: string, name: string, xml: string): { characters: number; ratio: number } {
  const file = path.join(folder, `${name}.xml`);
  writeFileSync(file, xml);
  const megabytes = smallestHeap('read', file) - smallestHeap('load', file);
  return { characters: xml.length, ratio: (megabytes * 1024 * 1024) / xml.length };
}

export function run(): Promise<void> {
  const names = corpusScores();
  if (names.length === 0) {
    console.log('skipped: ../shared/corpus/dev is not there');
    return Promise.resolve();
  }
  printTimes(names.map(timeScore));
  printMemory(names);
  return Promise.resolve();
}

function printTimes(timings: readonly Timing[]): void {
  const ratios = timings.map(({ ours, theirs }) => ours / theirs).sort((a, b) => a - b);
  const sum = (of: (timing: Timing) => number) => timings.reduce((total, timing) => total + of(timing), 0);
  const at = (share: number) => (ratios[Math.min(ratios.length - 1, Math.floor(share * ratios.length))] ?? NaN).toFixed(2);
  console.log(`reading ${timings.length} corpus scores, ${(sum(({ characters }) => characters) / 1e6).toFixed(1)} million characters (least of ${RUNS} runs each)`);
  console.log(`  ours, text to Score        ${sum(({ ours }) => ours).toFixed(0)} ms`);
  console.log(`  fast-xml-parser, text only ${sum(({ theirs }) => theirs).toFixed(0)} ms`);
  console.log(`  ratio of sums ${(sum(({ ours }) => ours) / sum(({ theirs }) => theirs)).toFixed(2)}; per score: median ${at(0.5)}, nine in ten ≤ ${at(0.9)}, worst ${at(1)} (wanted: ≤ 1.50)`);
}

function printMemory(names: readonly string[]): void {
  const largest = names.map((name) => unwrap(openScoreFile(readCorpusScore(name))).xml).sort((a, b) => b.length - a.length)[0] ?? '';
  const folder = mkdtempSync(path.join(os.tmpdir(), 'bench-score-'));
  for (const times of [1, 8]) {
    const { characters, ratio } = memoryRatio(folder, `x${times}`, lengthen(largest, times));
    console.log(`heap for ${(characters / 1e6).toFixed(1)} million characters: ${ratio.toFixed(1)} times the text (wanted: ≤ 12)`);
  }
  rmSync(folder, { recursive: true });
}
