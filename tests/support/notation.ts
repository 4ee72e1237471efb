import { gcd, lcm } from '@/lib/score/rational';
import { type Bar, type KeySignature, type Note, type Score, ticks } from '@/lib/score/score';
import { type Key, signatureOf } from '@/lib/theory/key';
import { type Letter, type Pitch, fifthsOf, midiOf } from '@/lib/theory/pitch';

/**
 * The tests' mini-notation:
 *
 *   'G: g2 b3 d4 g4 | d3 f#3 c4 a4'            key (lower case: minor), then sonorities from the bass up, a quarter each
 *   'c 3/4: c3 eb3 g3 c4 *2 | g2 b2 d3 g3'     metre after the key (4/4 without), length in quarters after `*` (`*1/2`, `*3`)
 *   'C: c3 g4 | f3 ~g4 | f3 e4'                `~` holds the note of the sonority before: a tie, no new attack
 *   'C: - | c4'                                `-` is silence
 *   'C: c4 e4 . d4 f4'                         `.` may stand for `|` inside a beat; it means the same
 *
 * Accidentals: # x (or ##) b bb; octaves scientific (c4 is middle C). The nth note of a sonority is in voice n.
 */
export function scoreFrom(notation: string): Score {
  const { key, beats, beatType, sonorities } = parseNotation(notation);
  const ticksPerQuarter = sonorities.reduce((grid, { den }) => lcm(grid, den), beatType / gcd(4, beatType));
  const time = { beats: [beats], beatType, start: ticks(0) };
  const total = sonorities.reduce((sum, { num, den }) => sum + (num * ticksPerQuarter) / den, 0);
  return {
    title: '',
    work: '',
    composer: '',
    ticksPerQuarter,
    parts: [{ index: 0, id: 'P1', name: '', staves: 1 }],
    bars: barsOf(total, (ticksPerQuarter * 4 * beats) / beatType, time),
    notes: notesOf(sonorities, ticksPerQuarter),
    graceNotes: [],
    keySignatures: [keySignatureOf(key)],
    timeSignatures: [time],
    playOrder: [],
    warnings: [],
  };
}

/** The key before the colon: `G`, `f#`, `Bb`, `eb`. */
export function keyFrom(notation: string): Key {
  return parseNotation(notation).key;
}

/** `f#4` → the pitch. */
export function pitchFrom(text: string): Pitch {
  const match = /^([a-gA-G])(#{1,2}|x|b{1,2})?(-?\d)$/.exec(text);
  if (!match) throw new Error(`not a note: “${text}”`);
  return { fifths: fifthsOf((match[1] as string).toUpperCase() as Letter, alterFrom(match[2] ?? '')), octave: Number(match[3]) };
}

interface WrittenSonority {
  readonly notes: readonly { readonly pitch: Pitch; readonly held: boolean }[];
  /** Length in quarters. */
  readonly num: number;
  readonly den: number;
}

interface Notation {
  readonly key: Key;
  readonly beats: number;
  readonly beatType: number;
  readonly sonorities: readonly WrittenSonority[];
}

function parseNotation(notation: string): Notation {
  const head = /^\s*([A-Ga-g](?:#|b)?)(?:\s+(\d+)\/(\d+))?\s*:/.exec(notation);
  if (!head) throw new Error(`the notation needs a key: “${notation}”`);
  const tonic = head[1] as string;
  const letter = tonic.charAt(0);
  return {
    key: { tonic: fifthsOf(letter.toUpperCase() as Letter, alterFrom(tonic.slice(1))), mode: letter === letter.toUpperCase() ? 'major' : 'minor' },
    beats: Number(head[2] ?? 4),
    beatType: Number(head[3] ?? 4),
    sonorities: notation.slice(head[0].length).split(/\s\.\s|\|/).map(parseSonority),
  };
}

function parseSonority(text: string): WrittenSonority {
  const words = text.trim().split(/\s+/);
  const last = /^\*(\d+)(?:\/(\d+))?$/.exec(words[words.length - 1] ?? '');
  const notes = (last ? words.slice(0, -1) : words).filter((word) => word !== '-');
  return {
    notes: notes.map((word) => ({ pitch: pitchFrom(word.replace(/^~/, '')), held: word.startsWith('~') })),
    num: Number(last?.[1] ?? 1),
    den: Number(last?.[2] ?? 1),
  };
}

function alterFrom(signs: string): number {
  return [...signs].reduce((sum, sign) => sum + ({ '#': 1, x: 2, b: -1 }[sign] ?? 0), 0);
}

type Growing = Omit<Note, 'id'> & { duration: number };

function notesOf(sonorities: readonly WrittenSonority[], ticksPerQuarter: number): Note[] {
  const notes: Growing[] = [];
  let start = 0;
  for (const { notes: written, num, den } of sonorities) {
    const length = (num * ticksPerQuarter) / den;
    written.forEach(({ pitch, held }, i) => {
      if (held) hold(notes, pitch, start, length);
      else notes.push(noteOf(pitch, start, length, i));
    });
    start += length;
  }
  return notes.sort((a, b) => a.start - b.start || midiOf(a.pitch) - midiOf(b.pitch)).map((note, id) => ({ ...note, id }));
}

function noteOf(pitch: Pitch, start: number, length: number, place: number): Growing {
  return { pitch, start: ticks(start), duration: ticks(length), part: 0, staff: 1, voice: String(place + 1), attacks: [ticks(start)] };
}

function hold(notes: readonly Growing[], pitch: Pitch, start: number, length: number): void {
  const same = notes.find((note) => midiOf(note.pitch) === midiOf(pitch) && note.start + note.duration === start);
  if (!same) throw new Error('`~` holds a note that the sonority before does not have');
  Object.assign(same, { duration: same.duration + length, attacks: [...same.attacks, ticks(start)] });
}

function barsOf(total: number, metre: number, time: NonNullable<Bar['time']>): Bar[] {
  return Array.from({ length: Math.max(1, Math.ceil(total / metre)) }, (_, index) => ({
    index,
    number: String(index + 1),
    start: ticks(index * metre),
    length: ticks(Math.min(metre, Math.max(total, 1) - index * metre)),
    time,
    implicit: false,
    offset: ticks(0),
  }));
}

function keySignatureOf(key: Key): KeySignature {
  return { start: ticks(0), fifths: signatureOf(key), mode: key.mode };
}
