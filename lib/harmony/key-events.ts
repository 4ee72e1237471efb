import { BINS, type Slices } from './slices';

/**
 * What closes in which key, and how near that is. A close: the bass falls from the dominant to the tonic, the leading tone
 * sounding before, the tonic's third after. A resolution: leading tone and fourth degree go to the tonic and its third,
 * whatever the bass does. Per slice and key 1 at the place itself, less with every bar of distance.
 * Values stand at `[(slice · places + place) · 2 + mode]`, place being the tonic's index among `bins`.
 */
export interface KeyEvents {
  /** Index of a bin among the bins that sound in the excerpt, −1 for the others. */
  readonly place: Int16Array;
  readonly places: number;
  readonly closeAhead: Float32Array;
  readonly closeBehind: Float32Array;
  readonly resolutionAhead: Float32Array;
  readonly resolutionBehind: Float32Array;
}

/** Beats on either side of a place that are listened to. */
const REACH = 1;
/** Bars in which an event's weight falls to 1/e. */
const FADE_BARS = 2;
const THIRDS = [4, -3] as const;

export function gatherKeyEvents(slices: Slices, bins: Int32Array, barTicks: Float64Array): KeyEvents {
  const place = new Int16Array(BINS).fill(-1);
  bins.forEach((bin, i) => (place[bin] = i));
  const size = slices.count * bins.length * 2;
  const close = new Float32Array(size);
  const resolution = new Float32Array(size);
  for (let j = 1; j < slices.count; j++) if (slices.level[j]! <= 3) findEvents(slices, bins, j, close, resolution);
  const width = bins.length * 2;
  return {
    place,
    places: bins.length,
    closeAhead: fadeBefore(close, width, slices, barTicks),
    closeBehind: fadeAfter(close, width, slices, barTicks),
    resolutionAhead: fadeBefore(resolution, width, slices, barTicks),
    resolutionBehind: fadeAfter(resolution, width, slices, barTicks),
  };
}

const before = new Uint8Array(BINS + 16);
const after = new Uint8Array(BINS + 16);

function findEvents(slices: Slices, bins: Int32Array, j: number, close: Float32Array, resolution: Float32Array): void {
  const from = markSound(slices, before, j - 1, -1, 1);
  const to = markSound(slices, after, j, 1, 1);
  for (let t = 0; t < bins.length; t++) {
    const tonic = bins[t]!;
    if (after[tonic] === 0 || before[tonic + 5] === 0) continue;
    const closes = slices.bass[j] === tonic && slices.bass[j - 1] === tonic + 1;
    const resolves = tonic > 0 && before[tonic - 1] === 1;
    if (!closes && !resolves) continue;
    for (let mode = 0; mode < 2; mode++) {
      const third = tonic + THIRDS[mode]!;
      if (third < 0 || after[third] === 0) continue;
      const slot = (j * bins.length + t) * 2 + mode;
      if (closes) close[slot] = 1;
      if (resolves) resolution[slot] = 1;
    }
  }
  markSound(slices, before, j - 1, -1, 0, from);
  markSound(slices, after, j, 1, 0, to);
}

/** Marks (or clears) what sounds within reach of a slice in a direction, what only passes left out; gives the last slice. */
function markSound(slices: Slices, marks: Uint8Array, i: number, direction: 1 | -1, mark: 0 | 1, last = -2): number {
  let time = 0;
  let k = i;
  for (; k >= 0 && k < slices.count && (last === -2 ? time < REACH : k !== last + direction); k += direction) {
    time += slices.beats[k]!;
    for (let p = slices.first[k]!; p < slices.first[k + 1]!; p++) if (mark === 0 || slices.channel[p] !== 2) marks[slices.bin[p]!] = mark;
  }
  return k - direction;
}

function fadeBefore(events: Float32Array, width: number, slices: Slices, barTicks: Float64Array): Float32Array {
  const faded = new Float32Array(events.length);
  for (let i = slices.count - 2; i >= 0; i--) {
    const keep = Math.exp(-(slices.start[i + 1]! - slices.start[i]!) / barTicks[i]! / FADE_BARS);
    for (let k = 0; k < width; k++) {
      const later = (i + 1) * width + k;
      faded[i * width + k] = keep * Math.max(events[later]!, faded[later]!);
    }
  }
  return faded;
}

function fadeAfter(events: Float32Array, width: number, slices: Slices, barTicks: Float64Array): Float32Array {
  const faded = Float32Array.from(events);
  for (let i = 1; i < slices.count; i++) {
    const keep = Math.exp(-(slices.start[i]! - slices.start[i - 1]!) / barTicks[i]! / FADE_BARS);
    for (let k = 0; k < width; k++) faded[i * width + k] = Math.max(events[i * width + k]!, keep * faded[(i - 1) * width + k]!);
  }
  return faded;
}
