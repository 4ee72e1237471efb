import { quartersOfMetre } from './draft';
import { type Rational, rational } from './rational';
import type { Bar, Score } from './score';
import type { MetricalLevel } from './sonority';

/**
 * How a bar is felt: its beats as positions from the downbeat in quarters, the accents among them, the length of the
 * half-beat. Common practice, no source: numerators 6, 9, 12 and their like are compound (beats of three), others
 * simple; even numbers of beats have an accent half-way; written groups (3+2) are accented as written.
 */
interface Feel {
  /** Felt beat of the bar in quarters; of the first one where they differ. */
  readonly beat: Rational;
  /** Starts of the beats. */
  readonly beats: readonly Rational[];
  /** Starts of the secondary accents. */
  readonly accents: readonly Rational[];
  /** Grid of the half-beats (thirds of a beat in compound metres). */
  readonly half: Rational;
}

/** Metrical weight of a position, in ticks from the start of the bar. */
export function metricalLevel(score: Pick<Score, 'ticksPerQuarter'>, bar: Bar, at: number): MetricalLevel {
  const position = rational(at + bar.offset, score.ticksPerQuarter);
  if (position.num === 0) return 0;
  const feel = feelOf(score, bar);
  if (feel.accents.some((accent) => equal(accent, position))) return 1;
  if (feel.beats.some((beat) => equal(beat, position))) return 2;
  return isMultiple(position, feel.half) ? 3 : 4;
}

/** Length of the bar's felt beat in ticks (a fraction of a tick can happen: 3/8 in quarters). */
export function beatQuarters(score: Pick<Score, 'ticksPerQuarter'>, bar: Bar): Rational {
  return feelOf(score, bar).beat;
}

/** Starts of the bar's felt beats as it is written, in ticks from its start, rounded down to whole ticks. */
export function beatStarts(score: Pick<Score, 'ticksPerQuarter'>, bar: Bar): number[] {
  const positions = feelOf(score, bar).beats.map(({ num, den }) => (num * score.ticksPerQuarter) / den - bar.offset);
  const inside = positions.filter((at) => at > 0 && at < bar.length).map(Math.floor);
  return [0, ...inside];
}

const feels = new WeakMap<Bar, Feel>();

function feelOf(score: Pick<Score, 'ticksPerQuarter'>, bar: Bar): Feel {
  const known = feels.get(bar);
  if (known) return known;
  const feel = bar.time ? feelOfMetre(bar.time.beats, bar.time.beatType, extentOf(score, bar)) : feelOfLength(extentOf(score, bar));
  feels.set(bar, feel);
  return feel;
}

/** From the downbeat the bar belongs to, to its end. */
function extentOf(score: Pick<Score, 'ticksPerQuarter'>, bar: Bar): Rational {
  return rational(bar.offset + bar.length, score.ticksPerQuarter);
}

function feelOfMetre(groups: readonly number[], beatType: number, extent: Rational): Feel {
  const unit = rational(4, beatType);
  if (groups.length > 1) return feelOfGroups(groups, unit);
  const count = groups[0] as number;
  const compound = count > 3 && count % 3 === 0;
  const beat = compound ? times(unit, 3) : unit;
  const whole = quartersOfMetre({ beats: groups, beatType });
  return evenFeel(beat, compound ? count / 3 : count, longer(whole, extent), compound ? unit : times(unit, 1, 2));
}

/** Beats of one length; bars longer than their metre go on counting. */
function evenFeel(beat: Rational, beatsInMetre: number, extent: Rational, half: Rational): Feel {
  const count = Math.min(1000, Math.ceil((extent.num * beat.den) / (extent.den * beat.num)));
  const beats = Array.from({ length: count }, (_, i) => times(beat, i));
  const accents = beatsInMetre % 2 === 0 ? beats.filter((_, i) => i % (beatsInMetre / 2) === 0 && i > 0) : [];
  return { beat, beats, accents, half };
}

/** 3+2/8: an accent at the start of each group, a beat at each unit. */
function feelOfGroups(groups: readonly number[], unit: Rational): Feel {
  const count = groups.reduce((sum, group) => sum + group, 0);
  const starts = groups.slice(0, -1).map((_, i) => groups.slice(0, i + 1).reduce((sum, group) => sum + group, 0));
  const beats = Array.from({ length: Math.min(count, 1000) }, (_, i) => times(unit, i));
  return { beat: unit, beats, accents: starts.map((start) => times(unit, start)), half: times(unit, 1, 2) };
}

/** Without a metre: in quarters, in two halves when their number is even. */
function feelOfLength(extent: Rational): Feel {
  const quarter = rational(1);
  return evenFeel(quarter, extent.den === 1 ? extent.num : 1, extent, rational(1, 2));
}

function times({ num, den }: Rational, by: number, over = 1): Rational {
  return rational(num * by, den * over);
}

function equal(a: Rational, b: Rational): boolean {
  return a.num * b.den === b.num * a.den;
}

function longer(a: Rational, b: Rational): Rational {
  return a.num * b.den >= b.num * a.den ? a : b;
}

function isMultiple(of: Rational, unit: Rational): boolean {
  return (of.num * unit.den) % (unit.num * of.den) === 0;
}
