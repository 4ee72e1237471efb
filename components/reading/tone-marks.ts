import type { ToneMark } from '@/components/score/tone-marks';
import type { Reading, Why } from '@/lib/harmony/reading';

/** The kinds to print at notes: all that a person gave, and for the label looked at what its evidence says of the others. */
export function findToneMarks(reading: Reading, labelId: string, why: Why | null): ToneMark[] {
  const byHand = reading.labels.flatMap((label) => (label.tones ?? []).map((tone): ToneMark => ({ ...tone, byHand: true })));
  const own = new Set(reading.labels.find((l) => l.id === labelId)?.tones?.map((tone) => tone.noteId));
  const found = (why?.nonChordTones ?? []).filter((tone) => !own.has(tone.noteId));
  return [...byHand, ...found.map(({ noteId, kind }): ToneMark => ({ noteId, kind, byHand: false }))];
}
