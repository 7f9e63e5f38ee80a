import { PNG } from "pngjs";
import { describe, expect, it } from "vitest";
import { composePages, type SheetInput } from "@/iso";
import { measureText } from "@/fonts/widths";
import { logoKind, logoProblem, safeSvg } from "@/pdf/logo";
import { paintSheet } from "@/pdf/paint-sheet";
import { stubDraw, stubInput, stubModel } from "../iso/sheet/sheet-stubs";
import { pdfRasters, pdfText } from "./poppler";

const utf8 = (text: string): Uint8Array => new TextEncoder().encode(text);
const SVG = `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 40 12"><rect width="40" height="12" fill="#c02020"/><path d="M2 6 L12 2 L12 10 Z" fill="#ffffff"/></svg>`;

/** A red picture, see-through at its edge, so that the painter has to split its alpha. */
function redPng(size = 40): Uint8Array {
  const png = new PNG({ width: size, height: size });
  for (let at = 0; at < size * size; at += 1) png.data.set([192, 32, 32, at < size ? 128 : 255], at * 4);
  return new Uint8Array(PNG.sync.write(png));
}

const input = (): SheetInput => {
  const base = stubInput("letter", "draft");
  return { ...base, titleBlock: { ...base.titleBlock, logo: { key: "k", type: "image/png" } } };
};
const painted = (logo: Uint8Array | null) =>
  paintSheet({ pages: composePages(input(), stubModel(2), stubDraw, measureText), issuedAt: "2025-04-14T15:20:00Z", title: "t", logo });
const redPixels = (raster: { data: Uint8Array }): number => {
  let count = 0;
  for (let at = 0; at < raster.data.length; at += 4) if (raster.data[at]! > 170 && raster.data[at + 1]! < 60) count += 1;
  return count;
};

describe("logo on paper", () => {
  it("prints PNG and SVG in its box, the same bytes each time", async () => {
    const without = redPixels(pdfRasters(await painted(null), 50)[0]!);
    for (const logo of [redPng(), utf8(SVG)]) {
      const [one, two] = [await painted(logo), await painted(logo)];
      expect(Buffer.compare(Buffer.from(one), Buffer.from(two))).toBe(0);
      expect(redPixels(pdfRasters(one, 50)[0]!)).toBeGreaterThan(without + 200);
      expect(logoProblem(logo)).toBeNull();
    }
  });

  it("answers a damaged logo with a sentence and still prints the sheet", async () => {
    const cases = [redPng().subarray(0, 60), utf8("<svg><rect"), utf8("hello"), new Uint8Array(0), utf8("<svg></svg"), new Uint8Array([0xff, 0xd8, 0xff, 0xe0])];
    for (const logo of cases) {
      expect(logoProblem(logo)).toMatch(/^The (SVG )?logo .+\.$/);
      expect(pdfText(await painted(logo))).toContain("Logo not readable");
    }
  });

  it("refuses pictures too large to unpack, pictures inside an SVG, and endless repetition", () => {
    const huge = redPng(4);
    new DataView(huge.buffer, huge.byteOffset).setUint32(16, 60_000);
    expect(logoProblem(huge)).toBe("The logo is larger than 3000 pixels.");
    expect(logoProblem(utf8(`<svg><image href="file:///etc/passwd"/></svg>`))).toContain("picture inside");
    expect(logoProblem(utf8(`<svg>${'<use href="#a"/>'.repeat(60)}</svg>`))).toContain("repeats");
  });

  it("takes out of an SVG all that could reach outside or run", () => {
    const dirty = `<!DOCTYPE svg [<!ENTITY x SYSTEM "file:///etc/passwd">]><svg onload="go()"><script>go()</script><style>@import url(http://a.example/x.css);</style>` +
      `<a href="http://a.example"><rect fill="url(http://a.example/f)" width="1" height="1"/></a><foreignObject><b/></foreignObject><use href="#part"/></svg>`;
    const clean = safeSvg(dirty);
    for (const part of ["ENTITY", "onload", "script", "@import", "http", "foreignObject", "file:"]) expect(clean).not.toContain(part);
    expect(clean).toContain(`href="#part"`);
  });

  it("tells kinds by content", () => {
    expect([logoKind(redPng()), logoKind(utf8(SVG)), logoKind(new Uint8Array([0xff, 0xd8, 0xff])), logoKind(utf8("GIF89a"))]).toEqual(["png", "svg", "jpeg", null]);
  });
});
