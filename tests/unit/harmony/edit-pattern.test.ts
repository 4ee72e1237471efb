import { describe, expect, it } from 'vitest';
import { findTileFaults, invertChange, applyChange, markTone } from '@/lib/harmony/edit';
import { findPivot, togglePivot } from '@/lib/harmony/edit-keys';
import { layPattern, takePattern } from '@/lib/harmony/edit-pattern';
import { mergeWithNext, splitLabel } from '@/lib/harmony/edit-spans';
import { explainLabel } from '@/lib/harmony/explain';
import type { Reading } from '@/lib/harmony/reading';
import { unwrap } from '@/lib/result';
import { formatNumeralPlain } from '@/lib/theory/numeral-format';
import { scoreFrom } from '../../support/notation';
import { numeralsOf } from '../../support/reading-edits';
import { READING_TICKS, readingFrom } from '../../support/reading-notation';

const Q = READING_TICKS;
let made = 0;
const newId = () => `new-${(made += 1)}`;

function lay(reading: Reading, from: number, to: number, at: number): Reading {
  const pattern = takePattern(reading.labels.slice(from, to))!;
  const { reading: laid, change } = unwrap(layPattern(reading, pattern, at, newId));
  expect(findTileFaults(laid)).toEqual([]);
  expect(numeralsOf(unwrap(applyChange(laid, invertChange(change))))).toBe(numeralsOf(reading));
  return laid;
}

// Common practice: a sequence repeats its chords in the key that holds there; lengths come with it.
describe('a pattern of labels', () => {
  it('is laid on a like passage with its lengths', () => {
    expect(numeralsOf(lay(readingFrom('C: I V6*2 V7 I _*4'), 0, 3, 5 * Q))).toBe('C: I V6*2 V7 I I V6*2 V7');
  });

  it('is read in the key that holds there', () => {
    expect(numeralsOf(lay(readingFrom('C: ii V7 I | G: _ _ _'), 0, 3, 3 * Q))).toBe('C: ii V7 I G: ii V7 I');
  });

  it('brings its own changes of key, as far away as they were', () => {
    expect(numeralsOf(lay(readingFrom('C: I G: V7 I F: _ _ _ _'), 0, 3, 3 * Q))).toBe('C: I G: V7 I F: I C: V7 I F: _');
  });

  it('cuts what stands only partly there, and is cut by the end', () => {
    expect(numeralsOf(lay(readingFrom('C: I V7 IV*3 vi'), 0, 2, 3 * Q))).toBe('C: I V7 IV I V7 vi');
    expect(numeralsOf(lay(readingFrom('C: I V7*3 IV vi'), 0, 2, 5 * Q))).toBe('C: I V7*3 IV I');
  });

  it('keeps the ids of labels that begin at the same moments', () => {
    const laid = lay(readingFrom('C: I V7 _ _'), 0, 2, 2 * Q);
    expect(laid.labels.map((l) => l.id)).toEqual(['label-0', 'label-1', 'label-2', 'label-3']);
  });
});

describe('a pivot', () => {
  const start = readingFrom('C: I vi G: V7 I');

  it('is the last label before another key, read in both', () => {
    const { reading } = unwrap(togglePivot(start, 'label-1'));
    const pivot = findPivot(reading, reading.labels[1]!)!;
    expect(formatNumeralPlain(pivot.numeral, pivot.key.mode)).toBe('ii');
    expect(unwrap(togglePivot(reading, 'label-1')).reading.labels[1]!.pivot).toBeUndefined();
  });

  it('is refused elsewhere', () => {
    expect(togglePivot(start, 'label-0')).toMatchObject({ ok: false, error: { kind: 'nothing_changes' } });
  });

  it('stays with the part that touches the new key', () => {
    const { reading } = unwrap(togglePivot(start, 'label-1'));
    const split = unwrap(splitLabel(reading, 'label-1', 6, 'later')).reading;
    expect(split.labels.map((l) => l.pivot ?? false)).toEqual([false, false, true, false, false]);
    expect(unwrap(mergeWithNext(split, 'label-1')).reading.labels[1]!.pivot).toBe(true);
  });
});

describe('a note marked by hand', () => {
  // d5 over C E G steps on from c5 to e5: a passing tone (Open Music Theory v1, embellishing tones).
  const score = scoreFrom('C: c3 e4 g4 c5 | ~c3 ~e4 ~g4 d5 | c3 e4 g4 e5');
  const reading = { ...readingFrom('C: I'), end: 3 } as unknown as Reading;
  const whole: Reading = { ...reading, labels: [{ ...reading.labels[0]!, end: 3 as never }], regions: [{ ...reading.regions[0]!, end: 3 as never }] };

  it('is called what the person says, until it is taken back', () => {
    const [tone] = explainLabel(score, whole, 0).nonChordTones;
    expect(tone!.kind).toBe('passing');
    const marked = unwrap(markTone(whole, 'label-0', tone!.noteId, 'escape')).reading;
    expect(explainLabel(score, marked, 0).nonChordTones.map((t) => t.kind)).toEqual(['escape']);
    const back = unwrap(markTone(marked, 'label-0', tone!.noteId, null)).reading;
    expect(explainLabel(score, back, 0).nonChordTones.map((t) => t.kind)).toEqual(['passing']);
  });
});
