/** Network adjustment against an independent least-squares solution, and the finding of planted blunders. */
import { describe, expect, test } from "vitest";
import { INCH_MM } from "@/iso";
import { adjustNetwork } from "@/iso/survey/adjust";
import { NON_CENTRALITY, OUTLIER_LIMIT } from "@/iso/survey/chi-square";
import { suspectsOf } from "@/iso/survey/suspects";
import { oracleAdjust, oracleSquares, type OracleAnswer, type OraclePoint } from "../../oracle/network";
import { asNetwork, heldNumbers, randomNetwork, type Made } from "./networks";

const NETWORKS = 200;
const NEAR_MM = 1e-6;

/** Variance of the distance between two marks: a number no choice of datum changes. */
function oracleVariance({ covariance, free, points }: OracleAnswer, a: number, b: number): number {
  const way = [0, 1, 2].map((axis) => points[b]![axis]! - points[a]![axis]!);
  const length = Math.hypot(...way);
  const slope = free.map(([mark, axis]) => (mark === b ? way[axis]! / length : mark === a ? -way[axis]! / length : 0));
  return slope.reduce((sum, s, i) => sum + slope.reduce((inner, t, j) => inner + s * t * covariance[i]![j]!, 0), 0);
}

/**
 * A mark near the plane of its neighbours has two minima, its own and its mirror image's, and errors of reading can make
 * the false one the lower. The least-squares solution is the lower one, whichever start leads the oracle there.
 */
function lowestOf(made: Made, starts: readonly (readonly OraclePoint[])[]): OracleAnswer {
  const answers = starts.map((start) => oracleAdjust(made.readings, start, heldNumbers(made)));
  return answers.reduce((best, each) => (oracleSquares(made.readings, each.points) < oracleSquares(made.readings, best.points) ? each : best));
}

function ourVariance(answer: ReturnType<typeof adjustNetwork>, a: string, b: string): number {
  const [p, q] = [answer.coordinates.get(a)!, answer.coordinates.get(b)!];
  const length = Math.hypot(q[0] - p[0], q[1] - p[1], q[2] - p[2]);
  const rows = answer.order.flatMap((mark) => [0, 1, 2].map((axis) => (mark === b ? (q[axis]! - p[axis]!) / length : mark === a ? (p[axis]! - q[axis]!) / length : 0)));
  return rows.reduce((sum, s, i) => sum + rows.reduce((inner, t, j) => inner + s * t * answer.covariance[i]![j]!, 0), 0);
}

describe("adjustment of a network", () => {
  test(`agrees with an independent least-squares solution to ${NEAR_MM} mm on ${NETWORKS} random networks`, () => {
    let worst = 0;
    let worstVariance = 0;
    for (let seed = 1; seed <= NETWORKS; seed += 1) {
      const made = randomNetwork(seed);
      const network = asNetwork(made);
      const ours = adjustNetwork(network);
      const oracle = lowestOf(made, [made.truth, network.marks.map((mark) => [...ours.coordinates.get(mark)!] as OraclePoint)]);
      expect(ours.loose, `network ${seed}`).toEqual([]);
      expect(ours.datumDefect).toBe(made.floating ? 6 : 0);
      network.marks.forEach((mark, i) => network.marks.slice(0, i).forEach((other, j) => {
        const [p, q] = [ours.coordinates.get(mark)!, ours.coordinates.get(other)!];
        const distance = Math.hypot(p[0] - q[0], p[1] - q[1], p[2] - q[2]);
        const expected = Math.hypot(...[0, 1, 2].map((axis) => oracle.points[i]![axis]! - oracle.points[j]![axis]!));
        worst = Math.max(worst, Math.abs(distance - expected));
        const variance = oracleVariance(oracle, i, j);
        if (variance > 0) worstVariance = Math.max(worstVariance, Math.abs(ourVariance(ours, mark, other) / variance - 1));
      }));
      if (!made.floating) network.marks.forEach((mark, i) => (worst = Math.max(worst, ...[0, 1, 2].map((axis) => Math.abs(ours.coordinates.get(mark)![axis]! - oracle.points[i]![axis]!)))));
    }
    expect(worst).toBeLessThan(NEAR_MM);
    expect(worstVariance).toBeLessThan(1e-6);
  });

  test("redundancy numbers add up to the redundancy, and residuals to the weighted squares", () => {
    const made = randomNetwork(11);
    const { observations, redundancy, weightedSquares } = adjustNetwork(asNetwork(made));
    expect(observations.reduce((sum, each) => sum + each.redundancy, 0)).toBeCloseTo(redundancy, 6);
    expect(observations.reduce((sum, each) => sum + (each.residual / each.observation.sigma) ** 2, 0)).toBeCloseTo(weightedSquares, 6);
  });
});

/** The network with one reading off by so many millimetres. */
function planted(made: Made, at: number, mm: number): Made {
  return { ...made, readings: made.readings.map((reading, i) => (i === at ? { ...reading, value: reading.value + mm } : reading)) };
}

describe("a blunder of 1 in", () => {
  test("is found in at least 95 % of the networks where theory says it can be (Baarda 1968, from memory: 3.29, 4.13)", () => {
    let detectable = 0;
    let found = 0;
    let named = 0;
    for (let seed = 1; seed <= NETWORKS; seed += 1) {
      const made = randomNetwork(seed);
      const tapes = made.readings.flatMap((reading, i) => (reading.kind === "distance" && !(made.fixed.includes(reading.from) && made.fixed.includes(reading.to)) ? [i] : []));
      const at = tapes[(seed * 7) % tapes.length]!;
      const clean = adjustNetwork(asNetwork(made)).observations[at]!;
      if (clean.redundancy === 0 || (NON_CENTRALITY * made.readings[at]!.sigma) / Math.sqrt(clean.redundancy) > INCH_MM) continue;
      detectable += 1;
      const answer = adjustNetwork(asNetwork(planted(made, at, seed % 3 === 0 ? -INCH_MM : INCH_MM)));
      if (answer.observations.some((each) => Math.abs(each.standardised) > OUTLIER_LIMIT)) found += 1;
      if (suspectsOf(answer).some((each) => each.observation.readingId === String(at))) named += 1;
    }
    expect(detectable).toBeGreaterThan(150);
    expect(found / detectable).toBeGreaterThanOrEqual(0.95);
    expect(named / detectable).toBeGreaterThanOrEqual(0.95);
  });

  test("is not cried over where there is none: under 5 % of clean networks of about twenty readings each", () => {
    let cried = 0;
    for (let seed = 201; seed <= 400; seed += 1) if (suspectsOf(adjustNetwork(asNetwork(randomNetwork(seed)))).length > 0) cried += 1;
    expect(cried / 200).toBeLessThan(0.05);
  });
});
