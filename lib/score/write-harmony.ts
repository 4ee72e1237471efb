import { type Key, signatureOf } from '../theory/key';
import { type Numeral, isNeapolitan } from '../theory/numeral';
import { formatNumeral } from '../theory/numeral-format';
import { alterOf, fifths, letterOf } from '../theory/pitch';
import { spellNumeral } from '../theory/spell';
import type { KeyedNumeral } from './annotation';
import { KIND_OF_QUALITY } from './harmony-kinds';
import type { Transposition } from './transposition';

/** How one `harmony` element stands in the file. */
export interface HarmonyPlace {
  readonly type: 'explicit' | 'alternate';
  /** Divisions from the element's place to the label's, as a decimal; null for none. */
  readonly offset: string | null;
  /** null in a part with one staff. */
  readonly staff: number | null;
  /** Its key is shown because it is new here. */
  readonly showKey: boolean;
  /** Of the part it is written into: its pitches and keys are written, not sounding. */
  readonly transposition: Transposition;
}

/**
 * Lines of a MusicXML 4.0 `harmony` element, without indentation beyond their own. An applied chord is a row of
 * chords, the first read in the key of the next; the key stands with the last. The printed numeral is in the `text`
 * attributes, letters with the numeral and figures with the kind, so that it comes back exactly.
 * Source: W3C MusicXML 4.0, harmony, numeral, numeral-key, kind.
 */
export function harmonyLines(label: KeyedNumeral, place: HarmonyPlace): string[] {
  return elementLines(place, [...chordLines(label, textsOf(label)[0] ?? '', place), ...targetLines(label, place)]);
}

/** “No chord”: not printed, and read back as the end of the label before it. */
export function noHarmonyLines(key: Key, place: HarmonyPlace): string[] {
  return elementLines(place, [...numeralLines({ step: 1, alter: 0 }, '', keyLines(key, place)), '  <kind text="">none</kind>'], ' print-object="no"');
}

function textsOf({ key, numeral }: KeyedNumeral): string[] {
  return formatNumeral(numeral, key.mode).split('/');
}

function targetLines(label: KeyedNumeral, place: HarmonyPlace): string[] {
  const texts = textsOf(label);
  const { applied } = label.numeral;
  return applied.flatMap(({ degree, mode }, i) => [
    ...numeralLines(degree, texts[i + 1] ?? '', i === applied.length - 1 ? keyLines(label.key, place) : []),
    `  <kind text="">${mode}</kind>`,
  ]);
}

function elementLines(place: HarmonyPlace, chords: readonly string[], attributes = ''): string[] {
  return [
    `<harmony placement="below" type="${place.type}"${attributes}>`,
    ...chords,
    ...(place.offset === null ? [] : [`  <offset>${place.offset}</offset>`]),
    ...(place.staff === null ? [] : [`  <staff>${place.staff}</staff>`]),
    '</harmony>',
  ];
}

function chordLines({ key, numeral }: KeyedNumeral, text: string, place: HarmonyPlace): string[] {
  const [, letters = '', figures = ''] = /^(\D*)(.*)$/s.exec(text) ?? [];
  const { inversion } = numeral;
  return [
    ...numeralLines(numeral.degree, letters, numeral.applied.length === 0 ? keyLines(key, place) : []),
    `  <kind text="${escape(figures)}">${kindOf(numeral)}</kind>`,
    ...(inversion > 0 ? [`  <inversion>${inversion}</inversion>`, ...bassLines({ key, numeral }, place)] : []),
    ...degreeLines(numeral),
  ];
}

function numeralLines({ step, alter }: Numeral['degree'], text: string, key: readonly string[]): string[] {
  return [
    '  <numeral>',
    `    <numeral-root text="${escape(text)}">${step}</numeral-root>`,
    ...(alter === 0 ? [] : [`    <numeral-alter>${alter}</numeral-alter>`]),
    ...key,
    '  </numeral>',
  ];
}

function keyLines(key: Key, { showKey, transposition }: HarmonyPlace): string[] {
  return [
    `    <numeral-key${showKey ? '' : ' print-object="no"'}>`,
    `      <numeral-fifths>${signatureOf(key) - transposition.fifths}</numeral-fifths>`,
    `      <numeral-mode>${key.mode}</numeral-mode>`,
    '    </numeral-key>',
  ];
}

function kindOf(numeral: Numeral): string {
  if (numeral.special === 'pedal-tone') return 'pedal';
  if (isNeapolitan(numeral) && numeral.quality === 'major') return 'Neapolitan';
  return KIND_OF_QUALITY[numeral.quality].kind;
}

function bassLines({ key, numeral }: KeyedNumeral, { transposition }: HarmonyPlace): string[] {
  const bass = fifths(spellNumeral(key, numeral).bass - transposition.fifths);
  const alter = alterOf(bass);
  return [
    '  <bass>',
    `    <bass-step>${letterOf(bass)}</bass-step>`,
    ...(alter === 0 ? [] : [`    <bass-alter>${alter}</bass-alter>`]),
    '  </bass>',
  ];
}

function degreeLines({ quality }: Numeral): string[] {
  const { degree } = KIND_OF_QUALITY[quality];
  if (!degree) return [];
  return [
    '  <degree print-object="no">',
    `    <degree-value>${degree.value}</degree-value>`,
    `    <degree-alter>${degree.alter}</degree-alter>`,
    `    <degree-type>${degree.type}</degree-type>`,
    '  </degree>',
  ];
}

/** ASCII in any encoding: other characters as numeric references. */
function escape(text: string): string {
  return [...text].map((sign) => (/[ -~]/.test(sign) && !/[&<>"]/.test(sign) ? sign : `&#${sign.codePointAt(0)};`)).join('');
}
