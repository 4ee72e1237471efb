import { type Candidate } from '../candidates';
import { modeOf, tonicOf } from '../key-terms';
import { type Lattice, inversionOfState, keyOfState, labelOfState } from '../lattice';
import { type Material } from '../material';
import { foldFifths } from '../relation';
import { BIN_SHIFT, type Slices } from '../slices';
import { LABELS } from '../vocabulary';
import { type ReferenceLabel } from './reference';

/** The reference label at every slice, null where the reference is silent. */
export type Gold = readonly (ReferenceLabel | null)[];

export function alignGold(slices: Slices, reference: readonly ReferenceLabel[]): Gold {
  let r = 0;
  return Array.from({ length: slices.count }, (_, i) => {
    const middle = (slices.start[i]! + slices.end[i]!) / 2;
    while (r + 1 < reference.length && reference[r]!.end <= middle) r++;
    const label = reference[r];
    return label && label.start <= middle && middle < label.end ? label : null;
  });
}

/** Keys are the same whatever their spelling: C♯ major is D♭ major. */
export function sameKey(a: number, b: number): boolean {
  return modeOf(a) === modeOf(b) && foldFifths(tonicOf(a) - tonicOf(b)) === 0;
}

/** Share of a reference label that a state gets right: 1 for the full numeral, else 0.4 for the chord and 0.3 for the key. */
export function creditOf(state: number, gold: ReferenceLabel): number {
  const label = LABELS[labelOfState(state)]!;
  const key = keyOfState(state);
  const rightKey = sameKey(key, gold.key);
  const rightInversion = inversionOfState(state) === gold.inversion;
  if (rightKey && rightInversion && label.id === gold.label) return 1;
  const rightChord = rightInversion && label.kind === gold.kind && foldFifths(label.root + tonicOf(key) - gold.root) === 0;
  return (rightChord ? 0.4 : 0) + (rightKey ? 0.3 : 0);
}

/** Beats of credit per node over its span; `all` are the beats that have a reference. */
export function creditNodes(lattice: Lattice, material: Material, gold: Gold): { credit: Float64Array; all: Float64Array } {
  const { segments, slices } = material;
  const credit = new Float64Array(lattice.count);
  const all = new Float64Array(lattice.count);
  for (let n = 0; n < lattice.count; n++) {
    const s = lattice.segment[n]!;
    for (let i = segments.start[s]!; i < segments.end[s]!; i++) {
      const label = gold[i];
      if (!label) continue;
      all[n] = all[n]! + slices.beats[i]!;
      credit[n] = credit[n]! + slices.beats[i]! * creditOf(lattice.state[n]!, label);
    }
  }
  return { credit, all };
}

/** The reference's chord where one reference label covers the whole span; for training only. */
export function goldChords(gold: Gold): (j: number, e: number) => readonly Candidate[] {
  return (j, e) => {
    const label = gold[j];
    if (!label || label.kind < 0) return [];
    for (let i = j + 1; i < e; i++) if (gold[i] !== label) return [];
    return [{ root: label.root + BIN_SHIFT, kind: label.kind, inversion: label.inversion, rank: 0 }];
  };
}

export function goldKeys(gold: Gold): (i: number) => readonly number[] {
  return (i) => (gold[i] ? [gold[i].key] : []);
}

/** Keeps the reference's nodes whatever the weights say of them. */
export function keepGold(gold: Gold, material: Material): (segment: number, state: number) => 'must' | 'may' {
  const { segments } = material;
  return (s, state) => {
    const label = gold[segments.start[s]!];
    return label && label === gold[segments.end[s]! - 1] && creditOf(state, label) === 1 ? 'must' : 'may';
  };
}
