import { type Counts } from '../frequencies';
import { PROFILE_SIZE, modeOf, placeInProfile, tonicOf } from '../key-terms';
import { relationOf } from '../relation';
import { BIN_SHIFT, type Slices } from '../slices';
import { LABELS, LABEL_COUNT, ROW_COUNT } from '../vocabulary';
import { RELATIONS } from '../weights';
import { type ReferenceLabel } from './reference';

export interface AnalysedScore {
  readonly slices: Slices;
  readonly reference: readonly ReferenceLabel[];
}

export function countCorpus(scores: readonly AnalysedScore[]): Counts {
  const counts: Counts = {
    label: new Float64Array(LABEL_COUNT),
    inversion: new Float64Array(LABEL_COUNT * 4),
    progression: new Float64Array(ROW_COUNT * ROW_COUNT),
    relation: new Float64Array(RELATIONS),
    profile: new Float64Array(2 * PROFILE_SIZE),
  };
  for (const score of scores) {
    countLabels(counts, score.reference);
    countProfile(counts.profile, score);
  }
  return counts;
}

function add(counts: Float64Array, at: number, amount = 1): void {
  counts[at] = counts[at]! + amount;
}

function countLabels(counts: Counts, reference: readonly ReferenceLabel[]): void {
  reference.forEach((label, i) => {
    const before = reference[i - 1];
    if (before && before.key !== label.key) add(counts.relation, relationOf(before.key, label.key));
    if (label.label < 0) return;
    add(counts.label, label.label);
    add(counts.inversion, label.label * 4 + label.inversion);
    if (!before || before.label < 0 || before.key !== label.key || before.label === label.label) return;
    add(counts.progression, LABELS[before.label]!.row * ROW_COUNT + LABELS[label.label]!.row);
  });
}

/** Beats of every spelled pitch relative to the tonic, under the reference's keys. */
function countProfile(profile: Float64Array, { slices, reference }: AnalysedScore): void {
  let r = 0;
  for (let i = 0; i < slices.count; i++) {
    while (r + 1 < reference.length && reference[r]!.end <= slices.start[i]!) r++;
    const label = reference[r];
    if (!label || slices.start[i]! < label.start) continue;
    for (let p = slices.first[i]!; p < slices.first[i + 1]!; p++) {
      const place = placeInProfile(slices.bin[p]! - BIN_SHIFT - tonicOf(label.key));
      add(profile, modeOf(label.key) * PROFILE_SIZE + place, slices.sounding[p]!);
    }
  }
}
