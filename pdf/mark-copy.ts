/**
 * Marks a copy of stored bytes at print time; the stored bytes themselves never change. The word of a dead or held
 * revision goes across every page, the print's time and person into the margin under the frame.
 */
import { degrees, PDFDict, PDFDocument, PDFName, PDFRef, rgb, type PDFFont, type PDFPage } from "pdf-lib";
import { FACES } from "@/fonts/families";
import { printableText } from "@/fonts/printable";
import { EM_PER_CAPITAL } from "@/fonts/widths";
import { copyFontkit } from "./copy-fontkit";
import { faceBytes } from "./faces";

export interface CopyMark {
  /** Across every page; null for a live revision, whose copies carry the foot line only. */
  readonly word: "SUPERSEDED" | "VOID" | "HOLD" | "RETURNED" | null;
  /** ISO time of printing, handed in. */
  readonly printedAt: string;
  readonly printedBy: string;
  /** What the copy was made of, named in the filing margin so that the original can be found and checked. */
  readonly original: { readonly sha256: string; readonly signed: boolean };
}

const POINTS_PER_MM = 72 / 25.4;
const INK = rgb(0.07, 0.07, 0.07);
/** Capital height of the foot line, mm. */
export const FOOT_CAP = 2.5;
/** Baseline of the foot line above the paper's edge: in the margin, and inside what printers reach. */
export const FOOT_BASELINE = 5.2;
export const FOOT_LEFT = 20;
/** What the foot line leaves free on the right, mm. */
const FOOT_RIGHT = 10;
/** Baselines of the two lines that run up the filing margin, mm from the paper's left edge, and where they begin. */
export const MARGIN_BASELINES = [14.2, 18.2] as const;
export const MARGIN_BOTTOM = 10;

/**
 * A marked copy. The same bytes and mark give the same copy. A signature covers the original's bytes and could only read
 * as broken here, so the copy carries none and says where the signature is. Throws when the bytes are no PDF: stored sheets always are.
 */
export async function markCopy(bytes: Uint8Array, mark: CopyMark): Promise<Uint8Array> {
  const document = await PDFDocument.load(bytes, { updateMetadata: false });
  removeSignature(document);
  document.registerFontkit(copyFontkit);
  const bold = await document.embedFont(faceBytes("bold"), { subset: true, customName: FACES.bold.family });
  for (const page of document.getPages()) {
    if (mark.word !== null) stampAcross(page, mark.word, bold);
    stampFoot(page, mark, bold);
    stampMargin(page, mark.original, bold);
  }
  return document.save();
}

function removeSignature(document: PDFDocument): void {
  if (document.catalog.lookup(PDFName.of("AcroForm")) === undefined) return;
  document.catalog.delete(PDFName.of("AcroForm"));
  for (const page of document.getPages()) {
    const annotations = page.node.Annots();
    for (const ref of annotations?.asArray() ?? []) {
      const widget = document.context.lookupMaybe(ref, PDFDict);
      if (widget?.get(PDFName.of("FT")) !== PDFName.of("Sig")) continue;
      const signature = widget.get(PDFName.of("V"));
      for (const gone of [ref, signature]) if (gone instanceof PDFRef) document.context.delete(gone);
      page.node.delete(PDFName.of("Annots"));
    }
  }
}

/** The two lines up the filing margin. */
export function marginLines({ sha256, signed }: CopyMark["original"]): readonly [string, string] {
  return [signed ? "Marked when printed: the shop's signature stays with the signed original, SHA-256" : "Marked when printed. The original has SHA-256", sha256];
}

/** Up the filing margin: what this paper is a copy of. */
function stampMargin(page: PDFPage, { sha256, signed }: CopyMark["original"], font: PDFFont): void {
  const size = FOOT_CAP * EM_PER_CAPITAL * POINTS_PER_MM;
  for (const [index, text] of marginLines({ sha256, signed }).entries()) {
    page.drawText(text, { x: MARGIN_BASELINES[index]! * POINTS_PER_MM, y: MARGIN_BOTTOM * POINTS_PER_MM, size, font, rotate: degrees(90), color: INK });
  }
}

/** The word along the page's rising diagonal between two heavy lines, see-through so that everything below stays readable. */
function stampAcross(page: PDFPage, word: string, font: PDFFont): void {
  const { width, height } = page.getSize();
  const { size, slope, text, lines } = acrossPlaces(width, height, font.widthOfTextAtSize(word, 1));
  page.drawText(word, { x: text[0], y: text[1], size, font, rotate: degrees((slope * 180) / Math.PI), color: INK, opacity: ACROSS.text });
  for (const [start, end] of lines) {
    page.drawLine({ start: { x: start[0], y: start[1] }, end: { x: end[0], y: end[1] }, thickness: ACROSS.thickness, color: INK, opacity: ACROSS.line });
  }
}

/** How much the word and its lines cover, and how thick the lines are, points. */
export const ACROSS = { text: 0.26, line: 0.5, thickness: 2.4 } as const;

type Place = readonly [number, number];

/** Where a word goes that is `emWidth` wide at size 1, on a page of this size; everything in points, y up, slope in radians. */
export function acrossPlaces(width: number, height: number, emWidth: number): { readonly size: number; readonly slope: number; readonly text: Place; readonly lines: readonly (readonly [Place, Place])[] } {
  const slope = Math.atan2(height, width) * 0.8;
  const reach = Math.min(width / Math.cos(slope), height / Math.sin(slope)) * 0.8;
  const size = Math.min((reach * 0.92) / emWidth, height * 0.22);
  const capital = size / EM_PER_CAPITAL;
  const along = [Math.cos(slope), Math.sin(slope)] as const;
  const at = (s: number, t: number): Place => [width / 2 + s * along[0] - t * along[1], height / 2 + s * along[1] + t * along[0]];
  const lines = [-1, 1].map((side) => [at(-reach / 2, side * capital * 0.85), at(reach / 2, side * capital * 0.85)] as const);
  return { size, slope, text: at((-emWidth * size) / 2, -capital / 2), lines };
}

function stampFoot(page: PDFPage, mark: CopyMark, font: PDFFont): void {
  const size = FOOT_CAP * EM_PER_CAPITAL * POINTS_PER_MM;
  const text = footLine(mark, page.getSize().width / POINTS_PER_MM, (line) => font.widthOfTextAtSize(line, size) / POINTS_PER_MM);
  page.drawText(text, { x: FOOT_LEFT * POINTS_PER_MM, y: FOOT_BASELINE * POINTS_PER_MM, size, font, color: INK });
}

/** Who printed it when, the name shortened to the paper's width. */
export function footLine(mark: CopyMark, paperMm: number, widthMm: (line: string) => number): string {
  const room = paperMm - FOOT_LEFT - FOOT_RIGHT;
  const dead = mark.word === null ? "" : ` ${mark.word}: do not work to this sheet.`;
  const text = (name: string) => printableText(`UNCONTROLLED COPY, printed ${printTime(mark.printedAt)} by ${name}.${dead}`).text;
  let name = [...mark.printedBy.replace(/\s+/g, " ").trim()].slice(0, 120);
  while (name.length > 0 && widthMm(text(name.join(""))) > room) name = name.slice(0, -1);
  return text(name.length < [...mark.printedBy.trim()].length ? `${name.slice(0, -1).join("")}…` : name.join(""));
}

/** "2025-03-14 15:20 UTC" from an ISO time in UTC, else as it came. */
export function printTime(iso: string): string {
  const match = /^(\d{4}-\d{2}-\d{2})T(\d{2}:\d{2})/.exec(iso);
  return match && iso.endsWith("Z") ? `${match[1]} ${match[2]} UTC` : iso;
}
