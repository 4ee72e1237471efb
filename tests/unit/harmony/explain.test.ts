import { describe, expect, it } from 'vitest';
import { explainLabel } from '@/lib/harmony/explain';
import { type Label, type Reading, type Why } from '@/lib/harmony/reading';
import { ticks } from '@/lib/score/score';
import { unwrap } from '@/lib/result';
import { parseNumeral } from '@/lib/theory/numeral-parse';
import { formatPitchClass } from '@/lib/theory/pitch';
import { keyFrom, scoreFrom } from '../../support/notation';

/** The score, and a reading whose labels last the given numbers of ticks. */
function why(notation: string, labels: readonly (readonly [string, number])[], index: number): Why {
  const score = scoreFrom(notation);
  const key = keyFrom(notation);
  let at = 0;
  const list = labels.map(([text, length], i): Label => {
    const start = at;
    at += length * score.ticksPerQuarter;
    return { id: String(i), start: ticks(start), end: ticks(at), key, numeral: unwrap(parseNumeral(text, key.mode)), state: 'changed', certainty: null, others: [] };
  });
  const reading: Reading = { start: ticks(0), end: ticks(at), regions: [{ start: ticks(0), end: ticks(at), key }], labels: list };
  return explainLabel(score, reading, index);
}

const kinds = (evidence: Why) => evidence.nonChordTones.map(({ pitch, kind }) => `${formatPitchClass(pitch.fifths)} ${kind}`);
const tendencies = (evidence: Why) => evidence.tendencyTones.map(({ pitch, kind, resolution }) => `${formatPitchClass(pitch.fifths)} ${kind} ${resolution}`);

describe('explainLabel: chord tones', () => {
  it('gives each its role', () => {
    const roles = why('C: g2 f4 b4 d5 | c3 e4 c5', [['V7', 1], ['I', 1]], 0).chordTones.map(({ role }) => role);
    expect(roles.toSorted()).toEqual(['fifth', 'root', 'seventh', 'third']);
  });

  it('says which are missing', () => {
    expect(why('C: g2 f4 b4 | c3 e4 c5', [['V7', 1], ['I', 1]], 0).missing).toEqual(['fifth']);
  });

  it('knows a tone that is written enharmonically', () => {
    // Source: Integrated Musicianship: Theory, ch. 20a: vii°7 in c is B-D-F-A♭; G♯ for A♭ is a misspelling there.
    const tones = why('c: b3 d4 f4 g#4 | c4 eb4 g4', [['viio7', 1], ['i', 1]], 0).chordTones;
    expect(tones.filter((tone) => tone.misspelled).map(({ pitch }) => formatPitchClass(pitch.fifths))).toEqual(['G#']);
  });
});

// Source: Open Music Theory v1 (CC BY-SA 4.0), embellishing tones; examples of the project's references, section 11.
describe('explainLabel: non-chord tones', () => {
  it('names a passing tone: soprano E–D–C over C', () => {
    expect(kinds(why('C: c3 g3 e4 | ~c3 ~g3 d4 | ~c3 ~g3 c4 *2', [['I', 4]], 0))).toEqual(['D passing']);
  });

  it('names a neighbour: G–A–G over C', () => {
    expect(kinds(why('C: c3 e3 g4 | ~c3 ~e3 a4 | ~c3 ~e3 g4 *2', [['I', 4]], 0))).toEqual(['A neighbour']);
  });

  it('names a 4–3 suspension: F held over C, then E', () => {
    expect(kinds(why('C: f3 a3 c4 f4 | c3 g3 c4 ~f4 | ~c3 ~g3 ~c4 e4', [['IV', 1], ['I', 2]], 1))).toEqual(['F suspension']);
  });

  it('names a retardation: B held over C, then C', () => {
    expect(kinds(why('C: g2 d4 g4 b4 | c3 e4 g4 ~b4 | ~c3 ~e4 ~g4 c5', [['V', 1], ['I', 2]], 1))).toEqual(['B retardation']);
  });

  it('names an anticipation', () => {
    expect(kinds(why('C: g2 b3 d4 *3/4 | ~g2 ~b3 c4 *1/4 | c3 e3 c4', [['V', 1], ['I', 1]], 0))).toEqual(['C anticipation']);
  });

  it('names an appoggiatura: reached by leap, left by step', () => {
    expect(kinds(why('C: f3 a3 f4 | c3 g3 b4 | ~c3 ~g3 c5', [['IV', 1], ['I', 2]], 1))).toEqual(['B appoggiatura']);
  });

  it('names an escape tone: left by leap', () => {
    expect(kinds(why('C: c3 g3 e4 | ~c3 ~g3 f4 | ~c3 ~g3 c4 *2', [['I', 4]], 0))).toEqual(['F escape']);
  });

  it('names a pedal held through changes', () => {
    expect(kinds(why('C: c3 e4 g4 | ~c3 d4 g4 b4 | ~c3 e4 g4 c5', [['I', 1], ['V', 1], ['I', 1]], 1))).toEqual(['C pedal']);
  });
});

// Source: Open Music Theory v1, functional dissonances: ti rises to do, the seventh falls by step.
describe('explainLabel: tendency tones', () => {
  it('sees leading tone and seventh resolve', () => {
    expect(tendencies(why('C: g2 d4 f4 b4 | c3 c4 e4 c5', [['V7', 1], ['I', 1]], 0)).toSorted()).toEqual(['B leading-tone as-expected', 'F seventh as-expected']);
  });

  it('sees a leading tone fall to the fifth', () => {
    expect(tendencies(why('C: g2 b3 d4 g4 | c3 g3 e4 g4', [['V', 1], ['I', 1]], 0))).toEqual(['B leading-tone irregular']);
  });

  it('sees a seventh resolve late', () => {
    expect(tendencies(why('C: g2 b3 d4 f4 | c3 c4 e4 ~f4 | ~c3 ~c4 ~e4 e4', [['V7', 1], ['I', 2]], 0))).toContain('F seventh delayed');
  });

  it('says the rule of quality for an applied leading-tone seventh', () => {
    // Source: Integrated Musicianship: Theory, ch. 14b–c: before a minor target fully diminished.
    expect(why('C: c#4 e4 g4 bb4 | d4 f4 a4', [['viio7/ii', 1], ['ii', 1]], 0).sentences.join(' ')).toContain('Before a minor chord (D)');
  });
});

// Source: Integrated Musicianship: Theory, ch. 18b: D♯°7→C is common-tone, D♯°7→e is vii°7 of iii.
describe('explainLabel: common-tone °7', () => {
  const commonTone = (notation: string, goal: string) => why(notation, [['viio7/iii', 1], [goal, 1]], 0).sentences.some((sentence) => sentence.includes('common-tone'));

  it('hears a °7 that turns around the next root', () => {
    expect(commonTone('C: d#3 f#3 a3 c4 | c3 e3 g3 c4', 'I')).toBe(true);
  });

  it('hears the same °7 resolve as a leading-tone chord', () => {
    expect(commonTone('C: d#3 f#3 a3 c4 | e3 g3 b3 e4', 'iii')).toBe(false);
  });
});

describe('explainLabel: the whole', () => {
  it('names a perfect authentic cadence at the end', () => {
    // Source: Open Music Theory v1, cadence types.
    expect(why('C: f3 a3 c4 f4 *2 | g2 g3 b3 d4 *2 | c3 g3 e4 c5 *4', [['IV', 2], ['V', 2], ['I', 4]], 2).sentences.join(' ')).toContain('perfect authentic cadence');
  });

  it('gives terms for the right label and against a wrong one', () => {
    const right = why('C: c3 e4 g4 c5 | g2 d4 g4 b4', [['I', 1], ['V', 1]], 0);
    const wrong = why('C: c3 e4 g4 c5 | g2 d4 g4 b4', [['ii', 1], ['V', 1]], 0);
    const sum = (terms: Why['termsFor']) => terms.reduce((all, term) => all + term.weight, 0);
    expect(sum(right.termsFor) + sum(right.termsAgainst)).toBeGreaterThan(sum(wrong.termsFor) + sum(wrong.termsAgainst));
  });

  it('has nothing to say of a blank', () => {
    const score = scoreFrom('C: c3 e4 g4');
    const key = keyFrom('C: c4');
    const blank: Label = { id: 'a', start: ticks(0), end: ticks(1), key, numeral: null, state: 'changed', certainty: null, others: [] };
    expect(explainLabel(score, { start: ticks(0), end: ticks(1), regions: [], labels: [blank] }, 0).sentences).toEqual([]);
  });
});
