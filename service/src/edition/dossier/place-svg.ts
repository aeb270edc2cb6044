import svgToPdf from 'svg-to-pdfkit';
import type { DossierFonts, Face } from './fonts.ts';

/** Width and height that a drawing of ours states. */
export function sizeOf(svg: string): { width: number; height: number } {
  const number = (name: string) => Number(new RegExp(`<svg[^>]*\\s${name}="([\\d.]+)"`).exec(svg)?.[1] ?? 0);
  return { width: number('width'), height: number('height') };
}

/**
 * Draws one of our SVG pictures as vectors, scaled to a width.
 *
 * @returns the height it takes
 */
export function placeSvg(
  document: PDFKit.PDFDocument,
  fonts: DossierFonts,
  svg: string,
  { x, y, width, maxHeight }: { x: number; y: number; width: number; maxHeight: number },
): number {
  const size = sizeOf(svg);
  const scale = Math.min(width / size.width, maxHeight / size.height);
  const fitted = { width: size.width * scale, height: size.height * scale };
  svgToPdf(document, printable(svg, fonts), x, y, {
    ...fitted,
    assumePt: true,
    preserveAspectRatio: 'xMinYMin meet',
    fontCallback: (family, bold) => {
      // A run names its font outright; anything else is a face of the drawing.
      if (family.includes('/')) return family;
      return fonts.first(faceOf(family, bold));
    },
  });
  return fitted.height;
}

const faceOf = (family: string, bold: boolean): Face => {
  const face = /mono/i.test(family) ? 'mono' : 'sans';
  return bold ? `${face}-bold` : face;
};

/**
 * What the printer of drawings does not know is taken out: halos about letters (paint-order), which it would paint over
 * them. Letters that a face's first subset lacks name the font that has them.
 */
function printable(svg: string, fonts: DossierFonts): string {
  return svg
    .replace(/<text\b[^>]*>/g, (tag) =>
      tag.includes('paint-order')
        ? tag.replace(/\s(stroke|stroke-width|stroke-linejoin|paint-order)="[^"]*"/g, '')
        : tag,
    )
    .replace(/(<(?:text|tspan)\b([^>]*)>)([^<]+)/g, (_, tag: string, attributes: string, content: string) => {
      const face: Face = /mono/i.test(attributes) ? 'mono' : 'sans';
      const runs = fonts.runs(face, unescape(content));
      if (runs.every(({ font }) => font === fonts.first(face)))
        return tag + escape(runs.map(({ text }) => text).join(''));
      return (
        tag +
        runs
          .map(({ font, text }) =>
            font === fonts.first(face) ? escape(text) : `<tspan font-family="${font}">${escape(text)}</tspan>`,
          )
          .join('')
      );
    });
}

const unescape = (text: string): string =>
  text
    .replaceAll('&lt;', '<')
    .replaceAll('&gt;', '>')
    .replaceAll('&quot;', '"')
    .replaceAll('&#39;', "'")
    .replaceAll('&amp;', '&');
const escape = (text: string): string => text.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;');
