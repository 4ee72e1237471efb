import type { Reading } from '../harmony/reading';
import { signFramed } from './frame';
import type { Framed, Moment } from './key-reading';

/** What a reading says over a stretch of time: a chord, or null for a blank. */
export interface Piece {
  readonly start: Moment;
  readonly end: Moment;
  readonly chord: Framed | null;
}

/** The labels of a reading with neighbours that say the same joined: writing a chord twice is no change of chord. */
export function piecesOf(reading: Pick<Reading, 'labels'>): Piece[] {
  const joined: Piece[] = [];
  for (const label of reading.labels) {
    const chord = label.numeral && { key: label.key, numeral: label.numeral };
    const last = joined.at(-1);
    if (last && last.end === label.start && isSameChord(last.chord, chord)) joined[joined.length - 1] = { ...last, end: label.end };
    else joined.push({ start: label.start, end: label.end, chord });
  }
  return joined;
}

export function isSameChord(a: Framed | null, b: Framed | null): boolean {
  return a && b ? signFramed(a) === signFramed(b) : a === b;
}

/** The pieces that sound within [start, end), not clipped. */
export function piecesWithin(pieces: readonly Piece[], start: Moment, end: Moment): Piece[] {
  return pieces.filter((piece) => piece.start < end && piece.end > start);
}

/** Ticks that a piece covers of [start, end). */
export function overlapOf(piece: Piece, start: Moment, end: Moment): number {
  return Math.max(0, Math.min(piece.end, end) - Math.max(piece.start, start));
}
