/**
 * Crosses, threads, unions, stub-ins, instruments, breaks, slopes and stock splits worked by hand. Sources: ASME B16.9, B16.11
 * (threaded from memory), B1.20.1 (engagement L1 + L3), geometry of the saddle (4 on 6 set in: 0.8814 published, set on 0.682).
 */
import { describe, expect, it } from "vitest";
import { buildModel } from "../../../iso/run/build-model";
import { saddleReachMm } from "../../../iso/run/fit-on-pipe";
import { emptyMarks } from "../../../iso/run/marks";
import type { Model, TakeOutWord } from "../../../iso/run/model-types";
import type { RunDocument } from "../../../iso/run/document";
import { capWith, coupling, cross, elbow, end, flange, instrument, joint, outlet, pipe, reducer, RunBuilder, stubIn, support, tee, union } from "../../fixtures/run-builder";

const INCH = 25.4;
const open = end("open", "BEVEL");
const build = (document: RunDocument, words: readonly TakeOutWord[] = []): Model => buildModel(document, emptyMarks(), words);
const cuts = (model: Model): number[] => model.pieces.map((p) => p.cutLengthMm / INCH);
const codes = (model: Model): string[] => model.problems.map((p) => p.code);
const stops = (model: Model): string[] => model.problems.filter((p) => p.severity === "stop").map((p) => p.code);
const close = (found: readonly number[], wanted: readonly number[]): void => {
  expect(found).toHaveLength(wanted.length);
  wanted.forEach((length, i) => expect(found[i]).toBeCloseTo(length, 9));
};
const said = (key: string, inches: number): TakeOutWord => ({ key, valueMm: inches * INCH, by: "bench", at: "2026-01-01" });

describe("crosses", () => {
  const line = (item = cross()) => new RunBuilder("T").start(open).go("E", `3'`, item).go("E", `3'`, open);

  it("NPS 4 straight: 4 1/8 on all four ways (B16.9)", () => {
    const model = build(line().branch(2).go("N", `2'`, open).branch(2).go("S", `2'`, open).done());
    close(cuts(model), [36 - 4.25, 36 - 4.25, 24 - 4.25, 24 - 4.25]);
    expect(stops(model)).toEqual([]);
    expect(model.joints.map((j) => j.key)).toEqual(["p2:in", "p2:out", "p2:branch", "p2:branch-2"]);
  });

  it("two branches the same way are a stop", () => {
    expect(stops(build(line().branch(2).go("N", `2'`, open).branch(2).go("N", `2'`, open).done()))).toContain("cross-port");
  });

  it("a run may end in it, with three branch runs going on", () => {
    const model = build(new RunBuilder("T").start(open).go("E", `3'`, cross()).branch(2).go("N", `2'`, open).branch(2).go("S", `2'`, open).branch(2).go("E", `2'`, open).done());
    close(cuts(model), [36 - 4.25, 24 - 4.25, 24 - 4.25, 24 - 4.25]);
    expect(stops(model)).toEqual([]);
  });
});

describe("threads", () => {
  const one = { pipe: pipe("1", "XS") };
  const MAKE_UP = 0.4 + 3 / 11.5;

  it("NPS 1 class 3000 threaded 90 (1 3/4 centre to end): the pipe goes in by L1 and three threads, 0.661 in (B1.20.1)", () => {
    const model = build(new RunBuilder("T", "imperial", one).start(open).go("E", `2'`, elbow("th-90")).go("N", `2'`, open).done());
    const term = model.pieces[0]!.terms.find((t) => t.kind === "make-up")!;
    expect(term.valueMm / INCH).toBeCloseTo(MAKE_UP, 2);
    close(cuts(model), [24 - 1.75 + term.valueMm / INCH, 24 - 1.75 + term.valueMm / INCH]);
    expect(model.joints.map((j) => [j.kind, j.number])).toEqual([["threaded", null], ["threaded", null]]);
    expect(model.pieces[0]!.ends.map((e) => e.prep)).toEqual(["bevel", "thread"]);
  });

  it("a make-up of the line's own replaces the table's; unions, couplings and caps by the shop's measure", () => {
    const settings = { ...one, allowances: { rootGapMm: 3.175, socketPullBackMm: 1.5875, gasketMm: 3.175, slipOnSettingMm: 6.35, threadMakeUpMm: 0.5 * INCH } };
    const model = build(
      new RunBuilder("T", "imperial", settings).start(open).go("E", `2'`, union("threaded")).go("E", `2'`, coupling(false, "threaded")).go("E", `2'`, capWith("threaded")).done(),
      [said("threaded:union:3000:1", 2.5), said("threaded:coupling:3000:1", 2.375), said("threaded:cap:3000:1", 1.625)],
    );
    close(cuts(model), [24 - 1.25 + 0.5, 24 - 1.25 + 0.5 - 1.1875 + 0.5, 24 - 1.1875 + 0.5 - 1.625 + 0.5]);
    expect(stops(model)).toEqual([]);
  });

  it("two fittings whose ends would meet leave no length for the pipe", () => {
    expect(stops(build(new RunBuilder("T", "imperial", one).start(open).go("E", `2'`, elbow("th-90")).go("N", `3"`, elbow("th-90")).go("E", `2'`, open).done()))).toContain("negative-length");
  });
});

describe("stub-ins and outlets", () => {
  const on = (item: ReturnType<typeof stubIn>) => new RunBuilder("T", "imperial", { pipe: pipe("6") }).start(open).go("E", `3'`, item).go("E", `3'`, open).branch(2).go("U", `2'`, open).done();

  it("4 on 6 STD: the saddle is 0.682 deep set on (inside line), 0.8814 set in (outside line)", () => {
    expect(3.3125 - saddleReachMm(6.625, 4.5, 0.237, "on")).toBeCloseTo(0.682, 3);
    expect(3.3125 - saddleReachMm(6.625, 4.5, 0.237, "in")).toBeCloseTo(0.8814, 4);
    close(cuts(build(on(stubIn("4", { set: "in" }))))!.slice(1), [24 - Math.sqrt(3.3125 ** 2 - 2.25 ** 2) - 0.125]);
  });

  it("a pad is a part of its own on the run's pipe, and its branch end is cut as a saddle", () => {
    const model = build(on(stubIn("4", { padMm: 8 * INCH })));
    expect(model.components.find((c) => c.kind === "pad")).toMatchObject({ id: "p2.pad", nps2: "4" });
    expect(model.spools).toHaveLength(1);
    expect(model.pieces[1]!.ends.map((e) => e.prep)).toEqual(["saddle", "bevel"]);
    expect(stops(build(on(stubIn("4", { padMm: 4 * INCH }))))).toEqual(["pad-small"]);
  });

  it("a threaded outlet waits for the shop's height and takes the thread's make-up", () => {
    const document = new RunBuilder("T", "imperial", { pipe: pipe("6") }).start(open).go("E", `3'`, outlet("1", { ends: "threaded" })).go("E", `3'`, open).branch(2, pipe("1", "XS")).go("U", `1'`, open).done();
    expect(stops(build(document))).toEqual(["take-out-missing"]);
    const model = build(document, [said("threaded-outlet:1:6", 1.3125)]);
    const makeUp = model.pieces[1]!.terms.find((t) => t.kind === "make-up")!.valueMm / INCH;
    close(cuts(model).slice(1), [12 - 3.3125 - 1.3125 + makeUp]);
  });
});

describe("instruments, vents and drains", () => {
  it("a flanged meter of 10 in takes half of it, gasket, hub and gap on each side, as a valve does (B16.5)", () => {
    const model = build(new RunBuilder("T").start(open).go("E", `3'`, instrument({ ends: "flanged", lengthMm: 254, tag: "FE-1" })).go("E", `3'`, open).done());
    close(cuts(model), [36 - 5 - 0.125 - 3 - 0.125, 36 - 5 - 0.125 - 3 - 0.125]);
    expect(model.components.find((c) => c.kind === "instrument")).toMatchObject({ text: "FE-1", valve: null, description: "Instrument, flanged" });
    expect(codes(build(new RunBuilder("T").start(open).go("E", `3'`, instrument({ ends: "butt" })).go("E", `3'`, open).done()))).toContain("instrument-length");
  });

  it("closes a run at its face; vents and drains are ends that need no more words", () => {
    const model = build(new RunBuilder("T").start(end("vent")).go("E", `3'`, instrument({ ends: "butt", tag: "TI-2" })).done());
    close(cuts(model), [36 - 0.125]);
    expect(codes(model)).toEqual([]);
  });
});

describe("breaks", () => {
  it("carry specification and material downstream and into branches, insulation and tracing with them", () => {
    const model = build(new RunBuilder("T").start(open).go("E", `3'`, flange({ goes: "open", text: "BREAK" }), { starts: { specification: "B2", material: "A312 TP304", tracing: "electric" } })
      .go("E", `3'`, tee()).go("E", `2'`, open).branch(3).go("U", `2'`, open).done());
    expect(model.pieces.map((p) => p.material)).toEqual(["A106 B", "A312 TP304", "A312 TP304", "A312 TP304"]);
    expect(model.components.filter((c) => c.kind.startsWith("flange")).map((c) => c.material)).toEqual(["A106 B", "A312 TP304"]);
    expect(model.breaks!.map((b) => [b.pointId, b.what, b.before, b.after])).toEqual([
      ["p2", "specification", "", "B2"], ["p2", "material", "A106 B", "A312 TP304"], ["p2", "tracing", "", "electric"],
    ]);
  });

  it("material cannot change on uncut pipe; at a run's first point it holds for the run and is no break", () => {
    expect(codes(build(new RunBuilder("T").start(open).go("E", `3'`, support(), { starts: { material: "X" } }).go("E", `3'`, open).done()))).toContain("break-on-pipe");
    const first = build(new RunBuilder("T").start(open, { starts: { material: "X" } }).go("E", `3'`, open).done());
    expect(first.pieces[0]!.material).toBe("X");
    expect(first.breaks).toBeUndefined();
  });
});

describe("slopes and sizes", () => {
  it("1/4 in per ft over 20 ft level falls 5 in; the pipe is cut on the slope, its take-outs along it", () => {
    const model = build(new RunBuilder("T").start(flange()).slope("E", `20'`, "down 1/4 in/ft", joint).go("E", `1'`, open).done());
    expect(model.nodes[1]!.position.map((c) => c / INCH)).toEqual([240, 0, -5]);
    expect(cuts(model)[0]).toBeCloseTo(Math.hypot(240, 5) - 3 - 0.125 - 0.0625, 9);
    expect(model.pieces[0]!.start[2] / INCH).toBeCloseTo((-3.125 * 5) / Math.hypot(240, 5), 9);
  });

  it("a branch of a branch keeps its sizes through reducers", () => {
    const model = build(new RunBuilder("T", "imperial", { pipe: pipe("8") }).start(open).go("E", `4'`, tee("6")).go("E", `4'`, open)
      .branch(2).go("N", `3'`, reducer("4")).go("N", `3'`, tee("2")).go("N", `2'`, open).branch(5).go("U", `2'`, reducer("1")).go("U", `1'`, open).done());
    expect(model.pieces.map((p) => p.nps)).toEqual(["8", "8", "6", "4", "4", "2", "1"]);
    expect(stops(model)).toEqual([]);
  });
});

describe("stock lengths", () => {
  const long = (feet: string, settings = {}) => build(new RunBuilder("T", "imperial", { pipe: pipe("6"), stockLengthMm: 252 * INCH, shippingBoxMm: [9e5, 9e5, 9e5], ...settings }).start(open).go("E", feet, open).done());

  it("50 ft of NPS 6 from 21 ft stock: two full lengths and the rest, two welds, every gap counted", () => {
    const model = long(`50'`);
    close(cuts(model), [252, 252, 600 - 504 - 0.25]);
    expect(model.joints.map((j) => [j.key, j.kind, j.a, j.b])).toEqual([["p2:stock-1", "butt", "p2:1", "p2:2"], ["p2:stock-2", "butt", "p2:2", "p2:3"]]);
    expect(codes(model)).toEqual(["stock-split"]);
    for (const p of model.pieces) expect(p.terms.reduce((sum, t) => sum + t.valueMm, 0)).toBeCloseTo(p.cutLengthMm, 9);
  });

  it("evens the last two where the rest would be a short pup", () => {
    close(cuts(long(`42' 2"`)), [252, 126.875, 126.875]);
    close(cuts(long(`21' 1"`)), [126.4375, 126.4375]);
    close(cuts(long(`21'`)), [252]);
  });

  it("refuses a stock too short to weld from", () => {
    expect(codes(long(`50'`, { stockLengthMm: 200 }))).toEqual(["stock-too-short"]);
  });
});
