import { reduceApplied } from '../theory/applied';
import { type Degree, type Mode, MODES, SCALE_FIFTHS, type Step, degreeOfFifths } from '../theory/key';
import { type Numeral, isNeapolitan } from '../theory/numeral';
import { fifths } from '../theory/pitch';
import {
  AUGMENTED,
  AUGMENTED_MAJOR_SEVENTH,
  AUGMENTED_SEVENTH,
  DIMINISHED,
  DIMINISHED_SEVENTH,
  DOMINANT_SEVENTH,
  FRENCH,
  GERMAN,
  HALF_DIMINISHED,
  ITALIAN,
  KIND_COUNT,
  MAJOR,
  MINOR,
  MINOR_SEVENTH,
  TEMPLATES,
  findKind,
} from './templates';

/** What a chord can be applied to: a degree of the key, heard for a moment as a tonic. `offset` in fifths from the tonic. */
export interface AppliedTarget {
  readonly step: Step;
  readonly alter: number;
  readonly mode: Mode;
  readonly offset: number;
}

/** How a label stands to its key; the groups that priors and metre talk about. */
export const LABEL_CLASSES = [
  'tonic',
  'dominant',
  'leading-tone',
  'subdominant',
  'other-diatonic',
  'six-four',
  'applied-dominant',
  'applied-leading-tone',
  'applied-other',
  'augmented-sixth',
  'mixture',
  'chromatic',
] as const;
export type LabelClass = (typeof LABEL_CLASSES)[number];

/**
 * A label without its inversion, relative to a tonic: what the search decides on. `root` is the root's distance from the
 * tonic in fifths; `tonicised` the distance of the tonic that the chord is heard in (0 unless applied). A triad in second
 * inversion is a label of its own (`sixFour`), so that I6/4→V does not blur I→V.
 */
export interface EngineLabel {
  readonly id: number;
  readonly mode: Mode;
  readonly root: number;
  readonly kind: number;
  readonly sixFour: boolean;
  readonly target: AppliedTarget | null;
  readonly tonicised: number;
  readonly tonicisedMode: Mode;
  readonly step: Step;
  readonly alter: number;
  readonly labelClass: number;
  /** The row of the progression tables that the label belongs to; rare labels share one. */
  readonly row: number;
  /** Name without inversion, for tables and terms: `V7/ii`, `I64`. */
  readonly name: string;
}

const TARGETS: Readonly<Record<Mode, readonly (readonly [Step, number, Mode])[]>> = {
  major: [
    [2, 0, 'minor'], [3, 0, 'minor'], [4, 0, 'major'], [5, 0, 'major'], [6, 0, 'minor'], [5, 0, 'minor'], [4, 0, 'minor'],
    [3, -1, 'major'], [6, -1, 'major'], [7, -1, 'major'], [2, 0, 'major'], [3, 0, 'major'], [6, 0, 'major'],
    [7, 0, 'minor'], [2, -1, 'major'], [1, 0, 'minor'], [7, 0, 'major'],
  ],
  minor: [
    [3, 0, 'major'], [4, 0, 'minor'], [5, 0, 'major'], [5, 0, 'minor'], [6, 0, 'major'], [7, 0, 'major'], [4, 0, 'major'],
    [2, -1, 'major'], [2, 0, 'minor'], [1, 0, 'major'], [7, 0, 'minor'], [3, 0, 'minor'], [6, 0, 'minor'], [7, 1, 'minor'],
    [2, 0, 'major'], [1, -1, 'minor'],
  ],
};

/** Degrees (fifths from the tonicised tonic) and kinds that can be applied. The first two lines are the usual ones. */
function appliedChords(mode: Mode): readonly (readonly [number, number])[] {
  const usual: (readonly [number, number])[] = [
    [1, MAJOR], [1, DOMINANT_SEVENTH], [5, DIMINISHED], [5, DIMINISHED_SEVENTH], [5, HALF_DIMINISHED],
    [1, AUGMENTED], [1, AUGMENTED_SEVENTH], [6, ITALIAN], [6, GERMAN], [2, FRENCH], [-1, MINOR],
  ];
  const major: (readonly [number, number])[] = [[2, MINOR], [2, MINOR_SEVENTH], [-1, MAJOR], [0, MAJOR]];
  const minor: (readonly [number, number])[] = [
    [2, DIMINISHED], [2, HALF_DIMINISHED], [-3, AUGMENTED], [-3, AUGMENTED_MAJOR_SEVENTH], [0, MINOR], [-4, MAJOR],
  ];
  return mode === 'major' ? [...usual, ...major] : [...usual, ...minor];
}

const LOWEST_ROOT = -10;
const HIGHEST_ROOT = 12;
const ROMAN = ['I', 'II', 'III', 'IV', 'V', 'VI', 'VII'] as const;
const KIND_MARK = ['', '', 'o', '+', '7', 'M7', '7', 'ø7', 'o7', 'mM7', '+M7', 'It', 'Fr', 'Ger', '+7'] as const;
const LOWER_CASE = new Set([MINOR, DIMINISHED, MINOR_SEVENTH, HALF_DIMINISHED, DIMINISHED_SEVENTH, 9]);

function nameDegree(step: Step, alter: number, kind: number): string {
  if (kind === ITALIAN || kind === FRENCH || kind === GERMAN) return KIND_MARK[kind]!;
  const roman = ROMAN[step - 1]!;
  const sign = alter < 0 ? 'b'.repeat(-alter) : '#'.repeat(alter);
  return sign + (LOWER_CASE.has(kind) ? roman.toLowerCase() : roman) + KIND_MARK[kind]!;
}

function nameTarget(target: AppliedTarget): string {
  return nameDegree(target.step, target.alter, target.mode === 'major' ? MAJOR : MINOR);
}

const DIATONIC: Readonly<Record<Mode, ReadonlySet<string>>> = {
  major: new Set(['0:0', '2:1', '4:1', '-1:0', '1:0', '3:1', '5:2', '0:5', '2:6', '4:6', '-1:5', '1:4', '3:6', '5:7']),
  minor: new Set([
    '0:1', '2:2', '-3:0', '-1:1', '1:1', '1:0', '-4:0', '-2:0', '5:2', '0:6', '2:7', '-3:5', '-1:6', '1:6', '1:4', '-4:5',
    '-2:4', '5:8', '-1:0', '2:1', '-3:3', '-1:4', '2:6', '3:2', '3:7', '0:9', '-3:10',
  ]),
};

function classOf(mode: Mode, root: number, kind: number, sixFour: boolean, target: AppliedTarget | null): LabelClass {
  const template = TEMPLATES[kind]!;
  if (target) return template.isAugmentedSixth ? 'applied-other' : classOfApplied(root - target.offset, kind);
  if (template.isAugmentedSixth) return 'augmented-sixth';
  if (!DIATONIC[mode].has(`${root}:${kind}`)) return root === 5 && kind === DIMINISHED_SEVENTH ? 'leading-tone' : classOfChromatic(root, kind);
  if (sixFour) return 'six-four';
  if (root === 0) return 'tonic';
  if (root === 1) return 'dominant';
  if (root === 5) return 'leading-tone';
  return root === -1 || root === 2 ? 'subdominant' : 'other-diatonic';
}

function classOfApplied(rootInTarget: number, kind: number): LabelClass {
  if (rootInTarget === 1 && kind !== MINOR && kind !== MINOR_SEVENTH) return 'applied-dominant';
  return rootInTarget === 5 ? 'applied-leading-tone' : 'applied-other';
}

function classOfChromatic(root: number, kind: number): LabelClass {
  const borrowed = root <= 2 && root >= -5 && kind !== AUGMENTED;
  return borrowed ? 'mixture' : 'chromatic';
}

const COMMON_MIXTURE = new Set([MAJOR, MINOR, DIMINISHED, DOMINANT_SEVENTH, MINOR_SEVENTH, HALF_DIMINISHED, DIMINISHED_SEVENTH]);

/** Labels that share a row of the progression tables; triad and seventh stay apart on I, V and the leading tone only. */
function rowName(label: Omit<EngineLabel, 'row' | 'id' | 'name'>): string {
  const cls = LABEL_CLASSES[label.labelClass]!;
  if (label.target) {
    const target = nameTarget(label.target);
    if (cls === 'applied-dominant') return `V/${target}`;
    return cls === 'applied-leading-tone' ? `viio/${target}` : `other/${target}`;
  }
  if (cls === 'chromatic' || (cls === 'mixture' && !COMMON_MIXTURE.has(label.kind))) return 'chromatic';
  const triadName = nameDegree(label.step, label.alter, label.kind);
  return label.sixFour ? `${triadName}64` : triadName;
}

class VocabularyBuilder {
  readonly labels: EngineLabel[] = [];
  readonly rows: string[] = [];

  add(mode: Mode, root: number, kind: number, sixFour: boolean, target: AppliedTarget | null): void {
    const inner = target ? { tonic: fifths(target.offset), mode: target.mode } : { tonic: fifths(0), mode };
    const degree = degreeOfFifths(inner, fifths(root));
    const draft = {
      mode, root, kind, sixFour, target,
      tonicised: target?.offset ?? 0,
      tonicisedMode: target?.mode ?? mode,
      step: degree.step,
      alter: degree.alter,
      labelClass: LABEL_CLASSES.indexOf(classOf(mode, root, kind, sixFour, target)),
    };
    const base = nameDegree(degree.step, degree.alter, kind) + (sixFour ? '64' : '');
    const name = target ? `${base}/${nameTarget(target)}` : base;
    this.labels.push({ ...draft, id: this.labels.length, row: this.rowOf(`${mode}:${rowName(draft)}`), name });
  }

  private rowOf(name: string): number {
    const known = this.rows.indexOf(name);
    return known >= 0 ? known : this.rows.push(name) - 1;
  }
}

function isTriad(kind: number): boolean {
  return kind <= AUGMENTED;
}

function addPlainLabels(builder: VocabularyBuilder, mode: Mode): void {
  for (let root = LOWEST_ROOT; root <= HIGHEST_ROOT; root++) {
    for (let kind = 0; kind < KIND_COUNT; kind++) {
      if (!canStandPlain(root, kind)) continue;
      builder.add(mode, root, kind, false, null);
      if (isTriad(kind)) builder.add(mode, root, kind, true, null);
    }
  }
}

/** Augmented sixths stand on their one degree; every other kind may stand on any root within reach. */
function canStandPlain(root: number, kind: number): boolean {
  if (kind === ITALIAN || kind === GERMAN) return root === 6;
  return kind === FRENCH ? root === 2 : true;
}

function addAppliedLabels(builder: VocabularyBuilder, mode: Mode): void {
  for (const [step, alter, targetMode] of TARGETS[mode]) {
    const offset = SCALE_FIFTHS[mode][step - 1]! + 7 * alter;
    const target: AppliedTarget = { step, alter, mode: targetMode, offset };
    for (const [inner, kind] of appliedChords(targetMode)) {
      builder.add(mode, offset + inner, kind, false, target);
      if (isTriad(kind)) builder.add(mode, offset + inner, kind, true, target);
    }
  }
}

function buildVocabulary(): { labels: readonly EngineLabel[]; rows: readonly string[] } {
  const builder = new VocabularyBuilder();
  for (const mode of MODES) {
    addPlainLabels(builder, mode);
    addAppliedLabels(builder, mode);
  }
  return builder;
}

const BUILT = buildVocabulary();
export const LABELS: readonly EngineLabel[] = BUILT.labels;
export const LABEL_COUNT = LABELS.length;
export const ROWS: readonly string[] = BUILT.rows;
export const ROW_COUNT = ROWS.length;

/** The labels' fields as arrays, for the innermost loops: all indexed by label. */
export const LABEL_ROOT = Int8Array.from(LABELS, (label) => label.root);
export const LABEL_KIND = Uint8Array.from(LABELS, (label) => label.kind);
export const LABEL_CLASS = Uint8Array.from(LABELS, (label) => label.labelClass);
export const LABEL_ROW = Int16Array.from(LABELS, (label) => label.row);
export const LABEL_TONICISED = Int8Array.from(LABELS, (label) => label.tonicised);
export const LABEL_TONICISED_MODE = Uint8Array.from(LABELS, (label) => (label.tonicisedMode === 'major' ? 0 : 1));

const ROOT_SPAN = 48;
const ROOT_SHIFT = 24;

function indexLabels(): (Int32Array | undefined)[] {
  const lists: number[][] = [];
  for (const label of LABELS) (lists[slotOf(label.mode === 'major' ? 0 : 1, label.root, label.kind, label.sixFour ? 1 : 0)] ??= []).push(label.id);
  return Array.from(lists, (list) => (list ? Int32Array.from(list) : undefined));
}

function slotOf(mode: number, root: number, kind: number, sixFour: number): number {
  return ((mode * ROOT_SPAN + root + ROOT_SHIFT) * KIND_COUNT + kind) * 2 + sixFour;
}

const BY_CHORD = indexLabels();
const NONE = new Int32Array(0);

/** The labels that a chord can bear in a key of mode 0 (major) or 1 (minor); `root` in fifths from the tonic. May be none. */
export function findLabels(mode: number, root: number, kind: number, isSixFour: boolean): Int32Array {
  if (root < -ROOT_SHIFT || root >= ROOT_SPAN - ROOT_SHIFT) return NONE;
  return BY_CHORD[slotOf(mode, root, kind, isSixFour ? 1 : 0)] ?? NONE;
}

/** The numeral value of a label in an inversion. Six-fours are told apart later, by what stands around them. */
export function numeralOf(label: EngineLabel, inversion: number): Numeral {
  const degree: Degree = { step: label.step, alter: label.alter };
  const quality = TEMPLATES[label.kind]!.quality;
  const target = label.target;
  return {
    degree,
    quality,
    inversion: inversion as Numeral['inversion'],
    applied: target ? [{ degree: { step: target.step, alter: target.alter }, mode: target.mode }] : [],
    special: isNeapolitan({ degree, quality }) ? 'neapolitan' : null,
    added: [],
  };
}

const BY_MEANING = new Map(LABELS.map((label) => [meaningOf(label.mode, label.target, label, label.kind, label.sixFour), label.id]));

function meaningOf(mode: Mode, target: { step: number; alter: number; mode: Mode } | null, degree: Degree, kind: number, sixFour: boolean): string {
  const applied = target ? `${target.step},${target.alter},${target.mode}` : '-';
  return `${mode} ${applied} ${degree.step},${degree.alter} ${kind} ${sixFour ? 64 : ''}`;
}

/** The label that a numeral means in a key of this mode, chains of targets as one; −1 for what the vocabulary lacks. */
export function findLabel(mode: Mode, numeral: Pick<Numeral, 'degree' | 'quality' | 'inversion' | 'applied'>): number {
  const kind = findKind(numeral.quality);
  if (kind < 0) return -1;
  const { applied } = reduceApplied({ ...numeral, special: null, added: [] }, mode);
  const target = applied ? { ...applied.degree, mode: applied.mode } : null;
  const sixFour = numeral.inversion === 2 && TEMPLATES[kind]!.tones.length === 3 && !TEMPLATES[kind]!.isAugmentedSixth;
  return BY_MEANING.get(meaningOf(mode, target, numeral.degree, kind, sixFour)) ?? -1;
}
