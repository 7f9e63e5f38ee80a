/**
 * One set of faces for a whole package. On its pages a character's code is its glyph's number in the full face, so that
 * sheets can be prepared apart from each other, in any order; the face that is embedded at the end holds the glyphs
 * used, and a table (CIDToGIDMap, ISO 32000-1, 9.7.4.2) leads from the code to where the glyph lies in it.
 */
import { createHash } from "node:crypto";
import { deflateSync } from "node:zlib";
import { PDFName, PDFRawStream, PDFString, type PDFContext, type PDFRef } from "pdf-lib";
import { FACE_NAMES, type FaceName } from "@/fonts/families";
import { faceFont } from "./faces";

/** What faces are called among a page's resources. */
export const FACE_KEYS: Readonly<Record<FaceName, string>> = { regular: "FR", bold: "FB", mono: "FM" };

/** Code points used of each face. */
export type FaceUse = Readonly<Record<FaceName, Set<number>>>;

export function noFaceUse(): FaceUse {
  return { regular: new Set(), bold: new Set(), mono: new Set() };
}

const codes = new Map<FaceName, Map<number, string>>();

/** A code point's code on paper, four hexadecimal digits; noted as used. */
export function sharedCode(face: FaceName, codePoint: number, use: FaceUse): string {
  use[face].add(codePoint);
  const known = codes.get(face) ?? new Map<number, string>();
  codes.set(face, known);
  let code = known.get(codePoint);
  if (code === undefined) {
    code = faceFont(face).glyphForCodePoint(codePoint).id.toString(16).padStart(4, "0");
    known.set(codePoint, code);
  }
  return code;
}

/** The face a font name of a PDF means ("BZZZZZ+Roboto-Regular"), or null. */
export function faceOfName(baseFont: string): FaceName | null {
  const plain = baseFont.replace(/^[A-Z]{6}\+/, "");
  return FACE_NAMES.find((face) => faceFont(face).postscriptName === plain) ?? null;
}

/** What fontkit's types leave out of its subsets. */
interface Subset {
  /** @returns where the glyph lies in the subset. */
  includeGlyph(glyph: number): number;
  encode(): Uint8Array;
}

/** Embeds the glyphs used of a face as the font with this place, which pages name among their resources already. */
export function embedFace(context: PDFContext, place: PDFRef, face: FaceName, codePoints: ReadonlySet<number>): void {
  const font = faceFont(face);
  const glyphs = glyphsOf(face, codePoints);
  const subset = font.createSubset() as unknown as Subset;
  const places = [...glyphs.keys()].map((glyph) => [glyph, subset.includeGlyph(glyph)] as const);
  const bytes = subset.encode();
  const name = PDFName.of(`${tagOf(bytes)}+${font.postscriptName}`);
  const descendant = context.register(context.obj({
    Type: "Font", Subtype: "CIDFontType2", BaseFont: name,
    CIDSystemInfo: { Registry: PDFString.of("Adobe"), Ordering: PDFString.of("Identity"), Supplement: 0 },
    FontDescriptor: context.register(descriptorOf(context, face, name, bytes)),
    W: [...glyphs.keys()].flatMap((glyph) => [glyph, [advanceOf(face, glyph)]]),
    CIDToGIDMap: context.register(packed(context, placeTable(places))),
  }));
  context.assign(place, context.obj({
    Type: "Font", Subtype: "Type0", BaseFont: name, Encoding: "Identity-H", DescendantFonts: [descendant],
    ToUnicode: context.register(packed(context, Buffer.from(unicodeTable(glyphs), "latin1"))),
  }));
}

/** Glyphs of the code points, rising, each with the lowest code point that shows as it. */
function glyphsOf(face: FaceName, codePoints: ReadonlySet<number>): Map<number, number> {
  const found = new Map<number, number>();
  for (const codePoint of [...codePoints].sort((a, b) => b - a)) found.set(faceFont(face).glyphForCodePoint(codePoint).id, codePoint);
  return new Map([...found].sort((a, b) => a[0] - b[0]));
}

/** Thousandths of the font size, as PDF widths are given. */
export function advanceOf(face: FaceName, glyph: number): number {
  const font = faceFont(face);
  return Math.round((font.getGlyph(glyph).advanceWidth * 1000 * 100) / font.unitsPerEm) / 100;
}

function descriptorOf(context: PDFContext, face: FaceName, name: PDFName, bytes: Uint8Array) {
  const font = faceFont(face);
  const scale = 1000 / font.unitsPerEm;
  const { minX, minY, maxX, maxY } = font.bbox;
  const MONOSPACED = 1;
  const NOT_SYMBOLIC = 32;
  return context.obj({
    Type: "FontDescriptor", FontName: name, Flags: NOT_SYMBOLIC | (face === "mono" ? MONOSPACED : 0),
    FontBBox: [minX, minY, maxX, maxY].map((value) => Math.round(value * scale)),
    ItalicAngle: 0, Ascent: Math.round(font.ascent * scale), Descent: Math.round(font.descent * scale),
    CapHeight: Math.round(font.capHeight * scale), XHeight: Math.round(font.xHeight * scale), StemV: face === "bold" ? 140 : 80,
    FontFile2: context.register(packed(context, bytes, { Length1: bytes.length })),
  });
}

function placeTable(places: readonly (readonly [number, number])[]): Buffer {
  const table = Buffer.alloc(2 * (1 + Math.max(0, ...places.map(([glyph]) => glyph))));
  for (const [glyph, place] of places) table.writeUInt16BE(place, 2 * glyph);
  return table;
}

/** A CMap takes at most so many entries in one block (Adobe technical note 5014). */
const MOST_IN_BLOCK = 100;

function unicodeTable(glyphs: ReadonlyMap<number, number>): string {
  const hex = (value: number) => value.toString(16).padStart(4, "0");
  const lines = [...glyphs].map(([glyph, codePoint]) => `<${hex(glyph)}> <${Buffer.from(String.fromCodePoint(codePoint), "utf16le").swap16().toString("hex")}>`);
  const blocks: string[] = [];
  for (let from = 0; from < lines.length; from += MOST_IN_BLOCK) {
    const block = lines.slice(from, from + MOST_IN_BLOCK);
    blocks.push(`${block.length} beginbfchar\n${block.join("\n")}\nendbfchar`);
  }
  return `/CIDInit /ProcSet findresource begin\n12 dict begin\nbegincmap\n/CIDSystemInfo << /Registry (Adobe) /Ordering (UCS) /Supplement 0 >> def\n/CMapName /Adobe-Identity-UCS def\n/CMapType 2 def\n1 begincodespacerange\n<0000> <ffff>\nendcodespacerange\n${blocks.join("\n")}\nendcmap\nCMapName currentdict /CMap defineresource pop\nend\nend`;
}

/** A compressed stream. */
export function packed(context: PDFContext, bytes: Uint8Array, entries: Readonly<Record<string, number | string>> = {}): PDFRawStream {
  const contents = deflateSync(bytes, { level: 9 });
  return PDFRawStream.of(context.obj({ ...entries, Filter: "FlateDecode", Length: contents.length }), new Uint8Array(contents));
}

/** Six capitals that name a subset by what is in it. */
function tagOf(bytes: Uint8Array): string {
  return [...createHash("sha256").update(bytes).digest().subarray(0, 6)].map((byte) => String.fromCharCode(65 + (byte % 26))).join("");
}
