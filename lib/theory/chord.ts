/**
 * Chord qualities. The first fifteen are those of the report contract; ninths are told from sevenths here and
 * reported as the seventh chord they extend.
 */
export const QUALITIES = [
  'major',
  'minor',
  'diminished',
  'augmented',
  'dominant-seventh',
  'major-seventh',
  'minor-seventh',
  'half-diminished-seventh',
  'diminished-seventh',
  'minor-major-seventh',
  'augmented-major-seventh',
  'augmented-sixth-italian',
  'augmented-sixth-french',
  'augmented-sixth-german',
  'other',
  'dominant-ninth',
  'dominant-minor-ninth',
  'augmented-sixth-swiss',
  'augmented-seventh',
] as const;
export type Quality = (typeof QUALITIES)[number];

/** What a tone is in its chord. `sixth` is an added sixth; `fourth` a suspended fourth that stands for the third. */
export const ROLES = ['root', 'third', 'fifth', 'seventh', 'ninth', 'sixth', 'fourth'] as const;
export type Role = (typeof ROLES)[number];
