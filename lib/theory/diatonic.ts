import { type Quality, type SeventhSize, type Triad, findSeventhChord, findTriad } from './chord';
import type { ConventionSheet } from './conventions';
import { type Degree, type Mode, SCALE_FIFTHS, type Step } from './key';

/**
 * What a numeral says without writing it: the triad and the seventh that a degree has in its key, and on which degree a
 * numeral stands that carries no accidental, or one.
 */

/** Distance on the line of fifths from the tonic to a step of the scale (natural minor), carried over the octave. */
function scaleTone(mode: Mode, step: number): number {
  return SCALE_FIFTHS[mode][(((step - 1) % 7) + 7) % 7] as number;
}

/** A lowered third, sixth or seventh in major is borrowed from the parallel minor, and so are the tones over it. */
function modeOfRoot(mode: Mode, degree: Degree): Mode {
  return mode === 'major' && degree.alter < 0 ? 'minor' : mode;
}

/**
 * The interval on the line of fifths from a degree's own (perhaps altered) root up to the key's tone `above` letters
 * higher: over ii in C, above 6 gives −2, the minor seventh D–C.
 */
export function keyToneAbove(mode: Mode, degree: Degree, above: number): number {
  const root = scaleTone(mode, degree.step) + 7 * degree.alter;
  return scaleTone(modeOfRoot(mode, degree), degree.step + above) - root;
}

/**
 * The triad that a key has on a degree when nothing is marked: diatonic, with the raised leading tone in minor's V
 * (VII stays on the subtonic); on an altered root, major.
 */
export function plainTriad(mode: Mode, degree: Degree): Triad {
  if (degree.alter !== 0 || (mode === 'minor' && degree.step === 5)) return 'major';
  return findTriad(keyToneAbove(mode, degree, 2), keyToneAbove(mode, degree, 4)) ?? 'major';
}

/**
 * The seventh of an unmarked seventh chord. On capital and augmented numerals it is the key's own tone (IV7 in major is
 * a major seventh, ♭VII7 takes it from the parallel minor); on small numerals it is minor; ° has a diminished one. A tone
 * that makes neither a major nor a minor seventh leaves the minor. Source: Open Music Theory v1 (figures are diatonic).
 */
export function plainSeventh(mode: Mode, degree: Degree, triad: Triad): SeventhSize {
  if (triad === 'diminished') return 'diminished';
  if (triad === 'minor') return 'minor';
  return keyToneAbove(mode, degree, 6) === 5 ? 'major' : 'minor';
}

/** Minor or major ninth over a dominant, from the key's own tone. */
export function plainNinth(mode: Mode, degree: Degree): 'major' | 'minor' {
  return keyToneAbove(mode, degree, 1) === -5 ? 'minor' : 'major';
}

/** The key's own seventh chord on the degree is half-diminished: vii in major, ii in minor. */
export function isDiatonicHalfDiminished(mode: Mode, degree: Degree): boolean {
  return degree.alter === 0 && degree.step === (mode === 'major' ? 7 : 2);
}

export function getSeventhChord(triad: Triad, seventh: SeventhSize): Quality {
  const quality = findSeventhChord(triad, seventh);
  if (!quality) throw new Error(`no seventh chord of a ${triad} triad and a ${seventh} seventh`);
  return quality;
}

type Accidentals = ConventionSheet['accidentals'];

/** Accidentals before a numeral: semitones up (+) or down (−); 'natural' is the sign ♮. */
export type Signs = number | 'natural';

/** Small numerals stand on the raised sixth and seventh of minor (vi°, vii°), capitals on the natural ones (VI, VII). */
function standsOnRaised(mode: Mode, step: Step, triad: Triad): boolean {
  return mode === 'minor' && step >= 6 && (triad === 'minor' || triad === 'diminished');
}

/** Capitals on steps that minor has low already: one ♭ before them only reminds (♭VI in minor is VI). */
function isLowInMinor(mode: Mode, step: Step, triad: Triad): boolean {
  return mode === 'minor' && (step === 3 || step >= 6) && (triad === 'major' || triad === 'augmented');
}

function isBorrowedCapital(mode: Mode, step: Step, triad: Triad): boolean {
  return mode === 'major' && (step === 3 || step >= 6) && triad === 'major';
}

/** Semitones by which the natural minor scale lies under the major scale on a step. */
function minorOffset(mode: Mode, step: Step): number {
  return mode === 'minor' && (step === 3 || step >= 6) ? 1 : 0;
}

/**
 * The degree that a numeral with these signs stands on; null when the sign ♮ says nothing here. `triad` stands for the
 * numeral's case: minor and diminished are small. Inverse of `signsOf` for all degrees.
 */
export function degreeOfSigns(mode: Mode, step: Step, signs: Signs, triad: Triad, sheet: Accidentals): Degree | null {
  if (signs === 'natural') return sheet === 'borrowed-plain' && isBorrowedCapital(mode, step, triad) ? { step, alter: 0 } : null;
  return { step, alter: alterOfSigns(mode, step, signs, triad, sheet) };
}

function alterOfSigns(mode: Mode, step: Step, signs: number, triad: Triad, sheet: Accidentals): number {
  if (sheet === 'from-major') return signs + minorOffset(mode, step);
  if (standsOnRaised(mode, step, triad)) return signs > 0 ? signs : signs + 1;
  if (isLowInMinor(mode, step, triad)) return signs < 0 ? signs + 1 : signs;
  if (sheet === 'borrowed-plain' && isBorrowedCapital(mode, step, triad)) return signs === 0 ? -1 : signs;
  return signs;
}

/** The signs to write before a numeral. Inverse of `degreeOfSigns`. */
export function signsOf(mode: Mode, degree: Degree, triad: Triad, sheet: Accidentals): Signs {
  const { step, alter } = degree;
  if (sheet === 'from-major') return alter - minorOffset(mode, step);
  if (standsOnRaised(mode, step, triad)) return alter === 1 ? 0 : alter > 1 ? alter : alter - 1;
  if (isLowInMinor(mode, step, triad)) return alter < 0 ? alter - 1 : alter;
  if (sheet === 'borrowed-plain' && isBorrowedCapital(mode, step, triad)) return plainBorrowedSigns(alter);
  return alter;
}

function plainBorrowedSigns(alter: number): Signs {
  if (alter === -1) return 0;
  return alter === 0 ? 'natural' : alter;
}
