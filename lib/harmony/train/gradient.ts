import { CHORD_TERM_COUNT } from '../chord-terms';
import { type Path, type Search } from '../decode';
import { KEY_FACT_COUNT, KEY_PROFILE_COUNT, KEY_WINDOWS, fillKeyFacts, modeOf, placeInProfile, profileAt, tonicOf } from '../key-terms';
import { type KeysTried } from '../keys-tried';
import { type Lattice, keyOfState, labelOfState } from '../lattice';
import { type Material } from '../material';
import { NodeTerms } from '../node-terms';
import { type Posterior } from '../posterior';
import { BIN_SHIFT } from '../slices';
import { SPAN_TERM_COUNT } from '../span-terms';
import { type Transitions } from '../transitions';
import { AT, type Weights } from '../weights';

const LEAST = 1e-4;

/** Amounts of every weight's term, gathered sparsely. */
export class Gradient {
  readonly amount = new Float64Array(AT.size);
  readonly touched: number[] = [];
  private readonly isTouched = new Uint8Array(AT.size);

  readonly add = (weight: number, amount: number): void => {
    if (this.isTouched[weight] === 0) {
      this.isTouched[weight] = 1;
      this.touched.push(weight);
    }
    this.amount[weight] = this.amount[weight]! + amount;
  };

  clear(): void {
    for (const weight of this.touched) {
      this.amount[weight] = 0;
      this.isTouched[weight] = 0;
    }
    this.touched.length = 0;
  }
}

export interface Instance {
  readonly material: Material;
  readonly keys: KeysTried;
  readonly lattice: Lattice;
  readonly transitions: Transitions;
  readonly weights: Weights;
}

/** Adds the terms of the path that is wanted, less those expected under the model: where the weights should go. */
export function gatherGradient(gradient: Gradient, instance: Instance, wanted: Path, found: Search, expected: Posterior): void {
  const { lattice } = instance;
  const difference = expected.node.map((probability) => -probability);
  for (const n of wanted) difference[n] = difference[n]! + 1;
  gatherNodes(gradient, instance, difference);
  gatherKeys(gradient, instance, difference);
  gatherTransitions(gradient, instance, wanted, expected, lattice, found);
}

function gatherNodes(gradient: Gradient, instance: Instance, difference: Float64Array): void {
  const { lattice, material, weights } = instance;
  const terms = new NodeTerms(material, weights);
  for (let n = 0; n < lattice.count; n++) {
    const by = difference[n]!;
    if (Math.abs(by) < LEAST) continue;
    addRow(gradient, AT.chord, material.terms, lattice.candidate[n]! * CHORD_TERM_COUNT, CHORD_TERM_COUNT, by);
    addRow(gradient, AT.span, material.spanTerms, lattice.segment[n]! * SPAN_TERM_COUNT, SPAN_TERM_COUNT, by);
    const state = lattice.state[n]!;
    terms.readLabel(lattice.segment[n]!, lattice.candidate[n]!, keyOfState(state), labelOfState(state), (weight, amount) => gradient.add(weight, by * amount));
  }
}

function addRow(gradient: Gradient, block: number, terms: Float32Array, at: number, size: number, by: number): void {
  for (let t = 0; t < size; t++) {
    const amount = terms[at + t]!;
    if (amount !== 0) gradient.add(block + t, by * amount);
  }
}

function gatherKeys(gradient: Gradient, instance: Instance, difference: Float64Array): void {
  const { lattice, material, keys } = instance;
  const { segments, evidence, slices } = material;
  const mass = new Float64Array(keys.keys.length);
  for (let n = 0; n < lattice.count; n++) {
    const by = difference[n]!;
    if (Math.abs(by) < LEAST) continue;
    const s = lattice.segment[n]!;
    for (let i = segments.start[s]!; i < segments.end[s]!; i++) {
      const slot = i * keys.count + lattice.keyPlace[n]!;
      mass[slot] = mass[slot]! + by;
    }
  }
  const facts = new Float32Array(KEY_FACT_COUNT);
  for (let i = 0; i < slices.count; i++) {
    for (let k = 0; k < keys.count; k++) {
      const by = mass[i * keys.count + k]! * slices.beats[i]!;
      if (Math.abs(by) < LEAST) continue;
      gatherKey(gradient, evidence, i, keys.keys[i * keys.count + k]!, by, facts);
    }
  }
}

function gatherKey(gradient: Gradient, evidence: Material['evidence'], i: number, key: number, by: number, facts: Float32Array): void {
  const tonic = tonicOf(key) + BIN_SHIFT;
  const size = evidence.bins.length;
  for (let w = 0; w < KEY_WINDOWS.length; w++) {
    const at = AT.key + profileAt(w, modeOf(key));
    for (let b = 0; b < size; b++) {
      const share = evidence.share[(i * KEY_WINDOWS.length + w) * size + b]!;
      if (share > 0) gradient.add(at + placeInProfile(evidence.bins[b]! - tonic), by * share);
    }
  }
  fillKeyFacts(facts, evidence, i, key);
  for (let k = 0; k < KEY_FACT_COUNT; k++) if (facts[k] !== 0) gradient.add(AT.key + KEY_PROFILE_COUNT + k, by * facts[k]!);
}

function gatherTransitions(gradient: Gradient, instance: Instance, wanted: Path, expected: Posterior, lattice: Lattice, found: Search): void {
  const { transitions, material } = instance;
  for (let i = 1; i < wanted.length; i++) {
    const from = lattice.state[wanted[i - 1]!]!;
    const to = lattice.state[wanted[i]!]!;
    transitions.read(from, to, material.segments.start[lattice.segment[wanted[i]!]!]!, gradient.add);
  }
  const boundaryOf = boundaries(lattice);
  expected.eachTransition(LEAST, (departure, arrival, probability) => {
    transitions.read(found.lattice.arrivalState[arrival]!, lattice.departureState[departure]!, boundaryOf[departure]!, (weight, amount) =>
      gradient.add(weight, -probability * amount),
    );
  });
}

function boundaries(lattice: Lattice): Int32Array {
  const of = new Int32Array(lattice.departureState.length);
  for (let j = 0; j < lattice.boundaries; j++) of.fill(j, lattice.departureFrom[j]!, lattice.departureFrom[j + 1]!);
  return of;
}
