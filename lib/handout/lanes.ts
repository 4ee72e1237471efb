import type { KeyRegion, Label } from '../harmony/reading';
import type { Bar, Score } from '../score/score';
import { formatKeyForPeople } from '../theory/key';
import type { EngravingMark } from './engraving-marks';
import type { EngravedSystem } from './engraving-svg';
import type { Ruler } from './fonts';
import { type Ink, line, rule } from './ink';
import { setNumeral } from './numeral-ink';
import type { HandoutOrder } from './order';

/** One place under the score: a label to print or a blank to fill in. `number` counts the blanks from 1. */
export interface LaneEntry {
  readonly id: string;
  readonly label: Label;
  readonly ink: Ink | null;
  readonly number: number | null;
  /** The key whose region starts here, when it is to be printed. */
  readonly region: KeyRegion | null;
}

/** Least width of a blank, and what a pencil needs besides the numeral. */
const BLANK_WIDTH = 1250;
const GAP = 160;
const KEY_SIZE = 340;
const KEY_DROP = 560;
/** The engraver makes room for its own text, which is lower than a numeral with raised figures: the lane lies this much deeper. */
export const LANE_DROP = 170;
const NUMERAL_DEPTH = 180;

/** From the lane's baseline to the bottom of what stands under this system. */
export function laneDepth(entries: readonly LaneEntry[], system: EngravedSystem): number {
  const here = entries.filter((entry) => system.marks.has(entry.id));
  if (here.length === 0) return 0;
  return LANE_DROP + (here.some((entry) => entry.region) ? KEY_DROP + NUMERAL_DEPTH : NUMERAL_DEPTH);
}

/** What stands under the score, in order. Labels without a numeral that are not asked for leave no trace. */
export function laneEntries(order: HandoutOrder): LaneEntry[] {
  let number = 0;
  return order.reading.labels.flatMap((label, index) => {
    const blank = order.kind === 'worksheet' && order.asked.has(label.id);
    const region = regionAt(order, label, index === 0);
    const before = order.reading.labels[index - 1]?.numeral ?? null;
    const ink = blank || !label.numeral ? null : setNumeral(label.numeral, before, label.key.mode, order.conventions);
    if (!blank && !ink && !region) return [];
    if (blank) number += 1;
    return [{ id: `L${index}`, label, ink, number: blank ? number : null, region }];
  });
}

function regionAt(order: HandoutOrder, label: Label, first: boolean): KeyRegion | null {
  if (order.kind === 'worksheet' && !order.keysGiven && !first) return null;
  return order.reading.regions.find((region) => region.start === label.start || (first && region.start <= label.start)) ?? null;
}

/** The marks that make room for the entries, in the engraver's own size (`scale` is applied afterwards). */
export function marksOf(entries: readonly LaneEntry[], score: Score, scale: number): EngravingMark[] {
  return entries.map((entry) => {
    const bar = barAt(score.bars, entry.label.start);
    return {
      id: entry.id,
      bar: bar.index,
      onset: { numerator: entry.label.start - bar.start, denominator: score.ticksPerQuarter },
      beatType: bar.time?.beatType ?? 4,
      roomFor: textOfWidth(((entry.ink?.width ?? BLANK_WIDTH) + GAP) / scale),
    };
  });
}

function barAt(bars: readonly Bar[], tick: number): Bar {
  const bar = bars.findLast((candidate) => candidate.start <= tick);
  if (!bar) throw new Error('a label lies before the first bar');
  return bar;
}

/** A text that the engraver's own face sets about this wide: an h of its text size takes about 200, and is as tall as a numeral. */
function textOfWidth(width: number): string {
  return 'h'.repeat(Math.max(1, Math.ceil(width / 200)));
}

export interface LaneFrame {
  readonly ruler: Ruler;
  readonly scale: number;
  readonly keysGiven: boolean;
  /** The lane's baseline and its right end, in page units. */
  readonly y: number;
  readonly right: number;
}

/** Draws the entries of one system on the lane's baseline: numerals, numbered blanks, key names underneath. */
export function drawLane(entries: readonly LaneEntry[], system: EngravedSystem, left: number, frame: LaneFrame): string {
  const placed = entries.flatMap((entry) => {
    const mark = system.marks.get(entry.id);
    return mark ? [{ entry, x: left + mark.x * frame.scale }] : [];
  });
  return placed
    .map(({ entry, x }, i) => {
      const end = (placed[i + 1]?.x ?? frame.right) - GAP;
      const numeral = entry.ink ? `<g transform="translate(${Math.round(x)} ${Math.round(frame.y)})">${entry.ink.svg}</g>` : '';
      const blank = entry.number === null ? '' : drawBlank(entry.number, x, end, frame);
      return numeral + blank + drawKey(entry, x, frame);
    })
    .join('');
}

function drawBlank(number: number, x: number, end: number, frame: LaneFrame): string {
  const numberInk = line(frame.ruler, String(number), 'sans', 230, { x, y: frame.y + 40 });
  const start = x + numberInk.width + 70;
  return numberInk.svg + rule({ x: start, y: frame.y + 60 }, { x: Math.max(start + 700, end), y: frame.y + 60 }, 14);
}

function drawKey(entry: LaneEntry, x: number, frame: LaneFrame): string {
  if (!entry.region) return '';
  const y = frame.y + KEY_DROP;
  if (frame.keysGiven) return line(frame.ruler, formatKeyForPeople(entry.region.key), 'book-italic', KEY_SIZE, { x, y }).svg;
  const word = line(frame.ruler, 'Key', 'book-italic', KEY_SIZE, { x, y });
  return word.svg + rule({ x: x + word.width + 120, y: y + 40 }, { x: x + word.width + 2100, y: y + 40 }, 14);
}

