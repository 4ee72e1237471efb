import { describe, expect, it } from 'vitest';
import { type Setting, type SpanMark, compareWithKey } from '@/lib/marking/compare-with-key';
import type { KeyReading } from '@/lib/marking/key-reading';
import { DEFAULT_RUBRIC, RUBRIC_PRESETS, type Rubric } from '@/lib/marking/rubric';
import { READING_TICKS, framedFrom, keyReadingFrom, readingFrom } from '../../support/reading-notation';

const GIVEN: Setting = { segmentation: 'given', keysGiven: true, ticksPerQuarter: READING_TICKS };
const KEYS_ASKED: Setting = { ...GIVEN, keysGiven: false };
const OPEN: Setting = { ...GIVEN, segmentation: 'open' };

function mark(key: string | KeyReading, answer: string, rubric: Rubric = DEFAULT_RUBRIC, setting = GIVEN): SpanMark[] {
  return compareWithKey(typeof key === 'string' ? keyReadingFrom(key) : key, readingFrom(answer), rubric, setting);
}

/** Verdict and points of the only span: `'partly 1.5'`. */
function mark1(key: string, answer: string, rubric: Rubric = DEFAULT_RUBRIC, setting = GIVEN): string {
  const [first] = mark(key, answer, rubric, setting);
  return first ? `${first.verdict} ${first.points}` : 'nothing asked';
}

function errors1(key: string, answer: string, setting = GIVEN): readonly string[] {
  return mark(key, answer, DEFAULT_RUBRIC, setting)[0]?.errors ?? [];
}

/** The first sentence a student reads. */
function reason1(key: string, answer: string, setting = GIVEN): string {
  return mark(key, answer, DEFAULT_RUBRIC, setting)[0]?.reasons[0]?.text ?? '';
}

describe('compareWithKey, span by span', () => {
  it('gives full marks to what the key says', () => {
    expect(mark('C: I V65/V V7 I', 'C: I V65/V V7 I').map((m) => [m.verdict, m.points])).toEqual([
      ['as-keyed', 2], ['as-keyed', 2], ['as-keyed', 2], ['as-keyed', 2],
    ]);
  });

  it('calls an empty span blank and another chord not this, both without points', () => {
    expect(mark1('C: V7', 'C: _')).toBe('blank 0');
    expect(mark1('C: V7', 'C: ii')).toBe('not-this 0');
    expect(reason1('C: V7', 'C: _')).toBe('Nothing was written here.');
  });

  it('marks only what is asked, and never a label of the key without a numeral', () => {
    const key = keyReadingFrom('C: I _ V7 I');
    const asked = { ...key, labels: key.labels.map((label, i) => ({ ...label, asked: i === 1 || i === 2 })) };
    expect(mark(asked, 'C: I I V7 I').map((m) => m.start)).toEqual([8]);
  });

  it('takes points of the label before those of the rubric', () => {
    const key = keyReadingFrom('C: V7');
    const heavy = { ...key, labels: key.labels.map((label) => ({ ...label, points: 5 })) };
    expect(mark(heavy, 'C: V7')[0]).toMatchObject({ points: 5, maxPoints: 5 });
  });

  it('says which parts are right and what is wrong, as a teacher would', () => {
    expect(reason1('C: V7', 'C: V')).toBe('Root and inversion are right; the seventh is missing.');
    expect(reason1('C: ii6', 'C: ii')).toBe('Root and quality are right; the inversion is not right: look at the bass.');
    expect(reason1('C: ii', 'C: IV')).toBe('Inversion is right; the root is another; the chord is of another quality.');
  });

  it('keeps what names the key apart from what every student may read', () => {
    const [wrong] = mark('C: ii', 'C: IV');
    expect(wrong?.reasons.filter((reason) => reason.namesKey).map((reason) => reason.text)).toEqual(['The root is D, not F.']);
    expect(reason1('C: ii', 'C: IV')).not.toContain('D');
  });
});

describe('compareWithKey on kinds of error', () => {
  it.each([
    ['c: viio7', 'c: viiø7', 'leading-tone-seventh'],
    ['C: viiø7/V', 'C: viio7/V', 'leading-tone-seventh'],
    ['C: V7', 'C: V', 'seventh-missing'],
    ['C: V', 'C: V7', 'seventh-added'],
    ['C: ii', 'C: II', 'triad-quality'],
    ['C: V65', 'C: V7', 'inversion'],
    ['C: V7/V', 'C: II7', 'applied-missing'],
    ['C: V7/V', 'C: V7', 'applied-missing'],
    ['C: V7/V', 'C: V7/IV', 'applied-target'],
    ['C: V7', 'C: V7/V', 'applied-added'],
    ['C: bVI', 'C: VI', 'accidental'],
    ['C: Ger65', 'C: It6', 'augmented-sixth'],
    ['C: Fr43', 'C: Ger65', 'augmented-sixth'],
  ])('%s answered %s: %s', (key, answer, kind) => {
    expect(errors1(key, answer)).toContain(kind);
  });

  it('tells a common-tone seventh from a secondary leading-tone seventh', () => {
    // Source: Integrated Musicianship: Theory, ch. 18b: CT°7 is mistaken for a secondary leading-tone chord.
    expect(errors1('C: CTo7', 'C: viio7/iii')).toContain('common-tone');
    expect(errors1('C: viio7/iii', 'C: CTo7')).toContain('common-tone');
  });
});

describe('compareWithKey on six-fours', () => {
  // Source: references §17 item 6 (college-board guidelines 2019): the cadential six-four is accepted under each
  // convention, tied to the next label.
  it.each(['I64', 'V64', 'Cad64'])('takes %s before V7 for the cadential six-four', (answer) => {
    expect(mark('C: Cad64 V7', `C: ${answer} V7`).map((m) => m.points)).toEqual([2, 2]);
  });

  it('does not take V64 without the dominant it belongs to', () => {
    expect(mark('C: Cad64 V7', 'C: V64 I')[0]).toMatchObject({ verdict: 'not-this', points: 0 });
  });

  it('takes a convention only if the rubric does', () => {
    const strict = { ...DEFAULT_RUBRIC, sixFour: { asTonic: false, asDominant: false, tiedToNext: true } };
    expect(mark1('C: Cad64 V7', 'C: I64 V7', strict)).toBe('partly 1.5');
    expect(mark1('C: Cad64 V7', 'C: V64 V7', strict)).toBe('not-this 0');
  });

  it('tells a passing six-four from a cadential one', () => {
    // Source: Integrated Musicianship: Theory, ch. 11d: one label for cadential and passing six-fours confuses.
    expect(errors1('C: I64(pass)', 'C: Cad64')).toContain('six-four');
    expect(mark1('C: I64(pass)', 'C: Cad64')).toBe('partly 1.5');
    expect(mark1('C: I64(pass)', 'C: I64')).toBe('as-keyed 2');
  });

  it('knows a six-four that was overlooked', () => {
    expect(errors1('C: Cad64 V7', 'C: V V7')).toContain('six-four');
    expect(errors1('C: Cad64 V7', 'C: ii6 V7')).toContain('six-four');
  });
});

describe('compareWithKey on frames and keys', () => {
  // Source: references §17 item 16: tonicise or modulate is the largest honest disagreement: same chord, other frame.
  it('calls a tonicised chord of a modulation the same chord in another frame', () => {
    const marks = mark('C: I G: V7 I', 'C: I V7/V V', DEFAULT_RUBRIC, KEYS_ASKED);
    expect(marks.map((m) => m.verdict)).toEqual(['as-keyed', 'other-frame', 'other-frame']);
    expect(marks.map((m) => m.points)).toEqual([2, 2, 2]);
  });

  it('takes off the key’s share where a chord of the new key is named in the old one', () => {
    expect(mark1('G: ii6', 'C: vi6', DEFAULT_RUBRIC, KEYS_ASKED)).toBe('other-frame 1.5');
    expect(reason1('G: ii6', 'C: vi6', KEYS_ASKED)).toBe('The same chord, read in another key.');
  });

  it('calls a modulated chord of a tonicisation the same, and says so', () => {
    expect(mark1('C: V7/V', 'G: V7', DEFAULT_RUBRIC, KEYS_ASKED)).toBe('other-frame 2');
    expect(reason1('C: V7/V', 'G: V7', KEYS_ASKED)).toBe(
      'The same chord in another frame: you change key where the key only tonicises.',
    );
  });

  it('gives the frame the credit of the rubric', () => {
    expect(mark1('C: V7/V', 'G: V7', { ...DEFAULT_RUBRIC, frameCredit: 0.5 }, KEYS_ASKED)).toBe('other-frame 1');
  });

  it('follows through a wrong key when the numeral is right in the right one', () => {
    expect(mark1('G: V7', 'C: V7', DEFAULT_RUBRIC, KEYS_ASKED)).toBe('partly 1.5');
    expect(mark1('G: V7', 'C: V7', { ...DEFAULT_RUBRIC, followThrough: false }, KEYS_ASKED)).toBe('not-this 0');
  });

  it('reads the answer in the given keys whatever region it lies in', () => {
    expect(mark1('G: V7', 'C: V7')).toBe('as-keyed 2');
  });

  it('calls the target by its tonic: V7/V is V7/V in a minor key too', () => {
    expect(mark1('c: V7/V', 'c: V7/v')).toBe('as-keyed 2');
  });
});

describe('compareWithKey on spelling', () => {
  // Source: references §17 item 7 (college-board guidelines 2006, 2021): no enharmonic equivalents for written pitches;
  // the pairs are Integrated Musicianship: Theory, ch. 20a.
  it.each([
    ['B: Ger65', 'C: V7'],
    ['c: viio7', 'a: viio65'],
    ['C: Ger65', 'Db: V7'],
  ])('gives nothing for %s answered %s, which sounds the same', (key, answer) => {
    expect(mark1(key, answer, DEFAULT_RUBRIC, KEYS_ASKED)).toBe('not-this 0');
    expect(errors1(key, answer, KEYS_ASKED)).toContain('enharmonic');
  });

  it('takes N6 and the flat second in first inversion for one chord', () => {
    // Source: references §5 (Open Music Theory; Integrated Musicianship: Theory, ch. 16b).
    expect(mark1('c: N6', 'c: bII6')).toBe('as-keyed 2');
  });
});

describe('compareWithKey by rubric', () => {
  const figures = RUBRIC_PRESETS['numeral-and-figures'].rubric;

  it('gives half for the numeral without its figures', () => {
    // Source: references §17 item 3 (college-board guidelines 2006, 2021): numeral and figure full, numeral alone half.
    expect(mark1('C: V65', 'C: V65', figures)).toBe('as-keyed 1');
    expect(mark1('C: V65', 'C: V7', figures)).toBe('partly 0.5');
    expect(mark1('C: V65', 'C: V', figures)).toBe('partly 0.5');
    expect(mark1('C: V65', 'C: ii65', figures)).toBe('not-this 0');
  });

  it('ignores case only when told to', () => {
    // Source: references §17 item 4 (college-board guidelines 2006–2021): case may be ignored if the teacher says so.
    expect(mark1('C: ii6', 'C: II6', figures)).toBe('as-keyed 1');
    expect(mark1('C: ii6', 'C: II6')).toBe('partly 1.5');
    expect(mark1('C: viio6', 'C: vii6', figures)).toBe('not-this 0');
  });

  it('voids a label for a wrong accidental only when told to', () => {
    // Source: references §17 item 9 (college-board guidelines 2019, 2021): a switch.
    expect(mark1('C: bVI', 'C: VI', figures)).toBe('not-this 0');
    expect(mark1('C: bVI', 'C: VI')).toMatch(/^partly /);
  });

  it('reads V/vi and V of vi as one', () => {
    // Source: references §17 item 5 (2006): synonyms are accepted.
    const spaced = keyReadingFrom('C: V/vi');
    expect(compareWithKey(spaced, readingFrom('C: V~of~vi'), DEFAULT_RUBRIC, GIVEN)[0]?.verdict).toBe('as-keyed');
  });

  it('counts all or nothing when told to', () => {
    expect(mark1('C: V7', 'C: V', RUBRIC_PRESETS['all-or-nothing'].rubric)).toBe('partly 0');
    expect(mark1('C: V7', 'C: V7', RUBRIC_PRESETS['all-or-nothing'].rubric)).toBe('as-keyed 1');
  });

  it('gives the share it says for the right numeral applied to the wrong chord', () => {
    expect(mark1('C: V7/V', 'C: V7/IV')).toBe('partly 1');
    expect(mark1('C: V7/V', 'C: V7/IV', { ...DEFAULT_RUBRIC, targetCredit: 0 })).toBe('not-this 0');
  });
});

describe('compareWithKey with accepted alternatives', () => {
  const key = keyReadingFrom('C: ii6');
  const open = { ...key, labels: key.labels.map((label) => ({ ...label, alternatives: [framedFrom('C: IV')] })) };

  it('takes an alternative for right and says so', () => {
    expect(mark(open, 'C: IV')[0]).toMatchObject({ verdict: 'alternative', points: 2, alternative: 0 });
    expect(mark(open, 'C: ii6')[0]).toMatchObject({ verdict: 'as-keyed', alternative: null });
  });

  it('holds an answer against what it is nearest to', () => {
    expect(mark(open, 'C: IV6')[0]).toMatchObject({ verdict: 'partly', alternative: 0, errors: ['inversion'] });
  });
});

describe('compareWithKey in open segmentation', () => {
  it('gives full marks where chords and changes are the key’s', () => {
    expect(mark('C: I*2 V7*2', 'C: I*2 V7*2', DEFAULT_RUBRIC, OPEN).map((m) => m.points)).toEqual([2, 2]);
  });

  it('does not mind the same chord written twice', () => {
    expect(mark('C: I*2 V7*2', 'C: I I V7*2', DEFAULT_RUBRIC, OPEN).map((m) => m.verdict)).toEqual(['as-keyed', 'as-keyed']);
  });

  it('marks a late change once, on the chord that comes late', () => {
    const marks = mark('C: I*2 V7*2', 'C: I*3 V7', DEFAULT_RUBRIC, OPEN);
    expect(marks.map((m) => m.errors.includes('boundary'))).toEqual([false, true]);
    expect(marks[0]?.points).toBe(2);
    expect(marks[1]?.points).toBeLessThan(2);
  });

  it('marks an early change on the chord that comes early, and the time it takes on the other', () => {
    const marks = mark('C: I*2 V7*2', 'C: I V7*3', DEFAULT_RUBRIC, OPEN);
    expect(marks.map((m) => m.errors.includes('boundary'))).toEqual([false, true]);
    expect(marks[0]?.points).toBe(1);
  });

  it('lets a change be off by the tolerance', () => {
    const tolerant = { ...DEFAULT_RUBRIC, boundaryTolerance: 1 };
    expect(mark('C: I*4 V7*4', 'C: I*5 V7*3', tolerant, OPEN).map((m) => m.points)).toEqual([2, 2]);
  });

  it('wants no change where the key repeats its chord', () => {
    expect(mark('C: I I V', 'C: I*2 V', DEFAULT_RUBRIC, OPEN).map((m) => m.points)).toEqual([2, 2, 2]);
  });

  it('is blank only where nothing was written', () => {
    expect(mark('C: I*2 V*2', 'C: I*4', DEFAULT_RUBRIC, OPEN).map((m) => m.verdict)).toEqual(['as-keyed', 'not-this']);
    expect(mark('C: I*2 V*2', 'C: _*4', DEFAULT_RUBRIC, OPEN).map((m) => m.verdict)).toEqual(['blank', 'blank']);
  });
});
