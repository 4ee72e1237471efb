import type { Reading } from '../harmony/reading';
import { type Comparison, type PartMark, compareLabel } from './compare-label';
import { isSameChord, overlapOf, type Piece, piecesOf, piecesWithin } from './pieces';
import type { Framed, KeyLabel, KeyReading, Moment } from './key-reading';
import { pointsOf } from './points';
import { type Reason, reasonsFor } from './reasons';
import type { Rubric, Segmentation } from './rubric';
import type { ErrorKind, Verdict } from './verdict';

/** How the assignment was put to the student. */
export interface Setting {
  readonly segmentation: Segmentation;
  /** The key regions were given; answers are then read in the key's regions, whatever theirs say. */
  readonly keysGiven: boolean;
  readonly ticksPerQuarter: number;
}

/** The proposed mark of one asked span. Plain data: it is stored and shown as it is. */
export interface SpanMark {
  readonly keyLabelId: string;
  readonly start: Moment;
  readonly end: Moment;
  readonly verdict: Verdict;
  /** Share of full marks before rounding, 0–1. */
  readonly credit: number;
  readonly points: number;
  readonly maxPoints: number;
  /** Which accepted alternative the answer was held against, 0-based; null for the key's own label. */
  readonly alternative: number | null;
  readonly parts: readonly PartMark[];
  readonly errors: readonly ErrorKind[];
  readonly reasons: readonly Reason[];
  /** What the student wrote over the span; clipped to it. One piece, except in open segmentation. */
  readonly answer: readonly Piece[];
}

/**
 * Marks an answer against the key: one mark per asked span, in order of time. Pure and total: any two readings can be
 * compared; where the answer does not reach, it is blank.
 */
export function compareWithKey(key: KeyReading, answer: Reading, rubric: Rubric, setting: Setting): SpanMark[] {
  const pieces = piecesOf(setting.keysGiven ? inKeysOf(key, answer) : answer);
  const round: Round = { key, pieces, rubric, setting };
  return key.labels.filter((label) => label.asked && label.numeral).map((label) => markSpan(label, round));
}

function inKeysOf(key: KeyReading, answer: Reading): Pick<Reading, 'labels'> {
  return {
    labels: answer.labels.map((label) => {
      const region = key.regions.find((r) => r.start <= label.start && label.start < r.end);
      return region ? { ...label, key: region.key } : label;
    }),
  };
}

/** Everything that stays the same while one answer is marked. */
interface Round {
  readonly key: KeyReading;
  readonly pieces: readonly Piece[];
  readonly rubric: Rubric;
  readonly setting: Setting;
}

interface Candidate {
  readonly chord: Framed;
  readonly alternative: number | null;
}

function markSpan(label: KeyLabel, round: Round): SpanMark {
  const candidates = candidatesOf(label);
  const compared = candidates.map((candidate) => ({ candidate, judged: compareSpan(label, candidate, round) }));
  const best = compared.reduce((a, b) => (b.judged.credit > a.judged.credit ? b : a));
  const { judged, candidate } = best;
  const maxPoints = label.points ?? round.rubric.pointsPerLabel;
  const verdict = verdictOf(judged, candidate);
  return {
    keyLabelId: label.id,
    start: label.start,
    end: label.end,
    verdict,
    credit: judged.credit,
    points: pointsOf(judged.credit, maxPoints, round.rubric.pointStep),
    maxPoints,
    alternative: candidate.alternative,
    parts: judged.parts,
    errors: judged.errors,
    reasons: reasonsFor(verdict, judged, candidate.chord, judged.answered),
    answer: clip(piecesWithin(round.pieces, label.start, label.end), label),
  };
}

function candidatesOf(label: KeyLabel): [Candidate, ...Candidate[]] {
  if (!label.numeral) throw new Error('only labels with a numeral are marked');
  const own = { chord: { key: label.key, numeral: label.numeral }, alternative: null };
  return [own, ...label.alternatives.map((chord, place) => ({ chord, alternative: place }))];
}

function clip(pieces: readonly Piece[], span: KeyLabel): Piece[] {
  return pieces.map((piece) => ({
    ...piece,
    start: piece.start < span.start ? span.start : piece.start,
    end: piece.end > span.end ? span.end : piece.end,
  }));
}

/** How the answer over one span stands to one candidate. */
interface Judged {
  readonly credit: number;
  /** The piece of the answer that counts most, and its comparison; null for a blank. */
  readonly answered: Framed | null;
  readonly main: Comparison | null;
  readonly parts: readonly PartMark[];
  readonly errors: readonly ErrorKind[];
}

function verdictOf(judged: Judged, candidate: Candidate): Verdict {
  if (!judged.main) return 'blank';
  if (judged.credit >= 1 && judged.main.same) return candidate.alternative === null ? 'as-keyed' : 'alternative';
  if (judged.main.frame && !judged.errors.includes('boundary')) return 'other-frame';
  if (judged.credit >= 1) return 'alternative';
  return judged.credit > 0 ? 'partly' : 'not-this';
}

interface Weighed {
  readonly piece: Piece;
  readonly time: number;
  readonly comparison: Comparison | null;
}

/** Credit by the time each piece of the answer takes up; in open segmentation the place of the change counts too. */
function compareSpan(label: KeyLabel, candidate: Candidate, round: Round): Judged {
  const weighed = weigh(label, candidate, round);
  const main = weighed.reduce<Weighed | null>((a, b) => (a && weight(a) >= weight(b) ? a : b), null);
  if (!main?.comparison) return { credit: 0, answered: null, main: null, parts: [], errors: ['blank'] };
  const time = weighed.reduce((sum, one) => sum + one.time, 0);
  const content = weighed.reduce((sum, one) => sum + one.time * (one.comparison?.credit ?? 0), 0) / time;
  const { parts, errors } = main.comparison;
  const judged = { credit: content, answered: main.piece.chord, main: main.comparison, parts, errors };
  return round.setting.segmentation === 'given' ? judged : withBoundary(judged, isPlacedRight(label, round), round.rubric);
}

function weigh(label: KeyLabel, candidate: Candidate, round: Round): Weighed[] {
  const { pieces, rubric, setting } = round;
  return withoutSlips(piecesWithin(pieces, label.start, label.end), label, toleranceOf(round)).map((piece) => {
    const around = { keysAsked: !setting.keysGiven, nextAnswered: chordAfter(pieces, piece) };
    const comparison = piece.chord && compareLabel(candidate.chord, piece.chord, rubric, around);
    return { piece, time: overlapOf(piece, label.start, label.end), comparison };
  });
}

/** Blanks weigh least: a span is blank only when nothing else is in it. */
function weight(one: Weighed): number {
  return one.comparison ? one.time * (1 + one.comparison.credit) : -1;
}

function chordAfter(pieces: readonly Piece[], piece: Piece): Framed | null {
  return pieces.find((other) => other.start >= piece.end && other.chord)?.chord ?? null;
}

function toleranceOf({ rubric, setting }: Round): number {
  return setting.segmentation === 'open' ? rubric.boundaryTolerance * setting.ticksPerQuarter : 0;
}

/** Leaves out what only reaches into the span by the tolerance; everything, when nothing more is there. */
function withoutSlips(pieces: readonly Piece[], span: KeyLabel, tolerance: number): readonly Piece[] {
  const longer = pieces.filter((piece) => overlapOf(piece, span.start, span.end) > tolerance);
  return longer.length > 0 ? longer : pieces;
}

function withBoundary(judged: Judged, placed: boolean, rubric: Rubric): Judged {
  const parts: PartMark[] = [...judged.parts, { part: 'boundary', credit: placed ? 1 : 0 }];
  const errors: readonly ErrorKind[] = placed ? judged.errors : [...judged.errors, 'boundary'];
  if (judged.credit === 0 && rubric.rootFirst) return { ...judged, parts, errors };
  const ofChord = judged.parts.reduce((sum, mark) => sum + rubric.shares[mark.part], 0);
  const ofBoundary = rubric.shares.boundary;
  const credit = (ofChord * judged.credit + ofBoundary * (placed ? 1 : 0)) / (ofChord + ofBoundary);
  return { ...judged, parts, errors, credit };
}

/**
 * The answer changes where the span starts and not inside it. A change inside that reaches past the span's end is the
 * next span come early, and is that one's mistake; where the key does not change chord, no change is needed.
 */
function isPlacedRight(label: KeyLabel, round: Round): boolean {
  const tolerance = toleranceOf(round);
  const near = (a: number, b: number) => Math.abs(a - b) <= tolerance;
  const starts = isNoChange(round.key, label) || round.pieces.some((piece) => near(piece.start, label.start));
  const inside = piecesWithin(round.pieces, label.start, label.end).filter(
    (piece) => piece.start > label.start && !near(piece.start, label.start) && !near(piece.start, label.end),
  );
  return starts && inside.every((piece) => piece.end > label.end);
}

function isNoChange(key: KeyReading, label: KeyLabel): boolean {
  const before = key.labels.find((other) => other.end === label.start);
  const chord = (l: KeyLabel) => l.numeral && { key: l.key, numeral: l.numeral };
  return !before || isSameChord(chord(before), chord(label));
}
