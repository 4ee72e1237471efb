import type { Mark } from '@/db/queries/marks';
import type { Framed, KeyReading } from '@/lib/marking/key-reading';
import type { Piece } from '@/lib/marking/pieces';
import type { Part, Verdict } from '@/lib/marking/verdict';

/** One mark as its student may see it: without the key, and without sentences that give it away, unless it is shown. */
export interface StudentMark {
  readonly start: number;
  readonly end: number;
  readonly verdict: Verdict;
  readonly points: number;
  readonly maxPoints: number;
  /** Which parts are right, when only some are. */
  readonly rightParts: readonly Part[];
  readonly reasons: readonly string[];
  readonly remark: string | null;
  readonly answer: readonly Piece[];
  /** The key's label and its alternatives; null while the key is not shown. */
  readonly keyed: readonly Framed[] | null;
}

export function feedbackOf(mark: Mark, key: KeyReading | null): StudentMark {
  const { proposed, overridden, verdict, points, maxPoints, remark, startTick, endTick } = mark;
  const label = key?.labels.find((one) => one.start === startTick);
  // A person decided otherwise: the program's reasons no longer explain the verdict.
  const stands = !overridden || verdict === proposed.verdict;
  return {
    start: startTick,
    end: endTick,
    verdict,
    points,
    maxPoints,
    rightParts: stands ? proposed.parts.filter((part) => part.credit === 1).map((part) => part.part) : [],
    reasons: stands ? proposed.reasons.filter((reason) => key !== null || !reason.namesKey).map((reason) => reason.text) : [],
    remark,
    answer: proposed.answer,
    keyed: label?.numeral ? [{ key: label.key, numeral: label.numeral }, ...label.alternatives] : null,
  };
}
