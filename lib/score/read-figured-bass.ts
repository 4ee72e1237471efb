import { type Key, type Step, degreeOfFifths, fifthsOfDegree } from '../theory/key';
import { nameChord } from '../theory/name-chord';
import type { Numeral } from '../theory/numeral';
import { type Fifths, fifths, midiOf } from '../theory/pitch';
import { parseInteger } from './rational';
import type { Note, Score } from './score';
import { type XmlElement, findText } from './xml';

/**
 * The chord of a `figured-bass` element: figures over the lowest note of its part at that time, each a step of the key
 * above it, altered by its sign. Source of what figures imply: Open Music Theory v1 (CC BY-SA 4.0), "Thoroughbass
 * figures": a fifth unless a 6 is present, a third unless a 4 or 2 is; a lone sign alters the third. In minor the third
 * over the dominant is raised only where the figures say so. null when there is no bass or the tones make no chord.
 */
export function nameFiguredBass(element: XmlElement, score: Score, part: number, start: number, key: Key): Numeral | null {
  const bass = findBass(score.notes, part, start);
  if (!bass) return null;
  const figures = impliedFigures(readFigures(element));
  const tones = figures.map(({ number, alter, natural }) => toneAbove(key, bass.pitch.fifths, number, alter, natural));
  return nameChord(key, { bass: bass.pitch.fifths, tones })[0] ?? null;
}

function findBass(notes: readonly Note[], part: number, start: number): Note | undefined {
  const sounding = notes.filter((note) => note.part === part && note.start <= start && note.start + note.duration > start);
  return sounding.sort((a, b) => midiOf(a.pitch) - midiOf(b.pitch))[0];
}

interface Figure {
  readonly number: number;
  /** Semitones from the key's own note; a natural sign goes to the plain letter instead. */
  readonly alter: number;
  readonly natural: boolean;
}

const SIGNS: Readonly<Record<string, number>> = {
  sharp: 1, flat: -1, 'double-sharp': 2, 'flat-flat': -2, slash: 1, 'back-slash': 1, cross: 1, vertical: 1, plus: 1,
};

function readFigures(element: XmlElement): Figure[] {
  return element.children.flatMap((figure) => {
    if (figure.name !== 'figure') return [];
    const sign = (findText(figure, 'prefix') ?? '') || (findText(figure, 'suffix') ?? '');
    const number = parseInteger(findText(figure, 'figure-number') || '3');
    return number !== undefined && number >= 2 && number <= 9 ? [{ number, alter: SIGNS[sign] ?? 0, natural: sign === 'natural' }] : [];
  });
}

function impliedFigures(written: readonly Figure[]): Figure[] {
  const has = (...numbers: number[]) => numbers.some((number) => written.some((figure) => figure.number === number));
  const isSecond = has(2);
  const isFourThree = has(4) && has(3) && !has(5);
  const implied = [
    ...(has(5, 6) || isSecond || isFourThree ? [] : [5]),
    ...(has(3, 4) || isSecond ? [] : [3]),
    ...((isSecond || isFourThree) && !has(5, 6) ? [6] : []),
    ...(isSecond && !has(4, 5) ? [4] : []),
  ];
  return [...written, ...implied.map((number) => ({ number, alter: 0, natural: false }))];
}

function toneAbove(key: Key, bass: Fifths, number: number, alter: number, natural: boolean): Fifths {
  const step = (((degreeOfFifths(key, bass).step - 1 + number - 1) % 7) + 1) as Step;
  const own = fifthsOfDegree(key, { step, alter: 0 });
  // Letters without accidental are the seven places from F (−1) to B (5).
  return natural ? fifths(((((own + 1) % 7) + 7) % 7) - 1) : fifths(own + 7 * alter);
}
