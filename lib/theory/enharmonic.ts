import { type Key, isWrittenKey, signatureOf } from './key';
import type { Numeral } from './numeral';
import { type Fifths, alterOf, fifths, pitchClassOf } from './pitch';
import { type SpelledChord, spellNumeral } from './spell';

/** The same sound read in another key: the key, the numeral, and how the tones are then spelled, from the bass up. */
export interface EnharmonicReading {
  readonly key: Key;
  readonly numeral: Numeral;
  readonly chord: SpelledChord;
}

const LEADING_TONE_SEVENTH = { quality: 'diminished-seventh', applied: [], special: null, added: [] } as const;
const DOMINANT = { degree: { step: 5, alter: 0 }, quality: 'dominant-seventh', applied: [], special: null, added: [] } as const;
const GERMAN = { degree: { step: 4, alter: 1 }, quality: 'augmented-sixth-german', applied: [], special: null, added: [] } as const;

/**
 * Every key in which the sounding chord of a numeral is something else: a fully diminished seventh is vii°7 in four
 * minor keys, each inversion of it the root position of another; a dominant seventh sounds as a German sixth and back.
 * The four come from the one whose root is the bass, the numeral's own among
 * them. Of a key's two names the one with fewer accidentals is taken. [] for other chords; added tones are left out.
 * Source: Integrated Musicianship: Theory, ch. 20a.
 */
export function enharmonicReadings(key: Key, numeral: Numeral): EnharmonicReading[] {
  const chord = spellNumeral(key, { ...numeral, added: [] });
  if (numeral.quality === 'diminished-seventh') return diminishedReadings(chord);
  if (numeral.quality === 'dominant-seventh') return [germanReading(chord)];
  return numeral.quality === 'augmented-sixth-german' ? [dominantReading(chord)] : [];
}

/** Each of the four tones can be the leading tone: over the bass itself in inversion 0, of the three above in 3, 2, 1. */
function diminishedReadings({ tones, bass, root }: SpelledChord): EnharmonicReading[] {
  const bassIndex = tones.findIndex((tone) => tone.fifths === bass);
  return [0, 3, 2, 1].map((above) => {
    const leading = tones[(bassIndex + above) % 4]?.fifths as Fifths;
    const inversion = ((4 - above) % 4) as Numeral['inversion'];
    const numeral: Numeral = { ...LEADING_TONE_SEVENTH, degree: { step: 7, alter: 1 }, inversion };
    if (leading === root) return readingOf({ tonic: fifths(root - 5), mode: 'minor' }, numeral);
    return simplestReading(pitchClassOf(fifths(leading - 5)), 'minor', numeral, root - 5);
  });
}

/** V7 sounds like the German sixth in the key a half step below its tonic: GBDF, of C, is GBDE♯ in B. */
function germanReading({ root, bass, tones }: SpelledChord): EnharmonicReading {
  const inversion = germanInversionOf(tones.findIndex((tone) => tone.fifths === bass), root, tones);
  return simplestReading((pitchClassOf(root) + 4) % 12, 'major', { ...GERMAN, inversion }, root + 4);
}

/** The dominant's members in the German sixth: root is the flat sixth (inversion 1), third do (2), fifth me (3), seventh fi (0). */
function germanInversionOf(bassIndex: number, root: Fifths, tones: SpelledChord['tones']): Numeral['inversion'] {
  const rootIndex = tones.findIndex((tone) => tone.fifths === root);
  const member = (bassIndex - rootIndex + 4) % 4;
  return ((member + 1) % 4) as Numeral['inversion'];
}

/** The German sixth in C, A♭CE♭F♯, sounds like V7 of D♭: its flat sixth is the dominant's root. */
function dominantReading({ tones, bass }: SpelledChord): EnharmonicReading {
  const flatSixth = tones.find((tone) => tone.role === 'third')?.fifths as Fifths;
  const ordered = ['third', 'fifth', 'seventh', 'root'];
  const inversion = ordered.indexOf(tones.find((tone) => tone.fifths === bass)?.role ?? '') as Numeral['inversion'];
  return simplestReading((pitchClassOf(flatSixth) + 5) % 12, 'major', { ...DOMINANT, inversion }, flatSixth - 1);
}

/**
 * Of the spellings of a tonic, the written key with the fewest accidentals; between equals, the one in which the chord
 * has fewer signs, then the nearer on the line of fifths to `near`.
 */
function simplestReading(tonicPitchClass: number, mode: Key['mode'], numeral: Numeral, near: number): EnharmonicReading {
  const line = Array.from({ length: 29 }, (_, i): Key => ({ tonic: fifths(i - 14), mode }));
  const names = line.filter((key) => pitchClassOf(key.tonic) === tonicPitchClass && isWrittenKey(key));
  const written = names.map((key) => readingOf(key, numeral));
  const accidentals = ({ key }: EnharmonicReading) => Math.abs(signatureOf(key));
  const signs = ({ chord }: EnharmonicReading) => chord.tones.reduce((sum, tone) => sum + Math.abs(alterOf(tone.fifths)), 0);
  const distance = ({ key }: EnharmonicReading) => Math.abs(key.tonic - near);
  const [best] = written.toSorted((a, b) => accidentals(a) - accidentals(b) || signs(a) - signs(b) || distance(a) - distance(b));
  if (!best) throw new Error(`no written key on pitch class ${tonicPitchClass}`);
  return best;
}

function readingOf(key: Key, numeral: Numeral): EnharmonicReading {
  return { key, numeral, chord: spellNumeral(key, numeral) };
}
