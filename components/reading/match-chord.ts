import type { Note, Score } from '@/lib/score/score';
import type { Role } from '@/lib/theory/chord';
import type { Key } from '@/lib/theory/key';
import type { Numeral } from '@/lib/theory/numeral';
import { type Fifths, formatPitchClassForPeople, pitchClassOf } from '@/lib/theory/pitch';
import { spellNumeral } from '@/lib/theory/spell';

/** How a chord fits the notes of a span: by spelled pitch class. */
export interface ChordMatch {
  /** The chord's tones from the bass up, and whether the span sounds them; `enharmonic`: only under another name. */
  readonly tones: readonly { readonly fifths: Fifths; readonly role: Role; readonly found: 'yes' | 'enharmonic' | 'no' }[];
  /** Pitch classes of the span that are no tone of the chord, the longest sounding first. */
  readonly leftOver: readonly Fifths[];
}

export function matchChord(score: Score, start: number, end: number, key: Key, numeral: Numeral): ChordMatch {
  const sounding = weighSpan(score.notes, start, end);
  const { tones } = spellNumeral(key, numeral);
  const sounds = new Set([...sounding.keys()].map(pitchClassOf));
  const inChord = new Set(tones.map((tone) => pitchClassOf(tone.fifths)));
  return {
    tones: tones.map((tone) => ({ ...tone, found: sounding.has(tone.fifths) ? 'yes' : sounds.has(pitchClassOf(tone.fifths)) ? 'enharmonic' : 'no' })),
    leftOver: [...sounding].filter(([f]) => !inChord.has(pitchClassOf(f))).sort((a, b) => b[1] - a[1]).map(([f]) => f),
  };
}

/** Ticks that each pitch class sounds within the span. */
function weighSpan(notes: readonly Note[], start: number, end: number): Map<Fifths, number> {
  const weights = new Map<Fifths, number>();
  for (const { pitch, start: from, duration } of notes) {
    const heard = Math.min(end, from + duration) - Math.max(start, from);
    if (heard > 0) weights.set(pitch.fifths, (weights.get(pitch.fifths) ?? 0) + heard);
  }
  return weights;
}

export function nameTones(tones: readonly Fifths[]): string {
  return tones.map(formatPitchClassForPeople).join(', ');
}
