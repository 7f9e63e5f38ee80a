/** A bound sheet set as a file: every number of the lists is read back (pdf-parse), pages and bookmarks are sound (qpdf), and the signed sheet leads as a marked copy. */
import { PDFDocument } from "pdf-lib";
import { PDFParse } from "pdf-parse";
import { describe, expect, test } from "vitest";
import { buildModel, formatFeetInches, formatInches, formatLength, sheetFacts, sheetSetPages, SHEET_PARTS, type SheetInput, type SheetPart, type SheetSetExtras, type SheetSize } from "@/iso";
import { measureText } from "@/fonts/widths";
import { bindSheetSet, countPages, type BindInput } from "@/pdf/sheet-set";
import { demoSheetInput, demoSpools } from "@/scripts/gallery/demo-sheets";
import { qpdfFindings } from "./pdf-tools";
import { pdfWords } from "./poppler";
import { paintedSample, sampleInput, sampleNames } from "./sheet-inputs";

const AT = "2026-12-01T15:20:00Z";

async function bound(input: SheetInput, parts: readonly SheetPart[], extras: SheetSetExtras = {}, stored: BindInput["stored"] = null) {
  const set = sheetSetPages(input, parts, { printed: { by: "Danny Ruiz", at: AT }, ...extras }, measureText);
  const facts = { title: "Set", author: "Shop", subject: "", keywords: "", at: AT, logo: null };
  return { set, bytes: await bindSheetSet({ ...facts, set, stored, safeMargins: extras.safeMargins ?? false }) };
}

async function textsOf(bytes: Uint8Array): Promise<string[]> {
  const parser = new PDFParse({ data: bytes.slice() });
  const { pages } = await parser.getText();
  await parser.destroy();
  return pages.map((page) => page.text.replace(/\s+/g, " "));
}

describe("every number of the lists is on paper", () => {
  test.each(sampleNames.map((name) => [name] as const))("%s: cut lengths, marks and welds, on cut map and weld log", async (name) => {
    const input = sampleInput(name, "tabloid", "for-fabrication");
    const { pieces, welds } = sheetFacts(input, buildModel(input.document, input.marks, input.takeOuts));
    const { set, bytes } = await bound(input, ["cuts", "welds"]);
    const texts = await textsOf(bytes);
    expect(texts.length).toBe(set.of);
    const split = set.bookmarks[1]!.page - 1;
    const [cuts, log] = [` ${texts.slice(0, split).join(" ")} `, ` ${texts.slice(split).join(" ")} `];
    for (const { mark, cutLengthMm } of pieces) {
      expect(cuts, mark).toContain(` ${mark} `);
      expect(cuts, mark).toContain(` ${input.units === "metric" ? formatLength(cutLengthMm, "metric") : formatInches(cutLengthMm)} `);
      if (input.units === "imperial" && cutLengthMm >= 304.8) expect(cuts).toContain(`(${formatFeetInches(cutLengthMm)})`);
    }
    for (const { number } of welds) expect(log).toMatch(new RegExp(` ${number} (butt|socket fillet|slip-on fillets|branch|mitre butt|attachment)`));
    expect(cuts).toContain("VERIFY BY TAPE, TWO READINGS, BEFORE CUTTING.");
  });
});

describe("the file", () => {
  test.each(["letter", "A3"] as const)("of all parts on %s: sound, numbered, bookmarked, the same twice", async (size: SheetSize) => {
    const input = sampleInput("skewClosing", size, "for-review");
    const { set, bytes } = await bound(input, SHEET_PARTS);
    expect(qpdfFindings(bytes)).toBe("");
    const texts = await textsOf(bytes);
    texts.forEach((text, i) => expect(text).toMatch(new RegExp(`(SHEET ${i + 1} OF ${set.of}|${i + 1} of ${set.of})`)));
    const parser = new PDFParse({ data: bytes.slice() });
    const info = await parser.getInfo();
    await parser.destroy();
    expect((info.outline as { title: string }[]).map(({ title }) => title)).toEqual(set.bookmarks.map(({ title }) => title));
    expect(Buffer.compare(Buffer.from(bytes), Buffer.from((await bound(input, SHEET_PARTS)).bytes))).toBe(0);
  });

  test("a set of nothing is refused", async () => {
    await expect(bound(sampleInput("firstRun", "letter", "draft"), [])).rejects.toThrow(/at least one page/);
  });
});

describe("with a stored sheet", () => {
  const mark = { word: "HOLD", printedAt: AT, printedBy: "Danny Ruiz", original: { sha256: "ab".repeat(32), signed: true } } as const;

  test("its own pages lead, marked, told which of the set they are, and what follows counts on", async () => {
    const { input, bytes: signed, pages } = await paintedSample("valveStation", "tabloid", "for-fabrication");
    const before = Buffer.from(signed).toString("base64");
    expect(await countPages(signed)).toBe(pages.length);
    const { set, bytes } = await bound(input, ["sheet", "cuts"], { storedSheetPages: pages.length }, { bytes: signed, mark });
    const texts = await textsOf(bytes);
    expect(texts.length).toBe(set.of);
    pages.forEach((_, i) => {
      for (const word of [`SHEET ${i + 1} OF ${set.of} OF THIS SET`, "HOLD", "UNCONTROLLED COPY, printed 2026-12-01 15:20 UTC by Danny Ruiz.", "ab".repeat(32)]) expect(texts[i], word).toContain(word);
    });
    expect(texts[pages.length]).toContain(`SHEET ${pages.length + 1} OF ${set.of}`);
    expect(qpdfFindings(bytes)).toBe("");
    expect(Buffer.from(signed).toString("base64")).toBe(before);
  });

  test.each(["letter", "tabloid", "A4", "A3"] as const)("on %s, fitted to margins: every word half an inch off the edge", async (size) => {
    const { input, bytes: signed, pages } = await paintedSample("firstRun", size, "for-fabrication");
    const { bytes } = await bound(input, ["sheet", "cuts", "templates"], { storedSheetPages: pages.length, safeMargins: true }, { bytes: signed, mark: { ...mark, word: null } as never });
    const sizes = (await PDFDocument.load(bytes)).getPages().map((page) => page.getSize());
    for (const word of pdfWords(bytes)) {
      const { width, height } = sizes[word.page - 1]!;
      const [w, h] = [(width * 25.4) / 72, (height * 25.4) / 72];
      // A reader's box reaches from ascent to descent, about a third of a capital beyond the ink.
      expect([word.text, word.minX > 11.7, word.minY > 11.7, word.maxX < w - 11.7, word.maxY < h - 11.7]).toEqual([word.text, true, true, true, true]);
    }
  });
});

test("a demo set of all parts takes under 30 KB a page", async () => {
  const spool = demoSpools().find(({ name }) => name === "chillerHeader")!;
  const { set, bytes } = await bound({ ...demoSheetInput(spool, "tabloid", "for-fabrication") }, SHEET_PARTS);
  expect(bytes.length / set.of).toBeLessThan(30_000);
});
