/** Joined packages against the single sheets they are made of: the same picture, the same text, smaller. */
import { PDFDocument, PDFName, PDFRawStream } from "pdf-lib";
import { beforeAll, describe, expect, it } from "vitest";
import { measureText } from "@/fonts/widths";
import { composeSheet } from "@/iso";
import { joinParts } from "@/pdf/join-parts";
import { makePart, type PartSheet } from "@/pdf/join-part";
import { markCopy, type CopyMark } from "@/pdf/mark-copy";
import { paintSheet } from "@/pdf/paint-sheet";
import { demoSheetInput, demoSpools } from "../../scripts/gallery/demo-sheets";
import { qpdfJson } from "./package-readers";
import { pagesText } from "./pdf-text";
import { qpdfFindings } from "./pdf-tools";
import { pdfRasters, type Raster } from "./poppler";

const MARK: CopyMark = { word: null, printedAt: "2026-11-16T15:20:00Z", printedBy: "Danny Reyes", original: { sha256: "ab".repeat(32), signed: true } };
const SVG = new TextEncoder().encode(`<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 40 20"><rect width="40" height="20" fill="#124"/><text x="4" y="14" font-size="10" fill="#fff">fi 3/4</text></svg>`);
const join = async (parts: readonly Uint8Array[]) => (await joinParts({ front: null, title: "T", author: "A", subject: "S", keywords: "K", at: "2026-11-16T15:20:00Z", parts, bookmarks: [{ title: "One", sheet: 0, within: [{ title: "Two", sheet: 1, within: [] }] }] })).bytes;

let sheets: PartSheet[];
let joined: Uint8Array;

beforeAll(async () => {
  const spools = demoSpools().slice(0, 3);
  sheets = await Promise.all(spools.map(async (spool, sheet) => {
    const pages = composeSheet(demoSheetInput(spool, "letter", "for-fabrication"), measureText);
    const bytes = await paintSheet({ pages, issuedAt: "2026-11-16T15:20:00Z", title: "T", logo: SVG });
    const mark = sheet === 1 ? { ...MARK, word: "SUPERSEDED" as const } : MARK;
    return { bytes, mark, sheet, name: `Sheet ${sheet}` };
  }));
  joined = await join([(await makePart(sheets.slice(0, 2), "a")).bytes, (await makePart(sheets.slice(2), "a")).bytes]);
});

describe("a joined package", () => {
  it("shows each page as the marked copy of its own sheet shows it", async () => {
    const alone = (await Promise.all(sheets.map(async ({ bytes, mark }) => pdfRasters(await markCopy(bytes, mark!), 60)))).flat();
    const together = pdfRasters(joined, 60);
    expect(together).toHaveLength(alone.length);
    together.forEach((page, index) => expect(differentPixels(page, alone[index]!)).toBe(0));
  });

  it("reads as the marked copies read", async () => {
    const alone = (await Promise.all(sheets.map(async ({ bytes, mark }) => pagesText(await markCopy(bytes, mark!))))).flat();
    const words = (text: string) => text.split(/\s+/).sort().join(" ");
    expect((await pagesText(joined)).map(words)).toEqual(alone.map(words));
  });

  it("is whole for qpdf, with labels and bookmarks, and the same bytes each time", async () => {
    expect(qpdfFindings(joined)).toBe("");
    const { outlines, pagelabels, pages } = qpdfJson(joined);
    const second = 1 + (await pagesText(sheets[0]!.bytes)).length;
    expect(outlines.map(({ title, destpageposfrom1, kids }) => [title, destpageposfrom1, kids.map((kid) => kid.destpageposfrom1)])).toEqual([["One", 1, [second]]]);
    expect(pagelabels).toHaveLength(pages.length);
    const again = await join([(await makePart(sheets.slice(0, 2), "a")).bytes, (await makePart(sheets.slice(2), "a")).bytes]);
    expect(Buffer.from(again).equals(Buffer.from(joined))).toBe(true);
  });

  it("holds each face once and keeps what is the same on every page once, but for the drawings", async () => {
    const one = await join([(await makePart(sheets.slice(0, 1), "a")).bytes]);
    const many = await join([(await makePart(Array.from({ length: 20 }, (_, sheet) => ({ ...sheets[0]!, sheet })), "a")).bytes]);
    expect(many.length - (await drawingBytes(many))).toBeLessThan((one.length - (await drawingBytes(one))) * 1.5);
    const latin = Buffer.from(joined).toString("latin1");
    expect(latin.match(/\/Length1 /g)!.length).toBeLessThanOrEqual(3);
  });

  it("keeps a page's own fonts when a text on it cannot be told", async () => {
    const text = Buffer.from(sheets[0]!.bytes).toString("latin1").replaceAll("Roboto", "Rubato");
    const strange = { ...sheets[0]!, bytes: new Uint8Array(Buffer.from(text, "latin1")) };
    const kept = await join([(await makePart([strange], "a")).bytes]);
    expect(qpdfFindings(kept)).toBe("");
    const [page] = pdfRasters(kept, 60);
    expect(differentPixels(page!, pdfRasters(await markCopy(strange.bytes, MARK), 60)[0]!)).toBe(0);
  });

  it("refuses what is no PDF", async () => {
    await expect(makePart([{ ...sheets[0]!, bytes: new TextEncoder().encode("no PDF") }], "a")).rejects.toThrow();
  });
});

/** Bytes of the pages' own drawings, as packed. */
async function drawingBytes(bytes: Uint8Array): Promise<number> {
  const pages = (await PDFDocument.load(bytes, { updateMetadata: false })).getPages();
  return pages.reduce((sum, { node }) => {
    const drawing = node.lookup(PDFName.of("Contents"));
    if (!(drawing instanceof PDFRawStream)) throw new Error("A joined page has no drawing.");
    return sum + drawing.contents.length;
  }, 0);
}

/** Pixels further apart than a printer would show. */
function differentPixels(a: Raster, b: Raster): number {
  const LEAST = 48;
  let different = 0;
  for (let at = 0; at < a.data.length; at += 1) if (Math.abs(a.data[at]! - b.data[at]!) > LEAST) different += 1;
  return a.width === b.width && a.height === b.height ? different : Infinity;
}

