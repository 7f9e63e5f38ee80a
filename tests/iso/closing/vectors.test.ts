/** Closing against the check values in tests/fixtures/vectors (made by an independent solver in high precision). */
import { describe, expect, it } from "vitest";
import { closingSensitivity, elbowMarks, solveClosing, type ClosingInput, type ClosingSolution } from "@/iso";
import { readVectors } from "../../fixtures/read-csv";

interface Expected extends ClosingSolution {
  tolAngle: number;
  tolLength: number;
  tolRoll: number;
}
interface ClosingVector {
  id: string;
  input: ClosingInput;
  status: string;
  reason: string | null;
  solutions: Expected[];
}

const { vectors } = readVectors<{ vectors: ClosingVector[] }>("closing.json");

/** Difference of two angles modulo a full turn, 0 to π. */
function turnBetween(a: number, b: number): number {
  const d = Math.abs(a - b) % (2 * Math.PI);
  return Math.min(d, 2 * Math.PI - d);
}

describe("closing check values", () => {
  it("holds all 38 of them", () => expect(vectors).toHaveLength(38));

  it.each(vectors.map((v) => [v.id, v] as const))("%s", (_, vector) => {
    const result = solveClosing(vector.input);
    expect({ status: result.status, reason: result.reason }).toEqual({ status: vector.status, reason: vector.reason });
    expect(result.solutions).toHaveLength(vector.solutions.length);
    vector.solutions.forEach((expected, i) => {
      const found = result.solutions[i]!;
      expect(found.kind).toBe(expected.kind);
      expect(Math.abs(found.theta0 - expected.theta0)).toBeLessThanOrEqual(expected.tolAngle);
      expect(Math.abs(found.theta1 - expected.theta1)).toBeLessThanOrEqual(expected.tolAngle);
      expect(Math.abs(found.length - expected.length)).toBeLessThanOrEqual(expected.tolLength);
      expect(Math.abs(found.pipeLength - expected.pipeLength)).toBeLessThanOrEqual(expected.tolLength);
      expect(Math.abs(found.takeoff0 - expected.takeoff0)).toBeLessThanOrEqual(expected.tolLength);
      expect(Math.abs(found.takeoff1 - expected.takeoff1)).toBeLessThanOrEqual(expected.tolLength);
      found.u.forEach((x, k) => expect(Math.abs(x - expected.u[k]!)).toBeLessThanOrEqual(expected.tolAngle));
      expect(found.lambdaMin).toBeCloseTo(expected.lambdaMin, 6);
      expect(found.roll === null).toBe(expected.roll === null);
      if (found.roll !== null) expect(turnBetween(found.roll, expected.roll!)).toBeLessThanOrEqual(expected.tolRoll);
    });
    if (vector.reason !== null) expect(result.sentence).toMatch(/^[A-Z].*\.$/);
  });

  it("counts in any one unit: the same vectors in millimetres", () => {
    for (const { input, status, reason, solutions } of vectors) {
      const mm = (v: readonly number[]) => v.map((x) => x * 25.4) as unknown as ClosingInput["p0"];
      const scaled = { ...input, p0: mm(input.p0), p1: mm(input.p1), r0: input.r0 * 25.4, r1: input.r1 * 25.4, a: input.a * 25.4, b: input.b * 25.4, gap: input.gap * 25.4 };
      const result = solveClosing(scaled);
      expect({ status: result.status, reason: result.reason }).toEqual({ status, reason });
      if (solutions[0]) expect(result.solutions[0]!.pipeLength / 25.4).toBeCloseTo(solutions[0].pipeLength, 6);
    }
  });
});

interface SensitivityVector {
  id: string;
  input: ClosingInput;
  inverse: { matrix: number[][] };
}

describe("error in, error out", () => {
  const sensitivity = readVectors<{ vectors: SensitivityVector[] }>("closing-sensitivity.json").vectors;

  it.each(sensitivity.map((v) => [v.id, v] as const))("%s to 1e-6 relative", (_, vector) => {
    const solution = solveClosing(vector.input).solutions[0]!;
    const rates = closingSensitivity(vector.input, solution)!;
    [rates.theta0, rates.theta1, rates.length, rates.roll].forEach((row, i) => {
      const expected = vector.inverse.matrix[i]!;
      const size = Math.max(...expected.map(Math.abs));
      row.forEach((x, j) => expect(Math.abs(x - expected[j]!)).toBeLessThanOrEqual(1e-6 * size));
    });
  });

  it("agrees with finite differences of the solver itself", () => {
    const { input } = sensitivity[0]!;
    const rates = closingSensitivity(input, solveClosing(input).solutions[0]!)!;
    const step = 1e-5;
    for (let k = 0; k < 3; k += 1) {
      const at = (h: number) => solveClosing({ ...input, p1: input.p1.map((x, i) => (i === k ? x + h : x)) as never }).solutions[0]!;
      const slope = (pick: (s: ClosingSolution) => number) => (pick(at(step)) - pick(at(-step))) / (2 * step);
      expect(slope((s) => s.theta0)).toBeCloseTo(rates.theta0[k]!, 5);
      expect(slope((s) => s.theta1)).toBeCloseTo(rates.theta1[k]!, 5);
      expect(slope((s) => s.length)).toBeCloseTo(rates.length[k]!, 5);
      expect(slope((s) => s.roll!)).toBeCloseTo(rates.roll[k]!, 5);
    }
  });
});

interface ElbowVector {
  name: string;
  R: number;
  od: number;
  thetaDeg: number;
  remnantDegNoKerf: number;
  marks16: number[];
  heel: number;
  side: number;
  throat: number;
  takeoff: number;
  chordHeel: number;
  chordThroat: number;
}

describe("elbow marks", () => {
  it.each(readVectors<{ elbow: ElbowVector[] }>("cuts.json").elbow.map((v) => [v.name, v] as const))("%s", (_, v) => {
    const marks = elbowMarks(v.R, v.od, (v.thetaDeg * Math.PI) / 180);
    expect(marks.backMm).toBeCloseTo(v.heel, 9);
    expect(marks.sideMm).toBeCloseTo(v.side, 9);
    expect(marks.throatMm).toBeCloseTo(v.throat, 9);
    expect(marks.takeOutMm).toBeCloseTo(v.takeoff, 9);
    expect(marks.backChordMm).toBeCloseTo(v.chordHeel, 9);
    expect(marks.throatChordMm).toBeCloseTo(v.chordThroat, 9);
    expect(marks.restOf90Deg).toBeCloseTo(v.remnantDegNoKerf, 9);
    v.marks16.forEach((m, i) => expect(marks.roundMm[i]).toBeCloseTo(m, 9));
  });
});
