/**
 * The demo's pieces as text. A bar is a list of tokens; bars are parted by ` | `. A token is a note (`f#4`), a chord
 * (`[c4 e4]`) or a rest (`r`), its note value and, when it is tied to the next, `~`:
 * w whole, h half, q quarter, e eighth, s sixteenth; a dot lengthens by half. Pitches are as they sound.
 */
export interface NotatedVoice {
  /** 1-based staff. */
  readonly staff: number;
  readonly bars: string;
}

export interface NotatedPart {
  readonly name: string;
  /** One per staff: sign and line, `G2`, `F4`, `C3`. */
  readonly clefs: readonly string[];
  /** From written to sounding pitch, as MusicXML's transpose: a clarinet in B flat is −1 step, −2 semitones. */
  readonly transpose?: { readonly diatonic: number; readonly chromatic: number };
  readonly voices: readonly NotatedVoice[];
}

export interface NotatedPiece {
  readonly title: string;
  readonly composer: string;
  readonly work: string;
  readonly source: string;
  readonly rights: string;
  /** Signature at sounding pitch: sharps positive. */
  readonly keyFifths: number;
  readonly mode: 'major' | 'minor';
  readonly time: readonly [number, number];
  readonly tempo: string;
  readonly parts: readonly NotatedPart[];
}

/** One written event: no pitches is a rest. `duration` in sixteenths. */
export interface NotatedEvent {
  readonly pitches: readonly string[];
  readonly duration: number;
  readonly value: NoteValue;
  readonly dots: number;
  readonly tied: boolean;
}

export const NOTE_VALUES = { w: 'whole', h: 'half', q: 'quarter', e: 'eighth', s: '16th' } as const;
export type NoteValue = keyof typeof NOTE_VALUES;
const SIXTEENTHS: Readonly<Record<NoteValue, number>> = { w: 16, h: 8, q: 4, e: 2, s: 1 };

const TOKEN = /^(?:r|([a-g](?:#|b)*\d)|\[([^\]]+)\])([whqes])(\.?)(~?)$/;

/** Parses a voice into bars of events; throws on a token it cannot read, as the pieces are part of the program. */
export function parseVoice(text: string): NotatedEvent[][] {
  return text.split('|').map((bar) => splitTokens(bar).map(parseToken));
}

function splitTokens(bar: string): string[] {
  return bar.match(/\[[^\]]*\]\S*|\S+/g) ?? [];
}

function parseToken(token: string): NotatedEvent {
  const match = TOKEN.exec(token);
  if (!match) throw new Error(`unreadable token "${token}"`);
  const value = match[3] as NoteValue;
  const dots = match[4] ? 1 : 0;
  const pitches = match[1] ? [match[1]] : (match[2]?.split(' ') ?? []);
  return { pitches, value, dots, duration: (SIXTEENTHS[value] * (2 + dots)) / 2, tied: match[5] === '~' };
}
