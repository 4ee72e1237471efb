import type { Draft, WrittenGrace } from './draft';
import { type Rational, parseDecimal } from './rational';
import { readAttributes, transpositionAt } from './read-attributes';
import { type NoteFacts, readNoteFacts, readPitch } from './read-note';
import { readBarline, readDirection, readSound } from './read-play-order';
import { refuse } from './refusal';
import { AT_PITCH, type Transposition, transposePitch } from './transposition';
import type { XmlElement } from './xml';

/** What a part carries from bar to bar. */
export interface PartState {
  readonly index: number;
  readonly id: string;
  staves: number;
  /** Divisions of a quarter note. */
  divisions: Rational;
  /** By staff; 0 for all. */
  readonly transpositions: Map<number, Transposition>;
  /** The file is a concert-pitch score: its pitches sound as written. */
  readonly atConcertPitch: boolean;
  /** Bars read so far. */
  bars: number;
  /** Grace notes waiting for their main note, in the bar being read. */
  graces: WrittenGrace[];
}

/** Looks at every element of a bar, with the place it stands at, before it is read; at last at the bar itself. */
export type MeasureWatcher = (element: XmlElement, bar: number, draft: Draft, part: PartState) => void;

/** Reads one bar of one part into the draft. Positions are ticks from the bar's start. */
export function readMeasure(draft: Draft, part: PartState, measure: XmlElement, watch?: MeasureWatcher): void {
  const bar = part.bars;
  part.bars += 1;
  part.graces = [];
  Object.assign(draft.cursor, { at: 0, onset: null, top: 0 });
  for (const element of measure.children) {
    watch?.(element, bar, draft, part);
    ELEMENTS[element.name]?.(draft, part, element, bar);
  }
  watch?.(measure, bar, draft, part);
  const written = draft.bars[bar];
  if (written) written.length = Math.max(written.length, draft.cursor.top);
}

const ELEMENTS: Readonly<Record<string, (draft: Draft, part: PartState, element: XmlElement, bar: number) => void>> = {
  attributes: readAttributes,
  note: readNote,
  backup: readBackup,
  forward: (draft, part, element) => moveTo(draft, draft.cursor.at + readDuration(draft, part, element), element),
  barline: readBarline,
  direction: readDirection,
  sound: readSound,
};

function readNote(draft: Draft, part: PartState, element: XmlElement, bar: number): void {
  const facts = readNoteFacts(element);
  if (facts.grace) return readGrace(draft, part, facts, bar);
  const { cursor } = draft;
  const duration = readDuration(draft, part, element, facts.duration);
  const start = facts.chord ? cursor.onset : cursor.at;
  if (start === null) {
    const { line } = element;
    return refuse('bad_note', `Line ${line}: a chord note follows no note. Export the file again.`, { line, element: 'chord' });
  }
  if (!facts.chord) {
    cursor.onset = start;
    moveTo(draft, start + duration, element);
  }
  if (facts.sounding && facts.pitch && !facts.cue) addNote(draft, part, facts, facts.pitch, start, duration, bar);
}

function addNote(draft: Draft, part: PartState, facts: NoteFacts, pitch: XmlElement, at: number, duration: number, bar: number): void {
  const { voice, staff, tieStart, tieStop } = facts;
  if (duration === 0) {
    draft.warn({ code: 'note_without_length', message: `Bar ${bar + 1} has a note of no length; it is left out.`, line: pitch.line, bar });
    return;
  }
  // A chord note longer than the first of its chord is against the rules, but sounds.
  draft.cursor.top = Math.max(draft.cursor.top, at + duration);
  if (part.graces.length > 0) attachGraces(part, voice, draft.notes.length);
  const sounding = transposePitch(readPitch(draft, pitch, bar), transpositionAt(part, staff) ?? AT_PITCH);
  draft.notes.push({ bar, part: part.index, at, duration, pitch: sounding, staff, voice, tieStart, tieStop });
}

function attachGraces(part: PartState, voice: string, mainNote: number): void {
  for (const grace of part.graces) if (grace.voice === voice) grace.mainNote = mainNote;
  part.graces = part.graces.filter((grace) => grace.voice !== voice);
}

function readGrace(draft: Draft, part: PartState, facts: NoteFacts, bar: number): void {
  if (!facts.pitch || facts.cue) return;
  const by = transpositionAt(part, facts.staff) ?? AT_PITCH;
  const pitch = transposePitch(readPitch(draft, facts.pitch, bar), by);
  const grace: WrittenGrace = { bar, part: part.index, at: draft.cursor.at, pitch, voice: facts.voice, mainNote: null };
  draft.graces.push(grace);
  part.graces.push(grace);
}

/** Longest single step in quarters: ten thousand bars of rest in one note is no score. */
const MAX_QUARTERS = 10_000;

function readDuration(draft: Draft, part: PartState, element: XmlElement, found?: XmlElement): number {
  const duration = found ?? element.children.find(({ name }) => name === 'duration');
  const { line } = element;
  if (!duration) return refuse('bad_note', `Line ${line}: a ${element.name} has no duration. Export the file again.`, { line, element: element.name });
  const value = parseDecimal(duration.text);
  const quarters = value && { num: value.num * part.divisions.den, den: value.den * part.divisions.num };
  if (!quarters || quarters.num < 0 || quarters.num > MAX_QUARTERS * quarters.den) {
    const text = duration.text.trim().slice(0, 20);
    return refuse('bad_duration', `Line ${duration.line}: a duration of “${text}” cannot be. Export the file again.`, { line: duration.line, element: 'duration' });
  }
  return draft.ticksOf(quarters, line);
}

/** Exporters that round tuplets go back a hair too far; more than this is a fault. */
const ROUNDING = 24;

function readBackup(draft: Draft, part: PartState, element: XmlElement, bar: number): void {
  const back = readDuration(draft, part, element);
  const { cursor } = draft;
  const at = cursor.at - back;
  if (at < 0 && -at * ROUNDING > draft.ticksPerQuarter) {
    const { line } = element;
    refuse('bad_backup', `Line ${line}: a backup goes back before the start of its bar. Export the file again.`, { line, element: 'backup' });
  }
  if (at < 0) draft.warn({ code: 'backup_rounded', message: `Bar ${bar + 1}: a voice begins a hair before the bar; it is moved to its start.`, line: element.line, bar });
  cursor.at = Math.max(0, at);
  cursor.onset = null;
}

function moveTo(draft: Draft, at: number, element: XmlElement): void {
  const { cursor } = draft;
  if (at > MAX_QUARTERS * draft.ticksPerQuarter) {
    const { line } = element;
    refuse('bad_duration', `Line ${line}: the bar is longer than ${MAX_QUARTERS} quarter notes. Export the file again.`, { line, element: element.name });
  }
  cursor.at = at;
  cursor.top = Math.max(cursor.top, at);
}
