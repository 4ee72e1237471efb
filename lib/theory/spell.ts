import { keyOfNumeral } from './applied';
import { type Role, STACK, TEMPLATES } from './chord';
import { keyToneAbove } from './diatonic';
import { stepsUp } from './interval';
import { type Key, fifthsOfDegree } from './key';
import type { AddedTone, Numeral } from './numeral';
import { type Fifths, fifths } from './pitch';

export interface SpelledTone {
  readonly fifths: Fifths;
  readonly role: Role;
}

/** A chord's spelled tones from the bass up, in close position, each once. `bass` is `tones[0]`. */
export interface SpelledChord {
  readonly tones: readonly SpelledTone[];
  readonly root: Fifths;
  readonly bass: Fifths;
}

const ADDED: Readonly<Record<AddedTone, { role: Role; above: number; standsForThird: boolean }>> = {
  sus2: { role: 'second', above: 1, standsForThird: true },
  sus4: { role: 'fourth', above: 3, standsForThird: true },
  add4: { role: 'fourth', above: 3, standsForThird: false },
  add6: { role: 'sixth', above: 5, standsForThird: false },
  add9: { role: 'ninth', above: 1, standsForThird: false },
};

/**
 * The spelled tones of a numeral in a key, from the bass up. Chains of targets are followed; the cadential six-four
 * spells the tonic triad over sol; `other` and a pedal spell their one tone.
 */
export function spellNumeral(key: Key, numeral: Numeral): SpelledChord {
  const frame = keyOfNumeral(key, numeral);
  const root = fifthsOfDegree(frame, numeral.degree);
  const stacked = TEMPLATES[numeral.quality].map((distance, i) => ({ fifths: fifths(root + distance), role: STACK[i] as Role }));
  const bass = stacked[numeral.inversion]?.fifths;
  if (bass === undefined) throw new Error(`a ${numeral.quality} chord has no inversion ${numeral.inversion}`);
  return { tones: fromBassUp(withAdded(stacked, numeral, frame, root), bass), root, bass };
}

function withAdded(stacked: SpelledTone[], numeral: Numeral, frame: Key, root: Fifths): SpelledTone[] {
  const added = numeral.added.map((tone) => ADDED[tone]);
  const kept = added.some((a) => a.standsForThird) ? stacked.filter((tone) => tone.role !== 'third') : stacked;
  return [...kept, ...added.map(({ role, above }) => ({ role, fifths: fifths(root + keyToneAbove(frame.mode, numeral.degree, above)) }))];
}

/** Letters upward from the bass; a ninth goes above the octave of a root that is in the bass. */
function fromBassUp(tones: readonly SpelledTone[], bass: Fifths): SpelledTone[] {
  const height = ({ fifths: f, role }: SpelledTone) => stepsUp(bass, f) + (role === 'ninth' && stepsUp(bass, f) === 1 ? 7 : 0);
  return tones.toSorted((a, b) => height(a) - height(b));
}
