import { type Result, ok } from '../result';
import type { Triad } from './chord';
import type { ConventionSheet } from './conventions';
import { degreeOfSigns } from './diatonic';
import type { Degree, Mode } from './key';
import { FARTHEST_ALTER } from './numeral';
import { STOPPED } from './numeral-messages';
import { type NumeralError, type Roman, stopAt } from './numeral-scan';

/** Where a numeral is read: its text, for error messages; the mode of the key it stands in; the course's sheet. */
export interface Frame {
  readonly text: string;
  readonly mode: Mode;
  readonly sheet: ConventionSheet;
}

export type Read<T> = Result<T, NumeralError>;
export type Stop = Extract<Read<never>, { ok: false }>;

/** The degree a numeral stands on; `triad` says whether it is small (minor, diminished) or capital. */
export function readDegree(roman: Roman, triad: Triad, { text, mode, sheet }: Frame): Read<Degree> {
  const degree = degreeOfSigns(mode, roman.step, roman.signs, triad, sheet.accidentals);
  if (!degree) return stopAt(text, roman.at, STOPPED.natural);
  return Math.abs(degree.alter) <= FARTHEST_ALTER ? ok(degree) : stopAt(text, roman.at, STOPPED.altered);
}
