/**
 * What the demo's students wrote, as differences from the key: place of the label in the key (from 0) → what they typed,
 * '' for nothing. Each makes one kind of mistake that a teacher knows.
 */
export type Answers = Readonly<Record<string, Readonly<Record<number, string>>>>;

/** The spans of the Evening Hymn that the assignment asks for: every applied chord, the six-fours and a few plain ones. */
export const HYMN_ASKED = [1, 4, 5, 7, 9, 11, 15, 17, 19, 22, 23, 26, 29, 33, 35, 38, 40, 42, 44, 45, 47, 50, 51, 52] as const;

export const HYMN_ANSWERS: Answers = {
  // Almost all right: one seventh left out.
  'a.dovell': { 47: 'vii°/vi' },
  // Every leading-tone seventh fully diminished.
  'c.pettibrand': { 5: 'vii°7/V', 17: 'vii°65/V', 29: 'ii°65' },
  // Triads for sevenths, root position throughout.
  'd.lindquill': { 7: 'V7', 9: 'vii°7/vi', 11: 'ii6', 15: 'vii°/ii', 19: 'vii°/vi', 22: 'vii°/V', 40: 'V7', 50: 'vii°/V' },
  // Hears the root and misses what it is applied to.
  'e.fosburytan': { 5: '♯ivø7', 15: '♯i°7', 19: '♯v°7', 22: '♯iv°7', 47: '♯v°7', 50: '♯iv°7' },
  // Wrong targets.
  'f.quillon': { 9: 'vii°65/ii', 15: 'vii°7/V', 19: 'vii°7/V', 38: 'V65', 42: 'V65/V', 47: 'vii°7/V' },
  // Ran out of time.
  'g.ashbeck': { 5: 'V7/V', 35: '', 38: '', 40: '', 42: '', 44: '', 45: '', 47: '', 50: '', 51: '', 52: '' },
  // Prints the six-four on the tonic; misses the mixture.
  'h.tressick': { 23: 'I64', 42: 'I65', 44: 'IV', 45: 'I64', 51: 'I64' },
  // Half- and fully diminished the wrong way round.
  'i.merridown': { 5: 'vii°7/V', 11: 'IV6', 15: 'viiø7/ii', 22: 'viiø7/V', 29: 'ii65', 47: 'viiø7/vi', 50: 'viiø7/V' },
};

export const STAIRCASE_ANSWERS: Answers = {
  'a.dovell': {},
  'c.pettibrand': { 9: 'vii°65/V' },
  'd.lindquill': { 3: '♯i°7', 5: '♯ii°7', 9: 'vii°6/V' },
  'e.fosburytan': { 7: 'viiø7/IV', 20: '' },
  'f.quillon': { 11: 'vii°7/IV', 14: 'vii°7/vi' },
  'g.ashbeck': { 3: 'viiø7/ii', 18: 'V7/IV' },
  'h.tressick': { 15: 'I64', 18: 'I65', 21: 'I64' },
  'i.merridown': { 5: 'V7/iii', 9: 'viiø7/V' },
  'j.sarkeld': { 9: '', 14: '', 20: 'IV' },
};
