import { type Quality, TEMPLATES, sizeOf } from '../theory/chord';
import { type Key, STEPS, degreeOfFifths } from '../theory/key';
import { type Numeral, type Target, checkNumeral, isNeapolitan } from '../theory/numeral';
import { parseNumeral } from '../theory/numeral-parse';
import { type Fifths, LETTERS, type Letter, fifths, fifthsOf } from '../theory/pitch';
import type { Annotation, KeyedNumeral } from './annotation';
import { KIND_OF_QUALITY, QUALITY_OF_KIND } from './harmony-kinds';
import { parseInteger } from './rational';
import type { Transposition } from './transposition';
import { type XmlElement, findChild, findText } from './xml';

/** One chord of a `harmony` element: what stands from one numeral, root or function to the next. */
interface HarmonyChord {
  readonly head: XmlElement;
  kind: XmlElement | undefined;
  inversion: number | undefined;
  bass: XmlElement | undefined;
  degrees: XmlElement[];
}

export type HarmonyReading = Pick<Annotation, 'key' | 'numeral'>;

/**
 * The chord of a MusicXML `harmony` element. `inForce` is the key where it stands, for elements that name none; `by` the
 * transposition of its part. Read leniently: a missing kind is taken from the printed text or for a triad of the key.
 * `numeral` is null for “no chord”; all is null when the element cannot be read.
 */
export function readHarmony(element: XmlElement, inForce: Key, by: Transposition): HarmonyReading | null {
  const chords = chordsOf(element);
  const [first] = chords;
  if (!first) return null;
  if (first.kind?.text.trim() === 'none') return { key: keyOf(chords, by) ?? inForce, numeral: null };
  if (first.head.name === 'root') return readRootChord(first, inForce, by);
  const key = keyOf(chords, by) ?? inForce;
  const byText = parseText(chords, key);
  if (first.head.name === 'function') return byText && { key, numeral: byText };
  const byStructure = readNumerals(chords, key);
  const numeral = byText && agrees(byText, byStructure, chords) ? byText : byStructure;
  return numeral && { key, numeral };
}

function chordsOf(element: XmlElement): HarmonyChord[] {
  const chords: HarmonyChord[] = [];
  for (const child of element.children) {
    if (child.name === 'numeral' || child.name === 'root' || child.name === 'function') {
      chords.push({ head: child, kind: undefined, inversion: undefined, bass: undefined, degrees: [] });
    }
    const chord = chords[chords.length - 1];
    if (!chord) continue;
    if (child.name === 'kind') chord.kind = child;
    if (child.name === 'inversion') chord.inversion = parseInteger(child.text);
    if (child.name === 'bass') chord.bass = child;
    if (child.name === 'degree') chord.degrees.push(child);
  }
  return chords;
}

/** The key stands with the last chord of a row; a lone chord is its own last. */
function keyOf(chords: readonly HarmonyChord[], by: Transposition): Key | null {
  const keyed = chords.findLast(({ head }) => findChild(head, 'numeral-key'));
  const element = keyed && findChild(keyed.head, 'numeral-key');
  const signature = element && parseInteger(findText(element, 'numeral-fifths'));
  if (!element || signature === undefined || Math.abs(signature) > 14) return null;
  const isMinor = (findText(element, 'numeral-mode') ?? '').includes('minor');
  return { tonic: fifths(signature + by.fifths + (isMinor ? 3 : 0)), mode: isMinor ? 'minor' : 'major' };
}

function textOf({ head, kind }: HarmonyChord): string {
  if (head.name === 'function') return head.text.trim() + (kind?.attributes['text'] ?? '');
  const root = findChild(head, 'numeral-root');
  return (root?.attributes['text'] ?? '') + (kind?.attributes['text'] ?? '');
}

function parseText(chords: readonly HarmonyChord[], key: Key): Numeral | null {
  const text = chords.map(textOf).join('/');
  const parsed = parseNumeral(text, key.mode);
  return parsed.ok ? parsed.value : null;
}

/** Printed text is believed when it names the chord that the elements name; it may say more (cadential, passing). */
function agrees(byText: Numeral, byStructure: Numeral | null, chords: readonly HarmonyChord[]): boolean {
  const kind = chords[0]?.kind?.text.trim() ?? '';
  if (!byStructure || kind === 'other' || kind === 'pedal') return true;
  const same = byText.degree.step === byStructure.degree.step && byText.degree.alter === byStructure.degree.alter;
  return same && byText.inversion === byStructure.inversion && byText.applied.length === byStructure.applied.length;
}

function readNumerals(chords: readonly HarmonyChord[], key: Key): Numeral | null {
  const [first, ...targets] = chords;
  const degree = first && degreeOf(first);
  const applied = targets.map(targetOf);
  const quality = first && qualityOf(first);
  if (!degree || !quality || applied.some((target) => target === null)) return null;
  const inversion = Math.min(first.inversion ?? 0, sizeOf(quality) - 1) as Numeral['inversion'];
  const numeral: Numeral = { degree, quality, inversion, applied: reduceTonic(applied as Target[], key), special: null, added: [] };
  const named: Numeral = isNeapolitan(numeral) ? { ...numeral, special: 'neapolitan' } : numeral;
  return checkNumeral(named).length === 0 ? named : null;
}

/** A row that ends on the key's own tonic applies to nothing. */
function reduceTonic(applied: readonly Target[], key: Key): Target[] {
  const last = applied[applied.length - 1];
  const isTonic = last && last.degree.step === 1 && last.degree.alter === 0 && last.mode === key.mode;
  return isTonic ? applied.slice(0, -1) : [...applied];
}

function degreeOf({ head }: HarmonyChord): Numeral['degree'] | null {
  const step = parseInteger(findText(head, 'numeral-root'));
  const alter = parseInteger(findText(head, 'numeral-alter') || '0');
  const known = STEPS.find((candidate) => candidate === step);
  return known && alter !== undefined ? { step: known, alter } : null;
}

function targetOf(chord: HarmonyChord): Target | null {
  const degree = degreeOf(chord);
  const quality = qualityOf(chord);
  return degree && { degree, mode: quality === 'minor' || quality === 'minor-seventh' ? 'minor' : 'major' };
}

function qualityOf({ kind, degrees }: HarmonyChord): Quality | null {
  const name = kind?.text.trim() ?? '';
  const stated = degrees.map((degree) => [parseInteger(findText(degree, 'degree-value')), parseInteger(findText(degree, 'degree-alter'))] as const);
  const special = (Object.entries(KIND_OF_QUALITY) as [Quality, (typeof KIND_OF_QUALITY)[Quality]][]).find(
    ([, { kind: own, degree }]) => own === name && degree && stated.some(([value, alter]) => value === degree.value && alter === degree.alter),
  );
  return special?.[0] ?? QUALITY_OF_KIND.get(name) ?? null;
}

/** A chord symbol: its root is read in the key in force. */
function readRootChord(chord: HarmonyChord, key: Key, by: Transposition): KeyedNumeral | null {
  const root = pitchClassOf(chord.head, 'root', by);
  const quality = qualityOf(chord);
  if (root === null || !quality || quality.startsWith('augmented-sixth')) return null;
  const bass = chord.bass ? pitchClassOf(chord.bass, 'bass', by) : null;
  const place = bass === null ? -1 : TEMPLATES[quality].indexOf(bass - root);
  const inversion = Math.min(chord.inversion ?? Math.max(place, 0), sizeOf(quality) - 1) as Numeral['inversion'];
  const plain: Numeral = { degree: degreeOfFifths(key, root), quality, inversion, applied: [], special: null, added: [] };
  const numeral: Numeral = isNeapolitan(plain) ? { ...plain, special: 'neapolitan' } : plain;
  return checkNumeral(numeral).length === 0 ? { key, numeral } : null;
}

function pitchClassOf(element: XmlElement, name: 'root' | 'bass', by: Transposition): Fifths | null {
  const step = findText(element, `${name}-step`) ?? '';
  const alter = parseInteger(findText(element, `${name}-alter`) || '0');
  const isLetter = (LETTERS as readonly string[]).includes(step);
  return isLetter && alter !== undefined ? fifths(fifthsOf(step as Letter, alter) + by.fifths) : null;
}
