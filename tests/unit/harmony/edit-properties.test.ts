import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type EditResult, acceptLabels, applyChange, findTileFaults, invertChange, setNumeral } from '@/lib/harmony/edit';
import { KEY_CHANGE_KEEPS, changeKeyFrom, exchangeFrame, removeRegion } from '@/lib/harmony/edit-keys';
import { layOver } from '@/lib/harmony/edit-merge';
import { mergeWithNext, moveBoundary, splitLabel } from '@/lib/harmony/edit-spans';
import type { Reading } from '@/lib/harmony/reading';
import { unwrap } from '@/lib/result';
import { KEYS } from '@/lib/theory/key';
import { parseNumeral } from '@/lib/theory/numeral-parse';
import { suggestedFrom } from '../../support/reading-edits';

const START = 'C: I*2 V65/V V*2 | G: ii V7 I*2 | a: i iio6 V i*3 | C: V7 I*2';
const NUMERALS = ['I', 'V7', 'viio7', 'vi', 'V65/V', 'N6', 'Ger65'].map((text) => unwrap(parseNumeral(text, 'major')));

type Draw = readonly [kind: number, label: number, at: number, choice: number];

/** One of every edit there is, its arguments drawn; many are refused, and that is part of the trial. */
function edit(reading: Reading, [kind, place, at, choice]: Draw, newId: string): EditResult {
  const label = reading.labels[place % reading.labels.length]!;
  const key = KEYS[choice % KEYS.length]!;
  const keeps = KEY_CHANGE_KEEPS[choice % 2]!;
  const span = reading.labels.slice(place % reading.labels.length, (place % reading.labels.length) + 1 + (choice % 3));
  const tick = label.start - 4 + (at % (label.end - label.start + 8));
  const edits = [
    () => setNumeral(reading, label.id, NUMERALS[choice % NUMERALS.length]!),
    () => setNumeral(reading, label.id, null),
    () => acceptLabels(reading, span.map((l) => l.id)),
    () => splitLabel(reading, label.id, tick, newId),
    () => mergeWithNext(reading, label.id),
    () => moveBoundary(reading, label.id, tick),
    () => changeKeyFrom(reading, label.start, key, keeps),
    () => removeRegion(reading, reading.regions[choice % reading.regions.length]!.start, keeps),
    () => exchangeFrame(reading, span),
  ];
  return edits[kind % edits.length]!();
}

const draws = fc.array(fc.tuple(fc.nat(8), fc.nat(40), fc.nat(40), fc.nat(60)), { minLength: 1, maxLength: 25 });

describe('every sequence of edits', () => {
  it('leaves labels and regions that tile the excerpt', () => {
    fc.assert(
      fc.property(draws, (sequence) => {
        let reading = suggestedFrom(START);
        sequence.forEach((draw, i) => {
          const result = edit(reading, draw, `new-${i}`);
          if (!result.ok) return;
          expect(findTileFaults(result.value.reading)).toEqual([]);
          expect(unwrap(applyChange(reading, result.value.change))).toEqual(result.value.reading);
          reading = result.value.reading;
        });
      }),
    );
  });

  it('is undone by the inverses in reverse order', () => {
    fc.assert(
      fc.property(draws, (sequence) => {
        const start = suggestedFrom(START);
        let reading = start;
        const undo = sequence.flatMap((draw, i) => {
          const result = edit(reading, draw, `new-${i}`);
          if (!result.ok) return [];
          reading = result.value.reading;
          return [invertChange(result.value.change)];
        });
        expect(undo.reverse().reduce((r, change) => unwrap(applyChange(r, change)), reading)).toEqual(start);
      }),
    );
  });

  it('can be laid over whatever someone else has made of the reading', () => {
    fc.assert(
      fc.property(draws, draws, (mine, theirs) => {
        const start = suggestedFrom(START);
        const apply = (sequence: readonly Draw[], name: string) =>
          sequence.reduce((r, draw, i) => {
            const result = edit(r, draw, `${name}-${i}`);
            return result.ok ? result.value.reading : r;
          }, start);
        const result = edit(start, mine[0]!, 'mine');
        if (!result.ok) return;
        const their = apply(theirs, 'theirs');
        let made = 0;
        const laid = unwrap(applyChange(their, layOver(their, result.value.change, () => `rest-${(made += 1)}`)));
        expect(findTileFaults(laid)).toEqual([]);
        for (const label of result.value.change.labels.after) {
          expect(laid.labels).toContainEqual(expect.objectContaining({ id: label.id, start: label.start, end: label.end, numeral: label.numeral }));
        }
      }),
    );
  });
});
