// @vitest-environment jsdom
import { describe, expect, it } from 'vitest';
import { sliceMeasures } from '@/components/score/slice-measures';
import { unwrap } from '@/lib/result';
import { readScoreText } from '@/lib/score/read-score';
import { midiOf } from '@/lib/theory/pitch';
import { attributes, note, partwise } from '../../../support/musicxml';
import { quartetXml } from '../../../support/quartet';

function slice(xml: string, first: number, last: number): string {
  return new XMLSerializer().serializeToString(sliceMeasures(new DOMParser().parseFromString(xml, 'application/xml'), first, last));
}

describe('sliceMeasures', () => {
  it('keeps the bars asked for in every part, with the notes they have in the whole', () => {
    const xml = quartetXml(40);
    const [whole, part] = [xml, slice(xml, 17, 20)].map((text) => unwrap(readScoreText(text)));
    expect(part!.bars.map((bar) => bar.number)).toEqual(['18', '19', '20', '21']);
    const from = whole!.bars[17]!.start;
    const until = whole!.bars[21]!.start;
    const expected = whole!.notes.filter((n) => n.start >= from && n.start < until).map((n) => [midiOf(n.pitch), n.start - from, n.duration, n.part]);
    expect(part!.notes.map((n) => [midiOf(n.pitch), n.start, n.duration, n.part])).toEqual(expected);
  });

  it('opens with the attributes in force, later ones in place of earlier ones', () => {
    const whole = (pitch: string) => note(pitch, { duration: 4 });
    const xml = partwise([
      attributes('<divisions>1</divisions><key><fifths>2</fifths></key><time><beats>4</beats><beat-type>4</beat-type></time>') + whole('D4'),
      attributes('<key><fifths>-3</fifths></key>') + whole('E4'),
      whole('F4'),
    ]);
    const score = unwrap(readScoreText(slice(xml, 2, 2)));
    expect(score.keySignatures[0]).toMatchObject({ fifths: -3 });
    expect(score.bars[0]!.time).toMatchObject({ beats: [4], beatType: 4 });
  });

  it('drops ends whose beginnings were cut away', () => {
    const tied = (types: string) => note('C4', { duration: 4, after: types });
    const xml = partwise([
      attributes('<divisions>1</divisions>') + tied('<tie type="start"/><notations><tied type="start"/></notations>'),
      tied('<tie type="stop"/><notations><tied type="stop"/></notations>'),
    ]);
    expect(slice(xml, 1, 1)).not.toContain('stop');
    expect(slice(xml, 0, 1)).toContain('stop');
  });

  it('leaves the document as it was', () => {
    const document = new DOMParser().parseFromString(quartetXml(6), 'application/xml');
    const before = new XMLSerializer().serializeToString(document);
    sliceMeasures(document, 2, 3);
    expect(new XMLSerializer().serializeToString(document)).toBe(before);
  });
});
