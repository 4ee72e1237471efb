import { type Fifths } from '@/lib/theory/pitch';
import { SCALE_FIFTHS } from '@/lib/theory/key';
import { spellNumeral } from '@/lib/theory/spell';
import type { Label } from '@/lib/harmony/reading';

/**
 * The chord has a note from outside its key's scale. In minor the raised sixth and seventh belong to the scale.
 * (Common practice, no source: they are melodic and harmonic minor.)
 */
export function isChromatic(label: Label): boolean {
  if (!label.numeral) return false;
  const scale = SCALE_FIFTHS[label.key.mode].map((distance) => label.key.tonic + distance);
  const raised = label.key.mode === 'minor' ? [label.key.tonic + 3, label.key.tonic + 5] : [];
  const inside = new Set<number>([...scale, ...raised]);
  return spellNumeral(label.key, label.numeral).tones.some((tone: { readonly fifths: Fifths }) => !inside.has(tone.fifths));
}
