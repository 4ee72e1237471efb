import { describe, expect, it } from 'vitest';
import { acceptLabels, applyChange, changeBetween, findSuggestions, findTileFaults, invertChange, setNumeral } from '@/lib/harmony/edit';
import { mergeWithNext, moveBoundary, splitLabel } from '@/lib/harmony/edit-spans';
import type { Reading } from '@/lib/harmony/reading';
import { unwrap } from '@/lib/result';
import { parseNumeral } from '@/lib/theory/numeral-parse';
import { READING_TICKS, readingFrom } from '../../support/reading-notation';
import { numeralsOf, suggestedFrom } from '../../support/reading-edits';

const Q = READING_TICKS;
const numeral = (text: string) => unwrap(parseNumeral(text, 'major'));

describe('setNumeral', () => {
  it('writes another numeral: changed, with no certainty', () => {
    const { reading, change } = unwrap(setNumeral(suggestedFrom('C: I V'), 'label-1', numeral('V65')));
    expect(numeralsOf(reading)).toBe('C: I V65');
    expect(reading.labels[1]).toMatchObject({ state: 'changed', certainty: null });
    expect(change.labels.before.map((l) => l.id)).toEqual(['label-1']);
    expect(change.regions).toEqual({ before: [], after: [] });
  });

  it('accepts when what is written is what was suggested', () => {
    const { reading } = unwrap(setNumeral(suggestedFrom('C: I V'), 'label-1', numeral('V')));
    expect(reading.labels[1]).toMatchObject({ state: 'accepted', certainty: 0.8 });
  });

  it('refuses a label that is not there', () => {
    expect(setNumeral(readingFrom('C: I'), 'label-9', null)).toMatchObject({ ok: false, error: { kind: 'label_unknown' } });
  });

  it('has nothing to do where nothing changes', () => {
    expect(setNumeral(readingFrom('C: I'), 'label-0', numeral('I'))).toMatchObject({ ok: false, error: { kind: 'nothing_changes' } });
  });
});

describe('acceptLabels', () => {
  it('accepts suggestions only', () => {
    const half = unwrap(setNumeral(suggestedFrom('C: I V I'), 'label-1', numeral('IV'))).reading;
    const { reading } = unwrap(acceptLabels(half, ['label-0', 'label-1', 'label-2']));
    expect(reading.labels.map((l) => l.state)).toEqual(['accepted', 'changed', 'accepted']);
  });

  it('finds suggestions by span and certainty', () => {
    const reading = suggestedFrom('C: I V I', [0.95, 0.5, 0.9]);
    expect(findSuggestions(reading, 0, 3 * Q, 0.9).map((l) => l.id)).toEqual(['label-0', 'label-2']);
    expect(findSuggestions(reading, Q, 2 * Q).map((l) => l.id)).toEqual(['label-1']);
  });
});

describe('splitLabel', () => {
  it('gives both halves the numeral', () => {
    const { reading } = unwrap(splitLabel(readingFrom('C: I*2 V'), 'label-0', Q, 'new'));
    expect(numeralsOf(reading)).toBe('C: I I V');
    expect(reading.labels.map((l) => [l.id, l.start, l.end])).toEqual([['label-0', 0, Q], ['new', Q, 2 * Q], ['label-1', 2 * Q, 3 * Q]]);
  });

  it.each([0, 2 * Q, 3 * Q])('refuses at %i: not strictly inside', (at) => {
    expect(splitLabel(readingFrom('C: I*2 V'), 'label-0', at, 'new')).toMatchObject({ ok: false, error: { kind: 'boundary_outside' } });
  });
});

describe('mergeWithNext', () => {
  it('keeps the first numeral over both spans', () => {
    expect(numeralsOf(unwrap(mergeWithNext(readingFrom('C: I V I'), 'label-0')).reading)).toBe('C: I*2 I');
  });

  it('takes the second numeral when the first is a blank', () => {
    expect(numeralsOf(unwrap(mergeWithNext(readingFrom('C: _ V'), 'label-0')).reading)).toBe('C: V*2');
  });

  it('moves a change of key that began with the second label', () => {
    expect(numeralsOf(unwrap(mergeWithNext(readingFrom('C: I | G: V I'), 'label-0')).reading)).toBe('C: I*2 G: I');
  });

  it('ends a region that has no label left', () => {
    expect(numeralsOf(unwrap(mergeWithNext(readingFrom('C: I | G: V | C: I'), 'label-0')).reading)).toBe('C: I*2 I');
    expect(numeralsOf(unwrap(mergeWithNext(readingFrom('C: I | G: V'), 'label-0')).reading)).toBe('C: I*2');
  });

  it('has nothing to join after the last', () => {
    expect(mergeWithNext(readingFrom('C: I V'), 'label-1')).toMatchObject({ ok: false, error: { kind: 'nothing_after' } });
  });
});

describe('moveBoundary', () => {
  it('takes from the one and gives to the other', () => {
    expect(numeralsOf(unwrap(moveBoundary(readingFrom('C: I*2 V'), 'label-1', Q)).reading)).toBe('C: I V*2');
  });

  it('takes the change of key along', () => {
    const { reading } = unwrap(moveBoundary(readingFrom('C: I*2 | G: V*2'), 'label-1', 3 * Q));
    expect(numeralsOf(reading)).toBe('C: I*3 G: V');
  });

  it.each([0, 3 * Q])('refuses %i: a neighbour would be empty', (to) => {
    expect(moveBoundary(readingFrom('C: I*2 V'), 'label-1', to)).toMatchObject({ ok: false, error: { kind: 'boundary_outside' } });
  });

  it('does not move the beginning of the excerpt', () => {
    expect(moveBoundary(readingFrom('C: I V'), 'label-0', 1)).toMatchObject({ ok: false, error: { kind: 'boundary_outside' } });
  });
});

describe('applyChange', () => {
  const base = suggestedFrom('C: I V I');
  const first = unwrap(setNumeral(base, 'label-0', numeral('I6'))).change;
  const last = unwrap(setNumeral(base, 'label-2', numeral('vi'))).change;

  it('puts edits of different labels together', () => {
    const both = unwrap(applyChange(unwrap(applyChange(base, first)), last));
    expect(numeralsOf(both)).toBe('C: I6 V vi');
  });

  it('is stale when the label has changed meanwhile, and names it', () => {
    const other = unwrap(setNumeral(base, 'label-0', numeral('IV'))).reading;
    expect(applyChange(other, first)).toMatchObject({ ok: false, error: { kind: 'stale', labelIds: ['label-0'] } });
  });

  it('is stale when the spans would no longer tile', () => {
    const split = unwrap(splitLabel(readingFrom('C: I*2 V'), 'label-0', Q, 'new'));
    const wrong = { ...split.change, labels: { before: [], after: split.change.labels.after } };
    expect(applyChange(readingFrom('C: I*2 V'), wrong)).toMatchObject({ ok: false, error: { kind: 'stale' } });
  });

  it('goes back with the inverse', () => {
    const there = unwrap(applyChange(base, first));
    expect(unwrap(applyChange(there, invertChange(first)))).toEqual(base);
  });
});

describe('findTileFaults', () => {
  const broken = (change: (reading: Reading) => Reading) => findTileFaults(change(readingFrom('C: I V')));

  it('finds nothing wrong with a whole reading', () => {
    expect(broken((r) => r)).toEqual([]);
  });

  it('finds gaps, doubled ids and a label out of its key', () => {
    expect(broken((r) => ({ ...r, labels: r.labels.slice(1) }))[0]).toContain('does not follow');
    expect(broken((r) => ({ ...r, labels: r.labels.map((l) => ({ ...l, id: 'same' })) }))).toEqual(['two labels share an id']);
    expect(broken((r) => ({ ...r, regions: readingFrom('G: I V').regions }))).toHaveLength(2);
  });
});

describe('changeBetween', () => {
  it('is empty between equals, and holds only what differs', () => {
    const reading = readingFrom('C: I V I');
    expect(changeBetween(reading, reading)).toEqual({ labels: { before: [], after: [] }, regions: { before: [], after: [] } });
    const edited = unwrap(setNumeral(reading, 'label-1', null));
    expect(changeBetween(reading, edited.reading)).toEqual(edited.change);
  });
});
