/**
 * Every golden run painted two ways: straight, by pdf/, and as SVG text by svg-to-pdfkit, which shares no code with it. Kerning
 * and ligatures are off on that side, since paper sets one glyph a character at the advances of the width table.
 * The tolerance: at 150 dpi no pixel may stray (page-compare.ts says what that is) but STRAY of a page's, where a soft edge is
 * rounded the other way. What differs by one mark strays by more, which the last test proves mark by mark.
 */
import type * as fontkit from "fontkit";
import PDFDocument from "pdfkit";
import SVGtoPDF from "svg-to-pdfkit";
import { beforeAll, describe, expect, it } from "vitest";
import { buildModel, drawingSvg, emptyMarks, type DisplayItem, type SheetPage } from "@/iso";
import { faceFont } from "@/pdf/faces";
import { paintSheet } from "@/pdf/paint-sheet";
import { GOLDEN_RUNS } from "../fixtures/golden-runs";
import type { GoldenRun } from "../fixtures/golden-runs/golden-run";
import { drawn, ROOM } from "../iso/draw/draw-helpers";
import { comparePages, type Agreement } from "./page-compare";
import { paintedSample } from "./sheet-inputs";

/** Pixels a page may have astray. */
const STRAY = 4;
const POINTS_PER_MM = 72 / 25.4;
const FACES = ["regular", "bold", "mono"] as const;

/** The face, set as paper sets it. */
function unkerned(face: (typeof FACES)[number]): fontkit.Font {
  const font = faceFont(face);
  const layout = (text: string): fontkit.GlyphRun => font.layout(text, { kern: false, liga: false, calt: false } as never);
  return Object.create(font, { layout: { value: layout } }) as fontkit.Font;
}

/** The same pages by the other way: display list to SVG text, and that to PDF by a painter that shares no code with ours. */
function repainted(pages: readonly SheetPage[]): Promise<Uint8Array> {
  const document = new PDFDocument({ autoFirstPage: false, margin: 0, compress: false, font: null as unknown as string });
  for (const face of FACES) document.registerFont(face, unkerned(face) as never);
  const done = new Promise<Uint8Array>((resolve) => {
    const chunks: Buffer[] = [];
    document.on("data", (chunk: Buffer) => chunks.push(chunk)).on("end", () => resolve(new Uint8Array(Buffer.concat(chunks))));
  });
  for (const { items, widthMm, heightMm } of pages) {
    const [width, height] = [widthMm * POINTS_PER_MM, heightMm * POINTS_PER_MM];
    document.addPage({ size: [width, height], margin: 0 });
    SVGtoPDF(document, drawingSvg(items, widthMm, heightMm), 0, 0, {
      width, height, fontCallback: (family, bold) => (family.includes("Mono") ? "mono" : bold ? "bold" : "regular"),
    });
  }
  document.end();
  return done;
}

const painted = (pages: readonly SheetPage[]): Promise<Uint8Array> => paintSheet({ pages, issuedAt: "2026-11-16T15:20:00Z", title: "t", logo: null });

const page = (name: string, items: readonly DisplayItem[]): SheetPage => ({ ...ROOM, items, logoBox: null, name });

/** A golden run as it is drawn in its chosen view. */
function goldenPage(run: GoldenRun): SheetPage {
  const model = buildModel(run.document, emptyMarks(), run.takeOuts ?? []);
  return page(run.name, drawn(model, { view: run.view ?? null, spool: run.spool ?? null, changed: run.changed ?? null }).items);
}

async function compared(straight: readonly SheetPage[], other: readonly SheetPage[]): Promise<Agreement[]> {
  return comparePages(await painted(straight), await repainted(other));
}

describe("two painters of one display list agree pixel by pixel at 150 dpi", () => {
  let golden: SheetPage[] = [];
  let agreements: Agreement[] = [];

  beforeAll(async () => {
    golden = GOLDEN_RUNS.map(goldenPage);
    agreements = await compared(golden, golden);
  }, 180_000);

  it.each(GOLDEN_RUNS.map(({ name }, index) => [name, index] as const))("%s", (_, index) => {
    const { astray, inked, at } = agreements[index]!;
    expect(astray, `pixels astray at ${at.join("; ")} mm`).toBeLessThanOrEqual(STRAY);
    expect(inked).toBeGreaterThan(1000);
  });

  it("and whole sheets, with their tables, title blocks and codes", async () => {
    for (const [name, size] of [["branchWithReducer", "letter"], ["rollingOffset", "tabloid"]] as const) {
      const { pages } = await paintedSample(name, size, "for-review");
      for (const { astray, at } of await compared(pages, pages)) expect(astray, `${name}: pixels astray at ${at.join("; ")} mm`).toBeLessThanOrEqual(STRAY);
    }
  });

  it("and are told apart by one mark that one of them lacks or has otherwise", async () => {
    const [base, crossing] = ["rolling-offset", "crossing-pipes"].map((wanted) => golden.find(({ name }) => name === wanted)!) as [SheetPage, SheetPage];
    const changes: Change[] = [...plantedChanges(base.items), ["no halos where pipes cross", crossing.items.filter(({ layer }) => layer !== "halo")]];
    const told = await compared(changes.map(([name, items]) => page(name, items)), changes.map((_, i) => (i < changes.length - 1 ? base : crossing)));
    expect(changes.length).toBeGreaterThan(20);
    expect(told.flatMap(({ astray }, index) => (astray > STRAY ? [] : [`${changes[index]![0]}: ${astray} astray`]))).toEqual([]);
  });
});

type Change = readonly [name: string, items: DisplayItem[]];

/** The items with one mark gone, the first of each layer and kind, and with one mark a little off. */
function plantedChanges(items: readonly DisplayItem[]): Change[] {
  const kinds = new Map(items.map((item, index) => [`${item.layer} ${item.type}`, index] as const).reverse());
  // A halo is paper's colour and shows only where it parts a line.
  const without = [...kinds].filter(([kind]) => kind !== "halo line").map(([kind, index]): Change => [`no ${kind}`, items.filter((_, i) => i !== index)]);
  const swaps = Object.entries(OFF).flatMap(([name, off]): Change[] => {
    const at = items.findIndex((item) => off(item) !== null);
    return at < 0 ? [] : [[name, items.map((item, i) => (i === at ? off(item)! : item))]];
  });
  expect(swaps.map(([name]) => name)).toEqual(Object.keys(OFF));
  return [...without, ...swaps];
}

type Off = (item: DisplayItem) => DisplayItem | null;
const moved = ([x, y]: readonly [number, number], mm: number): readonly [number, number] => [x + mm, y];

/** What may be other of a mark: each gives the item so, or null where it does not apply. */
const OFF: Readonly<Record<string, Off>> = {
  "a digit other": (item) => (item.type === "text" && item.text.includes("1") ? { ...item, text: item.text.replace("1", "7") } : null),
  "a fraction stroke lost": (item) => (item.type === "text" && item.text.includes("/") ? { ...item, text: item.text.replace("/", " ") } : null),
  "a text half a millimetre aside": (item) => (item.type === "text" ? { ...item, at: moved(item.at, 0.5) } : null),
  "a text in bold": (item) => (item.type === "text" && item.face === "regular" && item.text.length > 7 ? { ...item, face: "bold" } : null),
  "a text a tenth larger": (item) => (item.type === "text" && item.text.length > 7 ? { ...item, capMm: item.capMm * 1.1 } : null),
  "a line half a millimetre aside": (item) => (item.type === "line" && item.from[0] === item.to[0] ? { ...item, from: moved(item.from, 0.5), to: moved(item.to, 0.5) } : null),
  "a thin line as thick as pipe": (item) => (item.type === "line" && item.widthMm < 0.3 && item.ink === "ink" ? { ...item, widthMm: 0.7 } : null),
  "a dashed line drawn through": (item) => (item.type === "line" && item.dash ? { ...item, dash: [] } : null),
  "a chain line without its short dash": (item) => (item.type === "line" && item.dash?.length === 4 ? { ...item, dash: item.dash.slice(0, 2) } : null),
  "a line in pale ink": (item) => (item.type === "line" && item.ink === "ink" ? { ...item, ink: "pale" } : null),
  "a shape unfilled": (item) => (item.type === "path" && item.fill === "ink" ? { ...item, fill: null } : null),
};
