declare module "svg-to-pdfkit" {
  interface Options {
    width?: number;
    height?: number;
    preserveAspectRatio?: string;
    assumePt?: boolean;
    warningCallback?: (message: string) => void;
    imageCallback?: (link: string) => string;
    documentCallback?: (file: string) => null;
    fontCallback?: (family: string, bold: boolean, italic: boolean) => string;
  }
  export default function SVGtoPDF(document: PDFKit.PDFDocument, svg: string, x: number, y: number, options?: Options): void;
}
