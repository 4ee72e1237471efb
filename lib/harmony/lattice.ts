import { BIN_SHIFT as IMPORTED_BIN_SHIFT } from './slices';
import { CHORD_TERM_COUNT } from './chord-terms';
import { type KeysTried } from './keys-tried';
import { KEY_COUNT as IMPORTED_KEY_COUNT, modeOf as importedModeOf, tonicOf as importedTonicOf } from './key-terms';
import { type Material } from './material';
import { NodeTerms } from './node-terms';
import { SPAN_TERM_COUNT } from './span-terms';
import { TEMPLATES } from './templates';
import { LABEL_COUNT as IMPORTED_LABEL_COUNT, findLabels as importedFindLabels } from './vocabulary';
import { AT as IMPORTED_AT, type Weights } from './weights';

/** Imported values are bound once here: they are read in the innermost loops. */
const BIN_SHIFT = IMPORTED_BIN_SHIFT;
const modeOf = importedModeOf;
const tonicOf = importedTonicOf;
const findLabels = importedFindLabels;
const LABEL_COUNT = IMPORTED_LABEL_COUNT;
const AT = IMPORTED_AT;
const KEY_COUNT = IMPORTED_KEY_COUNT;

/** A label in an inversion, as one number; a state is a key and such a chord. */
export const CHORD_SPAN = LABEL_COUNT * 4;

export function stateOf(key: number, label: number, inversion: number): number {
  return (key * LABEL_COUNT + label) * 4 + inversion;
}

export function keyOfState(state: number): number {
  return Math.floor(state / CHORD_SPAN);
}

export function labelOfState(state: number): number {
  return (state >> 2) % LABEL_COUNT;
}

export function inversionOfState(state: number): number {
  return state & 3;
}

/**
 * The search space: node n says that segment `segment[n]` is candidate `candidate[n]` heard as `state[n]`, with local score
 * `score[n]`. Nodes are sorted by their segment. At boundary j the distinct states of nodes that start there are the
 * departures (`departureFrom[j]` …), those of nodes that end there the arrivals (`arrivalFrom[j]` …); boundary 0 has no
 * arrivals.
 */
export interface Lattice {
  readonly boundaries: number;
  readonly count: number;
  readonly segment: Int32Array;
  readonly candidate: Int32Array;
  readonly state: Int32Array;
  readonly score: Float64Array;
  /** Key's place among the keys tried at the segment's first slice. */
  readonly keyPlace: Uint8Array;
  readonly departureFrom: Int32Array;
  readonly departureState: Int32Array;
  readonly departureOf: Int32Array;
  readonly arrivalFrom: Int32Array;
  readonly arrivalState: Int32Array;
  readonly arrivalOf: Int32Array;
}

export interface LatticeOptions {
  /** Nodes kept per segment, and how far below the segment's best a node may lie (natural log units). */
  readonly nodesPerSegment: number;
  readonly nodeMargin: number;
  /** Chords kept per segment by the learned score. */
  readonly chordsPerSegment: number;
  /** States that a span may have, when a person has fixed it (or in training must have). */
  readonly keep?: (segment: number, state: number) => 'must' | 'may' | 'no';
}

export function buildLattice(material: Material, keys: KeysTried, weights: Weights, options: LatticeOptions): Lattice {
  const builder = new LatticeBuilder(material, keys, weights, options);
  for (let s = 0; s < material.segments.count; s++) builder.addSegment(s);
  return builder.finish();
}

/** Nodes under construction: growing columns, and the current segment's nodes before pruning. */
class LatticeBuilder {
  private segment = new Int32Array(1 << 12);
  private candidate = new Int32Array(1 << 12);
  private state = new Int32Array(1 << 12);
  private score = new Float64Array(1 << 12);
  private keyPlace = new Uint8Array(1 << 12);
  private size = 0;
  private readonly nodeTerms: NodeTerms;
  private readonly keySums: Float64Array;
  private readonly chordScore: Float64Array;
  private readonly sixFourKind = TEMPLATES.map((template) => template.tones.length === 3 && !template.isAugmentedSixth);
  private order: number[] = [];
  private sorting = new Float64Array(256);

  constructor(
    private readonly material: Material,
    private readonly keys: KeysTried,
    weights: Weights,
    private readonly options: LatticeOptions,
  ) {
    this.nodeTerms = new NodeTerms(material, weights);
    this.keySums = new Float64Array(keys.count);
    this.chordScore = scoreChords(material, weights);
  }

  addSegment(s: number): void {
    const { segments, candidateFrom } = this.material;
    this.sumKeys(segments.start[s]!, segments.end[s]!);
    this.nodeTerms.enterSegment(s);
    const from = this.size;
    let best = -Infinity;
    const chords = this.bestCandidates(candidateFrom[s]!, candidateFrom[s + 1]!);
    for (const c of chords) best = this.addCandidate(s, c, best);
    this.prune(s, from, best);
  }

  private sumKeys(j: number, e: number): void {
    const { count, score } = this.keys;
    const extend = e - 1 > j;
    for (let k = 0; k < count; k++) this.keySums[k] = (extend ? this.keySums[k]! : 0) + score[(e - 1) * count + k]!;
  }

  /** The segment's candidates, best first by the learned score; wanted ones (appended last) are never cut. */
  private bestCandidates(from: number, to: number): readonly number[] {
    const { order, chordScore } = this;
    order.length = 0;
    for (let c = from; c < to; c++) {
      let i = order.length;
      while (i > 0 && chordScore[order[i - 1]!]! < chordScore[c]!) i--;
      order.splice(i, 0, c);
    }
    const { chordsPerSegment, keep } = this.options;
    if (order.length <= chordsPerSegment) return order;
    return keep ? order : order.slice(0, chordsPerSegment);
  }

  /** Adds the candidate's nodes that may survive; a node's quick score bounds it, for notes outside a scale only cost. */
  private addCandidate(s: number, c: number, bestSoFar: number): number {
    const { root, kind, inversion, segments } = this.material;
    const { nodeTerms, chordScore, options } = this;
    const j = segments.start[s]!;
    const sixFour = inversion[c] === 2 && this.sixFourKind[kind[c]!]!;
    let best = bestSoFar;
    for (let k = 0; k < this.keys.count; k++) {
      const key = this.keys.keys[j * this.keys.count + k]!;
      if (key < 0) break;
      const labels = findLabels(modeOf(key), root[c]! - BIN_SHIFT - tonicOf(key), kind[c]!, sixFour);
      for (let l = 0; l < labels.length; l++) {
        const label = labels[l]!;
        let score = chordScore[c]! + this.keySums[k]! + nodeTerms.quickScore(label, inversion[c]!);
        if (score < best - options.nodeMargin && options.keep?.(s, stateOf(key, label, inversion[c]!)) !== 'must') continue;
        score += nodeTerms.scaleScore(s, c, key, label) + nodeTerms.edgeScore(s, key, label);
        if (score > best) best = score;
        this.push(s, c, stateOf(key, label, inversion[c]!), k, score);
      }
    }
    return best;
  }

  private push(s: number, c: number, state: number, k: number, score: number): void {
    if (this.size === this.state.length) this.grow();
    const n = this.size++;
    this.segment[n] = s;
    this.candidate[n] = c;
    this.state[n] = state;
    this.keyPlace[n] = k;
    this.score[n] = score;
  }

  private grow(): void {
    const double = <A extends { length: number; set(from: A): void }>(old: A, make: (size: number) => A) => {
      const larger = make(old.length * 2);
      larger.set(old);
      return larger;
    };
    this.segment = double(this.segment, (size) => new Int32Array(size));
    this.candidate = double(this.candidate, (size) => new Int32Array(size));
    this.state = double(this.state, (size) => new Int32Array(size));
    this.score = double(this.score, (size) => new Float64Array(size));
    this.keyPlace = double(this.keyPlace, (size) => new Uint8Array(size));
  }

  /** Keeps the segment's nodes within the margin of the best, at most so many, and those that must stay. */
  private prune(s: number, from: number, best: number): void {
    const { keep, nodeMargin, nodesPerSegment } = this.options;
    const kept: number[] = [];
    let must = 0;
    for (let n = from; n < this.size; n++) {
      const wanted = keep ? keep(s, this.state[n]!) : 'may';
      if (wanted === 'must') {
        kept.push(n);
        must++;
      } else if (wanted === 'may' && this.score[n]! > best - nodeMargin) kept.push(n);
    }
    const isKept = kept.length > nodesPerSegment + must ? this.strongest(kept, nodesPerSegment, s) : kept;
    isKept.forEach((n, i) => this.move(n, from + i));
    this.size = from + isKept.length;
  }

  private strongest(nodes: readonly number[], count: number, s: number): readonly number[] {
    const { keep } = this.options;
    if (this.sorting.length < nodes.length) this.sorting = new Float64Array(2 * nodes.length);
    for (let i = 0; i < nodes.length; i++) this.sorting[i] = this.score[nodes[i]!]!;
    const threshold = this.sorting.subarray(0, nodes.length).sort()[nodes.length - count]!;
    return nodes.filter((n) => this.score[n]! >= threshold || keep?.(s, this.state[n]!) === 'must');
  }

  private move(from: number, to: number): void {
    this.segment[to] = this.segment[from]!;
    this.candidate[to] = this.candidate[from]!;
    this.state[to] = this.state[from]!;
    this.keyPlace[to] = this.keyPlace[from]!;
    this.score[to] = this.score[from]!;
  }

  finish(): Lattice {
    const { segments, slices } = this.material;
    const count = this.size;
    const state = this.state.slice(0, count);
    const segment = this.segment.slice(0, count);
    const inOrder = Int32Array.from({ length: count }, (_, n) => n);
    const departures = indexStates(slices.count, state, inOrder, segments.start, segment);
    const arrivals = indexStates(slices.count, state, sortByEnd(segment, segments.end, slices.count), segments.end, segment);
    return {
      boundaries: slices.count,
      count,
      segment,
      candidate: this.candidate.slice(0, count),
      state,
      score: this.score.slice(0, count),
      keyPlace: this.keyPlace.slice(0, count),
      departureFrom: departures.from,
      departureState: departures.states,
      departureOf: departures.of,
      arrivalFrom: arrivals.from,
      arrivalState: arrivals.states,
      arrivalOf: arrivals.of,
    };
  }
}

/** The learned score of every candidate, its span's terms included. */
function scoreChords(material: Material, weights: Weights): Float64Array {
  const { terms, spanTerms, candidateFrom, segments } = material;
  const chord = weights.values.slice(AT.chord, AT.chord + CHORD_TERM_COUNT);
  const span = weights.values.slice(AT.span, AT.span + SPAN_TERM_COUNT);
  const scores = new Float64Array(material.root.length);
  for (let s = 0; s < segments.count; s++) {
    const ofSpan = dot(spanTerms, s * SPAN_TERM_COUNT, span);
    for (let c = candidateFrom[s]!; c < candidateFrom[s + 1]!; c++) scores[c] = ofSpan + dot(terms, c * CHORD_TERM_COUNT, chord);
  }
  return scores;
}

function dot(terms: Float32Array, at: number, weights: Float64Array): number {
  let sum = 0;
  for (let t = 0; t < weights.length; t++) sum += terms[at + t]! * weights[t]!;
  return sum;
}

function sortByEnd(segment: Int32Array, end: Int32Array, boundaries: number): Int32Array {
  const place = new Int32Array(boundaries + 2);
  for (let n = 0; n < segment.length; n++) {
    const e = end[segment[n]!]! + 1;
    place[e] = place[e]! + 1;
  }
  for (let e = 0; e <= boundaries; e++) place[e + 1] = place[e + 1]! + place[e]!;
  const order = new Int32Array(segment.length);
  for (let n = 0; n < segment.length; n++) {
    const e = end[segment[n]!]!;
    order[place[e]!] = n;
    place[e] = place[e]! + 1;
  }
  return order;
}

const stampOf = new Int32Array(KEY_COUNT * CHORD_SPAN);
const placeOf = new Int32Array(KEY_COUNT * CHORD_SPAN);
let stamp = 0;

/** The distinct states per boundary, and each node's place among them; `order` lists the nodes boundary by boundary. */
function indexStates(boundaries: number, states: Int32Array, order: Int32Array, boundaryOf: Int32Array, segment: Int32Array) {
  const from = new Int32Array(boundaries + 2);
  const of = new Int32Array(states.length);
  const distinct = new Int32Array(states.length);
  let size = 0;
  let current = 0;
  stamp++;
  for (let i = 0; i < order.length; i++) {
    const n = order[i]!;
    const boundary = boundaryOf[segment[n]!]!;
    while (current < boundary) {
      from[++current] = size;
      stamp++;
    }
    const state = states[n]!;
    if (stampOf[state] !== stamp) {
      stampOf[state] = stamp;
      placeOf[state] = size;
      distinct[size++] = state;
    }
    of[n] = placeOf[state]!;
  }
  while (current <= boundaries) from[++current] = size;
  return { from, states: distinct.slice(0, size), of };
}
