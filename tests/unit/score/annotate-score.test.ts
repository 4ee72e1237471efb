import { unzipSync, zipSync } from 'fflate';
import { describe, expect, it } from 'vitest';
import { annotateFile } from '@/lib/score/annotate-file';
import { annotateScore } from '@/lib/score/annotate-score';
import type { Annotation } from '@/lib/score/annotation';
import { countAnalysis, importAnalysis } from '@/lib/score/import-analysis';
import { ticks } from '@/lib/score/score';
import { formatLabelsAsCsv } from '@/lib/score/write-csv';
import { unwrap } from '@/lib/result';
import { formatKey, parseKey } from '@/lib/theory/key';
import { formatNumeral } from '@/lib/theory/numeral-format';
import { parseNumeral } from '@/lib/theory/numeral-parse';
import { attributes, backup, note, onePart, partwise } from '../../support/musicxml';
import { mustRead } from '../../support/score-text';

function label(start: number, keyText: string, numeral: string): Annotation {
  const key = unwrap(parseKey(keyText));
  return { start: ticks(start), key, numeral: unwrap(parseNumeral(numeral, key.mode)) };
}

/** `0 C major: V65/V` of each, alternatives after `or`. */
function text(annotations: readonly Annotation[]): string[] {
  const name = ({ key, numeral }: Pick<Annotation, 'key' | 'numeral'>) => `${formatKey(key)}: ${numeral ? formatNumeral(numeral, key.mode) : '-'}`;
  return annotations.map((one) => [`${one.start} ${name(one)}`, ...(one.alternatives ?? []).map(name)].join(' or '));
}

const back = (xml: string, source: 'harmony' | 'figured-bass' | 'lyrics' = 'harmony') => unwrap(importAnalysis(xml, source));
const bar = onePart(note('C4', { duration: 2 }) + note('D4', { duration: 2 }));
const withoutHarmony = (xml: string) => xml.replace(/<harmony[\s\S]*?<\/harmony>\s*/g, '');

describe('annotateScore', () => {
  // Source of the elements and their order: W3C MusicXML 4.0 reference, harmony, numeral, numeral-key.
  it('puts a harmony with numeral, key, kind, inversion and bass before its note', () => {
    const xml = annotateScore(bar, [label(2, 'Eb major', 'V65')]);
    expect(xml.slice(xml.indexOf('<harmony'), xml.indexOf('<note>', xml.indexOf('<harmony')))).toBe(
      '<harmony placement="below" type="explicit"><numeral><numeral-root text="V">5</numeral-root><numeral-key><numeral-fifths>-3</numeral-fifths><numeral-mode>major</numeral-mode></numeral-key></numeral>' +
        '<kind text="65">dominant</kind><inversion>1</inversion><bass><bass-step>D</bass-step></bass></harmony>',
    );
    expect(xml.indexOf('<harmony')).toBeGreaterThan(xml.indexOf('<step>C</step>'));
  });

  it('writes an applied chord as a row of chords, the first read in the key of the next', () => {
    const xml = annotateScore(bar, [label(0, 'C major', 'V7/V')]);
    const heads = [...xml.matchAll(/<numeral-root[^>]*>(\d)<|<kind[^>]*>([a-z]+)</g)].map((match) => match[1] ?? match[2]);
    expect(heads).toEqual(['5', 'dominant', '5', 'major']);
  });

  it('keeps every character of the file outside the harmonies', () => {
    const xml = annotateScore(bar, [label(0, 'C major', 'I'), label(2, 'C major', 'ii')]);
    expect(withoutHarmony(xml).replaceAll(/\s/g, '')).toBe(bar.replaceAll(/\s/g, ''));
    const oneLine = bar.replaceAll('\n', '');
    expect(annotateScore(oneLine, [label(0, 'C major', 'I')]).replace(/<harmony.*<\/harmony>/s, '')).toBe(oneLine);
  });

  it.each([
    ['C major', ['I', 'I6', 'I64', 'Cad64', 'ii65', 'V42', 'vi', 'viiø7', 'viio65', 'N6', 'It6', 'Fr43', 'Ger65', 'CTo7', 'iv', 'bVI', 'bVII', 'V9', 'V+', 'Vb9', 'III+', 'Ped', 'Imaj7']],
    ['C major', ['V7/V', 'viio7/vi', 'viiø43/V', 'V65/IV', 'V7/V/ii', 'viio7/ii', 'Ger65/V', 'V/V', 'IV/V', 'vii°42/iii']],
    ['c# minor', ['i', 'i6', 'iio', 'iiø65', 'III', 'III+', 'iv6', 'V7', 'v', 'VI', 'VII', 'viio7', 'viio43', 'N6', 'I', 'Cad64', 'V7/III', 'viio7/iv', 'V65/VI', 'viio7/V', 'Fr43']],
  ])('in %s comes back as it went: %j', (key, numerals) => {
    const music = onePart(numerals.map(() => note('C4')).join(''));
    const annotations = numerals.map((numeral, i) => label(i, key, numeral));
    const read = back(annotateScore(music, annotations));
    expect(read.unread).toEqual([]);
    expect(read.annotations).toEqual(annotations);
  });

  it('writes alternatives as such, and reads them back', () => {
    const { key, numeral } = label(0, 'G major', 'I');
    const annotated = { ...label(0, 'C major', 'V'), alternatives: numeral ? [{ key, numeral }] : [] };
    const xml = annotateScore(bar, [annotated]);
    expect(xml).toContain('type="alternate"');
    expect(text(back(xml).annotations)).toEqual(['0 C major: V or G major: I']);
  });

  it('ends a label where there is no harmony', () => {
    const { key } = label(0, 'C major', 'I');
    expect(text(back(annotateScore(bar, [label(0, 'C major', 'I'), { start: ticks(2), key, numeral: null }])).annotations)).toEqual(['0 C major: I', '2 C major: -']);
  });

  it('places a label between notes by an offset, exact in thirds', () => {
    const xml = partwise(
      [attributes('<divisions>3</divisions>') + note('C5', { duration: 2 }) + note('D5', { duration: 2 }) + note('E5', { duration: 2 })],
      [attributes('<divisions>1</divisions>') + note('C3', { duration: 2 })],
    );
    const annotations = [label(0, 'C major', 'I'), label(2, 'C major', 'V'), label(4, 'C major', 'vi')];
    const annotated = annotateScore(xml, annotations);
    expect(annotated).toContain('<offset>0.666667</offset>');
    expect(back(annotated).annotations).toEqual(annotations);
  });

  it('writes below the last staff of the last part that sounds as written', () => {
    const piano = attributes('<staves>2</staves>') + note('C5', { duration: 4, staff: 1 }) + backup(4) + note('C3', { duration: 4, voice: '5', staff: 2 });
    const clarinet = attributes('<transpose><diatonic>-1</diatonic><chromatic>-2</chromatic></transpose>') + note('D5', { duration: 4 });
    const xml = annotateScore(partwise([piano], [clarinet]), [label(0, 'C major', 'I')]);
    expect(xml).toContain('<staff>2</staff></harmony>');
    expect(xml.indexOf('<harmony')).toBeLessThan(xml.indexOf('<part id="P2">'));
  });

  it('writes keys and basses transposed where every part transposes', () => {
    const clarinet = onePart(attributes('<transpose><diatonic>-1</diatonic><chromatic>-2</chromatic></transpose>') + note('D5', { duration: 4 }));
    const xml = annotateScore(clarinet, [label(0, 'C major', 'I6')]);
    expect(xml).toContain('<numeral-fifths>2</numeral-fifths>');
    expect(xml).toContain('<bass-step>F</bass-step>');
    expect(text(back(xml).annotations)).toEqual(['0 C major: I6']);
  });

  it('follows the file’s line ends and indentation', () => {
    const xml = annotateScore('<score-partwise>\r\n  <part id="P1">\r\n    <measure>\r\n      <note><rest/><duration>4</duration></note>\r\n    </measure>\r\n  </part>\r\n</score-partwise>', [label(0, 'C major', 'I')]);
    expect(xml).toContain('\r\n      <harmony placement="below" type="explicit">\r\n        <numeral>\r\n');
    expect(xml).toContain('\r\n      </harmony>\r\n      <note>');
    expect(xml.replaceAll('\r\n', '')).not.toContain('\n');
  });

  it('gives the untouched text without labels', () => {
    expect(annotateScore(bar, [])).toBe(bar);
  });
});

describe('annotateFile keeps the file’s own bytes', () => {
  const labels = [label(0, 'C major', 'viiø7'), label(2, 'C major', 'I')];
  const titled = bar.replace('<part-list>', '<work><work-title>Für ♭ 𝄪</work-title></work><part-list>');
  const encodeWide = (xml: string, littleEndian: boolean) => {
    const bytes = new Uint8Array(2 * xml.length);
    for (let i = 0; i < xml.length; i += 1) new DataView(bytes.buffer).setUint16(2 * i, xml.charCodeAt(i), littleEndian);
    return bytes;
  };

  it.each([
    ['UTF-8', new TextEncoder().encode(titled)],
    ['UTF-8 with a mark', new TextEncoder().encode(`\uFEFF${titled}`)],
    ['UTF-16', encodeWide(`\uFEFF${titled.replace('UTF-8', 'UTF-16')}`, true)],
    ['UTF-16, big end first', encodeWide(`\uFEFF${titled.replace('UTF-8', 'UTF-16')}`, false)],
    ['Latin-1', Uint8Array.from(bar.replace('UTF-8', 'ISO-8859-1').replace('Part 1', 'Für Ö'), (sign) => sign.charCodeAt(0))],
  ])('in %s', (_, bytes) => {
    const written = unwrap(annotateFile(bytes, labels));
    let at = 0;
    for (const byte of written) if (byte === bytes[at]) at += 1;
    expect(at).toBe(bytes.length);
    const again = unwrap(annotateFile(written, []));
    expect(again).toEqual(written);
  });

  it('writes an .mxl as an .mxl: mimetype first and stored, other entries kept', () => {
    const encode = (xml: string) => new TextEncoder().encode(xml);
    const container = encode('<container><rootfiles><rootfile full-path="a/score.xml"/></rootfiles></container>');
    const mxl = zipSync({ 'META-INF/container.xml': container, 'a/score.xml': encode(bar), 'picture.png': Uint8Array.of(1, 2, 3) });
    const written = unwrap(annotateFile(mxl, labels));
    // Source: W3C MusicXML 4.0, "Compressed .MXL files": the text can be read at byte 38 of the file.
    expect(new TextDecoder().decode(written.subarray(30, 72))).toBe('mimetypeapplication/vnd.recordare.musicxml');
    const entries = unzipSync(written);
    expect(Object.keys(entries)).toEqual(['mimetype', 'META-INF/container.xml', 'a/score.xml', 'picture.png']);
    expect(entries['picture.png']).toEqual(Uint8Array.of(1, 2, 3));
    expect(back(new TextDecoder().decode(entries['a/score.xml'])).annotations).toEqual(labels);
  });

  it('refuses what cannot be read', () => {
    expect(annotateFile(new TextEncoder().encode('<html>'), labels)).toMatchObject({ ok: false, error: { code: 'not_musicxml' } });
  });
});

describe('importAnalysis reads what other programs write', () => {
  const key = (fifths: number, mode = 'major') => attributes(`<key><fifths>${fifths}</fifths><mode>${mode}</mode></key>`);
  const harmony = (content: string, attribute = '') => `<harmony${attribute}>${content}</harmony>`;

  it('numerals without their key, in the key signature', () => {
    const numeral = harmony('<numeral><numeral-root>5</numeral-root></numeral><kind>dominant</kind><inversion>3</inversion>');
    expect(text(back(onePart(key(-3, 'minor') + numeral + note('F4'))).annotations)).toEqual(['0 C minor: V42']);
  });

  it('leading-tone chords in minor against the natural scale', () => {
    const numeral = harmony('<numeral><numeral-root>7</numeral-root><numeral-alter>1</numeral-alter></numeral><kind>diminished-seventh</kind>');
    expect(text(back(onePart(key(-3, 'minor') + numeral + note('B4'))).annotations)).toEqual(['0 C minor: vii°7']);
  });

  it('the older function element', () => {
    expect(text(back(onePart(key(0) + harmony('<function>V7</function><kind>dominant</kind>') + note('G4'))).annotations)).toEqual(['0 C major: V7']);
  });

  it('chord symbols, by the key signature', () => {
    const symbol = harmony('<root><root-step>B</root-step><root-alter>-1</root-alter></root><kind>dominant</kind><bass><bass-step>D</bass-step></bass>');
    expect(text(back(onePart(key(-3) + symbol + note('D4'))).annotations)).toEqual(['0 Eb major: V65']);
  });

  it('keeps what cannot be read for the teacher to see', () => {
    expect(back(onePart(key(0) + harmony('<root><root-step>C</root-step></root><kind>Tristan</kind>') + note('C4'))).unread).toEqual([{ bar: '1', text: 'C Tristan' }]);
  });

  it('figured bass over the lowest note', () => {
    // Source of the figures: Open Music Theory v1 (CC BY-SA 4.0), "Thoroughbass figures".
    const figure = (number: string, prefix = '') => `<figure>${prefix && `<prefix>${prefix}</prefix>`}${number && `<figure-number>${number}</figure-number>`}</figure>`;
    const figured = (figures: string) => `<figured-bass>${figures}</figured-bass>`;
    const bass: readonly [string, string][] = [['C3', ''], ['E3', figure('6')], ['F3', figure('4') + figure('2')], ['B2', figure('6') + figure('5')], ['D3', figure('4') + figure('3')], ['F3', figure('7')]];
    const xml = onePart(key(0) + bass.map(([pitch, figures]) => figured(figures) + note(pitch)).join(''));
    expect(text(back(xml, 'figured-bass').annotations)).toEqual(['0 C major: I', '1 C major: I6', '2 C major: V42', '3 C major: V65', '4 C major: V43', '5 C major: IV7']);
    const minor = onePart(key(-3, 'minor') + figured(figure('', 'natural')) + note('G2') + figured(figure('7')) + note('G2'));
    expect(text(back(minor, 'figured-bass').annotations)).toEqual(['0 C minor: V', '1 C minor: v7']);
  });

  it('numerals in a lyric verse, with a key before them', () => {
    const sung = (verse: string, syllable: string) => `<lyric number="${verse}"><text>${syllable}</text></lyric>`;
    const xml = onePart(
      key(0) + note('C4', { after: sung('1', 'Nun') + sung('2', 'G: I') }) + note('D4', { after: sung('1', 'I') + sung('2', 'V65') }) + note('E4', { after: sung('1', 'ruh') + sung('2', 'd: viio7') }),
    );
    expect(text(back(xml, 'lyrics').annotations)).toEqual(['0 G major: I', '1 G major: V65', '2 D minor: vii°7']);
  });
});

describe('formatLabelsAsCsv', () => {
  it('has a line per label with its notes, and none for a place without harmony', () => {
    const score = mustRead(bar);
    const { key } = label(0, 'C major', 'I');
    const csv = formatLabelsAsCsv(score, [label(0, 'C major', 'V65/V'), { start: ticks(2), key, numeral: null }], 4);
    expect(csv).toBe('bar,onset,duration,key,numeral,root,bass,tones,quality,inversion\r\n1,0,2,C major,V65/V,D,F#,F# A C D,dominant-seventh,1\r\n');
  });

  it('cannot smuggle a formula into a spreadsheet', () => {
    const score = mustRead(onePart(['number="=1+1"', note('C4')]));
    expect(formatLabelsAsCsv(score, [label(0, 'C major', 'I')], 1)).toContain("\r\n'=1+1,");
  });
});

describe('countAnalysis', () => {
  it('says what a teacher may import', () => {
    const sung = '<lyric number="1"><text>V7</text></lyric>';
    const xml = onePart('<figured-bass><figure><figure-number>6</figure-number></figure></figured-bass>' + note('C4', { after: sung }) + note('D4'));
    expect(unwrap(countAnalysis(annotateScore(xml, [label(0, 'C major', 'I'), label(1, 'C major', 'V')])))).toEqual({ harmony: 2, 'figured-bass': 1, lyrics: 1 });
  });
});
