/** Edits on whole runs and lines: several rows, a run turned round, the opposite hand, a line put into another. */
import { describe, expect, it } from "vitest";
import { buildModel } from "../../../iso/run/build-model";
import { parseRunDocument, type Point, type RunDocument } from "../../../iso/run/document";
import { newPoint, pointUpdate } from "../../../iso/run/edit";
import type { EditResult } from "../../../iso/run/edit-result";
import { entryNegate, offsetSigned } from "../../../iso/run/entry-words";
import { lineInsert } from "../../../iso/run/insert-line";
import { emptyMarks } from "../../../iso/run/marks";
import { documentMirror } from "../../../iso/run/mirror";
import type { Model } from "../../../iso/run/model-types";
import { pointsInsert, pointsMove, pointsRemove } from "../../../iso/run/reorder";
import { runReverse } from "../../../iso/run/reverse";
import { end, flange, joint, pipe, reducer, RunBuilder, tee, valve } from "../../fixtures/run-builder";
import { branchWithReducer, firstRun, metricLine, planarOffset, sampleRuns } from "../../fixtures/sample-runs";

const MM = 6;
const ids = (document: RunDocument): string[] => document.runs[0]!.points.map((p) => p.id);
const build = (document: RunDocument): Model => buildModel(document, emptyMarks(), []);
const done = (result: EditResult): RunDocument => {
  if (!result.ok) throw new Error(result.message);
  expect(parseRunDocument(result.document)).toEqual({ ok: true, document: result.document });
  return result.document;
};
/** Working points; an eccentric reducer's lies on the line that arrives, so the other way round it is its other one. */
const places = (model: Model): Record<string, readonly number[]> => {
  const eccentric = new Set(model.components.filter((c) => c.kind === "reducer-eccentric").map((c) => c.pointId));
  return Object.fromEntries(model.nodes.filter((n) => !eccentric.has(n.pointId)).map((n) => [n.pointId, n.position]));
};
/** Cut lengths by what the piece lies between, whichever way it is walked. */
const cuts = (model: Model): string[] => model.pieces.map((p) => `${p.nps} ${p.cutLengthMm.toFixed(MM)} ${[p.ends[0].jointKey, p.ends[1].jointKey].sort().join(" ")}`).sort();
const point = (id: string): Point => ({ ...newPoint(id), offset: { kind: "enu", e: { text: "", mm: 300 }, n: { text: "", mm: 0 }, u: { text: "", mm: 0 } } });

describe("several rows", () => {
  it("go in together, refuse ids in use, come out together", () => {
    const grown = pointsInsert(firstRun, "main", 2, [point("x"), point("y")]);
    expect(ids(grown)).toEqual(["p1", "p2", "x", "y", "p3", "p4", "p5"]);
    expect(pointsInsert(firstRun, "main", 2, [point("x"), point("p1")])).toBe(firstRun);
    expect(ids(pointsRemove(grown, ["x", "y", "p1"]))).toEqual(["p2", "p3", "p4", "p5"]);
  });

  it("move as a block up and down; what is not there changes nothing", () => {
    expect(ids(pointsMove(firstRun, "main", 1, 2, 3))).toEqual(["p1", "p4", "p5", "p2", "p3"]);
    expect(ids(pointsMove(firstRun, "main", 3, 2, 0))).toEqual(["p4", "p5", "p1", "p2", "p3"]);
    expect(pointsMove(firstRun, "main", 3, 2, 4)).toBe(firstRun);
    expect(pointsMove(firstRun, "main", 1, 0, 2)).toBe(firstRun);
  });
});

describe("a run turned round", () => {
  it("leaves every working point of every sample where it was, and every cut length what it was", () => {
    for (const document of Object.values(sampleRuns)) {
      const turned = done(runReverse(document, document.runs[0]!.id));
      const [before, after] = [build(document), build(turned)];
      for (const [id, position] of Object.entries(places(before))) places(after)[id]!.forEach((mm, i) => expect(mm).toBeCloseTo(position[i]!, MM));
      expect(cuts(after)).toEqual(cuts(before));
      expect(after.joints.map((j) => j.key).sort()).toEqual(before.joints.map((j) => j.key).sort());
      expect(cuts(build(done(runReverse(turned, turned.runs[0]!.id))))).toEqual(cuts(before));
    }
  });

  it("carries the typed words, the provenance and the second reading to the point the leg now ends at", () => {
    const measured = pointUpdate(firstRun, "p2", { provenance: { kind: "measured", toleranceMm: 2, by: "A", at: null, second: { text: "x", mm: 5 } } });
    const points = done(runReverse(measured, "main")).runs[0]!.points;
    expect(points.map((p) => p.id)).toEqual(["p5", "p4", "p3", "p2", "p1"]);
    expect(points[4]).toMatchObject({ id: "p1", flipped: true, provenance: { kind: "measured", by: "A" }, offset: { kind: "polar", direction: { text: "W", e: -1 }, length: { text: `3' 1 1/2"` } } });
    expect(points[0]).toMatchObject({ id: "p5", provenance: { kind: "calculated" }, offset: { kind: "absolute" } });
  });

  it("turns what has a sense: places, gasket side, check valve, sizes and an eccentric's two lines", () => {
    const document = new RunBuilder("R-1", "imperial", { pipe: pipe("6") }).start(flange())
      .go("E", `5'`, valve({ valve: "check" }), { places: { in: "field" } }).go("E", `5'`, reducer("4", "eccentric", "D")).go("E", `5'`, flange({ gasketSide: "before" })).go("E", `5'`, end("open", "X")).done();
    const turned = done(runReverse(document, "main"));
    const [, pair, red, check] = turned.runs[0]!.points;
    expect(pair!.item).toMatchObject({ gasketSide: "after" });
    expect(red!.item).toMatchObject({ toNps: "6", flat: "D" });
    expect(check).toMatchObject({ places: { out: "field" }, item: { against: true } });
    expect(turned.runs[0]!.pipe).toMatchObject({ nps: "4" });
    const [before, after] = [build(document), build(turned)];
    expect(cuts(after)).toEqual(cuts(before));
    for (const id of ["p1", "p2", "p4", "p5"]) places(after)[id]!.forEach((mm, i) => expect(mm).toBeCloseTo(places(before)[id]![i]!, MM));
    expect(build(done(runReverse(turned, "main"))).pieces.map((p) => p.cutLengthMm)).toEqual(before.pieces.map((p) => expect.closeTo(p.cutLengthMm, MM)));
    expect(done(runReverse(turned, "main")).runs[0]!.pipe).toBeNull();
  });

  it("starts specification and insulation from the other side", () => {
    const document = pointUpdate(firstRun, "p3", { starts: { specification: "B2", insulation: "50 mm" } });
    const points = done(runReverse(document, "main")).runs[0]!.points;
    expect(points[0]!.starts).toEqual({ specification: "B2", insulation: "50 mm" });
    expect(points[2]!.starts).toEqual({ specification: firstRun.settings.pipe.specification, insulation: "" });
  });

  it("says what cannot be turned round", () => {
    expect(runReverse(branchWithReducer, branchWithReducer.runs[1]!.id)).toMatchObject({ ok: false, message: expect.stringContaining("must leave from there") });
    const half = pointUpdate(firstRun, "p3", { item: { kind: "coupling", half: true } });
    expect(runReverse(half, "main")).toMatchObject({ ok: false, message: expect.stringContaining("half coupling") });
    expect(runReverse(firstRun, "nobody").ok).toBe(false);
  });
});

describe("the opposite hand", () => {
  it("mirrors every point about the plane, keeps every cut, and says whose hand it is", () => {
    for (const document of Object.values(sampleRuns)) {
      const mirrored = documentMirror(document, "E");
      expect(parseRunDocument(mirrored).ok).toBe(true);
      const [before, after] = [build(document), build(mirrored)];
      for (const [id, [e, n, u]] of Object.entries(places(before))) {
        [-e!, n!, u!].forEach((mm, i) => expect(places(after)[id]![i]).toBeCloseTo(mm, MM));
      }
      expect(cuts(after)).toEqual(cuts(before));
      expect(mirrored.title).toBe(`OPPOSITE HAND OF ${document.number}`);
      expect(documentMirror(mirrored, "E").runs).toEqual(document.runs);
    }
  });

  it("turns stems, bolt turns and typed directions along", () => {
    const document = new RunBuilder("O-1").start(flange({ boltHoles: { turnDeg: 22.5, from: "W" } })).go("N30E", `5'`, valve({ stem: "E" })).go("N30E", `5'`, end("open", "X")).done();
    const points = documentMirror({ ...document, view: 1 }, "E").runs[0]!.points;
    expect(points[0]!.item).toMatchObject({ boltHoles: { turnDeg: 337.5, from: "E" } });
    expect(points[1]).toMatchObject({ item: { stem: "W" }, offset: { direction: { text: "N30W" } } });
    expect(documentMirror({ ...document, view: 1 }, "E").view).toBe(2);
  });
});

describe("another line put in", () => {
  const other = new RunBuilder("O-9").start(end("open", "")).go("U", `4'`, tee()).go("U", `4'`, flange()).branch(2).go("N", `3'`, flange()).done();
  let serial = 0;
  const makeId = () => `i${(serial += 1)}`;

  it("goes on from the end of a run, its first point on it, its branches along", () => {
    const host = new RunBuilder("H-1").start(flange()).go("E", `10'`, end("open", "")).done();
    const joined = done(lineInsert({ ...host, notes: ["A"] }, { ...other, notes: ["A", "B"] }, { as: "continue", pointId: "p2" }, makeId));
    expect(joined.runs.map((r) => r.points.length)).toEqual([4, 1]);
    expect(joined.notes).toEqual(["A", "B"]);
    expect(joined.runs[0]!.points[1]!.item).toEqual({ kind: "none" });
    expect(places(build(joined))[joined.runs[0]!.points[3]!.id]).toEqual([3048, 0, expect.closeTo(2438.4, MM)]);
    expect(build(joined).problems.filter((p) => p.severity === "stop")).toEqual([]);
  });

  it("leaves as a branch from a free tee and nowhere else", () => {
    const host = new RunBuilder("H-2").start(flange()).go("E", `10'`, tee()).go("E", `10'`, flange()).done();
    const joined = done(lineInsert(host, other, { as: "branch", pointId: "p2" }, makeId));
    expect(joined.runs.map((r) => r.from)).toEqual([null, "p2", joined.runs[1]!.points[0]!.id]);
    expect(build(joined).problems.filter((p) => p.severity === "stop")).toEqual([]);
    expect(lineInsert(joined, other, { as: "branch", pointId: "p2" }, makeId)).toMatchObject({ ok: false, message: expect.stringContaining("taken") });
    expect(lineInsert(host, other, { as: "branch", pointId: "p1" }, makeId).ok).toBe(false);
    expect(lineInsert(host, other, { as: "continue", pointId: "p2" }, makeId).ok).toBe(false);
    expect(lineInsert(host, other, { as: "continue", pointId: "p3" }, () => "p1")).toMatchObject({ ok: false });
  });

  it("of other units keeps its lengths and is typed anew", () => {
    const host = new RunBuilder("H-3", "imperial", { pipe: metricLine.settings.pipe }).start(flange()).go("E", `10'`, joint).done();
    const joined = done(lineInsert(host, metricLine, { as: "continue", pointId: "p2" }, makeId));
    const lengths = build(metricLine).legs.map((l) => l.lengthMm);
    expect(build(joined).legs.map((l) => l.lengthMm).slice(-lengths.length)).toEqual(lengths.map((mm) => expect.closeTo(mm, MM)));
  });

  it("refuses another size at the joining point", () => {
    const host = new RunBuilder("H-4", "imperial", { pipe: pipe("6") }).start(flange()).go("E", `10'`, end("open", "")).done();
    expect(lineInsert(host, other, { as: "continue", pointId: "p2" }, makeId)).toMatchObject({ ok: false, message: expect.stringContaining("reducer") });
  });
});

describe("typed words", () => {
  it("turn with the number: feet, inches, directions, slopes", () => {
    expect(entryNegate({ text: `3' 1 1/2"`, mm: 952.5 }, "imperial")).toEqual({ text: `-3' 1 1/2"`, mm: -952.5 });
    expect(entryNegate({ text: "-775", mm: -775 }, "metric")).toEqual({ text: "775", mm: 775 });
    const sloped = offsetSigned({ kind: "slope", direction: { text: "E", e: 1, n: 0, u: 0 }, length: { text: "10'", mm: 3048 }, slope: { text: "1:100", ratio: 0.01 } }, [-1, -1, -1], "imperial");
    expect(sloped).toMatchObject({ direction: { text: "W", e: -1 }, slope: { text: "-1:100", ratio: -0.01 } });
    expect(offsetSigned(planarOffset.runs[0]!.points[2]!.offset, [1, 1, 1], "imperial")).toEqual(planarOffset.runs[0]!.points[2]!.offset);
    expect(offsetSigned({ kind: "polar", direction: { text: "045/30", e: 0.6123724356957945, n: 0.6123724356957946, u: 0.5 }, length: { text: "1", mm: 1 } }, [-1, -1, -1], "metric")).toMatchObject({ direction: { text: "225/-30" } });
  });
});
