import { tonicOf } from './key-terms';
import { type Lattice, inversionOfState, keyOfState, labelOfState } from './lattice';
import { type Material } from './material';
import { type Posterior } from './posterior';
import { type Slices } from './slices';
import { LABELS } from './vocabulary';

/** A span of the reading that is chosen: slices `from` to `to` (exclusive) as `state`. */
export interface ChosenSpan {
  readonly from: number;
  readonly to: number;
  readonly state: number;
  /** Mean probability of the state over the span, by time. */
  readonly certainty: number;
}

/**
 * What the model's own probabilities are worth: analysts disagree even where the notes are plain. Pairs of probability and
 * share that agreed with the experts on held-out folds (`npm run accuracy`), straight lines between them.
 */
const BELIEF: readonly (readonly [stated: number, borneOut: number])[] = [
  [0, 0], [0.28, 0.21], [0.39, 0.31], [0.5, 0.39], [0.6, 0.47], [0.715, 0.56], [0.82, 0.66], [0.88, 0.735], [0.95, 0.815], [0.984, 0.9], [1, 0.94],
];

/** A probability as held-out folds bear it out; order is kept. */
export function temper(probability: number): number {
  const above = BELIEF.findIndex(([stated]) => stated >= probability);
  if (above <= 0) return above === 0 ? BELIEF[0]![1] : BELIEF.at(-1)![1];
  const [low, high] = [BELIEF[above - 1]!, BELIEF[above]!];
  return low[1] + ((high[1] - low[1]) * (probability - low[0])) / (high[0] - low[0]);
}

type Span = Omit<ChosenSpan, 'certainty'>;

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
  return joinSpans(settleKeys(collect(lattice, material, chosen), states), states, length);
}

function boundaryProbability(lattice: Lattice, material: Material, posterior: Posterior): Float64Array {
  const starts = new Float64Array(material.slices.count + 1);
  for (let n = 0; n < lattice.count; n++) {
    const j = material.segments.start[lattice.segment[n]!]!;
    starts[j] = starts[j]! + posterior.node[n]!;
  }
  return starts;
}

function collect(lattice: Lattice, material: Material, chosen: Int32Array): Span[] {
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

/**
 * One chord does not make a key: where a single span stands in another key than both its neighbours, which share theirs, it
 * is read in their key, as the same chord, if the model gives that any chance there.
 */
function settleKeys(spans: readonly Span[], states: SliceStates): readonly Span[] {
  return spans.map((span, i) => {
    const [before, after] = [spans[i - 1], spans[i + 1]];
    if (!before || !after) return span;
    const key = keyOfState(before.state);
    if (key === keyOfState(span.state) || key !== keyOfState(after.state)) return span;
    const settled = findInKey(span, key, states);
    return settled >= 0 ? { ...span, state: settled } : span;
  });
}

/** The likeliest reading of a span's own chord in a key; −1 when it has none. */
function findInKey(span: Span, key: number, states: SliceStates): number {
  const sums = new Map<number, number>();
  for (let i = span.from; i < span.to; i++) {
    for (const [state, probability] of states[i]!) {
      if (keyOfState(state) === key && soundsAlike(state, span.state)) sums.set(state, (sums.get(state) ?? 0) + probability);
    }
  }
  let best = -1;
  for (const [state, sum] of sums) if (best < 0 || sum > sums.get(best)!) best = state;
  return best;
}

function soundsAlike(a: number, b: number): boolean {
  const [one, other] = [LABELS[labelOfState(a)]!, LABELS[labelOfState(b)]!];
  const root = one.root + tonicOf(keyOfState(a)) - other.root - tonicOf(keyOfState(b));
  return root === 0 && one.kind === other.kind && inversionOfState(a) === inversionOfState(b);
}

function joinSpans(spans: readonly Span[], states: SliceStates, length: (i: number) => number): ChosenSpan[] {
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
  return time > 0 ? temper(sum / time) : 0;
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
  return [...sums].map(([state, sum]) => [state, temper(sum / time)] as const).sort((a, b) => b[1] - a[1] || a[0] - b[0]);
}
