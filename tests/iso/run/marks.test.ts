/** Marks that stick, rule by rule (common practice of weld maps). Random edit scripts: marks-scripts.test.ts. */
import { describe, expect, it } from "vitest";
import { buildModel, nextMarks } from "../../../iso/run/build-model";
import { DEFAULT_MARK_RULES, type Item, type MarkRules, type RunDocument } from "../../../iso/run/document";
import { newPoint, pointInsert, pointRemove, pointUpdate } from "../../../iso/run/edit";
import { letterMark, markNumber } from "../../../iso/run/mark-names";
import { emptyMarks, stickMarks } from "../../../iso/run/marks";
import type { MarksRegister } from "../../../iso/run/model-types";
import { flange, joint, pipe, RunBuilder, valve } from "../../fixtures/run-builder";
import { runReverse } from "../../../iso/run/reverse";
import { twoSpools } from "../../fixtures/sample-runs";

const fresh = (document: RunDocument): MarksRegister => nextMarks(document, emptyMarks(), []);
const stuck = (document: RunDocument): MarksRegister => stickMarks(fresh(document));
const welds = (document: RunDocument, marks: MarksRegister): string[] => buildModel(document, marks, []).joints.flatMap((j) => j.number ?? []);
const at = (id: string, e: number, n: number, u: number, item: Item = { kind: "none" }) =>
  ({ ...newPoint(id), item, offset: { kind: "enu" as const, e: { text: "", mm: e }, n: { text: "", mm: n }, u: { text: "", mm: u } } });

/** Flange, joint, joint, flange on straight pipe: welds 1 to 4. */
const straight = new RunBuilder("M-1").start(flange()).go("E", `5'`, joint).go("E", `5'`, joint).go("E", `5'`, flange()).done();

describe("a draft", () => {
  it("renumbers along flow: welds 1, 2, 3, pieces P1, spools A", () => {
    const marks = fresh(straight);
    expect(Object.values(marks.welds)).toEqual(["1", "2", "3", "4"]);
    expect(Object.values(marks.pieces)).toEqual(["P1", "P2", "P3"]);
    expect(Object.values(marks.spools)).toEqual(["A"]);
    const edited = pointInsert(straight, "main", 1, at("new", 300, 0, 0, joint));
    expect(welds(edited, nextMarks(edited, marks, []))).toEqual(["1", "2", "3", "4", "5"]);
    expect(nextMarks(edited, marks, []).voided).toEqual([]);
  });
});

describe("a sticky register", () => {
  it("a joint added between 2 and 3 is 2A, another 2B, and nothing else changes", () => {
    let document = pointInsert(straight, "main", 2, at("n1", 900, 0, 0, joint));
    let marks = nextMarks(document, stuck(straight), []);
    expect(welds(document, marks)).toEqual(["1", "2", "2A", "3", "4"]);
    document = pointInsert(document, "main", 3, at("n2", 900, 0, 0, joint));
    marks = nextMarks(document, marks, []);
    expect(welds(document, marks)).toEqual(["1", "2", "2A", "2B", "3", "4"]);
  });

  it("a joint added at the end continues", () => {
    const open = pointUpdate(straight, "p4", { item: joint });
    const before = stuck(open);
    const document = pointInsert(open, "main", 4, at("n1", 900, 0, 0, flange()));
    const marks = nextMarks(document, before, []);
    expect(Object.values(before.welds)).toEqual(["1", "2", "3", "4"]);
    expect(marks.welds["n1:in"]).toBe("6");
    expect(marks.welds["p4:weld"]).toBe("5");
    expect(marks.voided).toEqual([{ kind: "weld", mark: "4", key: "p4:end" }]);
  });

  it("a deleted joint is void for ever: its number is not given again, not even to itself", () => {
    const without = pointRemove(straight, "p2");
    const marks = nextMarks(without, stuck(straight), []);
    expect(welds(without, marks)).toEqual(["1", "3", "4"]);
    expect(marks.voided).toContainEqual({ kind: "weld", mark: "2", key: "p2:weld" });
    const again = nextMarks(straight, marks, []);
    expect(welds(straight, again)).toEqual(["1", "1A", "3", "4"]);
  });

  it("moving a point, or turning one, moves no number", () => {
    const marks = stuck(twoSpools);
    const moved = pointUpdate(twoSpools, "p3", { offset: { kind: "enu", e: { text: "", mm: 0 }, n: { text: "", mm: 800 }, u: { text: "", mm: 2_300 } } });
    expect(nextMarks(moved, marks, [])).toEqual(marks);
  });

  it("a support put on a pipe changes no mark", () => {
    const marks = stuck(straight);
    const document = pointInsert(straight, "main", 1, at("s1", 300, 0, 0, { kind: "support", text: "" }));
    expect(nextMarks(document, marks, []).pieces).toEqual(marks.pieces);
  });

  it("keeps letters when a spool's parts change, voids them when spools merge or split", () => {
    const marks = stuck(twoSpools);
    expect(Object.values(marks.spools)).toEqual(["A", "B"]);
    const grown = pointInsert(twoSpools, "main", 1, at("n1", 600, 0, 0, joint));
    expect(Object.values(nextMarks(grown, marks, []).spools)).toEqual(["A", "B"]);
    const merged = nextMarks(pointUpdate(twoSpools, "p4", { places: {} }), marks, []);
    expect(Object.values(merged.spools)).toEqual(["C"]);
    expect(merged.voided.map((v) => v.mark)).toEqual(["A", "B"]);
    const split = nextMarks(pointUpdate(twoSpools, "p2", { places: { out: "field" } }), marks, []);
    expect(Object.values(split.spools)).toEqual(["C", "D", "B"]);
    expect(split.voided.map((v) => v.mark)).toEqual(["A"]);
  });

  it("keeps both letters when the field weld between two spools moves", () => {
    const marks = stuck(twoSpools);
    const shifted = pointUpdate(pointUpdate(twoSpools, "p4", { places: {} }), "p5", { places: { in: "field" } });
    expect(Object.values(nextMarks(shifted, marks, []).spools)).toEqual(["A", "B"]);
  });

  it("drops the first part of a spool without losing its letter", () => {
    const marks = stuck(twoSpools);
    expect(Object.values(nextMarks(pointRemove(twoSpools, "p1"), marks, []).spools)).toEqual(["A", "B"]);
  });
});

describe("a run turned round", () => {
  const turned = (document: RunDocument): RunDocument => {
    const result = runReverse(document, "main");
    if (!result.ok) throw new Error(result.message);
    return result.document;
  };

  it("keeps every mark, and what is added afterwards follows its forerunner in the new flow", () => {
    const marks = stuck(straight);
    let document = turned(straight);
    let next = nextMarks(document, marks, []);
    expect(next.welds).toEqual(marks.welds);
    expect(buildModel(document, next, []).pieces.map((p) => p.mark)).toEqual(["P3", "P2", "P1"]);
    document = pointInsert(document, "main", 2, at("n1", -900, 0, 0, joint));
    next = nextMarks(document, next, []);
    expect(welds(document, next)).toEqual(["4", "3", "3A", "2", "1"]);
  });

  it("keeps the letters of spools that are one piece of pipe each", () => {
    const field = { places: { in: "field" as const } };
    const document = new RunBuilder("M-2").start(joint).go("E", `5'`, joint, field).go("E", `5'`, joint, field).go("E", `5'`, joint).done();
    const marks = stuck(document);
    const next = nextMarks(turned(document), marks, []);
    expect(buildModel(turned(document), next, []).spools.map((s) => s.letter)).toEqual(["C", "B", "A"]);
    expect(next.voided).toEqual([]);
  });
});

describe("rules of the job", () => {
  const ruled = (marks: Partial<MarkRules>, document: RunDocument = straight): RunDocument => ({ ...document, settings: { ...document.settings, marks: { ...DEFAULT_MARK_RULES, ...marks } } });

  it("prefix and first number", () => {
    const marks = fresh(ruled({ weldPrefix: "W-", weldStart: 100, piecePrefix: "L2-", pieceStart: 7 }));
    expect(Object.values(marks.welds)).toEqual(["W-100", "W-101", "W-102", "W-103"]);
    expect(Object.values(marks.pieces)).toEqual(["L2-7", "L2-8", "L2-9"]);
  });

  it("an added joint takes the next number where the job says so, a letter where it says that", () => {
    const grow = (document: RunDocument) => pointInsert(document, "main", 2, at("n1", 900, 0, 0, joint));
    const next = ruled({ added: "next", weldPrefix: "W2" });
    expect(welds(grow(next), nextMarks(grow(next), stuck(next), []))).toEqual(["W21", "W22", "W25", "W23", "W24"]);
    const letter = ruled({ weldPrefix: "W2" });
    expect(welds(grow(letter), nextMarks(grow(letter), stuck(letter), []))).toEqual(["W21", "W22", "W22A", "W23", "W24"]);
  });

  it("spools by number", () => {
    expect(Object.values(fresh(ruled({ spools: "numbers" }, twoSpools)).spools)).toEqual(["1", "2"]);
  });

  it("rules changed later touch no mark that is given", () => {
    const marks = stuck(straight);
    const changed = pointInsert(ruled({ weldPrefix: "W", weldStart: 50 }), "main", 4, at("n1", 900, 0, 0, flange()));
    const next = nextMarks(changed, marks, []);
    expect(Object.values(next.welds).slice(0, 3)).toEqual(["1", "2", "3"]);
    expect(next.welds["n1:in"]).toMatch(/^W5\d$/);
  });
});

it("threaded, bolted and attached parts carry no weld number", () => {
  const document = new RunBuilder("M-3", "imperial", { pipe: pipe("1", "80") }).start(flange())
    .go("E", `3'`, { kind: "coupling", half: false, ends: "threaded" }).go("E", `3'`, { kind: "support", text: "" }).go("E", `3'`, valve()).go("E", `3'`, flange()).done();
  for (const j of buildModel(document, fresh(document), []).joints) {
    expect(j.number === null).toBe(["threaded", "bolted", "attachment"].includes(j.kind));
  }
});

describe("names of marks", () => {
  it("skip I O Q S X Z and go on with two letters", () => {
    const first = Array.from({ length: 22 }, (_, i) => letterMark(i));
    expect(first.join(" ")).toBe("A B C D E F G H J K L M N P R T U V W Y AA AB");
    expect(markNumber("P12A")).toBe(12);
  });
});

it("pipe longer than the stock, turned round, is cut where it was and its added welds keep their numbers", () => {
  const built = new RunBuilder("M-4", "imperial", { stockLengthMm: 20 * 304.8 }).start(flange()).go("E", `50'`, flange()).done();
  const turned = runReverse(built, "main");
  if (!turned.ok) throw new Error(turned.message);
  const marks = stuck(built);
  const next = nextMarks(turned.document, marks, []);
  const byMark = (document: RunDocument, register: MarksRegister) => Object.fromEntries(buildModel(document, register, []).pieces.map((p) => [p.mark, p.cutLengthMm.toFixed(6)]));
  expect(Object.values(marks.welds)).toHaveLength(4);
  expect(next.welds).toEqual(marks.welds);
  expect(byMark(turned.document, next)).toEqual(byMark(built, marks));
});
