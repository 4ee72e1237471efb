/** The part of the engraver's interface that is used here; the package declares no types for these paths. */
declare module 'verovio/wasm' {
  export default function createVerovioModule(): Promise<unknown>;
}

declare module 'verovio/esm' {
  export class VerovioToolkit {
    constructor(module: unknown);
    setOptions(options: Readonly<Record<string, unknown>>): void;
    loadData(text: string): boolean;
    getMEI(): string;
    select(selection: { measureRange: string }): boolean;
    redoLayout(): void;
    renderToSVG(page: number): string;
    getLog(): string;
  }
}

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
