import { readScoreText } from '@/lib/score/read-score';
import type { Note, Score, ScoreError } from '@/lib/score/score';
import { formatRational } from '@/lib/score/rational';
import { type Pitch, formatPitchClass } from '@/lib/theory/pitch';

/** The Score of a text that must be read. */
export function mustRead(xml: string): Score {
  const result = readScoreText(xml);
  if (!result.ok) throw new Error(`refused: ${result.error.code} ${result.error.message}`);
  return result.value;
}

/** The refusal of a text that must be refused. */
export function mustRefuse(xml: string): ScoreError {
  const result = readScoreText(xml);
  if (result.ok) throw new Error('read, though it should be refused');
  return result.error;
}

export function pitchText({ fifths, octave }: Pitch): string {
  return `${formatPitchClass(fifths)}${octave}`;
}

export function quarters(score: Score, ticks: number): string {
  return formatRational({ num: ticks, den: score.ticksPerQuarter });
}

/** `C4@0:1` is a C4 that starts at 0 and lasts a quarter. */
export function noteText(score: Score, { pitch, start, duration }: Note): string {
  return `${pitchText(pitch)}@${quarters(score, start)}:${quarters(score, duration)}`;
}

/** All notes, in the score's order. */
export function notesText(score: Score): string {
  return score.notes.map((note) => noteText(score, note)).join(' ');
}

/** `1:4 2:4 X1:2`: bars by printed number and length in quarters. */
export function barsText(score: Score): string {
  return score.bars.map(({ number, length }) => `${number}:${quarters(score, length)}`).join(' ');
}
