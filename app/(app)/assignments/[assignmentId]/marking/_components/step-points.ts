import { tidy } from '@/lib/marking/points';

/** One step up or down, within nought and full marks. */
export function stepPoints(points: number, direction: 1 | -1, step: number, maxPoints: number): number {
  return tidy(Math.min(maxPoints, Math.max(0, points + direction * step)));
}
