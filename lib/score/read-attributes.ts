import type { Draft, WrittenTime } from './draft';
import { lcm, parseDecimal, parseInteger, rational } from './rational';
import type { PartState } from './read-measure';
import { refuse } from './refusal';
import { type Transposition, transposeSignature, transpositionOf } from './transposition';
import { type XmlElement, findChild, findChildren, findText } from './xml';

/** An `attributes` element: divisions, keys, metre and transposition from here on. */
export function readAttributes(draft: Draft, part: PartState, element: XmlElement, bar: number): void {
  const divisions = findChild(element, 'divisions');
  if (divisions) readDivisions(draft, part, divisions);
  const staves = parseInteger(findText(element, 'staves'));
  if (staves !== undefined) part.staves = Math.max(part.staves, Math.min(staves, 100));
  for (const transpose of findChildren(element, 'transpose')) readTranspose(part, transpose);
  for (const key of findChildren(element, 'key')) readKey(draft, part, key, bar);
  const time = findChild(element, 'time');
  if (time) readTime(draft, part, time, bar);
}

/** More would be finer than any notation; 10080 is about the finest in use. */
const MAX_DIVISIONS = 1_000_000;

function readDivisions(draft: Draft, part: PartState, element: XmlElement): void {
  const { line } = element;
  const value = parseDecimal(element.text);
  if (!value || value.num <= 0 || value.num / value.den > MAX_DIVISIONS) {
    return refuse('bad_divisions', `Line ${line}: divisions of “${element.text.trim().slice(0, 20)}” do not divide a quarter note. Export the file again.`, { line, element: 'divisions' });
  }
  part.divisions = value;
  draft.refine(value.num, line);
}

/** `for-part` transposes for printed parts only; in a score at concert pitch nothing is left to transpose. */
function readTranspose(part: PartState, element: XmlElement): void {
  if (part.atConcertPitch) return;
  const chromatic = parseInteger(findText(element, 'chromatic')) ?? 0;
  const diatonic = parseInteger(findText(element, 'diatonic'));
  const octaves = parseInteger(findText(element, 'octave-change')) ?? 0;
  const staff = parseInteger(element.attributes['number']) ?? 0;
  if (staff === 0) part.transpositions.clear();
  part.transpositions.set(staff, transpositionOf(diatonic, chromatic, octaves));
}

export function transpositionAt(part: PartState, staff: number): Transposition | undefined {
  return part.transpositions.get(staff) ?? part.transpositions.get(0);
}

function readKey(draft: Draft, part: PartState, element: XmlElement, bar: number): void {
  const written = parseInteger(findText(element, 'fifths'));
  // A key of single accidentals has no place on the line of fifths, and as evidence it would mislead.
  if (written === undefined) return;
  const staff = parseInteger(element.attributes['number']) ?? 0;
  const by = transpositionAt(part, staff || 1);
  const mode = findText(element, 'mode');
  draft.keys.push({
    bar,
    part: part.index,
    at: draft.cursor.at,
    staff,
    fifths: transposeSignature(written, by ?? { steps: 0, fifths: 0 }),
    mode: mode === 'major' || mode === 'minor' ? mode : null,
  });
}

function readTime(draft: Draft, part: PartState, element: XmlElement, bar: number): void {
  const metre = findChild(element, 'senza-misura') ? null : metreOf(element);
  if (metre === undefined) {
    draft.warn({ code: 'metre_unread', message: `Line ${element.line}: the time signature cannot be read; the bar’s own length is used.`, line: element.line, bar });
    return;
  }
  if (metre) draft.refine(rational(metre.beatType, 4).num, element.line);
  draft.times.push({ bar, part: part.index, at: draft.cursor.at, metre });
}

/** `3+2` over 8 is [3, 2]/8; 3/8 + 2/4 is brought to the smaller unit, [3, 4]/8. */
function metreOf(element: XmlElement): WrittenTime['metre'] | undefined {
  const numerators = findChildren(element, 'beats').map((beats) => parseBeats(beats.text));
  const types = findChildren(element, 'beat-type').map((type) => parseInteger(type.text) ?? 0);
  if (numerators.length === 0 || numerators.length !== types.length) return undefined;
  if (types.some((type) => type < 1 || type > 1024) || numerators.some((beats) => beats.length === 0)) return undefined;
  const beatType = types.reduce(lcm);
  if (beatType > 1024) return undefined;
  return { beats: numerators.flatMap((beats, i) => beats.map((count) => count * (beatType / (types[i] as number)))), beatType };
}

function parseBeats(text: string): number[] {
  const counts = text.split('+').map((count) => parseInteger(count) ?? 0);
  return counts.every((count) => count >= 1 && count <= 1000) ? counts : [];
}
