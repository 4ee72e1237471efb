import { type Path, search } from '../decode';
import { scoreKeys } from '../keys-tried';
import { type Lattice, buildLattice } from '../lattice';
import { sumBackward } from '../posterior';
import { type Prepared } from '../prepare';
import { LEARNING_LATTICE, LEARNING_SEARCH } from '../search-options';
import { Transitions } from '../transitions';
import { AT, type Weights } from '../weights';
import { type Gold, creditNodes, keepGold } from './gold';
import { Gradient, type Instance, gatherGradient } from './gradient';

export interface TrainingItem {
  readonly name: string;
  readonly prepared: Prepared;
  readonly gold: Gold;
}

export interface LearningOptions {
  readonly epochs: number;
  readonly seed: number;
  /** Step of AdaGrad for the named terms of chord, span and key; for labels and transitions; for the fine corrections. */
  readonly namedRate: number;
  readonly labelRate: number;
  readonly fineRate: number;
  /** Cost per beat of a label without credit. */
  readonly margin: number;
}

export const LEARNING: LearningOptions = { epochs: 10, seed: 1, namedRate: 0.02, labelRate: 0.04, fineRate: 0.04, margin: 1 };

/** The reference is found by its credit alone; few rivals matter. */
const WANTED_SEARCH = { beam: 12, beamMargin: 60, otherKeys: 6 };

/** A small seeded generator (mulberry32), so that training gives the same weights every time. */
export function seededRandom(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = state;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

function shuffled<T>(items: readonly T[], random: () => number): T[] {
  const list = [...items];
  for (let i = list.length - 1; i > 0; i--) {
    const k = Math.floor(random() * (i + 1));
    [list[i], list[k]] = [list[k]!, list[i]!];
  }
  return list;
}

/**
 * Learns weights by conditional likelihood with a margin: every other way through the lattice is charged for the time it
 * gets wrong, and the weights move from what the model then expects towards the reference. AdaGrad in small steps keeps
 * them near the values set by hand; the result is the average from the second epoch on.
 */
export function learn(items: readonly TrainingItem[], start: Weights, options: LearningOptions, report: (text: string) => void): Weights {
  const weights: Weights = { values: Float64Array.from(start.values), tables: start.tables };
  const squares = new Float64Array(AT.size).fill(1);
  const sum = new Float64Array(AT.size);
  let summed = 0;
  const random = seededRandom(options.seed);
  const gradient = new Gradient();
  for (let epoch = 0; epoch < options.epochs; epoch++) {
    let loss = 0;
    for (const item of shuffled(items, random)) {
      loss += learnItem(item, weights, gradient, options);
      step(weights.values, squares, gradient, Math.sqrt(item.prepared.material.slices.count + 10), options);
      gradient.clear();
      if (epoch === 0) continue;
      for (let w = 0; w < AT.size; w++) sum[w] = sum[w]! + weights.values[w]!;
      summed++;
    }
    report(`epoch ${epoch + 1}: loss ${loss.toFixed(1)}`);
  }
  return summed ? { values: sum.map((value) => value / summed), tables: start.tables } : weights;
}

/** One piece: its gradient into `gradient`; returns its loss. */
function learnItem(item: TrainingItem, weights: Weights, gradient: Gradient, options: LearningOptions): number {
  const { material, keys, keyCount } = item.prepared;
  if (material.slices.count === 0) return 0;
  const scored = scoreKeys(material.slices, material.evidence, weights, keys, keyCount);
  const lattice = buildLattice(material, scored, weights, { ...LEARNING_LATTICE, keep: keepGold(item.gold, material) });
  const transitions = new Transitions(material, weights);
  const { credit, all } = creditNodes(lattice, material, item.gold);
  const wanted = findWanted(lattice, transitions, credit);
  const cost = credit.map((beats, n) => options.margin * (all[n]! - beats));
  const found = search(lattice, transitions, LEARNING_SEARCH, cost);
  if (found.total === -Infinity || wanted.length === 0) return 0;
  const instance: Instance = { material, keys: scored, lattice, transitions, weights };
  gatherGradient(gradient, instance, wanted, found, sumBackward(found, cost));
  return found.total - scorePath(lattice, transitions, material.segments.start, wanted, cost);
}

/** The path of most credit, the model deciding where the reference leaves room. */
function findWanted(lattice: Lattice, transitions: Transitions, credit: Float64Array): Path {
  return search(lattice, transitions, WANTED_SEARCH, credit.map((beats) => 30 * beats)).best;
}

function scorePath(lattice: Lattice, transitions: Transitions, starts: Int32Array, path: Path, cost: Float64Array): number {
  let score = 0;
  path.forEach((n, i) => {
    score += lattice.score[n]! + cost[n]!;
    if (i > 0) score += transitions.score(lattice.state[path[i - 1]!]!, lattice.state[n]!, starts[lattice.segment[n]!]!);
  });
  return score;
}

function rateOf(weight: number, options: LearningOptions): number {
  if (weight < AT.label) return options.namedRate;
  return weight < AT.perLabel ? options.labelRate : options.fineRate;
}

function step(values: Float64Array, squares: Float64Array, gradient: Gradient, scale: number, options: LearningOptions): void {
  for (const weight of gradient.touched) {
    const slope = gradient.amount[weight]! / scale;
    squares[weight] = squares[weight]! + slope * slope;
    values[weight] = values[weight]! + (rateOf(weight, options) * slope) / Math.sqrt(squares[weight]!);
  }
}

