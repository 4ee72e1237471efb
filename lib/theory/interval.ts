import { type Fifths, type Pitch, diatonicOf, fifths, letterOf, LETTERS } from './pitch';

/**
 * A spelled interval between two pitches: `fifths` up the line of fifths (which fixes its quality) and `steps`, the
 * diatonic distance (a third up is 2, a third down −2). C4 up to E♭5 is fifths −3, steps 9.
 */
export interface Interval {
  readonly fifths: number;
  readonly steps: number;
}

/** Where a letter step lies on the line when it is perfect or major: unison 0, second 2, third 4, fourth −1 … */
const STEP_FIFTHS: readonly number[] = [0, 2, 4, -1, 1, 3, 5];
const PERFECT_STEPS: readonly number[] = [0, 3, 4];

export function intervalBetween(from: Pitch, to: Pitch): Interval {
  return { fifths: to.fifths - from.fifths, steps: diatonicOf(to) - diatonicOf(from) };
}

export function transpose(pitch: Pitch, interval: Interval): Pitch {
  const target = fifths(pitch.fifths + interval.fifths);
  const octave = (diatonicOf(pitch) + interval.steps - LETTERS.indexOf(letterOf(target))) / 7;
  if (!Number.isInteger(octave)) throw new Error(`no interval: fifths ${interval.fifths}, steps ${interval.steps}`);
  return { fifths: target, octave };
}

/** Signed size in semitones: a step is a letter, so the octaves are in `steps`. */
export function semitonesOf(interval: Interval): number {
  const octaves = Math.floor(interval.steps / 7);
  const step = interval.steps - 7 * octaves;
  const base = STEP_FIFTHS[step] as number;
  const naturalSemitones = [0, 2, 4, 5, 7, 9, 11][step] as number;
  return 12 * octaves + naturalSemitones + (interval.fifths - base) / 7;
}

/** `P5`, `m3`, `A4`, `dd7`, `M9`; downward intervals carry a minus: `-m2`. The number counts both ends. */
export function formatInterval(interval: Interval): string {
  const down = interval.steps < 0 || (interval.steps === 0 && semitonesOf(interval) < 0);
  const steps = Math.abs(interval.steps);
  const up = down ? -interval.fifths : interval.fifths;
  const step = steps % 7;
  const alter = (up - (STEP_FIFTHS[step] as number)) / 7;
  return `${down ? '-' : ''}${qualityOf(step, alter)}${steps + 1}`;
}

function qualityOf(step: number, alter: number): string {
  if (alter > 0) return 'A'.repeat(alter);
  if (PERFECT_STEPS.includes(step)) return alter === 0 ? 'P' : 'd'.repeat(-alter);
  if (alter === 0) return 'M';
  return alter === -1 ? 'm' : 'd'.repeat(-alter - 1);
}

/** The letters from one pitch class up to the next of another: C up to E♭ is 2, B up to C is 1; 0 to 6. */
export function stepsUp(from: Fifths, to: Fifths): number {
  return (LETTERS.indexOf(letterOf(to)) - LETTERS.indexOf(letterOf(from)) + 7) % 7;
}

/** The interval's name from one pitch class up to another within the octave: `m3` for C–E♭. */
export function formatPitchClassInterval(from: Fifths, to: Fifths): string {
  return formatInterval({ fifths: to - from, steps: stepsUp(from, to) });
}
