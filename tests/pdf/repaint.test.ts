import PDFDocument from "pdfkit";
import SVGtoPDF from "svg-to-pdfkit";
import { describe, expect, it } from "vitest";
import { drawingSvg, type SheetPage } from "@/iso";
import { faceFont } from "@/pdf/faces";
import { paintSheet } from "@/pdf/paint-sheet";
import { pdfRasters, type Raster } from "./poppler";
import { paintedSample } from "./sheet-inputs";

/** The same page by the other way: display list to SVG text, and that to PDF by a painter that shares no code with ours. */
function repainted(page: SheetPage): Promise<Uint8Array> {
  const points = 72 / 25.4;
  const document = new PDFDocument({ size: [page.widthMm * points, page.heightMm * points], margin: 0, font: null as unknown as string });
  for (const face of ["regular", "bold", "mono"] as const) document.registerFont(face, faceFont(face) as never);
  const done = new Promise<Uint8Array>((resolve) => {
    const chunks: Buffer[] = [];
    document.on("data", (chunk: Buffer) => chunks.push(chunk)).on("end", () => resolve(new Uint8Array(Buffer.concat(chunks))));
  });
  SVGtoPDF(document, drawingSvg(page.items, page.widthMm, page.heightMm), 0, 0, {
    width: page.widthMm * points, height: page.heightMm * points, fontCallback: (family, bold) => (family.includes("Mono") ? "mono" : bold ? "bold" : "regular"),
  });
  document.end();
  return done;
}

/** Share of pixels whose grey differs by more than a third of the scale. */
function difference(a: Raster, b: Raster): number {
  let differing = 0;
  for (let at = 0; at < a.data.length; at += 4) if (Math.abs(a.data[at]! - b.data[at]!) > 85) differing += 1;
  return differing / (a.data.length / 4);
}

describe("two painters of one display list", () => {
  it("agree: under 1 % of the pixels at 60 dpi differ by more than a third (kerning, which only the other one applies)", async () => {
    for (const [name, size] of [["branchWithReducer", "letter"], ["rollingOffset", "tabloid"]] as const) {
      const { pages, input } = await paintedSample(name, size, "for-review");
      const straight = await paintSheet({ pages: [pages[0]!], issuedAt: input.revision.issuedAt, title: "t", logo: null });
      const [ours, theirs] = [pdfRasters(straight, 60, true)[0]!, pdfRasters(await repainted(pages[0]!), 60, true)[0]!];
      expect([theirs.width, theirs.height]).toEqual([ours.width, ours.height]);
      expect(difference(ours, theirs)).toBeLessThan(0.01);
      const blank = { ...ours, data: new Uint8Array(ours.data.length).fill(255) };
      expect(difference(ours, blank)).toBeGreaterThan(0.03);
    }
  });
});
