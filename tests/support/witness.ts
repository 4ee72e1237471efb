import { VerovioToolkit } from 'verovio/esm';
import createVerovioModule from 'verovio/wasm';
import type { Score } from '@/lib/score/score';
import { midiOf } from '@/lib/theory/pitch';
import { readMidi } from './midi-notes';

/**
 * An independent reader: the verovio package engraves music and performs it as a Standard MIDI File. It performs
 * ornaments and repeats, and grace and cue notes; since a Score is the music as written, these are taken out of the
 * text that it is given.
 */
export class Witness {
  private constructor(private readonly toolkit: VerovioToolkit) {}

  static async create(): Promise<Witness> {
    const toolkit = new VerovioToolkit(await createVerovioModule());
    toolkit.setOptions({ breaks: 'none' });
    return new Witness(toolkit);
  }

  /** Every note's start and release where the two disagree; undefined when the witness cannot load the text. */
  differences(xml: string, score: Score): string[] | undefined {
    if (!this.toolkit.loadData(asWritten(xml))) return undefined;
    const midi = readMidi(Buffer.from(this.toolkit.renderToMIDI(), 'base64'));
    const toMidi = (time: number) => (time * midi.perQuarter) / score.ticksPerQuarter;
    const starts = score.notes.map(({ start, pitch }) => [toMidi(start), midiOf(pitch)] as const);
    const releases = score.notes.map(({ start, duration, pitch }) => [toMidi(start + duration), midiOf(pitch)] as const);
    // Its notes end one tick early, so that a repeated note is heard.
    const theirReleases = midi.off.map(([tick, key]) => [tick + 1, key] as const);
    return [...unmatched('start', starts, midi.on), ...unmatched('release', releases, theirReleases)];
  }

  /** How many notes it plays when repeats are played out. */
  countPerformed(xml: string): number | undefined {
    if (!this.toolkit.loadData(asPlain(xml))) return undefined;
    return readMidi(Buffer.from(this.toolkit.renderToMIDI(), 'base64')).on.length;
  }
}

type Moment = readonly [time: number, key: number];

/** Ticks of 1/120 quarter; its times are rounded. */
const TOLERANCE = 2;

function unmatched(what: string, ours: readonly Moment[], theirs: readonly Moment[]): string[] {
  const found: string[] = [];
  for (const key of new Set([...ours, ...theirs].map((moment) => moment[1]))) {
    const a = timesOf(ours, key);
    const b = timesOf(theirs, key);
    for (let i = 0, j = 0; i < a.length || j < b.length; ) {
      const difference = (a[i] ?? Infinity) - (b[j] ?? Infinity);
      if (Math.abs(difference) > TOLERANCE) found.push(`${difference < 0 ? 'ours' : 'theirs'}: ${what} of ${key} at ${difference < 0 ? a[i] : b[j]}`);
      if (difference <= TOLERANCE) i += 1;
      if (difference >= -TOLERANCE) j += 1;
    }
  }
  return found;
}

function timesOf(moments: readonly Moment[], key: number): number[] {
  return moments.filter((moment) => moment[1] === key).map(([time]) => time).sort((a, b) => a - b);
}

const NOTE = /<note\b[\s\S]*?<\/note>/g;

function asPlain(xml: string): string {
  return xml
    .replace(NOTE, (note) => (/<grace\b/.test(note) ? '' : /<cue\s*\/>/.test(note) ? cueAsRest(note) : note))
    .replace(/<(?:non-)?arpeggiate\b[^>]*\/>/g, '')
    .replace(/<tremolo(?! type="st)[^>]*>[^<]*<\/tremolo>/g, '');
}

function cueAsRest(note: string): string {
  if (note.includes('<chord/>')) return '';
  return note.replace(/<cue\s*\/>/, '').replace(/<pitch>[\s\S]*?<\/pitch>/, '<rest/>').replace(/<tie\b[^>]*>|<notations[\s\S]*<\/notations>/g, '');
}

function asWritten(xml: string): string {
  return asPlain(xml)
    .replace(/<(?:repeat|ending)\b[^>]*\/>|<ending\b[^>]*>[^<]*<\/ending>/g, '')
    .replace(/ (?:dacapo|dalsegno|tocoda|fine|segno|coda)="[^"]*"/g, '');
}
