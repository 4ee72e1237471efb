import { describe, expect, it } from 'vitest';
import { attributes, note, onePart, partwise, time } from '../../support/musicxml';
import { barsText, mustRead, notesText, quarters } from '../../support/score-text';

// Source of what each element means: W3C MusicXML 4.0 reference, the element's own page, unless a test says otherwise.

const metre = (beats: string, beatType: number) => attributes(time(beats, beatType));
const offsets = (xml: string) => {
  const score = mustRead(xml);
  return score.bars.map(({ offset }) => quarters(score, offset)).join(' ');
};

describe('bars of a score', () => {
  it('keep their printed numbers: 12a, X1, none', () => {
    const xml = onePart(['number="12a"', note('C4', { duration: 4 })], ['number="X1" implicit="yes"', note('C4', { duration: 4 })], ['', note('C4', { duration: 4 })]);
    expect(barsText(mustRead(xml))).toBe('12a:4 X1:4 :4');
  });

  it('are as long as their longest part, and as their metre when empty', () => {
    const xml = partwise([metre('3', 4), note('C4', { duration: 5 }), note('C4', { duration: 3 })], ['', note('C3', { duration: 4 }), note('C3', { duration: 2 })]);
    expect(barsText(mustRead(xml))).toBe('1:3 2:5 3:3');
  });

  it('tile the score, so that a short part does not drift', () => {
    const xml = partwise([note('C5', { duration: 4 }), note('C5', { duration: 4 })], [note('C3', { duration: 1 }), note('C3', { duration: 4 })]);
    expect(notesText(mustRead(xml))).toBe('C5@0:4 C3@0:1 C5@4:4 C3@4:4');
  });

  it('count an upbeat from the bar’s end', () => {
    expect(offsets(onePart(['number="0" implicit="yes"', metre('3', 4) + note('C4')], note('D4', { duration: 3 })))).toBe('2 0');
  });

  it('take a short first bar for an upbeat even when it is numbered', () => {
    expect(offsets(onePart(metre('4', 4) + note('C4'), note('D4', { duration: 4 })))).toBe('3 0');
  });

  it('go on where the first half of a split bar ended', () => {
    const xml = onePart(metre('4', 4) + note('C4', { duration: 4 }), note('C4', { duration: 3 }), ['number="X1" implicit="yes"', note('D4')], note('E4', { duration: 4 }));
    expect(offsets(xml)).toBe('0 0 3 0');
  });

  it('take an implicit bar after a full one for a new upbeat', () => {
    const xml = onePart(metre('4', 4) + note('C4', { duration: 4 }), ['number="X1" implicit="yes"', note('D4')], note('E4', { duration: 4 }));
    expect(offsets(xml)).toBe('0 3 0');
  });

  it('do not take a short last bar for an upbeat', () => {
    expect(offsets(onePart(metre('4', 4) + note('C4', { duration: 4 }), note('D4', { duration: 3 })))).toBe('0 0');
  });

  it('keep every bar of a multi-bar rest', () => {
    const rest = '<measure-style><multiple-rest>2</multiple-rest></measure-style>';
    expect(barsText(mustRead(onePart(metre('2', 4) + attributes(rest) + note('r', { duration: 2 }), note('r', { duration: 2 }))))).toBe('1:2 2:2');
  });
});

describe('metres and keys of a score', () => {
  const metres = (xml: string) => mustRead(xml).bars.map((bar) => (bar.time ? `${bar.time.beats.join('+')}/${bar.time.beatType}` : '-'));

  it('are compound, additive, several side by side, or none', () => {
    const two = attributes('<time><beats>3</beats><beat-type>8</beat-type><beats>2</beats><beat-type>4</beat-type></time>');
    const none = attributes('<time><senza-misura/></time>');
    const xml = onePart(metre('6', 8), metre('3+2', 8), two, none + note('C4', { duration: 7 }));
    expect(metres(xml)).toEqual(['6/8', '3+2/8', '3+4/8', '-']);
    expect(barsText(mustRead(xml))).toBe('1:3 2:5/2 3:7/2 4:7');
  });

  it('are none where the file states none', () => {
    expect(metres(onePart(note('C4', { duration: 4 })))).toEqual(['-']);
  });

  it('change in mid-bar at their own place', () => {
    const key = (fifths: number) => `<key><fifths>${fifths}</fifths><mode>minor</mode></key>`;
    const score = mustRead(onePart(attributes(time('4', 4) + key(0)) + note('C4', { duration: 2 }) + attributes(time('2', 4) + key(-3)) + note('D4', { duration: 2 }), note('E4', { duration: 2 })));
    expect(score.keySignatures.map(({ start, fifths, mode }) => `${quarters(score, start)} ${fifths} ${mode}`)).toEqual(['0 0 minor', '2 -3 minor']);
    expect(score.timeSignatures.map(({ start, beats }) => `${quarters(score, start)} ${beats.join()}`)).toEqual(['0 4', '2 2']);
    expect(score.bars.map((bar) => bar.time?.beats[0])).toEqual([4, 2]);
  });

  it('come from the first part with pitches', () => {
    const drum = '<note><unpitched/><duration>4</duration></note>';
    const key = (fifths: number) => attributes(`<key><fifths>${fifths}</fifths></key>`);
    expect(mustRead(partwise([key(0) + drum], [key(3) + note('A4', { duration: 4 })])).keySignatures.map(({ fifths }) => fifths)).toEqual([3]);
  });

  it('leave out a key of single accidentals, which has no place on the line of fifths', () => {
    expect(mustRead(onePart(attributes('<key><key-step>F</key-step><key-alter>1</key-alter></key>') + note('C4'))).keySignatures).toEqual([]);
  });
});
