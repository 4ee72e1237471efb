import type { Draft } from './draft';
import { parseInteger } from './rational';
import type { PartState } from './read-measure';
import type { PlayOrderKind, PlayOrderSign } from './score';
import { type XmlElement, findChild } from './xml';

/** Signs are read from the first part only: the others repeat them. */
function addSign(draft: Draft, part: PartState, sign: Omit<PlayOrderSign, 'times' | 'passes'> & Partial<PlayOrderSign>): void {
  if (part.index !== 0) return;
  const known = draft.playOrder.some(({ bar, kind, at }) => bar === sign.bar && kind === sign.kind && at === sign.at);
  if (!known) draft.playOrder.push({ times: 2, passes: [], ...sign });
}

/** Repeat signs, endings, segno and coda on a barline. */
export function readBarline(draft: Draft, part: PartState, element: XmlElement, bar: number): void {
  const repeat = findChild(element, 'repeat');
  const at = element.attributes['location'] === 'left' ? 'start' : 'end';
  if (repeat?.attributes['direction'] === 'forward') addSign(draft, part, { bar, at: 'start', kind: 'repeat-start' });
  if (repeat?.attributes['direction'] === 'backward') {
    const times = parseInteger(repeat.attributes['times']) ?? 2;
    addSign(draft, part, { bar, at: 'end', kind: 'repeat-end', times: Math.min(Math.max(times, 1), 100) });
  }
  const ending = findChild(element, 'ending');
  if (ending) readEnding(draft, part, ending, bar);
  for (const kind of ['segno', 'coda'] as const) if (findChild(element, kind)) addSign(draft, part, { bar, at, kind });
}

function readEnding(draft: Draft, part: PartState, ending: XmlElement, bar: number): void {
  const kind = ending.attributes['type'] === 'start' ? 'ending-start' : 'ending-end';
  addSign(draft, part, { bar, at: kind === 'ending-start' ? 'start' : 'end', kind, passes: parsePasses(ending.attributes['number'] ?? '') });
}

/** `1`, `1, 2`, `1-3`. */
function parsePasses(text: string): number[] {
  return text.split(',').flatMap((piece) => {
    const match = /^\s*(\d{1,2})(?:\s*-\s*(\d{1,2}))?\s*$/.exec(piece);
    const first = Number(match?.[1] ?? 0);
    return match ? Array.from({ length: Math.max(1, Number(match[2] ?? first) - first + 1) }, (_, i) => first + i) : [];
  });
}

export function readDirection(draft: Draft, part: PartState, element: XmlElement, bar: number): void {
  for (const child of element.children) {
    if (child.name === 'sound') readSound(draft, part, child, bar);
    if (child.name === 'direction-type') readDirectionType(draft, part, child, bar);
  }
}

function readDirectionType(draft: Draft, part: PartState, type: XmlElement, bar: number): void {
  for (const { name, text } of type.children) {
    if (name === 'segno' || name === 'coda') addSign(draft, part, { bar, at: 'start', kind: name });
    const kind = name === 'words' ? signInWords(text.trim()) : undefined;
    if (kind) addSign(draft, part, { bar, at: 'end', kind });
  }
}

/** Common practice, no source. */
function signInWords(words: string): PlayOrderKind | undefined {
  if (/^fine$/i.test(words)) return 'fine';
  if (/^(?:d\. ?c\.|da capo)(?: al (?:fine|coda))?\.?$/i.test(words)) return 'da-capo';
  if (/^(?:d\. ?s\.|dal segno)(?: al (?:fine|coda))?\.?$/i.test(words)) return 'dal-segno';
  return /^to coda$/i.test(words) ? 'to-coda' : undefined;
}

const SOUNDS: readonly (readonly [attribute: string, kind: PlayOrderKind, at: 'start' | 'end'])[] = [
  ['segno', 'segno', 'start'],
  ['coda', 'coda', 'start'],
  ['dacapo', 'da-capo', 'end'],
  ['dalsegno', 'dal-segno', 'end'],
  ['tocoda', 'to-coda', 'end'],
  ['fine', 'fine', 'end'],
];

/** A `sound` element says for players what a direction says for readers. */
export function readSound(draft: Draft, part: PartState, element: XmlElement, bar: number): void {
  for (const [attribute, kind, at] of SOUNDS) {
    const value = element.attributes[attribute];
    if (value !== undefined && value !== 'no') addSign(draft, part, { bar, at, kind });
  }
}
