/** How much of what sounds changes at each place, and how often the piece changes there: what harmonic rhythm is heard by. */
export interface Change {
  /** Share (0–1) of the sound of the beat from a slice on that was not in the beat before it; 1 at the first slice. */
  readonly near: Float32Array;
  /** The same over two beats on either side. */
  readonly wide: Float32Array;
  /** The piece's mean of `near` at places of the slice's metrical level, and how often the bass moves at such places. */
  readonly habit: Float32Array;
  readonly bassHabit: Float32Array;
  /** Log₂ of the moves of the bass per beat in the piece, and of the pitches struck per beat, octaves counted once. */
  readonly pace: number;
  readonly density: number;
}

/** The columns of slices that change is read from. */
export interface Sounds {
  readonly count: number;
  readonly beats: Float64Array;
  readonly level: Uint8Array;
  readonly bass: Int16Array;
  readonly strikes: Uint8Array;
  readonly first: Int32Array;
  readonly bin: Uint8Array;
  readonly channel: Uint8Array;
  readonly sounding: Float32Array;
}

const LEVELS = 5;
/** What moves by step counts half. */
const MOVING = 0.5;
/** A level that the piece hardly uses takes over the mean of all. */
const PRIOR_COUNT = 4;

export function measureChange(sounds: Sounds, bins: number): Change {
  const near = compareSides(sounds, bins, 1);
  const bassMoves = Float32Array.from({ length: sounds.count }, (_, i) => (i > 0 && sounds.bass[i] !== sounds.bass[i - 1] ? 1 : 0));
  let beats = 1;
  let strikes = 1;
  let moves = 1;
  for (let i = 0; i < sounds.count; i++) {
    beats += sounds.beats[i]!;
    for (let p = sounds.first[i]!; p < sounds.first[i + 1]!; p++) strikes += sounds.strikes[p]!;
    moves += bassMoves[i]!;
  }
  return {
    near,
    wide: compareSides(sounds, bins, 2),
    habit: meanByLevel(sounds, near),
    bassHabit: meanByLevel(sounds, bassMoves),
    pace: Math.log2(moves / beats),
    density: Math.log2(strikes / beats),
  };
}

/** 1 − the overlap of what sounds in so many beats before each slice and from it on, both as shares of their sum. */
function compareSides(sounds: Sounds, bins: number, reach: number): Float32Array {
  const { count, beats } = sounds;
  const change = new Float32Array(count);
  const before = new Float64Array(bins);
  const after = new Float64Array(bins);
  for (let j = 0; j < count; j++) {
    let all = 0;
    for (let i = j, time = 0; i < count && time < reach; time += beats[i++]!) all += addSlice(sounds, after, i, Math.min(1, (reach - time) / beats[i]!));
    let past = 0;
    for (let i = j - 1, time = 0; i >= 0 && time < reach; time += beats[i--]!) past += addSlice(sounds, before, i, Math.min(1, (reach - time) / beats[i]!));
    change[j] = past > 0 && all > 0 ? 1 - overlap(sounds, before, after, j, reach, past, all) : 1;
    forget(sounds, before, after, j, reach);
  }
  return change;
}

function addSlice({ first, bin, channel, sounding }: Sounds, into: Float64Array, i: number, part: number): number {
  let all = 0;
  for (let p = first[i]!; p < first[i + 1]!; p++) {
    const amount = sounding[p]! * part * (channel[p] === 0 ? 1 : MOVING);
    into[bin[p]!] = into[bin[p]!]! + amount;
    all += amount;
  }
  return all;
}

function overlap({ count, beats, first, bin }: Sounds, before: Float64Array, after: Float64Array, j: number, reach: number, past: number, all: number): number {
  let shared = 0;
  for (let i = j, time = 0; i < count && time < reach; time += beats[i++]!) {
    for (let p = first[i]!; p < first[i + 1]!; p++) {
      const b = bin[p]!;
      shared += Math.min(before[b]! / past, after[b]! / all);
      before[b] = 0;
    }
  }
  return shared;
}

function forget({ count, beats, first, bin }: Sounds, before: Float64Array, after: Float64Array, j: number, reach: number): void {
  for (let i = j, time = 0; i < count && time < reach; time += beats[i++]!) for (let p = first[i]!; p < first[i + 1]!; p++) after[bin[p]!] = 0;
  for (let i = j - 1, time = 0; i >= 0 && time < reach; time += beats[i--]!) for (let p = first[i]!; p < first[i + 1]!; p++) before[bin[p]!] = 0;
}

function meanByLevel({ count, level }: Sounds, values: Float32Array): Float32Array {
  const mean = values.reduce((sum, value) => sum + value, 0) / Math.max(1, count);
  const sum = new Float64Array(LEVELS).fill(PRIOR_COUNT * mean);
  const seen = new Float64Array(LEVELS).fill(PRIOR_COUNT);
  for (let i = 0; i < count; i++) {
    sum[level[i]!] = sum[level[i]!]! + values[i]!;
    seen[level[i]!] = seen[level[i]!]! + 1;
  }
  return Float32Array.from({ length: count }, (_, i) => sum[level[i]!]! / seen[level[i]!]!);
}
