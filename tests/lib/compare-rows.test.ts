/** Planted edits: the list of a comparison names exactly these and nothing else. */
import { describe, expect, it } from "vitest";
import type { RunDocument } from "@/iso";
import { compareRows } from "@/lib/rules/compare-rows";
import { chosenPair, type CompareChoice } from "@/lib/rules/compare-types";
import { edited, newPointAt, sheetOf, type Editable } from "../iso/compare/compare-samples";
import { sampleDocument, pointAt } from "../factories";
import { sampleRuns } from "../fixtures/sample-runs";

const base = sampleDocument("L-1");
const LONG = newPointAt("b", [1_200, 0, 0]).offset;

function rowsAfter(change: (copy: Editable) => void, document: RunDocument = base) {
  const before = sheetOf(document);
  return compareRows(before, sheetOf(edited(document, change), before));
}
const said = (rows: ReturnType<typeof rowsAfter>): string[] => rows.map((row) => `${row.kind} ${row.what} ${row.mark}`);
const PIPE = "NPS 4 Pipe, STD";

describe("a planted edit is listed, with what follows from it", () => {
  it("nothing for equal sheets", () => {
    expect(rowsAfter(() => undefined)).toEqual([]);
    for (const document of Object.values(sampleRuns)) expect(rowsAfter(() => undefined, document), document.number).toEqual([]);
  });

  it("another length the same way: a length, not a move", () => {
    const rows = rowsAfter((d) => void (d.runs[0]!.points[1]!.offset = LONG));
    expect(said(rows)).toEqual(["changed length 2", "changed piece P1", `changed material ${PIPE}`]);
    expect(rows[0]).toMatchObject({ no: 1, before: `E 3'-3 3/8"`, after: `E 3'-11 1/4"`, at: { kind: "leg", id: "b" } });
    expect(rows[0]!.refsAfter).toEqual([{ kind: "leg", id: "b" }, { kind: "dimension", id: "b" }]);
  });

  it("the other way: moved", () => {
    const rows = rowsAfter((d) => void (d.runs[0]!.points[3]!.offset = newPointAt("d", [0, -600, 0]).offset));
    expect(said(rows)).toEqual(["moved point 4"]);
    expect(rows[0]).toMatchObject({ before: `N 1'-11 5/8"`, after: `N -1'-11 5/8"` });
  });

  it("a point inserted into a leg: the next one is only measured from elsewhere", () => {
    const rows = rowsAfter((d) => {
      d.runs[0]!.points.splice(1, 0, pointAt("x", [400, 0, 0], { kind: "support", text: "" }) as Editable["runs"][0]["points"][0]);
      d.runs[0]!.points[2]!.offset = newPointAt("b", [600, 0, 0]).offset;
    });
    expect(rows.filter((row) => row.what === "point").map((row) => row.text)).toEqual([
      `Point 3: E 3'-3 3/8" is now E 1'-11 5/8", measured from another point; it stands where it did`,
      expect.stringMatching(/^Point 2 added: E 1'-3 3\/4", support/),
    ]);
    expect(rows.some((row) => row.kind === "moved")).toBe(false);
    expect(rows.every((row) => row.kind !== "removed" || row.what === "piece" || row.what === "weld")).toBe(true);
  });

  it("a point removed from the end: the point, its piece, its weld and its fitting", () => {
    const rows = rowsAfter((d) => void d.runs[0]!.points.pop());
    expect(rows.filter((row) => row.kind === "removed").map((row) => `${row.what} ${row.mark}`)).toEqual(expect.arrayContaining(["point 4", "piece P3"]));
    expect(rows.filter((row) => row.what === "point" || row.what === "length" || row.what === "fitting").map((row) => `${row.kind} ${row.mark}`)).toEqual(["removed 4"]);
    expect(rows.find((row) => row.what === "piece" && row.kind === "removed")).toMatchObject({ refsAfter: [], refsBefore: expect.arrayContaining([{ kind: "leg", id: "d" }]) });
  });

  it("another fitting at a point", () => {
    const rows = rowsAfter((d) => void (d.runs[0]!.points[1]!.item = { kind: "elbow", elbow: "sr-90" }));
    expect(rows[0]).toMatchObject({ kind: "changed", what: "fitting", mark: "2", before: "nothing named", after: "elbow sr-90" });
    expect(rows[0]!.refsAfter).toContainEqual({ kind: "component", id: "b" });
    expect(rows.slice(1).every((row) => row.what === "piece" || row.what === "material")).toBe(true);
  });

  it("another schedule: the setting, and the materials it changes", () => {
    const rows = rowsAfter((d) => void (d.settings.pipe.schedule = "XS"));
    expect(rows.filter((row) => row.what === "setting").map((row) => `${row.mark}: ${row.before} ${row.after}`)).toEqual(["pipe, schedule: STD XS"]);
    expect(rows.filter((row) => row.what === "material").map((row) => `${row.kind} ${row.mark}`)).toEqual(expect.arrayContaining([`removed ${PIPE}`, "added NPS 4 Pipe, XS"]));
    expect(new Set(rows.map((row) => row.what))).toEqual(new Set(["setting", "material"]));
  });

  it("notes of the line and of a point", () => {
    const rows = rowsAfter((d) => {
      d.notes = ["Prime only."];
      d.runs[0]!.points[2]!.note = "Keep clear of the ladder.";
    });
    expect(rows.map((row) => `${row.no} ${row.kind} ${row.what}: ${row.text}`)).toEqual([`1 added note: Note at point 3 added: "Keep clear of the ladder."`, "2 added note: Note added: Prime only."]);
    expect(rows[0]!.at).toEqual({ kind: "point", id: "c" });
  });

  it("another kind of weld: the weld, beside the flange that asks for it", () => {
    const rows = rowsAfter((d) => void ((d.runs[0]!.points[0]!.item as { flange: string }).flange = "slip-on"));
    expect(rows.filter((row) => row.what === "weld")).toMatchObject([{ kind: "changed", mark: "1", before: "butt, shop", after: "slip-on, shop", at: { kind: "joint", id: "a:out" } }]);
    expect(rows.filter((row) => row.what === "point" || row.what === "fitting").map((row) => row.what)).toEqual(["fitting"]);
  });

  it("where a number is from", () => {
    const rows = rowsAfter((d) => void (d.runs[0]!.points[2]!.provenance.kind = "measured"));
    expect(rows.map((row) => row.text)).toEqual(["Point 3: from-drawing is now measured"]);
  });

  it("two kinds of pipe alike but for their material stay two rows", () => {
    const branched = edited(sampleRuns.branchWithReducer!, (d) => void (d.runs[1]!.pipe = { nps: "4", schedule: "STD", material: "A312 TP304L", specification: "" }));
    const rows = rowsAfter((d) => void (d.runs[1]!.points[1]!.offset = newPointAt("x", [0, 0, 1_500]).offset), branched);
    expect(rows.filter((row) => row.what === "material").map((row) => row.mark)).toEqual(["NPS 4 Pipe, STD, A312 TP304L"]);
  });

  it("numbers its rows from 1 without a gap, and leads them to what one of the drawings has", () => {
    const rows = rowsAfter((d) => void d.runs[0]!.points.splice(4, 1), sampleRuns.valveStation);
    expect(rows.map((row) => row.no)).toEqual(rows.map((_, i) => i + 1));
    expect(rows.filter((row) => row.what === "piece" || row.what === "weld" || row.what === "point").every((row) => row.at !== null)).toBe(true);
  });
});

describe("which two are compared when a side is left open", () => {
  const choice = (id: string, state: CompareChoice["state"]): CompareChoice => ({ id, code: id, state, hold: false, description: "", at: "" });
  const choices = [choice("a", "superseded"), choice("b", "returned"), choice("c", "for-fabrication"), choice("draft", "draft")];
  it("the newest against the signed one before it", () => {
    expect(chosenPair(choices, null, null)).toEqual({ from: "c", to: "draft" });
    expect(chosenPair(choices, null, "c")).toEqual({ from: "a", to: "c" });
    expect(chosenPair(choices, "draft", null)).toEqual({ from: "draft", to: "c" });
    expect(chosenPair(choices.slice(1, 2).concat(choices[3]!), null, null)).toEqual({ from: "b", to: "draft" });
  });
  it("none where there is one only, or one is not known", () => {
    expect(chosenPair(choices.slice(0, 1), null, null)).toBeNull();
    expect(chosenPair(choices, "z", null)).toBeNull();
    expect(chosenPair([], null, null)).toBeNull();
  });
});
