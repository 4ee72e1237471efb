import { equalKeys } from '../theory/key';
import type { Annotation, KeyedNumeral } from './annotation';
import type { Draft } from './draft';
import { DEFAULT_LIMITS } from './limits';
import { type Rational, rational } from './rational';
import { transpositionAt } from './read-attributes';
import type { PartState } from './read-measure';
import { readText } from './read-score';
import type { Bar, Score } from './score';
import { AT_PITCH, type Transposition } from './transposition';
import { harmonyLines, noHarmonyLines } from './write-harmony';
import type { XmlElement } from './xml';

/** Text put into a file at an offset of its text; nothing else of the file changes. */
export interface Insertion {
  readonly at: number;
  readonly text: string;
}

/**
 * The score with the analysis in it: `harmony` elements below the last staff of the lowest part that sounds as written.
 * Every character of `xml` is kept, in order. Annotations must be sorted and lie within the score, and `xml` must be a
 * text that `readScoreText` reads; anything else is a bug and throws.
 */
export function annotateScore(xml: string, annotations: readonly Annotation[]): string {
  const pieces: string[] = [];
  let done = 0;
  for (const { at, text } of findInsertions(xml, annotations)) {
    pieces.push(xml.slice(done, at), text);
    done = at;
  }
  return pieces.join('') + xml.slice(done);
}

/** Where the labels go, sorted; for writers that keep the file's bytes. */
export function findInsertions(xml: string, annotations: readonly Annotation[]): Insertion[] {
  const anchors = new AnchorWatch(xml);
  const score = readText(xml, DEFAULT_LIMITS, (element, bar, draft, part) => anchors.see(element, bar, draft, part));
  const part = anchors.choosePart(score);
  const insertions = annotations.map((annotation, i) => {
    const anchor = anchors.get(part, score, annotation.start);
    const before = annotations[i - 1];
    return { at: anchor.at, text: insertionText(xml, anchor, annotation, !before || !equalKeys(before.key, annotation.key)) };
  });
  return insertions.sort((a, b) => a.at - b.at);
}

/** A place between two elements of a bar, and when it is. */
interface Anchor {
  /** Offset in the text. */
  readonly at: number;
  /** Ticks of the bar, in the draft's grid when it was seen. */
  readonly time: number;
  readonly grid: number;
  readonly bar: number;
  readonly staff: number;
  readonly divisions: Rational;
  readonly transposition: Transposition;
  readonly isNote: boolean;
}

interface PlacedAnchor extends Anchor {
  /** Divisions from the anchor to the label. */
  readonly offset: Rational;
  readonly staves: number;
}

/** Notes down all places of every part where a label may be put: before a note that begins a chord, before a move, at a bar's end. */
class AnchorWatch {
  /** By part, then by bar. */
  private readonly anchors: Anchor[][][] = [];
  private readonly parts: PartState[] = [];

  constructor(private readonly xml: string) {}

  see(element: XmlElement, bar: number, draft: Draft, part: PartState): void {
    const at = this.placeOf(element);
    if (at === undefined) return;
    const isNote = element.name === 'note';
    const staff = isNote ? Number(element.children.find(({ name }) => name === 'staff')?.text ?? 1) : 0;
    const transposition = transpositionAt(part, staff || part.staves) ?? AT_PITCH;
    const anchor = { at, time: draft.cursor.at, grid: draft.ticksPerQuarter, bar, staff, divisions: part.divisions, transposition, isNote };
    this.parts[part.index] = part;
    const bars = (this.anchors[part.index] ??= []);
    (bars[bar] ??= []).push(anchor);
  }

  private placeOf(element: XmlElement): number | undefined {
    if (element.name === 'note') return element.children.some(({ name }) => name === 'chord') ? undefined : element.start;
    if (element.name === 'backup' || element.name === 'forward') return element.start;
    const isBar = element.name === 'measure' || element.name === 'part';
    const closing = this.xml.lastIndexOf('<', element.end - 1);
    return isBar && closing > element.start ? closing : undefined;
  }

  /** The last part with pitched notes that sounds as written all through; or else the last with pitched notes, or the last. */
  choosePart(score: Score): number {
    const pitched = [...new Set(score.notes.map(({ part }) => part))].sort((a, b) => b - a);
    const atPitch = pitched.find((part) => this.anchors[part]?.flat().every(({ transposition }) => transposition === AT_PITCH));
    return atPitch ?? pitched[0] ?? this.parts.length - 1;
  }

  /** The best place for a label: at a note of the last staff that begins there, at any note there, or after the last place before. */
  get(part: number, score: Score, start: number): PlacedAnchor {
    const bar = score.bars.findLast((candidate) => candidate.start <= start)?.index ?? 0;
    const bars = this.anchors[part] ?? [];
    const staves = this.parts[part]?.staves ?? 1;
    const lateness = (anchor: Anchor) => (score.bars[anchor.bar] as Bar).start + anchor.time * (score.ticksPerQuarter / anchor.grid) - start;
    const chosen = chooseAnchor(bars[bar] ?? [], lateness, staves) ?? bars.slice(0, bar).flat().at(-1) ?? bars.flat()[0];
    if (!chosen) throw new Error('a label in a score without a place for it');
    const offset = rational(-lateness(chosen) * chosen.divisions.num, score.ticksPerQuarter * chosen.divisions.den);
    return { ...chosen, staves, offset };
  }
}

function chooseAnchor(anchors: readonly Anchor[], lateness: (anchor: Anchor) => number, staves: number): Anchor | undefined {
  const exact = anchors.filter((anchor) => anchor.isNote && lateness(anchor) === 0);
  const early = anchors.filter((anchor) => lateness(anchor) <= 0);
  const latest = early.reduce<Anchor | undefined>((best, one) => (best && lateness(best) >= lateness(one) ? best : one), undefined);
  return exact.find(({ staff }) => staff === staves) ?? exact[0] ?? latest;
}

function insertionText(xml: string, anchor: PlacedAnchor, annotation: Annotation, showKey: boolean): string {
  const place = {
    offset: anchor.offset.num === 0 ? null : formatDecimal(anchor.offset),
    staff: anchor.staves > 1 ? anchor.staves : null,
    transposition: anchor.transposition,
  };
  const { key, numeral } = annotation;
  const explicit = { ...place, type: 'explicit', showKey } as const;
  const lines = [
    ...(numeral ? harmonyLines({ key, numeral }, explicit) : noHarmonyLines(key, explicit)),
    ...(annotation.alternatives ?? []).flatMap((other: KeyedNumeral) => harmonyLines(other, { ...place, type: 'alternate', showKey: false })),
  ];
  const { indent, newline } = layoutBefore(xml, anchor.at);
  return lines.map((line) => (newline === '' ? line.trim() : `${line}${newline}${indent}`)).join('');
}

/** The file's own line ends and indentation; everything on one line where the file has no lines. */
function layoutBefore(xml: string, at: number): { indent: string; newline: string } {
  const lineStart = xml.lastIndexOf('\n', at - 1) + 1;
  const indent = xml.slice(lineStart, at);
  if (lineStart === 0 || indent.trim() !== '') return { indent: '', newline: '' };
  return { indent, newline: xml[lineStart - 2] === '\r' ? '\r\n' : '\n' };
}

/** At most six places: read back, it is within a hair of its tick. */
function formatDecimal({ num, den }: Rational): string {
  return String(Number((num / den).toFixed(6)));
}
