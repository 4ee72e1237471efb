import { BASS_MOTIONS } from './bass-motion';
import { CHORD_TERMS, CHORD_TERM_COUNT, HAND_CHORD_WEIGHTS } from './chord-terms';
import {
  HAND_FACT_WEIGHTS,
  HAND_WINDOW_WEIGHTS,
  KEY_FACTS,
  KEY_PROFILE_COUNT,
  KEY_TERM_COUNT,
  KEY_WINDOWS,
  PROFILE_SIZE,
  profileAt,
} from './key-terms';
import { HAND_LABEL_WEIGHTS, LABEL_TERMS } from './label-terms';
import { HAND_SPAN_WEIGHTS, SPAN_TERMS, SPAN_TERM_COUNT } from './span-terms';
import { HAND_TRANSITION_WEIGHTS, TRANSITION_TERMS } from './transition-terms';
import { LABELS, LABEL_CLASSES, LABEL_COUNT, ROW_COUNT } from './vocabulary';

/**
 * All weights in one flat vector `values`, block after block; the blocks' starts are in AT. Named terms come first, then
 * the fine corrections to the frequency tables: per label, class × inversion, class × metrical
 * level, class × length, label × inversion, class × class × bass motion, relation, row × row.
 */
export const RELATIONS = 2 * 2 * 13;
export const INVERSION_SLOTS = LABEL_CLASSES.length * 2 * 4;
export const CLASS_LEVELS = LABEL_CLASSES.length * 5;
/** Per class: weight of the log length, of being shorter than a beat, of filling a bar. */
export const CLASS_LENGTHS = LABEL_CLASSES.length * 3;
export const CLASS_MOTIONS = LABEL_CLASSES.length * LABEL_CLASSES.length * BASS_MOTIONS.length;

function layOut() {
  let next = 0;
  const block = (size: number) => {
    const at = next;
    next += size;
    return at;
  };
  return {
    chord: block(CHORD_TERM_COUNT),
    span: block(SPAN_TERM_COUNT),
    key: block(KEY_TERM_COUNT),
    label: block(LABEL_TERMS.length),
    transition: block(TRANSITION_TERMS.length),
    perLabel: block(LABEL_COUNT),
    inversion: block(INVERSION_SLOTS),
    classLevel: block(CLASS_LEVELS),
    classLength: block(CLASS_LENGTHS),
    labelInversion: block(LABEL_COUNT * 4),
    classMotion: block(CLASS_MOTIONS),
    relation: block(RELATIONS),
    progression: block(ROW_COUNT * ROW_COUNT),
    size: next,
  };
}

export const AT = layOut();

/** Log frequencies counted in analysed scores; the weights say how far to trust them. */
export interface Tables {
  /** log p(label | mode). */
  readonly label: Float64Array;
  /** log p(inversion | label), `[label · 4 + inversion]`. */
  readonly inversion: Float64Array;
  /** log p(row | previous row), `[previous · rows + next]`. */
  readonly progression: Float64Array;
  /** log p(relation | mode of the key that is left), see relationOf. */
  readonly relation: Float64Array;
  /** log p(place on the line of fifths | mode), `[mode · PROFILE_SIZE + place]`. */
  readonly profile: Float64Array;
}

export interface Weights {
  readonly values: Float64Array;
  readonly tables: Tables;
}

/** Slot of the correction for an inversion of a label's class, triads and sevenths apart. */
export function inversionSlot(label: number, isSeventh: boolean, inversion: number): number {
  return (LABELS[label]!.labelClass * 2 + (isSeventh ? 1 : 0)) * 4 + inversion;
}

/** The weights that people set, before any learning: the starting point of `npm run train`. */
export function handWeights(tables: Tables): Weights {
  const values = new Float64Array(AT.size);
  CHORD_TERMS.forEach(([name], i) => (values[AT.chord + i] = HAND_CHORD_WEIGHTS[name] ?? 0));
  SPAN_TERMS.forEach(([name], i) => (values[AT.span + i] = HAND_SPAN_WEIGHTS[name] ?? 0));
  KEY_WINDOWS.forEach((_, window) => {
    for (let mode = 0; mode < 2; mode++) {
      for (let place = 0; place < PROFILE_SIZE; place++) {
        values[AT.key + profileAt(window, mode) + place] = HAND_WINDOW_WEIGHTS[window]! * tables.profile[mode * PROFILE_SIZE + place]!;
      }
    }
  });
  KEY_FACTS.forEach((_, i) => (values[AT.key + KEY_PROFILE_COUNT + i] = HAND_FACT_WEIGHTS[i]!));
  LABEL_TERMS.forEach(([name], i) => (values[AT.label + i] = HAND_LABEL_WEIGHTS[name] ?? 0));
  TRANSITION_TERMS.forEach(([name], i) => (values[AT.transition + i] = HAND_TRANSITION_WEIGHTS[name] ?? 0));
  return { values, tables };
}
