import { describe, expect, it } from 'vitest';
import { sliceBeats } from '@/lib/score/beats';
import { metricalLevel } from '@/lib/score/metre';
import type { Note, Score } from '@/lib/score/score';
import { sliceSonorities } from '@/lib/score/sonorities';
import { attributes, backup, forward, note, onePart, time } from '../../support/musicxml';
import { scoreFrom } from '../../support/notation';
import { mustRead, pitchText, quarters } from '../../support/score-text';

const names = (notes: readonly Note[]) => notes.map(({ pitch }) => pitchText(pitch)).join(' ');

describe('sliceSonorities', () => {
  const text = (score: Score, options?: { atBarlines: boolean }) =>
    sliceSonorities(score, options).map(({ start, end, sounding, attacked }) => `${quarters(score, start)}-${quarters(score, end)} ${names(sounding)} (${names(attacked)})`);

  it('begins one at every onset, with what sounds from the bass up', () => {
    expect(text(scoreFrom('C: c3 e4 | c3 g4 e4'))).toEqual(['0-1 C3 E4 (C3 E4)', '1-2 C3 E4 G4 (C3 E4 G4)']);
  });

  it('carries held notes on without attacking them', () => {
    expect(text(scoreFrom('C: c3 g4 *2 | f3 ~g4'))).toEqual(['0-2 C3 G4 (C3 G4)', '2-3 F3 G4 (F3)']);
  });

  it('begins an empty one where everything falls silent', () => {
    expect(text(scoreFrom('C: c4 | - *2 | d4'))).toEqual(['0-1 C4 (C4)', '1-3  ()', '3-4 D4 (D4)']);
  });

  it('tiles from the first note to the last release', () => {
    const slices = sliceSonorities(scoreFrom('C: - | c4 *1/2 | d4 e4 *3/2 | ~d4 f4'));
    expect(slices[0]?.start).toBe(2);
    expect(slices.slice(1).every((slice, i) => slice.start === slices[i]?.end)).toBe(true);
  });

  it('goes on over a barline unless asked to stop there', () => {
    const held = scoreFrom('C 2/4: c4 *4 | d4');
    expect(text(held)).toEqual(['0-4 C4 (C4)', '4-5 D4 (D4)']);
    expect(text(held, { atBarlines: true })).toEqual(['0-2 C4 (C4)', '2-4 C4 ()', '4-5 D4 (D4)']);
  });

  it('is exact where voices in thirds and in quarters meet', () => {
    const xml = onePart(attributes('<divisions>12</divisions>') + note('C5', { duration: 4 }) + note('D5', { duration: 4 }) + note('E5', { duration: 4 }) + backup(12) + note('C4', { duration: 9, voice: '2' }) + note('D4', { duration: 3, voice: '2' }));
    expect(text(mustRead(xml)).map((line) => line.split(' ')[0])).toEqual(['0-1/3', '1/3-2/3', '2/3-3/4', '3/4-1']);
  });

  it('puts the bar and the metrical weight with each', () => {
    const slices = sliceSonorities(scoreFrom('C: c4 | d4 | e4 | f4 *1/2 | g4 *1/2 | a4'));
    expect(slices.map(({ bar, level }) => `${bar}:${level}`)).toEqual(['0:0', '0:2', '0:1', '0:2', '0:3', '1:0']);
  });

  it('gives nothing for a score without notes', () => {
    expect(sliceSonorities(scoreFrom('C: -'))).toEqual([]);
  });
});

describe('metricalLevel', () => {
  // Common practice, no source.
  const levels = (beats: string, beatType: number, divisions: number, step: number) => {
    const score = mustRead(onePart(attributes(`<divisions>${divisions}</divisions>${time(beats, beatType)}`)));
    const bar = score.bars[0];
    if (!bar) throw new Error('a score has bars');
    const count = (bar.length / score.ticksPerQuarter) * (divisions / step);
    return Array.from({ length: count }, (_, i) => metricalLevel(score, bar, (i * step * score.ticksPerQuarter) / divisions)).join('');
  };

  it.each([
    ['4', 4, 2, 1, '03231323'],
    ['2', 4, 4, 1, '04341434'],
    ['3', 4, 2, 1, '032323'],
    ['2', 2, 2, 2, '0313'],
    ['6', 8, 2, 1, '033133'],
    ['9', 8, 2, 1, '033233233'],
    ['12', 8, 2, 1, '033233133233'],
    ['3', 8, 4, 1, '032323'],
    ['3+2', 8, 2, 1, '02212'],
    ['5', 4, 1, 1, '02222'],
  ])('in %s/%s', (beats, beatType, divisions, step, expected) => {
    expect(levels(beats, beatType, divisions, step)).toBe(expected);
  });

  it('counts an upbeat from the end of its bar', () => {
    const score = mustRead(onePart(attributes(time('4', 4)) + note('C4', { duration: 2 }), note('D4', { duration: 4 })));
    expect(score.bars[0] && [metricalLevel(score, score.bars[0], 0), metricalLevel(score, score.bars[0], 1)]).toEqual([1, 2]);
  });

  it('gives tuplets between the beats the lowest weight', () => {
    expect(levels('2', 4, 3, 1)).toBe('044144');
  });

  it('takes a bar without metre in quarters', () => {
    const score = mustRead(onePart(note('C4', { duration: 3 })));
    expect(score.bars[0] && [0, 1, 2].map((at) => metricalLevel(score, score.bars[0] as never, at))).toEqual([0, 2, 2]);
  });
});

describe('sliceBeats', () => {
  const text = (score: Score) => sliceBeats(score).map(({ start, end, notes }) => `${quarters(score, start)}-${quarters(score, end)} ${notes.map(({ note: one, sounds, attacked }) => `${pitchText(one.pitch)}${attacked ? '' : '~'}${quarters(score, sounds)}`).join(' ')}`);

  it('gathers a broken chord into its beat, with each note’s share', () => {
    expect(text(scoreFrom('C 2/4: c3 *1/2 | e3 *1/2 | g3'))).toEqual(['0-1 C31/2 E31/2', '1-2 G31']);
  });

  it('tells held notes from attacked ones, and keeps silent beats', () => {
    expect(text(scoreFrom('C 3/4: c3 *2 | -'))).toEqual(['0-1 C31', '1-2 C3~1', '2-3 ']);
  });

  it('has the beats of a compound metre', () => {
    const xml = onePart(attributes(`<divisions>2</divisions>${time('6', 8)}`) + note('C4', { duration: 3 }) + forward(3));
    expect(text(mustRead(xml))).toEqual(['0-3/2 C43/2', '3/2-3 ']);
  });
});
