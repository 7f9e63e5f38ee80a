/**
 * The shop's logo on paper: PNG and JPEG by pdfkit, SVG by svg-to-pdfkit after taking out everything that could reach
 * outside the file. A logo that cannot be read is told as a sentence, never thrown.
 */
import SVGtoPDF from "svg-to-pdfkit";
import PDFDocument from "pdfkit";
import type { PaperBox } from "@/iso";

export type LogoKind = "png" | "jpeg" | "svg";

/** Largest side of a picture, pixels: unpacked it must still fit in memory many times over. */
const MOST_PIXELS = 3_000;
const MOST_SVG_CHARACTERS = 400_000;

/** Told by content, not by name. */
export function logoKind(bytes: Uint8Array): LogoKind | null {
  if (bytes[0] === 0x89 && bytes[1] === 0x50 && bytes[2] === 0x4e && bytes[3] === 0x47) return "png";
  if (bytes[0] === 0xff && bytes[1] === 0xd8 && bytes[2] === 0xff) return "jpeg";
  const start = new TextDecoder().decode(bytes.subarray(0, 1_000));
  return /<svg[\s>]/i.test(start) ? "svg" : null;
}

const MOST_REUSED = 50;

/** null when the logo can be printed, else one plain sentence saying why not. Tries it on a page that is thrown away. */
export function logoProblem(bytes: Uint8Array): string | null {
  const refused = logoKind(bytes) === "svg" ? svgRefusal(new TextDecoder().decode(bytes)) : null;
  if (refused !== null) return refused;
  const trial = new PDFDocument({ size: [200, 200], margin: 0, autoFirstPage: true });
  return paintLogo(trial, bytes, { minX: 10, minY: 10, maxX: 60, maxY: 30 });
}

/** Fits the logo into a box given in the document's present units; the sentence that says why it could not. */
export function paintLogo(document: PDFKit.PDFDocument, bytes: Uint8Array, box: PaperBox): string | null {
  const kind = logoKind(bytes);
  if (kind === null) return "The logo is not a PNG, JPEG or SVG picture.";
  const size = kind === "svg" ? null : pixelSize(bytes, kind);
  if (size && Math.max(...size) > MOST_PIXELS) return `The logo is larger than ${MOST_PIXELS} pixels.`;
  document.save();
  try {
    if (kind === "svg") paintSvg(document, bytes, box);
    else {
      document.image(Buffer.from(bytes), box.minX, box.minY, { fit: [box.maxX - box.minX, box.maxY - box.minY], align: "center", valign: "center" });
    }
    return null;
  } catch {
    return "The logo file is damaged and cannot be printed.";
  } finally {
    document.restore();
  }
}

/** What would print wrong or take too long, told when a logo is stored. */
function svgRefusal(text: string): string | null {
  if (/<image[\s>]/i.test(text)) return "The SVG logo has a picture inside; store that picture as PNG or JPEG instead.";
  return (text.match(/<use[\s>]/gi)?.length ?? 0) > MOST_REUSED ? "The SVG logo repeats its parts too often to print." : null;
}

function paintSvg(document: PDFKit.PDFDocument, bytes: Uint8Array, box: PaperBox): void {
  const svg = safeSvg(new TextDecoder("utf-8", { fatal: true }).decode(bytes));
  SVGtoPDF(document, svg, box.minX, box.minY, {
    width: box.maxX - box.minX, height: box.maxY - box.minY, preserveAspectRatio: "xMidYMid meet", assumePt: true,
    warningCallback: () => undefined, imageCallback: () => "", documentCallback: () => null, fontCallback: () => "regular",
  });
}

const UNWANTED = "script|foreignObject|iframe|object|embed|image|feImage|audio|video";

/**
 * An SVG with nothing that reads or runs: scripts, foreign objects, pictures, style imports, entities and every link that
 * leaves the file are taken out. Throws when it is not a whole SVG or unreasonably large.
 */
export function safeSvg(text: string): string {
  if (text.length > MOST_SVG_CHARACTERS || !/<svg[\s>][\s\S]*<\/svg\s*>/i.test(text)) throw new Error("not a whole SVG");
  if (svgRefusal(text) !== null) throw new Error("not fit to print");
  return text
    .replace(/<!DOCTYPE[^>[]*(\[[\s\S]*?\])?[^>]*>/gi, "")
    .replace(/<!ENTITY[\s\S]*?>/gi, "")
    .replace(new RegExp(`<(${UNWANTED})\\b[\\s\\S]*?</\\1\\s*>`, "gi"), "")
    .replace(new RegExp(`</?(${UNWANTED})\\b[^>]*>`, "gi"), "")
    .replace(/@import[^;]*;?/gi, "")
    .replace(/url\(\s*(['"]?)(?!#)[^)]*\1\s*\)/gi, "none")
    .replace(/\s(?:xlink:)?href\s*=\s*(?:"(?!#)[^"]*"|'(?!#)[^']*')/gi, "")
    .replace(/\son[a-z]+\s*=\s*(?:"[^"]*"|'[^']*')/gi, "");
}

/** Width and height from the file's own header, pixels; null when it has none. */
function pixelSize(bytes: Uint8Array, kind: "png" | "jpeg"): readonly [number, number] | null {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  if (kind === "png") return bytes.length < 24 ? null : [view.getUint32(16), view.getUint32(20)];
  let at = 2;
  while (at + 9 < bytes.length && bytes[at] === 0xff) {
    const marker = bytes[at + 1]!;
    if (marker >= 0xc0 && marker <= 0xcf && marker !== 0xc4 && marker !== 0xc8 && marker !== 0xcc) return [view.getUint16(at + 7), view.getUint16(at + 5)];
    at += 2 + view.getUint16(at + 2);
  }
  return null;
}
