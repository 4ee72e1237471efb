import { execFileSync, spawnSync } from 'node:child_process';
import { existsSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { annotationsOf, readingFrom } from '@/lib/harmony/annotations';
import { proposeReading } from '@/lib/harmony/propose';
import { annotateScore } from '@/lib/score/annotate-score';
import { importAnalysis } from '@/lib/score/import-analysis';
import { openScoreFile } from '@/lib/score/open-score-file';
import { readScoreText } from '@/lib/score/read-score';
import { unwrap } from '@/lib/result';
import { corpusScores, hasCorpus, hasSuite, readCorpusScore, readSuiteFile, suiteFiles } from '../support/shared';
import { Witness } from '../support/witness';

/**
 * The engine's reading of real scores, written into them. Sources it is held against: the text itself (xmllint, the W3C's
 * MusicXML 4.0 schema), Debian's musicxml2ly (package lilypond), the verovio package.
 */

/** Path of the W3C's musicxml.xsd 4.0, which the repository does not carry. */
const SCHEMA = process.env['MUSICXML_XSD'] ?? '';

function hasCommand(name: string): boolean {
  const found = spawnSync(name, ['--version']).error === undefined;
  if (!found) console.warn(`skipped: checks with ${name}, which is not installed`);
  return found;
}

const hasXmllint = hasCommand('xmllint');
const hasLilypond = hasCommand('musicxml2ly');
const hasSchema = SCHEMA !== '' && existsSync(SCHEMA);
if (!hasSchema) console.warn('skipped: validation against the MusicXML 4.0 schema; MUSICXML_XSD does not name it');

const folder = mkdtempSync(path.join(os.tmpdir(), 'annotated-'));
afterAll(() => rmSync(folder, { recursive: true }));

function save(name: string, xml: string): string {
  const file = path.join(folder, `${name}.musicxml`);
  writeFileSync(file, xml);
  return file;
}

interface Annotated {
  readonly name: string;
  readonly before: string;
  readonly after: string;
}

function annotate(name: string, bytes: Uint8Array): Annotated {
  const before = unwrap(openScoreFile(bytes)).xml;
  return { name, before, after: annotateScore(before, annotationsOf(proposeReading(unwrap(readScoreText(before))))) };
}

/** Every tenth score: songs, preludes and exercises. */
const scores = corpusScores().filter((_, i) => i % 10 === 3);
const annotated = scores.map((slug) => annotate(slug, readCorpusScore(slug)));

describe('a score with the engine’s reading in it', () => {
  it.skipIf(!hasCorpus)('reads back into the same reading, and the same notes', { timeout: 300_000 }, () => {
    for (const { name, before, after } of annotated) {
      const score = unwrap(readScoreText(before));
      const reading = proposeReading(score);
      const imported = unwrap(importAnalysis(after, 'harmony'));
      expect(imported.unread, name).toEqual([]);
      const again = readingFrom(imported.annotations, reading.start, reading.end, () => '');
      const plain = (labels: typeof reading.labels) => labels.map(({ start, end, key, numeral }) => ({ start, end, key, numeral }));
      expect(plain(again?.labels ?? []), name).toEqual(plain(reading.labels));
      expect(unwrap(readScoreText(after)), name).toMatchObject({ bars: score.bars, notes: score.notes });
    }
  });

  it.skipIf(!hasCorpus)('is the same file without what was put in', () => {
    for (const { name, before, after } of annotated) {
      expect(after.replace(/<harmony placement="below"[\s\S]*?<\/harmony>\r?\n[ \t]*/g, '') === before, name).toBe(true);
    }
  });

  it.skipIf(!hasCorpus || !hasXmllint)('is well-formed by xmllint', { timeout: 120_000 }, () => {
    for (const { name, after } of annotated) execFileSync('xmllint', ['--nonet', '--noout', save(name, after)]);
  });

  it.skipIf(!hasCorpus || !hasXmllint)('holds only harmony elements as MusicXML 4.0 describes them', { timeout: 120_000 }, () => {
    const schema = path.join(import.meta.dirname, '../support/harmony-element.xsd');
    const validate = (name: string, elements: string) =>
      spawnSync('xmllint', ['--nonet', '--noout', '--schema', schema, save(name, `<harmonies>${elements}</harmonies>`)], { encoding: 'utf8' });
    for (const { name, after } of annotated) {
      const found = after.match(/<harmony placement="below"[\s\S]*?<\/harmony>/g) ?? [];
      expect(found.length, name).toBeGreaterThan(0);
      expect(validate(name, found.join('')).stderr, name).toMatch(/ validates\n$/);
    }
    // The schema can tell: kind before numeral is refused.
    expect(validate('swapped', '<harmony><kind>major</kind><numeral><numeral-root>1</numeral-root></numeral></harmony>').status).toBe(3);
  });

  it.skipIf(!hasCorpus || !hasXmllint || !hasSchema)('validates against the MusicXML 4.0 schema where the input does', { timeout: 300_000 }, () => {
    const isValid = (name: string, xml: string) => spawnSync('xmllint', ['--nonet', '--noout', '--schema', SCHEMA, save(name, xml)]).status === 0;
    for (const { name, before, after } of annotated) expect(isValid(name, after) || !isValid(name, before), name).toBe(true);
  });

  it.skipIf(!hasCorpus)('is performed by verovio like the file without it', { timeout: 300_000 }, async () => {
    const witness = await Witness.create();
    for (const { name, before, after } of annotated) expect(witness.countPerformed(after), name).toBe(witness.countPerformed(before));
  });

  it.skipIf(!hasCorpus || !hasLilypond)('is converted by Debian’s musicxml2ly', { timeout: 300_000 }, () => {
    for (const { name, after } of annotated.slice(0, 6)) {
      const output = path.join(folder, `${name}.ly`);
      execFileSync('musicxml2ly', ['-o', output, save(name, after)], { stdio: 'ignore' });
      expect(existsSync(output), name).toBe(true);
    }
  });
});

describe('every file of the suite that holds a note', () => {
  it.skipIf(!hasSuite)('takes labels and gives them back', { timeout: 300_000 }, () => {
    for (const name of suiteFiles()) {
      const file = openScoreFile(readSuiteFile(name));
      const score = file.ok ? readScoreText(file.value.xml) : file;
      if (!file.ok || !score.ok || score.value.notes.length === 0) continue;
      const annotations = annotationsOf(proposeReading(score.value)).slice(0, 40);
      const own = unwrap(importAnalysis(file.value.xml, 'harmony')).annotations.length;
      const back = unwrap(importAnalysis(annotateScore(file.value.xml, annotations), 'harmony'));
      if (own === 0) expect(back.annotations, name).toEqual(annotations);
    }
  });
});
