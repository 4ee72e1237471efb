import { engrave } from './engrave';
import type { EngravedSystem } from './engraving-svg';
import { createRuler, type Ruler } from './fonts';
import { escapeXml, line, lineEndingAt, rule, wrap } from './ink';
import { drawLane, laneEntries, type LaneEntry, LANE_DROP, laneDepth, marksOf } from './lanes';
import { type HandoutOrder, PAPER_SIZES, STAFF_SCALES } from './order';

/** Pages ready to show or to print. Each is a whole SVG in hundredths of a millimetre, its fonts named by lib/handout/fonts. */
export interface HandoutDocument {
  readonly title: string;
  readonly width: number;
  readonly height: number;
  readonly pages: readonly string[];
}

const MARGIN = { left: 1800, right: 1800, top: 1600, bottom: 1700 };
const SYSTEM_GAP = 650;
const TITLE_SIZE = 760;
const TEXT_SIZE = 400;
const SMALL_SIZE = 320;
const LEADING = 1.32;

/** What is drawn on a page, and how far down it reaches. */
interface Block {
  readonly height: number;
  readonly draw: (y: number) => string;
}

interface Sheet {
  readonly order: HandoutOrder;
  readonly ruler: Ruler;
  readonly left: number;
  readonly right: number;
  readonly bottom: number;
}

/** Sets a handout: head, instructions, systems with their lanes, foot. Throws when the engraver cannot load the score. */
export async function composeHandout(order: HandoutOrder): Promise<HandoutDocument> {
  const { width, height } = PAPER_SIZES[order.paper];
  const ruler = createRuler();
  const sheet: Sheet = { order, ruler, left: MARGIN.left, right: width - MARGIN.right, bottom: height - MARGIN.bottom };
  const entries = laneEntries(order);
  const scale = STAFF_SCALES[order.staffSize];
  const engraving = await engrave({
    xml: order.xml,
    firstBar: order.firstBar,
    lastBar: order.lastBar,
    marks: marksOf(entries, order.score, scale),
    width: (sheet.right - sheet.left) / scale,
  });
  const systems = engraving.systems.map((system) => systemBlock(sheet, entries, system, scale));
  const pages = paginate([headBlock(sheet), ...systems], sheet.bottom);
  const svgs = pages.map((body, i) => pageSvg(sheet, engraving.definitions, body + foot(sheet, i + 1, pages.length)));
  return { title: order.title, width, height, pages: svgs };
}

function paginate(blocks: readonly Block[], bottom: number): string[] {
  const pages: string[] = [''];
  let y = MARGIN.top;
  for (const block of blocks) {
    if (y + block.height > bottom && y > MARGIN.top) {
      pages.push('');
      y = MARGIN.top;
    }
    pages[pages.length - 1] += block.draw(y);
    y += block.height;
  }
  return pages;
}

function systemBlock(sheet: Sheet, entries: readonly LaneEntry[], system: EngravedSystem, scale: number): Block {
  const marks = [...system.marks.values()];
  const lane = Math.max(...marks.map((mark) => mark.y), system.bottom) - system.top;
  const height = lane * scale + laneDepth(entries, system) + SYSTEM_GAP;
  const draw = (y: number): string => {
    const music = `<g transform="translate(${sheet.left} ${Math.round(y - system.top * scale)}) scale(${scale})">${system.svg}</g>`;
    const baseline = y + ((marks[0]?.y ?? 0) - system.top) * scale + LANE_DROP;
    const frame = { ruler: sheet.ruler, scale, keysGiven: givesKeys(sheet.order), y: baseline, right: sheet.right };
    return music + drawLane(entries, system, sheet.left, frame);
  };
  return { height, draw };
}

function givesKeys(order: HandoutOrder): boolean {
  return order.kind === 'key' || order.keysGiven;
}

/** Title, byline, course and the student's line over a double hairline; then the instructions. */
function headBlock(sheet: Sheet): Block {
  const { order, ruler, left, right } = sheet;
  const titleLines = wrap(ruler, order.title, 'book', TITLE_SIZE, right - left - 3200);
  const instructions = order.instructions.trim() === '' ? [] : wrap(ruler, order.instructions.trim(), 'book', TEXT_SIZE, right - left);
  const titleHeight = titleLines.length * TITLE_SIZE * 1.15;
  const ruleY = titleHeight + 1150;
  const height = ruleY + 450 + instructions.length * TEXT_SIZE * LEADING + (instructions.length > 0 ? 350 : 0);
  const draw = (y: number): string =>
    [
      ...titleLines.map((text, i) => line(ruler, text, 'book', TITLE_SIZE, { x: left, y: y + TITLE_SIZE * (1 + 1.15 * i) - 100 }).svg),
      lineEndingAt(ruler, order.kind === 'key' ? 'Key' : 'Worksheet', 'book-italic', 460, { x: right, y: y + TITLE_SIZE - 100 }).svg,
      line(ruler, order.byline, 'book-italic', TEXT_SIZE, { x: left, y: y + titleHeight + 330 }).svg,
      line(ruler, order.course, 'sans', SMALL_SIZE, { x: left, y: y + titleHeight + 860 }).svg,
      order.kind === 'worksheet' ? studentLine(sheet, y + titleHeight + 860) : '',
      rule({ x: left, y: y + ruleY }, { x: right, y: y + ruleY }, 25),
      rule({ x: left, y: y + ruleY + 60 }, { x: right, y: y + ruleY + 60 }, 9),
      ...instructions.map((text, i) => line(ruler, text, 'book', TEXT_SIZE, { x: left, y: y + ruleY + 620 + i * TEXT_SIZE * LEADING }).svg),
    ].join('');
  return { height, draw };
}

function studentLine({ ruler, right }: Sheet, y: number): string {
  const date = line(ruler, 'Date', 'sans', SMALL_SIZE, { x: right - 3000, y });
  const name = line(ruler, 'Name', 'sans', SMALL_SIZE, { x: right - 9600, y });
  return (
    name.svg +
    rule({ x: right - 9600 + name.width + 120, y: y + 30 }, { x: right - 3200, y: y + 30 }, 12) +
    date.svg +
    rule({ x: right - 3000 + date.width + 120, y: y + 30 }, { x: right, y: y + 30 }, 12)
  );
}

function foot(sheet: Sheet, page: number, pages: number): string {
  const { order, ruler, left, right, bottom } = sheet;
  const y = bottom + 750;
  const place = pages > 1 ? `${page} / ${pages}` : '';
  const source = wrap(ruler, order.source, 'sans', 260, right - left - 1800).slice(0, 2);
  return (
    source.map((text, i) => line(ruler, text, 'sans', 260, { x: left, y: y + i * 340 }).svg).join('') +
    lineEndingAt(ruler, place, 'sans', SMALL_SIZE, { x: right, y }).svg
  );
}

function pageSvg({ order }: Sheet, definitions: string, body: string): string {
  const { width, height } = PAPER_SIZES[order.paper];
  return (
    `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 ${width} ${height}"` +
    ` color="#000" fill="#000" font-family="book"><title>${escapeXml(order.title)}</title>` +
    `<defs>${definitions}</defs>${body}</svg>`
  );
}
