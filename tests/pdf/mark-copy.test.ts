import { PDFDocument } from "pdf-lib";
import { describe, expect, it } from "vitest";
import { markCopy } from "@/pdf/mark-copy";
import { pdfRasters, pdfText, pdfWords } from "./poppler";
import { paintedSample } from "./sheet-inputs";

const mark = { word: "SUPERSEDED", printedAt: "2025-06-02T14:10:31Z", printedBy: "Łucja Öberg", original: { sha256: "0a1b".repeat(16), signed: true } } as const;

describe("a marked copy", () => {
  it("says when and by whom it was printed, below the frame, on every page", async () => {
    const { bytes, pages } = await paintedSample("firstRun", "letter", "for-fabrication");
    const before = Uint8Array.from(bytes);
    const copy = await markCopy(bytes, mark);
    expect(Buffer.compare(Buffer.from(bytes), Buffer.from(before))).toBe(0);
    const feet = pdfText(copy).split("\n").filter((line) => line.includes("UNCONTROLLED COPY"));
    expect(feet.map((line) => line.trim())).toEqual(pages.map(() => "UNCONTROLLED COPY, printed 2025-06-02 14:10 UTC by Łucja Öberg. SUPERSEDED: do not work to this sheet."));
    for (const word of pdfWords(copy).filter((one) => one.text === "UNCONTROLLED")) expect(word.minY).toBeGreaterThan(pages[0]!.heightMm - 10);
    expect((await PDFDocument.load(copy)).getTitle()).toBe("CW-1001 spool A");
  });

  it("darkens the page unmistakably and leaves its text to be read", async () => {
    const { bytes } = await paintedSample("firstRun", "letter", "for-fabrication");
    const dead = await markCopy(bytes, mark);
    const live = await markCopy(bytes, { ...mark, word: null });
    const grey = (raster: { data: Uint8Array }) => raster.data.filter((value, index) => index % 4 === 0 && value > 120 && value < 225).length;
    expect(grey(pdfRasters(dead, 40, true)[0]!)).toBeGreaterThan(grey(pdfRasters(live, 40, true)[0]!) + 5_000);
    for (const number of ["28 1/4", "19 3/4", "25 5/8"]) expect(pdfText(dead)).toContain(number);
    expect(pdfText(live)).not.toContain("SUPERSEDED");
  });

  it("is the same for the same mark, and another for another", async () => {
    const { bytes } = await paintedSample("firstRun", "A4", "for-fabrication");
    const [one, two, three] = await Promise.all([markCopy(bytes, mark), markCopy(bytes, mark), markCopy(bytes, { ...mark, word: "VOID" })]);
    expect(Buffer.compare(Buffer.from(one), Buffer.from(two))).toBe(0);
    expect(Buffer.compare(Buffer.from(one), Buffer.from(three))).not.toBe(0);
  });

  it("keeps a very long or unprintable name on the sheet", async () => {
    const { bytes, pages } = await paintedSample("firstRun", "letter", "for-fabrication");
    const copy = await markCopy(bytes, { ...mark, printedBy: `配管 ${"Maximilian ".repeat(40)}` });
    const words = pdfWords(copy).filter((word) => word.minY > pages[0]!.heightMm - 10);
    expect(words.length).toBeGreaterThan(5);
    for (const word of words) expect(word.maxX).toBeLessThan(pages[0]!.widthMm - 10);
  });

  it("refuses what is no PDF", async () => {
    await expect(markCopy(new Uint8Array([1, 2, 3]), mark)).rejects.toThrow();
  });
});
