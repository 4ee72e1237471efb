import { type Numeral, type Special } from '../theory/numeral';
import { inversionOfState, keyOfState, labelOfState } from './lattice';
import { type ChosenSpan } from './read-out';
import { type Slices } from './slices';
import { DIMINISHED_SEVENTH, DOMINANT_SEVENTH, MAJOR } from './templates';
import { LABELS, numeralOf } from './vocabulary';

/** The numeral of a chosen span, with what only its surroundings tell: which kind of six-four it is, a common-tone °7. */
export function nameInContext(spans: readonly ChosenSpan[], i: number, slices: Slices): Numeral {
  const { state } = spans[i]!;
  const label = LABELS[labelOfState(state)]!;
  if (isRespelledSixth(spans, i)) return germanSixth(inversionOfState(state));
  const numeral = numeralOf(label, inversionOfState(state));
  if (numeral.special) return numeral;
  if (isCommonTone(spans, i)) return { ...numeral, special: 'common-tone' };
  return label.sixFour ? { ...numeral, special: findSixFour(spans, i, slices) } : numeral;
}

/** Root of the dominant seventh that sounds like a German sixth: the flat sixth, in fifths from the tonic. */
const FLAT_SIXTH = -4;

/** The flat sixth of the chord is the third of the German sixth: what was tone i becomes tone i + 1. */
function germanSixth(inversion: number): Numeral {
  return {
    degree: { step: 4, alter: 1 },
    quality: 'augmented-sixth-german',
    inversion: ((inversion + 1) % 4) as Numeral['inversion'],
    applied: [],
    special: null,
    added: [],
  };
}

/**
 * A dominant seventh on the flat sixth that goes to the dominant or the six-four above it: a German sixth whose raised
 * fourth is written as a lowered fifth. Source: Integrated Musicianship: Theory, ch. 20a.
 */
function isRespelledSixth(spans: readonly ChosenSpan[], i: number): boolean {
  const { state } = spans[i]!;
  const label = LABELS[labelOfState(state)]!;
  const next = spans[i + 1];
  if (label.kind !== DOMINANT_SEVENTH || label.root !== FLAT_SIXTH || !next || keyOfState(next.state) !== keyOfState(state)) return false;
  const goal = LABELS[labelOfState(next.state)]!;
  if (goal.target) return false;
  return (goal.root === 0 && goal.sixFour) || (goal.root === 1 && (goal.kind === MAJOR || goal.kind === DOMINANT_SEVENTH));
}

/**
 * A °7 on the raised second that turns around the tonic: it shares the tonic, the others move by step.
 * Source: Integrated Musicianship: Theory, ch. 18b.
 */
function isCommonTone(spans: readonly ChosenSpan[], i: number): boolean {
  const label = LABELS[labelOfState(spans[i]!.state)]!;
  if (label.kind !== DIMINISHED_SEVENTH || label.target || label.step !== 2 || label.alter !== 1) return false;
  return [spans[i - 1], spans[i + 1]].some((other) => {
    if (!other || keyOfState(other.state) !== keyOfState(spans[i]!.state)) return false;
    const beside = LABELS[labelOfState(other.state)]!;
    return beside.root === 0 && !beside.target;
  });
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
