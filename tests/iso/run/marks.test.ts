/** Marks that stick: random edit scripts on a register, and the rules one by one (common practice of weld maps). */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { buildModel, nextMarks } from "../../../iso/run/build-model";
import { defaultLineSettings, newRunDocument } from "../../../iso/run/defaults";
import type { Item, RunDocument } from "../../../iso/run/document";
import { branchAdd, newPoint, pointInsert, pointMove, pointRemove, pointUpdate } from "../../../iso/run/edit";
import { letterMark, markNumber } from "../../../iso/run/mark-names";
import { emptyMarks, stickMarks } from "../../../iso/run/marks";
import type { MarksRegister } from "../../../iso/run/model-types";
import { end, flange, joint, reducer, RunBuilder, tee, valve } from "../../fixtures/run-builder";
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

describe("names of marks", () => {
  it("skip I O Q S X Z and go on with two letters", () => {
    const first = Array.from({ length: 22 }, (_, i) => letterMark(i));
    expect(first.join(" ")).toBe("A B C D E F G H J K L M N P R T U V W Y AA AB");
    expect(markNumber("P12A")).toBe(12);
  });
});

type Edit =
  | { readonly do: "insert"; readonly at: number; readonly item: number; readonly axis: number }
  | { readonly do: "remove"; readonly at: number }
  | { readonly do: "move"; readonly at: number; readonly to: number }
  | { readonly do: "item"; readonly at: number; readonly item: number }
  | { readonly do: "place"; readonly at: number; readonly field: boolean }
  | { readonly do: "branch"; readonly at: number };

const ITEMS: readonly Item[] = [{ kind: "none" }, joint, flange(), valve(), tee(), end("field-weld"), reducer("3"), { kind: "support", text: "" }];
const small = fc.nat({ max: 30 });
const edit: fc.Arbitrary<Edit> = fc.oneof(
  fc.record({ do: fc.constant("insert" as const), at: small, item: small, axis: small }),
  fc.record({ do: fc.constant("insert" as const), at: small, item: small, axis: small }),
  fc.record({ do: fc.constant("remove" as const), at: small }),
  fc.record({ do: fc.constant("move" as const), at: small, to: small }),
  fc.record({ do: fc.constant("item" as const), at: small, item: small }),
  fc.record({ do: fc.constant("place" as const), at: small, field: fc.boolean() }),
  fc.record({ do: fc.constant("branch" as const), at: small }),
);

function apply(document: RunDocument, e: Edit, serial: number): RunDocument {
  const run = document.runs[e.at % document.runs.length]!;
  const row = run.points.length === 0 ? 0 : e.at % run.points.length;
  const id = run.points[row]?.id ?? "";
  const item = (i: number): Item => ITEMS[i % ITEMS.length]!;
  switch (e.do) {
    case "insert":
      return pointInsert(document, run.id, row, at(`n${serial}`, e.axis % 3 === 0 ? 900 : 0, e.axis % 3 === 1 ? 900 : 0, e.axis % 3 === 2 ? 900 : 0, item(e.item)));
    case "remove":
      return pointRemove(document, id);
    case "move":
      return pointMove(document, run.id, row, run.points.length === 0 ? 0 : e.to % run.points.length);
    case "item":
      return pointUpdate(document, id, { item: item(e.item) });
    case "place":
      return pointUpdate(document, id, { places: { in: e.field ? "field" : "shop" } });
    case "branch":
      return branchAdd(document, id, `b${serial}`);
  }
}

type Kind = "weld" | "piece" | "spool";
const live = (m: MarksRegister, kind: Kind): Readonly<Record<string, string>> => (kind === "weld" ? m.welds : kind === "piece" ? m.pieces : m.spools);

it("random edit scripts: no mark is renumbered, reused, given twice or forgotten", () => {
  fc.assert(
    fc.property(fc.array(edit, { maxLength: 8 }), fc.array(edit, { minLength: 1, maxLength: 14 }), (draftEdits, edits) => {
      let serial = 0;
      let document = draftEdits.reduce((d, e) => apply(d, e, (serial += 1)), pointInsert(newRunDocument("M", defaultLineSettings("imperial")), "main", 0, at("p0", 0, 0, 0, flange())));
      let marks = stuck(document);
      const everGiven: Record<Kind, Map<string, string>> = { weld: new Map(Object.entries(marks.welds).map(([k, m]) => [m, k])), piece: new Map(Object.entries(marks.pieces).map(([k, m]) => [m, k])), spool: new Map() };
      for (const e of edits) {
        document = apply(document, e, (serial += 1));
        const next = nextMarks(document, marks, []);
        for (const kind of ["weld", "piece", "spool"] as const) {
          const [before, after] = [live(marks, kind), live(next, kind)];
          const voided = next.voided.filter((v) => v.kind === kind).map((v) => v.mark);
          const all = [...Object.values(after), ...voided];
          expect(new Set(all).size).toBe(all.length);
          for (const mark of Object.values(before)) expect(all).toContain(mark);
          for (const old of marks.voided.filter((v) => v.kind === kind)) expect(next.voided).toContainEqual(old);
          if (kind === "spool") continue;
          for (const [key, mark] of Object.entries(after)) {
            if (before[key] !== undefined) expect(mark).toBe(before[key]);
            expect(everGiven[kind].get(mark) ?? key).toBe(key);
            everGiven[kind].set(mark, key);
          }
        }
        const model = buildModel(document, next, []);
        expect(model.joints.flatMap((j) => (j.number === null ? [] : [j.key]))).toEqual(Object.keys(next.welds));
        expect(Object.fromEntries(model.pieces.map((p) => [p.key, p.mark]))).toEqual(next.pieces);
        expect(nextMarks(document, next, [])).toEqual(next);
        marks = next;
      }
    }),
    { numRuns: 120, seed: 5 },
  );
});
