/**
 * Text on paper, one glyph per character at the advances of the width table: no kerning, no ligatures. That keeps measured
 * and painted widths equal and makes the same text give the same bytes whatever was painted before. It writes the text
 * operators itself and asks pdfkit only for the embedded subset (font.subset, widths, unicode: pdfkit 0.20).
 */
import type { TextItem } from "@/iso";
import { EM_PER_CAPITAL } from "@/fonts/widths";
import { printableText } from "@/fonts/printable";
import type { FaceName } from "@/fonts/families";
import { faceFont } from "./faces";

/** The part of pdfkit's embedded font that setting glyphs needs. */
interface EmbeddedFont {
  readonly id: string;
  readonly scale: number;
  readonly subset: { includeGlyph(glyph: number): number };
  readonly widths: (number | undefined)[];
  readonly unicode: (number[] | undefined)[];
  ref(): unknown;
}

interface FontDocument {
  readonly page: { readonly fonts: Record<string, unknown> };
  _font: EmbeddedFont;
  font(name: string): unknown;
  registerFont(name: string, source: unknown): unknown;
  addContent(content: string): unknown;
}

const FACES: readonly FaceName[] = ["regular", "bold", "mono"];

export class TextPainter {
  readonly #document: FontDocument;
  readonly #fonts = new Map<FaceName, EmbeddedFont>();
  readonly #codes = new Map<FaceName, Map<string, string>>();

  constructor(document: PDFKit.PDFDocument) {
    this.#document = document as unknown as FontDocument;
    for (const face of FACES) this.#document.registerFont(face, faceFont(face));
  }

  /** Sets one text in the current fill colour, in a millimetre frame with y down. */
  paint(item: TextItem, startX: number, startY: number): void {
    const font = this.#embedded(item.face);
    const pageFonts = this.#document.page.fonts;
    pageFonts[font.id] ??= font.ref();
    const sizeMm = item.capMm * EM_PER_CAPITAL;
    const c = Math.cos(item.rotateRad);
    const s = Math.sin(item.rotateRad);
    const matrix = [c, s, s, -c, startX, startY].map(shortNumber).join(" ");
    this.#document.addContent(`BT /${font.id} ${shortNumber(sizeMm)} Tf ${matrix} Tm <${this.#encode(item.text, item.face, font)}> Tj ET`);
  }

  #embedded(face: FaceName): EmbeddedFont {
    const known = this.#fonts.get(face);
    if (known) return known;
    this.#document.font(face);
    const font = this.#document._font;
    this.#fonts.set(face, font);
    return font;
  }

  #encode(text: string, face: FaceName, font: EmbeddedFont): string {
    const codes = this.#codes.get(face) ?? new Map<string, string>();
    this.#codes.set(face, codes);
    let hex = "";
    for (const character of printableText(text).text) {
      const known = codes.get(character) ?? includeCharacter(character, face, font);
      codes.set(character, known);
      hex += known;
    }
    return hex;
  }
}

/** Adds a character to the embedded subset; its code as four hexadecimal digits. */
function includeCharacter(character: string, face: FaceName, font: EmbeddedFont): string {
  const codePoint = character.codePointAt(0)!;
  const glyph = faceFont(face).glyphForCodePoint(codePoint);
  const code = font.subset.includeGlyph(glyph.id);
  font.widths[code] ??= glyph.advanceWidth * font.scale;
  font.unicode[code] ??= [codePoint];
  return code.toString(16).padStart(4, "0");
}

/** Four decimals of a millimetre are far below what a printer shows, and keep pages small. */
function shortNumber(value: number): string {
  return String(Math.round(value * 1e4) / 1e4);
}
