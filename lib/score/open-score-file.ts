import { type Result, err, ok } from '../result';
import { type TextEncoding, decodeXml } from './encoding';
import { DEFAULT_LIMITS, type ScoreLimits } from './limits';
import { Refusal, refuse } from './refusal';
import type { ScoreError } from './score';
import { type XmlElement, streamXml } from './xml';
import { type ZipEntry, isZip, listZip, unpackEntry } from './zip';

/** An uploaded file opened to its XML text, with what is needed to write it back in the same shape. */
export interface ScoreFile {
  readonly xml: string;
  readonly compressed: boolean;
  /** Name of the score's entry in the archive; null for a plain file. */
  readonly entryName: string | null;
  readonly encoding: TextEncoding;
  /** The bytes of the XML, byte order mark included. */
  readonly bytes: Uint8Array;
  readonly markLength: number;
}

/**
 * Opens a `.musicxml`, `.xml` or `.mxl` file by its content; the name does not matter. Source of the container's form:
 * W3C MusicXML 4.0, "Compressed .MXL files". Never throws on input.
 */
export function openScoreFile(bytes: Uint8Array, limits: ScoreLimits = DEFAULT_LIMITS): Result<ScoreFile, ScoreError> {
  return catchRefusal(() => openFile(bytes, limits));
}

/** Runs a reader whose refusals come as thrown Refusals. Anything else that is thrown is a bug and goes on. */
export function catchRefusal<T>(read: () => T): Result<T, ScoreError> {
  try {
    return ok(read());
  } catch (cause) {
    if (cause instanceof Refusal) return err(cause.refusal);
    throw cause;
  }
}

export function openFile(bytes: Uint8Array, limits: ScoreLimits): ScoreFile {
  if (bytes.length === 0) refuse('not_musicxml', 'The file is empty.');
  if (bytes.length > limits.fileBytes) {
    refuse('file_too_large', `The file is larger than ${Math.floor(limits.fileBytes / 1024 / 1024)} MB. Save it compressed (.mxl), or split it.`);
  }
  if (!isZip(bytes)) return openPlain(bytes, null);
  const entries = listZip(bytes, limits);
  checkClaims(entries, limits);
  const entry = findScoreEntry(bytes, entries, limits);
  const content = unpackEntry(bytes, entry, limits.unpackedBytes);
  if (isZip(content)) refuse('zip_no_score', `The entry ${entry.name} is itself a compressed file. Unpack it once and upload what is inside.`);
  return openPlain(content, entry.name);
}

function openPlain(bytes: Uint8Array, entryName: string | null): ScoreFile {
  const decoded = decodeXml(bytes);
  refuseOtherKinds(decoded.text);
  return { xml: decoded.text, compressed: entryName !== null, entryName, encoding: decoded.encoding, bytes, markLength: decoded.markLength };
}

/** Says early and plainly that a file is something else: the XML reader's complaint would only puzzle. */
function refuseOtherKinds(text: string): void {
  const start = text.slice(0, 1000).trimStart();
  const where = { line: 1 };
  if (start === '') refuse('not_musicxml', 'The file holds nothing but blanks.', where);
  if (text.includes('\0')) refuse('xml_broken', 'The file holds NUL characters; it is damaged, or not a text. Export it again.', { line: lineOf(text, text.indexOf('\0')) });
  if (/^(?:<!doctype html|<html)/i.test(start)) refuse('not_musicxml', 'This is a web page, not a score. Download the score itself and upload that.', where);
  if (!start.startsWith('<')) refuse('not_musicxml', 'This is not an XML file. Export the score as MusicXML (.musicxml or .mxl) and upload that.', where);
}

function lineOf(text: string, offset: number): number {
  return text.slice(0, offset).split(/\r\n?|\n/).length;
}

function checkClaims(entries: readonly ZipEntry[], limits: ScoreLimits): void {
  const claimed = entries.reduce((sum, entry) => sum + entry.claimedSize, 0);
  if (claimed <= limits.unpackedBytes) return;
  refuse('zip_bomb', `The compressed file says it unpacks to ${Math.ceil(claimed / 1024 / 1024)} MB; at most ${Math.floor(limits.unpackedBytes / 1024 / 1024)} MB are read.`);
}

const CONTAINER = 'META-INF/container.xml';
const SCORE_TYPE = 'application/vnd.recordare.musicxml+xml';

/** The entry that container.xml names first, or in a file without container.xml the first score-like entry. */
function findScoreEntry(bytes: Uint8Array, entries: readonly ZipEntry[], limits: ScoreLimits): ZipEntry {
  const container = entries.find((entry) => entry.name === CONTAINER);
  if (!container) return findLooseScore(entries);
  const path = rootPath(unpackEntry(bytes, container, limits.unpackedBytes), limits);
  checkPath(path);
  const entry = entries.find((candidate) => candidate.name === path);
  return entry ?? refuse('zip_no_score', `The compressed file names ${path} as its score, but does not hold it. Export it again.`, { element: 'rootfile' });
}

function findLooseScore(entries: readonly ZipEntry[]): ZipEntry {
  const entry = entries.find(({ name }) => /\.(?:musicxml|xml)$/i.test(name) && !name.startsWith('META-INF/') && !name.startsWith('__MACOSX/'));
  return entry ?? refuse('zip_no_score', 'The compressed file holds no score. Export the score as compressed MusicXML (.mxl).');
}

/** Nothing is ever written to a disk under such a name; a path that climbs out of the archive is refused all the same. */
function checkPath(path: string): void {
  if (!/^(?:[/\\]|[A-Za-z]:)/.test(path) && !path.includes('\\') && !path.split('/').includes('..')) return;
  refuse('zip_bad_path', 'The compressed file names a score outside itself. Export it again.', { element: 'rootfile' });
}

function rootPath(containerBytes: Uint8Array, limits: ScoreLimits): string {
  const roots: XmlElement[] = [];
  streamXml(
    decodeXml(containerBytes).text,
    {
      skip: new Set<string>(),
      gather: (_, ancestors) => (ancestors.length === 0 ? 'enter' : 'whole'),
      take: (element) => roots.push(...(element.name === 'rootfiles' ? element.children : [])),
    },
    limits,
  );
  const files = roots.filter(({ name, attributes }) => name === 'rootfile' && attributes['full-path']);
  const typed = files.find(({ attributes }) => attributes['media-type'] === undefined || attributes['media-type'] === SCORE_TYPE);
  const path = (typed ?? files[0])?.attributes['full-path'];
  return path ?? refuse('zip_no_score', 'The compressed file’s table of contents names no score. Export it again.', { element: 'rootfiles' });
}

