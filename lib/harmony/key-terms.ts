import { type KeyEvents, gatherKeyEvents } from './key-events';
import { BINS as IMPORTED_BINS, BIN_SHIFT as IMPORTED_BIN_SHIFT, type Slices } from './slices';

/** Imported values are bound once here: they are read in the innermost loops. */
const BIN_SHIFT = IMPORTED_BIN_SHIFT;
const BINS = IMPORTED_BINS;

/**
 * A key's number: (tonic + KEY_SHIFT) · 2 + mode (0 major, 1 minor), the tonic on the line of fifths. Keys are compared with
 * what sounds around a slice in windows of bars, by the share of every spelled pitch relative to the tonic.
 */
export const KEY_SHIFT = 30;
export const KEY_COUNT = 122;

export function keyNumber(tonic: number, mode: number): number {
  return (tonic + KEY_SHIFT) * 2 + mode;
}

export function tonicOf(key: number): number {
  return (key >> 1) - KEY_SHIFT;
}

export function modeOf(key: number): number {
  return key & 1;
}

/** Sharps of the key's signature. */
export function signatureOfKey(key: number): number {
  return tonicOf(key) - 3 * modeOf(key);
}

/** Windows around a slice, in bars: from, to. */
export const KEY_WINDOWS = [
  ['back', -2, 0],
  ['forward', 0, 2],
  ['around', -6, 6],
  ['here', -0.25, 0.75],
] as const;

/** Places relative to the tonic on the line of fifths that a profile tells apart; farther ones count at the edge. */
export const PROFILE_LOW = -9;
export const PROFILE_HIGH = 12;
export const PROFILE_SIZE = PROFILE_HIGH - PROFILE_LOW + 1;

export const KEY_FACTS = [
  ['accidentals-back', 'letters were last heard with another accidental than the key has'],
  ['accidentals-forward', 'letters are next heard with another accidental than the key has'],
  ['signature-0', 'the key has the written signature'],
  ['signature-1', 'the key is one accidental from the written signature'],
  ['signature-2', 'the key is two accidentals from the written signature'],
  ['signature-3', 'the key is far from the written signature'],
  ['home', 'it is the home key'],
  ['home-relative', 'it is the relative of the home key'],
  ['home-parallel', 'it is the parallel of the home key'],
  ['home-dominant', 'it is the dominant of the home key'],
  ['home-subdominant', 'it is the subdominant of the home key'],
  ['minor', 'it is a minor key'],
  ['close-ahead', 'a cadence in this key is coming'],
  ['close-behind', 'a cadence in this key has just been heard'],
  ['resolution-ahead', 'its leading tone and fourth degree are about to resolve'],
  ['resolution-behind', 'its leading tone and fourth degree have just resolved'],
] as const;

export const KEY_FACT_COUNT = KEY_FACTS.length;
export const KEY_PROFILE_COUNT = KEY_WINDOWS.length * 2 * PROFILE_SIZE;
export const KEY_TERM_COUNT = KEY_PROFILE_COUNT + KEY_FACT_COUNT;

/** Weights before learning: profiles × log-frequency, by window in the order of KEY_WINDOWS; and the facts. */
export const HAND_WINDOW_WEIGHTS = [0.13, 0.35, 0.12, 0.1] as const;
export const HAND_FACT_WEIGHTS = [-0.02, -0.02, 0.14, -0.03, -0.05, -0.09, 0.21, 0, 0, 0, 0, 0, 0.1, 0.1, 0.1, 0.1] as const;

/** Where a window's profile of a mode begins among the key terms. */
export function profileAt(window: number, mode: number): number {
  return (window * 2 + mode) * PROFILE_SIZE;
}

export function placeInProfile(relative: number): number {
  return Math.min(PROFILE_HIGH, Math.max(PROFILE_LOW, relative)) - PROFILE_LOW;
}

/** What the whole score says about its keys before any slice is looked at. */
export interface HomeEvidence {
  /** Written signature in sharps, per slice. */
  readonly signature: Int8Array;
  /** Number of the home key: written signature at the start and the final bass; −1 when they do not fit. */
  readonly home: number;
}

/** Per slice and window: the shares of the pitches present in the excerpt, `share[(slice · windows + w) · bins + b]`. */
export interface KeyEvidence {
  readonly bins: Int32Array;
  readonly share: Float32Array;
  /** Last and next place (bin) of each letter around a slice, −1 when none: `[slice · 7 + letter]`. */
  readonly lastOfLetter: Int16Array;
  readonly nextOfLetter: Int16Array;
  readonly events: KeyEvents;
  /** Share of the sound that is not in the written signature, and the excerpt's length in bars. */
  readonly accidentals: number;
  readonly bars: number;
  readonly home: HomeEvidence;
}

export function gatherKeyEvidence(slices: Slices, barTicks: Float64Array, home: HomeEvidence): KeyEvidence {
  const bins = findBins(slices);
  const sums = sumPrefixes(slices, bins);
  const share = new Float32Array(slices.count * KEY_WINDOWS.length * bins.length);
  KEY_WINDOWS.forEach(([, from, to], w) => {
    let a = 0;
    let b = 0;
    for (let i = 0; i < slices.count; i++) {
      const bar = barTicks[i]!;
      while (a < i && slices.start[a]! < slices.start[i]! + from * bar) a++;
      b = Math.max(b, i + (from < 0 && to === 0 ? 0 : 1));
      while (b < slices.count && slices.start[b]! < slices.start[i]! + to * bar) b++;
      fillShare(share, (i * KEY_WINDOWS.length + w) * bins.length, sums, bins.length, Math.min(a, i), b);
    }
  });
  return {
    bins,
    share,
    lastOfLetter: findLetters(slices, 1),
    nextOfLetter: findLetters(slices, -1),
    events: gatherKeyEvents(slices, bins, barTicks),
    accidentals: shareOfAccidentals(slices, home.signature),
    bars: slices.count > 0 ? slices.bar[slices.count - 1]! - slices.bar[0]! + 1 : 0,
    home,
  };
}

function shareOfAccidentals(slices: Slices, signature: Int8Array): number {
  let all = 0;
  let foreign = 0;
  for (let i = 0; i < slices.count; i++) {
    for (let p = slices.first[i]!; p < slices.first[i + 1]!; p++) {
      all += slices.sounding[p]!;
      if (!isInScale(0, slices.bin[p]! - BIN_SHIFT - signature[i]!)) foreign += slices.sounding[p]!;
    }
  }
  return all > 0 ? foreign / all : 0;
}

function findBins(slices: Slices): Int32Array {
  const seen = new Uint8Array(BINS);
  for (const bin of slices.bin) seen[bin] = 1;
  return Int32Array.from([...seen.keys()].filter((bin) => seen[bin] === 1));
}

function sumPrefixes(slices: Slices, bins: Int32Array): Float64Array {
  const place = new Int32Array(BINS);
  bins.forEach((bin, b) => (place[bin] = b));
  const sums = new Float64Array((slices.count + 1) * bins.length);
  for (let i = 0; i < slices.count; i++) {
    const at = (i + 1) * bins.length;
    sums.copyWithin(at, at - bins.length, at);
    for (let p = slices.first[i]!; p < slices.first[i + 1]!; p++) {
      const slot = at + place[slices.bin[p]!]!;
      const weight = slices.sounding[p]! * (slices.channel[p] === 2 ? 0.5 : 1);
      sums[slot] = sums[slot]! + weight;
    }
  }
  return sums;
}

function fillShare(share: Float32Array, at: number, sums: Float64Array, size: number, a: number, b: number): void {
  let total = 0;
  for (let k = 0; k < size; k++) total += sums[b * size + k]! - sums[a * size + k]!;
  if (total <= 0) return;
  for (let k = 0; k < size; k++) share[at + k] = (sums[b * size + k]! - sums[a * size + k]!) / total;
}

/** Letters are the bins modulo 7. Looking back (direction 1) the slice itself counts; looking on (−1) as well. */
function findLetters(slices: Slices, direction: 1 | -1): Int16Array {
  const found = new Int16Array(slices.count * 7).fill(-1);
  const current = new Int16Array(7).fill(-1);
  for (let n = 0; n < slices.count; n++) {
    const i = direction === 1 ? n : slices.count - 1 - n;
    for (let p = slices.first[i]!; p < slices.first[i + 1]!; p++) current[slices.bin[p]! % 7] = slices.bin[p]!;
    found.set(current, i * 7);
  }
  return found;
}

/** Whether a place relative to the tonic belongs to the scale; minor has both forms of its sixth and seventh. */
export function isInScale(mode: number, relative: number): boolean {
  if (mode === 0) return relative >= -1 && relative <= 5;
  return (relative >= -4 && relative <= 3) || relative === 5;
}

/** Fills the facts of a key at a slice (the profile shares are read straight from the evidence). */
export function fillKeyFacts(row: Float32Array, evidence: KeyEvidence, i: number, key: number): void {
  const tonic = tonicOf(key) + BIN_SHIFT;
  const mode = modeOf(key);
  row.fill(0);
  row[0] = countForeignLetters(evidence.lastOfLetter, i, tonic, mode);
  row[1] = countForeignLetters(evidence.nextOfLetter, i, tonic, mode);
  const distance = Math.abs(signatureOfKey(key) - evidence.home.signature[i]!);
  row[2 + Math.min(3, distance)] = 1;
  const relation = relationToHome(key, evidence.home.home);
  if (relation >= 0) row[6 + relation] = 1;
  row[11] = mode;
  fillEvents(row, evidence.events, i, tonic, mode);
}

function fillEvents(row: Float32Array, events: KeyEvents, i: number, tonic: number, mode: number): void {
  const place = events.place[tonic] ?? -1;
  if (place < 0) return;
  const slot = (i * events.places + place) * 2 + mode;
  row[12] = events.closeAhead[slot]!;
  row[13] = events.closeBehind[slot]!;
  row[14] = events.resolutionAhead[slot]!;
  row[15] = events.resolutionBehind[slot]!;
}

function countForeignLetters(letters: Int16Array, i: number, tonic: number, mode: number): number {
  let foreign = 0;
  for (let letter = 0; letter < 7; letter++) {
    const bin = letters[i * 7 + letter]!;
    if (bin >= 0 && !isInScale(mode, bin - tonic)) foreign++;
  }
  return foreign;
}

/** 0 home, 1 relative, 2 parallel, 3 dominant, 4 subdominant, −1 none of these. */
function relationToHome(key: number, home: number): number {
  if (home < 0) return -1;
  if (key === home) return 0;
  const tonic = tonicOf(key) - tonicOf(home);
  if (modeOf(key) !== modeOf(home)) {
    if (tonic === 0) return 2;
    return signatureOfKey(key) === signatureOfKey(home) ? 1 : -1;
  }
  return tonic === 1 ? 3 : tonic === -1 ? 4 : -1;
}
