import { type Result, err, ok } from '../result';

/**
 * A spelled pitch class as its place on the line of fifths: … B♭ −2, F −1, C 0, G 1, D 2 … F♯ 6 …
 * Seven steps up the line raise the same letter by a semitone. Spelling is never lost: F♯ (6) is not G♭ (−6).
 */
export type Fifths = number & { readonly unit: 'fifths' };

/** A sounding, spelled pitch. `octave` is the scientific octave of the letter: C4 is middle C, B♯3 sounds as C4. */
export interface Pitch {
  readonly fifths: Fifths;
  readonly octave: number;
}

export const LETTERS = ['C', 'D', 'E', 'F', 'G', 'A', 'B'] as const;
export type Letter = (typeof LETTERS)[number];

const LETTER_FIFTHS: Readonly<Record<Letter, number>> = { F: -1, C: 0, G: 1, D: 2, A: 3, E: 4, B: 5 };
const LINE: readonly Letter[] = ['F', 'C', 'G', 'D', 'A', 'E', 'B'];
const LETTER_SEMITONES: Readonly<Record<Letter, number>> = { C: 0, D: 2, E: 4, F: 5, G: 7, A: 9, B: 11 };

export function fifths(value: number): Fifths {
  return value as Fifths;
}

/** Place on the line of fifths of a letter altered by `alter` semitones. */
export function fifthsOf(letter: Letter, alter: number): Fifths {
  return fifths(LETTER_FIFTHS[letter] + 7 * alter);
}

export function letterOf(f: Fifths): Letter {
  return LINE[(((f + 1) % 7) + 7) % 7] as Letter;
}

/** Alteration of the letter in semitones: F♯ +1, B♭♭ −2. */
export function alterOf(f: Fifths): number {
  return Math.floor((f + 1) / 7);
}

/** Pitch class in semitones above C, 0–11. */
export function pitchClassOf(f: Fifths): number {
  return (((f * 7) % 12) + 12) % 12;
}

/** MIDI key number: C4 is 60. Not bounded: B♯9 and C♭−1 give what the arithmetic says. */
export function midiOf(p: Pitch): number {
  return 12 * (p.octave + 1) + LETTER_SEMITONES[letterOf(p.fifths)] + alterOf(p.fifths);
}

/** Diatonic number of the letter: C0 is 0, D0 is 1, C4 is 28. A step is a difference of one. */
export function diatonicOf(p: Pitch): number {
  return 7 * p.octave + LETTERS.indexOf(letterOf(p.fifths));
}

/** ASCII name, as in reports and files: `F#`, `Bbb`. */
export function formatPitchClass(f: Fifths): string {
  const alter = alterOf(f);
  return letterOf(f) + (alter < 0 ? 'b'.repeat(-alter) : '#'.repeat(alter));
}

/** Name for people, with musical signs: `F♯`, `B𝄫`, `C𝄪`. */
export function formatPitchClassForPeople(f: Fifths): string {
  const alter = alterOf(f);
  const sign = alter === 2 ? '𝄪' : alter === -2 ? '𝄫' : alter < 0 ? '♭'.repeat(-alter) : '♯'.repeat(alter);
  return letterOf(f) + sign;
}

export interface PitchError {
  readonly kind: 'pitch_unreadable';
  readonly text: string;
}

/** Reads `F#`, `F♯`, `Bb`, `B♭♭`, `C𝄪` (any number of signs, not mixed); the letter in either case. */
export function parsePitchClass(text: string): Result<Fifths, PitchError> {
  const match = /^([A-Ga-g])((?:#|♯|𝄪)*|(?:b|♭|𝄫)*)$/u.exec(text);
  if (!match) return err({ kind: 'pitch_unreadable', text });
  const signs = [...(match[2] ?? '')];
  const alter = signs.reduce((sum, s) => sum + (s === '𝄪' ? 2 : s === '𝄫' ? -2 : s === '#' || s === '♯' ? 1 : -1), 0);
  return ok(fifthsOf((match[1] as string).toUpperCase() as Letter, alter));
}
