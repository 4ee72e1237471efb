import { isSettled, lookOf } from '@/components/score/label-look';
import { namePlace } from '@/components/score/beats';
import type { Label, NonChordKind } from '@/lib/harmony/reading';
import type { Score } from '@/lib/score/score';
import type { ConventionSheet } from '@/lib/theory/conventions';
import { type Key, formatKeyForPeople } from '@/lib/theory/key';
import type { Numeral } from '@/lib/theory/numeral';
import { formatPitchClassForPeople } from '@/lib/theory/pitch';
import { spellNumeral } from '@/lib/theory/spell';
import { typesetNumeral } from '@/lib/theory/typeset';

/** `five seven of two in g minor`: a label's numeral as it is said; a blank says so. */
export function speakLabel(label: Label, sheet: ConventionSheet): string {
  return label.numeral ? typesetNumeral(label.numeral, label.key.mode, sheet).spoken : 'blank';
}

/** Everything a label says to someone who does not see it. */
export function describeLabel(score: Score, label: Label, sheet: ConventionSheet, given = false): string {
  const numeral = `${speakLabel(label, sheet)} in ${formatKeyForPeople(label.key)}`;
  const state = given ? 'given' : label.numeral ? lookOf(label).word : 'to be written';
  const certainty = !isSettled(label) && label.certainty !== null ? `, ${speakCertainty(label.certainty)}` : '';
  return `${capital(namePlace(score, label.start))}: ${numeral}, ${state}${certainty}`;
}

/** Certainty in words and in figures: a number alone says too much. */
export function speakCertainty(certainty: number): string {
  return `${certaintyWord(certainty)} (${Math.round(certainty * 100)} %)`;
}

function certaintyWord(certainty: number): string {
  if (certainty >= 0.9) return 'nearly certain';
  if (certainty >= 0.7) return 'likely';
  if (certainty >= 0.45) return 'open to doubt';
  if (certainty >= 0.2) return 'unlikely';
  return 'a long shot';
}

/** The chord's notes from the bass up, as names. */
export function spellForPeople(key: Key, numeral: Numeral): string[] {
  return spellNumeral(key, numeral).tones.map((tone) => formatPitchClassForPeople(tone.fifths));
}

function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}

export const TONE_WORDS = {
  passing: 'passing tone',
  neighbour: 'neighbour tone',
  'double-neighbour': 'double neighbour',
  appoggiatura: 'appoggiatura',
  escape: 'escape tone',
  anticipation: 'anticipation',
  suspension: 'suspension',
  retardation: 'retardation',
  pedal: 'pedal tone',
  other: 'left over, of no known kind',
} as const satisfies Record<NonChordKind, string>;
