import { BASS_MOTIONS, bassMotionOf as importedBassMotionOf } from './bass-motion';
import { KEY_COUNT, modeOf as importedModeOf, tonicOf as importedTonicOf } from './key-terms';
import { CHORD_SPAN, keyOfState as importedKeyOfState, inversionOfState as importedInversionOfState, labelOfState as importedLabelOfState } from './lattice';
import { type Material } from './material';
import { type TermSink } from './node-terms';
import { relationOf, signatureDistance } from './relation';
import { DOMINANT_SEVENTH as IMPORTED_DOMINANT_SEVENTH, KIND_COUNT, MAJOR as IMPORTED_MAJOR, TEMPLATES as IMPORTED_TEMPLATES } from './templates';
import { TRANSITION_AT } from './transition-terms';
import {
  type AppliedTarget,
  type EngineLabel,
  LABELS,
  LABEL_CLASS as CLASSES,
  LABEL_CLASSES,
  LABEL_KIND as LABEL_KINDS,
  LABEL_ROOT as ROOTS,
  LABEL_ROW,
  LABEL_TONICISED,
  LABEL_TONICISED_MODE,
  ROW_COUNT,
  findLabels as importedFindLabels,
} from './vocabulary';
import { AT, type Tables, type Weights } from './weights';

/** Imported values are bound once here: they are read in the innermost loops. */
const DOMINANT_SEVENTH = IMPORTED_DOMINANT_SEVENTH;
const MAJOR = IMPORTED_MAJOR;
const TEMPLATES = IMPORTED_TEMPLATES;
const tonicOf = importedTonicOf;
const modeOf = importedModeOf;
const keyOfState = importedKeyOfState;
const labelOfState = importedLabelOfState;
const inversionOfState = importedInversionOfState;
const bassMotionOf = importedBassMotionOf;
const findLabels = importedFindLabels;

const T = Object.fromEntries(Object.entries(TRANSITION_AT).map(([name, at]) => [name, AT.transition + at])) as Readonly<Record<string, number>>;
const PROGRESSION = T['progression-frequency']!;
const SAME_AGAIN = T['same-again']!;
const NEW_INVERSION = T['new-inversion']!;
const SEVENTH_ADDED = T['seventh-added']!;
const SEVENTH_DROPPED = T['seventh-dropped']!;
const RESOLVES = T['applied-resolves']!;
const RESOLVES_OTHER_MODE = T['applied-resolves-other-mode']!;
const GOES_ON = T['applied-goes-on']!;
const ELSEWHERE = T['applied-elsewhere']!;
const LEADING_TONE_TO_TARGET = T['applied-leading-tone-resolves']!;
const LEADING_TONE_TO_OTHER_MODE = T['applied-leading-tone-resolves-other-mode']!;
const TO_SIX_FOUR = T['applied-to-six-four']!;
const TO_OTHER_SIX_FOUR = T['applied-to-six-four-other-mode']!;
const CHAIN = T['applied-chain']!;
const DECEPTIVE = T['applied-deceptive']!;
const SIX_FOUR_RESOLVES = T['six-four-resolves']!;
const SIX_FOUR_ELSEWHERE = T['six-four-elsewhere']!;
const AUTHENTIC = T.authentic!;
const LEADING_TONE_RESOLVES = T['leading-tone-resolves']!;
const KEY_CHANGE = T['key-change']!;
const RELATION = T['relation-frequency']!;
const DISTANCE = T['key-distance']!;
const PIVOT = T['pivot-frequency']!;
const PIVOT_PROGRESSION = T['pivot-progression']!;
const NO_PIVOT = T['no-pivot']!;
const CHANGE_ACCIDENTALS = T['change-accidentals']!;
const CHANGE_LENGTH = T['change-length']!;
const CHANGE_PACE = T['change-pace']!;
const INTO_TONICISED = T['change-into-tonicised']!;
const FROM_TONICISED = T['change-from-tonicised']!;
const ON_DOWNBEAT = T['change-on-downbeat']!;
const WITH_SIGNATURE = T['change-with-signature']!;
const MODE_ONLY = T['change-mode-only']!;
const MOTION = T['bass-no step']!;
const LEAVES = T[`change-leaves-${LABEL_CLASSES[0]}`]!;
const ARRIVES = T[`change-arrives-${LABEL_CLASSES[0]}`]!;
const PROGRESSION_DELTA = AT.progression;

/** A transition that cannot be: the same label twice inside a bar. */
export const IMPOSSIBLE = -Infinity;

const ROOT_RANGE = 48;
const CHORDS = CHORD_SPAN;
const KEYS = KEY_COUNT;
const ROWS = ROW_COUNT;
const LABEL_ROOT = ROOTS;
const LABEL_KIND = LABEL_KINDS;
const LABEL_CLASS = CLASSES;
const MOTIONS = BASS_MOTIONS.length;
const CLASS_COUNT = LABEL_CLASSES.length;
const TONICISED = LABEL_TONICISED;
const TONICISED_MODE = LABEL_TONICISED_MODE;
const APPLIED_LEADING_TONE = LABEL_CLASSES.indexOf('applied-leading-tone');
const IS_SIX_FOUR = Uint8Array.from(LABELS, (label) => (label.sixFour ? 1 : 0));
/** Bass tone of a chord (label · 4 + inversion) relative to the tonic. */
const BASS = new Int8Array(LABELS.length * 4);
for (const label of LABELS) TEMPLATES[label.kind]!.tones.forEach((tone, i) => (BASS[label.id * 4 + i] = label.root + tone));

/**
 * The terms between neighbouring labels. `j` is the boundary between them (index of the slice that the next begins with).
 * `read` says every term; `score` is their weighted sum, the parts that recur summed once per pair of chords or of keys.
 */
export class Transitions {
  private readonly row: Int16Array;
  private readonly bass: Int8Array;
  private readonly pivot: Int16Array;
  private readonly pairs = new PairSums();
  private readonly changes = new Float64Array(KEYS * KEYS).fill(NaN);

  constructor(
    private readonly material: Material,
    private readonly weights: Weights,
  ) {
    this.row = LABEL_ROW;
    this.bass = BASS;
    this.pivot = commonestLabels(weights.tables);
  }

  /** Whether a boundary lies inside a bar: there the same label cannot follow itself. */
  isWithinBar(j: number): boolean {
    return this.material.slices.bar[j] === this.material.slices.bar[j - 1];
  }

  /** Two labels in one key, not the same chord; `from` and `to` are chords (label · 4 + inversion). */
  scoreInKey(fromState: number, toState: number, from: number, to: number, j: number): number {
    const slot = this.pairs.findSlot(from * CHORDS + to);
    const known = this.pairs.sum[slot]!;
    if (known === known) return known;
    const sum = this.sum(fromState, toState, j);
    this.pairs.put(slot, from * CHORDS + to, sum);
    return sum;
  }

  /** Two labels in different keys. */
  scoreChange(fromState: number, toState: number, fromKey: number, toKey: number, j: number): number {
    const { values, tables } = this.weights;
    const from = fromState - fromKey * CHORDS;
    const to = toState - toKey * CHORDS;
    const a = from >> 2;
    const b = to >> 2;
    const shift = (toKey >> 1) - (fromKey >> 1);
    let sum = this.scoreKeys(fromKey, toKey) + values[MOTION + bassMotionOf(this.bass[to]! + shift - this.bass[from]!)]!;
    sum += values[LEAVES + LABEL_CLASS[a]!]! + values[ARRIVES + LABEL_CLASS[b]!]!;
    if (entersTonicised(a, shift, toKey)) sum += values[INTO_TONICISED]!;
    if (entersTonicised(b, -shift, fromKey)) sum += values[FROM_TONICISED]!;
    const { slices, evidence } = this.material;
    if (slices.level[j] === 0) sum += values[ON_DOWNBEAT]!;
    if (evidence.home.signature[j] !== evidence.home.signature[j - 1]) sum += values[WITH_SIGNATURE]!;
    const root = LABEL_ROOT[a]! - shift;
    const within = root >= -ROOT_RANGE / 2 && root < ROOT_RANGE / 2;
    const label = within ? this.pivot[pivotSlot(toKey & 1, root, LABEL_KIND[a]!, IS_SIX_FOUR[a] === 1)]! : -1;
    if (label < 0) return sum + values[NO_PIVOT]!;
    sum += values[PIVOT]! * tables.label[label]!;
    return label === b ? sum : sum + values[PIVOT_PROGRESSION]! * tables.progression[this.row[label]! * ROWS + this.row[b]!]!;
  }

  private scoreKeys(from: number, to: number): number {
    const known = this.changes[from * KEYS + to]!;
    if (known === known) return known;
    let sum = 0;
    this.readKeys(from, to, (weight, amount) => {
      sum += this.weights.values[weight]! * amount;
    });
    return (this.changes[from * KEYS + to] = sum);
  }

  /** The weighted sum of all that `read` says; IMPOSSIBLE when it cannot be. */
  score(from: number, to: number, j: number): number {
    return from === to && this.isWithinBar(j) ? IMPOSSIBLE : this.sum(from, to, j);
  }

  private sum(from: number, to: number, j: number): number {
    let sum = 0;
    this.read(from, to, j, (weight, amount) => {
      sum += this.weights.values[weight]! * amount;
    });
    return sum;
  }

  /** Gives every term of the transition to `sink`; false when it cannot be. */
  read(from: number, to: number, j: number, sink: TermSink): boolean {
    const fromKey = keyOfState(from);
    const toKey = keyOfState(to);
    if (from === to) {
      if (this.isWithinBar(j)) return false;
      sink(SAME_AGAIN, 1);
      return true;
    }
    const bass = (this.bass[(labelOfState(to) << 2) + inversionOfState(to)]! + tonicOf(toKey)) - (this.bass[(labelOfState(from) << 2) + inversionOfState(from)]! + tonicOf(fromKey));
    const motion = bassMotionOf(bass);
    sink(MOTION + motion, 1);
    if (fromKey === toKey) sink(AT.classMotion + (LABEL_CLASS[labelOfState(from)]! * CLASS_COUNT + LABEL_CLASS[labelOfState(to)]!) * MOTIONS + motion, 1);
    if (fromKey === toKey) this.readProgression(labelOfState(from), labelOfState(to), inversionOfState(from) + inversionOfState(to) === 0, sink);
    else this.readKeyChange(from, to, j, sink);
    return true;
  }

  private readProgression(from: number, to: number, inRootPosition: boolean, sink: TermSink): void {
    if (from === to) {
      sink(NEW_INVERSION, 1);
      return;
    }
    const cell = this.row[from]! * ROW_COUNT + this.row[to]!;
    sink(PROGRESSION, this.weights.tables.progression[cell]!);
    sink(PROGRESSION_DELTA + cell, 1);
    const a = LABELS[from]!;
    const b = LABELS[to]!;
    if (b.root === 0 && !b.target && !b.sixFour && !a.target) this.readCadence(a, inRootPosition, sink);
    if (a.root === b.root && a.target === b.target) this.readSeventh(a.kind, b.kind, sink);
    if (a.target) this.readApplied(from, to, sink);
    if (a.sixFour && !a.target && a.root === 0) {
      const resolves = b.root === 1 && !b.sixFour && (b.kind === MAJOR || b.kind === DOMINANT_SEVENTH);
      sink(resolves ? SIX_FOUR_RESOLVES : SIX_FOUR_ELSEWHERE, 1);
    }
  }

  /** A dominant or a leading-tone chord that goes to the tonic. */
  private readCadence(before: EngineLabel, inRootPosition: boolean, sink: TermSink): void {
    const isDominant = before.root === 1 && (before.kind === MAJOR || before.kind === DOMINANT_SEVENTH);
    if (isDominant && inRootPosition) sink(AUTHENTIC, 1);
    if (isDominant || before.root === 5) sink(LEADING_TONE_RESOLVES, 1);
  }

  private readSeventh(from: number, to: number, sink: TermSink): void {
    const added = TEMPLATES[to]!.tones.length - TEMPLATES[from]!.tones.length;
    if (added > 0) sink(SEVENTH_ADDED, 1);
    else if (added < 0) sink(SEVENTH_DROPPED, 1);
  }

  private readApplied(from: number, to: number, sink: TermSink): void {
    const target = LABELS[from]!.target!;
    const next = LABELS[to]!;
    if (next.target && next.target.offset === target.offset) {
      sink(GOES_ON, 1);
    } else if (next.root === target.offset && !next.target) {
      const third = TEMPLATES[next.kind]!.tones[1];
      const mode = third === 4 ? 'major' : 'minor';
      const isSame = mode === target.mode;
      sink(isSame ? RESOLVES : RESOLVES_OTHER_MODE, 1);
      if (LABELS[from]!.labelClass === APPLIED_LEADING_TONE) sink(isSame ? LEADING_TONE_TO_TARGET : LEADING_TONE_TO_OTHER_MODE, 1);
    } else {
      this.readElsewhere(target, next, sink);
    }
  }

  /** An applied chord that does not go to its target: to the six-four above it, on in a chain, to its sixth degree. */
  private readElsewhere(target: AppliedTarget, next: EngineLabel, sink: TermSink): void {
    if (target.offset === 1 && next.sixFour && !next.target && next.root === 0) {
      sink((next.kind === MAJOR) === (target.mode === 'major') ? TO_SIX_FOUR : TO_OTHER_SIX_FOUR, 1);
      return;
    }
    sink(ELSEWHERE, 1);
    if (next.target && next.root === target.offset) sink(CHAIN, 1);
    else if (!next.target && (next.root === target.offset + 3 || next.root === target.offset - 4)) sink(DECEPTIVE, 1);
  }

  private readKeyChange(from: number, to: number, j: number, sink: TermSink): void {
    const fromKey = keyOfState(from);
    const toKey = keyOfState(to);
    const { slices, evidence } = this.material;
    const a = LABELS[labelOfState(from)]!;
    const b = LABELS[labelOfState(to)]!;
    this.readKeys(fromKey, toKey, sink);
    sink(LEAVES + a.labelClass, 1);
    sink(ARRIVES + b.labelClass, 1);
    const shift = tonicOf(toKey) - tonicOf(fromKey);
    if (entersTonicised(a.id, shift, toKey)) sink(INTO_TONICISED, 1);
    if (entersTonicised(b.id, -shift, fromKey)) sink(FROM_TONICISED, 1);
    if (slices.level[j] === 0) sink(ON_DOWNBEAT, 1);
    if (evidence.home.signature[j] !== evidence.home.signature[j - 1]) sink(WITH_SIGNATURE, 1);
    this.readPivot(a.root + tonicOf(fromKey) - tonicOf(toKey), a.kind, a.sixFour, modeOf(toKey), b.id, sink);
  }

  private readKeys(from: number, to: number, sink: TermSink): void {
    const relation = relationOf(from, to);
    sink(KEY_CHANGE, 1);
    sink(RELATION, this.weights.tables.relation[relation]!);
    sink(AT.relation + relation, 1);
    sink(DISTANCE, Math.min(6, signatureDistance(from, to)));
    if (tonicOf(from) === tonicOf(to)) sink(MODE_ONLY, 1);
    const { evidence, slices } = this.material;
    sink(CHANGE_ACCIDENTALS, 10 * evidence.accidentals);
    sink(CHANGE_LENGTH, Math.log2(Math.max(2, evidence.bars)));
    sink(CHANGE_PACE, slices.change.pace);
  }

  /** The chord before, as it would be heard in the new key. */
  private readPivot(root: number, kind: number, sixFour: boolean, mode: number, next: number, sink: TermSink): void {
    const { tables } = this.weights;
    const within = root >= -ROOT_RANGE / 2 && root < ROOT_RANGE / 2;
    const label = within ? this.pivot[pivotSlot(mode, root, kind, sixFour)]! : -1;
    if (label < 0) {
      sink(NO_PIVOT, 1);
      return;
    }
    sink(PIVOT, tables.label[label]!);
    if (label !== next) sink(PIVOT_PROGRESSION, tables.progression[this.row[label]! * ROW_COUNT + this.row[next]!]!);
  }
}

/** Whether a label is applied to what is the tonic of the other key (its tonic `shift` fifths up), in that key's mode. */
function entersTonicised(label: number, shift: number, otherKey: number): boolean {
  return TONICISED[label] === shift && shift !== 0 && TONICISED_MODE[label] === (otherKey & 1);
}

function pivotSlot(mode: number, root: number, kind: number, sixFour: boolean): number {
  return ((mode * ROOT_RANGE + root + ROOT_RANGE / 2) * KIND_COUNT + kind) * 2 + (sixFour ? 1 : 0);
}

const commonest = new WeakMap<Tables, Int16Array>();

/** The commonest label of every chord in either mode, −1 where a chord has none; found once per tables. */
function commonestLabels(tables: Tables): Int16Array {
  const known = commonest.get(tables);
  if (known) return known;
  const found = findCommonest(tables);
  commonest.set(tables, found);
  return found;
}

function findCommonest(tables: Tables): Int16Array {
  const best = new Int16Array(2 * ROOT_RANGE * KIND_COUNT * 2).fill(-1);
  for (let mode = 0; mode < 2; mode++) {
    for (let root = -ROOT_RANGE / 2; root < ROOT_RANGE / 2; root++) {
      for (let kind = 0; kind < KIND_COUNT; kind++) {
        for (const sixFour of [false, true]) {
          for (const label of findLabels(mode, root, kind, sixFour)) {
            const slot = pivotSlot(mode, root, kind, sixFour);
            if (best[slot]! < 0 || tables.label[label]! > tables.label[best[slot]!]!) best[slot] = label;
          }
        }
      }
    }
  }
  return best;
}

/** Sums per pair of chords: an open table of powers of two, doubled when half full. */
class PairSums {
  private pair = new Int32Array(1 << 14).fill(-1);
  sum = new Float64Array(1 << 14).fill(NaN);
  private used = 0;

  /** Where a pair stands, or where it would (its sum is NaN then). */
  findSlot(pair: number): number {
    const mask = this.pair.length - 1;
    let slot = Math.imul(pair, 0x9e3779b1) >>> 8 & mask;
    while (this.pair[slot] !== pair && this.pair[slot] !== -1) slot = (slot + 1) & mask;
    return slot;
  }

  put(slot: number, pair: number, sum: number): void {
    this.pair[slot] = pair;
    this.sum[slot] = sum;
    if (++this.used * 2 > this.pair.length) this.enlarge();
  }

  private enlarge(): void {
    const { pair, sum } = this;
    this.pair = new Int32Array(pair.length * 2).fill(-1);
    this.sum = new Float64Array(pair.length * 2).fill(NaN);
    for (let i = 0; i < pair.length; i++) {
      if (pair[i] === -1) continue;
      const slot = this.findSlot(pair[i]!);
      this.pair[slot] = pair[i]!;
      this.sum[slot] = sum[i]!;
    }
  }
}
