/** The part of the package's interface that is used here; it declares no types. */
declare module 'svg-to-pdfkit' {
  import type PDFDocument from 'pdfkit';
  export default function SVGtoPDF(
    doc: typeof PDFDocument.prototype,
    svg: string,
    x: number,
    y: number,
    options?: Readonly<Record<string, unknown>>,
  ): void;
}
