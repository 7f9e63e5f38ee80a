/** Spools, their lists, weights, boxes and content keys; bolted faces and loose parts. */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { buildModel } from "../../../iso/run/build-model";
import { documentCopy, pointUpdate } from "../../../iso/run/edit";
import { emptyMarks } from "../../../iso/run/marks";
import type { Model } from "../../../iso/run/model-types";
import type { Point, RunDocument } from "../../../iso/run/document";
import { end, flange, pipe, RunBuilder, tee, valve } from "../../fixtures/run-builder";
import { branchWithReducer, firstRun, twoSpools, valveStation } from "../../fixtures/sample-runs";

const INCH = 25.4;
const build = (document: RunDocument): Model => buildModel(document, emptyMarks(), []);
const open = end("open", "BEVEL");
const northBy = (document: RunDocument, id: string, mm: number): RunDocument => {
  const point = document.runs.flatMap((r) => r.points).find((p) => p.id === id)!;
  const offset = point.offset as Extract<Point["offset"], { kind: "polar" }>;
  return pointUpdate(document, id, { offset: { ...offset, length: { text: "", mm: offset.length.mm + mm } } });
};

describe("where a line comes apart", () => {
  it("splits at field welds only, letters along flow", () => {
    const model = build(twoSpools);
    expect(model.spools.map((s) => s.letter)).toEqual(["A", "B"]);
    expect(model.pieces.map((p) => p.spool)).toEqual(["A", "A", "A", "B", "B", "B"]);
    const weld = model.joints.find((j) => j.key === "p4:weld")!;
    expect(weld).toMatchObject({ place: "field", spool: "A", number: "6" });
  });

  it("adds the field trim to the cut piece as its own term", () => {
    const piece = build(twoSpools).pieces.at(-1)!;
    const trim = piece.terms.filter((t) => t.kind === "trim");
    expect(trim.map((t) => t.valueMm / INCH)).toEqual([expect.closeTo(6, 9)]);
    expect(piece.cutLengthMm / INCH).toBeCloseTo(39 - 12 - 0.125 + 6, 9);
  });

  it("a field weld at a welded end is a weld of the line, numbered", () => {
    const last = build(twoSpools).joints.at(-1)!;
    expect(last).toMatchObject({ key: "p7:end", place: "field-fit", number: "11", b: null });
  });

  it("a field weld asked for at a bare point on straight pipe is a weld there", () => {
    const model = build(new RunBuilder("T").start(flange()).go("E", `5'`, { kind: "none" }, { places: { in: "field" } }).go("E", `5'`, flange()).done());
    expect(model.spools.map((s) => s.letter)).toEqual(["A", "B"]);
    expect(model.pieces.map((p) => p.cutLengthMm / INCH)).toEqual([expect.closeTo(60 - 3 - 0.125 - 0.0625, 9), expect.closeTo(60 - 3 - 0.125 - 0.0625, 9)]);
    const through = build(new RunBuilder("T").start(flange()).go("E", `5'`).go("E", `5'`, flange()).done());
    expect(through.pieces.map((p) => p.legIds)).toEqual([["p2", "p3"]]);
  });

  it("a branch with a field weld is a spool of its own; the tee stays with the run", () => {
    const model = build(new RunBuilder("T").start(flange()).go("E", `3'`, tee(), { places: { branch: "field" } }).go("E", `3'`, flange()).branch(2).go("N", `3'`, flange()).done());
    expect(model.spools.map((s) => [s.letter, s.pieceKeys.length])).toEqual([["A", 2], ["B", 1]]);
    expect(model.components.find((c) => c.kind === "tee")!.spool).toBe("A");
  });

  it("bolted faces hold together, unless their place is the field", () => {
    expect(build(valveStation).spools).toHaveLength(1);
    const loose = build(pointUpdate(valveStation, "p6", { places: { bolts: "field" } }));
    expect(loose.spools.map((s) => s.letter)).toEqual(["A", "B"]);
    expect(loose.components.find((c) => c.id === "p6")!.spool).toBe("A");
    const rows = loose.spools[0]!.materials.map((m) => m.description);
    expect(rows).toContain("Globe valve, flanged, raised face, class 150, field");
    expect(rows.filter((d) => d.endsWith(", field")).length).toBe(3);
    expect(loose.spools[1]!.materials.map((m) => m.description).filter((d) => d.endsWith(", field"))).toEqual([]);
  });

  it("a fitting between two field welds goes on its neighbour's list, marked field", () => {
    const model = build(new RunBuilder("T").start(flange()).go("E", `3'`, { kind: "none" }, { places: { in: "field", out: "field" } }).go("N", `3'`, flange()).done());
    expect(model.spools).toHaveLength(2);
    expect(model.components.find((c) => c.kind === "elbow")!.spool).toBe("A");
    expect(model.spools[0]!.materials.map((m) => m.description)).toContain("Elbow 90 LR, butt-weld, STD, field");
  });

  it("two flanged valves face to face share one gasket and bring no flanges between them (B16.10: 9 and 11 1/2 in)", () => {
    const model = build(new RunBuilder("T").start(flange()).go("E", `3'`, valve()).go("E", `10 3/8"`, valve({ valve: "globe" })).go("E", `3'`, flange()).done());
    expect(model.components.filter((c) => c.kind === "gasket")).toHaveLength(3);
    expect(model.components.filter((c) => c.kind === "flange-weld-neck").map((c) => c.id)).toEqual(["p1", "p2.flange-in", "p3.flange-out", "p4"]);
    expect(model.pieces).toHaveLength(2);
    expect(model.joints.find((j) => j.key === "p3:bolts-face")).toMatchObject({ a: "p2", b: "p3", kind: "bolted" });
  });

  it("a blind on a valve and a flange on a valve are one flange each", () => {
    const model = build(new RunBuilder("T").start(open).go("E", `3'`, flange()).go("E", `4 5/8"`, valve()).go("E", `4 5/8"`, flange({ flange: "blind" })).done());
    expect(model.components.map((c) => c.kind).filter((kind) => kind !== "bolt-set")).toEqual(["flange-weld-neck", "gasket", "valve", "gasket", "flange-blind"]);
    expect(model.pieces.map((p) => p.cutLengthMm / INCH)).toEqual([expect.closeTo(36 - 3 - 0.125, 9)]);
  });

  it("an outlet and what hangs on it stay with the pipe they sit on", () => {
    const model = build(branchWithReducer);
    expect(model.joints.find((j) => j.key === "p3:header")).toMatchObject({ kind: "branch", a: "p4:1", b: "p3", number: "4" });
    expect(model.spools).toHaveLength(1);
  });
});

describe("the material list", () => {
  it("sums pipe by cut length and counts the rest", () => {
    const rows = build(firstRun).spools[0]!.materials;
    expect(rows.map((r) => [r.item, r.quantity, r.unit, r.size, r.description])).toEqual([
      [1, expect.closeTo((28.25 + 19.75 + 13 + 25.625) * INCH, 6), "mm", "NPS 4", "Pipe, STD"],
      [2, 2, "ea", "NPS 4", "Elbow 90 LR, butt-weld, STD"],
      [3, 1, "ea", "NPS 4", "Elbow 45 LR, butt-weld, STD"],
      [4, 2, "ea", "NPS 4", "Flange, weld-neck, class 150, raised face, STD"],
      [5, 1, "ea", "NPS 4", "Gate valve, flanged, raised face, class 150"],
      [6, 1, "ea", "NPS 4", "Gasket, class 150, raised face"],
      [7, 8, "ea", "5/8 x 3 1/2 in", "Stud bolt with two nuts"],
    ]);
  });

  it("counts every component and piece once, over all spools", () => {
    for (const document of [firstRun, twoSpools, valveStation, branchWithReducer]) {
      const model = build(document);
      const refs = model.spools.flatMap((s) => s.materials.flatMap((m) => m.refs)).filter((r) => !r.includes(":bolts"));
      expect([...refs].sort()).toEqual([...model.components.map((c) => c.id), ...model.pieces.map((p) => p.key)].sort());
    }
  });
});

describe("weight, centre of gravity and box", () => {
  it("a straight pipe weighs its length (NPS 4 STD 10.79 lb/ft, B36.10M) about its middle", () => {
    const spool = build(new RunBuilder("T").start(open).go("E", `10'`, open).done()).spools[0]!;
    expect(spool.weightKg / 0.45359237 / 10).toBeCloseTo(10.8, 1);
    expect(spool.centreOfGravity![0]).toBeCloseTo(5 * 304.8, 6);
    expect(spool.boxMm.map((mm) => mm / INCH)).toEqual([expect.closeTo(120, 6), expect.closeTo(4.5, 6), expect.closeTo(4.5, 6)]);
  });

  it("flanges and fittings are estimates near makers' lists (NPS 4 class 150: weld-neck 16 lb, slip-on 13, blind 17; LR 90 8.9; all but the elbow from memory)", () => {
    const model = build(new RunBuilder("T").start(flange()).go("E", `3'`).go("N", `3'`, flange({ flange: "slip-on" })).go("N", `3'`, flange({ flange: "blind" })).done());
    const pounds = (kind: string) => model.components.find((c) => c.kind === kind)!.weightKg! / 0.45359237;
    for (const [kind, listed] of [["flange-weld-neck", 16], ["flange-slip-on", 13], ["flange-blind", 17]] as const) {
      expect(Math.abs(pounds(kind) - listed) / listed).toBeLessThan(0.1);
    }
    expect(pounds("elbow")).toBeCloseTo(8.9, 6);
    expect(model.spools[0]!.unweighed).toBe(0);
  });

  it("counts what it cannot weigh: the first run's valve", () => {
    expect(build(firstRun).spools[0]!.unweighed).toBe(1);
  });

  it("says when a spool leaves the shipping box, in its own numbers", () => {
    const model = build(new RunBuilder("T").start(flange()).go("E", `42'`).go("N", `6'`, flange()).done());
    expect(model.problems.filter((p) => p.code === "shipping-box").map((p) => p.text)).toEqual([
      `Spool A is 42'-4 1/2" x 6'-4 1/2" x 9" along its own pipes, longer than the shipping box is from corner to corner: put a field weld near its middle, at this point or the next.`,
    ]);
  });
});

describe("the content key", () => {
  const keys = (document: RunDocument) => build(document).spools.map((s) => s.content);

  it("is equal for equal spools under other ids and numbers, and wherever they stand", () => {
    expect(keys(documentCopy(twoSpools, "CD-7002", (id) => `copy-${id}`))).toEqual(keys(twoSpools));
    const far = pointUpdate(twoSpools, "p1", { offset: { kind: "absolute", e: { text: "", mm: 123_456.789 }, n: { text: "", mm: -9_876.5 }, u: { text: "", mm: 333.333 } } });
    expect(keys(far)).toEqual(keys(twoSpools));
  });

  it("changes with a length in its own spool and not with one in the other", () => {
    const before = keys(twoSpools);
    const upstream = keys(northBy(twoSpools, "p2", INCH / 16));
    expect(upstream[0]).not.toBe(before[0]);
    expect(upstream[1]).toBe(before[1]);
    const downstream = keys(northBy(twoSpools, "p6", -INCH / 16));
    expect(downstream[0]).toBe(before[0]);
    expect(downstream[1]).not.toBe(before[1]);
  });

  it("keeps the far spool's key for any length of the near one, float dust and all", () => {
    const before = keys(twoSpools);
    fc.assert(fc.property(fc.double({ min: -500, max: 9_000, noNaN: true }), fc.constantFrom("p2", "p3", "p4"), (mm, id) => {
      expect(keys(northBy(twoSpools, id, mm))[1]).toBe(before[1]);
    }), { numRuns: 150, seed: 11 });
  });

  it("changes with a note, a provenance, a place, a material and a tag", () => {
    const before = keys(twoSpools)[0];
    expect(keys(pointUpdate(twoSpools, "p2", { note: "Mark north" }))[0]).not.toBe(before);
    expect(keys(pointUpdate(twoSpools, "p2", { provenance: { kind: "assumed", toleranceMm: null, by: null, at: null, second: null } }))[0]).not.toBe(before);
    expect(keys(pointUpdate(twoSpools, "p4", { places: { in: "field-fit" } }))[0]).not.toBe(before);
    expect(keys(pointUpdate(twoSpools, "p1", { item: flange({ text: "TANK T-2" }) }))[0]).not.toBe(before);
    expect(keys({ ...twoSpools, settings: { ...twoSpools.settings, pipe: pipe("8", "STD", "A333 6") } })[0]).not.toBe(before);
  });
});

