import { type Result, err, ok } from '../result';
import type { Signs } from './diatonic';
import type { AddedTone } from './numeral';
import { STEPS, type Step } from './key';
import { STOPPED, saysMixedCase, saysNoNumeral } from './numeral-messages';

/**
 * First pass of reading a typed numeral: its tokens with their places, nothing understood yet. A numeral is a head, then
 * any number of targets after `/` or `of`. A slash before a figure belongs to the figures (`V6/5`), before a numeral it
 * points at a target (`V6/V`).
 */

/** `offset` is 0-based in the text as typed; `message` is for people and counts characters from 1. */
export interface NumeralError {
  readonly offset: number;
  readonly message: string;
}

export type ChordMark = 'diminished' | 'half-diminished' | 'augmented' | 'unstated' | 'capital-major' | 'capital-minor';
export type ChordName = 'It' | 'Fr' | 'Ger' | 'Sw' | 'N' | 'CT' | 'Cad' | 'Ped';
export type SixFourWord = 'pass' | 'ped' | 'arp' | 'plain';
export type Note =
  | { readonly kind: 'added'; readonly tone: AddedTone }
  | { readonly kind: 'six-four'; readonly word: SixFourWord }
  | { readonly kind: 'mode'; readonly mode: 'major' | 'minor' }
  | { readonly kind: 'ninth'; readonly ninth: 'major' | 'minor' };

export interface Token<T> {
  readonly value: T;
  readonly at: number;
}

export type FigureSign = '' | 'flat' | 'sharp' | 'natural';
export interface Figure {
  readonly sign: FigureSign;
  readonly digit: string;
  readonly at: number;
}

export interface Roman {
  readonly at: number;
  readonly signs: Signs;
  readonly step: Step;
  readonly capital: boolean;
}

/** What may follow the name of a chord, in this order. */
interface Tail {
  readonly mark: Token<ChordMark> | null;
  readonly seventh: Token<'major' | 'minor'> | null;
  readonly figures: readonly Figure[];
  readonly notes: readonly Token<Note>[];
}

export interface RomanHead extends Tail {
  readonly form: 'roman';
  readonly roman: Roman;
}

export interface NamedHead extends Tail {
  readonly form: 'named';
  readonly name: Token<ChordName>;
  /** The held degree of a pedal, when one is typed. */
  readonly held: Roman | null;
}

/** A target; `mark` where capitals throughout need M or m to tell the mode. */
export type TargetHead =
  | (Roman & { readonly mark: 'capital-major' | 'capital-minor' | null })
  | { readonly at: number; readonly neapolitan: true };

export interface ScannedNumeral {
  readonly head: RomanHead | NamedHead;
  /** Nearest first, as typed. */
  readonly targets: readonly TargetHead[];
}

/** A place in the text and the one way to move it: `take` a pattern, which must be sticky (flag y), or stay. */
export class Reader {
  at = 0;
  constructor(readonly text: string) {}

  take(pattern: RegExp): RegExpExecArray | null {
    pattern.lastIndex = this.at;
    const match = pattern.exec(this.text);
    if (match) this.at += match[0].length;
    return match;
  }

  skipSpace(): void {
    this.take(/\s*/y);
  }

  get atEnd(): boolean {
    return this.at >= this.text.length;
  }
}

/** An error that names the place and the character it stopped at. */
export function stopAt(text: string, offset: number, why: string): { ok: false; error: NumeralError } {
  const character = text.slice(offset, offset + 2).match(/^./u)?.[0];
  const place = character ? `Stopped at “${character}” (character ${offset + 1})` : `Stopped at the end (after character ${offset})`;
  return err({ offset, message: `${place}: ${why}` });
}

export function scanNumeral(text: string): Result<ScannedNumeral, NumeralError> {
  const reader = new Reader(text);
  reader.skipSpace();
  if (reader.atEnd) return err({ offset: 0, message: 'Nothing is typed. A numeral is expected, such as V7, ii65 or vii°7/V.' });
  const head = scanHead(reader);
  if (!head.ok) return head;
  const targets = scanTargets(reader);
  return targets.ok ? ok({ head: head.value, targets: targets.value }) : targets;
}

const NAMES: readonly (readonly [RegExp, ChordName])[] = [
  [/It(?:alian)?/iy, 'It'],
  [/Fr(?:ench)?/iy, 'Fr'],
  [/G(?:erman|er|r)/iy, 'Ger'],
  [/Sw(?:iss)?/iy, 'Sw'],
  [/N(?:eapolitan)?/y, 'N'],
  [/CT/iy, 'CT'],
  [/Cad\.?/iy, 'Cad'],
  [/Ped(?:al)?\.?/iy, 'Ped'],
];

function scanHead(reader: Reader): Result<RomanHead | NamedHead, NumeralError> {
  const at = reader.at;
  for (const [pattern, name] of NAMES) {
    if (reader.take(pattern)) return scanNamed(reader, { value: name, at });
  }
  const roman = scanRoman(reader, STOPPED.beforeNumeral);
  if (!roman.ok) return roman;
  const tail = scanTail(reader);
  return tail.ok ? ok({ form: 'roman', roman: roman.value, ...tail.value }) : tail;
}

function scanNamed(reader: Reader, name: Token<ChordName>): Result<NamedHead, NumeralError> {
  let held: Roman | null = null;
  reader.skipSpace();
  if (name.value === 'Ped' && !reader.atEnd) {
    const roman = scanRoman(reader, STOPPED.beforeHeld);
    if (!roman.ok) return roman;
    held = roman.value;
  }
  const tail = scanTail(reader);
  return tail.ok ? ok({ form: 'named', name, held, ...tail.value }) : tail;
}

function scanRoman(reader: Reader, expected: string): Result<Roman, NumeralError> {
  const at = reader.at;
  const signs = signsOfText(reader.take(/♮|n(?=\s*[ivIV])|(?:♭|𝄫|b)+(?=\s*[♭𝄫ivIV])|(?:♯|𝄪|#)+/uy)?.[0] ?? '');
  reader.skipSpace();
  const letters = reader.take(/[ivIV]+/y)?.[0];
  const start = reader.at - (letters?.length ?? 0);
  if (!letters) return stopAt(reader.text, reader.at, expected);
  const step = STEPS[ROMANS.findIndex((roman) => roman === letters.toUpperCase())];
  if (!step) return stopAt(reader.text, start + longestRoman(letters), saysNoNumeral(letters));
  const mixed = /^(?:[IV]+[iv]|[iv]+[IV])/.exec(letters)?.[0];
  if (mixed) return stopAt(reader.text, start + mixed.length - 1, saysMixedCase(letters));
  return ok({ at, signs, step, capital: letters === letters.toUpperCase() });
}

export const ROMANS = ['I', 'II', 'III', 'IV', 'V', 'VI', 'VII'] as const;

function longestRoman(letters: string): number {
  let length = letters.length;
  while (length > 0 && !ROMANS.some((r) => r === letters.slice(0, length).toUpperCase())) length -= 1;
  return length;
}

function signsOfText(text: string): Signs {
  if (text === '♮' || text === 'n') return 'natural';
  return [...text].reduce((sum, s) => sum + (s === '𝄪' ? 2 : s === '𝄫' ? -2 : s === '#' || s === '♯' ? 1 : -1), 0);
}

function scanTail(reader: Reader): Result<Tail, NumeralError> {
  const mark = scanMark(reader);
  const seventh = scanSeventhWord(reader);
  const figures = scanFigures(reader);
  const notes = scanNotes(reader);
  return notes.ok ? ok({ mark, seventh, figures, notes: notes.value }) : notes;
}

const MARKS: readonly (readonly [RegExp, ChordMark])[] = [
  [/ø|Ø|0|half-?\s?dim(?:inished)?/iy, 'half-diminished'],
  [/°|º|˚|dim(?:inished)?|o(?!f)/y, 'diminished'],
  [/\+|aug(?:mented)?/y, 'augmented'],
  [/\?/y, 'unstated'],
  [/M(?!\s*aj)/y, 'capital-major'],
  [/m(?!\s*aj|\s*in)/y, 'capital-minor'],
];

function scanMark(reader: Reader): Token<ChordMark> | null {
  return takeFirst(reader, MARKS);
}

const SEVENTH_WORDS: readonly (readonly [RegExp, 'major' | 'minor'])[] = [
  [/maj|M/y, 'major'],
  [/dom|min/y, 'minor'],
];

function scanSeventhWord(reader: Reader): Token<'major' | 'minor'> | null {
  return takeFirst(reader, SEVENTH_WORDS);
}

function takeFirst<T>(reader: Reader, choices: readonly (readonly [RegExp, T])[]): Token<T> | null {
  const before = reader.at;
  reader.skipSpace();
  const at = reader.at;
  for (const [pattern, value] of choices) {
    if (reader.take(pattern)) return { value, at };
  }
  reader.at = before;
  return null;
}

const FIGURE_SIGNS: Readonly<Record<string, FigureSign>> = {
  '♭': 'flat',
  b: 'flat',
  '♯': 'sharp',
  '#': 'sharp',
  '♮': 'natural',
  n: 'natural',
};

/** Small figures pasted from a text are read like full-sized ones. */
const SMALL_DIGITS: Readonly<Record<string, string>> = Object.fromEntries(
  [...'⁰¹²³⁴⁵⁶⁷⁸⁹'].concat([...'₀₁₂₃₄₅₆₇₈₉']).map((digit, i) => [digit, String(i % 10)]),
);
const FIGURE = /([♭♯♮b#n]?)([\d⁰¹²³⁴-⁹₀-₉])/uy;
const BEFORE_FIRST = /\s*(?=[♭♯♮b#n]?[\d⁰¹²³⁴-⁹₀-₉])/uy;
const BETWEEN = /\s*[/\-–]?\s*(?=[♭♯♮b#n]?[\d⁰¹²³⁴-⁹₀-₉])/uy;

/** Figures with or without a slash, a dash or a space between them. */
function scanFigures(reader: Reader): Figure[] {
  const figures: Figure[] = [];
  while (reader.take(figures.length > 0 ? BETWEEN : BEFORE_FIRST)) {
    const at = reader.at;
    const [, sign = '', digit = ''] = reader.take(FIGURE) ?? [];
    figures.push({ sign: FIGURE_SIGNS[sign] ?? '', digit: SMALL_DIGITS[digit] ?? digit, at });
  }
  return figures;
}

const NOTES: readonly (readonly [RegExp, Note])[] = [
  [/sus\s?2/y, { kind: 'added', tone: 'sus2' }],
  [/sus\s?4/y, { kind: 'added', tone: 'sus4' }],
  [/add\s?4/y, { kind: 'added', tone: 'add4' }],
  [/add\s?6/y, { kind: 'added', tone: 'add6' }],
  [/add\s?9/y, { kind: 'added', tone: 'add9' }],
];

const BRACKETED_NOTES: readonly (readonly [RegExp, Note])[] = [
  ...NOTES,
  [/pass(?:ing)?/y, { kind: 'six-four', word: 'pass' }],
  [/ped(?:al)?/y, { kind: 'six-four', word: 'ped' }],
  [/arp(?:eggiated)?/y, { kind: 'six-four', word: 'arp' }],
  [/plain/y, { kind: 'six-four', word: 'plain' }],
  [/maj(?:or)?/y, { kind: 'mode', mode: 'major' }],
  [/min(?:or)?/y, { kind: 'mode', mode: 'minor' }],
  [/[♭b]9/uy, { kind: 'ninth', ninth: 'minor' }],
  [/[♮n]9/uy, { kind: 'ninth', ninth: 'major' }],
];

function scanNotes(reader: Reader): Result<Token<Note>[], NumeralError> {
  const notes: Token<Note>[] = [];
  for (;;) {
    const bare = takeFirst(reader, NOTES);
    if (bare) notes.push(bare);
    else if (reader.take(/\s*[([]/y)) {
      const inside = scanBracket(reader);
      if (!inside.ok) return inside;
      notes.push(...inside.value);
    } else return ok(notes);
  }
}

function scanBracket(reader: Reader): Result<Token<Note>[], NumeralError> {
  const notes: Token<Note>[] = [];
  do {
    const note = takeFirst(reader, BRACKETED_NOTES);
    if (!note) return stopAt(reader.text, reader.at, STOPPED.inBrackets);
    notes.push(note);
  } while (reader.take(/\s*,/y));
  if (reader.take(/\s*[)\]]/y)) return ok(notes);
  return stopAt(reader.text, reader.at, STOPPED.openBracket);
}

function scanTargets(reader: Reader): Result<TargetHead[], NumeralError> {
  const targets: TargetHead[] = [];
  for (;;) {
    reader.skipSpace();
    if (reader.atEnd) return ok(targets);
    if (!reader.take(/\/|of(?![a-z])/y)) return stopAt(reader.text, reader.at, expectedAfter(reader.text, reader.at, targets.length > 0));
    const target = scanTarget(reader);
    if (!target.ok) return target;
    targets.push(target.value);
  }
}

function scanTarget(reader: Reader): Result<TargetHead, NumeralError> {
  reader.skipSpace();
  const at = reader.at;
  if (reader.take(/N/y)) return ok({ at, neapolitan: true });
  const roman = scanRoman(reader, STOPPED.beforeTarget);
  return roman.ok ? ok({ ...roman.value, mark: scanTargetMark(reader) }) : roman;
}

function scanTargetMark(reader: Reader): 'capital-major' | 'capital-minor' | null {
  const mark = reader.take(/[Mm]/y)?.[0];
  if (!mark) return null;
  return mark === 'M' ? 'capital-major' : 'capital-minor';
}

function expectedAfter(text: string, at: number, inTarget: boolean): string {
  const rest = text.slice(at);
  if (inTarget && /^(?:[°º˚oøØ0]|dim)/.test(rest)) return STOPPED.targetDiminished;
  if (inTarget && /^\+/.test(rest)) return STOPPED.targetAugmented;
  if (inTarget && /^\d/.test(rest)) return STOPPED.targetFigures;
  if (inTarget) return STOPPED.afterTarget;
  return /^(?:[°º˚øØ+]|o(?![a-z]))/.test(rest) ? STOPPED.lateMark : STOPPED.afterChord;
}
