import { describe, expect, it } from 'vitest';
import { proposeReading } from '@/lib/harmony/propose';
import { formatNumeral } from '@/lib/theory/numeral-format';
import { equalKeys } from '@/lib/theory/key';
import { realise } from '../support/chorale';
import { key, numeral } from '../support/numerals';

/**
 * Named phenomena in short block-chord progressions: what is written out from the numerals of a book is read back as those
 * numerals. Sources beside the rows: OMT = Open Music Theory v1 (CC BY-SA 4.0); IMT = Integrated Musicianship: Theory (facts
 * only). The frames around the chords in question (I … V7 I) are common practice, no source.
 */
function readBack(keyText: string, progression: string): string {
  const own = key(keyText);
  const score = realise(own, progression.split(' ').map((text) => numeral(keyText, text)));
  return proposeReading(score)
    .labels.map((label) => `${equalKeys(label.key, own) ? '' : '(other key) '}${label.numeral ? formatNumeral(label.numeral, label.key.mode) : '_'}`)
    .join(' ');
}

function asWritten(keyText: string, progression: string): string {
  return progression.split(' ').map((text) => formatNumeral(numeral(keyText, text), key(keyText).mode)).join(' ');
}

const PROGRESSIONS: readonly (readonly [phenomenon: string, keyText: string, progression: string])[] = [
  // OMT, applied chords; IMT 14b–c.
  ['vii°7 of the dominant', 'C', 'I IV viio7/V V I6 V7 I'],
  ['viiø7 of the dominant', 'D', 'I vi viiø7/V V V7 I'],
  ['vii°7 of ii', 'C', 'I viio7/ii ii V7 I'],
  ['vii°7 of vi', 'Eb', 'I viio7/vi vi ii6 V7 I'],
  ['vii°7 of iv in minor', 'c', 'i viio7/iv iv V7 i'],
  ['V7 of the dominant', 'Eb', 'I V7/V V V7 I'],
  ['V65 of IV', 'G', 'I V65/IV IV V7 I'],
  // IMT 18a; OMT altered subdominants.
  ['Italian sixth', 'c', 'i iv6 It6 V V7 i'],
  ['French sixth', 'a', 'i iv6 Fr43 V V7 i'],
  ['German sixth through the six-four', 'e', 'i Ger65 Cad64 V7 i'],
  // IMT 16b.
  ['Neapolitan sixth', 'c', 'i N6 V7 i'],
  ['Neapolitan sixth', 'f#', 'i N6 V7 i'],
  // IMT 11d; OMT cadence types.
  ['cadential six-four', 'C', 'I ii6 Cad64 V7 I'],
  // IMT 16a; OMT modal mixture.
  ['mixture: minor iv in major', 'C', 'I IV iv I V7 I'],
  ['mixture: ♭VI in major', 'D', 'I V bVI iv V7 I'],
  // OMT functional dissonances; IMT 14b.
  ['vii°7 in its positions', 'c', 'i viio65 i6 viio43 i6 V7 i'],
  ['half-diminished supertonic', 'g', 'i iiø65 V7 i'],
];

describe('phenomena of the books, read back', () => {
  it.each(PROGRESSIONS)('%s in %s: %s', (_, keyText, progression) => {
    expect(readBack(keyText, progression)).toBe(asWritten(keyText, progression));
  });
});
