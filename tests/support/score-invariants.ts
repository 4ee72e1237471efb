import { type Score, SCORE_ERROR_CODES, type ScoreError } from '@/lib/score/score';
import { sliceBeats } from '@/lib/score/beats';
import { performedBars } from '@/lib/score/performed-bars';
import { sliceSonorities } from '@/lib/score/sonorities';

/** What is wrong with a Score by the contract of lib/score/score.ts; [] for every score that a reader gives. */
export function checkScore(score: Score): string[] {
  return [...checkBars(score), ...checkNotes(score), ...checkSlices(score)];
}

/** What is wrong with a refusal: it needs a known code and a sentence. */
export function checkRefusal(error: ScoreError): string[] {
  const known = (SCORE_ERROR_CODES as readonly string[]).includes(error.code);
  const placed = error.line === undefined || (Number.isInteger(error.line) && error.line >= 1);
  return known && placed && /[a-z].*\.$/.test(error.message) ? [] : [`bad refusal: ${JSON.stringify(error)}`];
}

function whole(...times: number[]): boolean {
  return times.every((time) => Number.isSafeInteger(time) && time >= 0);
}

function checkBars({ bars, ticksPerQuarter }: Score): string[] {
  const tile = bars.every((bar, i) => bar.index === i && bar.start === (i === 0 ? 0 : (bars[i - 1]?.start ?? 0) + (bars[i - 1]?.length ?? 0)));
  const exact = bars.every(({ start, length, offset }) => whole(start, length, offset) && length > 0);
  return [...(bars.length > 0 && tile ? [] : ['bars do not tile']), ...(exact && whole(ticksPerQuarter) ? [] : ['bar times are not whole'])];
}

function checkNotes({ notes, graceNotes, parts, bars }: Score): string[] {
  const end = bars.reduce((sum, { length }) => sum + length, 0);
  const exact = notes.every(({ start, duration, attacks }) => whole(start, duration, ...attacks) && duration > 0 && start < end);
  const attacked = notes.every(({ start, duration, attacks }) => attacks[0] === start && attacks.every((at, i) => at < start + duration && at > (attacks[i - 1] ?? -1)));
  const sorted = notes.every((note, i) => note.id === i && note.start >= (notes[i - 1]?.start ?? 0) && note.part < parts.length);
  const graces = graceNotes.every(({ mainNote }) => mainNote === null || notes[mainNote] !== undefined);
  return [
    ...(exact ? [] : ['note times are not whole']),
    ...(attacked ? [] : ['attacks lie outside their note']),
    ...(sorted ? [] : ['notes are not in order']),
    ...(graces ? [] : ['a grace note leads nowhere']),
  ];
}

function checkSlices(score: Score): string[] {
  const slices = sliceSonorities(score);
  const tile = slices.every((slice, i) => slice.end > slice.start && slice.start === (slices[i - 1]?.end ?? slice.start));
  const onsets = new Set(score.notes.map(({ start }) => start));
  const attacks = slices.filter(({ attacked }) => attacked.length > 0).length;
  const beats = sliceBeats(score).every(({ start, end, notes }) => end > start && notes.every(({ sounds }) => sounds > 0));
  return [
    ...(tile ? [] : ['sonorities do not tile']),
    ...(attacks === onsets.size ? [] : ['not one sonority per onset']),
    ...(beats ? [] : ['a beat is empty or negative']),
    ...(performedBars(score).every((bar) => bar < score.bars.length) ? [] : ['a performed bar does not exist']),
  ];
}
