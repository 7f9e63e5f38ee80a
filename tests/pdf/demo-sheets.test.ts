/**
 * The sheets of the demo lines read back from paper: every text stands where it was measured, none lies on another, none
 * is cut by the frame or the page, none is under 2.5 mm (ISO 3098's least lettering, from memory). Word boxes are
 * pdftotext's; it reports turned words by the upright box around them, so those are compared with the display list.
 */
import { describe, expect, it } from "vitest";
import { buildModel, composeSheet, drawModel, frameBox, SHEET_SIZES, type PaperPoint, type SheetPage, type SheetSize, type TextItem, type View } from "@/iso";
import { measureText } from "@/fonts/widths";
import { paintSheet } from "@/pdf/paint-sheet";
import { demoSheetInput, demoSpools, type DemoSpool } from "@/scripts/gallery/demo-sheets";
import { sharedArea } from "../iso/draw/draw-helpers";
import { pdfWords, type PdfWord } from "./poppler";

const spools = demoSpools();
const LEAST_CAP_MM = 2.5;
/** Roboto's capital height, ascent and descent as a share of its em (its own tables: 1456, 1900 and 500 of 2048). */
const CAP_EM = 1456 / 2048;
const BOX_EM = (1900 + 500) / 2048;
/** pdftotext prints points with six digits, the painter millimetres with four. */
const READ_MM = 0.02;

interface Box {
  readonly minX: number;
  readonly minY: number;
  readonly maxX: number;
  readonly maxY: number;
}

async function paintedDemo(spool: DemoSpool, size: SheetSize): Promise<{ pages: SheetPage[]; bytes: Uint8Array }> {
  const input = demoSheetInput(spool, size, "for-fabrication");
  const pages = composeSheet(input, measureText);
  return { pages, bytes: await paintSheet({ pages, issuedAt: input.revision.issuedAt, title: spool.name, logo: null }) };
}

const textsOf = (page: SheetPage): TextItem[] => page.items.filter((item): item is TextItem => item.type === "text" && item.text !== "");
const isTurned = (item: TextItem): boolean => Math.abs(Math.sin(item.rotateRad)) > 0.001;

/** Corners of a text from `up` above its baseline to `down` below it, in capitals, narrowed to part of its advance. */
function cornersOf(item: TextItem, up: number, down: number, from = 0, to = measureText(item.text, item.capMm, item.face)): PaperPoint[] {
  const width = measureText(item.text, item.capMm, item.face);
  const start = item.anchor === "start" ? 0 : item.anchor === "middle" ? -width / 2 : -width;
  const [c, s] = [Math.cos(item.rotateRad), Math.sin(item.rotateRad)];
  const place = (x: number, y: number): PaperPoint => [item.at[0] + x * c - y * s, item.at[1] + x * s + y * c];
  return [place(start + from, -up * item.capMm), place(start + to, -up * item.capMm), place(start + to, down * item.capMm), place(start + from, down * item.capMm)];
}

function boxAround(corners: readonly PaperPoint[]): Box {
  const [xs, ys] = [corners.map((p) => p[0]), corners.map((p) => p[1])];
  return { minX: Math.min(...xs), minY: Math.min(...ys), maxX: Math.max(...xs), maxY: Math.max(...ys) };
}

/** Where each word of a text should be read: its own part of the advance, from ascent to descent. */
function expectedWords(item: TextItem): { text: string; box: Box; item: TextItem }[] {
  return [...item.text.matchAll(/\S+/g)].map((match) => {
    const before = measureText(item.text.slice(0, match.index), item.capMm, item.face);
    const until = measureText(item.text.slice(0, match.index + match[0].length), item.capMm, item.face);
    return { text: match[0], box: boxAround(cornersOf(item, 1900 / 1456, 500 / 1456, before, until)), item };
  });
}

const meets = (a: Box, b: Box, slack: number): boolean =>
  Math.min(a.maxX, b.maxX) - Math.max(a.minX, b.minX) > slack && Math.min(a.maxY, b.maxY) - Math.max(a.minY, b.minY) > slack;

/** Words printed on top of each other: what ink covers, from the capital's top to the baseline, sharing paper. */
function overlapsOnPage(page: SheetPage): string[] {
  const boxes = textsOf(page).map((item) => ({ item, corners: cornersOf(item, 1, 0), around: boxAround(cornersOf(item, 1, 0)) }));
  return boxes.flatMap((a, index) =>
    boxes.slice(index + 1).filter((b) => meets(a.around, b.around, READ_MM) && sharedArea(a.corners, b.corners) > READ_MM).map((b) => `${a.item.text} | ${b.item.text}`));
}

/** Level words stand where the width table says, to this; a turned word's box is the reader's own, so meeting it is enough. */
const PLACE_MM = 0.15;

/** Whether a word is read at its place; pdftotext may join or split words that stand close, so that part of a text counts. */
function isRead({ text, box, item }: { text: string; box: Box; item: TextItem }, words: readonly PdfWord[]): boolean {
  return words.some((word) => {
    if (!meets(word, box, 0)) return false;
    if (word.text !== text) return word.text.includes(text) || text.includes(word.text);
    return isTurned(item) || (Math.abs(word.minX - box.minX) < PLACE_MM && Math.abs(word.maxX - box.maxX) < PLACE_MM && Math.abs(word.minY - box.minY) < PLACE_MM);
  });
}

function checkPage(page: SheetPage, words: readonly PdfWord[], name: string): void {
  const frame = frameBox(page.widthMm, page.heightMm);
  const texts = textsOf(page);
  expect(texts.length, name).toBeGreaterThan(20);
  expect(overlapsOnPage(page), `${name}: text on text`).toEqual([]);
  const wanted = texts.flatMap(expectedWords);
  expect(wanted.filter((word) => !isRead(word, words)).map((word) => word.text), `${name}: not read back where it was set`).toEqual([]);
  const outside = (box: Box): boolean => box.minX < frame.minX || box.maxX > frame.maxX || box.minY < frame.minY || box.maxY > frame.maxY;
  expect(words.filter((word) => outside(word)).map((word) => word.text), `${name}: over the frame`).toEqual([]);
  expect(texts.filter((item) => item.capMm < LEAST_CAP_MM).map((item) => item.text), `${name}: small lettering`).toEqual([]);
  checkLevelWords(words, texts, name);
}

/** Level words by what the reader says alone: their height, and that they keep off each other. */
function checkLevelWords(words: readonly PdfWord[], texts: readonly TextItem[], name: string): void {
  const turned = texts.filter(isTurned).flatMap((item) => item.text.split(/\s+/));
  const level = words.filter((word) => !turned.some((text) => text === word.text || text.includes(word.text)));
  const small = level.filter((word) => ((word.maxY - word.minY) / BOX_EM) * CAP_EM < LEAST_CAP_MM - READ_MM);
  expect(small.map((word) => word.text), `${name}: read as small`).toEqual([]);
  // A word's box reaches from ascent to descent, 0.36 of a capital over and 0.34 under its letters.
  const letters = (word: PdfWord): Box => {
    const cap = ((word.maxY - word.minY) / BOX_EM) * CAP_EM;
    return { minX: word.minX, maxX: word.maxX, minY: word.minY + 0.3 * cap, maxY: word.maxY - 0.34 * cap };
  };
  const found = level.flatMap((a, index) => level.slice(index + 1).filter((b) => meets(letters(a), letters(b), READ_MM)).map((b) => `${a.text} | ${b.text}`));
  expect(found, `${name}: words on words`).toEqual([]);
}

describe("the checks themselves", () => {
  const text = (at: PaperPoint, words: string, rotateRad = 0): TextItem =>
    ({ type: "text", layer: "label", ref: null, at, anchor: "start", text: words, capMm: 2.5, face: "regular", rotateRad, ink: "ink" });
  const page = (...items: TextItem[]): SheetPage => ({ widthMm: 279.4, heightMm: 215.9, items, logoBox: null, name: "1" });

  it("find a text on a text, level or turned, and let neighbours be", () => {
    expect(overlapsOnPage(page(text([50, 50], "TRAVEL 2'-4\""), text([60, 51], "P2")))).toHaveLength(1);
    expect(overlapsOnPage(page(text([50, 50], "TRAVEL 2'-4\"", -1), text([53, 47], "P2")))).toHaveLength(1);
    expect(overlapsOnPage(page(text([50, 50], "TRAVEL 2'-4\""), text([50, 54.2], "RISE 1'-0\"")))).toEqual([]);
  });

  it("find a word over the frame, a word that is not there, and small lettering", async () => {
    const items = Array.from({ length: 21 }, (_, i) => text([40, 30 + i * 6], `row-${i}`));
    const read = async (shown: SheetPage) => pdfWords(await paintSheet({ pages: [shown], issuedAt: "2026-11-16T15:20:00Z", title: "t", logo: null }));
    const good = page(...items);
    checkPage(good, await read(good), "good");
    const over = page(...items, text([10, 190], "outside"));
    await expect(async () => checkPage(over, await read(over), "over")).rejects.toThrow(/over the frame/);
    await expect(async () => checkPage(page(...items, text([40, 200], "missing")), await read(good), "less")).rejects.toThrow(/not read back/);
    const small = page(...items, { ...text([40, 200], "small"), capMm: 2.3 });
    await expect(async () => checkPage(small, await read(small), "small")).rejects.toThrow(/small/);
  });
});

describe.each(SHEET_SIZES)("demo sheets on %s", (size) => {
  it.each(spools)("$name keeps its texts apart, inside the frame and tall enough", async (spool) => {
    const { pages, bytes } = await paintedDemo(spool, size);
    const words = pdfWords(bytes);
    expect(Math.max(...words.map((word) => word.page))).toBe(pages.length);
    pages.forEach((page, index) => checkPage(page, words.filter((word) => word.page === index + 1), `${spool.name} ${size} page ${index + 1}`));
  });
});

describe("demo sheets", () => {
  it.each([["chillerHeader", "A3"], ["glycolClosing", "letter"]] as const)("%s on %s gives the same bytes twice", async (name, size) => {
    const spool = spools.find((one) => one.name === name)!;
    const [first, second] = [await paintedDemo(spool, size), await paintedDemo(spool, size)];
    expect(Buffer.compare(Buffer.from(first.bytes), Buffer.from(second.bytes))).toBe(0);
  });

  it("cover every kind of line of the demo job", () => {
    expect(new Set(spools.map((spool) => spool.document.number)).size).toBeGreaterThanOrEqual(6);
  });
});

/** Closed marks and texts of a drawing that share paper, text with text and mark with mark, by clipping polygons. */
function labelOverlaps(items: readonly SheetPage["items"][number][]): string[] {
  const boxes = items.flatMap((item) => {
    if (item.type === "text") return [{ name: item.text, isText: true, corners: cornersOf(item, 1, 0) }];
    if (item.type !== "path" || item.layer !== "balloon") return [];
    const points = item.segments.flatMap((segment) => (segment.op === "Z" ? [] : [segment.to]));
    const { minX, minY, maxX, maxY } = boxAround(points);
    // A tenth off each side: circles and hexagons may stand corner to corner.
    const [dx, dy] = [(maxX - minX) / 10, (maxY - minY) / 10];
    const corners: PaperPoint[] = [[minX + dx, minY + dy], [maxX - dx, minY + dy], [maxX - dx, maxY - dy], [minX + dx, maxY - dy]];
    return [{ name: `mark ${item.ref?.id ?? ""}`, isText: false, corners }];
  });
  return boxes.flatMap((a, index) =>
    boxes.slice(index + 1).filter((b) => a.isText === b.isText && sharedArea(a.corners, b.corners) > READ_MM).map((b) => `${a.name} | ${b.name}`));
}

describe.each([1, 2, 3, 4] as const)("view %i", (view: View) => {
  it.each(spools.filter((spool) => spool.spool === "A"))("$name: no label on another", ({ document }) => {
    const model = buildModel(document, demoSheetInput({ name: "", document, spool: "A" }, "tabloid", "draft").marks, []);
    const show = { items: true, welds: true, pieces: true, dimensions: true };
    const { items, report } = drawModel(model, { widthMm: 240, heightMm: 170, measure: measureText, view, spool: null, show });
    expect(items.filter((item) => item.type === "text").length).toBeGreaterThan(10);
    expect(labelOverlaps(items)).toEqual([]);
    expect(report.overlaps).toBe(0);
  });
});
