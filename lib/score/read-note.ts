import { LETTERS, type Letter, type Pitch } from '../theory/pitch';
import type { Draft } from './draft';
import { parseDecimal, parseInteger } from './rational';
import { refuse } from './refusal';
import { pitchOf } from './transposition';
import { type XmlElement, findText } from './xml';

/** A `note` element's facts, before anything is concluded from them. */
export interface NoteFacts {
  grace: boolean;
  cue: boolean;
  chord: boolean;
  /** undefined for rests and unpitched notes. */
  pitch: XmlElement | undefined;
  sounding: boolean;
  duration: XmlElement | undefined;
  voice: string;
  staff: number;
  tieStart: boolean;
  tieStop: boolean;
}

/** One pass over the children: notes are most of a file. */
export function readNoteFacts(element: XmlElement): NoteFacts {
  const facts: NoteFacts = {
    grace: false, cue: false, chord: false, pitch: undefined, sounding: false, duration: undefined,
    voice: '1', staff: 1, tieStart: false, tieStop: false,
  };
  for (const child of element.children) READERS[child.name]?.(facts, child);
  return facts;
}

const READERS: Readonly<Record<string, (facts: NoteFacts, child: XmlElement) => void>> = {
  grace: (facts) => { facts.grace = true; },
  cue: (facts) => { facts.cue = true; },
  chord: (facts) => { facts.chord = true; },
  pitch: (facts, child) => { facts.pitch = child; facts.sounding = true; },
  rest: (facts) => { facts.sounding = false; },
  unpitched: (facts) => { facts.sounding = false; },
  duration: (facts, child) => { facts.duration = child; },
  voice: (facts, child) => { facts.voice = child.text.trim() || '1'; },
  staff: (facts, child) => { facts.staff = parseInteger(child.text) ?? 1; },
  tie: readTie,
  notations: (facts, child) => {
    for (const notation of child.children) if (notation.name === 'tied') readTie(facts, notation);
  },
};

/** `continue` (tied only) both ends and begins; `let-ring` goes to no other note. */
function readTie(facts: NoteFacts, child: XmlElement): void {
  const { type } = child.attributes;
  if (type === 'start' || type === 'continue') facts.tieStart = true;
  if (type === 'stop' || type === 'continue') facts.tieStop = true;
}

/** The written pitch. Microtones go to the nearest semitone, quarter tones to the one nearer the natural, with a warning. */
export function readPitch(draft: Draft, element: XmlElement, bar: number): Pitch {
  const step = findText(element, 'step') ?? '';
  const octave = parseInteger(findText(element, 'octave'));
  const alter = parseDecimal(findText(element, 'alter') || '0');
  const known = (LETTERS as readonly string[]).includes(step);
  if (!known || octave === undefined || octave < -1 || octave > 10 || !alter || Math.abs(alter.num) > 4 * alter.den) {
    const { line } = element;
    return refuse('bad_note', `Line ${line}: a note has no readable pitch. Export the file again.`, { line, element: 'pitch' });
  }
  if (alter.den !== 1) {
    draft.warn({ code: 'microtone_rounded', message: `Bar ${bar + 1} has microtones; they are read as the nearest semitone.`, line: element.line, bar });
  }
  return pitchOf(step as Letter, roundToNatural(alter.num, alter.den), octave);
}

function roundToNatural(num: number, den: number): number {
  const size = Math.ceil((2 * Math.abs(num) - den) / (2 * den));
  return num < 0 ? 0 - size : size;
}
