import type { Result } from '../result';
import { type Key, parseKey } from '../theory/key';
import { parseNumeral } from '../theory/numeral-parse';
import { fifths } from '../theory/pitch';
import type { Annotation, KeyedNumeral } from './annotation';
import type { Draft } from './draft';
import { DEFAULT_LIMITS } from './limits';
import { catchRefusal } from './open-score-file';
import { type Rational, parseDecimal } from './rational';
import { nameFiguredBass } from './read-figured-bass';
import { type HarmonyReading, readHarmony } from './read-harmony';
import type { PartState } from './read-measure';
import { readText } from './read-score';
import { transpositionAt } from './read-attributes';
import { type Score, type ScoreError, ticks } from './score';
import { AT_PITCH, type Transposition } from './transposition';
import { type XmlElement, findChild, findText } from './xml';

/** Where in a MusicXML file an analysis can stand. */
export const ANALYSIS_SOURCES = ['harmony', 'figured-bass', 'lyrics'] as const;
export type AnalysisSource = (typeof ANALYSIS_SOURCES)[number];

/** What could not be read, for the teacher to see. */
export interface UnreadLabel {
  /** Number of the bar as printed. */
  readonly bar: string;
  readonly text: string;
}

export interface ImportedAnalysis {
  /** Sorted, at most one at a time. */
  readonly annotations: readonly Annotation[];
  readonly unread: readonly UnreadLabel[];
}

/** How many labels of each kind a file holds: what a teacher may ask to import. */
export function countAnalysis(xml: string): Result<Readonly<Record<AnalysisSource, number>>, ScoreError> {
  return catchRefusal(() => {
    const { found, score } = findWritten(xml);
    const lyrics = importFrom('lyrics', found, score).annotations.length;
    return { harmony: found.harmony.length, 'figured-bass': found['figured-bass'].length, lyrics };
  });
}

/**
 * The analysis that stands in a file, as labels. Keys: `harmony` may name its own; else, and for figured bass, the key
 * signature's (its mode as written, major where none is); in lyrics a prefix (`G: V65`) sets the key from there on.
 * Lyrics: of all verses the one in which most syllables are numerals.
 */
export function importAnalysis(xml: string, source: AnalysisSource): Result<ImportedAnalysis, ScoreError> {
  return catchRefusal(() => {
    const { found, score } = findWritten(xml);
    return importFrom(source, found, score);
  });
}

/** An element of an analysis with its place. */
interface Written {
  readonly element: XmlElement;
  readonly bar: number;
  readonly time: number;
  readonly grid: number;
  readonly divisions: Rational;
  readonly part: number;
  readonly transposition: Transposition;
}

type Found = Record<AnalysisSource, Written[]>;

function findWritten(xml: string): { found: Found; score: Score } {
  const found: Found = { harmony: [], 'figured-bass': [], lyrics: [] };
  const score = readText(xml, DEFAULT_LIMITS, (element, bar, draft, part) => noteDown(found, element, bar, draft, part), SKIPPED);
  return { found, score };
}

/** Analyses stand in elements that a Score needs nothing of. */
const SKIPPED: ReadonlySet<string> = new Set(['accidental', 'beam', 'clef', 'notehead', 'print', 'stem', 'technical']);

function noteDown(found: Found, element: XmlElement, bar: number, draft: Draft, part: PartState): void {
  const transposition = transpositionAt(part, Number(findText(element, 'staff') ?? 1)) ?? AT_PITCH;
  const place = { bar, grid: draft.ticksPerQuarter, divisions: part.divisions, part: part.index, transposition };
  const { at, onset } = draft.cursor;
  if (element.name === 'harmony' || element.name === 'figured-bass') found[element.name].push({ ...place, element, time: at });
  if (element.name === 'note' && findChild(element, 'lyric')) {
    found.lyrics.push({ ...place, element, time: findChild(element, 'chord') ? (onset ?? at) : at });
  }
}

function importFrom(source: AnalysisSource, found: Found, score: Score): ImportedAnalysis {
  const labels = source === 'harmony' ? readHarmonies(found.harmony, score) : source === 'lyrics' ? readLyrics(found.lyrics, score) : readFiguredBasses(found['figured-bass'], score);
  const unread = labels.flatMap(({ written, text, label }) => (label ? [] : [{ bar: score.bars[written.bar]?.number ?? '', text }]));
  return { annotations: gather(labels), unread };
}

interface ReadLabel {
  readonly written: Written;
  readonly start: number;
  readonly text: string;
  readonly label: HarmonyReading | null;
  readonly isAlternative: boolean;
}

/** Sorted by time; further labels at one moment and those marked as alternates become alternatives of the first. */
function gather(labels: readonly ReadLabel[]): Annotation[] {
  const annotations: (Annotation & { alternatives: KeyedNumeral[] })[] = [];
  const sorted = labels.toSorted((a, b) => a.start - b.start || Number(a.isAlternative) - Number(b.isAlternative));
  for (const { start, label } of sorted) {
    if (!label) continue;
    const last = annotations[annotations.length - 1];
    const { key, numeral } = label;
    if (last?.start === start && numeral) last.alternatives.push({ key, numeral });
    else if (last?.start !== start) annotations.push({ start: ticks(start), key, numeral, alternatives: [] });
  }
  return annotations.map(({ alternatives, ...label }) => (alternatives.length > 0 ? { ...label, alternatives } : label));
}

function startOf(written: Written, score: Score): number {
  const offset = parseDecimal(findText(written.element, 'offset') ?? '0') ?? { num: 0, den: 1 };
  const { divisions, grid, time, bar } = written;
  const ticksAway = (offset.num * divisions.den * score.ticksPerQuarter) / (offset.den * divisions.num);
  // A decimal offset is rounded in the file; the tick it means is the nearest.
  return (score.bars[bar]?.start ?? 0) + time * (score.ticksPerQuarter / grid) + Math.round(ticksAway);
}

function keyAt(score: Score, start: number): Key {
  const signature = score.keySignatures.findLast((key) => key.start <= start) ?? score.keySignatures[0];
  const mode = signature?.mode ?? 'major';
  return { tonic: fifths((signature?.fifths ?? 0) + (mode === 'minor' ? 3 : 0)), mode };
}

function readHarmonies(written: readonly Written[], score: Score): ReadLabel[] {
  let named: Key | null = null;
  return written.map((one) => {
    const start = startOf(one, score);
    const label = readHarmony(one.element, named ?? keyAt(score, start), one.transposition);
    if (one.element.children.some(({ name, children }) => name === 'numeral' && children.some((child) => child.name === 'numeral-key'))) named = label?.key ?? named;
    return { written: one, start, text: textOf(one.element), label, isAlternative: one.element.attributes['type'] === 'alternate' };
  });
}

/** All text inside, for a message. */
function textOf(element: XmlElement): string {
  return [element.text.trim(), ...element.children.map(textOf)].filter((text) => text !== '').join(' ').slice(0, 60);
}

function readFiguredBasses(written: readonly Written[], score: Score): ReadLabel[] {
  const passed = new Map<string, number>();
  return written.map((one) => {
    // Figures that stand one after another before a note follow each other by their durations.
    const place = `${one.part}/${one.bar}/${one.time}`;
    const start = startOf(one, score) + (passed.get(place) ?? 0);
    const duration = parseDecimal(findText(one.element, 'duration') ?? '0') ?? { num: 0, den: 1 };
    const length = (duration.num * one.divisions.den * score.ticksPerQuarter) / (duration.den * one.divisions.num);
    passed.set(place, (passed.get(place) ?? 0) + Math.round(length));
    const key = keyAt(score, start);
    const numeral = nameFiguredBass(one.element, score, one.part, start, key);
    return { written: one, start, text: textOf(one.element), label: numeral && { key, numeral }, isAlternative: false };
  });
}

/** `G: V65`, `f#:viio7`, `IV`. */
const KEYED = /^(?:([A-Ga-g][#b♯♭]?)\s*:)?\s*(.*)$/su;

function readLyrics(written: readonly Written[], score: Score): ReadLabel[] {
  const verses = new Map<string, ReadLabel[]>();
  const keys = new Map<string, Key>();
  for (const one of written) {
    for (const lyric of one.element.children.filter(({ name }) => name === 'lyric')) {
      const verse = `${one.part}/${lyric.attributes['number'] ?? lyric.attributes['name'] ?? '1'}`;
      const text = lyric.children.filter(({ name }) => name === 'text' || name === 'elision').map((piece) => piece.text).join('').trim();
      if (text === '') continue;
      const start = (score.bars[one.bar]?.start ?? 0) + one.time * (score.ticksPerQuarter / one.grid);
      const label = readKeyed(text, keys.get(verse) ?? keyAt(score, start));
      if (label) keys.set(verse, label.key);
      const read = { written: one, start, text, label, isAlternative: false };
      verses.set(verse, [...(verses.get(verse) ?? []), read]);
    }
  }
  return mostNumerals([...verses.values()]);
}

function readKeyed(text: string, inForce: Key): KeyedNumeral | null {
  const [, name, rest = ''] = KEYED.exec(text) ?? [];
  const stated = name ? parseKey(name) : null;
  const key = stated?.ok ? stated.value : inForce;
  const numeral = parseNumeral(rest, key.mode);
  return numeral.ok ? { key, numeral: numeral.value } : null;
}

/** A verse counts as an analysis when at least half of its syllables are numerals (a sung “I” is not one). */
function mostNumerals(verses: readonly ReadLabel[][]): ReadLabel[] {
  const count = (verse: readonly ReadLabel[]) => verse.filter(({ label }) => label).length;
  const analyses = verses.filter((verse) => 2 * count(verse) >= verse.length);
  return analyses.reduce<ReadLabel[]>((best, verse) => (count(verse) > count(best) ? verse : best), []);
}
