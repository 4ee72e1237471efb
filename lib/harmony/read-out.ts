import { type Lattice } from './lattice';
import { type Material } from './material';
import { type Posterior } from './posterior';
import { type Slices } from './slices';

/** A span of the reading that is chosen: slices `from` to `to` (exclusive) as `state`. */
export interface ChosenSpan {
  readonly from: number;
  readonly to: number;
  readonly state: number;
  /** Mean probability of the state over the span, by time. */
  readonly certainty: number;
}

/**
 * The model's own probabilities are too sure by this factor: analysts disagree even where the notes are plain. Measured on
 * held-out folds (`npm run accuracy`: of labels at 75, 85, 95 % before it, 69, 79, 86 % agreed).
 */
const BELIEF = 0.915;

/** Probability of every state at every slice. */
export type SliceStates = readonly ReadonlyMap<number, number>[];

export function statesBySlice(lattice: Lattice, material: Material, posterior: Posterior): SliceStates {
  const { segments, slices } = material;
  const states: Map<number, number>[] = Array.from({ length: slices.count }, () => new Map());
  for (let n = 0; n < lattice.count; n++) {
    const probability = posterior.node[n]!;
    if (probability < 1e-5) continue;
    const s = lattice.segment[n]!;
    for (let i = segments.start[s]!; i < segments.end[s]!; i++) {
      const map = states[i]!;
      map.set(lattice.state[n]!, (map.get(lattice.state[n]!) ?? 0) + probability);
    }
  }
  return states;
}

export interface ReadOutOptions {
  /** What a boundary costs, in quarters of expected right time, and what its probability gives back. */
  readonly boundaryCost: number;
  readonly boundaryGain: number;
}

export const READ_OUT: ReadOutOptions = { boundaryCost: 0.3, boundaryGain: 0.5 };

/**
 * The reading that is expected to be right for most of the time: among all tilings by lattice nodes the one with the
 * largest sum of (time × probability of its state), boundaries weighed by their own probability.
 */
export function chooseSpans(
  lattice: Lattice,
  material: Material,
  posterior: Posterior,
  states: SliceStates,
  quarter: number,
  options = READ_OUT,
): readonly ChosenSpan[] {
  const { segments, slices } = material;
  const length = (i: number) => (slices.end[i]! - slices.start[i]!) / quarter;
  const boundary = boundaryProbability(lattice, material, posterior);
  const best = new Float64Array(slices.count + 1).fill(-Infinity);
  const chosen = new Int32Array(slices.count + 1).fill(-1);
  best[0] = 0;
  for (let n = 0; n < lattice.count; n++) {
    if (posterior.node[n]! < 1e-4) continue;
    const s = lattice.segment[n]!;
    const from = segments.start[s]!;
    let gain = best[from]! - options.boundaryCost + options.boundaryGain * boundary[from]!;
    for (let i = from; i < segments.end[s]!; i++) gain += length(i) * (states[i]!.get(lattice.state[n]!) ?? 0);
    if (gain > best[segments.end[s]!]!) {
      best[segments.end[s]!] = gain;
      chosen[segments.end[s]!] = n;
    }
  }
  return joinSpans(collect(lattice, material, chosen), states, length);
}

function boundaryProbability(lattice: Lattice, material: Material, posterior: Posterior): Float64Array {
  const starts = new Float64Array(material.slices.count + 1);
  for (let n = 0; n < lattice.count; n++) {
    const j = material.segments.start[lattice.segment[n]!]!;
    starts[j] = starts[j]! + posterior.node[n]!;
  }
  return starts;
}

function collect(lattice: Lattice, material: Material, chosen: Int32Array): { from: number; to: number; state: number }[] {
  const spans = [];
  for (let e = material.slices.count; e > 0; ) {
    const n = chosen[e]!;
    if (n < 0) throw new Error('the lattice does not reach back to the start', { cause: { boundary: e } });
    const from = material.segments.start[lattice.segment[n]!]!;
    spans.push({ from, to: e, state: lattice.state[n]! });
    e = from;
  }
  return spans.reverse();
}

function joinSpans(spans: readonly { from: number; to: number; state: number }[], states: SliceStates, length: (i: number) => number): ChosenSpan[] {
  const joined: { from: number; to: number; state: number }[] = [];
  for (const span of spans) {
    const last = joined.at(-1);
    if (last?.state === span.state) last.to = span.to;
    else joined.push({ ...span });
  }
  return joined.map((span) => ({ ...span, certainty: meanOver(span, states, length) }));
}

function meanOver(span: { from: number; to: number; state: number }, states: SliceStates, length: (i: number) => number): number {
  let sum = 0;
  let time = 0;
  for (let i = span.from; i < span.to; i++) {
    sum += length(i) * (states[i]!.get(span.state) ?? 0);
    time += length(i);
  }
  return time > 0 ? (BELIEF * sum) / time : 0;
}

/** The states that a span might be, by their mean probability over its time, likeliest first. */
export function rankStates(span: { from: number; to: number }, states: SliceStates, slices: Slices): readonly (readonly [number, number])[] {
  const sums = new Map<number, number>();
  let time = 0;
  for (let i = span.from; i < span.to; i++) {
    const length = slices.end[i]! - slices.start[i]!;
    time += length;
    for (const [state, probability] of states[i]!) sums.set(state, (sums.get(state) ?? 0) + length * probability);
  }
  return [...sums].map(([state, sum]) => [state, (BELIEF * sum) / time] as const).sort((a, b) => b[1] - a[1] || a[0] - b[0]);
}
