import { ok } from '../result';
import { sizeOf } from './chord';
import { looksCadential } from './conventions';
import type { Mode } from './key';
import { ADDED_TONES, type AddedTone, type Numeral, type Special, findAddedConflict, isNeapolitan } from './numeral';
import type { Frame, Read, Stop } from './numeral-frame';
import { STOPPED } from './numeral-messages';
import { type Note, type SixFourWord, type Token, stopAt } from './numeral-scan';

const SIX_FOUR_SPECIALS: Readonly<Record<Exclude<SixFourWord, 'plain'>, Special>> = {
  pass: 'passing-six-four',
  ped: 'pedal-six-four',
  arp: 'arpeggiated-six-four',
};

/** The chord with what follows its figures: added tones and the kind of a six-four; and with what the sheet implies. */
export function readNotes(notes: readonly Token<Note>[], chord: Numeral, frame: Frame): Read<Numeral> {
  const wrong = notes.map((note) => checkNote(note, chord, notes, frame.text)).find((finding) => finding !== null);
  if (wrong) return wrong;
  const tones: AddedTone[] = [...chord.added, ...pick(notes, (note) => (note.kind === 'added' ? note.tone : null))];
  const numeral = { ...chord, added: ADDED_TONES.filter((tone) => tones.includes(tone)) };
  const conflict = findAddedConflict(numeral);
  if (conflict) return stopAt(frame.text, notes.findLast(({ value }) => value.kind === 'added')?.at ?? frame.text.length, conflict);
  const [word] = pick(notes, (note) => (note.kind === 'six-four' ? note.word : null));
  if (word && word !== 'plain') return ok({ ...numeral, special: SIX_FOUR_SPECIALS[word] });
  return ok(withImpliedSpecial(numeral, word === 'plain', statedMode(notes), frame));
}

/** The mode in brackets after a cadential six-four; null when none is typed. */
export function statedMode(notes: readonly Token<Note>[]): Mode | null {
  return pick(notes, (note) => (note.kind === 'mode' ? note.mode : null))[0] ?? null;
}

function pick<T>(notes: readonly Token<Note>[], choose: (note: Note) => T | null): T[] {
  return notes.map(({ value }) => choose(value)).filter((chosen) => chosen !== null);
}

function checkNote({ value, at }: Token<Note>, chord: Numeral, notes: readonly Token<Note>[], text: string): Stop | null {
  const isSixFour = sizeOf(chord.quality) === 3 && chord.inversion === 2;
  const isAnother = (note: Token<Note>) => note.at !== at && note.value.kind === 'six-four';
  if (value.kind === 'six-four' && !isSixFour) return stopAt(text, at, STOPPED.sixFourKind);
  if (value.kind === 'six-four' && notes.some(isAnother)) return stopAt(text, at, STOPPED.sixFourTwice);
  if (value.kind === 'ninth' && sizeOf(chord.quality) !== 5) return stopAt(text, at, STOPPED.alteredNinth);
  return value.kind === 'mode' && !isSixFour ? stopAt(text, at, STOPPED.modeWord) : null;
}

/** ♭II is the Neapolitan however it is printed; V64 or I64 is cadential where the sheet prints it so. */
function withImpliedSpecial(numeral: Numeral, saidPlain: boolean, stated: Mode | null, { sheet, mode }: Frame): Numeral {
  if (isNeapolitan(numeral)) return { ...numeral, special: 'neapolitan' };
  if (saidPlain || !looksCadential(numeral, sheet)) return numeral;
  const quality = stated ?? (sheet.cadential === 'tonic' ? numeral.quality : mode);
  return { ...numeral, degree: { step: 1, alter: 0 }, quality, special: 'cadential-six-four' };
}
