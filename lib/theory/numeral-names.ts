import { ok } from '../result';
import type { Quality } from './chord';
import { type Numeral, degreeOfAugmentedSixth } from './numeral';
import { digitsOf, readFigures } from './numeral-figures';
import { type Frame, type Read, type Stop, readDegree } from './numeral-frame';
import { STOPPED, saysNoMarkAfter, saysOtherFigures } from './numeral-messages';
import { readNotes, statedMode } from './numeral-notes';
import { type NamedHead, stopAt } from './numeral-scan';

type AugmentedSixthName = 'It' | 'Fr' | 'Ger' | 'Sw';

const NO_CONTEXT = { applied: [], special: null, added: [] } as const;

/** A chord that is called by a name instead of a Roman numeral. */
export function readNamedHead(head: NamedHead, frame: Frame): Read<Numeral> {
  if (head.seventh) return stopAt(frame.text, head.seventh.at, STOPPED.nameSaysAll);
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

interface AugmentedSixth {
  readonly quality: Quality;
  readonly inversions: Readonly<Record<string, Numeral['inversion']>>;
}

/** Inversions by figures; the bare name and +6 mean the usual position, with the flat sixth in the bass. */
const AUGMENTED_SIXTHS: Readonly<Record<AugmentedSixthName, AugmentedSixth>> = {
  It: { quality: 'augmented-sixth-italian', inversions: { '': 1, '6': 1, '63': 1, '64': 2, '5': 0, '53': 0 } },
  Ger: { quality: 'augmented-sixth-german', inversions: { '': 1, '6': 1, '65': 1, '653': 1, '7': 0, '43': 2, '42': 3, '2': 3 } },
  Fr: { quality: 'augmented-sixth-french', inversions: { '': 2, '6': 2, '43': 2, '643': 2, '7': 0, '65': 1, '42': 3, '2': 3 } },
  Sw: { quality: 'augmented-sixth-swiss', inversions: { '': 2, '6': 2, '43': 2, '643': 2, '7': 0, '65': 1, '42': 3, '2': 3 } },
};

function readAugmentedSixth(head: NamedHead, name: AugmentedSixthName, { text }: Frame): Read<Numeral> {
  const { quality, inversions } = AUGMENTED_SIXTHS[name];
  const digits = digitsOf(head.figures);
  const inversion = inversions[digits];
  const signed = head.figures.find((figure) => figure.sign !== '');
  const isPlusSix = head.mark?.value === 'augmented' && digits === '6';
  if (head.mark && !isPlusSix) return stopAt(text, head.mark.at, saysNoMarkAfter(name));
  if (inversion === undefined || signed) return stopAt(text, signed?.at ?? head.figures[0]?.at ?? text.length, saysOtherFigures(name));
  return refuseNotes(head, text) ?? ok({ ...NO_CONTEXT, quality, degree: degreeOfAugmentedSixth(quality), inversion });
}

function refuseNotes(head: NamedHead, text: string): Stop | null {
  const [note] = head.notes;
  return note ? stopAt(text, note.at, STOPPED.nameNote) : null;
}

function readNeapolitan(head: NamedHead, frame: Frame): Read<Numeral> {
  const figures = readFigures(head.figures, frame.text);
  if (!figures.ok) return figures;
  const { size, inversion, suspended } = figures.value;
  const wrong = head.mark?.at ?? (size === 5 || suspended ? head.figures[0]?.at : undefined);
  if (wrong !== undefined) return stopAt(frame.text, wrong, STOPPED.neapolitan);
  const quality = size === 3 ? 'major' : 'major-seventh';
  return readNotes(head.notes, { ...NO_CONTEXT, degree: { step: 2, alter: -1 }, quality, inversion }, frame);
}

function readCommonTone(head: NamedHead, { text }: Frame): Read<Numeral> {
  const figures = readFigures(head.figures, text);
  if (!figures.ok) return figures;
  const isDiminished = head.mark?.value === 'diminished';
  if (!isDiminished) return stopAt(text, head.mark?.at ?? head.name.at + 'CT'.length, STOPPED.commonTone);
  const isSeventh = figures.value.size === 4 && !figures.value.suspended;
  const [first] = head.figures;
  if (first && !isSeventh) return stopAt(text, first.at, STOPPED.commonTone);
  const commonTone = { ...NO_CONTEXT, degree: { step: 2, alter: 1 }, quality: 'diminished-seventh', special: 'common-tone' } as const;
  return refuseNotes(head, text) ?? ok({ ...commonTone, inversion: figures.value.inversion });
}

function readCadential(head: NamedHead, { text, mode }: Frame): Read<Numeral> {
  const isSixFour = ['', '64'].includes(digitsOf(head.figures)) && head.figures.every((figure) => figure.sign === '');
  const wrong = head.mark?.at ?? (isSixFour ? undefined : head.figures[0]?.at);
  if (wrong !== undefined) return stopAt(text, wrong, STOPPED.cadential);
  const note = head.notes.find(({ value }) => value.kind !== 'mode');
  if (note) return stopAt(text, note.at, STOPPED.cadentialNote);
  const quality = statedMode(head.notes) ?? mode;
  return ok({ ...NO_CONTEXT, degree: { step: 1, alter: 0 }, quality, inversion: 2, special: 'cadential-six-four' });
}

function readPedal(head: NamedHead, frame: Frame): Read<Numeral> {
  const more = head.mark?.at ?? head.figures[0]?.at ?? head.notes[0]?.at;
  if (more !== undefined) return stopAt(frame.text, more, STOPPED.pedal);
  const degree = head.held ? readDegree(head.held, 'major', frame) : ok({ step: 1 as const, alter: 0 });
  return degree.ok ? ok({ ...NO_CONTEXT, degree: degree.value, quality: 'other', inversion: 0, special: 'pedal-tone' }) : degree;
}
