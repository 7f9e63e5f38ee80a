import jsQR from "jsqr";
import { PDFParse } from "pdf-parse";
import { describe, expect, it } from "vitest";
import { buildModel, composeSheet, formatInches, formatLength, frameBox, SHEET_SIZES, type SheetPage, type TextItem } from "@/iso";
import { printableCharacters, SUBSTITUTE } from "@/fonts/printable";
import { EM_PER_CAPITAL, measureText } from "@/fonts/widths";
import { paintSheet } from "@/pdf/paint-sheet";
import { unprintableCharacters } from "@/pdf/unprintable";
import { pdfRasters, pdfText, pdfWords, type PdfWord, type Raster } from "./poppler";
import { paintedSample, sampleNames } from "./sheet-inputs";

const same = (a: Uint8Array, b: Uint8Array): boolean => Buffer.compare(Buffer.from(a), Buffer.from(b)) === 0;
const textItem = (text: string, y: number, face: TextItem["face"] = "regular", capMm = 2.5): TextItem => ({
  type: "text", layer: "table", ref: null, at: [20, y], anchor: "start", text, capMm, face, rotateRad: 0, ink: "ink",
});
const pageOf = (items: SheetPage["items"]): SheetPage => ({ widthMm: 297, heightMm: 210, items, logoBox: null, name: "1 test" });
const paint = (items: SheetPage["items"]) => paintSheet({ pages: [pageOf(items)], issuedAt: "2025-04-14T15:20:00Z", title: "test", logo: null });

describe("painting", () => {
  it("gives equal bytes for equal input, whatever was painted in between", async () => {
    const first = await paintedSample("branchWithReducer", "A3", "for-review");
    await paint([textItem("\u00A0Ω µ other characters first", 20)]);
    const second = await paintedSample("branchWithReducer", "A3", "for-review");
    expect(same(first.bytes, second.bytes)).toBe(true);
    const later = await paintSheet({ pages: first.pages, issuedAt: "2025-04-14T15:21:00Z", title: "test", logo: null });
    expect(same(first.bytes, later)).toBe(false);
  });

  it("survives an unreadable time and refuses a sheet without pages", async () => {
    const bytes = await paintSheet({ pages: [pageOf([])], issuedAt: "soon", title: "t", logo: null });
    expect(Buffer.from(bytes.subarray(0, 5)).toString()).toBe("%PDF-");
    expect(() => paintSheet({ pages: [], issuedAt: "soon", title: "t", logo: null })).toThrow("at least one page");
  });

  it("carries title, dates and page labels", async () => {
    const { bytes } = await paintedSample("firstRun", "letter", "for-fabrication");
    const parser = new PDFParse({ data: new Uint8Array(bytes) });
    const info = await parser.getInfo();
    expect(info.info?.Title).toBe("CW-1001 spool A");
    expect(String(info.info?.CreationDate)).toContain("20250414152000");
    await parser.destroy();
    expect(Buffer.from(bytes).toString("latin1")).toContain("/PageLabels");
  });

  it("prints every printable character in every face, so that it reads back as itself", async () => {
    const characters = printableCharacters().filter((one) => one !== " ");
    for (const face of ["regular", "bold", "mono"] as const) {
      const rows: string[] = [];
      for (let at = 0; at < characters.length; at += 40) rows.push(characters.slice(at, at + 40).join(""));
      const bytes = await paint(rows.map((row, index) => textItem(row, 12 + index * 8, face)));
      const read = new Set(pdfText(bytes).normalize("NFC"));
      expect(characters.filter((one) => !read.has(one.normalize("NFC")) && !read.has(one.normalize("NFKC"))), face).toEqual([]);
    }
  });

  it("prints what has no glyph as a visible substitute and names it", async () => {
    const page = pageOf([textItem("配管 A", 20)]);
    expect(unprintableCharacters([page])).toEqual(["配", "管"]);
    const text = pdfText(await paint(page.items));
    expect(text).toContain(`${SUBSTITUTE}${SUBSTITUTE} A`);
    expect(text).toContain(`NOT PRINTED HERE, shown as ${SUBSTITUTE}: U+914D, U+7BA1.`);
    expect(pdfText(await paint([textItem("PIPE A", 20)]))).not.toContain("NOT PRINTED");
  });

  it("sets text as wide as it was measured, in every face and turned", async () => {
    for (const face of ["regular", "bold", "mono"] as const) {
      const text = "WAVEToTa12'-103/16";
      const bytes = await paint([textItem(text, 40, face, 5)]);
      const [word] = pdfWords(bytes);
      expect(word!.text).toBe(text);
      expect(word!.maxX - word!.minX).toBeCloseTo(measureText(text, 5, face), 1);
      expect(word!.minX).toBeCloseTo(20, 1);
    }
    const turned = await paint([{ ...textItem("TURNED", 150, "regular", 5), at: [150, 100], rotateRad: -Math.PI / 2 }]);
    const [word] = pdfWords(turned);
    expect(word!.maxY).toBeCloseTo(100, 0);
    expect(word!.maxY - word!.minY).toBeCloseTo(measureText("TURNED", 5, "regular"), 0);
  });
});

/** Page furniture and tables: everything but the isometric's own labels, whose turned boxes a reader reports as upright ones. */
function levelWords(words: readonly PdfWord[], pages: readonly SheetPage[]): PdfWord[] {
  const turned = pages.map((page) => page.items.filter((item): item is TextItem => item.type === "text" && item.rotateRad !== 0).map((item) => item.text));
  return words.filter((word) => !turned[word.page - 1]!.some((text) => text.includes(word.text)));
}

/** Roboto's ascent and descent as PDF readers take them for a word's box, in ems. */
const BOX_EMS = (1900 + 500) / 2048;

function isInFrame(word: PdfWord, page: SheetPage): boolean {
  const frame = frameBox(page.widthMm, page.heightMm);
  return word.minX > frame.minX && word.maxX < frame.maxX && word.minY > frame.minY && word.maxY < frame.maxY;
}

/** Words whose boxes share area. Boxes reach from ascent to descent, so lines set solid share a sliver: 0.6 mm is let pass. */
function overlaps(words: readonly PdfWord[]): string[] {
  return words.flatMap((a, index) =>
    words.slice(index + 1)
      .filter((b) => a.page === b.page && Math.min(a.maxX, b.maxX) - Math.max(a.minX, b.minX) > 0.1 && Math.min(a.maxY, b.maxY) - Math.max(a.minY, b.minY) > 0.6)
      .map((b) => `${a.text} on ${b.text}`));
}

describe("sheets read back from paper", () => {
  for (const [turn, size] of SHEET_SIZES.entries()) {
    it(`${size}: numbers, boxes, lettering and frame of every other sample`, async () => {
      for (const name of sampleNames.filter((_, index) => index % 2 === turn % 2)) {
        const { input, pages, bytes } = await paintedSample(name, size, "for-review");
        const words = pdfWords(bytes);
        expect(Math.max(...words.map((word) => word.page))).toBe(pages.length);
        const level = levelWords(words, pages);
        expect(level.length).toBeGreaterThan(100);
        expect(level.filter((word) => !isInFrame(word, pages[word.page - 1]!)), `${name} outside the frame`).toEqual([]);
        expect(level.filter((word) => (word.maxY - word.minY) / BOX_EMS / EM_PER_CAPITAL < 2.45), `${name} too small`).toEqual([]);
        expect(overlaps(level), `${name} ${size}`).toEqual([]);
        const model = buildModel(input.document, input.marks, []);
        const text = pdfText(bytes).replace(/\s+/g, " ");
        for (const piece of model.pieces.filter((one) => one.spool === input.spool)) {
          expect(text, `${name} ${piece.mark}`).toContain(input.units === "metric" ? formatLength(piece.cutLengthMm, "metric") : formatInches(piece.cutLengthMm));
        }
      }
    });
  }

  it("is found by pdf-parse too: cut lengths, weld numbers, cautions, state", async () => {
    const { bytes } = await paintedSample("firstRun", "tabloid", "for-fabrication");
    const parser = new PDFParse({ data: new Uint8Array(bytes) });
    const text = (await parser.getText()).text.replace(/\s+/g, " ");
    await parser.destroy();
    for (const part of ["28 1/4", "19 3/4", "25 5/8", "3 weld-neck hub, 6 LR 90", "2 × 1/8 root gap", "VERIFY BY TAPE, TWO READINGS", "empty estimate",
      "Confirm heat number or PMI", "FOR FABRICATION", "HPS-0147", "PLANT N", "NTS", "Printed copies are uncontrolled"]) expect(text, part).toContain(part);
    for (let weld = 1; weld <= 8; weld += 1) expect(text).toMatch(new RegExp(`\\b${weld} butt`));
    expect(text).not.toMatch(/test pressure/i);
  });

  it("carries a QR code to the status page that a camera reads, on every page and in grey", async () => {
    for (const size of ["letter", "A3"] as const) {
      const { input, bytes } = await paintedSample("firstRun", size, "for-review");
      for (const raster of pdfRasters(bytes, 130, true)) {
        const corner = lowerRight(raster, 130, 48, 70);
        expect(jsQR(corner.data, corner.width, corner.height)?.data).toBe(input.revision.statusUrl);
      }
    }
  });

  it("keeps a draft without a status page free of a code and says so", async () => {
    const { input } = await paintedSample("firstRun", "letter", "draft");
    const pages = composeSheet({ ...input, revision: { ...input.revision, statusUrl: "", sheetNumber: "", code: "" } }, measureText);
    const text = pdfText(await paintSheet({ pages, issuedAt: input.revision.issuedAt, title: "draft", logo: null }));
    expect(text).toContain("NOT ISSUED");
    expect(text).toContain("NOT NUMBERED");
  });
});

/** The lower right corner of a raster, where a sheet carries its code: so many millimetres wide and high. */
function lowerRight(raster: Raster, dpi: number, widthMm: number, heightMm: number): { width: number; height: number; data: Uint8ClampedArray } {
  const [w, h] = [widthMm, heightMm].map((mm) => Math.floor((mm * dpi) / 25.4)) as [number, number];
  const out = new Uint8ClampedArray(w * h * 4);
  for (let row = 0; row < h; row += 1) {
    const start = ((raster.height - h + row) * raster.width + raster.width - w) * 4;
    out.set(raster.data.subarray(start, start + w * 4), row * w * 4);
  }
  return { width: w, height: h, data: out };
}
