/**
 * A line on several sheets: random lines of up to 120 points with up to 6 branches (random-runs.ts) on the rooms of A3, tabloid
 * and letter. Nothing outside the frame, everything of the model on one of the sheets, marks once, match lines in pairs.
 */
import { describe, expect, it } from "vitest";
import { measureText } from "@/fonts/widths";
import { buildModel, composeSheet, drawSheets, emptyMarks, frameBox, inkBounds, nextMarks, type Drawing, type Model, type RunDocument, type SheetSize } from "@/iso";
import { stubInput } from "../sheet/sheet-stubs";
import { modelOf, overlappingLabels, SHOW_ALL } from "./draw-helpers";
import { randomLine } from "./random-runs";

/** Rooms a spool sheet leaves the isometric, mm. */
const ROOMS = { A3: { widthMm: 230, heightMm: 235 }, tabloid: { widthMm: 245, heightMm: 215 }, letter: { widthMm: 180, heightMm: 130 } } as const;
const later = { A3: { widthMm: 380, heightMm: 215 }, tabloid: { widthMm: 395, heightMm: 195 }, letter: { widthMm: 180, heightMm: 140 } } as const;
const SEEDS = Array.from({ length: 14 }, (_, i) => i + 1);

function sheets(model: Model, size: keyof typeof ROOMS, mode: "auto" | "one" = "auto"): Drawing[] {
  return drawSheets(model, { ...ROOMS[size], later: later[size], measure: measureText, view: null, spool: null, show: SHOW_ALL, sheets: mode });
}

const names = (drawing: Drawing): string[] => [...new Set(drawing.shown.filter((ref) => ref.kind !== "material").map((ref) => `${ref.kind} ${ref.id}`))];

function owed(model: Model): string[] {
  return [
    ...model.joints.map((joint) => `joint ${joint.key}`), ...model.pieces.map((piece) => `piece ${piece.key}`),
    ...model.legs.filter((leg) => leg.lengthMm > 2).map((leg) => `dimension ${leg.id}`),
    ...model.spools.flatMap((spool) => spool.materials.flatMap((row) => row.refs)).filter((id) => model.components.some((c) => c.id === id)).map((id) => `component ${id}`),
  ];
}

const matchWords = (drawing: Drawing): string[] => drawing.items.flatMap((item) => (item.type === "text" && / AT M\d+$/.test(item.text) ? [item.text] : []));

describe.each(SEEDS)("random line %i", (seed) => {
  const model = modelOf(randomLine(seed));
  it.each(["A3", "tabloid", "letter"] as const)("stands inside the frame of %s, whole, each mark once", (size) => {
    const drawings = sheets(model, size);
    for (const drawing of drawings) {
      expect(drawing.bounds).toEqual(inkBounds(drawing.items, measureText));
      expect(Math.min(drawing.bounds.minX, drawing.bounds.minY, drawing.widthMm - drawing.bounds.maxX, drawing.heightMm - drawing.bounds.maxY)).toBeGreaterThanOrEqual(-1e-6);
      expect(overlappingLabels(drawing.items)).toEqual([]);
    }
    const shown = drawings.flatMap(names);
    const found = new Set(shown);
    expect(owed(model).filter((name) => !found.has(name))).toEqual([]);
    // Only the joint at a match line stands on both sheets.
    const repeated = shown.filter((name, i) => shown.indexOf(name) !== i);
    expect(repeated.filter((name) => !name.startsWith("joint "))).toEqual([]);
    const words = drawings.map(matchWords);
    const marks = words.flat().map((text) => text.split(" AT ")[1]!);
    expect(repeated.length).toBeLessThanOrEqual(new Set(marks).size);
    words.forEach((texts, i) => texts.forEach((text) => {
      const [, other, mark] = /SHEET (\d+) AT (M\d+)$/.exec(text)!;
      expect(Number(other)).not.toBe(i + 1);
      const back = text.startsWith("CONTINUED") ? `FROM SHEET ${i + 1} AT ${mark}` : `CONTINUED ON SHEET ${i + 1} AT ${mark}`;
      expect(words[Number(other) - 1]).toContain(back);
    }));
    expect(marks.length).toBe(2 * new Set(marks).size);
    if (drawings.length > 1) expect(new Set(marks).size).toBeGreaterThanOrEqual(drawings.length - 1);
  });
});

describe("how a line is split", () => {
  const model = modelOf(randomLine(9));

  it("keeps one view, and gives equal sheets for equal input", () => {
    const [first, again] = [sheets(model, "A3"), sheets(model, "A3")];
    expect(first.length).toBeGreaterThan(1);
    expect(new Set(first.map(({ view }) => view)).size).toBe(1);
    expect(JSON.stringify(first)).toBe(JSON.stringify(again));
  });

  it("leaves a short line on one sheet without a match line", () => {
    const drawings = sheets(modelOf(randomLine(1)), "A3");
    expect(drawings).toHaveLength(1);
    expect(matchWords(drawings[0]!)).toEqual([]);
  });

  it("takes fewer sheets when one is asked for, as an option or in the document, and only as many as the paper needs", () => {
    const counts = [3, 9, 12].map((seed) => {
      const line = modelOf(randomLine(seed));
      const asked = { ...line, document: { ...line.document, sheets: "one" as const } };
      const one = sheets(line, "A3", "one").length;
      expect(drawSheets(asked, { ...ROOMS.A3, later: later.A3, measure: measureText, view: null, spool: null, show: SHOW_ALL })).toHaveLength(one);
      return { auto: sheets(line, "A3").length, one };
    });
    for (const { auto, one } of counts) expect(one).toBeLessThanOrEqual(auto);
    expect(counts.some(({ auto, one }) => one < auto)).toBe(true);
  });

  it("holds about 36 welds on a sheet of A3 at most", () => {
    for (const seed of [9, 12, 3]) {
      for (const drawing of sheets(modelOf(randomLine(seed)), "A3")) {
        expect(names(drawing).filter((name) => name.startsWith("joint ")).length).toBeLessThanOrEqual(60);
      }
    }
  });
});

describe("pages of a split spool", () => {
  function pagesOf(document: RunDocument, size: SheetSize) {
    const marks = nextMarks(document, emptyMarks(), []);
    const spool = [...buildModel(document, marks, []).spools].sort((p, q) => q.jointKeys.length - p.jointKeys.length)[0]!.letter;
    return composeSheet({ ...stubInput(size, "for-review", document), marks, spool, units: document.settings.units }, measureText);
  }

  it.each(["A3", "letter"] as const)("come before the lists, each with its own number, on %s", (size) => {
    const pages = pagesOf(randomLine(9), size);
    const isometrics = pages.filter(({ name }) => name.endsWith("isometric"));
    expect(isometrics.length).toBeGreaterThan(1);
    expect(pages.map(({ name }) => name)).toEqual(pages.map((_, i) => `${i + 1} ${i < isometrics.length ? "isometric" : "lists"}`));
    pages.forEach((page, i) => {
      const texts = page.items.flatMap((item) => (item.type === "text" ? [item.text] : []));
      expect(texts.some((text) => text.includes(`${i + 1} of ${pages.length}`) || text.includes(`SHEET ${i + 1} OF ${pages.length}`))).toBe(true);
      const [frame, ink] = [frameBox(page.widthMm, page.heightMm), inkBounds(page.items, measureText)];
      expect(ink.minX).toBeGreaterThanOrEqual(frame.minX - 1e-6);
      expect(ink.minY).toBeGreaterThanOrEqual(frame.minY - 1e-6);
      expect(ink.maxX).toBeLessThanOrEqual(frame.maxX + 1e-6);
      expect(ink.maxY).toBeLessThanOrEqual(frame.maxY + 1e-6);
    });
    for (let sheet = 1; sheet <= isometrics.length; sheet++) {
      const north = isometrics[sheet - 1]!.items.some((item) => item.type === "text" && item.text === "PLANT N");
      expect(north).toBe(true);
    }
  });
});
