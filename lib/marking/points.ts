/**
 * Credit (0–1) as points, in whole steps of the rubric. To the nearest step, but what is not wholly right never rounds
 * up to full marks, and rounding is never below nought.
 */
export function pointsOf(credit: number, maxPoints: number, step: number): number {
  if (credit >= 1) return maxPoints;
  const nearest = Math.round((credit * maxPoints) / step) * step;
  const belowFull = Math.max(0, Math.ceil(maxPoints / step - 1e-9) - 1) * step;
  return tidy(Math.min(nearest, belowFull));
}

/** Sums of halves and thirds without the dust of floating point. */
export function tidy(points: number): number {
  return Math.round(points * 1000) / 1000;
}

/** `3`, `2.5`: as few digits as say it. */
export function formatPoints(points: number): string {
  return String(Math.round(points * 100) / 100);
}

export interface Sum {
  readonly points: number;
  readonly maxPoints: number;
}

export function sumPoints(marks: readonly Sum[]): Sum {
  return {
    points: tidy(marks.reduce((sum, mark) => sum + mark.points, 0)),
    maxPoints: tidy(marks.reduce((sum, mark) => sum + mark.maxPoints, 0)),
  };
}
