import { type Note } from '../score/score';
import { type Sonority } from '../score/sonority';
import { midiOf } from '../theory/pitch';

/** Semitones above the held bass within which a lower voice still counts as the bass moving, not as the chord above it. */
const STEP_REACH = 4;
const ATTACK_REACH = 7;

/**
 * The bass as it is heard, one note per sonority, null before the first note. At a barline it is the lowest sounding note.
 * Inside the bar it moves when the lowest sounding note lies at most 4 semitones above the held one, or when a new lowest
 * note is struck at most 7 above it; otherwise it stays: an arpeggio's or a waltz's bass goes on under the chord.
 */
export function holdBass(sonorities: readonly Sonority[]): readonly (Note | null)[] {
  let held: Note | null = null;
  let bar = -1;
  return sonorities.map((sonority) => {
    const lowest = sonority.sounding[0];
    if (lowest && (!held || sonority.bar !== bar || moves(held, lowest, sonority))) held = lowest;
    if (lowest) bar = sonority.bar;
    return held;
  });
}

function moves(held: Note, lowest: Note, sonority: Sonority): boolean {
  const rise = midiOf(lowest.pitch) - midiOf(held.pitch);
  return rise <= STEP_REACH || (rise <= ATTACK_REACH && sonority.attacked[0] === lowest);
}
