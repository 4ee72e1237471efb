import { type Score, ticks } from '../score/score';
import { type Key } from '../theory/key';
import { fifths } from '../theory/pitch';
import { search } from './decode';
import { type FixedSpans, alignFixed, forbidOthers, keepFixed } from './fixed';
import { modeOf, tonicOf } from './key-terms';
import { scoreKeys } from './keys-tried';
import { type Lattice, type LatticeOptions, buildLattice, keyOfState } from './lattice';
import { nameInContext } from './naming';
import { type Posterior, sumBackward } from './posterior';
import { type Prepared, type PrepareOptions, gatherExcerpt, prepareSlices } from './prepare';
import { type ChosenSpan, type SliceStates, chooseSpans, rankStates, statesBySlice } from './read-out';
import { type KeyRegion, type Label, type OtherReading, type Reading } from './reading';
import { LATTICE_OPTIONS, SEARCH_OPTIONS } from './search-options';
import { getShippedWeights } from './shipped-weights';
import { type Slices } from './slices';
import { Transitions } from './transitions';
import { type Weights } from './weights';

export interface Decoded {
  readonly prepared: Prepared;
  readonly lattice: Lattice;
  readonly posterior: Posterior;
  readonly states: SliceStates;
  readonly spans: readonly ChosenSpan[];
}

export interface ProposeOptions {
  /** The excerpt in ticks; without them the whole score. */
  readonly start?: number;
  readonly end?: number;
  /** Labels that a person accepted or wrote: they stay exactly as they are, and what stands around them follows from them. */
  readonly fixed?: readonly Label[];
}

/** How many runners-up a label keeps, and how unlikely one may be. */
const OTHERS_KEPT = 5;
const LEAST_CERTAINTY = 0.01;

/** Searches a prepared excerpt under the weights; `quarter` is the score's ticks per quarter. */
export function decode(prepared: Prepared, weights: Weights, quarter: number, fixed?: FixedSpans): Decoded {
  const { material } = prepared;
  const lattice = layLattice(prepared, weights, fixed ? { ...LATTICE_OPTIONS, keep: keepFixed(fixed, material) } : LATTICE_OPTIONS);
  return sumUp(prepared, lattice, weights, quarter);
}

function layLattice({ material, keys, keyCount }: Prepared, weights: Weights, options: LatticeOptions): Lattice {
  return buildLattice(material, scoreKeys(material.slices, material.evidence, weights, keys, keyCount), weights, options);
}

/** Sums over the lattice and reads the likeliest spans out of it; `bonus` forbids nodes with −Infinity. */
function sumUp(prepared: Prepared, lattice: Lattice, weights: Weights, quarter: number, bonus?: Float64Array): Decoded {
  const { material } = prepared;
  const posterior = sumBackward(search(lattice, new Transitions(material, weights), SEARCH_OPTIONS, bonus), bonus);
  const states = statesBySlice(lattice, material, posterior);
  return { prepared, lattice, posterior, states, spans: chooseSpans(lattice, material, posterior, states, quarter) };
}

export function decodeScore(score: Score, weights: Weights, choosing: Weights, options: PrepareOptions = {}): Decoded {
  const slices = gatherExcerpt(score, options);
  return decode(prepareSlices(score, slices, choosing, options), weights, score.ticksPerQuarter);
}

export function keyOf(number: number): Key {
  return { tonic: fifths(tonicOf(number)), mode: modeOf(number) === 0 ? 'major' : 'minor' };
}

/**
 * The engine's reading of a score or of an excerpt of it (ticks): key regions and labels that tile it, each with its
 * certainty and the runners-up. Deterministic. A score in which nothing sounds gives a reading without labels.
 */
export function proposeReading(score: Score, options: ProposeOptions = {}): Reading {
  const start = options.start ?? 0;
  const last = score.bars.at(-1);
  const end = options.end ?? (last ? last.start + last.length : 0);
  const ground = groundOf(score, start, end);
  const { slices } = ground.prepared.material;
  const fixed = options.fixed ?? [];
  if (slices.count === 0) return makeReading(start, end, fixed);
  const decoded = fixed.length > 0 ? decodeAround(score, ground, alignFixed(fixed, slices)) : decodeFreely(score, ground);
  return makeReading(start, end, withFixed(labelSpans(decoded, slices, start, end), fixed));
}

/** What the last proposal for a score was read from: asked again around what a person fixed, only the sums are made anew. */
interface Ground {
  readonly start: number;
  readonly end: number;
  readonly prepared: Prepared;
  readonly lattice: Lattice | null;
}

const grounds = new WeakMap<Score, Ground>();

function groundOf(score: Score, start: number, end: number): Ground {
  const known = grounds.get(score);
  if (known?.start === start && known.end === end) return known;
  const { weights, choosing } = getShippedWeights();
  const slices = gatherExcerpt(score, { start, end });
  const prepared = prepareSlices(score, slices, choosing);
  const ground = { start, end, prepared, lattice: slices.count > 0 ? layLattice(prepared, weights, LATTICE_OPTIONS) : null };
  grounds.set(score, ground);
  return ground;
}

function decodeFreely(score: Score, { prepared, lattice }: Ground): Decoded {
  return sumUp(prepared, lattice!, getShippedWeights().weights, score.ticksPerQuarter);
}

/** Where the lattice has what a person fixed, all else is forbidden in it; otherwise it is laid anew with it. */
function decodeAround(score: Score, { prepared, lattice }: Ground, fixed: FixedSpans): Decoded {
  const { weights, choosing } = getShippedWeights();
  const { material } = prepared;
  const bonus = forbidOthers(lattice!, material, fixed);
  if (bonus) return sumUp(prepared, lattice!, weights, score.ticksPerQuarter, bonus);
  const wanted = { wantedChords: fixed.chords, wantedKeys: fixed.keys };
  return decode(prepareSlices(score, material.slices, choosing, wanted), weights, score.ticksPerQuarter, fixed);
}

/** A decoded score as a reading of the whole score. */
export function readingOf(decoded: Decoded, slices: Slices, score: Score): Reading {
  const last = score.bars.at(-1);
  const end = last ? last.start + last.length : 0;
  return makeReading(0, end, labelSpans(decoded, slices, 0, end));
}

function labelSpans(decoded: Decoded, slices: Slices, start: number, end: number): readonly Label[] {
  const { spans, states } = decoded;
  return spans.map((span, i): Label => {
    const from = i === 0 ? start : slices.start[span.from]!;
    const to = i + 1 < spans.length ? slices.start[spans[i + 1]!.from]! : end;
    return {
      id: `proposed-${from}`,
      start: ticks(from),
      end: ticks(to),
      key: keyOf(keyOfState(span.state)),
      numeral: nameInContext(spans, i, slices),
      state: 'suggested',
      certainty: span.certainty,
      others: findOthers(span, states, slices),
    };
  });
}

function findOthers(span: ChosenSpan, states: SliceStates, slices: Slices): readonly OtherReading[] {
  return rankStates(span, states, slices)
    .filter(([state, certainty]) => state !== span.state && certainty >= LEAST_CERTAINTY)
    .slice(0, OTHERS_KEPT)
    .map(([state, certainty]) => ({ key: keyOf(keyOfState(state)), numeral: nameInContext([{ ...span, state }], 0, slices), certainty }));
}

/** Puts the fixed labels in their places; proposals give way to them. */
function withFixed(proposed: readonly Label[], fixed: readonly Label[]): readonly Label[] {
  if (fixed.length === 0) return proposed;
  const free = proposed.flatMap((label) => cutAround(label, fixed));
  return [...free, ...fixed].sort((a, b) => a.start - b.start);
}

/** What is left of a proposed label outside the fixed ones. */
function cutAround(label: Label, fixed: readonly Label[]): readonly Label[] {
  let pieces: Label[] = [label];
  for (const { start, end } of fixed) {
    pieces = pieces.flatMap((piece) => {
      if (end <= piece.start || start >= piece.end) return [piece];
      const before = start > piece.start ? [{ ...piece, end: start }] : [];
      const after = end < piece.end ? [{ ...piece, start: end, id: `proposed-${end}` }] : [];
      return [...before, ...after];
    });
  }
  return pieces;
}

/** A reading of labels that tile it: the key regions follow from the labels' keys. */
function makeReading(start: number, end: number, labels: readonly Label[]): Reading {
  const regions: KeyRegion[] = [];
  for (const { start: from, end: to, key } of labels) {
    const before = regions.at(-1);
    if (before && before.key.tonic === key.tonic && before.key.mode === key.mode) regions[regions.length - 1] = { ...before, end: to };
    else regions.push({ start: from, end: to, key });
  }
  return { start: ticks(start), end: ticks(end), regions, labels };
}
