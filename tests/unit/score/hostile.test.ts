import { zipSync } from 'fflate';
import { describe, expect, it } from 'vitest';
import { READ_BOUNDS, readInThread } from '@/lib/jobs/in-thread';
import { DEFAULT_LIMITS } from '@/lib/score/limits';
import { readScore, readScoreText } from '@/lib/score/read-score';
import type { ScoreError } from '@/lib/score/score';
import { attributes, backup, note, onePart } from '../../support/musicxml';
import { mustRefuse } from '../../support/score-text';

const bytesOf = (text: string) => new TextEncoder().encode(text);
const plain = onePart(note('C4', { duration: 4 }));
const containerOf = (path: string) => bytesOf(`<container><rootfiles><rootfile full-path="${path}"/></rootfiles></container>`);

function refusalOf(bytes: Uint8Array): ScoreError {
  const result = readScore(bytes);
  if (result.ok) throw new Error('read, though it should be refused');
  return result.error;
}

/** Overwrites a 32-bit number behind every occurrence of a zip signature. */
function patchZip(bytes: Uint8Array, signature: number, offset: number, value: number): Uint8Array {
  const patched = bytes.slice();
  const view = new DataView(patched.buffer);
  for (let at = 0; at + offset + 4 <= patched.length; at += 1) {
    if (view.getUint32(at, true) === signature) view.setUint32(at + offset, value, true);
  }
  return patched;
}

const DIRECTORY_ENTRY = 0x02014b50;

describe('readScore refuses hostile archives by name', () => {
  const mxl = zipSync({ 'META-INF/container.xml': containerOf('score.xml'), 'score.xml': bytesOf(plain) });

  it('reads the archive they are made from', () => {
    expect(readScore(mxl).ok).toBe(true);
  });

  it('a zip bomb, counted as it comes out', () => {
    const bomb = zipSync({ 'score.xml': new Uint8Array(101 * 1024 * 1024) }, { level: 1 });
    expect(refusalOf(patchZip(bomb, DIRECTORY_ENTRY, 24, 1000)).code).toBe('zip_bomb');
    expect(refusalOf(bomb).code).toBe('zip_bomb');
  });

  it('a claim of a gigabyte in a header', () => {
    expect(refusalOf(patchZip(mxl, DIRECTORY_ENTRY, 24, 1024 ** 3)).code).toBe('zip_bomb');
  });

  it('a zip inside a zip', () => {
    expect(refusalOf(zipSync({ 'META-INF/container.xml': containerOf('inner.mxl'), 'inner.mxl': mxl })).code).toBe('zip_no_score');
  });

  it.each(['../../etc/passwd', '/etc/passwd', 'a/../../b.xml', 'C:\\score.xml', '..\\b.xml'])('a container that names %s', (path) => {
    expect(refusalOf(zipSync({ 'META-INF/container.xml': containerOf(path), 'score.xml': bytesOf(plain) }))).toMatchObject({ code: 'zip_bad_path', element: 'rootfile' });
  });

  it('a container that names what is not there, or nothing', () => {
    expect(refusalOf(zipSync({ 'META-INF/container.xml': containerOf('b.xml'), 'score.xml': bytesOf(plain) })).code).toBe('zip_no_score');
    expect(refusalOf(zipSync({ 'META-INF/container.xml': bytesOf('<container/>'), 'score.xml': bytesOf(plain) })).code).toBe('zip_no_score');
    expect(refusalOf(zipSync({ 'readme.txt': bytesOf('hello') })).code).toBe('zip_no_score');
  });

  it('more than 64 entries', () => {
    const many = Object.fromEntries(Array.from({ length: 65 }, (_, i) => [`${i}.xml`, bytesOf(plain)]));
    expect(refusalOf(zipSync(many)).code).toBe('zip_too_many_entries');
  });

  it('an archive cut short at any place', () => {
    for (let length = 4; length < mxl.length; length += 1) expect(refusalOf(mxl.slice(0, length)).code).toMatch(/^zip_/);
  });

  it('an entry whose bytes were changed', () => {
    const start = mxl.length - 400;
    const changed = mxl.map((byte, i) => (i === start ? byte ^ 0xff : byte));
    expect(refusalOf(changed).code).toMatch(/^zip_/);
  });

  it('an encrypted entry', () => {
    const encrypted = patchZip(mxl, DIRECTORY_ENTRY, 8, 0x00080001);
    expect(refusalOf(encrypted).code).toBe('zip_broken');
  });

  it('a file over ten megabytes', () => {
    expect(refusalOf(new Uint8Array(10 * 1024 * 1024 + 1)).code).toBe('file_too_large');
  });
});

describe('readScoreText refuses hostile text by name and place', () => {
  it('entities that expand, and entities from outside', () => {
    const bomb = `<!DOCTYPE score-partwise [<!ENTITY a "aaaaaaaa"><!ENTITY b "&a;&a;&a;&a;">]>\n<score-partwise>&b;</score-partwise>`;
    expect(mustRefuse(bomb)).toMatchObject({ code: 'xml_entities', line: 1, element: '!DOCTYPE' });
    expect(mustRefuse('<!DOCTYPE a [<!ENTITY x SYSTEM "file:///etc/passwd">]>\n<score-partwise>&x;</score-partwise>').code).toBe('xml_entities');
    expect(mustRefuse('<!DOCTYPE a [<!ENTITY % x SYSTEM "http://127.0.0.1/x.dtd"> %x;]>\n<score-partwise/>').code).toBe('xml_entities');
    expect(mustRefuse('<score-partwise>\n<movement-title>&nbsp;</movement-title></score-partwise>')).toMatchObject({ code: 'xml_entities', line: 2 });
  });

  it('a hundred thousand nested elements', () => {
    const deep = `<score-partwise>${'<a>'.repeat(100_000)}${'</a>'.repeat(100_000)}</score-partwise>`;
    expect(mustRefuse(deep)).toMatchObject({ code: 'xml_too_deep', element: 'a', line: 1 });
  });

  it('NUL bytes', () => {
    expect(refusalOf(bytesOf(plain.replace('<duration>', '\0<duration>')))).toMatchObject({ code: 'xml_broken', line: 6 });
  });

  it('text cut short at any place', () => {
    for (let length = 0; length < plain.trimEnd().length; length += 1) {
      expect(refusalOf(bytesOf(plain.slice(0, length))).code).toMatch(/^(?:xml_broken|not_musicxml|encoding_unknown)$/);
    }
  });

  it('tags that do not match, with the line', () => {
    expect(mustRefuse(plain.replace('</note>', '</nota>'))).toMatchObject({ code: 'xml_broken', line: 6 });
  });

  it.each(['0', '-1', '1000000000', '', 'four', 'NaN', '1e9'])('divisions of “%s”', (divisions) => {
    expect(mustRefuse(onePart(`\n${attributes(`<divisions>${divisions}</divisions>`)}${note('C4')}`))).toMatchObject({ code: 'bad_divisions', line: 7, element: 'divisions' });
  });

  it('divisions of two parts without a usable common grid', () => {
    const odd = [999_983, 999_979].map((value) => attributes(`<divisions>${value}</divisions>`) + note('C4')).join('');
    expect(mustRefuse(onePart(odd)).code).toBe('bad_divisions');
  });

  it.each(['-1', '', 'long', '99999999999', '1e3', 'Infinity'])('a duration of “%s”', (duration) => {
    expect(mustRefuse(plain.replace('<duration>4<', `<duration>${duration}<`))).toMatchObject({ code: 'bad_duration', line: 6, element: 'duration' });
  });

  it('a note without duration', () => {
    expect(mustRefuse(plain.replace('<duration>4</duration>', ''))).toMatchObject({ code: 'bad_note', line: 6, element: 'note' });
  });

  it('a note without a readable pitch', () => {
    for (const broken of ['<step>H</step>', '<step></step>', '<step>__proto__</step>']) {
      expect(mustRefuse(plain.replace('<step>C</step>', broken))).toMatchObject({ code: 'bad_note', line: 6, element: 'pitch' });
    }
    expect(mustRefuse(plain.replace('<octave>4<', '<octave>99<')).code).toBe('bad_note');
  });

  it('a chord note that follows no note', () => {
    expect(mustRefuse(onePart(note('C4', { chord: true })))).toMatchObject({ code: 'bad_note', element: 'chord' });
  });

  it('a backup that goes back before its bar', () => {
    expect(mustRefuse(onePart(note('C4') + backup(2) + note('D4')))).toMatchObject({ code: 'bad_backup', line: 6, element: 'backup' });
  });

  it('no parts, and parts without bars', () => {
    expect(mustRefuse('<score-partwise><part-list/></score-partwise>')).toMatchObject({ code: 'score_empty', element: 'part' });
    expect(mustRefuse('<score-partwise><part id="P1"/></score-partwise>')).toMatchObject({ code: 'score_empty', element: 'measure' });
  });

  it('a part that is there twice, in the list or in the music', () => {
    expect(mustRefuse(plain.replace('</part-list>', '<score-part id="P1"/></part-list>'))).toMatchObject({ code: 'duplicate_part', line: 3 });
    expect(mustRefuse(plain.replace('</score-partwise>', '<part id="P1"><measure/></part></score-partwise>'))).toMatchObject({ code: 'duplicate_part', element: 'part' });
    expect(mustRefuse('<score-timewise><measure><part id="P1"/><part id="P1"/></measure></score-timewise>').code).toBe('duplicate_part');
  });

  it('what is not MusicXML, naming what it is', () => {
    expect(refusalOf(bytesOf('<!DOCTYPE html><html></html>')).code).toBe('not_musicxml');
    expect(refusalOf(bytesOf('<opus/>'))).toMatchObject({ code: 'not_musicxml', element: 'opus' });
    expect(refusalOf(bytesOf('%PDF-1.7')).code).toBe('not_musicxml');
    expect(refusalOf(new Uint8Array()).code).toBe('not_musicxml');
    expect(refusalOf(bytesOf('  \n ')).code).toBe('not_musicxml');
  });

  it('text in an encoding it does not say', () => {
    expect(refusalOf(Uint8Array.from('<a>\n\xe9</a>', (sign) => sign.charCodeAt(0)))).toMatchObject({ code: 'encoding_unknown', line: 2 });
    expect(refusalOf(bytesOf('<?xml version="1.0" encoding="EBCDIC-US"?><score-partwise/>'))).toMatchObject({ code: 'encoding_unknown', line: 1 });
  });
});

describe('readInThread stays within five seconds and 512 MB', () => {
  it('by its own bounds', () => {
    expect(READ_BOUNDS).toEqual({ milliseconds: 5_000, megabytes: 512 });
  });

  const packed = (text: string) => zipSync({ 'score.xml': bytesOf(text) }, { level: 1 });

  // On a busy machine the clock or the memory may stop it before the count does.
  const STOPPED = /^(?:score_too_long|timed_out|out_of_memory)$/;
  const codeOf = async (xml: string) => {
    const result = await readInThread(packed(xml));
    return result.ok ? 'read' : result.error.code;
  };

  it('for a bar of a million notes', { timeout: 60_000 }, async () => {
    expect(await codeOf(onePart('<note><rest/><duration>1</duration></note>'.repeat(1_000_000)))).toMatch(STOPPED);
  });

  it('for a million bars of a note', { timeout: 60_000 }, async () => {
    const bar = '<measure><note><rest/><duration>1</duration></note></measure>';
    expect(await codeOf(onePart('').replace('</part>', `${bar.repeat(1_000_000)}</part>`))).toMatch(STOPPED);
  });

  it('for ninety megabytes of other elements', { timeout: 60_000 }, async () => {
    expect(await codeOf(onePart('<direction/>'.repeat(7_500_000)))).toMatch(STOPPED);
  });

  it('for ninety megabytes of one attribute', { timeout: 60_000 }, async () => {
    expect(await codeOf(`<score-partwise a="${'a'.repeat(90 * 1024 * 1024)}"/>`)).toMatch(/^(?:score_empty|timed_out|out_of_memory)$/);
  });
});

describe('readScoreText counts', () => {
  const many = onePart(note('C4').repeat(60), note('C4').repeat(60));

  it('notes of the whole score', () => {
    expect(readScoreText(many, { ...DEFAULT_LIMITS, notes: 100 })).toMatchObject({ ok: false, error: { code: 'score_too_long', element: 'note' } });
    expect(readScoreText(many, { ...DEFAULT_LIMITS, notes: 120 }).ok).toBe(true);
  });

  it('elements of one bar', () => {
    expect(readScoreText(many, { ...DEFAULT_LIMITS, barElements: 300 })).toMatchObject({ ok: false, error: { code: 'score_too_long' } });
  });
});
