/**
 * A fixed share of the thousand random lines, in all four views: everything the model holds is on its sheets, no label lies on
 * another, no leg is degenerate, and the labels keep what they have reached. All thousand are drawn by `npm run bench`, which
 * prints the whole report against the targets. The floors here stand a little under the figures of this share, so that a
 * drawing that gets worse fails.
 */
import { beforeAll, describe, expect, it } from "vitest";
import { drawn, modelOf } from "./draw-helpers";
import { randomLine } from "./random-runs";
import { leaderMean, leaderP95, measureRuns, reportLines, share, VIEWS, type ThousandReport } from "./thousand-runs";

/** Every so many seeds from the first: chosen for time, before any was drawn. */
const FIRST = 3;
const STEP = 50;
const MINUTES = 60_000;

let report: ThousandReport;
beforeAll(() => {
  report = measureRuns(FIRST, STEP);
}, 15 * MINUTES);

describe("a share of the thousand random lines", () => {
  it("counts every seed of the share, in four views", () => {
    expect(report.lines).toBe(20);
    expect(report.drawings).toBe(report.lines * VIEWS.length);
  });

  it("shows every dimension, weld, piece and item on the union of the sheets", () => {
    expect(report.missing).toEqual([]);
  });

  it("lays no label on another, counted by the drawing and by polygons cut from its items", () => {
    expect(report.overlapping).toEqual([]);
    expect(report.overlaps).toBe(0);
  });

  it("draws no degenerate leg", () => {
    expect(report.degenerate).toBe(0);
  });

  it("keeps the share of clean labels it has reached", () => {
    const [near60, near120] = report.buckets;
    expect(near60!.drawings).toBeGreaterThan(0);
    expect(share(near60!.clean, near60!.labels), reportLines(report).join("\n")).toBeGreaterThanOrEqual(CLEAN_60);
    if (near120!.drawings > 0) expect(share(near120!.clean, near120!.labels), reportLines(report).join("\n")).toBeGreaterThanOrEqual(CLEAN_120);
  });

  it("keeps leaders near 60 labels within two heights of a dimension's number at the mean", () => {
    expect(leaderMean(report.buckets[0]!)).toBeLessThanOrEqual(7);
    expect(leaderP95(report.buckets[0]!)).toBeLessThanOrEqual(27);
  });
});

const CLEAN_60 = 0.965;
const CLEAN_120 = 0.85;

describe("a random line", () => {
  it.each([11, 503, 907])("is the same twice, and so is its drawing: seed %i", (seed) => {
    expect(randomLine(seed)).toEqual(randomLine(seed));
    const once = drawn(modelOf(randomLine(seed)));
    expect(drawn(modelOf(randomLine(seed)))).toEqual(once);
  });

  it("has 5 to 120 points and up to 6 branches, and never runs through itself", () => {
    for (let seed = 1; seed <= 1000; seed += 1) {
      const { runs } = randomLine(seed);
      const points = runs.reduce((sum, run) => sum + run.points.length, 0);
      expect(points).toBeGreaterThanOrEqual(3);
      expect(points).toBeLessThanOrEqual(120);
      expect(runs.length).toBeLessThanOrEqual(7);
    }
  });
});
