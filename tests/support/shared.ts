import { existsSync, readFileSync, readdirSync } from 'node:fs';
import path from 'node:path';

/** Material that is laid beside the repository and never committed; tests that use it skip with a message where it is absent. */
const SHARED = path.resolve(import.meta.dirname, '../../../shared');

const SUITE = path.join(SHARED, 'musicxml-suite/xmlFiles');
const CORPUS = path.join(SHARED, 'corpus/dev');

export const hasSuite = existsSync(SUITE);
export const hasCorpus = existsSync(CORPUS);

if (!hasSuite) console.warn('skipped: tests on ../shared/musicxml-suite, which is not there');
if (!hasCorpus) console.warn('skipped: tests on ../shared/corpus/dev, which is not there');

/** Names of the MusicXML suite's files, sorted; none where it is absent. */
export function suiteFiles(): string[] {
  return hasSuite ? readdirSync(SUITE).sort() : [];
}

export function readSuiteFile(name: string): Uint8Array {
  return readFileSync(path.join(SUITE, name));
}

/** Folder names of the development corpus, sorted; none where it is absent. */
export function corpusScores(): string[] {
  return hasCorpus ? readdirSync(CORPUS).filter((slug) => existsSync(path.join(CORPUS, slug, 'score.mxl'))).sort() : [];
}

export function readCorpusScore(slug: string): Uint8Array {
  return readFileSync(path.join(CORPUS, slug, 'score.mxl'));
}
