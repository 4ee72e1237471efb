import { type Result, ok } from '../result';
import { FIGURE_FORMS, type FigureForm, type SeventhSize } from './chord';
import { STOPPED, saysNoFigures } from './numeral-messages';
import { type Figure, type NumeralError, stopAt } from './numeral-scan';

export interface ReadFigures extends FigureForm {
  /** A seventh that the figures alter: ♭7, ♯7. */
  readonly seventh: SeventhSize | null;
  /** A ninth that they alter: ♭9, ♮9. */
  readonly ninth: 'major' | 'minor' | null;
}

const TRIAD_IN_ROOT_POSITION: ReadFigures = { size: 3, inversion: 0, seventh: null, ninth: null };

/** What typed figures say; no figures are those of a triad in root position. */
export function readFigures(figures: readonly Figure[], text: string): Result<ReadFigures, NumeralError> {
  const digits = figures.map((figure) => figure.digit).join('');
  if (digits === '') return ok(TRIAD_IN_ROOT_POSITION);
  const form = FIGURE_FORMS[digits];
  if (!form) return stopAt(text, figures[longestFigures(digits)]?.at ?? text.length, saysNoFigures(digits));
  const wrong = figures.find((figure) => !isReadableSign(figure, digits));
  if (wrong) return stopAt(text, wrong.at, STOPPED.figureSign);
  return ok({ ...form, seventh: alteredSeventh(figures), ninth: alteredNinth(figures) });
}

export function digitsOf(figures: readonly Figure[]): string {
  return figures.map((figure) => figure.digit).join('');
}

/** How many of the digits still begin some form: where reading stopped. */
function longestFigures(digits: string): number {
  const forms = Object.keys(FIGURE_FORMS);
  let length = digits.length;
  while (length > 0 && !forms.some((form) => form.startsWith(digits.slice(0, length)))) length -= 1;
  return length;
}

/** Signs are read on the 7 and the 9 of root positions: elsewhere they alter another member of the chord. */
function isReadableSign({ sign, digit }: Figure, digits: string): boolean {
  if (sign === '') return true;
  if (digit === '9') return true;
  return digit === '7' && sign !== 'natural' && ['7', '79', '97'].includes(digits);
}

function alteredSeventh(figures: readonly Figure[]): SeventhSize | null {
  const sign = figures.find((figure) => figure.digit === '7')?.sign;
  if (sign === 'flat') return 'minor';
  return sign === 'sharp' ? 'major' : null;
}

function alteredNinth(figures: readonly Figure[]): 'major' | 'minor' | null {
  const sign = figures.find((figure) => figure.digit === '9')?.sign;
  if (!sign) return null;
  return sign === 'flat' ? 'minor' : 'major';
}
