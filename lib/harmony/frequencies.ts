import { PROFILE_SIZE } from './key-terms';
import { TEMPLATES } from './templates';
import { LABELS, LABEL_COUNT, ROWS, ROW_COUNT } from './vocabulary';
import { RELATIONS, type Tables } from './weights';

/** Raw counts of an analysed corpus; what weights.json keeps, so that a reader can see where a frequency comes from. */
export interface Counts {
  readonly label: Float64Array;
  readonly inversion: Float64Array;
  readonly progression: Float64Array;
  readonly relation: Float64Array;
  readonly profile: Float64Array;
}

function add(counts: Float64Array, at: number, amount: number): void {
  counts[at] = counts[at]! + amount;
}

const UNSEEN_LABEL = 0.05;
const SMOOTHING_TO_UNIGRAM = 8;
const SMOOTHING_TO_CLASS = 4;
const UNSEEN_RELATION = 0.5;
const UNSEEN_PLACE = 0.002;

/** Smoothed log frequencies: unseen labels stay reachable, rare contexts fall back to the commoner ones. */
export function smoothCounts(counts: Counts): Tables {
  return {
    label: smoothLabels(counts.label),
    inversion: smoothInversions(counts.inversion),
    progression: smoothProgressions(counts),
    relation: smoothRelations(counts.relation),
    profile: smoothProfiles(counts.profile),
  };
}

function sumOf(values: Iterable<number>): number {
  let sum = 0;
  for (const value of values) sum += value;
  return sum;
}

function smoothLabels(counts: Float64Array): Float64Array {
  const total = { major: 0, minor: 0 };
  for (const label of LABELS) total[label.mode] += counts[label.id]! + UNSEEN_LABEL;
  return Float64Array.from(LABELS, (label) => Math.log((counts[label.id]! + UNSEEN_LABEL) / total[label.mode]));
}

function smoothInversions(counts: Float64Array): Float64Array {
  const groups = new Map<string, Float64Array>();
  const groupOf = (label: (typeof LABELS)[number]) => `${label.labelClass} ${TEMPLATES[label.kind]!.tones.length} ${label.sixFour}`;
  for (const label of LABELS) {
    const group = groups.get(groupOf(label)) ?? new Float64Array(4).fill(0.5);
    groups.set(groupOf(label), group);
    for (let inversion = 0; inversion < 4; inversion++) add(group, inversion, counts[label.id * 4 + inversion]!);
  }
  const table = new Float64Array(LABEL_COUNT * 4);
  for (const label of LABELS) {
    const group = groups.get(groupOf(label))!;
    const all = sumOf(group);
    const own = sumOf(counts.subarray(label.id * 4, label.id * 4 + 4));
    for (let inversion = 0; inversion < 4; inversion++) {
      const backed = counts[label.id * 4 + inversion]! + SMOOTHING_TO_CLASS * (group[inversion]! / all);
      table[label.id * 4 + inversion] = label.sixFour ? 0 : Math.log(backed / (own + SMOOTHING_TO_CLASS));
    }
  }
  return table;
}

function smoothProgressions(counts: Counts): Float64Array {
  const modeOfRow = ROWS.map((name) => name.slice(0, 5));
  const unigram = new Float64Array(ROW_COUNT).fill(0.1);
  for (const label of LABELS) add(unigram, label.row, counts.label[label.id]!);
  const total = { major: 0, minor: 0 } as Record<string, number>;
  unigram.forEach((count, row) => (total[modeOfRow[row]!] = total[modeOfRow[row]!]! + count));
  const table = new Float64Array(ROW_COUNT * ROW_COUNT).fill(Math.log(1e-6));
  for (let from = 0; from < ROW_COUNT; from++) {
    const seen = sumOf(counts.progression.subarray(from * ROW_COUNT, (from + 1) * ROW_COUNT));
    for (let to = 0; to < ROW_COUNT; to++) {
      if (modeOfRow[from] !== modeOfRow[to]) continue;
      const backed = counts.progression[from * ROW_COUNT + to]! + SMOOTHING_TO_UNIGRAM * (unigram[to]! / total[modeOfRow[to]!]!);
      table[from * ROW_COUNT + to] = Math.log(backed / (seen + SMOOTHING_TO_UNIGRAM));
    }
  }
  return table;
}

function smoothRelations(counts: Float64Array): Float64Array {
  const half = RELATIONS / 2;
  return counts.map((count, relation) => {
    const from = relation < half ? 0 : 1;
    const all = sumOf(counts.subarray(from * half, (from + 1) * half)) + UNSEEN_RELATION * half;
    return Math.log((count + UNSEEN_RELATION) / all);
  });
}

function smoothProfiles(counts: Float64Array): Float64Array {
  return counts.map((count, place) => {
    const mode = place < PROFILE_SIZE ? 0 : 1;
    const all = sumOf(counts.subarray(mode * PROFILE_SIZE, (mode + 1) * PROFILE_SIZE));
    return Math.log(all > 0 ? count / all + UNSEEN_PLACE : UNSEEN_PLACE);
  });
}
