import PdfDocument from 'pdfkit';
import { coverPages } from './cover-page.ts';
import type { DossierInput } from './dossier-input.ts';
import { DossierFonts } from './fonts.ts';
import { MUTED, Pen } from './pen.ts';
import { sourcePage } from './source-page.ts';

/**
 * The dossier of an edition as a PDF on A4: a cover, then a page a source. Vectors, our faces embedded as far as they are
 * used, text that can be selected.
 *
 * @param onPage called after each page of a source
 */
export async function writeDossier(
  input: DossierInput,
  onPage: (done: number) => void = () => undefined,
): Promise<Uint8Array> {
  const { head, sources } = input;
  const document = new PdfDocument({
    size: 'A4',
    // The layout places everything itself; a margin would make the library turn pages on its own.
    margins: { top: 0, left: 0, right: 0, bottom: 0 },
    autoFirstPage: false,
    bufferPages: true,
    lang: 'en',
    displayTitle: true,
    info: {
      Title: `${head.survey.name}, edition ${head.number}: dossier`,
      Author: `${head.frozenBy}, ${head.survey.team}`,
      Creator: `Eremite ${head.software.version}`,
      CreationDate: new Date(head.frozenAt),
    },
  });
  const pieces: Buffer[] = [];
  const whole = new Promise<Uint8Array>((resolve, reject) => {
    document.on('data', (piece: Buffer) => pieces.push(piece));
    document.on('end', () => resolve(Buffer.concat(pieces)));
    document.on('error', reject);
  });
  document.addPage();
  const pen = new Pen(document, new DossierFonts(document));
  coverPages(pen, input, () => document.addPage());
  for (const [i, source] of sources.entries()) {
    document.addPage();
    document.outline.addItem(`${source.rank} ${source.detail.verdict.name}`);
    sourcePage(pen, source, input);
    onPage(i + 1);
  }
  numberPages(pen, `edition ${head.number} of ${head.survey.name}`);
  document.end();
  return whole;
}

function numberPages(pen: Pen, what: string): void {
  const { start, count } = pen.document.bufferedPageRange();
  for (let page = start; page < start + count; page++) {
    pen.document.switchToPage(page);
    const text = `${what}, page ${page - start + 1} of ${count}`;
    pen.text(text, { x: 40, y: 824, width: 515, height: 10 }, { size: 6.5, colour: MUTED });
  }
}
