declare module 'svg-to-pdfkit' {
  interface Options {
    width?: number;
    height?: number;
    preserveAspectRatio?: string;
    assumePt?: boolean;
    /** Name of a registered font for a face asked for. */
    fontCallback?: (family: string, bold: boolean, italic: boolean, options: object) => string;
    warningCallback?: (warning: string) => void;
  }
  export default function svgToPdf(
    document: PDFKit.PDFDocument,
    svg: string,
    x: number,
    y: number,
    options?: Options,
  ): void;
}
