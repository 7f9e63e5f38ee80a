/** The drawing of every sample run in every view: nothing overlaps, nothing is missing, nothing is degenerate. */
import { describe, expect, it } from "vitest";
import { measureText } from "@/fonts/widths";
import { drawingSvg, inkBounds, proposeView, type Drawing, type Model, type View } from "@/iso";
import { armAlong } from "@/iso/draw/arms";
import { placeAll, placePlan } from "@/iso/draw/place";
import { axisAngle, PROJECTIONS } from "@/iso/draw/project";
import { sketchOf } from "@/iso/draw/sketch";
import { sampleRuns } from "../../fixtures/sample-runs";
import { drawn, everyNumber, modelOf, overlappingLabels, ROOM } from "./draw-helpers";

const VIEWS: readonly View[] = [1, 2, 3, 4];
const samples = Object.entries(sampleRuns).map(([name, document]) => [name, modelOf(document)] as const);
const cases = samples.flatMap(([name, model]) => VIEWS.map((view) => [name, view, model] as const));

function missing(model: Model, drawing: Drawing): string[] {
  const shown = new Set(drawing.shown.map((ref) => `${ref.kind} ${ref.id}`));
  const owed = [
    ...model.joints.map((joint) => `joint ${joint.key}`),
    ...model.pieces.map((piece) => `piece ${piece.key}`),
    ...model.legs.filter((leg) => leg.lengthMm > 2).map((leg) => `dimension ${leg.id}`),
    ...model.spools.flatMap((spool) => spool.materials.flatMap((row) => row.refs)).filter((id) => model.components.some((c) => c.id === id)).map((id) => `component ${id}`),
  ];
  return owed.filter((name) => !shown.has(name));
}

describe.each(cases)("%s, view %i", (_name, view, model) => {
  const drawing = drawn(model, { view });

  it("keeps every label off every other (checked by polygon clipping)", () => {
    expect(overlappingLabels(drawing.items)).toEqual([]);
    expect(drawing.report.overlaps).toBe(0);
  });

  it("shows every weld, piece, item and dimension of the model", () => {
    expect(missing(model, drawing)).toEqual([]);
    // Counted on paper too: one text for each weld number and each piece mark.
    const texts = drawing.items.flatMap((item) => (item.type === "text" && item.ref ? [`${item.ref.kind} ${item.ref.id} ${item.text}`] : []));
    for (const joint of model.joints) if (joint.number !== null) expect(texts).toContain(`joint ${joint.key} ${joint.number}`);
    for (const piece of model.pieces) expect(texts).toContain(`piece ${piece.key} ${piece.mark}`);
    for (const leg of model.legs) expect(texts.some((text) => text.startsWith(`dimension ${leg.id} `))).toBe(true);
  });

  it("is finite, and no text is under 2.5 mm (ISO 3098 least height, from memory)", () => {
    expect(everyNumber(drawing.items).every(Number.isFinite)).toBe(true);
    for (const item of drawing.items) if (item.type === "text") expect(item.capMm).toBeGreaterThanOrEqual(2.5);
  });

  it("stays inside its room", () => {
    expect(drawing.bounds).toEqual(inkBounds(drawing.items, measureText));
    expect(drawing.bounds.minX).toBeGreaterThanOrEqual(0);
    expect(drawing.bounds.minY).toBeGreaterThanOrEqual(0);
    expect(drawing.bounds.maxX).toBeLessThanOrEqual(ROOM.widthMm);
    expect(drawing.bounds.maxY).toBeLessThanOrEqual(ROOM.heightMm);
  });

  it("keeps off-axis legs 12 degrees from every axis at every stretch", () => {
    const plan = placePlan(sketchOf(model, null), measureText);
    for (const stretch of [0, 1, 3]) {
      const placed = placeAll(plan, PROJECTIONS[view], stretch);
      for (const edge of placed.sketch.edges.filter((e) => e.kind === "offset")) {
        const [a, b] = [placed.paper.get(edge.from)!, placed.paper.get(edge.to)!];
        expect((axisAngle(PROJECTIONS[view], [b[0] - a[0], b[1] - a[1]]) * 180) / Math.PI).toBeGreaterThanOrEqual(12);
      }
    }
  });
});

describe("drawModel", () => {
  it.each(samples)("draws %s the same twice", (_name, model) => {
    const paint = (): string => {
      const { items } = drawn(model);
      return drawingSvg(items, ROOM.widthMm, ROOM.heightMm, { interactive: true });
    };
    expect(paint()).toBe(paint());
  });

  it.each(samples)("takes the proposed view of %s, the document's or the caller's, in rising order", (_name, model) => {
    expect(VIEWS).toContain(proposeView(model));
    expect(drawn({ ...model, document: { ...model.document, view: 3 } }).view).toBe(3);
    expect(drawn({ ...model, document: { ...model.document, view: 3 } }, { view: 4 }).view).toBe(4);
  });

  it("draws each spool of a line alone, with its own pieces and the welds it shares", () => {
    const model = modelOf(sampleRuns.twoSpools!);
    expect(model.spools.length).toBe(2);
    for (const spool of model.spools) {
      const drawing = drawn(model, { spool: spool.letter });
      const pieces = new Set(drawing.shown.filter((ref) => ref.kind === "piece").map((ref) => ref.id));
      expect([...pieces].sort()).toEqual([...spool.pieceKeys].sort());
      for (const key of spool.jointKeys) expect(drawing.shown).toContainEqual({ kind: "joint", id: key });
      expect(overlappingLabels(drawing.items)).toEqual([]);
      const other = model.spools.find((s) => s !== spool)!.letter;
      expect(drawing.items.some((item) => item.type === "text" && item.text === `FIELD WELD TO SPOOL ${other}`)).toBe(true);
      expect(drawing.items.some((item) => item.type === "line" && item.layer === "pipe" && item.ink === "grey" && item.dash !== undefined)).toBe(true);
    }
  });

  it("draws an empty line without a fault", () => {
    const model = modelOf({ ...sampleRuns.firstRun!, runs: [{ ...sampleRuns.firstRun!.runs[0]!, points: [] }] });
    const drawing = drawn(model);
    expect(everyNumber(drawing.items).every(Number.isFinite)).toBe(true);
    expect(drawing.report.labels).toBeGreaterThanOrEqual(1);
  });

  it("draws every spool of a line from the line's own side", () => {
    const model = modelOf(sampleRuns.twoSpools!);
    for (const spool of model.spools) expect(drawn(model, { spool: spool.letter }).view).toBe(proposeView(model));
  });

  it("marks the points of the latest revision with its triangle", () => {
    const model = modelOf(sampleRuns.firstRun!);
    const drawing = drawn(model, { changed: { code: "B", pointIds: [model.nodes[1]!.pointId] } });
    expect(drawing.items.filter((item) => item.type === "text" && item.text === "B" && item.ref?.kind === "point")).toHaveLength(1);
    expect(drawing.legend).toContain("revision");
    expect(overlappingLabels(drawing.items)).toEqual([]);
  });

  it("marks numbers nobody has verified", () => {
    const model = modelOf(sampleRuns.firstRun!);
    const doubted = { ...model, legs: model.legs.map((leg, i) => (i === 0 ? { ...leg, unverified: true } : leg)) };
    expect(drawn(doubted).items.some((item) => item.type === "text" && item.text.endsWith(" VIF"))).toBe(true);
  });

  it("leaves out what is switched off", () => {
    const model = modelOf(sampleRuns.firstRun!);
    const bare = drawn(model, { show: { items: false, welds: false, pieces: false, dimensions: false } });
    expect(bare.items.some((item) => item.layer === "balloon")).toBe(false);
    expect(bare.items.some((item) => item.layer === "dimension")).toBe(false);
    expect(bare.items.some((item) => item.layer === "pipe")).toBe(true);
  });
});

describe("armAlong", () => {
  it("gives a bare point no room", () => {
    expect(armAlong([], [0, 0, 0], [1, 0, 0]).room).toBe(0);
  });
});
