import { formatKeyForPeople } from '../theory/key';
import { formatPitchClassForPeople as name } from '../theory/pitch';
import type { Comparison, OtherFrame } from './compare-label';
import { rootOf, tonicisedKey } from './frame';
import type { Framed } from './key-reading';
import { isAugmentedSixth } from './quality';
import { type ErrorKind, PART_NAMES, type Part, type Verdict } from './verdict';

/** A sentence to the student, as a teacher would write it. */
export interface Reason {
  readonly text: string;
  /** The sentence gives away what the key says: not for a student who may not see the key. */
  readonly namesKey: boolean;
}

/** What is wrong, after "the …": each stands alone as a clause. */
const FAULTS: Readonly<Record<Exclude<ErrorKind, 'blank' | 'frame'>, string>> = {
  root: 'the root is another',
  accidental: 'the accidental before the numeral is not right',
  'triad-quality': 'the chord is of another quality',
  'leading-tone-seventh': 'half- and fully diminished are mixed up: look at the seventh above the leading tone',
  'seventh-missing': 'the seventh is missing',
  'seventh-added': 'there is no seventh in this chord',
  'seventh-quality': 'the seventh is of the other kind',
  inversion: 'the inversion is not right: look at the bass',
  'applied-missing': 'the chord is applied to another, and the label does not say so',
  'applied-target': 'it is applied to another chord',
  'applied-added': 'it is not an applied chord: it belongs to the key itself',
  'six-four': 'the six-four is of another kind: look at what the bass does before and after it',
  'augmented-sixth': 'look at the augmented sixth, and at the notes between',
  'common-tone': 'a diminished seventh is named by where it goes: look at the next chord',
  enharmonic: 'it sounds like this, but it is written otherwise: the spelling decides',
  key: 'the key is another here',
  boundary: 'the chord does not change where you change it',
};

export interface Judged {
  readonly main: Comparison | null;
  readonly parts: Comparison['parts'];
  readonly errors: readonly ErrorKind[];
}

/** The reasons for a verdict: first what every student may read, then what names the key. */
export function reasonsFor(verdict: Verdict, judged: Judged, held: Framed | null, answered: Framed | null): Reason[] {
  const open = openSentence(verdict, judged);
  const shown = open ? [{ text: open, namesKey: false }] : [];
  if (!held || verdict === 'as-keyed' || verdict === 'blank') return shown;
  return [...shown, ...sentencesOnTheKey(judged, held, answered).map((text) => ({ text, namesKey: true }))];
}

function openSentence(verdict: Verdict, judged: Judged): string | null {
  if (verdict === 'as-keyed') return null;
  if (verdict === 'blank') return 'Nothing was written here.';
  if (judged.errors.length === 0) return 'Accepted beside the key’s own label.';
  if (verdict === 'other-frame' && judged.main?.frame) return FRAMES[judged.main.frame];
  return partsSentence(judged);
}

const FRAMES: Readonly<Record<OtherFrame, string>> = {
  tonicised: 'The same chord in another frame: you tonicise for a moment where the key modulates.',
  modulated: 'The same chord in another frame: you change key where the key only tonicises.',
  'other-key': 'The same chord, read in another key.',
};

/** `Root and inversion are right; the seventh is missing.` */
function partsSentence(judged: Judged): string {
  const right = judged.parts.filter((mark) => mark.credit === 1).map((mark) => mark.part);
  const faults = judged.errors.flatMap((error) => (error === 'blank' || error === 'frame' ? [] : [FAULTS[error]]));
  const praise = right.length > 0 ? `${join(right)} ${right.length > 1 ? 'are' : 'is'} right` : '';
  return sentence([praise, ...faults].filter(Boolean).join('; '));
}

function join(parts: readonly Part[]): string {
  const names = parts.map((part) => PART_NAMES[part]);
  const last = names.pop() ?? '';
  return names.length > 0 ? `${names.join(', ')} and ${last}` : last;
}

function sentence(text: string): string {
  return `${text.charAt(0).toUpperCase()}${text.slice(1)}.`;
}

/** Names the right notes where the student named others. */
function sentencesOnTheKey(judged: Judged, held: Framed, answered: Framed | null): string[] {
  const sentences: string[] = [];
  const has = (error: ErrorKind) => judged.errors.includes(error);
  const rooted = answered && !isAugmentedSixth(held.numeral.quality) && !isAugmentedSixth(answered.numeral.quality);
  if (rooted && has('root')) sentences.push(`The root is ${name(rootOf(held))}, not ${name(rootOf(answered))}.`);
  if (has('applied-missing') || has('applied-target')) sentences.push(`It is applied to ${name(tonicisedKey(held).tonic)}.`);
  if (has('key')) sentences.push(`The key here is ${formatKeyForPeople(held.key)}.`);
  if (has('accidental')) sentences.push(`The degree is ${name(rootOf(held))}.`);
  return sentences;
}
