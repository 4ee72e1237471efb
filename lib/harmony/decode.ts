import { CHORD_SPAN, type Lattice, keyOfState as importedKeyOfState } from './lattice';
import { IMPOSSIBLE as IMPORTED_IMPOSSIBLE, type Transitions } from './transitions';

/** Imported values are bound once here: they are read in the innermost loops. */
const keyOfState = importedKeyOfState;
const IMPOSSIBLE = IMPORTED_IMPOSSIBLE;

export interface SearchOptions {
  /** Arrivals considered at a boundary; how far below the best one they may lie; how many from other keys. */
  readonly beam: number;
  readonly beamMargin: number;
  readonly otherKeys: number;
}

/**
 * The transitions weighed: edge x goes from arrival `arrival[x]` to the departure d with `edgeFrom[d]` ≤ x < `edgeFrom[d + 1]`.
 */
export interface Edges {
  readonly edgeFrom: Int32Array;
  readonly arrival: Int32Array;
  readonly score: Float64Array;
}

/** One way through the lattice: nodes in order. */
export type Path = readonly number[];

export interface Search {
  readonly lattice: Lattice;
  readonly edges: Edges;
  /** Best score of a path up to and including a node; and up to a departure (transition counted, node not). */
  readonly best: Path;
  readonly bestScore: number;
  /** Forward log sums: per arrival, per departure; and the log of the whole sum. Only with `sums`. */
  readonly arrivalSum: Float64Array;
  readonly departureSum: Float64Array;
  readonly total: number;
}

const CHORDS = CHORD_SPAN;
/** Transitions this far (log units) below a departure's strongest are dropped. */
const EDGE_MARGIN = 10;

class EdgeList {
  edgeFrom: Int32Array;
  arrival = new Int32Array(1 << 16);
  score = new Float64Array(1 << 16);
  size = 0;

  constructor(departures: number) {
    this.edgeFrom = new Int32Array(departures + 1);
  }

  add(arrival: number, score: number): void {
    if (this.size === this.arrival.length) this.grow();
    this.arrival[this.size] = arrival;
    this.score[this.size++] = score;
  }

  private grow(): void {
    const arrival = new Int32Array(this.size * 2);
    arrival.set(this.arrival);
    const score = new Float64Array(this.size * 2);
    score.set(this.score);
    this.arrival = arrival;
    this.score = score;
  }

  finish(): Edges {
    return { edgeFrom: this.edgeFrom, arrival: this.arrival.subarray(0, this.size), score: this.score.subarray(0, this.size) };
  }
}

/**
 * Best path and forward sums in one sweep: V(e, y) = max over spans (j, e) of node + A(j, y); A(j, y) = max over the
 * states before of V + transition, the same with log-sums. `bonus` is added to every node (training's cost).
 */
export function search(lattice: Lattice, transitions: Transitions, options: SearchOptions, bonus?: Float64Array): Search {
  return new Sweep(lattice, transitions, options, bonus).run();
}

class Sweep {
  private readonly edges: EdgeList;
  private ranked: number[] = [];
  private rankedKey: number[] = [];
  private rankedChord: number[] = [];
  private readonly scratch: Float64Array;
  private readonly arrivalBest: Float64Array;
  private readonly arrivalNode: Int32Array;
  private readonly arrivalSum: Float64Array;
  private readonly departureBest: Float64Array;
  private readonly departureFrom: Int32Array;
  private readonly departureSum: Float64Array;

  constructor(
    private readonly lattice: Lattice,
    private readonly transitions: Transitions,
    private readonly options: SearchOptions,
    private readonly bonus: Float64Array | undefined,
  ) {
    const departures = lattice.departureState.length;
    const arrivals = lattice.arrivalState.length;
    this.edges = new EdgeList(departures);
    this.scratch = new Float64Array(options.beam);
    this.arrivalBest = new Float64Array(arrivals).fill(-Infinity);
    this.arrivalNode = new Int32Array(arrivals).fill(-1);
    this.arrivalSum = new Float64Array(arrivals).fill(-Infinity);
    this.departureBest = new Float64Array(departures).fill(-Infinity);
    this.departureFrom = new Int32Array(departures).fill(-1);
    this.departureSum = new Float64Array(departures).fill(-Infinity);
  }

  run(): Search {
    const { lattice } = this;
    let node = 0;
    for (let j = 0; j < lattice.boundaries; j++) {
      this.linkBoundary(j);
      const last = lattice.departureFrom[j + 1]!;
      while (node < lattice.count && lattice.departureOf[node]! < last) this.passNode(node++);
    }
    return this.finish();
  }

  private linkBoundary(j: number): void {
    const { lattice, edges } = this;
    const from = lattice.departureFrom[j]!;
    const to = lattice.departureFrom[j + 1]!;
    if (j > 0) this.rankArrivals(j);
    const sameBar = j > 0 && this.transitions.isWithinBar(j);
    for (let d = from; d < to; d++) {
      edges.edgeFrom[d] = edges.size;
      if (j === 0) {
        this.departureBest[d] = 0;
        this.departureSum[d] = 0;
      } else this.linkDeparture(d, j, sameBar);
    }
    edges.edgeFrom[to] = edges.size;
  }

  /** Sorts the arrivals worth going on from, best first, with their keys and chords. */
  private rankArrivals(j: number): void {
    const { arrivalFrom, arrivalState } = this.lattice;
    const list: number[] = [];
    let best = -Infinity;
    for (let a = arrivalFrom[j]!; a < arrivalFrom[j + 1]!; a++) best = Math.max(best, this.arrivalSum[a]!);
    for (let a = arrivalFrom[j]!; a < arrivalFrom[j + 1]!; a++) if (this.arrivalSum[a]! > best - this.options.beamMargin) list.push(a);
    list.sort((a, b) => this.arrivalSum[b]! - this.arrivalSum[a]! || a - b);
    this.ranked = list.length > this.options.beam ? list.slice(0, this.options.beam) : list;
    this.rankedKey = this.ranked.map((a) => keyOfState(arrivalState[a]!));
    this.rankedChord = this.ranked.map((a, i) => arrivalState[a]! - this.rankedKey[i]! * CHORDS);
  }

  private linkDeparture(d: number, j: number, sameBar: boolean): void {
    const { lattice, transitions, ranked, rankedKey, rankedChord, scratch } = this;
    const to = lattice.departureState[d]!;
    const key = keyOfState(to);
    const chord = to - key * CHORDS;
    let others = 0;
    let highest = -Infinity;
    for (let i = 0; i < ranked.length; i++) {
      const a = ranked[i]!;
      const from = lattice.arrivalState[a]!;
      let score: number;
      if (rankedKey[i] === key) {
        score = from === to && sameBar ? IMPOSSIBLE : transitions.scoreInKey(from, to, rankedChord[i]!, chord, j);
      } else {
        score = others++ < this.options.otherKeys ? transitions.scoreChange(from, to, rankedKey[i]!, key, j) : IMPOSSIBLE;
      }
      scratch[i] = score;
      const sum = this.arrivalSum[a]! + score;
      if (sum > highest) highest = sum;
    }
    this.keepEdges(d, highest);
  }

  /** Keeps the edges that matter beside the strongest one, and sums them. */
  private keepEdges(d: number, highest: number): void {
    if (highest === -Infinity) return;
    const { ranked, scratch, edges } = this;
    let sum = 0;
    for (let i = 0; i < ranked.length; i++) {
      const a = ranked[i]!;
      const below = this.arrivalSum[a]! + scratch[i]! - highest;
      if (below < -EDGE_MARGIN) continue;
      sum += Math.exp(below);
      edges.add(a, scratch[i]!);
      const best = this.arrivalBest[a]! + scratch[i]!;
      if (best > this.departureBest[d]!) {
        this.departureBest[d] = best;
        this.departureFrom[d] = a;
      }
    }
    this.departureSum[d] = highest + Math.log(sum);
  }

  private passNode(n: number): void {
    const { lattice } = this;
    const d = lattice.departureOf[n]!;
    if (this.departureSum[d] === -Infinity) return;
    const a = lattice.arrivalOf[n]!;
    const local = lattice.score[n]! + (this.bonus ? this.bonus[n]! : 0);
    const best = this.departureBest[d]! + local;
    if (best > this.arrivalBest[a]!) {
      this.arrivalBest[a] = best;
      this.arrivalNode[a] = n;
    }
    this.arrivalSum[a] = addLogs(this.arrivalSum[a]!, this.departureSum[d]! + local);
  }

  private finish(): Search {
    const { lattice } = this;
    let best = -1;
    let total = -Infinity;
    for (let a = lattice.arrivalFrom[lattice.boundaries]!; a < lattice.arrivalFrom[lattice.boundaries + 1]!; a++) {
      total = addLogs(total, this.arrivalSum[a]!);
      if (best < 0 || this.arrivalBest[a]! > this.arrivalBest[best]!) best = a;
    }
    const path: number[] = [];
    for (let a = best; a >= 0; ) {
      const node = this.arrivalNode[a]!;
      if (node < 0) break;
      path.push(node);
      a = this.departureFrom[lattice.departureOf[node]!]!;
    }
    return {
      lattice,
      edges: this.edges.finish(),
      best: path.reverse(),
      bestScore: best >= 0 ? this.arrivalBest[best]! : -Infinity,
      arrivalSum: this.arrivalSum,
      departureSum: this.departureSum,
      total,
    };
  }
}

export function addLogs(a: number, b: number): number {
  if (a === -Infinity) return b;
  if (b === -Infinity) return a;
  const difference = a - b;
  if (difference > 0) return difference > 30 ? a : a + Math.log1p(Math.exp(-difference));
  return difference < -30 ? b : b + Math.log1p(Math.exp(difference));
}
