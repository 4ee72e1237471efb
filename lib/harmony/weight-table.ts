import { BASS_MOTIONS } from './bass-motion';
import { CHORD_TERMS } from './chord-terms';
import { type Counts, smoothCounts } from './frequencies';
import { KEY_FACTS, KEY_PROFILE_COUNT, KEY_WINDOWS, PROFILE_LOW, PROFILE_SIZE, profileAt } from './key-terms';
import { LABEL_TERMS } from './label-terms';
import { SPAN_TERMS } from './span-terms';
import { TRANSITION_TERMS } from './transition-terms';
import { LABELS, LABEL_CLASSES, LABEL_COUNT, ROWS, ROW_COUNT } from './vocabulary';
import { AT, RELATIONS, type Weights, handWeights } from './weights';

type Numbers = Readonly<Record<string, number>>;

/** The readable form of the weights, as committed in weights.json: every number under the name of its term. */
export interface WeightTable {
  readonly provenance: Readonly<Record<string, string | number>>;
  readonly terms: { readonly chord: Numbers; readonly span: Numbers; readonly key: Numbers; readonly label: Numbers; readonly transition: Numbers };
  /** Per window and mode: weight of a pitch's share by its place on the line of fifths from the tonic, lowest first. */
  readonly keyProfiles: Readonly<Record<string, readonly number[]>>;
  /** Fine corrections, those that matter: `major V7`, `class, triad or seventh, inversion`, `row > row`. */
  readonly corrections: { readonly label: Numbers; readonly inversion: Numbers; readonly metre: Numbers; readonly length: Numbers; readonly labelInversion: Numbers; readonly motion: Numbers; readonly relation: Numbers; readonly progression: Numbers };
  /** What was counted in the analysed scores. */
  readonly counts: { readonly label: Numbers; readonly inversion: Readonly<Record<string, readonly number[]>>; readonly progression: Numbers; readonly relation: Numbers; readonly profile: Readonly<Record<string, readonly number[]>> };
}

const MODE_NAMES = ['major', 'minor'] as const;
const INVERSION_SLOT_NAMES = LABEL_CLASSES.flatMap((name) => ['triad', 'seventh'].flatMap((size) => [0, 1, 2, 3].map((i) => `${name}, ${size}, ${i}`)));
const METRE_NAMES = LABEL_CLASSES.flatMap((name) => ['downbeat', 'half-bar', 'beat', 'half-beat', 'off'].map((level) => `${name} on ${level}`));
const LENGTH_NAMES = LABEL_CLASSES.flatMap((name) => ['length', 'under a beat', 'a bar'].map((length) => `${name}, ${length}`));
const MOTION_NAMES = LABEL_CLASSES.flatMap((from) => LABEL_CLASSES.flatMap((to) => BASS_MOTIONS.map((motion) => `${from} > ${to}, ${motion}`)));
const LABEL_NAMES = LABELS.map((label) => `${label.mode} ${label.name}`);
const LABEL_INVERSION_NAMES = LABEL_NAMES.flatMap((name) => [0, 1, 2, 3].map((inversion) => `${name}, ${inversion}`));
const RELATION_NAMES = Array.from({ length: RELATIONS }, (_, relation) => {
  const modes = Math.floor(relation / 13);
  const distance = (relation % 13) - 6;
  return `${MODE_NAMES[modes >> 1]!} to ${MODE_NAMES[modes & 1]!} ${distance > 0 ? '+' : ''}${distance}`;
});

function nameProgression(cell: number): string {
  return `${ROWS[Math.floor(cell / ROW_COUNT)]!} > ${ROWS[cell % ROW_COUNT]!}`;
}

function round(value: number): number {
  return Math.round(value * 10000) / 10000;
}

function named(names: readonly string[], values: Float64Array, at: number): Numbers {
  return Object.fromEntries(names.map((name, i) => [name, round(values[at + i]!)]));
}

/** Corrections too small to change a decision are left out. */
const LEAST_CORRECTION = 0.003;

function sparse(name: (i: number) => string, values: Float64Array, at: number, size: number, least: number): Numbers {
  const kept: [string, number][] = [];
  for (let i = 0; i < size; i++) if (Math.abs(values[at + i]!) >= least) kept.push([name(i), round(values[at + i]!)]);
  return Object.fromEntries(kept);
}

export function formatWeights(weights: Weights, counts: Counts, provenance: WeightTable['provenance']): WeightTable {
  const { values } = weights;
  const profiles = KEY_WINDOWS.flatMap(([name], window) =>
    MODE_NAMES.map((mode, m) => [`${name} ${mode}`, Array.from(values.subarray(AT.key + profileAt(window, m), AT.key + profileAt(window, m) + PROFILE_SIZE), round)] as const),
  );
  const correct = (name: (i: number) => string, at: number, size: number) => sparse(name, values, at, size, LEAST_CORRECTION);
  return {
    provenance: { ...provenance, 'lowest place in key profiles': PROFILE_LOW },
    terms: {
      chord: named(CHORD_TERMS.map(([name]) => name), values, AT.chord),
      span: named(SPAN_TERMS.map(([name]) => name), values, AT.span),
      key: named(KEY_FACTS.map(([name]) => name), values, AT.key + KEY_PROFILE_COUNT),
      label: named(LABEL_TERMS.map(([name]) => name), values, AT.label),
      transition: named(TRANSITION_TERMS.map(([name]) => name), values, AT.transition),
    },
    keyProfiles: Object.fromEntries(profiles),
    corrections: {
      label: correct((i) => LABEL_NAMES[i]!, AT.perLabel, LABEL_COUNT),
      inversion: correct((i) => INVERSION_SLOT_NAMES[i]!, AT.inversion, INVERSION_SLOT_NAMES.length),
      metre: correct((i) => METRE_NAMES[i]!, AT.classLevel, METRE_NAMES.length),
      length: correct((i) => LENGTH_NAMES[i]!, AT.classLength, LENGTH_NAMES.length),
      labelInversion: correct((i) => LABEL_INVERSION_NAMES[i]!, AT.labelInversion, LABEL_INVERSION_NAMES.length),
      motion: correct((i) => MOTION_NAMES[i]!, AT.classMotion, MOTION_NAMES.length),
      relation: correct((i) => RELATION_NAMES[i]!, AT.relation, RELATIONS),
      progression: correct(nameProgression, AT.progression, ROW_COUNT * ROW_COUNT),
    },
    counts: formatCounts(counts),
  };
}

function formatCounts(counts: Counts): WeightTable['counts'] {
  const seen = LABELS.filter((label) => counts.label[label.id]! > 0);
  return {
    label: sparse((i) => LABEL_NAMES[i]!, counts.label, 0, LABEL_COUNT, 1),
    inversion: Object.fromEntries(seen.map(({ id }) => [LABEL_NAMES[id]!, [...counts.inversion.subarray(id * 4, id * 4 + 4)]])),
    progression: sparse(nameProgression, counts.progression, 0, ROW_COUNT * ROW_COUNT, 1),
    relation: sparse((i) => RELATION_NAMES[i]!, counts.relation, 0, RELATIONS, 1),
    profile: Object.fromEntries(MODE_NAMES.map((mode, m) => [mode, Array.from(counts.profile.subarray(m * PROFILE_SIZE, (m + 1) * PROFILE_SIZE), round)])),
  };
}

function fill(target: Float64Array, at: number, names: readonly string[], from: Numbers): void {
  names.forEach((name, i) => {
    const value = from[name];
    if (value !== undefined) target[at + i] = value;
  });
}

function fillProgressions(target: Float64Array, at: number, from: Numbers): void {
  const rowOf = new Map(ROWS.map((name, row) => [name, row]));
  for (const [name, value] of Object.entries(from)) {
    const [a, b] = name.split(' > ').map((row) => rowOf.get(row));
    if (a !== undefined && b !== undefined) target[at + a * ROW_COUNT + b] = value;
  }
}

function readCounts(table: WeightTable['counts']): Counts {
  const counts: Counts = {
    label: new Float64Array(LABEL_COUNT),
    inversion: new Float64Array(LABEL_COUNT * 4),
    progression: new Float64Array(ROW_COUNT * ROW_COUNT),
    relation: new Float64Array(RELATIONS),
    profile: new Float64Array(2 * PROFILE_SIZE),
  };
  fill(counts.label, 0, LABEL_NAMES, table.label);
  LABEL_NAMES.forEach((name, id) => counts.inversion.set(table.inversion[name] ?? [], id * 4));
  fillProgressions(counts.progression, 0, table.progression);
  fill(counts.relation, 0, RELATION_NAMES, table.relation);
  MODE_NAMES.forEach((mode, m) => counts.profile.set(table.profile[mode] ?? [], m * PROFILE_SIZE));
  return counts;
}

/** The weights of a table, and the ones set by hand over the same frequencies, which choose the keys to be tried. */
export function readWeights(table: WeightTable): { readonly weights: Weights; readonly choosing: Weights } {
  const choosing = handWeights(smoothCounts(readCounts(table.counts)));
  const values = Float64Array.from(choosing.values);
  fill(values, AT.chord, CHORD_TERMS.map(([name]) => name), table.terms.chord);
  fill(values, AT.span, SPAN_TERMS.map(([name]) => name), table.terms.span);
  fill(values, AT.key + KEY_PROFILE_COUNT, KEY_FACTS.map(([name]) => name), table.terms.key);
  fill(values, AT.label, LABEL_TERMS.map(([name]) => name), table.terms.label);
  fill(values, AT.transition, TRANSITION_TERMS.map(([name]) => name), table.terms.transition);
  KEY_WINDOWS.forEach(([name], window) => MODE_NAMES.forEach((mode, m) => values.set(table.keyProfiles[`${name} ${mode}`] ?? [], AT.key + profileAt(window, m))));
  fill(values, AT.perLabel, LABEL_NAMES, table.corrections.label);
  fill(values, AT.inversion, INVERSION_SLOT_NAMES, table.corrections.inversion);
  fill(values, AT.classLevel, METRE_NAMES, table.corrections.metre);
  fill(values, AT.classLength, LENGTH_NAMES, table.corrections.length);
  fill(values, AT.labelInversion, LABEL_INVERSION_NAMES, table.corrections.labelInversion);
  fill(values, AT.classMotion, MOTION_NAMES, table.corrections.motion);
  fill(values, AT.relation, RELATION_NAMES, table.corrections.relation);
  fillProgressions(values, AT.progression, table.corrections.progression);
  return { weights: { values, tables: choosing.tables }, choosing };
}
