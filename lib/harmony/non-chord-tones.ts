import { type Note } from '../score/score';
import { diatonicOf, midiOf } from '../theory/pitch';
import { type SpelledChord } from '../theory/spell';
import { belongsTo } from './chord-tones';
import { type NonChordKind, type NonChordTone } from './reading';
import { type VoiceIndex } from './voices';

/** What is needed to judge a note that does not belong: its span, and the chords around. */
export interface Surroundings {
  readonly start: number;
  readonly end: number;
  readonly chord: SpelledChord;
  readonly chordBefore: SpelledChord | null;
  readonly chordAfter: SpelledChord | null;
  readonly voices: VoiceIndex;
}

/**
 * Names a note outside the chord by how it is approached and left.
 * Source: Open Music Theory v1 (CC BY-SA 4.0), embellishing tones: passing step–step on, neighbour step–step back,
 * appoggiatura leap–step, escape step–leap, anticipation the next chord's note early, suspension held–step down,
 * retardation held–step up, pedal held through changes.
 */
export function nameNonChordTone(note: Note, around: Surroundings): NonChordTone {
  const before = around.voices.before(note);
  const after = around.voices.after(note);
  const kind = findKind(note, before, after, around);
  return { noteId: note.id, pitch: note.pitch, kind, from: before?.pitch ?? null, to: after?.pitch ?? null };
}

function findKind(note: Note, before: Note | null, after: Note | null, around: Surroundings): NonChordKind {
  if (isPedal(note, around)) return 'pedal';
  const left = after ? stepsFrom(note, after) : null;
  if (isPrepared(note, before, around) && left !== null && Math.abs(left) === 1) return left < 0 ? 'suspension' : 'retardation';
  if (isAnticipation(note, after, around)) return 'anticipation';
  const come = before ? stepsFrom(before, note) : null;
  if (come !== null && left !== null) return bySteps(note, come, left, before, after, around);
  if (left !== null && Math.abs(left) === 1) return 'appoggiatura';
  return 'other';
}

function bySteps(note: Note, come: number, left: number, before: Note | null, after: Note | null, around: Surroundings): NonChordKind {
  const cameByStep = Math.abs(come) === 1 || (come === 0 && isHalfStep(before, note));
  const leftByStep = Math.abs(left) === 1 || (left === 0 && isHalfStep(note, after));
  if (cameByStep && leftByStep) return Math.sign(come || left) === Math.sign(left || come) ? 'passing' : 'neighbour';
  if (isDoubleNeighbour(note, before, after, around)) return 'double-neighbour';
  if (!cameByStep && leftByStep) return 'appoggiatura';
  return cameByStep ? 'escape' : 'other';
}

/** Chromatic half steps keep their letter: C–C♯. */
function isHalfStep(a: Note | null, b: Note | null): boolean {
  return a !== null && b !== null && Math.abs(midiOf(a.pitch) - midiOf(b.pitch)) === 1;
}

function stepsFrom(a: Note, b: Note): number {
  return diatonicOf(b.pitch) - diatonicOf(a.pitch);
}

/** Held over from the chord before, or struck again at its height, where it belonged. */
function isPrepared(note: Note, before: Note | null, { start, chordBefore }: Surroundings): boolean {
  const held = note.start < start;
  const repeated = note.start === start && before !== null && midiOf(before.pitch) === midiOf(note.pitch);
  return (held || repeated) && chordBefore !== null && belongsTo(note, chordBefore);
}

function isAnticipation(note: Note, after: Note | null, { end, chordAfter }: Surroundings): boolean {
  if (!after || !chordAfter || note.start + note.duration > end) return false;
  return midiOf(after.pitch) === midiOf(note.pitch) && after.start >= end && belongsTo(note, chordAfter);
}

/** Sounds before the chord and after it as well. */
function isPedal(note: Note, { start, end }: Surroundings): boolean {
  return note.start < start && note.start + note.duration > end;
}

/** Two notes on either side of one chord tone: C (D B) C. The pair's outer notes are the same. */
function isDoubleNeighbour(note: Note, before: Note | null, after: Note | null, { voices, chord }: Surroundings): boolean {
  const around = (first: Note | null, second: Note | null) => {
    const outer = first && voices.before(first);
    const back = second && voices.after(second);
    if (!first || !second || !outer || !back || diatonicOf(outer.pitch) !== diatonicOf(back.pitch) || !belongsTo(outer, chord)) return false;
    return Math.abs(stepsFrom(outer, first)) === 1 && stepsFrom(outer, first) === -stepsFrom(outer, second);
  };
  return around(note, after) || around(before, note);
}
