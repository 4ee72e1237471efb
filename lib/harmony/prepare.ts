import { type Score } from '../score/score';
import { sliceSonorities } from '../score/sonorities';
import { type HomeEvidence, type KeyEvidence, gatherKeyEvidence, keyNumber } from './key-terms';
import { type WantedKeys, chooseKeys } from './keys-tried';
import { type Material, type WantedChords, gatherMaterial } from './material';
import { BIN_SHIFT, type Slices, gatherSlices } from './slices';
import { type Weights } from './weights';

/** How widely the search looks. More is slower and finds rarer readings. */
export interface Breadth {
  /** Chords per span by the cheap rank. */
  readonly candidates: number;
  /** Keys per bar. */
  readonly keys: number;
}

export const BREADTH: Breadth = { candidates: 10, keys: 14 };

/** An excerpt ready to be searched under any weights. */
export interface Prepared {
  readonly material: Material;
  readonly keys: Int16Array;
  readonly keyCount: number;
}

export interface PrepareOptions {
  readonly start?: number;
  readonly end?: number;
  readonly breadth?: Breadth;
  readonly wantedChords?: WantedChords;
  readonly wantedKeys?: WantedKeys;
}

/** The slices of a score, or of an excerpt of it in ticks. */
export function gatherExcerpt(score: Score, { start, end }: { readonly start?: number; readonly end?: number } = {}): Slices {
  return gatherSlices(score, sliceSonorities(score, { atBarlines: true }), start, end);
}

/** Gathers spans, candidate chords and keys of a score; `choosing` are the weights that choose the keys. */
export function prepareSlices(score: Score, slices: Slices, choosing: Weights, options: PrepareOptions = {}): Prepared {
  const breadth = options.breadth ?? BREADTH;
  const evidence = gatherEvidence(score, slices);
  const keys = chooseKeys(slices, evidence, choosing, breadth.keys, options.wantedKeys);
  const material = gatherMaterial(slices, evidence, { candidates: breadth.candidates, ...(options.wantedChords ? { wanted: options.wantedChords } : {}) });
  return { material, keys, keyCount: breadth.keys };
}

export function prepare(score: Score, choosing: Weights, options: PrepareOptions = {}): Prepared {
  return prepareSlices(score, gatherExcerpt(score, options), choosing, options);
}

export function gatherEvidence(score: Score, slices: Slices): KeyEvidence {
  const barTicks = Float64Array.from(slices.bar, (bar) => {
    const { length, offset } = score.bars[bar]!;
    return Math.max(length + offset, score.ticksPerQuarter);
  });
  return gatherKeyEvidence(slices, barTicks, readHome(score, slices));
}

function readHome(score: Score, slices: Slices): HomeEvidence {
  const signature = new Int8Array(slices.count);
  let k = 0;
  for (let i = 0; i < slices.count; i++) {
    while (k + 1 < score.keySignatures.length && score.keySignatures[k + 1]!.start <= slices.start[i]!) k++;
    signature[i] = score.keySignatures[k]?.fifths ?? 0;
  }
  return { signature, home: findHome(slices, signature) };
}

/** The key of the written signature whose tonic is the last bass; −1 when the bass is the tonic of neither mode. */
function findHome(slices: Slices, signature: Int8Array): number {
  if (slices.count === 0) return -1;
  const last = signature[slices.count - 1]!;
  const bass = slices.bass[slices.count - 1]! - BIN_SHIFT;
  if (bass === last) return keyNumber(last, 0);
  return bass === last + 3 ? keyNumber(bass, 1) : -1;
}
