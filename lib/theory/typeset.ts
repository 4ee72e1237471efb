import { fullFiguresOf } from './chord';
import { type ConventionSheet, DEFAULT_CONVENTIONS } from './conventions';
import type { Mode } from './key';
import type { Numeral } from './numeral';
import { type NumeralPieces, formatNumeral, formatSigns, modesOfChain, piecesOf, targetPieces } from './numeral-format';
import { speakPieces } from './spoken';

/** A numeral as pieces to set in type, left to right in the order of the fields. Letters keep their case. */
export interface NumeralParts {
  /** '', '♭', '♭♭', '♯' or '♮' before the letters. */
  readonly accidental: string;
  /** `vii`, `V`; the names `N`, `It`, `Ger`, `CT`, `Cad`, `Ped V`; '' where only figures follow on from the label before. */
  readonly letters: string;
  /** A name is set as text, a numeral in the numeral face. */
  readonly isName: boolean;
  /** '', '°', 'ø', '+', '?', 'M' or 'm', raised after the letters. */
  readonly mark: string;
  /** '', 'maj', 'dom' or 'min': small, before the figures. */
  readonly seventh: string;
  /** Top first; an altered ninth carries its sign (`♭9`). Stacked, or on one line with slashes, as `figureStyle` says. */
  readonly figures: readonly string[];
  readonly figureStyle: ConventionSheet['figures'];
  /** Small words after the figures: `add6`, `sus4`, `pass`. */
  readonly notes: readonly string[];
  /** Draw a dash from these figures to those of the next label (V6/4–5/3). */
  readonly runsOn: boolean;
  /** What stands between the chord and each target; null where there is none. */
  readonly joint: '/' | 'of' | null;
  /** Targets, nearest first; their own `applied` is empty. */
  readonly applied: readonly NumeralParts[];
  /** The same on one line, for copying and for plain text: `formatNumeral`'s, which can be read again. */
  readonly text: string;
  /** The same in words, for a screen reader. */
  readonly spoken: string;
}

/** The pieces of a numeral in a key of `mode`, as the sheet prints it. */
export function typesetNumeral(numeral: Numeral, mode: Mode, sheet: ConventionSheet = DEFAULT_CONVENTIONS): NumeralParts {
  const pieces = piecesOf(numeral, mode, sheet);
  const modes = modesOfChain(numeral.applied, mode);
  const targets = numeral.applied.map((target, index) => targetPieces(target, modes[index] ?? mode, sheet));
  const runsOn = numeral.special === 'cadential-six-four' && sheet.cadential === 'dominant';
  return {
    ...partsOf(pieces, sheet),
    // In print the common-tone chord is CT°7 whatever its bass (Integrated Musicianship: Theory, ch. 18b).
    ...(numeral.special === 'common-tone' ? { figures: ['7'] } : {}),
    runsOn,
    joint: targets.length === 0 ? null : sheet.applied === 'of' ? 'of' : '/',
    applied: targets.map((target) => partsOf(target, sheet)),
    text: formatNumeral(numeral, mode, sheet),
    spoken: [pieces, ...targets].map(speakPieces).join(' of '),
  };
}

function partsOf(pieces: NumeralPieces, sheet: ConventionSheet): NumeralParts {
  const { signs, isName, mark, held, seventh, figures, notes } = pieces;
  const letters = [pieces.letters, held].filter(Boolean).join(' ');
  const accidental = formatSigns(signs);
  return {
    accidental,
    letters,
    isName,
    mark,
    seventh,
    figures,
    figureStyle: sheet.figures,
    notes,
    runsOn: false,
    joint: null,
    applied: [],
    text: `${accidental}${letters}${mark}`,
    spoken: speakPieces(pieces),
  };
}

/**
 * A label in its place after another: where the sheet prints the cadential six-four as V6/4 and the dominant follows in
 * root position, the dominant shows only the figures in which the six-four resolves, 5/3 or 7/5/3.
 */
export function typesetAfter(
  previous: Numeral | null,
  numeral: Numeral,
  mode: Mode,
  sheet: ConventionSheet = DEFAULT_CONVENTIONS,
): NumeralParts {
  const parts = typesetNumeral(numeral, mode, sheet);
  if (sheet.cadential !== 'dominant' || !previous || !resolvesSixFour(previous, numeral)) return parts;
  return { ...parts, letters: '', figures: fullFiguresOf(numeral.quality, 0), joint: null, applied: [] };
}

function resolvesSixFour(previous: Numeral, numeral: Numeral): boolean {
  const isDominant = numeral.degree.step === 5 && numeral.degree.alter === 0 && numeral.inversion === 0;
  const isPlain = numeral.quality === 'major' || numeral.quality === 'dominant-seventh';
  const sameTargets = JSON.stringify(previous.applied) === JSON.stringify(numeral.applied);
  return previous.special === 'cadential-six-four' && isDominant && isPlain && numeral.added.length === 0 && sameTargets;
}
