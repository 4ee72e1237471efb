/** A written note of one bar and staff, in the order of reading. `place` names it to the caller. */
export interface WrittenNote {
  readonly place: string;
  /** In sixteenths from the start of the bar. */
  readonly onset: number;
  readonly letter: string;
  readonly octave: number;
  readonly alter: number;
  /** Tied in from the note before: no sign is repeated. */
  readonly tiedIn: boolean;
}

const SHARPS = 'FCGDAEB';
const SIGNS: Readonly<Record<number, string>> = { [-2]: 'flat-flat', [-1]: 'flat', 0: 'natural', 1: 'sharp', 2: 'double-sharp' };

/** What the signature does to a letter: +1 for the letters of its sharps, −1 for those of its flats. */
function alterBySignature(letter: string, keyFifths: number): number {
  const place = SHARPS.indexOf(letter);
  if (keyFifths > 0) return place < keyFifths ? 1 : 0;
  return 6 - place < -keyFifths ? -1 : 0;
}

/**
 * The signs that a bar of one staff needs, place → MusicXML accidental: a note that differs from what the signature,
 * or an earlier sign in the bar on the same line or space, says. Common practice, no source.
 */
export function accidentalsOf(notes: readonly WrittenNote[], keyFifths: number): ReadonlyMap<string, string> {
  const inForce = new Map<string, number>();
  const signs = new Map<string, string>();
  for (const note of [...notes].sort((a, b) => a.onset - b.onset)) {
    const line = `${note.letter}${note.octave}`;
    const expected = inForce.get(line) ?? alterBySignature(note.letter, keyFifths);
    if (note.alter === expected || note.tiedIn) continue;
    signs.set(note.place, SIGNS[note.alter] as string);
    inForce.set(line, note.alter);
  }
  return signs;
}
