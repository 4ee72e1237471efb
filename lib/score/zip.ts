import { Inflate } from 'fflate';
import type { ScoreLimits } from './limits';
import { refuse } from './refusal';

/** One entry of a zip archive, as its central directory states it. Sizes are claims until the entry is unpacked. */
export interface ZipEntry {
  readonly name: string;
  readonly method: number;
  readonly encrypted: boolean;
  readonly crc: number;
  readonly packedSize: number;
  readonly claimedSize: number;
  /** Offset of the entry's local header. */
  readonly header: number;
}

const END_OF_DIRECTORY = 0x06054b50;
const DIRECTORY_ENTRY = 0x02014b50;
const LOCAL_HEADER = 0x04034b50;
const END_SIZE = 22;
const STORED = 0;
const DEFLATED = 8;

export function isZip(bytes: Uint8Array): boolean {
  return bytes[0] === 0x50 && bytes[1] === 0x4b && (bytes[2] === 3 || bytes[2] === 5);
}

/** The archive's entries by its central directory (APPNOTE 4.3), checked against the file's length and the limit. */
export function listZip(bytes: Uint8Array, limits: Pick<ScoreLimits, 'entries'>): ZipEntry[] {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const end = findEnd(view);
  const count = view.getUint16(end + 10, true);
  if (count > limits.entries) {
    refuse('zip_too_many_entries', `The compressed file holds ${count} entries; at most ${limits.entries} are read. A score needs two.`);
  }
  const entries: ZipEntry[] = [];
  let at = view.getUint32(end + 16, true);
  for (let i = 0; i < count; i += 1) {
    if (at + 46 > bytes.length || view.getUint32(at, true) !== DIRECTORY_ENTRY) refuseBroken('its list of entries is damaged');
    entries.push(readEntry(bytes, view, at));
    at += 46 + view.getUint16(at + 28, true) + view.getUint16(at + 30, true) + view.getUint16(at + 32, true);
  }
  return entries;
}

function findEnd(view: DataView): number {
  const last = view.byteLength - END_SIZE;
  for (let at = last; at >= Math.max(0, last - 0xffff); at -= 1) {
    if (view.getUint32(at, true) === END_OF_DIRECTORY) return at;
  }
  return refuseBroken('its end is missing');
}

function readEntry(bytes: Uint8Array, view: DataView, at: number): ZipEntry {
  const nameLength = view.getUint16(at + 28, true);
  return {
    name: new TextDecoder().decode(bytes.subarray(at + 46, at + 46 + nameLength)),
    encrypted: (view.getUint16(at + 8, true) & 1) === 1,
    method: view.getUint16(at + 10, true),
    crc: view.getUint32(at + 16, true),
    packedSize: view.getUint32(at + 20, true),
    claimedSize: view.getUint32(at + 24, true),
    header: view.getUint32(at + 42, true),
  };
}

/**
 * Unpacks one entry. What the headers claim is not believed: the bytes that come out are counted, and unpacking stops
 * at `maxBytes`. Refuses encrypted entries, methods other than stored and deflated, truncation, and a wrong checksum.
 */
export function unpackEntry(bytes: Uint8Array, entry: ZipEntry, maxBytes: number): Uint8Array {
  if (entry.encrypted) refuseBroken(`its entry ${entry.name} is encrypted`);
  if (entry.method !== STORED && entry.method !== DEFLATED) refuseBroken(`its entry ${entry.name} is packed in an unknown way`);
  const packed = packedBytes(bytes, entry);
  const unpacked = entry.method === STORED ? takeStored(packed, maxBytes) : inflate(packed, entry.name, maxBytes);
  if (crc32(unpacked) !== entry.crc) refuseBroken(`its entry ${entry.name} does not match its checksum`);
  return unpacked;
}

/** The entry's bytes as they lie in the archive. */
function packedBytes(bytes: Uint8Array, entry: ZipEntry): Uint8Array {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const { header } = entry;
  if (header + 30 > bytes.length || view.getUint32(header, true) !== LOCAL_HEADER) refuseBroken(`its entry ${entry.name} is damaged`);
  const start = header + 30 + view.getUint16(header + 26, true) + view.getUint16(header + 28, true);
  if (start + entry.packedSize > bytes.length) refuseBroken(`its entry ${entry.name} breaks off`);
  return bytes.subarray(start, start + entry.packedSize);
}

function takeStored(packed: Uint8Array, maxBytes: number): Uint8Array {
  if (packed.length > maxBytes) refuseBomb(maxBytes);
  return packed;
}

/** Small steps, so that one step of a bomb (at most 1,032 times its input) stays small as well. */
const INFLATE_STEP = 8192;

function inflate(packed: Uint8Array, name: string, maxBytes: number): Uint8Array {
  const pieces: Uint8Array[] = [];
  let length = 0;
  const stream = new Inflate((piece) => {
    length += piece.length;
    if (length <= maxBytes) pieces.push(piece);
  });
  for (let at = 0; at < packed.length || at === 0; at += INFLATE_STEP) {
    try {
      stream.push(packed.subarray(at, at + INFLATE_STEP), at + INFLATE_STEP >= packed.length);
    } catch {
      refuseBroken(`its entry ${name} is damaged or breaks off`);
    }
    if (length > maxBytes) refuseBomb(maxBytes);
  }
  return joinPieces(pieces, length);
}

function joinPieces(pieces: readonly Uint8Array[], length: number): Uint8Array {
  const joined = new Uint8Array(length);
  let at = 0;
  for (const piece of pieces) {
    joined.set(piece, at);
    at += piece.length;
  }
  return joined;
}

const CRC_TABLE = Uint32Array.from({ length: 256 }, (_, n) => {
  let c = n;
  for (let k = 0; k < 8; k += 1) c = c & 1 ? 0xedb88320 ^ (c >>> 1) : c >>> 1;
  return c >>> 0;
});

/** The checksum of zip and gzip (ISO 3309), unsigned. */
export function crc32(bytes: Uint8Array): number {
  let c = 0xffffffff;
  for (let i = 0; i < bytes.length; i += 1) c = (CRC_TABLE[(c ^ (bytes[i] as number)) & 0xff] as number) ^ (c >>> 8);
  return (c ^ 0xffffffff) >>> 0;
}

function refuseBroken(what: string): never {
  return refuse('zip_broken', `The compressed file cannot be unpacked: ${what}. Export or upload it again.`);
}

function refuseBomb(maxBytes: number): never {
  return refuse('zip_bomb', `The compressed file unpacks to more than ${Math.floor(maxBytes / 1024 / 1024)} MB. This cannot be a score.`);
}
