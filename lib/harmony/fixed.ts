import { type Candidate } from './candidates';
import { keyNumber } from './key-terms';
import { type Lattice, stateOf } from './lattice';
import { type Material } from './material';
import { type Label } from './reading';
import { BIN_SHIFT, type Slices } from './slices';
import { LABELS, findLabel } from './vocabulary';

/** A label that a person fixed, in the engine's terms: slices `from` to `to`; `state` −1 when the vocabulary lacks it. */
interface FixedSpan {
  readonly from: number;
  readonly to: number;
  readonly state: number;
  readonly key: number;
  readonly chord: Candidate | null;
}

export interface FixedSpans {
  /** The fixed span that a slice lies in, null where the engine is free. */
  readonly at: readonly (FixedSpan | null)[];
  readonly chords: (j: number, e: number) => readonly Candidate[];
  readonly keys: (i: number) => readonly number[];
}

export function alignFixed(fixed: readonly Label[], slices: Slices): FixedSpans {
  const at: (FixedSpan | null)[] = new Array<FixedSpan | null>(slices.count).fill(null);
  for (const label of fixed) {
    const inside = [];
    for (let i = 0; i < slices.count; i++) if (slices.start[i]! >= label.start && slices.start[i]! < label.end) inside.push(i);
    if (inside.length === 0) continue;
    const span = readFixed(label, inside[0]!, inside.at(-1)! + 1);
    for (const i of inside) at[i] = span;
  }
  return {
    at,
    chords: (j, e) => {
      const span = at[j];
      return span?.chord && at[e - 1] === span ? [span.chord] : [];
    },
    keys: (i) => (at[i] ? [at[i].key] : []),
  };
}

function readFixed(label: Label, from: number, to: number): FixedSpan {
  const { key, numeral } = label;
  const number = keyNumber(key.tonic, key.mode === 'major' ? 0 : 1);
  const id = numeral ? findLabel(key.mode, numeral) : -1;
  if (!numeral || id < 0 || numeral.inversion > 3) return { from, to, state: -1, key: number, chord: null };
  const { root, kind } = LABELS[id]!;
  const chord = { root: root + key.tonic + BIN_SHIFT, kind, inversion: numeral.inversion, rank: 0 };
  return { from, to, state: stateOf(number, id, numeral.inversion), key: number, chord };
}

/** Inside a fixed span only its own label may stand; no span may run over the edge of a fixed one. */
export function keepFixed({ at }: FixedSpans, material: Material): (segment: number, state: number) => 'must' | 'may' | 'no' {
  const { segments } = material;
  return (s, state) => {
    const first = at[segments.start[s]!] ?? null;
    for (let i = segments.start[s]!; i < segments.end[s]!; i++) if ((at[i] ?? null) !== first) return 'no';
    if (!first || first.state < 0) return 'may';
    return state === first.state ? 'must' : 'no';
  };
}


/**
 * −Infinity for every node that contradicts what is fixed, 0 for the others; null when the lattice lacks a fixed label, so
 * that it must be laid anew. Every bar's part of a fixed span must be there as one node.
 */
export function forbidOthers(lattice: Lattice, material: Material, fixed: FixedSpans): Float64Array | null {
  const { segments, slices } = material;
  const keep = keepFixed(fixed, material);
  const bonus = new Float64Array(lattice.count);
  const found = new Uint8Array(slices.count);
  for (let n = 0; n < lattice.count; n++) {
    const s = lattice.segment[n]!;
    const kept = keep(s, lattice.state[n]!);
    if (kept === 'no') bonus[n] = -Infinity;
    else if (kept === 'must' && fillsBar(fixed, material, s)) found.fill(1, segments.start[s]!, segments.end[s]!);
  }
  const isThere = fixed.at.every((span, i) => !span || span.state < 0 || found[i] === 1);
  return isThere ? bonus : null;
}

/** Whether a segment is all of its fixed span that lies in its bar. */
function fillsBar({ at }: FixedSpans, { segments, slices }: Material, s: number): boolean {
  const from = segments.start[s]!;
  const to = segments.end[s]!;
  const goesOn = (inside: number, outside: number) => at[inside] === at[outside] && slices.bar[inside] === slices.bar[outside];
  return !(from > 0 && goesOn(from, from - 1)) && !(to < slices.count && goesOn(to - 1, to));
}
