import { checkAppliedQuality, keyOfNumeral } from '../theory/applied';
import { type Role } from '../theory/chord';
import { type Key, formatKeyForPeople } from '../theory/key';
import { formatNumeral } from '../theory/numeral-format';
import { type Numeral } from '../theory/numeral';
import { type Pitch, formatPitchClassForPeople, pitchClassOf } from '../theory/pitch';
import { type SpelledChord } from '../theory/spell';
import { type Cadence, type CadenceKind } from './cadences';
import { type SortedNotes } from './chord-tones';
import { type Label, type NonChordKind, type NonChordTone, type TendencyTone } from './reading';

function nameOf(pitch: Pitch): string {
  return formatPitchClassForPeople(pitch.fifths);
}

export function listWords(words: readonly string[]): string {
  if (words.length <= 1) return words.join('');
  return `${words.slice(0, -1).join(', ')} and ${words.at(-1)!}`;
}

/** What the chord is made of, and what is understood. */
export function sayChord(sorted: SortedNotes, label: Label, numeral: Numeral): readonly string[] {
  const { chord, tones, missing } = sorted;
  const heard = chord.tones.filter((tone) => !missing.includes(tone.role)).map((tone) => formatPitchClassForPeople(tone.fifths));
  const name = formatNumeral(numeral, label.key.mode);
  const misspelled = [...new Set(tones.filter((tone) => tone.misspelled).map((tone) => nameOf(tone.pitch)))];
  return [
    heard.length > 0 ? `${listWords(heard)} ${heard.length === 1 ? 'belongs' : 'belong'} to ${name} in ${formatKeyForPeople(label.key)}.` : `No tone of ${name} sounds here.`,
    ...(missing.length > 0 && heard.length > 0 ? [`The ${listWords(missing as Role[])} ${missing.length === 1 ? 'is' : 'are'} not heard; the chord is understood without.`] : []),
    ...misspelled.map((name) => `${name} is a tone of the chord written enharmonically.`),
  ];
}

const KIND_WORDS: Readonly<Record<NonChordKind, string>> = {
  passing: 'a passing tone',
  neighbour: 'a neighbour tone',
  'double-neighbour': 'one of two neighbours around a chord tone',
  appoggiatura: 'an appoggiatura',
  escape: 'an escape tone',
  anticipation: 'an anticipation of the next chord',
  suspension: 'a suspension',
  retardation: 'a retardation',
  pedal: 'a pedal, held through the change',
  other: 'foreign to the chord and not explained by its motion',
};

/** One sentence per note that does not belong, the same said once. */
export function sayNonChordTones(tones: readonly NonChordTone[]): readonly string[] {
  return [...new Set(tones.map(sayNonChordTone))];
}

function sayNonChordTone({ pitch, kind, from, to }: NonChordTone): string {
  const moves = from && to ? `, from ${nameOf(from)} to ${nameOf(to)}` : to ? `, going to ${nameOf(to)}` : '';
  return `${nameOf(pitch)} is ${KIND_WORDS[kind]}${kind === 'pedal' || kind === 'other' ? '' : moves}.`;
}

export function sayTendencies(tones: readonly TendencyTone[]): readonly string[] {
  return [...new Set(tones.map(sayTendency))];
}

function sayTendency({ pitch, expected, went, resolution, reason }: TendencyTone): string {
  const [tone, goal] = [nameOf(pitch), nameOf(expected)];
  switch (resolution) {
    case 'as-expected':
      return `${reason.replace(/\.$/, '')}, and does so.`;
    case 'delayed':
      return `${tone} goes to ${went ? nameOf(went) : goal} late, within the next chord.`;
    case 'in-another-voice':
      return `${tone} resolves to ${went ? nameOf(went) : goal} in another voice.`;
    case 'irregular':
      return `${tone} goes to ${went ? nameOf(went) : 'another tone'} where ${goal} is expected.`;
    case 'unresolved':
      return `${tone} wants ${goal} and is left unresolved.`;
  }
}

/** The rule of quality for leading-tone sevenths of a target, and whether this one follows it. */
export function sayQualityRule(key: Key, numeral: Numeral): readonly string[] {
  const target = numeral.applied[0];
  const isLeadingToneSeventh = numeral.quality === 'diminished-seventh' || numeral.quality === 'half-diminished-seventh';
  if (!target || !isLeadingToneSeventh || numeral.degree.step !== 7) return [];
  const findings = checkAppliedQuality(key, numeral);
  if (findings.length > 0) return findings.map((finding) => finding.sentence);
  const tonic = formatPitchClassForPeople(keyOfNumeral(key, numeral).tonic);
  const which = numeral.quality === 'diminished-seventh' ? 'fully diminished' : 'half-diminished';
  return target.mode === 'major'
    ? [`Before a major chord (${tonic}) a leading-tone seventh may be half- or fully diminished; this one is ${which}.`]
    : [`Before a minor chord (${tonic}) a leading-tone seventh is fully diminished, as here.`];
}

/**
 * A °7 whose own tone is the root of the chord that follows embellishes it and has no function.
 * Source: Integrated Musicianship: Theory, ch. 18b (D♯°7→C is common-tone, D♯°7→e is vii°7 of iii).
 */
export function sayCommonTone(chord: SpelledChord, numeral: Numeral, next: SpelledChord | null): readonly string[] {
  if (numeral.quality !== 'diminished-seventh' || !next) return [];
  const shared = chord.tones.find((tone) => pitchClassOf(tone.fifths) === pitchClassOf(next.root));
  return shared ? [`It shares ${formatPitchClassForPeople(shared.fifths)}, the root of the next chord, and moves around it: a common-tone °7.`] : [];
}

const CADENCE_WORDS: Readonly<Record<CadenceKind, string>> = {
  'perfect-authentic': 'perfect authentic cadence',
  'imperfect-authentic': 'imperfect authentic cadence',
  half: 'half cadence',
  'phrygian-half': 'Phrygian half cadence',
  deceptive: 'deceptive cadence',
  plagal: 'plagal cadence',
};

export function sayCadence(cadence: Cadence | null): readonly string[] {
  if (!cadence) return [];
  const weight = cadence.strength >= 0.9 ? 'strong' : cadence.strength >= 0.6 ? 'clear' : 'light';
  const article = /^[aeiou]/.test(weight) ? 'An' : 'A';
  return [`${article} ${weight} ${CADENCE_WORDS[cadence.kind]} ends here.`];
}

/** Runners-up that hear the same chord in another frame: tonicised against modulated. */
export function sayOtherFrame(label: Label): readonly string[] {
  const other = label.others.find(({ key, numeral }) => key.tonic !== label.key.tonic && numeral.inversion === label.numeral?.inversion);
  if (!other || other.certainty < 0.1) return [];
  return [`It can also be heard in ${formatKeyForPeople(other.key)}, as ${formatNumeral(other.numeral, other.key.mode)}.`];
}
