import { type SpanSound } from './segments';
import { type Slices } from './slices';

/** The terms of a span whatever its chord: its place, its length, its edges. Amounts are shares, logs of beats or 0/1. */
export const SPAN_TERMS = [
  ['span', 'one more chord'],
  ['starts-downbeat', 'it begins on the downbeat'],
  ['starts-half-bar', 'it begins on the half-bar'],
  ['starts-beat', 'it begins on a beat'],
  ['starts-half-beat', 'it begins between beats'],
  ['starts-off', 'it begins off every beat'],
  ['starts-with-bass', 'the bass moves where it begins'],
  ['starts-without-attack', 'nothing is struck where it begins'],
  ['starts-with-new-notes', 'new notes come where it begins'],
  ['starts-with-many-attacks', 'the voices move together where it begins'],
  ['starts-with-change', 'the beat that it begins has other notes than the beat before'],
  ['starts-with-wide-change', 'the two beats from its start have other notes than the two before'],
  ['starts-by-habit', 'the piece often changes at such a place'],
  ['starts-by-bass-habit', 'the bass often moves at such a place'],
  ['starts-inside-figure', 'the bass comes back to where it was'],
  ['ends-same-bass', 'the bass stays where it ends'],
  ['hides-change', 'the notes change inside it'],
  ['hides-wide-change', 'the notes of two beats change inside it'],
  ['hides-bass', 'the bass moves on a beat inside it'],
  ['length-log', 'its length'],
  ['length-under-beat', 'it is shorter than a beat'],
  ['length-beat', 'it lasts one beat'],
  ['length-bar', 'it fills the bar'],
  ['pace-span', 'one more chord, in a piece whose bass moves often'],
  ['pace-length', 'its length, in a piece whose bass moves often'],
  ['density-span', 'one more chord, in a dense texture'],
  ['density-length', 'its length, in a dense texture'],
] as const;

export const SPAN_TERM_COUNT = SPAN_TERMS.length;
type TermName = (typeof SPAN_TERMS)[number][0];

const AT = Object.fromEntries(SPAN_TERMS.map(([name], i) => [name, i])) as Readonly<Record<TermName, number>>;

/** Places in a row of span terms that labels are weighed by as well. */
export const LENGTH_LOG = AT['length-log'];
export const LENGTH_UNDER_BEAT = AT['length-under-beat'];
export const LENGTH_BAR = AT['length-bar'];

/** Fills `row` (zeros before) with the terms of the span from slice `j` to `e` that `sound` has gathered. */
export function fillSpanTerms(row: Float32Array, sound: SpanSound, slices: Slices, j: number, e: number): void {
  const { change } = slices;
  const log = Math.log2(Math.max(0.125, sound.beats));
  row[AT.span] = 1;
  row[AT['starts-downbeat'] + slices.level[j]!] = 1;
  row[AT['starts-with-bass']] = j === 0 || slices.bass[j - 1] !== slices.bass[j] ? 1 : 0;
  row[AT['starts-without-attack']] = slices.attacks[j] === 0 ? 1 : 0;
  row[AT['starts-with-new-notes']] = j === 0 ? 1 : shareOfNewNotes(slices, j);
  row[AT['starts-with-many-attacks']] = slices.attacks[j]! >= 3 ? 1 : 0;
  row[AT['starts-with-change']] = change.near[j]!;
  row[AT['starts-with-wide-change']] = change.wide[j]!;
  row[AT['starts-by-habit']] = change.habit[j]!;
  row[AT['starts-by-bass-habit']] = change.bassHabit[j]!;
  row[AT['starts-inside-figure']] = j > 0 && e < slices.count && slices.bass[j - 1] === slices.bass[e] && slices.bass[j] !== slices.bass[e] ? 1 : 0;
  row[AT['ends-same-bass']] = e < slices.count && slices.bass[e] === slices.bass[e - 1] ? 1 : 0;
  row[AT['hides-change']] = sound.hiddenChange;
  row[AT['hides-wide-change']] = sound.hiddenWideChange;
  row[AT['hides-bass']] = sound.hiddenBassMoves > 0 ? 1 : 0;
  row[AT['length-log']] = log;
  row[AT['length-under-beat']] = sound.beats < 0.99 ? 1 : 0;
  row[AT['length-beat']] = Math.abs(sound.beats - 1) < 0.01 ? 1 : 0;
  row[AT['length-bar']] = startsBar(slices, j) && endsBar(slices, e) ? 1 : 0;
  row[AT['pace-span']] = change.pace;
  row[AT['pace-length']] = change.pace * log;
  row[AT['density-span']] = change.density;
  row[AT['density-length']] = change.density * log;
}

function startsBar(slices: Slices, j: number): boolean {
  return j === 0 || slices.bar[j - 1] !== slices.bar[j];
}

function endsBar(slices: Slices, e: number): boolean {
  return e === slices.count || slices.bar[e] !== slices.bar[e - 1];
}

/** Share of the pitches at the slice's start that did not sound in the slice before. */
function shareOfNewNotes(slices: Slices, j: number): number {
  const from = slices.first[j]!;
  let all = 0;
  let fresh = 0;
  for (let p = from; p < slices.first[j + 1]!; p++) {
    if (slices.atStart[p] === 0) continue;
    all++;
    let heard = false;
    for (let q = slices.first[j - 1]!; q < from; q++) heard ||= slices.bin[q] === slices.bin[p];
    if (!heard) fresh++;
  }
  return all ? fresh / all : 0;
}

/** The weights before any learning. */
export const HAND_SPAN_WEIGHTS: Readonly<Partial<Record<TermName, number>>> = {
  span: -1.1, 'starts-downbeat': 0.5, 'starts-half-bar': 0.07, 'starts-beat': 0.05, 'starts-half-beat': -0.9, 'starts-off': -1.5,
  'starts-with-bass': 0.2, 'starts-without-attack': -0.5, 'starts-with-new-notes': 0.2,
};
