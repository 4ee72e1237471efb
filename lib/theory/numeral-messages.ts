import type { ChordName } from './numeral-scan';

/**
 * Why reading a typed numeral stopped, in a teacher's words. Each follows “Stopped at … (character n): ” and says what
 * was expected or what to write instead.
 */
export const STOPPED = {
  beforeNumeral: 'expected a numeral from I to VII (or It6, Fr43, Ger65, N6, CT°7, Cad64, Ped).',
  beforeTarget: 'expected the numeral of the chord that is tonicised, such as V or ii.',
  beforeHeld: 'expected the held degree, as in Ped V.',
  afterChord: 'expected figures (6, 64, 7, 65, 43, 42, 9), a mark (° ø +), an added tone (add6, sus4), or “/” and a target.',
  afterTarget: 'expected the end, or “/” and one more target.',
  lateMark: 'the marks ° ø + stand directly after the numeral, before the figures.',
  inBrackets: 'expected add4, add6, add9, sus2, sus4, or for a six-four pass, ped, arp or plain, within the brackets.',
  openBracket: 'expected the closing bracket.',
  targetDiminished: 'a diminished triad cannot be tonicised; a target is a major or minor triad.',
  targetAugmented: 'an augmented triad cannot be tonicised; a target is a major or minor triad.',
  targetFigures: 'a target takes no figures; they stand before the slash.',
  pedalTarget: 'a pedal is a held tone of the key itself and takes no target.',
  natural: 'the sign ♮ says nothing before this numeral; expected ♭, ♯ or the numeral itself.',
  altered: 'no chord stands on a degree altered this far.',
  unstated: '“?” leaves the chord on this root open; nothing can follow it but a target.',
  figureSign: 'accidentals are read in ♭7, ♯7, ♭9 and ♮9 only; write maj7 or dom7 for another seventh.',
  halfDiminished: '“ø” marks a half-diminished seventh chord and goes with 7, 65, 43 or 42; a diminished triad is marked °.',
  seventhWord: 'maj and dom name a seventh; the figures 7, 65, 43, 42 or 9 are expected after them.',
  seventhSaid: 'the mark ° or ø says already which seventh it is.',
  ninthOver: 'a ninth chord stands on a major or minor triad.',
  alteredNinth: 'an altered ninth is read over a dominant seventh only.',
  ninthInBass: 'the ninth is read in the bass of a dominant ninth chord only.',
  sixFourKind: 'passing, pedal, arpeggiated and plain are kinds of the six-four chord.',
  sixFourTwice: 'a six-four chord is of one kind.',
  modeWord: 'maj and min in brackets belong to the cadential six-four.',
  nameSaysAll: 'this chord’s name says already what it is made of.',
  nameNote: 'this chord takes no added tones.',
  neapolitan: 'the Neapolitan is a major triad; expected N6, or N7 with its inversions.',
  commonTone: 'the common-tone chord is a diminished seventh; expected CT°7.',
  cadential: 'the cadential chord is a six-four; expected Cad64.',
  cadentialNote: 'the cadential six-four takes no other kind and no added tones.',
  pedal: 'a pedal is one held tone; expected Ped, or Ped with its degree as in Ped V.',
} as const;

export function saysNoFigures(digits: string): string {
  return `“${digits}” names no chord; figures from the top down are 6, 64, 7, 65, 43, 42 (or 2), 9.`;
}

export function saysNoNumeral(letters: string): string {
  return `“${letters}” is no numeral from I to VII.`;
}

export function saysMixedCase(letters: string): string {
  return `“${letters}” mixes capital and small letters; write ${letters.toUpperCase()} or ${letters.toLowerCase()}.`;
}

export function saysSmallForDiminished(letters: string, mark: '°' | 'ø7'): string {
  return `${letters} in capitals has a major third, a diminished chord has a minor one; write ${letters.toLowerCase()}${mark}.`;
}

export function saysCapitalForAugmented(letters: string): string {
  return `${letters.toLowerCase()} in small letters has a minor third, an augmented chord has a major one; write ${letters}+.`;
}

export function saysSmallForMinor(letters: string): string {
  return `a minor chord is written in small letters: ${letters.toLowerCase()}.`;
}

export function saysNoMarkAfter(name: ChordName): string {
  return `a mark cannot follow ${name}, but for ${name}+6.`;
}

export function saysOtherFigures(name: ChordName): string {
  const usual = { It: '6', Ger: '65' } as Readonly<Partial<Record<ChordName, string>>>;
  return `these figures do not go with ${name}; the usual ones are ${name}${usual[name] ?? '43'}.`;
}
