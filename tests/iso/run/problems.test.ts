/** Findings: each says in plain words what is wrong, at which point, and what to do. */
import { describe, expect, it } from "vitest";
import { buildModel } from "../../../iso/run/build-model";
import { pointUpdate } from "../../../iso/run/edit";
import { emptyMarks } from "../../../iso/run/marks";
import type { Problem, TakeOutWord } from "../../../iso/run/model-types";
import type { Provenance, RunDocument } from "../../../iso/run/document";
import { cap, elbow, end, flange, joint, outlet, pipe, reducer, RunBuilder, support, tee, union, valve } from "../../fixtures/run-builder";
import { firstRun, twoSpools } from "../../fixtures/sample-runs";

const problems = (document: RunDocument, words: readonly TakeOutWord[] = []): readonly Problem[] => buildModel(document, emptyMarks(), words).problems;
const found = (document: RunDocument, code: string): Problem[] => problems(document).filter((p) => p.code === code);
const line = (settings = {}) => new RunBuilder("P", "imperial", settings).start(flange());
const open = end("open", "BEVEL");

const CASES: readonly (readonly [string, Problem["severity"], string | null, RunDocument, string])[] = [
  ["negative-length", "stop", "p3", line().go("E", `3'`).go("N", `10"`).go("E", `3'`, open).done(),
    "Between point 2 and point 3 the fittings and gaps overlap by 2 1/4 in: lengthen the leg, or choose shorter fittings."],
  ["short-pup", "warning", "p3", line().go("E", `3'`).go("N", `1' 4"`).go("E", `3'`, open).done(),
    "The pipe between point 2 and point 3 is a short pup of 3 3/4 in, under 6 3/4 in between welds: lengthen the leg, or weld the fittings together."],
  ["zero-length", "stop", "p3", line().go("E", `3'`).go("E", "0").go("N", `3'`, open).done(),
    "Point 3 lies on the point before it: give its offset, or remove it."],
  ["take-out-missing", "stop", "p2", line({ pipe: pipe("1", "80") }).go("E", `3'`, union("socket")).go("E", `3'`, open).done(),
    "The tables have no socket-weld union length in NPS 1 (point 2). Measure the part and enter the shop's own value."],
  ["take-out-unconfirmed", "warning", "p5", firstRun,
    "The flanged gate valve length, class 150, in NPS 4 (point 5) is from memory: measure one and confirm it, or enter the shop's own value."],
  ["trimmed-elbow", "warning", "p2", line().go("E", `3'`).go("N60E", `3'`, open).done(),
    "Point 2 takes an LR elbow trimmed to 30.00°: confirm that trimming is permitted (engineer's permission)."],
  ["trim-over-90", "stop", "p2", line().go("E", `3'`).go("N30W", `3'`, open).done(),
    "Point 2 turns 120.00°: nothing over 90° can be trimmed from a 90. Use two elbows, or a return."],
  ["elbow-angle", "stop", "p2", line().go("E", `3'`, elbow("lr-90")).go("N30E", `3'`, open).done(),
    "Point 2 turns 60.00°, which the LR 90 elbow misses by 15.00° at each weld: trim an elbow, or correct the offsets. Over 3° needs the engineer's permission."],
  ["elbow-straight", "stop", "p2", line().go("E", `3'`, elbow("lr-90")).go("E", `3'`, open).done(),
    "Point 2 names an elbow but the line runs straight on: correct the offsets or take the elbow out."],
  ["fold-back", "stop", "p2", line().go("E", `3'`).go("W", `2'`, open).done(),
    "Point 2 turns 180.00°, back on itself: correct a sign, or build a return of two elbows."],
  ["turn-at-item", "stop", "p2", line().go("E", `3'`, valve()).go("N", `3'`, open).done(),
    "Point 2 turns 90.00° at a valve, which cannot turn the line: put an elbow before or after it, or correct the offsets."],
  ["turn-at-weld", "stop", "p2", line().go("E", `3'`, joint).go("N", `3'`, open).done(),
    "Point 2 turns 90.00° at a plain weld: put an elbow there, or correct the offsets."],
  ["open-end", "warning", "p2", line().go("E", `3'`).done(),
    "Point 2 is an open end: say where it goes (field weld, continued, existing), or close it with a flange or a cap."],
  ["branch-larger", "stop", "p2", line().go("E", `3'`, tee("6")).go("E", `3'`, open).branch(2).go("N", `3'`, open).done(),
    "Point 2: the branch (NPS 6) is larger than the run (NPS 4). Turn the tee round, or reduce after it."],
  ["branch-size", "stop", "p2", line().go("E", `3'`, tee("2")).go("E", `3'`, open).branch(2, pipe("3")).go("N", `3'`, open).done(),
    "Point 2: the branch pipe is NPS 3 but the fitting's branch is NPS 2. Make them equal, or put a reducer in the branch."],
  ["branch-missing", "warning", "p2", line().go("E", `3'`, tee()).go("E", `3'`, open).done(),
    "Point 2 has a branch fitting without a branch: add the branch's points, or take the fitting out."],
  ["branch-no-fitting", "stop", "p2", line().go("E", `3'`, joint).go("E", `3'`, open).branch(2).go("N", `3'`, open).done(),
    "A branch leaves from point 2, but no tee, cross, outlet or stub-in stands there: choose one, or remove the branch."],
  ["branch-angle", "stop", "p2", line().go("E", `3'`, outlet("2")).go("E", `3'`, open).branch(2).go("NE", `3'`, open).done(),
    "Point 2: the pipes miss the square of the fitting by 45.00°. Correct the offsets, or turn the line with an elbow. Over 3° needs the engineer's permission."],
  ["branch-on-turn", "stop", "p2", line().go("E", `3'`, outlet("2")).go("N", `3'`, open).branch(2).go("U", `3'`, open).done(),
    "Point 2 has its branch at a change of direction (90.00°): move it to straight pipe."],
  ["eccentric-flat", "stop", "p2", line().go("E", `3'`, reducer("3", "eccentric")).go("E", `3'`, open).done(),
    "Point 2: say which side of the eccentric reducer is flat; until then it is drawn without a shift."],
  ["reducer-same-size", "stop", "p2", line().go("E", `3'`, reducer("4")).go("E", `3'`, open).done(),
    "Point 2 reduces NPS 4 to itself: give the size after it."],
  ["class-mismatch", "stop", "p3", line().go("E", `3'`, valve()).go("E", `4 5/8"`, flange({ flange: "blind", ratingClass: 300 })).done(),
    "Point 2 (class 150) and point 3 (class 300) are bolted together: their drilling differs. Give both one class."],
  ["blind-inside", "stop", "p2", line().go("E", `3'`, flange({ flange: "blind" })).go("E", `3'`, open).done(),
    "Point 2 is a blind flange inside the run: move it to the run's end, or make it a flange pair."],
  ["cap-inside", "stop", "p2", line().go("E", `3'`, cap).go("E", `3'`, open).done(), "Point 2 is a cap inside the run: move it to the run's end."],
  ["end-inside", "warning", "p2", line().go("E", `3'`, open).go("E", `3'`, open).done(),
    "Point 2 is an end inside the run: make it a plain joint, or take out the points after it."],
  ["elbow-at-end", "warning", "p2", line().go("E", `3'`, elbow("lr-90")).done(),
    "Point 2 is an elbow at the end of a run: give the next point, so that it knows where it turns."],
  ["stem-along-pipe", "warning", "p2", line().go("E", `3'`, valve({ stem: "E" })).go("E", `3'`, open).done(),
    "Point 2: the valve's stem cannot lie along the pipe. Choose another direction."],
  ["pipe-schedule", "warning", "p1", line({ pipe: pipe("4", "7") }).go("E", `3'`, open).done(),
    "NPS 4 does not come in schedule 7: choose one of 5S, 10S, 10, 30, STD, 40S, 40, XS, 80S, 80, 120, 160, XXS. Weights and cut marks wait for it."],
  ["run-single-point", "note", "p1", line().done(), "The main run has one point: type the next one to get pipe."],
  ["run-empty", "warning", null, new RunBuilder("P").done(), "The main run has no points: type its first one."],
  ["trim-without-pipe", "stop", "p3", line().go("E", `3'`).go("U", `12 1/8"`, { kind: "none" }, { places: { in: "field-fit" } }).go("E", `3'`, open).done(),
    "Point 3 has a field-fit weld between two fittings, with no pipe to leave long: choose another weld for the trim."],
];

describe("findings", () => {
  for (const [code, severity, pointId, document, text] of CASES) {
    it(`${code}: ${text}`, () => {
      const [first, ...more] = found(document, code);
      expect(first).toMatchObject({ severity, pointId, text });
      expect(more).toEqual([]);
    });
  }

  it("a branch that leaves from nowhere, or repeats an id, says so", () => {
    const branched = line().go("E", `3'`, tee()).go("E", `3'`, open).branch(2).go("N", `3'`, open).done();
    const lost = { ...branched, runs: branched.runs.map((r, i) => (i === 1 ? { ...r, from: "gone" } : r)) };
    expect(found(lost, "branch-lost").map((p) => p.text)).toEqual(["Branch B1 leaves from a point that is not there: pick the tee or outlet it leaves from, or remove it."]);
    const twice = { ...branched, runs: branched.runs.map((r, i) => (i === 1 ? { ...r, points: r.points.map((p) => ({ ...p, id: "p1" })) } : r)) };
    expect(found(twice, "duplicate-point").map((p) => p.text)).toEqual(["Point 1 of branch B1 repeats the id of an earlier point: remove it and enter it afresh."]);
  });

  it("a support on straight pipe finds nothing", () => {
    expect(problems(line().go("E", `5'`, support("PS-1")).go("E", `5'`, open).done())).toEqual([]);
  });
});

describe("dimensions not to be trusted yet", () => {
  const given = (provenance: Partial<Provenance>): RunDocument =>
    pointUpdate(line().go("E", `5'`, open).done(), "p2", { provenance: { kind: "measured", toleranceMm: null, by: null, at: null, second: null, ...provenance } });
  const verdict = (document: RunDocument) => {
    const model = buildModel(document, emptyMarks(), []);
    return { unverified: model.legs[0]!.unverified, texts: model.problems.filter((p) => p.code.startsWith("unverified-")).map((p) => p.text) };
  };
  const second = (mm: number) => ({ text: "", mm });

  it("assumed", () => expect(verdict(given({ kind: "assumed" }))).toEqual({ unverified: true, texts: ["Point 2: this dimension is assumed. Measure it, or have it accepted by name at signing."] }));
  it("measured once", () => expect(verdict(given({}))).toEqual({ unverified: true, texts: ["Point 2: this dimension was read once only. Enter a second reading."] }));
  it("two readings that agree within 1/16 in, either sign", () => {
    expect(verdict(given({ second: second(1_525) }))).toEqual({ unverified: false, texts: [] });
    expect(verdict(given({ second: second(-1_524) }))).toEqual({ unverified: false, texts: [] });
  });
  it("two readings that differ by more than the tolerance given", () => {
    expect(verdict(given({ second: second(1_530.35) }))).toEqual({ unverified: true, texts: [`Point 2: two readings differ by 1/4 in (second 5'-0 1/4"). Measure again.`] });
    expect(verdict(given({ second: second(1_530.35), toleranceMm: 10 })).unverified).toBe(false);
  });
  it("from the drawing or calculated", () => {
    expect(verdict(given({ kind: "from-drawing" })).unverified).toBe(false);
    expect(verdict(given({ kind: "calculated" })).unverified).toBe(false);
  });
});

describe("the shop's own word", () => {
  it("confirms a take-out from memory, or replaces it, and then nothing is left to say", () => {
    const key = buildModel(firstRun, emptyMarks(), []).components.find((c) => c.kind === "valve")!.unconfirmedKey!;
    const word = { key, valueMm: null, by: "R. Ortiz", at: "2031-03-04" };
    const confirmed = buildModel(firstRun, emptyMarks(), [word]);
    expect(confirmed.problems.map((p) => p.code)).toEqual(["valve-at-end"]);
    expect(confirmed.components.find((c) => c.kind === "valve")!.unconfirmedKey).toBeNull();
    const measured = buildModel(firstRun, emptyMarks(), [{ ...word, valueMm: 10 * 25.4 }]);
    expect(measured.pieces[3]!.cutLengthMm / 25.4).toBeCloseTo(25.125, 9);
  });

  it("a value given with the valve stands in for a missing table", () => {
    const document = line().go("E", `3'`, valve({ valve: "butterfly", faceToFaceMm: 2 * 25.4 })).go("E", `3'`, open).done();
    expect(problems(document)).toEqual([]);
    expect(buildModel(document, emptyMarks(), []).pieces[0]!.cutLengthMm / 25.4).toBeCloseTo(36 - 3 - 0.25 - 1 - 0.125 - 3, 9);
  });
});

it("findings come in flow order", () => {
  const document = line().go("E", `3'`).go("N60E", `3'`).go("E", `5'`, valve()).done();
  expect(problems(document).map((p) => p.pointId)).toEqual(["p2", "p3", "p4", "p4"]);
});

it("findings point at rows that exist", () => {
  for (const document of [firstRun, twoSpools, ...CASES.map((c) => c[3])]) {
    const ids = new Set(document.runs.flatMap((r) => r.points.map((p) => p.id)));
    for (const p of problems(document)) if (p.pointId !== null) expect(ids).toContain(p.pointId);
  }
});
