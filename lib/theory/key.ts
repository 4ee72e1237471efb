import { type Result, err, ok } from '../result';
import { type Fifths, type Letter, fifths, fifthsOf, formatPitchClass, formatPitchClassForPeople } from './pitch';

export const MODES = ['major', 'minor'] as const;
export type Mode = (typeof MODES)[number];

/** A key: its tonic on the line of fifths and its mode. */
export interface Key {
  readonly tonic: Fifths;
  readonly mode: Mode;
}

/**
 * Degrees as distances from the tonic on the line of fifths: the major scale, and the natural minor scale.
 * `alter` of a degree counts semitones (7 fifths each) against these: vii° in minor is step 7, alter +1.
 */
export const SCALE_FIFTHS: Readonly<Record<Mode, readonly number[]>> = {
  major: [0, 2, 4, -1, 1, 3, 5],
  minor: [0, 2, -3, -1, 1, -4, -2],
};

export const STEPS = [1, 2, 3, 4, 5, 6, 7] as const;
export type Step = (typeof STEPS)[number];

/** A scale degree: step 1–7, `alter` in semitones against the major scale, or in minor against the natural minor scale. */
export interface Degree {
  readonly step: Step;
  readonly alter: number;
}

/** The spelled pitch class of a degree in a key. */
export function fifthsOfDegree(key: Key, degree: Degree): Fifths {
  return fifths(key.tonic + (SCALE_FIFTHS[key.mode][degree.step - 1] as number) + 7 * degree.alter);
}

/** The degree of a spelled pitch class in a key; the letter decides the step. Total: every spelling has a degree. */
export function degreeOfFifths(key: Key, f: Fifths): Degree {
  const relative = f - key.tonic;
  const scale = SCALE_FIFTHS[key.mode];
  for (const step of STEPS) {
    const rest = relative - (scale[step - 1] as number);
    if (rest % 7 === 0) return { step, alter: rest / 7 };
  }
  throw new Error('seven letters cover the line of fifths');
}

/** Number of sharps (positive) or flats (negative) in the key's signature. */
export function signatureOf(key: Key): number {
  return key.mode === 'major' ? key.tonic : key.tonic - 3;
}

/** `Eb major`, `C# minor`: the form of the command line and of reports. */
export function formatKey(key: Key): string {
  return `${formatPitchClass(key.tonic)} ${key.mode}`;
}

/** `E♭ major`, `c♯ minor` (minor tonics in lower case, as in print). */
export function formatKeyForPeople(key: Key): string {
  const name = formatPitchClassForPeople(key.tonic);
  return key.mode === 'major' ? `${name} major` : `${name.charAt(0).toLowerCase()}${name.slice(1)} minor`;
}

export function equalKeys(a: Key, b: Key): boolean {
  return a.tonic === b.tonic && a.mode === b.mode;
}

/** `offset` is 0-based in the text as typed. */
export interface KeyError {
  readonly offset: number;
  readonly message: string;
}

const NO_TONIC = 'A key begins with its tonic, a letter from A to G: Eb major, c# minor.';
const TONIC = /^\s*([A-Ga-g])[\s-]*(sharp|flat|##|#|bb|b|♯♯|♯|♭♭|♭|𝄪|𝄫)?/u;
const MODE = /^\s*(major|minor|maj\.?|min\.?)?\s*$/i;
const SHARPS: Readonly<Record<string, number>> = { sharp: 1, '#': 1, '♯': 1, '##': 2, '♯♯': 2, '𝄪': 2 };
const FLATS: Readonly<Record<string, number>> = { flat: -1, b: -1, '♭': -1, bb: -2, '♭♭': -2, '𝄫': -2 };

/**
 * Reads `Eb major`, `c# minor`, `f♯ minor`, `B-flat major`, `F sharp minor`, and a tonic alone, where a capital is
 * major and a small letter minor: `Eb`, `c#`. When the mode is written, the tonic's case says nothing.
 */
export function parseKey(text: string): Result<Key, KeyError> {
  const tonic = TONIC.exec(text);
  if (!tonic) return err({ offset: text.length - text.trimStart().length, message: NO_TONIC });
  const [taken, letter = '', sign = ''] = tonic;
  const mode = MODE.exec(text.slice(taken.length));
  if (!mode) return err({ offset: taken.length, message: `Expected “major” or “minor” after the tonic ${taken.trim()}.` });
  const isCapital = letter === letter.toUpperCase();
  const alter = SHARPS[sign] ?? FLATS[sign] ?? 0;
  return ok({ tonic: fifthsOf(letter.toUpperCase() as Letter, alter), mode: modeOfWord(mode[1], isCapital) });
}

function modeOfWord(word: string | undefined, isCapital: boolean): Mode {
  if (word) return word.toLowerCase().startsWith('maj') ? 'major' : 'minor';
  return isCapital ? 'major' : 'minor';
}

/** The thirty keys with up to seven sharps or flats, from the flat side to the sharp side, major before minor. */
export const KEYS: readonly Key[] = Array.from({ length: 15 }, (_, i) => i - 7).flatMap((signature) =>
  MODES.map((mode) => ({ tonic: fifths(mode === 'major' ? signature : signature + 3), mode })),
);

/** Whether the key has a signature that is written in practice (at most seven sharps or flats). */
export function isWrittenKey(key: Key): boolean {
  return Math.abs(signatureOf(key)) <= 7;
}
