import { BASS_MOTIONS } from './bass-motion';
import { LABEL_CLASSES } from './vocabulary';

const MOTION_TERMS = BASS_MOTIONS.map((name) => [`bass-${name}`, `the bass moves by ${name}`] as const);
const LEAVES_TERMS = LABEL_CLASSES.map((name) => [`change-leaves-${name}`, `the old key is left on its ${name}`] as const);
const ARRIVES_TERMS = LABEL_CLASSES.map((name) => [`change-arrives-${name}`, `the new key is entered on its ${name}`] as const);

/** Terms between two neighbouring labels. */
export const TRANSITION_TERMS: readonly (readonly [string, string])[] = [
  ['progression-frequency', 'how common the progression is'],
  ['same-again', 'the same chord goes on over the barline'],
  ['new-inversion', 'the same chord in another inversion'],
  ['seventh-added', 'a seventh is added to the chord'],
  ['seventh-dropped', 'the seventh is dropped'],
  ['applied-resolves', 'the applied chord goes to its target'],
  ['applied-resolves-other-mode', 'the applied chord goes to its target in the other mode'],
  ['applied-goes-on', 'the next chord belongs to the same tonicised degree'],
  ['applied-elsewhere', 'the applied chord does not go to its target'],
  ['applied-leading-tone-resolves', 'the applied leading-tone chord goes to its target'],
  ['applied-leading-tone-resolves-other-mode', 'the applied leading-tone chord goes to its target in the other mode'],
  ['applied-to-six-four', 'the chord applied to the dominant goes to the six-four above it'],
  ['applied-to-six-four-other-mode', 'the chord applied to the dominant goes to a six-four of the other mode'],
  ['applied-chain', 'the chord applied goes to another applied chord on its target'],
  ['applied-deceptive', 'the applied chord goes to the sixth degree of its target'],
  ['six-four-resolves', 'the six-four goes to the dominant over the same bass'],
  ['six-four-elsewhere', 'the six-four of the tonic does not go to the dominant'],
  ['authentic', 'the dominant goes to the tonic, both in root position'],
  ['leading-tone-resolves', 'a chord with the leading tone goes to the tonic'],
  ['key-change', 'the key changes'],
  ['relation-frequency', 'how common the change of key is'],
  ['key-distance', 'the distance of the two signatures'],
  ['pivot-frequency', 'how common the chord before is in the new key'],
  ['pivot-progression', 'how common the progression is as heard in the new key'],
  ['no-pivot', 'the chord before has no place in the new key'],
  ['change-accidentals', 'the key changes, in a piece with many accidentals'],
  ['change-length', 'the key changes, in a long piece'],
  ['change-pace', 'the key changes, in a piece whose bass moves often'],
  ['change-into-tonicised', 'the new key is the one the chord before was applied to'],
  ['change-from-tonicised', 'the chord after is applied to the old tonic'],
  ['change-on-downbeat', 'the key changes at a barline'],
  ['change-with-signature', 'the key changes where the written signature does'],
  ['change-mode-only', 'only the mode changes'],
  ...MOTION_TERMS,
  ...LEAVES_TERMS,
  ...ARRIVES_TERMS,
];

export const TRANSITION_AT: Readonly<Record<string, number>> = Object.fromEntries(TRANSITION_TERMS.map(([name], i) => [name, i]));

export const HAND_TRANSITION_WEIGHTS: Readonly<Record<string, number>> = {
  'progression-frequency': 0.45,
  'same-again': 0.6,
  'new-inversion': -0.54,
  'applied-resolves': 0.38,
  'applied-elsewhere': -0.2,
  'applied-to-six-four': 0.38,
  'applied-chain': 0.2,
  authentic: 0.2,
  'key-change': -1.78,
  'relation-frequency': 0.26,
  'key-distance': -0.15,
  'pivot-frequency': 0.14,
  'pivot-progression': 0.26,
  'no-pivot': -0.7,
};
