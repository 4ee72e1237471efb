import { type Note } from '../score/score';
import { type Sonority } from '../score/sonority';
import { midiOf } from '../theory/pitch';

/** Semitones above the held bass within which a lower voice still counts as the bass moving, not as the chord above it. */
const STEP_REACH = 4;
const ATTACK_REACH = 7;
/** Within so many quarters of its attack a bass holds against the short notes of a figure above it. */
const FIGURE_QUARTERS = 2;
/** A short note at least so many semitones above the bass is a figure's, not a step of the bass. */
const FIGURE_LEAP = 5;
/** So many different pitches struck together are a new chord, no figure. */
const CHORD_SIZE = 3;

/**
 * The bass as it is heard, one note per sonority, null before the first note. At a barline it is the lowest sounding note.
 * Inside the bar it moves when the lowest sounding note lies at most 4 semitones above the held one, or when a new lowest
 * note is struck at most 7 above it; otherwise it stays: an arpeggio's or a waltz's bass goes on under the chord. Against
 * one or two notes shorter than a quarter it stays as well when they leap up from it, or when the figure comes back to it,
 * within two quarters.
 */
export function holdBass(sonorities: readonly Sonority[], ticksPerQuarter: number): readonly (Note | null)[] {
  let held: Note | null = null;
  let bar = -1;
  return sonorities.map((sonority, i) => {
    const lowest = sonority.sounding[0];
    if (lowest && (!held || sonority.bar !== bar || (moves(held, lowest, sonority) && !isFigure(held, lowest, sonorities, i, ticksPerQuarter)))) held = lowest;
    if (lowest) bar = sonority.bar;
    return held;
  });
}

/** Whether the lowest note only belongs to a figure above the held bass. */
function isFigure(held: Note, lowest: Note, sonorities: readonly Sonority[], i: number, quarter: number): boolean {
  const rise = midiOf(lowest.pitch) - midiOf(held.pitch);
  const { start, attacked } = sonorities[i]!;
  if (rise <= 0 || lowest.duration >= quarter || new Set(attacked.map(({ pitch }) => pitch.fifths)).size >= CHORD_SIZE) return false;
  const reach = FIGURE_QUARTERS * quarter;
  return (rise >= FIGURE_LEAP && start - held.start < reach) || comesBack(held, sonorities, i, start + reach);
}

/** Whether the held bass is struck again before `until`, in the same bar, before anything sounds below it. */
function comesBack(held: Note, sonorities: readonly Sonority[], i: number, until: number): boolean {
  const height = midiOf(held.pitch);
  const { bar } = sonorities[i]!;
  for (let k = i + 1; k < sonorities.length && sonorities[k]!.bar === bar && sonorities[k]!.start < until; k++) {
    const next = sonorities[k]!.sounding[0];
    if (next && midiOf(next.pitch) <= height) return midiOf(next.pitch) === height;
  }
  return false;
}

function moves(held: Note, lowest: Note, sonority: Sonority): boolean {
  const rise = midiOf(lowest.pitch) - midiOf(held.pitch);
  return rise <= STEP_REACH || (rise <= ATTACK_REACH && sonority.attacked[0] === lowest);
}
