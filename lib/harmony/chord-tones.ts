import { type Note } from '../score/score';
import { type Role } from '../theory/chord';
import { type Key } from '../theory/key';
import { type Numeral } from '../theory/numeral';
import { pitchClassOf } from '../theory/pitch';
import { type SpelledChord, spellNumeral } from '../theory/spell';
import { type ChordTone } from './reading';

/** The notes of a span, told apart by a chord. `missing` are the chord's roles that nobody sounds. */
export interface SortedNotes {
  readonly chord: SpelledChord;
  readonly tones: readonly ChordTone[];
  readonly others: readonly Note[];
  readonly missing: readonly Role[];
}

/** Sorts notes into tones of a numeral and the rest. A tone written enharmonically counts, and is said to be misspelled. */
export function sortNotes(notes: readonly Note[], key: Key, numeral: Numeral): SortedNotes {
  const chord = spellNumeral(key, numeral);
  const tones: ChordTone[] = [];
  const others: Note[] = [];
  for (const note of notes) {
    const tone = findTone(note, chord);
    if (tone) tones.push(tone);
    else others.push(note);
  }
  const heard = new Set(tones.map((tone) => tone.role));
  return { chord, tones, others, missing: chord.tones.map((tone) => tone.role).filter((role) => !heard.has(role)) };
}

function findTone(note: Note, chord: SpelledChord): ChordTone | null {
  const { pitch, id } = note;
  const exact = chord.tones.find((tone) => tone.fifths === pitch.fifths);
  if (exact) return { noteId: id, pitch, role: exact.role, misspelled: false };
  const sounding = chord.tones.find((tone) => pitchClassOf(tone.fifths) === pitchClassOf(pitch.fifths));
  return sounding ? { noteId: id, pitch, role: sounding.role, misspelled: true } : null;
}

/** Whether a note belongs to the chord, spelling apart. */
export function belongsTo(note: Note, chord: SpelledChord): boolean {
  return chord.tones.some((tone) => pitchClassOf(tone.fifths) === pitchClassOf(note.pitch.fifths));
}
