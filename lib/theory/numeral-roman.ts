import { ok } from '../result';
import type { Quality, SeventhSize, Triad } from './chord';
import type { ConventionSheet } from './conventions';
import { degreeOfSigns, getSeventhChord, isDiatonicHalfDiminished, plainNinth, plainSeventh, plainTriad } from './diatonic';
import type { Degree } from './key';
import type { AddedTone, Numeral, Target } from './numeral';
import { type ReadFigures, readFigures } from './numeral-figures';
import { type Frame, type Read, type Stop, readDegree } from './numeral-frame';
import { STOPPED, saysCapitalForAugmented, saysSmallForDiminished, saysSmallForMinor } from './numeral-messages';
import { readNotes } from './numeral-notes';
import { type ChordMark, ROMANS, type Roman, type RomanHead, type TargetHead, stopAt } from './numeral-scan';

/** A Roman numeral with its mark, figures and additions; its targets are not its own business. */
export function readRomanHead(head: RomanHead, frame: Frame): Read<Numeral> {
  if (head.mark?.value === 'unstated') return readUnstated(head, frame);
  const triad = readTriad(head, frame);
  if (!triad.ok) return triad;
  const degree = readDegree(head.roman, triad.value, frame);
  if (!degree.ok) return degree;
  const chord = readChord(head, degree.value, triad.value, frame);
  if (!chord.ok) return chord;
  return readNotes(head.notes, { degree: degree.value, ...chord.value, applied: [], special: null }, frame);
}

function readUnstated(head: RomanHead, frame: Frame): Read<Numeral> {
  const more = head.seventh?.at ?? head.figures[0]?.at ?? head.notes[0]?.at;
  if (more !== undefined) return stopAt(frame.text, more, STOPPED.unstated);
  const degree = readDegree(head.roman, 'major', frame);
  return degree.ok ? ok({ degree: degree.value, quality: 'other', inversion: 0, applied: [], special: null, added: [] }) : degree;
}

/** A target: the neighbouring numeral's key, a major or minor triad of the key it is read in. */
export function readTarget(head: TargetHead, frame: Frame): Read<Target> {
  if ('neapolitan' in head) return ok({ degree: { step: 2, alter: -1 }, mode: 'major' });
  const wrong = head.mark && checkMark(head.mark, head, frame);
  if (wrong) return stopAt(frame.text, head.at, wrong);
  const triad = head.capital ? capitalTriad(head, head.mark, frame) : 'minor';
  if (triad === 'diminished') return stopAt(frame.text, head.at, STOPPED.targetDiminished);
  const mode = triad === 'minor' ? 'minor' : 'major';
  const degree = readDegree(head, mode, frame);
  return degree.ok ? ok({ degree: degree.value, mode }) : degree;
}

/** The triad that case and mark state. */
function readTriad({ roman, mark }: RomanHead, frame: Frame): Read<Triad> {
  const wrong = mark && checkMark(mark.value, roman, frame);
  if (mark && wrong) return stopAt(frame.text, mark.at, wrong);
  if (mark?.value === 'diminished' || mark?.value === 'half-diminished') return ok('diminished');
  if (mark?.value === 'augmented') return ok('augmented');
  return ok(roman.capital ? capitalTriad(roman, mark?.value ?? null, frame) : 'minor');
}

/** Capitals are major; under capitals throughout they are the key's own triad unless M or m says otherwise. */
function capitalTriad(roman: Roman, mark: ChordMark | null, { mode, sheet }: Frame): Triad {
  if (sheet.case === 'by-quality' || mark === 'capital-major') return 'major';
  if (mark === 'capital-minor') return 'minor';
  const degree = degreeOfSigns(mode, roman.step, roman.signs, 'major', sheet.accidentals);
  return degree ? plainTriad(mode, degree) : 'major';
}

/** What is wrong with a mark on this numeral; null when nothing is. */
function checkMark(mark: ChordMark, { capital, step }: Roman, { sheet }: Frame): string | null {
  const letters = ROMANS[step - 1] as string;
  const saysMajor = capital && sheet.case === 'by-quality';
  if (saysMajor && mark === 'diminished') return saysSmallForDiminished(letters, '°');
  if (saysMajor && mark === 'half-diminished') return saysSmallForDiminished(letters, 'ø7');
  if (saysMajor && mark === 'capital-minor') return saysSmallForMinor(letters);
  return !capital && mark === 'augmented' ? saysCapitalForAugmented(letters) : null;
}

interface ReadChord {
  readonly quality: Quality;
  readonly inversion: Numeral['inversion'];
  readonly added: readonly AddedTone[];
}

function readChord(head: RomanHead, degree: Degree, triad: Triad, frame: Frame): Read<ReadChord> {
  const figures = readFigures(head.figures, frame.text);
  if (!figures.ok) return figures;
  const wrong = checkTail(head, figures.value, triad, frame.text);
  if (wrong) return wrong;
  const { size, inversion, suspended } = figures.value;
  const added: AddedTone[] = suspended ? ['sus4'] : [];
  if (size === 3) return ok({ quality: triad, inversion, added });
  const seventh = readSeventh(head, figures.value, degree, triad, frame);
  return size === 4 ? ok({ quality: seventh, inversion, added }) : readNinth(head, figures.value, seventh, degree, frame);
}

/** Marks, words and figures that do not go together. */
function checkTail({ mark, seventh, figures }: RomanHead, { size }: ReadFigures, triad: Triad, text: string): Stop | null {
  const at = figures[0]?.at ?? mark?.at ?? text.length;
  if (mark?.value === 'half-diminished' && size !== 4) return stopAt(text, at, STOPPED.halfDiminished);
  if (seventh && size === 3) return stopAt(text, seventh.at, STOPPED.seventhWord);
  if (seventh && triad === 'diminished') return stopAt(text, seventh.at, STOPPED.seventhSaid);
  const carriesNinth = triad === 'major' || triad === 'minor';
  return size === 5 && !carriesNinth ? stopAt(text, at, STOPPED.ninthOver) : null;
}

function readSeventh(head: RomanHead, figures: ReadFigures, degree: Degree, triad: Triad, { mode, sheet }: Frame): Quality {
  if (head.mark?.value === 'half-diminished') return 'half-diminished-seventh';
  if (triad === 'diminished') return head.mark ? 'diminished-seventh' : 'half-diminished-seventh';
  const stated = head.seventh?.value ?? markedSeventh(head, sheet) ?? figures.seventh;
  if (stated) return getSeventhChord(triad, stated);
  const isSmall = !head.roman.capital && !head.mark;
  if (sheet.halfDiminished === 'plain' && isSmall && isDiatonicHalfDiminished(mode, degree)) return 'half-diminished-seventh';
  return getSeventhChord(triad, plainSeventh(mode, degree, triad));
}

/** Where case tells the triad, `M7` and `m7` name the seventh. */
function markedSeventh({ mark }: RomanHead, sheet: ConventionSheet): SeventhSize | null {
  if (sheet.case !== 'by-quality') return null;
  if (mark?.value === 'capital-major') return 'major';
  return mark?.value === 'capital-minor' ? 'minor' : null;
}

/** A ninth belongs to the quality over a dominant seventh; over any other seventh it is an added tone. */
function readNinth(head: RomanHead, figures: ReadFigures, seventh: Quality, degree: Degree, { text, mode }: Frame): Read<ReadChord> {
  const stated = figures.ninth ?? statedNinth(head);
  const { inversion } = figures;
  if (seventh === 'dominant-seventh') {
    const ninth = stated ?? plainNinth(mode, degree);
    return ok({ quality: ninth === 'minor' ? 'dominant-minor-ninth' : 'dominant-ninth', inversion, added: [] });
  }
  const at = head.figures[0]?.at ?? text.length;
  if (stated) return stopAt(text, at, STOPPED.alteredNinth);
  return inversion === 4 ? stopAt(text, at, STOPPED.ninthInBass) : ok({ quality: seventh, inversion, added: ['add9'] });
}

function statedNinth({ notes }: RomanHead): 'major' | 'minor' | null {
  const note = notes.find(({ value }) => value.kind === 'ninth')?.value;
  return note?.kind === 'ninth' ? note.ninth : null;
}
