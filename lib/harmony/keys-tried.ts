import { BIN_SHIFT as IMPORTED_BIN_SHIFT } from './slices';
import {
  KEY_COUNT,
  KEY_FACT_COUNT as IMPORTED_KEY_FACT_COUNT,
  KEY_PROFILE_COUNT as IMPORTED_KEY_PROFILE_COUNT,
  KEY_WINDOWS as IMPORTED_KEY_WINDOWS,
  type KeyEvidence,
  fillKeyFacts as importedFillKeyFacts,
  keyNumber,
  modeOf as importedModeOf,
  placeInProfile as importedPlaceInProfile,
  profileAt as importedProfileAt,
  signatureOfKey,
  tonicOf as importedTonicOf,
} from './key-terms';
import { type Slices } from './slices';
import { AT as IMPORTED_AT, type Weights } from './weights';

/** Imported values are bound once here: they are read in the innermost loops. */
const KEY_FACT_COUNT = IMPORTED_KEY_FACT_COUNT;
const KEY_PROFILE_COUNT = IMPORTED_KEY_PROFILE_COUNT;
const KEY_WINDOWS = IMPORTED_KEY_WINDOWS;
const fillKeyFacts = importedFillKeyFacts;
const modeOf = importedModeOf;
const placeInProfile = importedPlaceInProfile;
const profileAt = importedProfileAt;
const tonicOf = importedTonicOf;
const AT = IMPORTED_AT;
const BIN_SHIFT = IMPORTED_BIN_SHIFT;

/**
 * The keys that the search tries, per bar (slices of one bar share them), and what every slice says for each:
 * `score[(slice · count) + k]` is the weighted sum of the key terms per beat for `keys[bar][k]`.
 */
export interface KeysTried {
  readonly count: number;
  /** Per slice, `count` key numbers from `slice · count`; −1 beyond the last. */
  readonly keys: Int16Array;
  readonly score: Float64Array;
}

export type WantedKeys = (i: number) => readonly number[];

/** Beyond fourteen sharps or flats nobody names a key, whatever the notes are called. */
const FARTHEST_SIGNATURE = 14;

function isNameable(key: number): boolean {
  return key >= 0 && key < KEY_COUNT && Math.abs(signatureOfKey(key)) <= FARTHEST_SIGNATURE;
}

/** How many of the keys may be there only because their tonic triad stands in the bar. */
const LOCAL_TONICS = 4;

/** Chooses the `count` most likely keys for each bar by the key terms at its slices, and scores them slice by slice. */
export function chooseKeys(slices: Slices, evidence: KeyEvidence, choosing: Weights, count: number, wanted?: WantedKeys): Int16Array {
  const all = possibleKeys(evidence);
  const chosen = new Int16Array(slices.count * count).fill(-1);
  const facts = new Float32Array(KEY_FACT_COUNT);
  for (let from = 0, to = 0; from < slices.count; from = to) {
    while (to < slices.count && slices.bar[to] === slices.bar[from]) to++;
    const ranked = all.map((key) => ({ key, score: rankInBar(evidence, choosing, from, to, key, facts) }));
    ranked.sort((a, b) => b.score - a.score || a.key - b.key);
    const must = new Set<number>();
    for (let i = from; i < to; i++) for (const key of wanted?.(i) ?? []) must.add(key);
    if (evidence.home.home >= 0) must.add(evidence.home.home);
    const likely = ranked.map((entry) => entry.key);
    const tonics = findTonics(slices, from, to).slice(0, LOCAL_TONICS);
    const best = [...new Set([...must, ...likely.slice(0, count - LOCAL_TONICS), ...tonics, ...likely])].slice(0, count);
    for (let i = from; i < to; i++) chosen.set(best, i * count);
  }
  return chosen;
}

/** Keys whose tonic triad stands over its root in the bar, longest first: a key may be left after its first chord. */
function findTonics(slices: Slices, from: number, to: number): readonly number[] {
  const beats = new Map<number, number>();
  for (let i = from; i < to; i++) {
    const bass = slices.bass[i]!;
    if (bass < 0 || !soundsIn(slices, i, bass)) continue;
    for (const mode of [0, 1]) {
      if (!soundsIn(slices, i, bass + (mode === 0 ? 4 : -3))) continue;
      const key = keyNumber(bass - BIN_SHIFT, mode);
      beats.set(key, (beats.get(key) ?? 0) + slices.beats[i]!);
    }
  }
  return [...beats].sort((a, b) => b[1] - a[1] || a[0] - b[0]).map(([key]) => key).filter(isNameable);
}

function soundsIn(slices: Slices, i: number, bin: number): boolean {
  for (let p = slices.first[i]!; p < slices.first[i + 1]!; p++) if (slices.bin[p] === bin) return true;
  return false;
}

function rankInBar(evidence: KeyEvidence, weights: Weights, from: number, to: number, key: number, facts: Float32Array): number {
  const middle = (from + to) >> 1;
  const places = from + 2 < to ? [from, middle, to - 1] : [from, to - 1];
  return Math.max(...places.map((i) => scoreKeyAt(evidence, weights.values, i, key, facts)));
}

/** Keys whose tonic lies on the stretch of the line of fifths that the excerpt's notes and signatures span. */
function possibleKeys(evidence: KeyEvidence): readonly number[] {
  const bins = [...evidence.bins].map((bin) => bin - BIN_SHIFT);
  const low = Math.max(-26, Math.min(0, ...bins) - 1);
  const high = Math.min(26, Math.max(0, ...bins) + 1);
  const keys: number[] = [];
  for (let tonic = low; tonic <= high; tonic++) for (const mode of [0, 1]) keys.push(keyNumber(tonic, mode));
  return keys.filter(isNameable);
}

/** Sum of the weighted key terms for a key at a slice, per beat. */
export function scoreKeyAt(evidence: KeyEvidence, values: Float64Array, i: number, key: number, facts: Float32Array): number {
  const mode = modeOf(key);
  const tonic = tonicOf(key) + BIN_SHIFT;
  const size = evidence.bins.length;
  let sum = 0;
  for (let w = 0; w < KEY_WINDOWS.length; w++) {
    const at = AT.key + profileAt(w, mode);
    const from = (i * KEY_WINDOWS.length + w) * size;
    for (let b = 0; b < size; b++) {
      const share = evidence.share[from + b]!;
      if (share > 0) sum += share * values[at + placeInProfile(evidence.bins[b]! - tonic)]!;
    }
  }
  fillKeyFacts(facts, evidence, i, key);
  for (let k = 0; k < KEY_FACT_COUNT; k++) sum += facts[k]! * values[AT.key + KEY_PROFILE_COUNT + k]!;
  return sum;
}

/** Scores the chosen keys at every slice; the same key keeps its number from bar to bar. */
export function scoreKeys(slices: Slices, evidence: KeyEvidence, weights: Weights, keys: Int16Array, count: number): KeysTried {
  const score = new Float64Array(keys.length);
  const facts = new Float32Array(KEY_FACT_COUNT);
  for (let i = 0; i < slices.count; i++) {
    for (let k = 0; k < count; k++) {
      const key = keys[i * count + k]!;
      if (key >= 0) score[i * count + k] = slices.beats[i]! * scoreKeyAt(evidence, weights.values, i, key, facts);
    }
  }
  return { count, keys, score };
}
