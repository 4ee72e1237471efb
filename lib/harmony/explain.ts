import { type Score } from '../score/score';
import { type Key, formatKeyForPeople } from '../theory/key';
import { type Pitch, formatPitchClassForPeople } from '../theory/pitch';
import { spellNumeral } from '../theory/spell';
import { findCadence } from './cadences';
import { sortNotes } from './chord-tones';
import { isInScale } from './key-terms';
import { nameNonChordTone } from './non-chord-tones';
import { type Label, type NonChordTone, type Reading, type Term, type Why } from './reading';
import { findTendencyTones } from './tendency-tones';
import { type VoiceIndex, indexVoices } from './voices';
import { listWords, sayCadence, sayChord, sayCommonTone, sayNonChordTones, sayOtherFrame, sayQualityRule, sayTendencies } from './why-sentences';
import { weighLabel } from './why-terms';

const TERMS_FOR = 3;
const TERMS_AGAINST = 3;
const LEAST_WEIGHT = 0.05;

const NOTHING: Why = { chordTones: [], missing: [], nonChordTones: [], tendencyTones: [], termsFor: [], termsAgainst: [], sentences: [] };

/**
 * The evidence for a label, whoever wrote it: its chord tones, the notes left over and what each is, its tendency tones
 * and where they go, the key, and the engine's strongest terms for and against. A blank label has no evidence. Pure; a
 * score's notes are indexed at its first use.
 */
export function explainLabel(score: Score, reading: Reading, labelIndex: number): Why {
  const label = reading.labels[labelIndex];
  if (!label?.numeral) return NOTHING;
  const { numeral, key, start, end } = label;
  const voices = indexVoices(score);
  const notes = voices.soundingIn(start, end);
  const sorted = sortNotes(notes, key, numeral);
  const next = reading.labels[labelIndex + 1];
  const chordOf = (other: Label | undefined) => (other?.numeral ? spellNumeral(other.key, other.numeral) : null);
  const around = { start, end, chord: sorted.chord, chordBefore: chordOf(reading.labels[labelIndex - 1]), chordAfter: chordOf(next), voices };
  const nonChordTones = sorted.others.map((note) => asMarked(nameNonChordTone(note, around), label));
  const tendencyTones = findTendencyTones(notes, key, numeral, { start, end, nextEnd: next?.end ?? end, voices });
  const terms = weighLabel(score, reading, labelIndex);
  return {
    chordTones: sorted.tones,
    missing: sorted.missing,
    nonChordTones,
    tendencyTones,
    ...splitTerms(terms),
    sentences: [
      ...sayChord(sorted, label, numeral),
      ...sayNonChordTones(nonChordTones),
      ...sayTendencies(tendencyTones),
      ...sayQualityRule(key, numeral),
      ...sayCommonTone(sorted.chord, numeral, around.chordAfter),
      ...sayKey(label, voices),
      ...sayCadence(findCadence(score, reading, labelIndex)),
      ...sayOtherFrame(label),
    ],
  };
}

/** What a person said a note is holds against what we would call it. */
function asMarked(tone: NonChordTone, label: Label): NonChordTone {
  const marked = label.tones?.find(({ noteId }) => noteId === tone.noteId);
  return marked ? { ...tone, kind: marked.kind } : tone;
}

function splitTerms(terms: readonly Term[]): Pick<Why, 'termsFor' | 'termsAgainst'> {
  return {
    termsFor: terms.filter((term) => term.weight >= LEAST_WEIGHT).slice(0, TERMS_FOR),
    termsAgainst: terms.filter((term) => term.weight <= -LEAST_WEIGHT).slice(0, TERMS_AGAINST),
  };
}

/** What fixes the key at a label: its leading tone, and the notes that its nearest rivals do not have. */
function sayKey(label: Label, voices: VoiceIndex): readonly string[] {
  const { key, start, end } = label;
  const length = Math.max(end - start, 1);
  const near = voices.soundingIn(start - 2 * length, end + 2 * length);
  const heard = new Map(near.map((note) => [note.pitch.fifths as number, note.pitch]));
  const name = formatKeyForPeople(key);
  const leading = heard.get(key.tonic + 5);
  const foreign = [...heard.values()].filter((pitch) => !fits(key, pitch)).map(nameOf);
  const against = foreign.length > 0 && foreign.length <= 3 ? [`${listWords(foreign)} nearby ${foreign.length === 1 ? 'is' : 'are'} not in its scale.`] : [];
  if (leading) return [`The leading tone ${nameOf(leading)} of ${name} sounds here or close by.`, ...against];
  const telling = [...heard.values()].filter((pitch) => fits(key, pitch) && !fitsNeighbours(key, pitch)).map(nameOf);
  return telling.length > 0 ? [`${listWords(telling)} ${telling.length === 1 ? 'speaks' : 'speak'} for ${name} against its neighbours.`, ...against] : against;
}

function nameOf(pitch: Pitch): string {
  return formatPitchClassForPeople(pitch.fifths);
}

function fits({ tonic, mode }: Key, { fifths }: Pitch): boolean {
  return isInScale(mode === 'major' ? 0 : 1, fifths - tonic);
}

/** Whether both keys a fifth away have the pitch as well. */
function fitsNeighbours(key: Key, pitch: Pitch): boolean {
  return [-1, 1].every((shift) => fits({ mode: key.mode, tonic: (key.tonic + shift) as Key['tonic'] }, pitch));
}
