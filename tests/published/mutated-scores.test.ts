import { describe, expect, it } from 'vitest';
import { annotateFile } from '@/lib/score/annotate-file';
import { openScoreFile } from '@/lib/score/open-score-file';
import { readScore } from '@/lib/score/read-score';
import { type Random, pick, seededRandom } from '../support/random';
import { checkRefusal, checkScore } from '../support/score-invariants';
import { corpusScores, hasCorpus, hasSuite, readCorpusScore, readSuiteFile, suiteFiles } from '../support/shared';

/** Source of the files: the MusicXML test suite (MIT) and the development corpus; each is broken in seeded ways. */

const WILD = ['0', '-1', '1000000000', '0.3333333', '', 'NaN', '1e9', '99999999999999999999', ' 4 ', '&#0;', '&x;', '<', '\0', '\uFFFF', '__proto__', 'constructor'];

type Mutation = (text: string, random: Random) => string;

function span(text: string, random: Random, longest: number): [number, number] {
  const start = Math.floor(random() * text.length);
  return [start, Math.min(text.length, start + 1 + Math.floor(random() * longest))];
}

function replaceMatch(text: string, pattern: RegExp, random: Random, by: (found: string) => string): string {
  const all = [...text.matchAll(pattern)];
  if (all.length === 0) return text;
  const found = pick(random, all);
  return text.slice(0, found.index) + by(found[0]) + text.slice(found.index + found[0].length);
}

/** Break the XML. */
const BREAKING: readonly Mutation[] = [
  (text, random) => text.slice(0, Math.floor(random() * text.length)),
  (text, random) => {
    const [start, end] = span(text, random, 200);
    return text.slice(0, start) + text.slice(end);
  },
  (text, random) => {
    const [start, end] = span(text, random, 2000);
    return text.slice(0, end) + text.slice(start, end) + text.slice(end);
  },
  (text, random) => {
    const at = Math.floor(random() * text.length);
    return text.slice(0, at) + pick(random, WILD) + text.slice(at + 1);
  },
];

/** Leave the XML whole and break the music. */
const MUSICAL: readonly Mutation[] = [
  (text, random) => replaceMatch(text, /(?<=<(?:duration|divisions|beats|beat-type|fifths|alter|octave|step|voice|staff|staves|chromatic)>)[^<]*/g, random, () => pick(random, WILD.slice(0, 9))),
  (text, random) => replaceMatch(text, /(?<=<(?:duration|divisions|beats|alter|octave|staff)>)[^<]*/g, random, () => String(Math.floor(random() * 9))),
  (text, random) => replaceMatch(text, /<(note|backup|forward|attributes|measure|barline)\b[\s\S]*?<\/\1>/g, random, () => ''),
  (text, random) => replaceMatch(text, /<(note|backup|forward|attributes|measure|barline|part)\b[\s\S]*?<\/\1>/g, random, (found) => found + found),
  (text, random) => replaceMatch(text, /<(duration|chord|pitch|voice|divisions|beats|step|octave|score-part|tie)\b[^>]*(?:\/>|>[\s\S]*?<\/\1>)/g, random, () => ''),
  (text, random) => replaceMatch(text, /<note\b[^>]*>/g, random, (found) => `${found}${pick(random, ['<chord/>', '<grace/>', '<cue/>', '<tie type="start"/>', '<tie type="stop"/>', '<rest/>'])}`),
  (text, random) => replaceMatch(text, /(?<= (?:number|type|id|location|direction|implicit|times)=")[^"]*/g, random, () => pick(random, WILD.slice(0, 9))),
];

function mutateText(bytes: Uint8Array, random: Random): Uint8Array {
  const file = openScoreFile(bytes);
  let text = (file.ok ? file.value.xml : new TextDecoder().decode(bytes)).replace(/encoding="[^"]*"/, 'encoding="UTF-8"');
  const mutations = random() < 0.7 ? MUSICAL : BREAKING;
  for (let rounds = 1 + Math.floor(random() * 3); rounds > 0; rounds -= 1) text = pick(random, mutations)(text, random);
  return new TextEncoder().encode(text);
}

function mutateBytes(bytes: Uint8Array, random: Random): Uint8Array {
  // A copy: the same file is broken many times.
  const changed = Uint8Array.from(random() < 0.2 ? bytes.subarray(0, Math.floor(random() * bytes.length)) : bytes);
  for (let count = 1 + Math.floor(random() * 8); count > 0; count -= 1) changed[Math.floor(random() * changed.length)] = Math.floor(random() * 256);
  return changed;
}

/** Findings about what came of the bytes; a crash throws and fails the test with its stack. */
function checkOutcome(bytes: Uint8Array): { faults: string[]; wasRead: boolean } {
  const result = readScore(bytes);
  if (!result.ok) return { faults: checkRefusal(result.error), wasRead: false };
  // An archive may hold other entries that are damaged: it is read without them, but not written without them.
  const written = annotateFile(bytes, []);
  return { faults: [...checkScore(result.value), ...(written.ok || written.error.code.startsWith('zip_') ? [] : ['a score that is read cannot be written'])], wasRead: true };
}

function findFaults(files: readonly Uint8Array[], count: number, seed: number): { faults: string[]; read: number; refused: number } {
  const random = seededRandom(seed);
  const tally = { faults: [] as string[], read: 0, refused: 0 };
  for (let i = 0; i < count; i += 1) {
    const bytes = pick(random, files);
    const mutated = random() < 0.1 ? mutateBytes(bytes, random) : mutateText(bytes, random);
    const { faults, wasRead } = checkOutcome(mutated);
    tally.faults.push(...faults.map((fault) => `mutation ${i}: ${fault}`));
    tally[wasRead ? 'read' : 'refused'] += 1;
  }
  return tally;
}

describe('ten thousand broken scores are read whole or refused by name', () => {
  it.skipIf(!hasSuite)('from the suite', { timeout: 600_000 }, () => {
    const { faults, read, refused } = findFaults(suiteFiles().map(readSuiteFile), 9_000, 20_261_201);
    expect(faults).toEqual([]);
    // Both ways are tried in earnest.
    expect(Math.min(read, refused)).toBeGreaterThan(2_000);
  });

  it.skipIf(!hasCorpus)('from the corpus', { timeout: 600_000 }, () => {
    const small = corpusScores().map(readCorpusScore).filter(({ length }) => length < 8_000);
    const { faults } = findFaults(small, 1_000, 20_261_202);
    expect(faults).toEqual([]);
  });
});
