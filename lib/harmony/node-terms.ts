import { inversionOfBass as importedInversionOfBass } from './candidates';
import { tonicOf as importedTonicOf } from './key-terms';
import { type Material } from './material';
import { BINS, BIN_SHIFT as SHIFT } from './slices';
import { LENGTH_BAR, LENGTH_LOG, LENGTH_UNDER_BEAT, SPAN_TERM_COUNT as IMPORTED_SPAN_TERM_COUNT } from './span-terms';
import { TEMPLATES } from './templates';
import {
  LABELS,
  LABEL_CLASS as CLASSES,
  LABEL_CLASSES,
  LABEL_COUNT as IMPORTED_LABEL_COUNT,
  LABEL_KIND,
  LABEL_TONICISED as TONICISED,
  LABEL_TONICISED_MODE as TONICISED_MODE,
} from './vocabulary';
import { AT as BLOCKS, type Weights, inversionSlot } from './weights';

/** Imported values are bound once here: they are read in the innermost loops. */
const tonicOf = importedTonicOf;
const inversionOfBass = importedInversionOfBass;
const LABEL_COUNT = IMPORTED_LABEL_COUNT;
const SPAN_TERM_COUNT = IMPORTED_SPAN_TERM_COUNT;

const AT = BLOCKS;
const BIN_SHIFT = SHIFT;
const LABEL_CLASS = CLASSES;
const LABEL_TONICISED = TONICISED;
const LABEL_TONICISED_MODE = TONICISED_MODE;
const TONIC_CLASS = LABEL_CLASSES.indexOf('tonic');
const FIRST_APPLIED = LABEL_CLASSES.indexOf('applied-dominant');
const LAST_APPLIED = LABEL_CLASSES.indexOf('applied-other');
const FIRST_CHROMATIC = LABEL_CLASSES.indexOf('augmented-sixth');

/** Receives the amount of a weight's term. */
export type TermSink = (weight: number, amount: number) => void;

/** 1 for places in the scale of a mode, `[mode · 128 + relative + 64]`; minor has both forms of its sixth and seventh. */
const IN_SCALE = new Uint8Array(256);
for (let place = -1; place <= 5; place++) IN_SCALE[place + 64] = 1;
for (const place of [-4, -3, -2, -1, 0, 1, 2, 3, 5]) IN_SCALE[128 + place + 64] = 1;

/**
 * The terms of a label over a segment beyond those of its chord and key: frequencies, scale, metre, opening and close.
 * What does not depend on the segment is summed once per label and inversion (`base`).
 */
export class NodeTerms {
  private readonly isTone = new Uint8Array(BINS + 64);
  private readonly base = new Float64Array(LABEL_COUNT * 4).fill(NaN);
  private readonly tones = TEMPLATES.map((template) => template.tones);
  private plain = 0;
  private moving = 0;
  /** What the current segment's place and length say for each class. */
  private readonly ofClass = new Float64Array(LABEL_CLASSES.length);

  constructor(
    private readonly material: Material,
    private readonly weights: Weights,
  ) {}

  /** Sums what a segment's place and length say; before quickScore is asked about it. */
  enterSegment(s: number): void {
    const { values } = this.weights;
    const { slices, segments, spanTerms } = this.material;
    const row = s * SPAN_TERM_COUNT;
    const level = slices.level[segments.start[s]!]!;
    const log = spanTerms[row + LENGTH_LOG]!;
    const isShort = spanTerms[row + LENGTH_UNDER_BEAT]!;
    const isBar = spanTerms[row + LENGTH_BAR]!;
    for (let cls = 0, at = AT.classLength; cls < this.ofClass.length; cls++, at += 3) {
      this.ofClass[cls] = values[AT.classLevel + cls * 5 + level]! + values[at]! * log + values[at + 1]! * isShort + values[at + 2]! * isBar;
    }
  }

  /** The part of a label's score that is quick to know; the rest (scaleScore) is at most that of a pedal above 0. */
  quickScore(label: number, inversion: number): number {
    const slot = label * 4 + inversion;
    if (Number.isNaN(this.base[slot]!)) {
      let sum = 0;
      this.readBase(label, inversion, (weight, amount) => {
        sum += this.weights.values[weight]! * amount;
      });
      this.base[slot] = sum;
    }
    return this.base[slot]! + this.ofClass[LABEL_CLASS[label]!]!;
  }

  edgeScore(s: number, key: number, label: number): number {
    const { segments, slices } = this.material;
    if (segments.start[s] !== 0 && segments.end[s] !== slices.count) return 0;
    let sum = 0;
    this.readEdges(s, key, label, (weight, amount) => {
      sum += this.weights.values[weight]! * amount;
    });
    return sum;
  }

  scaleScore(s: number, c: number, key: number, label: number): number {
    this.measureScale(s, c, key, label);
    const pedal = this.findPedal(s, c, key);
    const held = pedal < 0 ? 0 : this.weights.values[AT.label + 10 + pedal]!;
    return this.plain * this.weights.values[AT.label + 2]! + this.moving * this.weights.values[AT.label + 3]! + held;
  }

  readLabel(s: number, c: number, key: number, label: number, sink: TermSink): void {
    this.readBase(label, this.material.inversion[c]!, sink);
    this.readClass(s, LABEL_CLASS[label]!, sink);
    this.readEdges(s, key, label, sink);
    this.measureScale(s, c, key, label);
    if (this.plain > 0) sink(AT.label + 2, this.plain);
    if (this.moving > 0) sink(AT.label + 3, this.moving);
    const pedal = this.findPedal(s, c, key);
    if (pedal >= 0) sink(AT.label + 10 + pedal, 1);
  }

  /** A held bass foreign to the chord that is the key's tonic (0) or dominant (1); −1 when there is none. */
  private findPedal(s: number, c: number, key: number): number {
    const { root, kind, slices, segments } = this.material;
    const bass = slices.bass[segments.start[s]!]!;
    if (bass < 0 || inversionOfBass(root[c]!, kind[c]!, bass) >= 0) return -1;
    const degree = bass - BIN_SHIFT - tonicOf(key);
    return degree === 0 || degree === 1 ? degree : -1;
  }

  private readBase(label: number, inversion: number, sink: TermSink): void {
    const { tables } = this.weights;
    const cls = LABELS[label]!.labelClass;
    sink(AT.label, tables.label[label]!);
    sink(AT.label + 1, tables.inversion[label * 4 + inversion]!);
    sink(AT.perLabel + label, 1);
    sink(AT.labelInversion + label * 4 + inversion, 1);
    sink(AT.inversion + inversionSlot(label, this.tones[LABEL_KIND[label]!]!.length > 3, inversion), 1);
    if (cls >= FIRST_APPLIED && cls <= LAST_APPLIED) sink(AT.label + 4, 1);
    else if (cls >= FIRST_CHROMATIC) sink(AT.label + 5, 1);
  }

  private readClass(s: number, cls: number, sink: TermSink): void {
    const { slices, segments, spanTerms } = this.material;
    const row = s * SPAN_TERM_COUNT;
    const at = AT.classLength + cls * 3;
    sink(AT.classLevel + cls * 5 + slices.level[segments.start[s]!]!, 1);
    sink(at, spanTerms[row + LENGTH_LOG]!);
    if (spanTerms[row + LENGTH_UNDER_BEAT] === 1) sink(at + 1, 1);
    if (spanTerms[row + LENGTH_BAR] === 1) sink(at + 2, 1);
  }

  private readEdges(s: number, key: number, label: number, sink: TermSink): void {
    const { segments, slices, evidence } = this.material;
    const home = evidence.home.home;
    const isTonic = LABEL_CLASS[label] === TONIC_CLASS;
    if (segments.start[s] === 0) {
      if (isTonic) sink(AT.label + 6, 1);
      if (key === home) sink(AT.label + 8, 1);
    }
    if (segments.end[s] === slices.count) {
      if (isTonic) sink(AT.label + 7, 1);
      if (key === home) sink(AT.label + 9, 1);
    }
  }

  /** Notes foreign to both the chord and the scale of the key that the chord is heard in. */
  private measureScale(s: number, c: number, key: number, label: number): void {
    const { soundFrom, soundBin, soundPlain, soundMoving, root, kind } = this.material;
    const tonic = tonicOf(key) + LABEL_TONICISED[label]! + BIN_SHIFT;
    const scale = LABEL_TONICISED_MODE[label]! * 128 + 64 - tonic;
    const tones = this.tones[kind[c]!]!;
    const base = root[c]! + 32;
    this.plain = 0;
    this.moving = 0;
    for (let t = 0; t < tones.length; t++) this.isTone[base + tones[t]!] = 1;
    for (let p = soundFrom[s]!; p < soundFrom[s + 1]!; p++) {
      const bin = soundBin[p]!;
      if (this.isTone[bin + 32] === 1 || IN_SCALE[scale + bin] === 1) continue;
      this.plain += soundPlain[p]!;
      this.moving += soundMoving[p]!;
    }
    for (let t = 0; t < tones.length; t++) this.isTone[base + tones[t]!] = 0;
  }
}
