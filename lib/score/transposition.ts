import { type Fifths, type Pitch, type LETTERS, diatonicOf, fifths, fifthsOf } from '../theory/pitch';

/** An interval from written to sounding pitch: letters up and place on the line of fifths. */
export interface Transposition {
  /** Letters up, octaves included; negative is down. */
  readonly steps: number;
  /** Places up the line of fifths; octaves do not count. */
  readonly fifths: number;
}

export const AT_PITCH: Transposition = { steps: 0, fifths: 0 };

/** Semitones and fifths of the unaltered interval of 0–6 letters: unison, major 2nd, major 3rd, 4th, 5th, major 6th, major 7th. */
const SEMITONES = [0, 2, 4, 5, 7, 9, 11];
const FIFTHS = [0, 2, 4, -1, 1, 3, 5];

/** The usual number of letters for a transposition by 0–11 semitones, for files that leave `diatonic` out. */
const USUAL_STEPS = [0, 1, 1, 2, 2, 3, 3, 4, 5, 5, 6, 6];

/** From MusicXML's `transpose`: letters and semitones without octaves, octaves apart. */
export function transpositionOf(diatonic: number | undefined, chromatic: number, octaves: number): Transposition {
  const steps = diatonic ?? 7 * Math.floor(chromatic / 12) + (USUAL_STEPS[((chromatic % 12) + 12) % 12] as number);
  const octave = Math.floor(steps / 7);
  const plain = steps - 7 * octave;
  const alter = chromatic - 12 * octave - (SEMITONES[plain] as number);
  return { steps: steps + 7 * octaves, fifths: (FIFTHS[plain] as number) + 7 * alter };
}

/** The sounding pitch of a written one, spelled by the interval: B♭ clarinet D5 → C5. */
export function transposePitch(pitch: Pitch, by: Transposition): Pitch {
  if (by === AT_PITCH) return pitch;
  return { fifths: fifths(pitch.fifths + by.fifths), octave: Math.floor((diatonicOf(pitch) + by.steps) / 7) };
}

/** The concert key signature of a written one. */
export function transposeSignature(signature: number, by: Transposition): Fifths {
  return fifths(signature + by.fifths);
}

export function pitchOf(step: (typeof LETTERS)[number], alter: number, octave: number): Pitch {
  return { fifths: fifthsOf(step, alter), octave };
}
