/** Check dimensions of a spool against sums by hand, and the answers to what was measured. */
import { describe, expect, test } from "vitest";
import { benchChecks, buildModel, checkAnswer, emptyMarks, linearToleranceMm, sheetFacts, type CheckRow, type RunDocument } from "@/iso";
import { spoolEnds } from "@/iso/layout/spool-ends";
import { GOLDEN_RUNS } from "../../fixtures/golden-runs";
import { flange, RunBuilder } from "../../fixtures/run-builder";
import { sampleRuns } from "../../fixtures/sample-runs";
import { benchInput } from "./bench-inputs";

const INCH = 25.4;

function rowsOf(document: RunDocument, spool = "A"): readonly CheckRow[] {
  const model = buildModel(document, emptyMarks(), []);
  return benchChecks(sheetFacts({ ...benchInput(document, "letter"), spool }, model));
}
const row = (rows: readonly CheckRow[], key: string): CheckRow => rows.find((one) => one.key === key)!;

/** Two legs of 3 ft at a level corner between two flange faces, NPS 4. */
const corner = new RunBuilder("L-1").start(flange({ text: "A" })).go("E", `3'`).go("N", `3'`, flange({ text: "B" })).done();

describe("check dimensions", () => {
  test("face to face in E, N and U, the straight, the corner's diagonal and square faces", () => {
    const rows = rowsOf(corner);
    expect(rows.map((one) => one.mark)).toEqual(rows.map((_, i) => `C${i + 1}`));
    expect(row(rows, "ends:1-2:e").wantedMm).toBeCloseTo(36 * INCH, 6);
    expect(row(rows, "ends:1-2:n").wantedMm).toBeCloseTo(36 * INCH, 6);
    expect(row(rows, "ends:1-2:up").wantedMm).toBeCloseTo(0, 6);
    expect(row(rows, "ends:1-2:straight").wantedMm).toBeCloseTo(36 * Math.SQRT2 * INCH, 6);
    // LR 90 in NPS 4 takes out 6 in; the pipe between hub and elbow is 26 3/4 in, so marks stand 24 in off: 30 in each way, square.
    expect(row(rows, "corner:p2").wantedMm).toBeCloseTo(30 * Math.SQRT2 * INCH, 6);
    expect(rows.filter((one) => one.kind === "square")).toHaveLength(2);
  });

  test("tolerances as PFI ES-3: 1/8 in to NPS 10, 3/16 in NPS 12 to 24; 3 and 5 mm", () => {
    expect([10, 12].map((nps) => Math.round((linearToleranceMm(nps, "imperial") / INCH) * 1600) / 1600)).toEqual([1 / 8, 3 / 16]);
    expect([10, 12].map((nps) => linearToleranceMm(nps, "metric"))).toEqual([3, 5]);
  });

  test("ends of every golden run: at least one that is free, none where two parts meet", () => {
    for (const { document } of GOLDEN_RUNS) {
      const model = buildModel(document, emptyMarks(), []);
      for (const spool of model.spools) {
        const ends = spoolEnds(model, spool);
        const inner = model.joints.filter((joint) => spool.jointKeys.includes(joint.key) && joint.kind === "butt" && joint.a !== null && joint.b !== null && [joint.a, joint.b].every((id) => spool.componentIds.includes(id) || spool.pieceKeys.includes(id)));
        for (const end of ends) {
          const onWeld = inner.filter((joint) => Math.hypot(...joint.position.map((x, i) => x - end.position[i]!)) < 1);
          expect([document.number, end.name, onWeld.map((joint) => joint.key)]).toEqual([document.number, end.name, []]);
        }
      }
    }
  });

  test("a run from a flange to an open pipe has those two ends; a spool between field welds has its bare ends", () => {
    const ends = (name: string, i: number) => {
      const model = buildModel(sampleRuns[name]!, emptyMarks(), []);
      return spoolEnds(model, model.spools[i]!).map((end) => end.kind);
    };
    expect(ends("rollingOffset", 0)).toEqual(["flange", "plain"]);
    expect(ends("twoSpools", 1)).toEqual(["plain", "plain"]);
    expect(ends("valveStation", 0)).toEqual(["flange", "plain", "plain"]);
  });
});

describe("answers to a measurement", () => {
  const rows = rowsOf(sampleRuns.twoSpools!);
  const east = row(rows, "ends:1-2:e");
  const north = row(rows, "ends:1-2:n");

  test("go within the tolerance and the grain of a tape", () => {
    for (const off of [0, 1 / 8, -1 / 8]) expect(checkAnswer(east, east.wantedMm + off * INCH, "imperial").verdict).toBe("go");
  });

  test("too long along a plain pipe end: trim, by how much and where", () => {
    expect(checkAnswer(north, north.wantedMm + (3 / 8) * INCH, "imperial")).toEqual({ verdict: "trim", words: expect.stringMatching(/^trim 3\/8 in at end 2 \(pipe end of P3/) });
  });

  test("too short, or too long where nothing can be cut: stop, never forced", () => {
    for (const [one, off] of [[north, -1 / 4], [east, 1 / 4]] as const) {
      const answer = checkAnswer(one, one.wantedMm + off * INCH, "imperial");
      expect(answer.verdict).toBe("stop");
      expect(answer.words).toMatch(/1\/4 in (long|short)\. .*do not pull, jack or heat/);
    }
  });

  test("a corner and a face out of square stop with what it means", () => {
    const corners = rows.find((one) => one.key.startsWith("corner:"))!;
    expect(checkAnswer(corners, corners.wantedMm + 10, "imperial").words).toMatch(/too open/);
    expect(checkAnswer(corners, corners.wantedMm - 10, "imperial").words).toMatch(/too closed/);
    const square = rows.find((one) => one.kind === "square")!;
    expect(checkAnswer(square, 0, "imperial").verdict).toBe("go");
    expect(checkAnswer(square, (1 / 8) * INCH, "imperial").words).toMatch(/out of square/);
  });
});
