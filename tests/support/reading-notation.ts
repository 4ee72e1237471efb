import type { KeyRegion, Label, Reading } from '@/lib/harmony/reading';
import type { Framed, KeyReading } from '@/lib/marking/key-reading';
import { ticks } from '@/lib/score/score';
import { type ConventionSheet, DEFAULT_CONVENTIONS } from '@/lib/theory/conventions';
import type { Key } from '@/lib/theory/key';
import { parseNumeral } from '@/lib/theory/numeral-parse';
import { parsePitchClass } from '@/lib/theory/pitch';
import { unwrap } from '@/lib/result';

/** Ticks per quarter of every reading written in this notation. */
export const READING_TICKS = 4;

/**
 * A reading in one line: `'C: I V65/V*2 V | G: I _'`. A key (lower case: minor) opens a region; each numeral lasts a
 * quarter or as many as stand after `*` (halves and quarters of one as `*1.5`); `_` is a blank, `~` a space inside a numeral; bar lines are for the eye.
 */
export function readingFrom(notation: string, sheet: ConventionSheet = DEFAULT_CONVENTIONS): Reading {
  const labels: Label[] = [];
  const regions: KeyRegion[] = [];
  let key: Key = { tonic: unwrap(parsePitchClass('C')), mode: 'major' };
  let end = 0;
  for (const word of notation.split(/\s+/).filter((w) => w && w !== '|')) {
    if (word.endsWith(':')) {
      key = keyFrom(word.slice(0, -1));
      regions.push({ start: ticks(end), end: ticks(end), key });
      continue;
    }
    const [text = '', length = '1'] = word.split('*');
    const start = ticks(end);
    end += Number(length) * READING_TICKS;
    const numeral = text === '_' ? null : unwrap(parseNumeral(text.replaceAll('~', ' '), key.mode, sheet));
    labels.push({ id: `label-${labels.length}`, start, end: ticks(end), key, numeral, state: 'changed', certainty: null, others: [] });
  }
  const closed = regions.map((region, i) => ({ ...region, end: regions[i + 1]?.start ?? ticks(end) }));
  return { start: ticks(0), end: ticks(end), regions: closed, labels };
}

function keyFrom(name: string): Key {
  return { tonic: unwrap(parsePitchClass(name)), mode: name.charAt(0) === name.charAt(0).toLowerCase() ? 'minor' : 'major' };
}

/** The same as an answer key: every label that has a numeral is asked. */
export function keyReadingFrom(notation: string, sheet?: ConventionSheet): KeyReading {
  const reading = readingFrom(notation, sheet);
  const labels = reading.labels.map(({ id, start, end, key, numeral }) => ({
    id, start, end, key, numeral, asked: numeral !== null, alternatives: [], points: null,
  }));
  return { ...reading, labels };
}

/** `framedFrom('C: V7/V')`: one numeral in its key. */
export function framedFrom(notation: string): Framed {
  const [label] = readingFrom(notation).labels;
  if (!label?.numeral) throw new Error(`not a numeral in a key: “${notation}”`);
  return { key: label.key, numeral: label.numeral };
}

