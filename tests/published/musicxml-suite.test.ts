import { describe, expect, it } from 'vitest';
import { openScoreFile } from '@/lib/score/open-score-file';
import { performedBars } from '@/lib/score/performed-bars';
import { add, parseDecimal, rational, type Rational } from '@/lib/score/rational';
import { readScore } from '@/lib/score/read-score';
import type { Score } from '@/lib/score/score';
import { noteText, quarters } from '../support/score-text';
import { checkScore } from '../support/score-invariants';
import { hasSuite, readSuiteFile, suiteFiles } from '../support/shared';
import { KEYS, OFFSETS, PLAYED, REFUSED, SUITE } from './musicxml-suite-table';

function mustRead(name: string): Score {
  const result = readScore(readSuiteFile(name));
  if (!result.ok) throw new Error(`${name}: ${result.error.message}`);
  return result.value;
}

function parseFraction(text: string): Rational {
  const [num = '', den = '1'] = text.split('/');
  return rational(parseDecimal(num)?.num ?? NaN, Number(den));
}

const fraction = ({ num, den }: Rational) => (den === 1 ? `${num}` : `${num}/${den}`);

/** `4x3` → 4, 4, 4. */
function repeat(text: string): string[] {
  return text.split(' ').flatMap((word) => {
    const [, what = '', count = '1'] = /^(.*?)(?:x(\d+))?$/.exec(word) ?? [];
    return what === '' ? [] : Array.from({ length: Number(count) }, () => what);
  });
}

/** The table's notes as `pitch@start:duration`, sorted. */
function expectedNotes(streams: string): string[] {
  return streams
    .split(' / ')
    .flatMap((stream) => {
      let at = rational(0);
      return repeat(stream).flatMap((token) => {
        const [pitches = '', length = '1'] = token.split(':');
        const start = fraction(at);
        at = add(at, parseFraction(length));
        return pitches === 'r' ? [] : pitches.split('+').map((pitch) => `${pitch}@${start}:${length}`);
      });
    })
    .sort();
}

describe.skipIf(!hasSuite)('every file of the MusicXML test suite', () => {
  it('is in the table', () => {
    expect([...Object.keys(SUITE), ...Object.keys(REFUSED)].sort()).toEqual(suiteFiles());
    expect(suiteFiles()).toHaveLength(150);
  });

  it.each(Object.entries(SUITE))('%s has its bars and notes', (name, [bars, notes]) => {
    const score = mustRead(name);
    expect(score.bars.map(({ length }) => quarters(score, length))).toEqual(repeat(bars));
    expect(score.notes.map((note) => noteText(score, note)).sort()).toEqual(expectedNotes(notes));
    expect(checkScore(score)).toEqual([]);
  });

  it.each(Object.entries(REFUSED))('%s is refused with its place', (name, refusal) => {
    expect(readScore(readSuiteFile(name))).toMatchObject({ ok: false, error: refusal });
  });

  it.each(Object.entries(KEYS))('%s has its keys', (name, keys) => {
    expect(mustRead(name).keySignatures.map(({ fifths, mode }) => `${fifths}${mode === 'major' ? '' : mode === 'minor' ? 'm' : '?'}`).join(' ')).toBe(keys);
  });

  it.each(Object.entries(PLAYED))('%s is played in its order', (name, order) => {
    expect(performedBars(mustRead(name)).map((bar) => bar + 1).join(' ')).toBe(order);
  });

  it.each(Object.entries(OFFSETS))('%s begins its bars where they belong in their metre', (name, offsets) => {
    const score = mustRead(name);
    expect(score.bars.map(({ offset }) => quarters(score, offset)).join(' ')).toBe(offsets);
  });

  it('keeps every grace note that is not a cue', () => {
    for (const name of Object.keys(SUITE)) {
      const file = openScoreFile(readSuiteFile(name));
      const written = file.ok ? (file.value.xml.match(/<grace\b/g) ?? []).length : 0;
      expect(mustRead(name).graceNotes, name).toHaveLength(written);
    }
  });

  it('takes the movement’s title where the work’s is empty', () => {
    expect(mustRead('51d-EmptyTitle.xml').title).not.toBe('');
  });
});
