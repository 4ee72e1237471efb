import { beatStarts } from '@/lib/score/metre';
import type { Bar, Score } from '@/lib/score/score';

/** Bars and beats as people count them. */

export function findBar(score: Score, tick: number): Bar | null {
  return score.bars.findLast((bar) => bar.start <= tick) ?? null;
}

/** `bar 12`, or what the bar is when it bears no number. */
export function nameBar(bar: Bar): string {
  if (bar.number !== '') return `bar ${bar.number}`;
  return bar.index === 0 ? 'upbeat' : `the bar after ${bar.index}`;
}

/** The felt beat, counted from 1, with the part of it that has passed: 1, 2½, 3¾; thirds as 2⅓. An upbeat counts to the barline. */
export function nameBeat(score: Score, tick: number): string {
  const bar = findBar(score, tick);
  if (!bar) return '';
  const starts = beatStarts(score, bar);
  const at = tick - bar.start;
  const index = starts.findLastIndex((start) => start <= at);
  const from = starts[index] ?? 0;
  const to = starts[index + 1] ?? bar.length;
  return `${index + 1}${nameFraction(to > from ? (at - from) / (to - from) : 0)}`;
}

const GLYPHS: Readonly<Record<string, string>> = {
  '1/2': '½', '1/3': '⅓', '2/3': '⅔', '1/4': '¼', '3/4': '¾', '1/6': '⅙', '5/6': '⅚', '1/8': '⅛', '3/8': '⅜', '5/8': '⅝', '7/8': '⅞',
};
const FINEST = 48;

/** The fraction in lowest terms, as one sign where there is one; a rounded decimal when it is finer than any note is. */
function nameFraction(part: number): string {
  if (part === 0) return '';
  for (let below = 2; below <= FINEST; below += 1) {
    const above = Math.round(part * below);
    if (Math.abs(above / below - part) < 0.0005) return GLYPHS[`${above}/${below}`] ?? ` ${above}/${below}`;
  }
  return ` + ${part.toFixed(2)}`;
}

export function namePlace(score: Score, tick: number): string {
  const bar = findBar(score, tick);
  return bar ? `${nameBar(bar)}, beat ${nameBeat(score, tick)}` : '';
}

/** Every moment of a span at which a note is written, sorted: where labels can begin. */
export function onsetsOf(score: Score, start: number, end: number): number[] {
  const onsets = new Set<number>([start]);
  for (const note of score.notes) if (note.start >= start && note.start < end) onsets.add(note.start);
  return [...onsets].sort((a, b) => a - b);
}
