import { type Numeral, type Special } from '../theory/numeral';
import { inversionOfState, keyOfState, labelOfState } from './lattice';
import { type ChosenSpan } from './read-out';
import { type Slices } from './slices';
import { DOMINANT_SEVENTH, MAJOR } from './templates';
import { LABELS, numeralOf } from './vocabulary';

/** The numeral of a chosen span, with what only its surroundings tell: which kind of six-four it is. */
export function nameInContext(spans: readonly ChosenSpan[], i: number, slices: Slices): Numeral {
  const { state } = spans[i]!;
  const label = LABELS[labelOfState(state)]!;
  const numeral = numeralOf(label, inversionOfState(state));
  if (!label.sixFour || numeral.special) return numeral;
  return { ...numeral, special: findSixFour(spans, i, slices) };
}

/**
 * Common practice, no source: cadential when the tonic's six-four goes to the dominant over the same bass; arpeggiated
 * beside another position of its own chord; pedal over a bass that stays before and after; passing in a bass that moves
 * by step through it.
 */
function findSixFour(spans: readonly ChosenSpan[], i: number, slices: Slices): Special | null {
  const { state } = spans[i]!;
  const label = LABELS[labelOfState(state)]!;
  const next = spans[i + 1];
  if (label.root === 0 && !label.target && next && isDominantAfter(state, next.state)) return 'cadential-six-four';
  const before = spans[i - 1];
  if ([before, next].some((other) => other && sameChord(other.state, state))) return 'arpeggiated-six-four';
  if (!before || !next) return null;
  const steps = [slices.bassMidi[spans[i]!.from]! - slices.bassMidi[before.to - 1]!, slices.bassMidi[next.from]! - slices.bassMidi[spans[i]!.to - 1]!];
  if (steps.every((step) => step === 0)) return 'pedal-six-four';
  return steps.every((step) => Math.abs(step) <= 2 && step !== 0) && Math.sign(steps[0]!) === Math.sign(steps[1]!) ? 'passing-six-four' : null;
}

function isDominantAfter(sixFour: number, next: number): boolean {
  const label = LABELS[labelOfState(next)]!;
  const isDominant = label.root === 1 && !label.target && (label.kind === MAJOR || label.kind === DOMINANT_SEVENTH);
  return isDominant && keyOfState(next) === keyOfState(sixFour) && inversionOfState(next) === 0;
}

function sameChord(a: number, b: number): boolean {
  const [one, other] = [LABELS[labelOfState(a)]!, LABELS[labelOfState(b)]!];
  return keyOfState(a) === keyOfState(b) && one.root === other.root && one.kind === other.kind && inversionOfState(a) !== inversionOfState(b);
}
