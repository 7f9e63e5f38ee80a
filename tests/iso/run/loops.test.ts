/** Runs that come back to their line: closing, missing, taking up, and ports that are taken. */
import { describe, expect, it } from "vitest";
import { buildModel, nextMarks } from "../../../iso/run/build-model";
import { parseRunDocument, type Item, type Run, type RunDocument } from "../../../iso/run/document";
import { pointRemove } from "../../../iso/run/edit";
import { missWords } from "../../../iso/run/loops";
import { emptyMarks, stickMarks } from "../../../iso/run/marks";
import type { Model } from "../../../iso/run/model-types";
import { runReverse } from "../../../iso/run/reverse";
import { end, flange, RunBuilder, tee } from "../../fixtures/run-builder";

const build = (document: RunDocument): Model => buildModel(document, emptyMarks(), []);
const codes = (model: Model): string[] => model.problems.map((p) => p.code).filter((c) => c.startsWith("loop") || c.startsWith("branch"));
const back = (document: RunDocument, to: string, run = 1): RunDocument => ({ ...document, runs: document.runs.map((r, i): Run => (i === run ? { ...r, to } : r)) });

/** A by-pass: up from one tee, along, and down into the other. `along` and `down` are its second and third leg. */
const bypass = (along = `8'`, down = `3'`, first: Item = tee(), second: Item = tee()): RunDocument => back(
  new RunBuilder("L-1").start(flange()).go("E", `4'`, first).go("E", `8'`, second).go("E", `4'`, flange())
    .branch(2).go("U", `3'`).go("E", along).go("D", down, end("open", "")).done(), "p3");

describe("a by-pass that closes", () => {
  it("ends in the free branch port, with a weld there and pipe cut to the tee's take-out", () => {
    const model = build(bypass());
    expect(model.loops).toEqual([{ runId: "run-1", toPointId: "p3", missMm: [0, 0, 0], closes: true }]);
    expect(codes(model)).toEqual([]);
    expect(model.problems.filter((p) => p.severity === "stop")).toEqual([]);
    const last = model.pieces.find((p) => p.legId === "p7")!;
    // ASME B16.9, NPS 4: LR 90 6 in, straight tee 4 1/8 in; root gaps 1/8 in.
    expect(last.cutLengthMm / 25.4).toBeCloseTo(36 - 6 - 4.125 - 0.25, 9);
    expect(last.ends[1].jointKey).toBe("p3:branch");
    expect(model.joints.find((j) => j.key === "p3:branch")).toMatchObject({ a: last.key, b: "p3", number: expect.any(String) });
    expect(model.components.find((c) => c.pointId === "p7")).toBeUndefined();
  });

  it("is one spool with the line it comes back to", () => {
    expect(build(bypass()).spools).toHaveLength(1);
  });

  it("takes a small miss up in its last leg and says how much", () => {
    const model = build(bypass(`8'`, `2' 11 15/16"`));
    expect(model.loops![0]).toMatchObject({ closes: true, missMm: [0, 0, expect.closeTo(25.4 / 16, 6)] });
    expect(model.problems.find((p) => p.code === "loop-taken-up")!.text).toBe("Branch B1 comes back to point 3 with a miss of 1/16 in U: its last leg takes it up.");
    expect(model.legs.find((l) => l.id === "p7")!.lengthMm).toBeCloseTo(3 * 304.8, 9);
  });

  it("keeps to the line's own tolerance", () => {
    const strict = bypass(`8'`, `2' 11 15/16"`);
    expect(build({ ...strict, settings: { ...strict.settings, loopToleranceMm: 1 } }).loops![0]!.closes).toBe(false);
  });
});

describe("a loop that does not close", () => {
  it("stops, says by how much and what to check", () => {
    const model = build(bypass(`8' 0 1/4"`, `2' 10"`));
    const stop = model.problems.find((p) => p.code === "loop-open")!;
    expect(stop).toMatchObject({ severity: "stop", pointId: "p7", runId: "run-1" });
    expect(stop.text).toBe("Loop does not close by 1/4 in E, 2 in U: branch B1 ends there beside point 3. Check the east-west dimensions of point 2 and the vertical dimensions of points 1, 3, and those of the line between its two ends.");
    expect(model.loops).toEqual([{ runId: "run-1", toPointId: "p3", missMm: [expect.closeTo(6.35, 6), 0, expect.closeTo(50.8, 6)], closes: false }]);
    expect(model.joints.some((j) => j.key === "p3:branch")).toBe(false);
  });

  it("words a miss along all three axes and none", () => {
    expect(missWords([-6.35, 50.8, -1], "imperial")).toBe("1/4 in W, 2 in N, 3/64 in D");
    expect(missWords([0, 0, 0], "metric")).toBe("0 mm");
  });
});

describe("ports", () => {
  it("never take two runs: a tee whose branch leaves already is refused", () => {
    const two = new RunBuilder("L-2").start(flange()).go("E", `4'`, tee()).go("E", `8'`, tee()).go("E", `4'`, flange())
      .branch(2).go("U", `3'`).go("E", `8'`).go("D", `3'`, end("open", "")).branch(3).go("N", `3'`, flange()).done();
    const model = build(back(two, "p3"));
    expect(codes(model)).toEqual(["loop-no-port"]);
    expect(model.loops).toBeUndefined();
  });

  it("an outlet takes a loop, and the open end of the main run does with an elbow", () => {
    expect(codes(build(back(new RunBuilder("L-3").start(end("open", "")).go("E", `4'`, tee()).go("E", `8'`, flange())
      .branch(2).go("N", `5'`).go("W", `4'`).go("S", `5'`, end("open", "")).done(), "p1")))).toEqual([]);
    const model = build(back(new RunBuilder("L-4").start(end("open", "")).go("E", `4'`, tee()).go("E", `8'`, flange())
      .branch(2).go("N", `5'`).go("W", `4'`).go("S", `5'`, end("open", "")).done(), "p1"));
    expect(model.components.filter((c) => c.kind === "elbow").map((c) => c.pointId).sort()).toEqual(["p1", "p4", "p5"]);
    expect(model.loops![0]!.closes).toBe(true);
    expect(codes(build(bypass(`8'`, `3'`, tee(), { kind: "outlet", branchNps: "4" })))).toEqual([]);
  });

  it("a fitting without a branch is refused", () => {
    expect(codes(build(bypass(`8'`, `3'`, tee(), flange())))).toEqual(["loop-no-port"]);
  });
});

describe("the document", () => {
  it("may not come back to nobody or to itself", () => {
    expect(parseRunDocument(bypass()).ok).toBe(true);
    expect(parseRunDocument(back(bypass(), "nobody"))).toMatchObject({ ok: false, messages: ["B1 comes back to a point that is not there."] });
    expect(parseRunDocument(back(bypass(), "p5"))).toMatchObject({ ok: false, messages: ["B1 comes back to a point of its own."] });
  });

  it("lets a run end by itself when the fitting it came back to is taken out", () => {
    const without = pointRemove(bypass(), "p3");
    expect(without.runs[1]!.to).toBeUndefined();
    expect(parseRunDocument(without).ok).toBe(true);
  });

  it("turns a loop round between its two fittings, keeping every mark and cut length", () => {
    const document = bypass();
    const turned = runReverse(document, "run-1");
    if (!turned.ok) throw new Error(turned.message);
    expect(turned.document.runs[1]).toMatchObject({ from: "p3", to: "p2" });
    const [before, after] = [build(document), build(turned.document)];
    expect(after.loops![0]!.closes).toBe(true);
    expect(after.pieces.map((p) => p.cutLengthMm.toFixed(6)).sort()).toEqual(before.pieces.map((p) => p.cutLengthMm.toFixed(6)).sort());
    const marks = stickMarks(nextMarks(document, emptyMarks(), []));
    const next = nextMarks(turned.document, marks, []);
    expect(next.welds).toEqual(marks.welds);
    expect(next.voided).toEqual([]);
  });
});
