import { BINS, CHANNELS as CHANNEL_COUNT, type Slices } from './slices';

const CHANNELS = CHANNEL_COUNT;

/** Slices in the longest candidate span; labels that last longer go on with "the same again" at a barline. */
export const LONGEST_SEGMENT = 36;
/** The finest metrical level (a beat) at which a change inside a span counts as passed over. */
const LEAST_LEVEL = 2;

/**
 * Candidate spans: segment s covers the slices `start[s]` to `end[s]` (exclusive), always within one bar. Sorted by start,
 * then by end; those starting at slice j are `from[j]` to `from[j + 1]`.
 */
export interface Segments {
  readonly count: number;
  readonly start: Int32Array;
  readonly end: Int32Array;
  readonly from: Int32Array;
}

export function enumerateSegments(slices: Slices): Segments {
  const start: number[] = [];
  const end: number[] = [];
  const from = new Int32Array(slices.count + 1);
  for (let j = 0; j < slices.count; j++) {
    from[j] = start.length;
    for (let e = j + 1; e <= slices.count && e - j <= LONGEST_SEGMENT && slices.bar[e - 1] === slices.bar[j]; e++) {
      start.push(j);
      end.push(e);
    }
  }
  from[slices.count] = start.length;
  return { count: start.length, start: Int32Array.from(start), end: Int32Array.from(end), from };
}

/**
 * What sounds in a span, gathered slice by slice as the span grows to the right. `sounding[bin * CHANNELS + channel]` in
 * felt beats; `attacks[bin]` counts strikes on beats (levels 0–2), `strikes[bin]` all of them.
 */
export class SpanSound {
  readonly sounding = new Float64Array(BINS * CHANNELS);
  readonly total = new Float64Array(BINS);
  readonly attacks = new Float64Array(BINS);
  readonly strikes = new Float64Array(BINS);
  /** 1 for a bin that sounds in the span's first slice, and in its last. */
  readonly atStart = new Uint8Array(BINS);
  readonly atEnd = new Uint8Array(BINS);
  /** 1 for a bin that is held into the span from before, not struck where it begins. */
  readonly heldOver = new Uint8Array(BINS);
  /** Beats from the span's start to the bin's first sounding. */
  readonly enters = new Float64Array(BINS);
  /** Beats during which a bin is the held bass. */
  readonly bass = new Float64Array(BINS);
  readonly bins: number[] = [];
  firstBass = -1;
  lastBass = -1;
  /** Bin and height of the lowest note heard, and the bin of the lowest at the span's start. */
  lowest = -1;
  lowestAtStart = -1;
  aboveBass = -1;
  private height = Infinity;
  /** The largest changes of sound, and the moves of the bass on beats, after the first slice. */
  hiddenChange = 0;
  hiddenWideChange = 0;
  hiddenBassMoves = 0;
  beats = 0;
  size = 0;

  reset(): void {
    for (const bin of this.bins) this.clearBin(bin);
    if (this.firstBass >= 0) this.bass.fill(0);
    this.bins.length = 0;
    this.beats = 0;
    this.size = 0;
    this.firstBass = -1;
    this.lastBass = -1;
    this.lowest = -1;
    this.lowestAtStart = -1;
    this.height = Infinity;
    this.hiddenChange = 0;
    this.hiddenWideChange = 0;
    this.hiddenBassMoves = 0;
  }

  private clearBin(bin: number): void {
    this.sounding.fill(0, bin * CHANNELS, bin * CHANNELS + CHANNELS);
    this.total[bin] = 0;
    this.attacks[bin] = 0;
    this.strikes[bin] = 0;
    this.atStart[bin] = 0;
    this.atEnd[bin] = 0;
    this.heldOver[bin] = 0;
  }

  addSlice(slices: Slices, i: number): void {
    for (const bin of this.bins) this.atEnd[bin] = 0;
    const beats = slices.beats[i]!;
    for (let p = slices.first[i]!; p < slices.first[i + 1]!; p++) this.addPitch(slices, p);
    const bass = slices.bass[i]!;
    if (bass >= 0) {
      this.bass[bass] = this.bass[bass]! + beats;
      if (this.size === 0) this.firstBass = bass;
      this.lastBass = bass;
    }
    if (this.size === 0) {
      this.lowestAtStart = slices.lowestAtStart[i]!;
      this.aboveBass = slices.aboveBass[i]!;
    }
    if (slices.lowestMidi[i]! < this.height) {
      this.height = slices.lowestMidi[i]!;
      this.lowest = slices.lowest[i]!;
    }
    if (this.size > 0 && slices.level[i]! <= LEAST_LEVEL) this.hideChange(slices, i);
    this.beats += beats;
    this.size++;
  }

  private hideChange({ change, bass }: Slices, i: number): void {
    if (change.near[i]! > this.hiddenChange) this.hiddenChange = change.near[i]!;
    if (change.wide[i]! > this.hiddenWideChange) this.hiddenWideChange = change.wide[i]!;
    if (bass[i] !== bass[i - 1]) this.hiddenBassMoves++;
  }

  private addPitch(slices: Slices, p: number): void {
    const bin = slices.bin[p]!;
    const beats = slices.sounding[p]!;
    if (this.total[bin] === 0) {
      this.bins.push(bin);
      this.enters[bin] = this.beats;
    }
    if (this.size === 0 && slices.atStart[p] === 1) {
      this.atStart[bin] = 1;
      if (slices.strikes[p] === 0) this.heldOver[bin] = 1;
    }
    if (slices.atEnd[p] === 1) this.atEnd[bin] = 1;
    const slot = bin * CHANNELS + slices.channel[p]!;
    this.sounding[slot] = this.sounding[slot]! + beats;
    this.total[bin] = this.total[bin]! + beats;
    this.strikes[bin] = this.strikes[bin]! + slices.strikes[p]!;
    this.attacks[bin] = this.attacks[bin]! + slices.beatStrikes[p]!;
  }
}
