/** Document operations of the editor. */
import { describe, expect, it } from "vitest";
import { defaultLineSettings, newRunDocument } from "../../../iso/run/defaults";
import { parseRunDocument, runDocumentSchema } from "../../../iso/run/document";
import { branchAdd, documentCopy, newPoint, pointEntryText, pointInsert, pointMove, pointRemove, pointUpdate } from "../../../iso/run/edit";
import { branchWithReducer, firstRun, metricLine, planarOffset, sampleRuns } from "../../fixtures/sample-runs";

const ids = (document: typeof firstRun): string[] => document.runs[0]!.points.map((p) => p.id);

describe("points", () => {
  it("insert at a row, at the end, and beyond it", () => {
    expect(ids(pointInsert(firstRun, "main", 1, newPoint("x")))).toEqual(["p1", "x", "p2", "p3", "p4", "p5"]);
    expect(ids(pointInsert(firstRun, "main", 99, newPoint("x"))).at(-1)).toBe("x");
    expect(pointInsert(firstRun, "elsewhere", 0, newPoint("x"))).toBe(firstRun);
  });

  it("remove takes the branches that leave from it along", () => {
    const without = pointRemove(branchWithReducer, "p3");
    expect(without.runs.map((r) => r.from)).toEqual([null, "p2"]);
    expect(parseRunDocument(without).ok).toBe(true);
    const nested = pointInsert(branchAdd(branchWithReducer, "p7", "deep"), "deep", 0, newPoint("d1"));
    expect(pointRemove(nested, "p2").runs.map((r) => r.from)).toEqual([null, "p3"]);
    expect(pointRemove(firstRun, "nobody")).toBe(firstRun);
  });

  it("move within a run; a row that is not there changes nothing", () => {
    expect(ids(pointMove(firstRun, "main", 0, 2))).toEqual(["p2", "p3", "p1", "p4", "p5"]);
    expect(pointMove(firstRun, "main", 0, 9)).toBe(firstRun);
  });

  it("update keeps the id and shares what stays", () => {
    const changed = pointUpdate(branchWithReducer, "p7", { note: "two" });
    expect(changed.runs[0]).toBe(branchWithReducer.runs[0]);
    expect(changed.runs[1]!.points[0]).toMatchObject({ id: "p7", note: "two" });
    expect(pointUpdate(firstRun, "nobody", { note: "" })).toBe(firstRun);
  });
});

it("a copy has new ids everywhere and is whole", () => {
  let count = 0;
  const copy = documentCopy(branchWithReducer, "FW-3009", () => `c${(count += 1)}`);
  expect(copy.number).toBe("FW-3009");
  expect(parseRunDocument(copy).ok).toBe(true);
  const old = new Set(branchWithReducer.runs.flatMap((r) => r.points.map((p) => p.id)));
  expect(copy.runs.flatMap((r) => r.points).some((p) => old.has(p.id))).toBe(false);
  expect(copy.runs[1]!.from).toBe(copy.runs[0]!.points[1]!.id);
});

it("says an entry as it was typed", () => {
  const [first, points] = [firstRun.runs[0]!.points, planarOffset.runs[0]!.points];
  expect(pointEntryText(first[1]!, "imperial")).toBe(`E 3' 1 1/2"`);
  expect(pointEntryText(first[0]!, "imperial")).toBe("0");
  expect(pointEntryText(points[2]!, "imperial")).toBe(`N 1' 8" U 1' 8"`);
  expect(pointEntryText({ ...newPoint("x"), offset: { kind: "absolute", e: { text: "", mm: 1000 }, n: { text: "", mm: 0 }, u: { text: "", mm: -50 } } }, "metric")).toBe("at E 1000 N 0 U -50");
});

it("new documents and all samples are what the schema calls a run document", () => {
  for (const document of [newRunDocument("N-1", defaultLineSettings("metric")), ...Object.values(sampleRuns)]) {
    expect(runDocumentSchema.parse(document)).toEqual(document);
    expect(parseRunDocument(document).ok).toBe(true);
  }
  expect(metricLine.settings.allowances.rootGapMm).toBe(3);
});
