import PDFDocument from 'pdfkit';
import SVGtoPDF from 'svg-to-pdfkit';
import type { HandoutDocument } from './compose';
import { FACES, type Face, registerFaces } from './fonts';

/** A hundredth of a millimetre in PDF points. */
const POINTS = 72 / 2540;

export interface PdfFacts {
  /** Printed into the file; the same facts and document give the same bytes. */
  readonly createdAt: Date;
  readonly author: string;
}

/** Writes a handout as a vector PDF with embedded, subset fonts. */
export async function writePdf(handout: HandoutDocument, facts: PdfFacts): Promise<Uint8Array> {
  const size: [number, number] = [handout.width * POINTS, handout.height * POINTS];
  const info = { Title: handout.title, Author: facts.author, Creator: 'Understave', CreationDate: facts.createdAt };
  const doc = new PDFDocument({ autoFirstPage: false, size, margin: 0, info, lang: 'en', displayTitle: true });
  registerFaces(doc);
  const bytes = collect(doc);
  for (const page of handout.pages) {
    doc.addPage({ size, margin: 0 });
    SVGtoPDF(doc, page, 0, 0, { width: size[0], height: size[1], assumePt: true, fontCallback });
  }
  doc.end();
  return bytes;
}

function collect(doc: PDFKit.PDFDocument): Promise<Uint8Array> {
  return new Promise((resolve, reject) => {
    const chunks: Buffer[] = [];
    doc.on('data', (chunk: Buffer) => chunks.push(chunk));
    doc.on('end', () => resolve(new Uint8Array(Buffer.concat(chunks))));
    doc.on('error', reject);
  });
}

/** Our own text names its font; the engraver's text says bold or italic and falls to the book face. */
function fontCallback(family: string, bold: boolean, italic: boolean): string {
  const name = family.split(',')[0]?.replace(/["']/g, '').trim() ?? '';
  if (isFont(name) && name !== 'book') return name;
  if (/leipzig|verovio|bravura/i.test(name)) return 'engraver';
  return bold ? 'book-bold' : italic ? 'book-italic' : 'book';
}

function isFont(name: string): boolean {
  return FACES.includes(name.split('.')[0] as Face);
}
