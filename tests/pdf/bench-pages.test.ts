/** Bench pages and templates on paper: true scale in the PDF's own coordinates, and texts a fitter can read. */
import { describe, expect, test } from "vitest";
import { composeBenchPages, composeTemplatePages, type PaperPoint, type SheetPage, type SheetSize } from "@/iso";
import { placeTemplates } from "@/iso/sheet/template-pages";
import { PAPER_THICKNESS_MM } from "@/iso/layout/wrap";
import { measureText } from "@/fonts/widths";
import { paintSheet } from "@/pdf/paint-sheet";
import { benchInput, TEMPLATE_RUNS } from "../iso/layout/bench-inputs";
import { expectReadable } from "../iso/sheet/text-boxes";
import { pageStreams } from "./page-streams";

const SIZES: readonly SheetSize[] = ["letter", "tabloid", "A4", "A3"];
const NAMES = Object.keys(TEMPLATE_RUNS);
const TRUE_WITHIN_MM = 0.1;
const MM_PER_POINT = 25.4 / 72;

/** Points a page's content stream draws through, in millimetres of the medium: what a printer at 100 % lays down. */
function strokesOf(stream: string): PaperPoint[][] {
  const paths: PaperPoint[][] = [];
  let [a, b, c, d, e, f] = [1, 0, 0, 1, 0, 0];
  const stack: number[][] = [];
  const numbers: number[] = [];
  for (const token of stream.split(/\s+/)) {
    if (/^[-+.\d]/.test(token)) {
      numbers.push(Number(token));
      continue;
    }
    const last = numbers.splice(0);
    if (token === "q") stack.push([a, b, c, d, e, f]);
    else if (token === "Q") [a, b, c, d, e, f] = stack.pop() as [number, number, number, number, number, number];
    else if (token === "cm") {
      const [p, q, r, s, t, u] = last as [number, number, number, number, number, number];
      [a, b, c, d, e, f] = [p * a + q * c, p * b + q * d, r * a + s * c, r * b + s * d, t * a + u * c + e, t * b + u * d + f];
    } else if (token === "m" || token === "l") {
      const [x, y] = last.slice(-2) as [number, number];
      const at: PaperPoint = [(a * x + c * y + e) * MM_PER_POINT, (b * x + d * y + f) * MM_PER_POINT];
      if (token === "m") paths.push([at]);
      else paths.at(-1)?.push(at);
    }
  }
  return paths;
}

async function painted(pages: readonly SheetPage[]): Promise<readonly string[]> {
  return pageStreams(await paintSheet({ pages, issuedAt: "2025-04-14T15:20:00Z", title: "Templates", logo: null }));
}

const near = (p: PaperPoint, q: PaperPoint) => Math.hypot(p[0] - q[0], p[1] - q[1]);

describe("templates measured in the PDF's own coordinates", () => {
  test.each(NAMES.flatMap((name) => (["letter", "A3"] as const).map((size) => [name, size] as const)))("%s on %s: every point of the cut within 0.1 mm, each seen on some page", async (name, size) => {
    const { pages, tiles } = placeTemplates(benchInput(TEMPLATE_RUNS[name]!, size), measureText, PAPER_THICKNESS_MM);
    const streams = await painted(pages);
    expect(tiles.length).toBe(pages.length);
    const seen = new Map<object, Set<number>>();
    for (const [i, { template, tile, at }] of tiles.entries()) {
      const heightMm = pages[i]!.heightMm;
      const drawn = strokesOf(streams[i]!).flat();
      const found = seen.get(template) ?? new Set<number>();
      seen.set(template, found);
      for (const [k, [x, y]] of template.cut.entries()) {
        const { minX, maxX, minY, maxY } = tile.shown;
        if (x < minX || x > maxX || y < minY || y > maxY) continue;
        // PDF's y goes up from the foot of the medium.
        const wanted: PaperPoint = [x - minX + at[0], heightMm - (y - minY + at[1])];
        expect(Math.min(...drawn.map((point) => near(point, wanted)))).toBeLessThan(TRUE_WITHIN_MM);
        found.add(k);
      }
    }
    for (const [template, found] of seen) expect(found.size).toBe((template as { cut: readonly unknown[] }).cut.length);
  });

  test("the proof bar is 4 in above and 100 mm below, on every page of every size", async () => {
    for (const size of SIZES) {
      for (const stream of await painted(composeTemplatePages(benchInput(TEMPLATE_RUNS["set on"]!, size), measureText))) {
        const lengths = strokesOf(stream).filter((path) => path.length === 2).map(([p, q]) => near(p!, q!));
        for (const wanted of [101.6, 100]) expect(Math.min(...lengths.map((mm) => Math.abs(mm - wanted)))).toBeLessThan(TRUE_WITHIN_MM / 10);
      }
    }
  });

  test("a page scaled by half of one per cent would be caught", async () => {
    const [stream] = await painted(composeTemplatePages(benchInput(TEMPLATE_RUNS["set on"]!, "letter"), measureText));
    const lengths = strokesOf(stream!).filter((path) => path.length === 2).map(([p, q]) => near(p!, q!) * 1.005);
    expect(Math.min(...lengths.map((mm) => Math.abs(mm - 100)))).toBeGreaterThan(TRUE_WITHIN_MM);
  });
});

describe("texts of bench pages and templates", () => {
  const compose = { bench: composeBenchPages, templates: composeTemplatePages } as const;
  const cases = NAMES.flatMap((name) => SIZES.flatMap((size) => (Object.keys(compose) as (keyof typeof compose)[]).map((kind) => [name, size, kind] as const)));
  test.each(cases)("%s on %s, %s: none overlap, none leave the frame, none under 2.5 mm", (name, size, kind) => {
    for (const page of compose[kind](benchInput(TEMPLATE_RUNS[name]!, size, "for-review"), measureText)) {
      expectReadable(page, `${name} ${size} ${kind}`);
    }
  });
});
