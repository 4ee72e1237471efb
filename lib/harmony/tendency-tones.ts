import { type Note } from '../score/score';
import { type Key } from '../theory/key';
import { type Numeral } from '../theory/numeral';
import { type Fifths, type Pitch, diatonicOf, midiOf, pitchClassOf, letterOf, LETTERS } from '../theory/pitch';
import { type Tendency, tendenciesOf } from '../theory/tendencies';
import { type Resolution, type TendencyTone } from './reading';
import { type VoiceIndex } from './voices';

export interface TendencySpan {
  readonly start: number;
  readonly end: number;
  /** Where the next chord ends: a resolution inside it is merely delayed. */
  readonly nextEnd: number;
  readonly voices: VoiceIndex;
}

/** The tones of a chord that want to move, one per sounding voice and octave, and what becomes of each. */
export function findTendencyTones(notes: readonly Note[], key: Key, numeral: Numeral, span: TendencySpan): readonly TendencyTone[] {
  const { tones } = tendenciesOf(key, numeral);
  return tones.flatMap((tendency) => lastOfVoices(notes.filter((note) => sounds(note, tendency.fifths))).map((note) => follow(note, tendency, span)));
}

function sounds(note: Note, f: Fifths): boolean {
  return pitchClassOf(note.pitch.fifths) === pitchClassOf(f);
}

/** Of the same pitch repeated in one voice only the last wants to resolve. */
function lastOfVoices(notes: readonly Note[]): readonly Note[] {
  const last = new Map<string, Note>();
  for (const note of notes) last.set(`${note.part} ${note.voice} ${midiOf(note.pitch)}`, note);
  return [...last.values()];
}

function follow(note: Note, tendency: Tendency, span: TendencySpan): TendencyTone {
  const expected = nearest(note.pitch, tendency.expected[0]!);
  const { went, resolution } = resolve(note, tendency, span);
  return {
    noteId: note.id,
    pitch: note.pitch,
    kind: tendency.kind,
    expected,
    went: went?.pitch ?? null,
    wentNoteId: went?.id ?? null,
    resolution,
    reason: tendency.reason,
  };
}

/** The pitch of a spelled class nearest to another pitch. */
function nearest(from: Pitch, f: Fifths): Pitch {
  const place = LETTERS.indexOf(letterOf(f));
  const candidates = [-1, 0, 1].map((shift) => ({ fifths: f, octave: from.octave + shift }));
  const distance = (pitch: Pitch) => Math.abs(7 * pitch.octave + place - diatonicOf(from));
  return candidates.reduce((best, pitch) => (distance(pitch) < distance(best) ? pitch : best));
}

function isStep(a: Note, b: Note): boolean {
  return Math.abs(midiOf(a.pitch) - midiOf(b.pitch)) <= 2 && midiOf(a.pitch) !== midiOf(b.pitch);
}

/**
 * Follows the voice past the chord's end: straight there, later within the next chord, in another voice, otherwise, or not
 * at all. Tones that the voice still gives to the same chord (an arpeggio) are passed over; after an arpeggio the tone may
 * come anywhere in the next one.
 */
function resolve(note: Note, tendency: Tendency, span: TendencySpan): { went: Note | null; resolution: Resolution } {
  const goesWell = (next: Note) => tendency.expected.some((f) => sounds(next, f)) && isStep(note, next);
  const line = followLine(note, span);
  const at = line.findIndex(goesWell);
  const found = line[at];
  const within = line.filter((next) => next.start < span.end).length;
  const isPrompt = within > 0 || (at === 0 && found !== undefined && found.start <= span.end);
  if (found) return { went: found, resolution: isPrompt ? 'as-expected' : 'delayed' };
  const elsewhere = findElsewhere(note, tendency, span);
  if (elsewhere) return { went: elsewhere, resolution: 'in-another-voice' };
  const next = line[within];
  if (!next || note.start + note.duration >= span.nextEnd) return { went: null, resolution: 'unresolved' };
  return { went: next, resolution: sounds(next, note.pitch.fifths) ? 'unresolved' : 'irregular' };
}

const LONGEST_LINE = 24;

/** The notes that follow in the voice, up to the end of the next chord. */
function followLine(note: Note, { voices, nextEnd }: TendencySpan): readonly Note[] {
  const line: Note[] = [];
  for (let next = voices.after(note); next && next.start < nextEnd && line.length < LONGEST_LINE; next = voices.after(next)) line.push(next);
  return line;
}

/** Another voice that takes the expected tone at the tendency's own height, just as the chord changes. */
function findElsewhere(note: Note, tendency: Tendency, { end, voices }: TendencySpan): Note | null {
  const there = voices.soundingIn(end, end + 1).filter((other) => other.start === end);
  return there.find((other) => tendency.expected.some((f) => sounds(other, f)) && isStep(note, other)) ?? null;
}
