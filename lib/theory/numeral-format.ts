import { type Quality, type Triad, figuresOf, isAugmentedSixth, seventhOf, sizeOf, triadOf } from './chord';
import { type ConventionSheet, DEFAULT_CONVENTIONS, looksCadential } from './conventions';
import { type Signs, isDiatonicHalfDiminished, plainNinth, plainSeventh, plainTriad, signsOf } from './diatonic';
import type { Degree, Mode } from './key';
import { type Numeral, type Special, type Target, isNeapolitan } from './numeral';
import { ROMANS } from './numeral-scan';

/**
 * A numeral taken apart for print, before any typesetting: `♭`, `VI`, `+`, `maj`, 6 5, `add6`. Text and typesetting both
 * come from these pieces, so that they cannot disagree.
 */
export interface NumeralPieces {
  readonly signs: Signs;
  /** `vii`, `N`, `Ger`, `CT`, `Cad`, `Ped`. */
  readonly letters: string;
  readonly isName: boolean;
  readonly mark: '' | '°' | 'ø' | '+' | '?' | 'M' | 'm';
  /** The held degree of a pedal that is not the tonic's: `V`, `♭VI`. */
  readonly held: string;
  /** Names a seventh that is not the key's own. */
  readonly seventh: '' | 'maj' | 'dom' | 'min';
  /** Top first; an altered ninth carries its sign: `♭9`. */
  readonly figures: readonly string[];
  readonly notes: readonly string[];
}

const PLAIN = { signs: 0, isName: false, mark: '', held: '', seventh: '', figures: [], notes: [] } as const;

/** The pieces of the chord itself, without its targets. `mode` is that of the local key. */
export function piecesOf(numeral: Numeral, mode: Mode, sheet: ConventionSheet): NumeralPieces {
  const frame = numeral.applied[0]?.mode ?? mode;
  const figures = figuresOf(numeral.quality, numeral.inversion);
  if (numeral.special === 'pedal-tone') return pedalPieces(numeral, frame, sheet);
  if (numeral.special === 'common-tone') return { ...PLAIN, letters: 'CT', isName: true, mark: '°', figures };
  if (numeral.special === 'cadential-six-four') return cadentialPieces(numeral, frame, sheet);
  if (isAugmentedSixth(numeral.quality)) return augmentedSixthPieces(numeral, sheet);
  if (isNeapolitan(numeral) && sheet.neapolitan === 'N') {
    return { ...PLAIN, letters: 'N', isName: true, figures, notes: notesOf(numeral, frame, sheet) };
  }
  return romanPieces(numeral, frame, sheet);
}

function pedalPieces({ degree }: Numeral, mode: Mode, sheet: ConventionSheet): NumeralPieces {
  const onTonic = degree.step === 1 && degree.alter === 0;
  const held = onTonic ? '' : `${formatSigns(signsOf(mode, degree, 'major', sheet.accidentals))}${ROMANS[degree.step - 1] as string}`;
  return { ...PLAIN, letters: 'Ped', isName: true, held };
}

function cadentialPieces(numeral: Numeral, mode: Mode, sheet: ConventionSheet): NumeralPieces {
  const asTonic = { ...numeral, special: null };
  if (sheet.cadential === 'tonic') return { ...romanPieces(asTonic, mode, sheet), notes: [] };
  const borrowed = numeral.quality === mode ? [] : [numeral.quality === 'minor' ? 'min' : 'maj'];
  const named = sheet.cadential === 'named';
  return { ...PLAIN, letters: named ? 'Cad' : 'V', isName: named, figures: ['6', '4'], notes: borrowed };
}

const AUGMENTED_SIXTH_NAMES: Readonly<Partial<Record<Quality, { name: string; usual: number }>>> = {
  'augmented-sixth-italian': { name: 'It', usual: 1 },
  'augmented-sixth-german': { name: 'Ger', usual: 1 },
  'augmented-sixth-french': { name: 'Fr', usual: 2 },
  'augmented-sixth-swiss': { name: 'Sw', usual: 2 },
};

function augmentedSixthPieces({ quality, inversion }: Numeral, sheet: ConventionSheet): NumeralPieces {
  const { name = '', usual } = AUGMENTED_SIXTH_NAMES[quality] ?? {};
  const plusSix = sheet.augmentedSixths === 'plus-six' && inversion === usual;
  const figures = figuresOf(quality, inversion);
  if (plusSix) return { ...PLAIN, letters: name, isName: true, mark: '+', figures: ['6'] };
  return { ...PLAIN, letters: name, isName: true, figures: figures.length > 0 ? figures : ['5', '3'] };
}

function romanPieces(numeral: Numeral, mode: Mode, sheet: ConventionSheet): NumeralPieces {
  const { degree, quality } = numeral;
  const triad = triadOf(quality) ?? 'major';
  return {
    signs: signsOf(mode, degree, triad, sheet.accidentals),
    letters: casedLetters(degree, triad, sheet),
    isName: false,
    mark: quality === 'other' ? '?' : markOf(numeral, triad, mode, sheet),
    held: '',
    seventh: seventhWordOf(numeral, triad, mode, sheet),
    figures: figuresWithNinth(numeral, mode),
    notes: notesOf(numeral, mode, sheet),
  };
}

function casedLetters({ step }: Degree, triad: Triad, sheet: ConventionSheet): string {
  const letters = ROMANS[step - 1] as string;
  const small = sheet.case === 'by-quality' && (triad === 'minor' || triad === 'diminished');
  return small ? letters.toLowerCase() : letters;
}

function markOf({ degree, quality }: Numeral, triad: Triad, mode: Mode, sheet: ConventionSheet): NumeralPieces['mark'] {
  if (quality === 'half-diminished-seventh') return isPlainHalfDiminished(degree, mode, sheet) ? '' : 'ø';
  if (triad === 'diminished') return '°';
  if (triad === 'augmented') return '+';
  return sheet.case === 'all-capitals' ? capitalMark(degree, triad, mode, sheet) : '';
}

/** Capitals leave out M and m where the bare numeral is read as this very triad. */
function capitalMark(degree: Degree, triad: 'major' | 'minor', mode: Mode, sheet: ConventionSheet): NumeralPieces['mark'] {
  if (isBareCapital(degree, triad, mode, sheet)) return '';
  return triad === 'major' ? 'M' : 'm';
}

function isBareCapital(degree: Degree, triad: Triad, mode: Mode, { accidentals }: ConventionSheet): boolean {
  const sameSigns = signsOf(mode, degree, triad, accidentals) === signsOf(mode, degree, 'major', accidentals);
  return sameSigns && plainTriad(mode, degree) === triad;
}

function isPlainHalfDiminished(degree: Degree, mode: Mode, sheet: ConventionSheet): boolean {
  if (sheet.halfDiminished !== 'plain' || !isDiatonicHalfDiminished(mode, degree)) return false;
  return sheet.case === 'by-quality' || isBareCapital(degree, 'diminished', mode, sheet);
}

/** '' when an unmarked figure already means this seventh. */
function seventhWordOf({ degree, quality }: Numeral, triad: Triad, mode: Mode, sheet: ConventionSheet): NumeralPieces['seventh'] {
  const seventh = seventhOf(quality);
  if (!seventh || triad === 'diminished') return '';
  const looksHalfDiminished = triad === 'minor' && sheet.case === 'by-quality' && isPlainHalfDiminished(degree, mode, sheet);
  if (!looksHalfDiminished && plainSeventh(mode, degree, triad) === seventh) return '';
  if (seventh === 'major') return 'maj';
  return triad === 'minor' ? 'min' : 'dom';
}

function figuresWithNinth({ degree, quality, inversion }: Numeral, mode: Mode): readonly string[] {
  const sign = ninthSign(quality, degree, mode);
  return sign && inversion === 0 ? [`${sign}9`] : figuresOf(quality, inversion);
}

function ninthSign(quality: Quality, degree: Degree, mode: Mode): '' | '♭' | '♮' {
  if (sizeOf(quality) !== 5) return '';
  const ninth = quality === 'dominant-ninth' ? 'major' : 'minor';
  if (ninth === plainNinth(mode, degree)) return '';
  return ninth === 'minor' ? '♭' : '♮';
}

const SIX_FOUR_WORDS: Readonly<Partial<Record<Special, string>>> = {
  'passing-six-four': 'pass',
  'pedal-six-four': 'ped',
  'arpeggiated-six-four': 'arp',
};

function notesOf(numeral: Numeral, mode: Mode, sheet: ConventionSheet): string[] {
  const sign = numeral.inversion > 0 ? ninthSign(numeral.quality, numeral.degree, mode) : '';
  const word = (numeral.special && SIX_FOUR_WORDS[numeral.special]) ?? (looksCadential(numeral, sheet) ? 'plain' : '');
  return [...(sign ? [`${sign}9`] : []), ...(word ? [word] : []), ...numeral.added];
}

export function formatSigns(signs: Signs): string {
  if (signs === 'natural') return '♮';
  return signs < 0 ? '♭'.repeat(-signs) : '♯'.repeat(signs);
}

/** The pieces of a target, read in a key of `mode`. */
export function targetPieces({ degree, mode: targetMode }: Target, mode: Mode, sheet: ConventionSheet): NumeralPieces {
  const isLoweredSecond = degree.step === 2 && degree.alter === -1 && targetMode === 'major';
  if (isLoweredSecond && sheet.neapolitan === 'N') return { ...PLAIN, letters: 'N', isName: true };
  return {
    ...PLAIN,
    signs: signsOf(mode, degree, targetMode, sheet.accidentals),
    letters: casedLetters(degree, targetMode, sheet),
    mark: sheet.case === 'all-capitals' ? capitalMark(degree, targetMode, mode, sheet) : '',
  };
}

/** The mode in which each target of the chain is read: that of the next one, and at the end the local key's. */
export function modesOfChain(applied: readonly Target[], mode: Mode): Mode[] {
  return applied.map((_, index) => applied[index + 1]?.mode ?? mode);
}

/**
 * Canonical text of a numeral in a key of `mode`, as the sheet prints it on one line: `V65/V`, `♭VI`, `viiø7`,
 * `Cad64`, `I(add6)`. `parseNumeral` with the same mode and sheet gives the numeral back.
 */
export function formatNumeral(numeral: Numeral, mode: Mode, sheet: ConventionSheet = DEFAULT_CONVENTIONS): string {
  const modes = modesOfChain(numeral.applied, mode);
  const targets = numeral.applied.map((target, index) => formatPieces(targetPieces(target, modes[index] ?? mode, sheet), sheet));
  const joint = sheet.applied === 'of' ? ' of ' : '/';
  return [formatPieces(piecesOf(numeral, mode, sheet), sheet), ...targets].join(joint);
}

function formatPieces(pieces: NumeralPieces, sheet: ConventionSheet): string {
  const { signs, letters, mark, held, seventh, figures, notes } = pieces;
  const figured = figures.join(sheet.figures === 'slashed' ? '/' : '');
  const noted = notes.length > 0 ? `(${notes.join(',')})` : '';
  return `${formatSigns(signs)}${letters}${mark}${held && ` ${held}`}${seventh}${figured}${noted}`;
}

const PLAIN_SIGNS: Readonly<Record<string, string>> = { '♭': 'b', '♯': '#', '♮': 'n', '°': 'o', ø: '0' };

/** The same text on a plain keyboard: `viio7/V`, `vii07`, `bVI`. `parseNumeral` with the same sheet reads it as well. */
export function formatNumeralPlain(numeral: Numeral, mode: Mode, sheet: ConventionSheet = DEFAULT_CONVENTIONS): string {
  return formatNumeral(numeral, mode, sheet).replaceAll(/[♭♯♮°ø]/gu, (sign) => PLAIN_SIGNS[sign] ?? sign);
}

