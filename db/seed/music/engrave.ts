import { XMLBuilder } from 'fast-xml-parser';
import { accidentalsOf, type WrittenNote } from './accidentals';
import { NOTE_VALUES, type NotatedEvent, type NotatedPart, type NotatedPiece, parseVoice } from './notation';

/** Divisions of the quarter note in the files written here: half a sixteenth, so that a dotted sixteenth is whole. */
const DIVISIONS = 8;
const PER_SIXTEENTH = DIVISIONS / 4;
const LETTERS = 'CDEFGAB';
const SEMITONES = [0, 2, 4, 5, 7, 9, 11];

type Element = Readonly<Record<string, unknown>>;

/** Writes a notated piece as a MusicXML 4.0 partwise document. */
export function engravePiece(piece: NotatedPiece): string {
  const builder = new XMLBuilder({ preserveOrder: true, ignoreAttributes: false, format: true, suppressEmptyNode: true });
  const body = builder.build([element('score-partwise', scoreChildren(piece), { version: '4.0' })]) as string;
  const doctype =
    '<!DOCTYPE score-partwise PUBLIC "-//Recordare//DTD MusicXML 4.0 Partwise//EN" "http://www.musicxml.org/dtds/partwise.dtd">';
  return `<?xml version="1.0" encoding="UTF-8"?>\n${doctype}${body}\n`;
}

function element(name: string, children: readonly Element[] = [], attributes?: Readonly<Record<string, string>>): Element {
  if (!attributes) return { [name]: children };
  const prefixed = Object.fromEntries(Object.entries(attributes).map(([key, value]) => [`@_${key}`, value]));
  return { [name]: children, ':@': prefixed };
}

function textElement(name: string, text: string | number, attributes?: Readonly<Record<string, string>>): Element {
  return element(name, [{ '#text': String(text) }], attributes);
}

function scoreChildren(piece: NotatedPiece): Element[] {
  const list = piece.parts.map((part, i) =>
    element('score-part', [textElement('part-name', part.name)], { id: `P${i + 1}` }),
  );
  return [
    element('work', [textElement('work-title', piece.title)]),
    element('identification', [
      textElement('creator', piece.composer, { type: 'composer' }),
      textElement('rights', piece.rights),
      element('encoding', [textElement('software', 'Understave')]),
    ]),
    element('part-list', list),
    ...piece.parts.map((part, i) => element('part', partBars(piece, part, i === 0), { id: `P${i + 1}` })),
  ];
}

function partBars(piece: NotatedPiece, part: NotatedPart, first: boolean): Element[] {
  const voices = part.voices.map((voice) => parseVoice(voice.bars));
  const count = Math.max(...voices.map((bars) => bars.length));
  return Array.from({ length: count }, (_, bar) => {
    const opening = bar === 0 ? [attributesOf(piece, part), ...(first ? tempoOf(piece) : [])] : [];
    const closing = bar === count - 1 ? [element('barline', [textElement('bar-style', 'light-heavy')], { location: 'right' })] : [];
    return element('measure', [...opening, ...barVoices(piece, part, voices, bar), ...closing], { number: String(bar + 1) });
  });
}

function barVoices(piece: NotatedPiece, part: NotatedPart, voices: readonly NotatedEvent[][][], bar: number): Element[] {
  const signs = barAccidentals(piece, part, voices, bar);
  return voices.flatMap((bars, v) => {
    const events = bars[bar] ?? [];
    const staff = (part.voices[v] as NotatedPart['voices'][number]).staff;
    const peers = part.voices.filter((voice) => voice.staff === staff).length;
    const stem = peers < 2 ? null : part.voices.findIndex((voice) => voice.staff === staff) === v ? 'up' : 'down';
    const before = isTiedIn(bars, bar, 0);
    const notes = voiceNotes(events, { part, voice: v + 1, staff, stem, before, beat: beatOf(piece), signs });
    const length = events.reduce((sum, event) => sum + event.duration * PER_SIXTEENTH, 0);
    return v === voices.length - 1 ? notes : [...notes, element('backup', [textElement('duration', length)])];
  });
}

/** Length of the felt beat in sixteenths: dotted in compound metres. */
function beatOf(piece: NotatedPiece): number {
  return piece.time[1] === 8 && piece.time[0] % 3 === 0 ? 6 : 16 / piece.time[1];
}

function isTiedIn(bars: readonly NotatedEvent[][], bar: number, event: number): boolean {
  const earlier = event > 0 ? bars[bar]?.[event - 1] : bars.slice(0, bar).flat().at(-1);
  return earlier?.tied ?? false;
}

/** Signs of all staves of a bar, keyed `voice:event:pitch`. */
function barAccidentals(piece: NotatedPiece, part: NotatedPart, voices: readonly NotatedEvent[][][], bar: number): ReadonlyMap<string, string> {
  const staves = part.clefs.map((_, i) => {
    const notes = voices.flatMap((bars, v) => (part.voices[v]?.staff === i + 1 ? writtenNotes(bars, bar, v + 1, part) : []));
    return accidentalsOf(notes, piece.keyFifths - transposedFifths(part));
  });
  return new Map(staves.flatMap((signs) => [...signs]));
}

function writtenNotes(bars: readonly NotatedEvent[][], bar: number, voice: number, part: NotatedPart): WrittenNote[] {
  let onset = 0;
  return (bars[bar] ?? []).flatMap((event, e) => {
    const start = onset;
    onset += event.duration;
    const tiedIn = isTiedIn(bars, bar, e);
    return event.pitches.map((pitch) => ({ place: `${voice}:${e}:${pitch}`, onset: start, tiedIn, ...writtenPitch(pitch, part.transpose) }));
  });
}

interface VoicePlace {
  readonly part: NotatedPart;
  readonly voice: number;
  readonly staff: number;
  readonly stem: 'up' | 'down' | null;
  /** Length of the felt beat in sixteenths. */
  readonly beat: number;
  /** The event before the bar was tied into it. */
  readonly before: boolean;
  readonly signs: ReadonlyMap<string, string>;
}

function voiceNotes(events: readonly NotatedEvent[], place: VoicePlace): Element[] {
  const beams = beamsOf(events, place.beat);
  return events.flatMap((event, i) => {
    const tiedIn = i === 0 ? place.before : (events[i - 1]?.tied ?? false);
    return eventNotes(event, place, { index: i, tiedIn, beams: beams[i] ?? [] });
  });
}

interface EventPlace {
  readonly index: number;
  readonly tiedIn: boolean;
  readonly beams: readonly Element[];
}

function eventNotes(event: NotatedEvent, place: VoicePlace, { index, tiedIn, beams }: EventPlace): Element[] {
  const pitches = event.pitches.length === 0 ? [null] : event.pitches;
  return pitches.map((pitch, i) => {
    const ties = pitch === null ? [] : tieMarks(event.tied, tiedIn);
    const sign = place.signs.get(`${place.voice}:${index}:${pitch}`);
    return element('note', [
      ...(i > 0 ? [element('chord')] : []),
      pitch === null ? element('rest') : pitchElement(pitch, place.part.transpose),
      textElement('duration', event.duration * PER_SIXTEENTH),
      ...ties.map((type) => element('tie', [], { type })),
      textElement('voice', place.voice),
      textElement('type', NOTE_VALUES[event.value]),
      ...Array.from({ length: event.dots }, () => element('dot')),
      ...(sign ? [textElement('accidental', sign)] : []),
      ...(place.stem && pitch !== null && event.value !== 'w' ? [textElement('stem', place.stem)] : []),
      ...(place.part.clefs.length > 1 ? [textElement('staff', place.staff)] : []),
      ...(i === 0 ? beams : []),
      ...(ties.length > 0 ? [element('notations', ties.map((type) => element('tied', [], { type })))] : []),
    ]);
  });
}

function tieMarks(tied: boolean, tiedIn: boolean): ('start' | 'stop')[] {
  return [...(tiedIn ? (['stop'] as const) : []), ...(tied ? (['start'] as const) : [])];
}

/** Beams join runs of eighths and sixteenths within a felt beat, `beat` sixteenths long. */
function beamsOf(events: readonly NotatedEvent[], beat: number): Element[][] {
  let at = 0;
  const places = events.map((event) => {
    const start = at;
    at += event.duration;
    return { group: Math.floor(start / beat), short: event.pitches.length > 0 && event.duration < 4 };
  });
  return events.map((event, i) => {
    const here = places[i] as (typeof places)[number];
    if (!here.short) return [];
    const joins = (other: (typeof places)[number] | undefined) => !!other?.short && other.group === here.group;
    const [back, on] = [joins(places[i - 1]), joins(places[i + 1])];
    if (!back && !on) return [];
    const type = back && on ? 'continue' : back ? 'end' : 'begin';
    const second = event.value === 's' ? [textElement('beam', sixteenthBeam(events, i, type), { number: '2' })] : [];
    return [textElement('beam', type, { number: '1' }), ...second];
  });
}

function sixteenthBeam(events: readonly NotatedEvent[], i: number, type: string): string {
  const back = events[i - 1]?.value === 's' && type !== 'begin';
  const on = events[i + 1]?.value === 's' && type !== 'end';
  if (back && on) return 'continue';
  if (back) return 'end';
  if (on) return 'begin';
  return type === 'begin' ? 'forward hook' : 'backward hook';
}

/** A sounding pitch as written for the part: the transposition is taken back. */
function writtenPitch(text: string, transpose: NotatedPart['transpose']): { letter: string; octave: number; alter: number } {
  const match = /^([a-g])(#*|b*)(\d)$/.exec(text);
  if (!match) throw new Error(`unreadable pitch "${text}"`);
  const step = LETTERS.indexOf((match[1] as string).toUpperCase());
  const accidentals = match[2] as string;
  const alter = accidentals.startsWith('b') ? -accidentals.length : accidentals.length;
  const sounding = { diatonic: 7 * Number(match[3]) + step, chromatic: 12 * Number(match[3]) + (SEMITONES[step] as number) + alter };
  const diatonic = sounding.diatonic - (transpose?.diatonic ?? 0);
  const chromatic = sounding.chromatic - (transpose?.chromatic ?? 0);
  const octave = Math.floor(diatonic / 7);
  const letter = diatonic - 7 * octave;
  return { letter: LETTERS.charAt(letter), octave, alter: chromatic - 12 * octave - (SEMITONES[letter] as number) };
}

function pitchElement(text: string, transpose: NotatedPart['transpose']): Element {
  const { letter, octave, alter } = writtenPitch(text, transpose);
  return element('pitch', [
    textElement('step', letter),
    ...(alter === 0 ? [] : [textElement('alter', alter)]),
    textElement('octave', octave),
  ]);
}

function attributesOf(piece: NotatedPiece, part: NotatedPart): Element {
  const fifths = piece.keyFifths - transposedFifths(part);
  return element('attributes', [
    textElement('divisions', DIVISIONS),
    element('key', [textElement('fifths', fifths), textElement('mode', piece.mode)]),
    element('time', [textElement('beats', piece.time[0]), textElement('beat-type', piece.time[1])]),
    ...(part.clefs.length > 1 ? [textElement('staves', part.clefs.length)] : []),
    ...part.clefs.map((clef, i) =>
      element(
        'clef',
        [textElement('sign', clef.charAt(0)), textElement('line', clef.slice(1))],
        part.clefs.length > 1 ? { number: String(i + 1) } : undefined,
      ),
    ),
    ...(part.transpose
      ? [element('transpose', [textElement('diatonic', part.transpose.diatonic), textElement('chromatic', part.transpose.chromatic)])]
      : []),
  ]);
}

/** How far the sounding key lies up the line of fifths from the written one: a B flat instrument −2. */
function transposedFifths(part: NotatedPart): number {
  return part.transpose ? 7 * part.transpose.chromatic - 12 * part.transpose.diatonic : 0;
}

function tempoOf(piece: NotatedPiece): Element[] {
  if (!piece.tempo) return [];
  return [
    element('direction', [element('direction-type', [textElement('words', piece.tempo, { 'font-weight': 'bold' })])], {
      placement: 'above',
    }),
  ];
}
