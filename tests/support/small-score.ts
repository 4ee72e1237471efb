import { zipSync } from 'fflate';

interface WrittenScore {
  readonly title?: string;
  readonly composer?: string;
  readonly bars?: number;
  /** Printed number of the first bar. */
  readonly firstNumber?: number;
  /** A syllable under each bar, '' for none. */
  readonly lyrics?: readonly string[];
}

/** A small piano piece in C for the tests: one whole-note triad a bar, tonic and dominant in turn. */
export function musicXml({ title = 'A piece of the tests', composer = 'Nobody', bars = 4, firstNumber = 1, lyrics = [] }: WrittenScore = {}): string {
  const measures = Array.from({ length: bars }, (_, i) => measure(firstNumber + i, i === 0, i % 2 === 0 ? TONIC : DOMINANT, lyrics[i] ?? ''));
  return [
    '<?xml version="1.0" encoding="UTF-8"?>',
    '<score-partwise version="4.0">',
    `  <work><work-title>${title}</work-title></work>`,
    `  <identification><creator type="composer">${composer}</creator></identification>`,
    '  <part-list><score-part id="P1"><part-name>Piano</part-name></score-part></part-list>',
    `  <part id="P1">${measures.join('')}</part>`,
    '</score-partwise>',
  ].join('\n');
}

const TONIC = ['C3', 'E4', 'G4', 'C5'];
const DOMINANT = ['G3', 'D4', 'F4', 'B4'];
const ATTRIBUTES =
  '<attributes><divisions>1</divisions><key><fifths>0</fifths></key><time><beats>4</beats><beat-type>4</beat-type></time><clef><sign>G</sign><line>2</line></clef></attributes>';

function measure(number: number, isFirst: boolean, chord: readonly string[], syllable: string): string {
  const lyric = syllable === '' ? '' : `<lyric number="1"><syllabic>single</syllabic><text>${syllable}</text></lyric>`;
  const notes = chord.map(
    (note, i) =>
      `<note>${i > 0 ? '<chord/>' : ''}<pitch><step>${note.charAt(0)}</step><octave>${note.charAt(1)}</octave></pitch><duration>4</duration><voice>1</voice><type>whole</type>${i === 0 ? lyric : ''}</note>`,
  );
  return `<measure number="${number}">${isFirst ? ATTRIBUTES : ''}${notes.join('')}</measure>`;
}

const CONTAINER = '<?xml version="1.0"?><container><rootfiles><rootfile full-path="score.xml"/></rootfiles></container>';

/** The same in a compressed file. Source of its form: W3C MusicXML 4.0, "Compressed .MXL files". */
export function mxlOf(xml: string): Uint8Array<ArrayBuffer> {
  const text = (content: string) => new TextEncoder().encode(content);
  // A fixed time: the same content is the same file, whenever it is packed.
  return new Uint8Array(zipSync({ 'META-INF/container.xml': text(CONTAINER), 'score.xml': text(xml) }, { mtime: '2026-01-01T00:00:00' }));
}

const BOMB_BYTES = 101 * 1024 * 1024;

/** A small file that unpacks to more than is ever read. */
export function bombMxl(): Uint8Array<ArrayBuffer> {
  return new Uint8Array(zipSync({ 'META-INF/container.xml': new TextEncoder().encode(CONTAINER), 'score.xml': new Uint8Array(BOMB_BYTES).fill(0x20) }));
}
