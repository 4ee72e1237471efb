import { type Zippable, zipSync } from 'fflate';
import type { Result } from '../result';
import { findInsertions } from './annotate-score';
import type { Annotation } from './annotation';
import { DEFAULT_LIMITS } from './limits';
import { type ScoreFile, catchRefusal, openFile } from './open-score-file';
import type { ScoreError } from './score';
import { isZip, listZip, unpackEntry } from './zip';

/**
 * The uploaded file with the analysis in it, in the shape it came in: every byte of its XML is kept, in its encoding,
 * and what is put in is ASCII in that encoding; `.mxl` in gives `.mxl` out, with its other entries, the mimetype first
 * and stored. Refuses what `readScore` refuses.
 */
export function annotateFile(bytes: Uint8Array, annotations: readonly Annotation[]): Result<Uint8Array, ScoreError> {
  return catchRefusal(() => {
    const file = openFile(bytes, DEFAULT_LIMITS);
    const xml = insertBytes(file, annotations);
    return file.compressed ? repack(bytes, file, xml) : xml;
  });
}

function insertBytes(file: ScoreFile, annotations: readonly Annotation[]): Uint8Array {
  const pieces: Uint8Array[] = [];
  let [doneChars, doneBytes] = [0, 0];
  for (const { at, text } of findInsertions(file.xml, annotations)) {
    const upTo = doneBytes + byteLength(file, doneChars, at) + (doneBytes === 0 ? file.markLength : 0);
    pieces.push(file.bytes.subarray(doneBytes, upTo), encodeAscii(text, file.encoding));
    [doneChars, doneBytes] = [at, upTo];
  }
  return join([...pieces, file.bytes.subarray(doneBytes)]);
}

/** Bytes that the characters from `start` to `end` take in the file. */
function byteLength({ xml, encoding }: ScoreFile, start: number, end: number): number {
  if (encoding === 'utf-8') return new TextEncoder().encode(xml.slice(start, end)).length;
  return (end - start) * (encoding === 'windows-1252' ? 1 : 2);
}

function encodeAscii(text: string, encoding: ScoreFile['encoding']): Uint8Array {
  const codes = Uint8Array.from(text, (sign) => sign.charCodeAt(0));
  if (encoding === 'utf-8' || encoding === 'windows-1252') return codes;
  const wide = new Uint8Array(2 * codes.length);
  codes.forEach((code, i) => {
    wide[2 * i + (encoding === 'utf-16le' ? 0 : 1)] = code;
  });
  return wide;
}

function join(pieces: readonly Uint8Array[]): Uint8Array {
  const joined = new Uint8Array(pieces.reduce((sum, { length }) => sum + length, 0));
  let at = 0;
  for (const piece of pieces) {
    joined.set(piece, at);
    at += piece.length;
  }
  return joined;
}

const MIMETYPE = 'application/vnd.recordare.musicxml';
/** Zip cannot tell earlier times, and a fixed one makes the same file every time. */
const EPOCH = new Date(1980, 0, 1);

/** Source: W3C MusicXML 4.0, "Compressed .MXL files". */
function repack(bytes: Uint8Array, { entryName }: ScoreFile, xml: Uint8Array): Uint8Array {
  const packed: Zippable = { mimetype: [new TextEncoder().encode(MIMETYPE), { level: 0 }] };
  const entries = listZip(bytes, DEFAULT_LIMITS);
  if (!entries.some(({ name }) => name === 'META-INF/container.xml')) packed['META-INF/container.xml'] = containerFor(entryName ?? '');
  let left = DEFAULT_LIMITS.unpackedBytes;
  for (const entry of entries) {
    if (entry.name === 'mimetype' || entry.name.endsWith('/')) continue;
    const content = entry.name === entryName ? xml : unpackEntry(bytes, entry, left);
    left -= content.length;
    // An entry that is packed already (a picture) stays as it is.
    packed[entry.name] = isZip(content) ? [content, { level: 0 }] : content;
  }
  return zipSync(packed, { mtime: EPOCH });
}

function containerFor(entryName: string): Uint8Array {
  const path = entryName.replaceAll(/[&<>"]/g, (sign) => `&#${sign.charCodeAt(0)};`);
  return new TextEncoder().encode(
    `<?xml version="1.0" encoding="UTF-8"?>\n<container>\n  <rootfiles>\n    <rootfile full-path="${path}" media-type="application/vnd.recordare.musicxml+xml"/>\n  </rootfiles>\n</container>\n`,
  );
}
