import { refuse } from './refusal';

/** Encodings a score's text can come in. Latin-1 is read as windows-1252, which differs only in unused control characters. */
export const TEXT_ENCODINGS = ['utf-8', 'utf-16le', 'utf-16be', 'windows-1252'] as const;
export type TextEncoding = (typeof TEXT_ENCODINGS)[number];

export interface DecodedText {
  /** Without its byte order mark. */
  readonly text: string;
  readonly encoding: TextEncoding;
  /** Bytes of the byte order mark: 0, 2 or 3. */
  readonly markLength: number;
}

/**
 * Bytes of an XML file → its text, by byte order mark, by the look of its first bytes, or else by its XML declaration,
 * as the XML recommendation's appendix F describes. Refuses what cannot be decoded.
 */
export function decodeXml(bytes: Uint8Array): DecodedText {
  const { encoding, markLength } = detectEncoding(bytes);
  const body = bytes.subarray(markLength);
  try {
    const text = new TextDecoder(encoding, { fatal: true, ignoreBOM: true }).decode(body);
    return { text, encoding, markLength };
  } catch {
    return refuse('encoding_unknown', `Line ${lineOfFault(body, encoding)} holds bytes that are not ${nameOf(encoding)}. Save the file as UTF-8.`, {
      line: lineOfFault(body, encoding),
    });
  }
}

function detectEncoding(bytes: Uint8Array): { encoding: TextEncoding; markLength: number } {
  const [a, b, c, d] = bytes;
  if ((a === 0 && b === 0 && c === 0xfe && d === 0xff) || (a === 0xff && b === 0xfe && c === 0 && d === 0)) {
    return refuse('encoding_unknown', 'The file is in UTF-32. Save it as UTF-8.', { line: 1 });
  }
  if (a === 0xef && b === 0xbb && c === 0xbf) return { encoding: 'utf-8', markLength: 3 };
  if (a === 0xff && b === 0xfe) return { encoding: 'utf-16le', markLength: 2 };
  if (a === 0xfe && b === 0xff) return { encoding: 'utf-16be', markLength: 2 };
  if (a === 0x3c && b === 0) return { encoding: 'utf-16le', markLength: 0 };
  if (a === 0 && b === 0x3c) return { encoding: 'utf-16be', markLength: 0 };
  return { encoding: declaredEncoding(bytes), markLength: 0 };
}

/** A file that declares UTF-16 but whose declaration reads as single bytes is in UTF-8: its label is left over from a conversion. */
const LABELS: Readonly<Record<string, TextEncoding>> = {
  'utf-8': 'utf-8',
  utf8: 'utf-8',
  'us-ascii': 'utf-8',
  ascii: 'utf-8',
  'utf-16': 'utf-8',
  'utf-16le': 'utf-8',
  'utf-16be': 'utf-8',
  'iso-8859-1': 'windows-1252',
  'iso8859-1': 'windows-1252',
  'latin-1': 'windows-1252',
  latin1: 'windows-1252',
  'windows-1252': 'windows-1252',
  'cp1252': 'windows-1252',
};

function declaredEncoding(bytes: Uint8Array): TextEncoding {
  const head = String.fromCharCode(...bytes.subarray(0, 200));
  const declared = /^<\?xml[^>]*?\bencoding\s*=\s*["']([A-Za-z][A-Za-z0-9._-]*)["']/.exec(head)?.[1];
  const encoding = LABELS[(declared ?? 'utf-8').toLowerCase()];
  return encoding ?? refuse('encoding_unknown', `The file says it is encoded as ${declared}, which is not read here. Save it as UTF-8.`, { line: 1 });
}

function nameOf(encoding: TextEncoding): string {
  return { 'utf-8': 'UTF-8', 'utf-16le': 'UTF-16', 'utf-16be': 'UTF-16', 'windows-1252': 'Latin-1' }[encoding];
}

function lineOfFault(body: Uint8Array, encoding: TextEncoding): number {
  const text = new TextDecoder(encoding, { ignoreBOM: true }).decode(body);
  const before = text.slice(0, Math.max(0, text.indexOf('\uFFFD')));
  return before.split(/\r\n?|\n/).length;
}
