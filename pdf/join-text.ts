/** Sets the text of a stored page in the package's faces: same glyphs, same places, other codes. All drawing stays as it is. */
import { PDFArray, PDFDict, PDFName, PDFNumber, PDFRawStream, type PDFContext } from "pdf-lib";
import type { FaceName } from "@/fonts/families";
import { faceFont } from "./faces";
import { advanceOf, FACE_KEYS, faceOfName, sharedCode, type FaceUse } from "./join-faces";
import { unpacked } from "./join-objects";

/** A font of a stored page that is one of ours: what its codes mean. */
export interface KnownFont {
  readonly face: FaceName;
  readonly codePoints: ReadonlyMap<string, number>;
}

/** Widths are printed in thousandths of the font size, rounded somehow. */
const WIDTH_SLACK = 1;

/**
 * What a font's codes mean, when it is a subset of one of our faces at the widths of today's file; else null, and the
 * page keeps its own font.
 */
export function knownFont(context: PDFContext, font: PDFDict): KnownFont | null {
  const face = faceOfName(font.lookupMaybe(PDFName.of("BaseFont"), PDFName)?.decodeText() ?? "");
  const table = font.lookup(PDFName.of("ToUnicode"));
  const descendant = font.lookupMaybe(PDFName.of("DescendantFonts"), PDFArray)?.lookupMaybe(0, PDFDict);
  if (face === null || descendant === undefined || !(table instanceof PDFRawStream)) return null;
  const widths = widthsOf(descendant.lookupMaybe(PDFName.of("W"), PDFArray));
  const codePoints = new Map<string, number>();
  for (const [code, codePoint] of unicodeEntries(Buffer.from(unpacked(table)).toString("latin1"))) {
    const glyph = faceFont(face).glyphForCodePoint(codePoint).id;
    if (glyph !== 0 && Math.abs((widths.get(code) ?? Infinity) - advanceOf(face, glyph)) <= WIDTH_SLACK) codePoints.set(hexCode(code), codePoint);
  }
  return { face, codePoints };
}

const hexCode = (code: number) => code.toString(16).padStart(4, "0");

/** Code and code point of each entry that stands for exactly one character. */
function unicodeEntries(table: string): [number, number][] {
  return [...table.matchAll(/<([0-9a-f]+)>\s*<[0-9a-f]+>\s*\[([^\]]*)\]/gi)].flatMap(([, from = "", list = ""]) =>
    [...list.matchAll(/<([0-9a-f]*)>/gi)].flatMap(([, hex = ""], index): [number, number][] => {
      const text = Buffer.from(hex, "hex").swap16().toString("utf16le");
      return [...text].length === 1 ? [[parseInt(from, 16) + index, text.codePointAt(0)!]] : [];
    }),
  );
}

/** Of the form "first [w w w]" only, which is how ours are written. */
function widthsOf(array: PDFArray | undefined): Map<number, number> {
  const widths = new Map<number, number>();
  for (let at = 0; array !== undefined && at + 1 < array.size(); at += 2) {
    const first = array.lookupMaybe(at, PDFNumber)?.asNumber();
    const row = array.lookup(at + 1);
    if (first === undefined || !(row instanceof PDFArray)) return new Map();
    for (let index = 0; index < row.size(); index += 1) widths.set(first + index, row.lookup(index, PDFNumber).asNumber());
  }
  return widths;
}

const TOKENS = /\((?:\\[\s\S]|[^\\()])*\)|<<|>>|\bBT\b|\bBI\b|\/([^\s/<>[\]()]+)(\s+[-\d.]+\s+Tf)\b|<([0-9A-Fa-f\s]*)>/g;

/**
 * The page's drawing with every text in the package's faces; null when there is a text in it that cannot be told, and
 * then all of the page's fonts stay its own. `fonts` are the page's by name, null for one that is none of ours.
 */
export function sharedText(content: string, fonts: ReadonlyMap<string, KnownFont | null>, use: FaceUse): string | null {
  let font: KnownFont | null = null;
  let isTold = true;
  const text = content.replace(TOKENS, (token: string, name: string | undefined, size: string | undefined, hex: string | undefined) => {
    if (token === "BT") font = null;
    else if (name !== undefined) {
      font = fonts.get(name) ?? null;
      if (font !== null) return `/${FACE_KEYS[font.face]}${size}`;
      isTold = false;
    } else if (hex !== undefined) {
      const codes = sharedHex(hex.replace(/\s/g, ""), font, use);
      if (codes !== null) return `<${codes}>`;
      isTold = false;
    } else if (token === "BI" || token.startsWith("(")) isTold = false;
    return token;
  });
  return isTold ? text : null;
}

function sharedHex(hex: string, font: KnownFont | null, use: FaceUse): string | null {
  if (font === null || hex.length % 4 !== 0) return null;
  let codes = "";
  for (let at = 0; at < hex.length; at += 4) {
    const codePoint = font.codePoints.get(hex.slice(at, at + 4).toLowerCase());
    if (codePoint === undefined) return null;
    codes += sharedCode(font.face, codePoint, use);
  }
  return codes;
}
