import type { DossierFonts, Face } from './fonts.ts';

export const INK = '#1d232c';
export const MUTED = '#575f6b';
export const LINE = '#b8ae98';
export const AMBER = '#8f5800';

export interface Style {
  face?: Face;
  size?: number;
  colour?: string;
}
export interface Box {
  x: number;
  y: number;
  width: number;
  /** What does not fit is cut with an ellipsis; without it the text takes what it needs. */
  height?: number;
}

/** Sets text on a page: any script our faces know, wrapped, never flowing on to another page by itself. */
export class Pen {
  constructor(
    readonly document: PDFKit.PDFDocument,
    readonly fonts: DossierFonts,
  ) {}

  /** @returns where the text ends below */
  text(content: string, box: Box, { face = 'sans', size = 8, colour = INK }: Style = {}): number {
    const { document } = this;
    const { x, y, width } = box;
    const need = this.height(content, width, { face, size });
    // One line is always set, however small the box: its last leading may stick out.
    const line = this.height('x', width, { face, size });
    const height = Math.min(need, Math.max(line, box.height ?? need));
    const shown = need > height + 0.1 ? this.#cut(content, width, height, { face, size }) : content;
    const runs = this.fonts.runs(face, shown);
    document.fillColor(colour).fontSize(size);
    for (const [i, { font, text }] of runs.entries()) {
      document.font(font);
      const continued = i < runs.length - 1;
      const options = { width, lineGap: LEADING * size, continued };
      if (i === 0) document.text(text, x, y, options);
      else document.text(text, options);
    }
    return y + height;
  }

  /** Height that a text takes at a width. */
  height(content: string, width: number, { face = 'sans', size = 8 }: Style = {}): number {
    this.document.font(this.fonts.first(face)).fontSize(size);
    // Letters of other subsets are as wide as these on average; a line more for every mixture errs on the safe side.
    return this.document.heightOfString(content, { width, lineGap: LEADING * size });
  }

  rule(x: number, y: number, width: number, colour = LINE): void {
    this.document
      .save()
      .moveTo(x, y)
      .lineTo(x + width, y)
      .lineWidth(0.5)
      .strokeColor(colour)
      .stroke()
      .restore();
  }

  /** A small heading with its rule. @returns where what follows begins */
  heading(content: string, { x, y, width }: Box): number {
    const end = this.text(content, { x, y, width }, { face: 'sans-bold', size: 8.5, colour: AMBER });
    this.rule(x, end, width);
    return end + 3;
  }

  #cut(content: string, width: number, height: number, style: Style): string {
    let [low, high] = [0, content.length];
    while (low < high) {
      const middle = Math.ceil((low + high) / 2);
      if (this.height(`${content.slice(0, middle)}…`, width, style) <= height + 0.1) low = middle;
      else high = middle - 1;
    }
    return low === 0 ? '' : `${content.slice(0, low).trimEnd()}…`;
  }
}

/** Space between lines, of the size. */
const LEADING = 0.08;
