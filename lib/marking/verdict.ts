/** How an answer stands to the key. Stored and shown; order is the order of credit. */
export const VERDICTS = ['as-keyed', 'alternative', 'other-frame', 'partly', 'not-this', 'blank'] as const;
export type Verdict = (typeof VERDICTS)[number];

/** The verdicts in the words of the screens. */
export const VERDICT_NAMES: Readonly<Record<Verdict, string>> = {
  'as-keyed': 'as keyed',
  alternative: 'accepted alternative',
  'other-frame': 'same chord, other frame',
  partly: 'partly right',
  'not-this': 'not this',
  blank: 'blank',
};

/** The parts of a label that can be right or wrong on their own, and that a rubric gives shares to. */
export const PARTS = ['root', 'quality', 'inversion', 'applied', 'function', 'key', 'boundary'] as const;
export type Part = (typeof PARTS)[number];

export const PART_NAMES: Readonly<Record<Part, string>> = {
  root: 'root',
  quality: 'quality',
  inversion: 'inversion',
  applied: 'target of the applied chord',
  function: 'kind of six-four',
  key: 'key',
  boundary: 'place of the change',
};

/** What went wrong, as a teacher plans the next lesson by it: the rows of "what to reteach". */
export const ERROR_KINDS = [
  'blank',
  'root',
  'accidental',
  'triad-quality',
  'leading-tone-seventh',
  'seventh-missing',
  'seventh-added',
  'seventh-quality',
  'inversion',
  'applied-missing',
  'applied-target',
  'applied-added',
  'six-four',
  'augmented-sixth',
  'common-tone',
  'enharmonic',
  'key',
  'frame',
  'boundary',
] as const;
export type ErrorKind = (typeof ERROR_KINDS)[number];

export const ERROR_KIND_NAMES: Readonly<Record<ErrorKind, string>> = {
  blank: 'left blank',
  root: 'root of the chord',
  accidental: 'accidental before the numeral',
  'triad-quality': 'quality of the triad',
  'leading-tone-seventh': 'quality of the leading-tone seventh',
  'seventh-missing': 'seventh overlooked',
  'seventh-added': 'seventh that is not there',
  'seventh-quality': 'kind of seventh',
  inversion: 'inversion',
  'applied-missing': 'applied chord not recognised',
  'applied-target': 'target of the applied chord',
  'applied-added': 'applied chord where there is none',
  'six-four': 'six-four',
  'augmented-sixth': 'augmented sixth',
  'common-tone': 'common-tone diminished seventh',
  enharmonic: 'spelling: sounds alike, is written otherwise',
  key: 'key',
  frame: 'tonicised or modulated',
  boundary: 'where the chord changes',
};
