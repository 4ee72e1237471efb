import { metricalLevel } from '../score/metre';
import { type Score } from '../score/score';
import { equalKeys, fifthsOfDegree } from '../theory/key';
import { type Numeral } from '../theory/numeral';
import { isDominant } from '../theory/resolutions';
import { type Label, type Reading } from './reading';
import { indexVoices } from './voices';

export const CADENCE_KINDS = ['perfect-authentic', 'imperfect-authentic', 'half', 'phrygian-half', 'deceptive', 'plagal'] as const;
export type CadenceKind = (typeof CADENCE_KINDS)[number];

/** A cadence whose goal is a label. `strength` 0–1: how much of a close it is, from metre, length and what follows. */
export interface Cadence {
  readonly kind: CadenceKind;
  readonly strength: number;
}

/** Below this a progression is no close, merely a progression. */
const LEAST_STRENGTH = 0.5;

/**
 * The cadence that ends on a label, null when there is none. Source of the kinds: Open Music Theory v1, cadence types.
 * Common practice, no source: a close needs weight; it counts a strong beat, a goal at least as long as the chord before,
 * and a rest or the end after it.
 */
export function findCadence(score: Score, reading: Reading, i: number): Cadence | null {
  const goal = reading.labels[i];
  const before = reading.labels[i - 1];
  if (!goal?.numeral || !before?.numeral || !equalKeys(goal.key, before.key)) return null;
  const kind = findKind(score, before, before.numeral, goal, goal.numeral);
  if (!kind) return null;
  const strength = measureStrength(score, reading, i);
  return strength >= LEAST_STRENGTH ? { kind, strength } : null;
}

function findKind(score: Score, from: Label, a: Numeral, to: Label, b: Numeral): CadenceKind | null {
  if (a.applied.length > 0 || b.applied.length > 0) return null;
  const fromDominant = isDominant(a);
  if (fromDominant && isTonicTriad(b)) return isPerfect(score, a, b, to) ? 'perfect-authentic' : b.inversion === 2 ? null : 'imperfect-authentic';
  if (fromDominant && a.inversion === 0 && b.degree.step === 6 && b.inversion === 0) return 'deceptive';
  if (isDominant(b) && b.quality === 'major' && b.inversion === 0 && !fromDominant) return isPhrygian(from, a) ? 'phrygian-half' : 'half';
  return a.degree.step === 4 && a.inversion === 0 && isTonicTriad(b) && b.inversion === 0 ? 'plagal' : null;
}

function isTonicTriad({ degree, quality }: Numeral): boolean {
  return degree.step === 1 && degree.alter === 0 && (quality === 'major' || quality === 'minor');
}

function isPhrygian({ key }: Label, { degree, inversion }: Numeral): boolean {
  return key.mode === 'minor' && degree.step === 4 && inversion === 1;
}

/** Both in root position, the tonic on top. */
function isPerfect(score: Score, a: Numeral, b: Numeral, goal: Label): boolean {
  if (a.inversion !== 0 || b.inversion !== 0) return false;
  const struck = indexVoices(score).soundingIn(goal.start, goal.start + 1);
  return struck.at(-1)?.pitch.fifths === fifthsOfDegree(goal.key, { step: 1, alter: 0 });
}

function measureStrength(score: Score, { labels, end }: Reading, i: number): number {
  const goal = labels[i]!;
  const before = labels[i - 1]!;
  const bar = score.bars.findLast(({ start }) => start <= goal.start);
  const level = bar ? metricalLevel(score, bar, goal.start - bar.start) : 4;
  const isLong = goal.end - goal.start >= before.end - before.start;
  const rest = goal.end >= end || restFollows(score, goal);
  return (level <= 1 ? 0.3 : 0) + (isLong ? 0.3 : 0) + (rest ? 0.4 : 0);
}

/** The top part falls silent within the goal or right after it. */
function restFollows(score: Score, goal: Label): boolean {
  const voices = indexVoices(score);
  const top = voices.soundingIn(goal.start, goal.end).filter((note) => note.part === 0);
  const release = top.reduce((last, note) => Math.max(last, note.start + note.duration), 0);
  return top.length > 0 && !voices.soundingIn(release, release + 1).some((note) => note.part === 0);
}
