/** Bolted faces, flanges of every type, wafer and welded valves, the studs they take, and what a spool weighs and holds. */
import { describe, expect, it } from "vitest";
import { buildModel, emptyMarks, weightKey, type Item, type TakeOutWord } from "@/iso";
import { RunBuilder } from "../../fixtures/run-builder";

const IN = 25.4;
const end: Item = { kind: "end", goes: "field-weld", text: "" };
const flange = (given: Partial<Extract<Item, { kind: "flange" }>> = {}): Item =>
  ({ kind: "flange", flange: "weld-neck", ratingClass: null, boltHoles: "straddle", gasketSide: "after", goes: "nozzle", text: "N1", ...given });
const valve = (given: Partial<Extract<Item, { kind: "valve" }>> = {}): Item =>
  ({ kind: "valve", valve: "gate", ends: "flanged", ratingClass: null, mating: "weld-neck", stem: null, faceToFaceMm: null, tag: "", ...given });
const model = (run: RunBuilder, words: readonly TakeOutWord[] = []) => buildModel(run.done(), emptyMarks(), words);
const cuts = (run: RunBuilder) => model(run).pieces.map((p) => p.cutLengthMm / IN);
const studs = (run: RunBuilder) => model(run).components.filter((c) => c.kind === "bolt-set").map((c) => [c.bolts!.count, c.bolts!.diameter, Math.round((c.bolts!.lengthMm! / IN) * 1000) / 1000]);
/** NPS 4 STD, gaps and gaskets 1/8 in: the builder's default line. */
const line = () => new RunBuilder("T").start(end);

describe("flanges", () => {
  it("a pair within a run takes eight 5/8 x 3 1/2 studs of class 150, by the table (B16.5)", () => {
    expect(studs(line().go("E", `4'`, flange()).go("E", `4'`, end))).toEqual([[8, "5/8", 3.5]]);
  });

  it("class 900 adds the 1/4 face to its hub: face to end 48 leaves 48 - 4 1/2 - 1/4 - 1/8 (B16.5)", () => {
    expect(cuts(line().go("E", `4'`, flange({ ratingClass: 900 })))[0]).toBeCloseTo(48 - 4.5 - 0.25 - 0.125, 9);
  });

  it("a threaded flange lets the pipe in by the thread: 48 - 1 5/16 hub + 1.094 engagement (B16.5; B1.20.1 L1 + L3, from memory)", () => {
    const built = model(line().go("E", `4'`, flange({ flange: "threaded" })));
    expect(built.pieces[0]!.cutLengthMm / IN).toBeCloseTo(48 - 1.3125 + 1.094, 9);
    expect(built.pieces[0]!.ends[1].prep).toBe("thread");
    expect(built.joints.find((j) => j.kind === "threaded")!.number).toBeNull();
  });

  it("a lap joint is a stub end welded to the pipe and a loose flange: 48 - 6 - 1/8 (B16.9 long pattern); short 3 (MSS SP-43)", () => {
    const built = model(line().go("E", `4'`, flange({ flange: "lap-joint" })));
    expect(built.pieces[0]!.cutLengthMm / IN).toBeCloseTo(48 - 6 - 0.125, 9);
    expect(built.components.map((c) => c.kind)).toEqual(["flange-lap-joint", "stub-end"]);
    expect(built.components.every((c) => c.spool === "A")).toBe(true);
    expect(cuts(line().go("E", `4'`, flange({ flange: "lap-joint", stubEnd: "short" })))[0]).toBeCloseTo(48 - 3 - 0.125, 9);
  });

  it("studs of a lap-joint pair change by its laps, rounded up to 1/4 in and marked computed (common practice)", () => {
    const set = model(line().go("E", `4'`, flange({ flange: "lap-joint" })).go("E", `4'`, end)).components.find((c) => c.kind === "bolt-set")!;
    // 3 1/2 + 2 x (0.237 wall - 1/16 face) = 3.849, so 4.
    expect(set.bolts!.lengthMm! / IN).toBeCloseTo(4, 9);
    expect([set.description, set.source]).toEqual([expect.stringContaining("computed"), expect.stringContaining("stub end")]);
  });

  it("a face's own gasket enters the cut and the studs", () => {
    const wide = line().go("E", `4'`, flange({ gasketMm: 0.5 * IN })).go("E", `4'`, end);
    expect(cuts(wide)[1]).toBeCloseTo(48 - 0.5 - 3 - 0.125, 9);
    expect(studs(wide)).toEqual([[8, "5/8", 4]]);
  });

  it("turned bolt holes are on the part; straddling ones say nothing", () => {
    const turn = { turnDeg: 22.5, from: "E" } as const;
    expect(model(line().go("E", `4'`, flange({ boltHoles: turn }))).components[0]!.boltTurn).toEqual(turn);
    expect(model(line().go("E", `4'`, flange())).components[0]!.boltTurn ?? null).toBeNull();
  });

  it("studs change no content key, and stand once in the list with their number", () => {
    const built = model(line().go("E", `4'`, flange()).go("E", `4'`, end));
    expect(built.spools[0]!.content).not.toContain("bolt-set");
    const row = built.spools[0]!.materials.find((r) => r.description.startsWith("Stud bolt"))!;
    expect([row.quantity, row.size, row.refs]).toEqual([8, "5/8 x 3 1/2 in", ["p2.bolts"]]);
  });
});

describe("valves", () => {
  it("a wafer butterfly is passed by one set of studs: 3 1/2 + 2 1/16 + 1/8, up to 5 3/4 (B16.5, API 609 from memory)", () => {
    expect(studs(line().go("E", `4'`, valve({ valve: "butterfly" })).go("E", `4'`, end))).toEqual([[8, "5/8", 5.75]]);
    expect(cuts(line().go("E", `4'`, valve({ valve: "butterfly" })).go("E", `4'`, end))[0]).toBeCloseTo(48 - 2.0625 / 2 - 0.125 - 3 - 0.125, 9);
  });

  it("a butt-weld gate of class 150 is 12 long, longer than the flanged one (B16.10, from memory)", () => {
    expect(cuts(line().go("E", `4'`, valve({ ends: "butt" })).go("E", `4'`, end))[0]).toBeCloseTo(48 - 6 - 0.125, 9);
  });

  it("a threaded valve has no common table: missing stops the line until the shop measures one", () => {
    const run = () => line().go("E", `4'`, valve({ ends: "threaded" })).go("E", `4'`, end);
    expect(model(run()).problems.some((p) => p.code === "take-out-missing" && p.severity === "stop")).toBe(true);
    const key = "valve:gate:150:4:threaded";
    const own = model(run(), [{ key, valueMm: 7 * IN, by: "D. Okafor", at: "2026-03-02" }]);
    expect(own.problems.some((p) => p.code === "take-out-missing")).toBe(false);
    expect(own.pieces[0]!.cutLengthMm / IN).toBeCloseTo(48 - 3.5 + 1.094, 9);
  });
});

describe("what a spool weighs and holds", () => {
  it("pipe by its formula, water and surface by its diameters (NPS 4 STD: 10.79 lb/ft, bore 4.026 in)", () => {
    const spool = model(line().go("E", `10'`, end)).spools[0]!;
    const feet = model(line().go("E", `10'`, end)).pieces[0]!.cutLengthMm / 304.8;
    expect(spool.weightKg / 0.45359237).toBeCloseTo(10.79 * feet, 0);
    expect(spool.volumeL!).toBeCloseTo((Math.PI / 4) * (4.026 * IN) ** 2 * feet * 304.8 / 1e6, 6);
    expect(spool.filledKg!).toBeCloseTo(spool.weightKg + spool.volumeL!, 9);
    expect(spool.paintM2!).toBeCloseTo(Math.PI * 4.5 * IN * feet * 304.8 / 1e6, 6);
  });

  it("a valve is not weighed until the shop says, with the shop named as the source", () => {
    const run = () => line().go("E", `4'`, valve()).go("E", `4'`, end);
    expect(model(run()).spools[0]!.unweighed).toBe(1);
    const key = weightKey("valve-gate-flanged:150:4");
    const weighed = model(run(), [{ key, valueMm: 54, by: "D. Okafor", at: "2026-03-02" }]);
    expect(weighed.spools[0]!.unweighed).toBe(0);
    expect(weighed.components.find((c) => c.kind === "valve")).toMatchObject({ weightKg: 54, weightSource: "weighed by the shop" });
  });

  it("an elbow balances on its arc: R·sin(45°)/45° from the bend centre (geometry)", () => {
    const built = model(new RunBuilder("T").start(end).go("E", `6'`).go("N", `6'`, end));
    const elbow = built.components[0]!;
    const alone = built.spools[0]!;
    const pieces = built.pieces.reduce((sum, p) => sum + p.weightKg! * (p.start[0] + p.end[0]) / 2, 0);
    const at = (alone.centreOfGravity![0] * alone.weightKg - pieces) / elbow.weightKg!;
    expect(at).toBeCloseTo(elbow.centre[0] - 6 * IN + (6 * IN * Math.sin(Math.PI / 4)) / (Math.PI / 4) * Math.cos(Math.PI / 4), 6);
  });
});
