import { createRequire } from 'node:module';
import path from 'node:path';
import { type EngravedSystem, readEngraving } from './engraving-svg';
import { insertMarks, type EngravingMark } from './engraving-marks';

/**
 * Lengths in a handout are hundredths of a millimetre, the unit in which the engraver draws at full size: a staff space
 * is 180 of them, a staff 720.
 */
export const STAFF_SPACE = 180;

export interface EngravingOrder {
  /** A partwise MusicXML text. */
  readonly xml: string;
  /** 0-based, inclusive. */
  readonly firstBar: number;
  readonly lastBar: number;
  /** Marks under the lowest staff. */
  readonly marks: readonly EngravingMark[];
  /** Width of a system at full size. */
  readonly width: number;
}

export interface Engraving {
  /** Glyph definitions that the systems refer to. */
  readonly definitions: string;
  readonly systems: readonly EngravedSystem[];
}

const OPTIONS = {
  scale: 100,
  pageHeight: 60000,
  adjustPageHeight: true,
  pageMarginLeft: 0,
  pageMarginRight: 0,
  pageMarginTop: 100,
  pageMarginBottom: 100,
  header: 'none',
  footer: 'none',
  breaks: 'auto',
  svgBoundingBoxes: true,
  svgRemoveXlink: true,
  // Ids are random otherwise, and the same order would not give the same drawing.
  xmlIdSeed: 1,
  lyricSize: 4,
  harmDist: 2.5,
  spacingStaff: 10,
} as const;

/** The part of the engraver's interface that is used here; the package has no types. */
interface VerovioToolkit {
  setOptions(options: Readonly<Record<string, unknown>>): void;
  loadData(text: string): boolean;
  getMEI(): string;
  select(selection: { measureRange: string }): boolean;
  redoLayout(): void;
  renderToSVG(page: number): string;
}

interface VerovioPackage {
  readonly module: { onRuntimeInitialized: () => void };
  readonly toolkit: new () => VerovioToolkit;
}

let toolkit: Promise<VerovioToolkit> | null = null;

/** The engraver is a WebAssembly module that takes about a second to start: one per process. */
function getToolkit(): Promise<VerovioToolkit> {
  toolkit ??= startToolkit();
  return toolkit;
}

/**
 * The package's CommonJS build, asked for by `require`: run from the sources, the other build would first be parsed as
 * a module of ours, all ten megabytes of it.
 */
function startToolkit(): Promise<VerovioToolkit> {
  const verovio = createRequire(path.join(process.cwd(), 'package.json'))('verovio') as VerovioPackage;
  return new Promise((resolve) => {
    verovio.module.onRuntimeInitialized = () => resolve(new verovio.toolkit());
  });
}

/** Draws a bar range as systems of SVG with the places of its marks. Throws when the engraver cannot load the text. */
export async function engrave(order: EngravingOrder): Promise<Engraving> {
  const engraver = await getToolkit();
  engraver.setOptions({ ...OPTIONS, pageWidth: Math.round(order.width / 10) });
  if (!engraver.loadData(withoutMultipleRests(order.xml))) throw new Error('the engraver cannot load this score');
  const marked = insertMarks(engraver.getMEI(), order.marks);
  if (!engraver.loadData(marked)) throw new Error('the engraver cannot load the marked score');
  engraver.select({ measureRange: `${order.firstBar + 1}-${order.lastBar + 1}` });
  engraver.redoLayout();
  return readEngraving(engraver.renderToSVG(1));
}

/** The engraver joins the bars of a multiple rest into one; every bar must stay one, as labels count them. */
function withoutMultipleRests(xml: string): string {
  return xml.replace(/<multiple-rest[^>]*>[^<]*<\/multiple-rest>/g, '');
}
