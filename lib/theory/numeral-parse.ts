import { type Result, ok } from '../result';
import { FIGURE_FORMS, type FigureForm, type Quality, type SeventhSize, type Triad, sizeOf } from './chord';
import { type ConventionSheet, DEFAULT_CONVENTIONS, looksCadential } from './conventions';
import { degreeOfSigns, getSeventhChord, isDiatonicHalfDiminished, plainNinth, plainSeventh, plainTriad } from './diatonic';
import type { Degree, Mode } from './key';
import { ADDED_TONES, type AddedTone, type Numeral, type Special, type Target, findAddedConflict, isNeapolitan } from './numeral';
import {
  type NamedHead,
  type Note,
  type NumeralError,
  type Roman,
  type RomanHead,
  type ScannedNumeral,
  type SixFourWord,
  type TargetHead,
  type Token,
  scanNumeral,
  stopAt,
} from './numeral-scan';

export type { NumeralError } from './numeral-scan';

/** Where a numeral is read: the text for error messages, the mode of the key it stands in, the course's sheet. */
interface Frame {
  readonly text: string;
  readonly mode: Mode;
  readonly sheet: ConventionSheet;
}

type Read<T> = Result<T, NumeralError>;
type Inversion = Numeral['inversion'];

/**
 * Reads a typed numeral in a key of this mode, as the sheet spells labels. Every printed form is read under every sheet
 * (`V7/V` and `V7 of V`, `6/5` and `65`, `N6` and `♭II6`); the sheet decides only what could mean two things:
 * V64 or I64 for the cadential six-four, capitals, accidentals, an unmarked vii7. The error carries the 0-based offset
 * where reading stopped and a sentence that says why.
 */
export function parseNumeral(text: string, mode: Mode, sheet: ConventionSheet = DEFAULT_CONVENTIONS): Read<Numeral> {
  const scanned = scanNumeral(text);
  if (!scanned.ok) return scanned;
  const applied = readTargets(scanned.value, { text, mode, sheet });
  if (!applied.ok) return applied;
  const frame: Frame = { text, mode: applied.value[0]?.mode ?? mode, sheet };
  const { head } = scanned.value;
  const numeral = head.form === 'roman' ? readRomanHead(head, frame) : readNamedHead(head, frame);
  if (!numeral.ok) return numeral;
  if (numeral.value.special === 'pedal-tone' && applied.value.length > 0) {
    return stopAt(text, text.search(/\/|of/), 'a pedal is a held tone of the key itself and takes no target.');
  }
  return ok({ ...numeral.value, applied: applied.value });
}

/** Targets are understood from the last one back: each is a degree of the key of the one after it. */
function readTargets({ targets }: ScannedNumeral, frame: Frame): Read<Target[]> {
  const chain: Target[] = [];
  let mode = frame.mode;
  for (const head of targets.toReversed()) {
    const target = readTarget(head, { ...frame, mode });
    if (!target.ok) return target;
    chain.unshift(target.value);
    mode = target.value.mode;
  }
  return ok(chain);
}

function readTarget(head: TargetHead, frame: Frame): Read<Target> {
  if ('neapolitan' in head) return ok({ degree: { step: 2, alter: -1 }, mode: 'major' });
  const wrong = head.mark && checkMark(head.mark, head, frame.sheet.case === 'by-quality');
  if (wrong) return stopAt(frame.text, head.at, wrong);
  const triad = targetTriad(head, frame);
  if (triad === 'diminished') return stopAt(frame.text, head.at, 'a diminished triad cannot be tonicised; a target is a major or minor triad.');
  const degree = readDegree(head, triad, frame);
  return degree.ok ? ok({ degree: degree.value, mode: triad }) : degree;
}

function targetTriad(head: Roman & { readonly mark: string | null }, frame: Frame): 'major' | 'minor' | 'diminished' {
  if (!head.capital) return 'minor';
  if (frame.sheet.case === 'by-quality') return 'major';
  const triad = capitalTriad(head, head.mark, frame);
  return triad === 'augmented' ? 'major' : triad;
}

function readDegree(roman: Roman, triad: Triad, { text, mode, sheet }: Frame): Read<Degree> {
  const degree = degreeOfSigns(mode, roman.step, roman.signs, triad, sheet.accidentals);
  if (!degree) return stopAt(text, roman.at, 'the sign ♮ says nothing before this numeral; expected ♭, ♯ or the numeral itself.');
  return Math.abs(degree.alter) <= 2 ? ok(degree) : stopAt(text, roman.at, 'no chord stands on a degree altered this far.');
}

const NO_CONTEXT = { applied: [], special: null, added: [] } as const;

function readRomanHead(head: RomanHead, frame: Frame): Read<Numeral> {
  if (head.mark?.value === 'unstated') return readUnstated(head, frame);
  const triad = readTriad(head, frame);
  if (!triad.ok) return triad;
  const degree = readDegree(head.roman, triad.value, frame);
  if (!degree.ok) return degree;
  const chord = readChord(head, degree.value, triad.value, frame);
  if (!chord.ok) return chord;
  return readNotes(head.notes, { ...NO_CONTEXT, degree: degree.value, ...chord.value }, frame);
}

function readUnstated(head: RomanHead, frame: Frame): Read<Numeral> {
  const more = head.figures[0]?.at ?? head.seventh?.at ?? head.notes[0]?.at;
  if (more !== undefined) return stopAt(frame.text, more, '“?” says that the chord on this root is left open; nothing can follow it but a target.');
  const degree = readDegree(head.roman, 'major', frame);
  return degree.ok ? ok({ ...NO_CONTEXT, degree: degree.value, quality: 'other', inversion: 0 }) : degree;
}

/** The triad that case and mark state. */
function readTriad({ roman, mark }: RomanHead, frame: Frame): Read<Triad> {
  const byQuality = frame.sheet.case === 'by-quality';
  const wrong = mark && checkMark(mark.value, roman, byQuality);
  if (mark && wrong) return stopAt(frame.text, mark.at, wrong);
  if (mark?.value === 'diminished' || mark?.value === 'half-diminished') return ok('diminished');
  if (mark?.value === 'augmented') return ok('augmented');
  if (!roman.capital) return ok('minor');
  return ok(byQuality ? 'major' : capitalTriad(roman, mark?.value ?? null, frame));
}

/** Under capitals throughout: the key's own triad unless M or m says otherwise. */
function capitalTriad(roman: Roman, mark: string | null, { mode, sheet }: Frame): Triad {
  if (mark === 'capital-minor') return 'minor';
  const degree = degreeOfSigns(mode, roman.step, roman.signs, 'major', sheet.accidentals);
  return mark === 'capital-major' || !degree ? 'major' : plainTriad(mode, degree);
}

/** What is wrong with a mark on this numeral; null when nothing is. */
function checkMark(mark: string, { capital, step }: Roman, byQuality: boolean): string | null {
  const letters = ['I', 'II', 'III', 'IV', 'V', 'VI', 'VII'][step - 1] as string;
  if (capital && byQuality && (mark === 'diminished' || mark === 'half-diminished')) {
    return `${letters} in capitals has a major third, a diminished chord has a minor one; write ${letters.toLowerCase()}${mark === 'diminished' ? '°' : 'ø7'}.`;
  }
  if (!capital && mark === 'augmented') return `${letters.toLowerCase()} in small letters has a minor third, an augmented chord has a major one; write ${letters}+.`;
  if (capital && byQuality && mark === 'capital-minor') return `a minor chord is written in small letters: ${letters.toLowerCase()}.`;
  return null;
}

interface ReadChord {
  readonly quality: Quality;
  readonly inversion: Inversion;
  readonly added: readonly AddedTone[];
}

interface ReadFigures extends FigureForm {
  /** A seventh that the figures alter: ♭7, ♯7. */
  readonly seventh: SeventhSize | null;
  readonly ninth: 'major' | 'minor' | null;
}

function readChord(head: RomanHead, degree: Degree, triad: Triad, frame: Frame): Read<ReadChord> {
  const figures = readFigures(head, frame.text);
  if (!figures.ok) return figures;
  const wrong = checkTail(head, figures.value, triad, frame);
  if (wrong) return wrong;
  const { size, inversion, suspended } = figures.value;
  const added: AddedTone[] = suspended ? ['sus4'] : [];
  if (size === 3) return ok({ quality: triad, inversion, added });
  const seventh = readSeventh(head, figures.value, degree, triad, frame);
  return size === 4 ? ok({ quality: seventh, inversion, added }) : readNinth(head, figures.value, seventh, degree, frame);
}

function readFigures({ figures }: RomanHead | NamedHead, text: string): Read<ReadFigures> {
  const digits = figures.map((f) => f.digit).join('');
  if (digits === '') return ok({ size: 3, inversion: 0, seventh: null, ninth: null });
  const form = FIGURE_FORMS[digits];
  if (!form) return stopAt(text, figures[longestFigures(digits)]?.at ?? text.length, `“${digits}” names no chord; figures from the top down are 6, 64, 7, 65, 43, 42 (or 2), 9.`);
  const signed = figures.find((f) => f.sign !== '' && !['7', '9', '79', '97'].includes(digits));
  const natural7 = figures.find((f) => f.digit === '7' && f.sign === 'natural');
  const wrong = signed ?? natural7;
  if (wrong) return stopAt(text, wrong.at, 'accidentals are read in ♭7, ♯7, ♭9 and ♮9 only; write maj7 or dom7 for another seventh.');
  return ok({ ...form, seventh: alteredSeventh(figures), ninth: alteredNinth(figures) });
}

/** How many of the digits still begin some form: where reading stopped. */
function longestFigures(digits: string): number {
  let length = digits.length;
  while (length > 0 && !Object.keys(FIGURE_FORMS).some((form) => form.startsWith(digits.slice(0, length)))) length -= 1;
  return length;
}

function alteredSeventh(figures: RomanHead['figures']): SeventhSize | null {
  const sign = figures.find((f) => f.digit === '7')?.sign;
  if (sign === 'flat') return 'minor';
  return sign === 'sharp' ? 'major' : null;
}

function alteredNinth(figures: RomanHead['figures']): 'major' | 'minor' | null {
  const sign = figures.find((f) => f.digit === '9')?.sign;
  if (!sign) return null;
  return sign === 'flat' ? 'minor' : 'major';
}

/** Marks, words and figures that do not go together. */
function checkTail(head: RomanHead, { size }: ReadFigures, triad: Triad, { text }: Frame): { ok: false; error: NumeralError } | null {
  const { mark, seventh, figures } = head;
  const end = figures[0]?.at ?? seventh?.at ?? mark?.at ?? text.length;
  if (mark?.value === 'half-diminished' && size !== 4) return stopAt(text, figures[0] ? end : mark.at, '“ø” marks a half-diminished seventh chord; it goes with 7, 65, 43 or 42. A diminished triad is marked °.');
  if (seventh && size === 3) return stopAt(text, seventh.at, 'maj and dom name a seventh; the figures 7, 65, 43, 42 or 9 are expected after them.');
  if (seventh && triad === 'diminished') return stopAt(text, seventh.at, 'the mark ° or ø says already which seventh it is.');
  if (size === 5 && (triad === 'diminished' || mark?.value === 'augmented')) return stopAt(text, end, 'a ninth chord stands on a major or minor triad.');
  return null;
}

function readSeventh(head: RomanHead, figures: ReadFigures, degree: Degree, triad: Triad, { mode, sheet }: Frame): Quality {
  if (head.mark?.value === 'half-diminished') return 'half-diminished-seventh';
  const stated = head.seventh?.value ?? markedSeventh(head, sheet) ?? figures.seventh;
  if (stated && triad !== 'diminished') return getSeventhChord(triad, stated);
  const capitalPlain = triad === 'diminished' && !head.mark;
  const smallPlain = sheet.halfDiminished === 'plain' && !head.roman.capital && !head.mark && isDiatonicHalfDiminished(mode, degree);
  if (capitalPlain || smallPlain) return 'half-diminished-seventh';
  return getSeventhChord(triad, plainSeventh(mode, degree, triad));
}

/** Where case tells the triad, `M7` and `m7` name the seventh. */
function markedSeventh({ mark }: RomanHead, sheet: ConventionSheet): SeventhSize | null {
  if (sheet.case !== 'by-quality') return null;
  if (mark?.value === 'capital-major') return 'major';
  return mark?.value === 'capital-minor' ? 'minor' : null;
}

function readNinth(head: RomanHead, figures: ReadFigures, seventh: Quality, degree: Degree, { text, mode }: Frame): Read<ReadChord> {
  const note = head.notes.find((n) => n.value.kind === 'ninth')?.value;
  const stated = figures.ninth ?? (note?.kind === 'ninth' ? note.ninth : null);
  if (seventh === 'dominant-seventh') {
    const size = stated ?? plainNinth(mode, degree);
    return ok({ quality: size === 'minor' ? 'dominant-minor-ninth' : 'dominant-ninth', inversion: figures.inversion, added: [] });
  }
  const at = head.figures[0]?.at ?? text.length;
  if (stated) return stopAt(text, at, 'an altered ninth is read over a dominant seventh only.');
  if (figures.inversion === 4) return stopAt(text, at, 'the ninth is read in the bass of a dominant ninth chord only.');
  return ok({ quality: seventh, inversion: figures.inversion, added: ['add9'] });
}

const SIX_FOUR_SPECIALS: Readonly<Record<Exclude<SixFourWord, 'plain'>, Special>> = {
  pass: 'passing-six-four',
  ped: 'pedal-six-four',
  arp: 'arpeggiated-six-four',
};

function readNotes(notes: readonly Token<Note>[], plain: Numeral, frame: Frame): Read<Numeral> {
  const wrong = notes.map((note) => checkNote(note, plain, notes, frame.text)).find((finding) => finding !== null);
  if (wrong) return wrong;
  const tones = notes.flatMap(({ value }) => (value.kind === 'added' ? [value.tone] : []));
  const added = ADDED_TONES.filter((tone) => tones.includes(tone) || plain.added.includes(tone));
  const conflict = findAddedConflict({ ...plain, added });
  if (conflict) return stopAt(frame.text, notes.findLast(({ value }) => value.kind === 'added')?.at ?? frame.text.length, conflict);
  const word = notes.flatMap(({ value }) => (value.kind === 'six-four' ? [value.word] : []))[0];
  if (word && word !== 'plain') return ok({ ...plain, added, special: SIX_FOUR_SPECIALS[word] });
  return ok(withImpliedSpecial({ ...plain, added }, word === 'plain', notes, frame));
}

function checkNote({ value, at }: Token<Note>, { quality, inversion }: Numeral, notes: readonly Token<Note>[], text: string): { ok: false; error: NumeralError } | null {
  const triadInSixFour = sizeOf(quality) === 3 && inversion === 2;
  if (value.kind === 'six-four' && !triadInSixFour) return stopAt(text, at, 'passing, pedal, arpeggiated and plain are kinds of the six-four chord.');
  if (value.kind === 'six-four' && notes.some((n) => n.at !== at && n.value.kind === 'six-four')) return stopAt(text, at, 'a six-four chord is of one kind.');
  if (value.kind === 'ninth' && sizeOf(quality) !== 5) return stopAt(text, at, 'an altered ninth is read over a dominant ninth chord only.');
  if (value.kind === 'mode' && !triadInSixFour) return stopAt(text, at, 'maj and min in brackets belong to the cadential six-four.');
  return null;
}

/** ♭II is the Neapolitan however it is printed; V64 or I64 is cadential where the sheet prints it so. */
function withImpliedSpecial(numeral: Numeral, saidPlain: boolean, notes: readonly Token<Note>[], { sheet, mode }: Frame): Numeral {
  if (isNeapolitan(numeral)) return { ...numeral, special: 'neapolitan' };
  if (saidPlain || !looksCadential(numeral, sheet)) return numeral;
  const stated = notes.flatMap(({ value }) => (value.kind === 'mode' ? [value.mode] : []))[0];
  const quality = stated ?? (sheet.cadential === 'tonic' ? numeral.quality : mode);
  return { ...numeral, degree: { step: 1, alter: 0 }, quality, special: 'cadential-six-four' };
}

function readNamedHead(head: NamedHead, frame: Frame): Read<Numeral> {
  const { text } = frame;
  if (head.seventh) return stopAt(text, head.seventh.at, 'this chord’s name says already what it is made of.');
  switch (head.name.value) {
    case 'N':
      return readNeapolitan(head, frame);
    case 'CT':
      return readCommonTone(head, frame);
    case 'Cad':
      return readCadential(head, frame);
    case 'Ped':
      return readPedal(head, frame);
    default:
      return readAugmentedSixth(head, head.name.value, frame);
  }
}

/** Inversions by figures. The first is the usual position, which the bare name and +6 also mean. */
const AUGMENTED_SIXTHS: Readonly<Record<'It' | 'Fr' | 'Ger' | 'Sw', { quality: Quality; degree: Degree; figures: Readonly<Record<string, Inversion>> }>> = {
  It: { quality: 'augmented-sixth-italian', degree: { step: 4, alter: 1 }, figures: { '': 1, '6': 1, '63': 1, '64': 2, '53': 0 } },
  Ger: { quality: 'augmented-sixth-german', degree: { step: 4, alter: 1 }, figures: { '': 1, '6': 1, '65': 1, '653': 1, '7': 0, '43': 2, '42': 3, '2': 3 } },
  Fr: { quality: 'augmented-sixth-french', degree: { step: 2, alter: 0 }, figures: { '': 2, '6': 2, '43': 2, '643': 2, '7': 0, '65': 1, '42': 3, '2': 3 } },
  Sw: { quality: 'augmented-sixth-swiss', degree: { step: 2, alter: 1 }, figures: { '': 2, '6': 2, '43': 2, '643': 2, '7': 0, '65': 1, '42': 3, '2': 3 } },
};

function readAugmentedSixth(head: NamedHead, name: keyof typeof AUGMENTED_SIXTHS, { text }: Frame): Read<Numeral> {
  const { quality, degree, figures } = AUGMENTED_SIXTHS[name];
  const digits = head.figures.map((f) => f.digit).join('');
  const inversion = figures[digits];
  const wrongMark = head.mark && !(head.mark.value === 'augmented' && digits === '6');
  if (head.mark && wrongMark) return stopAt(text, head.mark.at, `a mark cannot follow ${name}, but for ${name}+6.`);
  if (inversion === undefined) return stopAt(text, head.figures[0]?.at ?? text.length, `these figures do not go with ${name}; the usual one is ${name}${name === 'It' ? '6' : name === 'Ger' ? '65' : '43'}.`);
  const note = head.notes[0];
  if (note) return stopAt(text, note.at, 'an augmented sixth takes no added tones.');
  return ok({ ...NO_CONTEXT, quality, degree, inversion });
}

function readNeapolitan(head: NamedHead, frame: Frame): Read<Numeral> {
  const figures = readFigures(head, frame.text);
  if (!figures.ok) return figures;
  const { size, inversion, suspended } = figures.value;
  if (head.mark || size === 5 || suspended) return stopAt(frame.text, head.mark?.at ?? head.figures[0]?.at ?? 0, 'the Neapolitan is a major triad; expected N6, or N7 with its inversions.');
  const quality = size === 3 ? 'major' : 'major-seventh';
  return readNotes(head.notes, { ...NO_CONTEXT, degree: { step: 2, alter: -1 }, quality, inversion }, frame);
}

function readCommonTone(head: NamedHead, { text }: Frame): Read<Numeral> {
  const figures = readFigures(head, text);
  if (!figures.ok) return figures;
  if (head.mark?.value !== 'diminished') return stopAt(text, head.mark?.at ?? head.name.at + 2, 'the common-tone chord is a diminished seventh; expected CT°7.');
  const first = head.figures[0];
  if (first && (figures.value.size !== 4 || figures.value.suspended)) return stopAt(text, first.at, 'the common-tone chord is a diminished seventh; expected CT°7.');
  const note = head.notes[0];
  if (note) return stopAt(text, note.at, 'the common-tone chord takes no added tones.');
  return ok({ ...NO_CONTEXT, degree: { step: 2, alter: 1 }, quality: 'diminished-seventh', inversion: figures.value.inversion, special: 'common-tone' });
}

function readCadential(head: NamedHead, frame: Frame): Read<Numeral> {
  const digits = head.figures.map((f) => f.digit).join('');
  const wrong = head.mark?.at ?? (digits === '' || digits === '64' ? undefined : head.figures[0]?.at);
  if (wrong !== undefined) return stopAt(frame.text, wrong, 'the cadential chord is a six-four; expected Cad64.');
  const note = head.notes.find(({ value }) => value.kind !== 'mode');
  if (note) return stopAt(frame.text, note.at, 'the cadential six-four takes no other kind and no added tones.');
  const stated = head.notes.flatMap(({ value }) => (value.kind === 'mode' ? [value.mode] : []))[0];
  return ok({ ...NO_CONTEXT, degree: { step: 1, alter: 0 }, quality: stated ?? frame.mode, inversion: 2, special: 'cadential-six-four' });
}

function readPedal(head: NamedHead, frame: Frame): Read<Numeral> {
  const more = head.mark?.at ?? head.figures[0]?.at ?? head.notes[0]?.at;
  if (more !== undefined) return stopAt(frame.text, more, 'a pedal is one held tone; expected Ped, or Ped with its degree as in Ped V.');
  const degree = head.held ? readDegree(head.held, 'major', frame) : ok({ step: 1 as const, alter: 0 });
  return degree.ok ? ok({ ...NO_CONTEXT, degree: degree.value, quality: 'other', inversion: 0, special: 'pedal-tone' }) : degree;
}
