import type { Quality } from '../theory/chord';

/** A `kind` of MusicXML's harmony with the tones that the kind alone does not say. Source: W3C MusicXML 4.0, kind-value and degree. */
export interface HarmonyKind {
  readonly kind: string;
  /** `degree` elements: the chord's step, semitones against a dominant chord's, and how it comes in. */
  readonly degree?: { readonly value: number; readonly alter: number; readonly type: 'add' | 'alter' };
}

export const KIND_OF_QUALITY: Readonly<Record<Quality, HarmonyKind>> = {
  major: { kind: 'major' },
  minor: { kind: 'minor' },
  diminished: { kind: 'diminished' },
  augmented: { kind: 'augmented' },
  'dominant-seventh': { kind: 'dominant' },
  'major-seventh': { kind: 'major-seventh' },
  'minor-seventh': { kind: 'minor-seventh' },
  'half-diminished-seventh': { kind: 'half-diminished' },
  'diminished-seventh': { kind: 'diminished-seventh' },
  'minor-major-seventh': { kind: 'major-minor' },
  'augmented-major-seventh': { kind: 'augmented', degree: { value: 7, alter: 1, type: 'add' } },
  'augmented-seventh': { kind: 'augmented-seventh' },
  'dominant-ninth': { kind: 'dominant-ninth' },
  'dominant-minor-ninth': { kind: 'dominant-ninth', degree: { value: 9, alter: -1, type: 'alter' } },
  'augmented-sixth-italian': { kind: 'Italian' },
  'augmented-sixth-french': { kind: 'French' },
  'augmented-sixth-german': { kind: 'German' },
  'augmented-sixth-swiss': { kind: 'other' },
  other: { kind: 'other' },
};

/** Kinds that a file may hold, those we write and their like, by the quality they are read as. */
export const QUALITY_OF_KIND: ReadonlyMap<string, Quality> = new Map<string, Quality>([
  ...(Object.entries(KIND_OF_QUALITY) as [Quality, HarmonyKind][])
    .filter(([, { kind, degree }]) => !degree && kind !== 'other')
    .map(([quality, { kind }]): [string, Quality] => [kind, quality]),
  ['Neapolitan', 'major'],
  ['major-sixth', 'major'],
  ['minor-sixth', 'minor'],
  ['major-ninth', 'major-seventh'],
  ['minor-ninth', 'minor-seventh'],
  ['dominant-11th', 'dominant-ninth'],
  ['dominant-13th', 'dominant-ninth'],
]);
