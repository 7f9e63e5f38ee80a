/** Chances that can be worked by hand, shares, advice, trim and flags. Normal distribution: tables of any handbook. */
import { describe, expect, test } from "vitest";
import { fitOfChain, fitOfClosing, solveClosing, typedEndError, usualFitSettings, type ClosingFitInput, type ClosingInput, type EndError, type FitSettings } from "@/iso";
import { normalPoints, normalQuantile, NORMAL_POINTS } from "@/iso/fit/normal-points";
import { endTwist } from "@/iso/fit/errors";

const RAD = Math.PI / 180;
const EXACT: FitSettings = { ...usualFitSettings("metric"), shop: { cutLengthMm: 0, elbowAngleDeg: 0, rollDeg: 0, gapMm: 0, hiLoMm: 0, squareMm: 0 } };
const LIMITS = EXACT.limits;

/** Two ends that face each other 1 m apart: a straight pipe. */
const STRAIGHT: ClosingInput = { p0: [0, 0, 0], d0: [1, 0, 0], p1: [1000, 0, 0], d1: [-1, 0, 0], r0: 152.4, r1: 152.4, a: 0, b: 0, gap: 3, thetaMax: Math.PI / 2 };
/** A rolling offset. */
const ROLLING: ClosingInput = { ...STRAIGHT, p1: [1200, 500, 300] };

function inputOf(closing: ClosingInput, errors: readonly EndError[], change: Partial<ClosingFitInput> = {}): ClosingFitInput {
  return { closing, solution: solveClosing(closing).solutions[0]!, odMm: 114.3, units: "metric", errors, settings: EXACT, fitUp: "set-true", target: 0.95, ...change };
}

/** One reading that moves end 1, deviations given. */
function reading(name: string, position: readonly number[], axis: readonly number[] = [0, 0, 0]): EndError {
  return { id: name, kind: "reading", name, columns: [[0, 0, 0, 0, 0, 0, ...position, ...axis]] };
}

/** Normal distribution within ±x deviations, by Simpson's rule. */
function within(x: number): number {
  const n = 2000;
  const bell = (t: number) => Math.exp((-t * t) / 2) / Math.sqrt(2 * Math.PI);
  return Array.from({ length: n + 1 }, (_, k) => bell(-x + (2 * x * k) / n) * (k === 0 || k === n ? 1 : k % 2 ? 4 : 2)).reduce((a, b) => a + b, 0) * ((2 * x) / n / 3);
}

describe("the bell's points", () => {
  test.each([[0.5, 0], [0.975, 1.959964], [0.95, 1.644854], [0.001, -3.090232], [0.9999, 3.719016]])("quantile of %d", (p, z) => {
    expect(normalQuantile(p)).toBeCloseTo(z, 5);
  });

  test("mean 0, deviation 1, independent", () => {
    const points = normalPoints();
    for (let a = 0; a < 6; a++) for (let b = a; b < 6; b++) {
      let sum = 0;
      for (let n = 0; n < NORMAL_POINTS; n++) sum += points[n * 6 + a]! * points[n * 6 + b]!;
      expect(Math.abs(sum / NORMAL_POINTS - (a === b ? 1 : 0))).toBeLessThan(0.004);
    }
  });
});

describe("chances worked by hand", () => {
  test("gap only: the chance is the bell between the limits", () => {
    for (const sigma of [0.3, 0.6, 1.2]) {
      const { probability } = fitOfClosing(inputOf(STRAIGHT, [reading("A", [sigma, 0, 0])]));
      expect(Math.abs(probability! - within(LIMITS.gapMm / sigma))).toBeLessThan(0.004);
    }
  });

  test("shared, two equal gaps each take half", () => {
    const { probability, mismatches } = fitOfClosing(inputOf(STRAIGHT, [reading("A", [1, 0, 0])], { fitUp: "shared" }));
    expect(Math.abs(probability! - within(2 * LIMITS.gapMm))).toBeLessThan(0.004);
    expect(mismatches[0]).toMatchObject({ what: "gap", beforeMm: expect.closeTo(2, 6), atEnd0Mm: expect.closeTo(1, 6), atEnd1Mm: expect.closeTo(1, 6) });
  });

  test("high-low in two directions: 1 - exp(-h²/2σ²)", () => {
    const { probability } = fitOfClosing(inputOf(STRAIGHT, [reading("A", [0, 0.8, 0]), reading("B", [0, 0, 0.8])]));
    expect(Math.abs(probability! - (1 - Math.exp(-(LIMITS.hiLoMm ** 2) / 2 / 0.8 ** 2)))).toBeLessThan(0.004);
  });

  test("opening: OD·tan of the angle between the axes", () => {
    const sigma = 0.01;
    const { probability, judged } = fitOfClosing(inputOf(STRAIGHT, [reading("A", [0, 0, 0], [0, sigma, 0])]));
    expect(judged[0]!.condition).toBe("opening");
    expect(Math.abs(probability! - within(Math.atan(LIMITS.openingMm / 114.3) / sigma))).toBeLessThan(0.004);
  });

  test("a cut's ± is two deviations", () => {
    const settings = { ...EXACT, shop: { ...EXACT.shop, cutLengthMm: 1.6 } };
    const { probability, contributions } = fitOfClosing(inputOf(STRAIGHT, [], { settings }));
    expect(Math.abs(probability! - within(LIMITS.gapMm / 0.8))).toBeLessThan(0.004);
    expect(contributions).toMatchObject([{ id: "shop:cutLengthMm", share: 1, exact: 1 }]);
  });

  test("bolt holes: an end that cannot turn, shift and rotation together", () => {
    const flange = { kind: "flange", boltCircleMm: 190 } as const;
    const settings = { ...EXACT, shop: { ...EXACT.shop, rollDeg: 2 } };
    const parallel: ClosingInput = { ...STRAIGHT, p1: [1200, 400, 0] };
    const free = fitOfClosing(inputOf(parallel, [], { settings }));
    const bolted = fitOfClosing(inputOf(parallel, [], { settings, faces: [flange, flange] }));
    // Roll of an elbow by 1° (one deviation) turns the far flange with it: 95 mm · sin 1° at the holes, and swings it too.
    expect(bolted.probability!).toBeLessThan(free.probability! - 0.02);
    expect(bolted.judged.some(({ condition }) => condition === "rotation")).toBe(true);
    expect(free.judged.some(({ condition }) => condition === "rotation")).toBe(false);
  });
});

describe("what the ends' errors do", () => {
  test("end 0 turned by a little swings the far end about it; end 1 counts against", () => {
    const start = { position: [0, 0, 0], axis: [1, 0, 0] } as const;
    const end = { position: [1000, 200, 0], axis: [-1, 0, 0] } as const;
    const tilt = 1e-3;
    // Axis tilted north: a point 1000 along goes 1 north, a point 200 north goes 0.2 back.
    expect(endTwist([0, 0, 0, 0, tilt, 0, 0, 0, 0, 0, 0, 0], start, end).map((v) => Math.round(v * 1e6) / 1e6)).toEqual([-0.2, 1, 0, 0, 0, 0.001]);
    expect(endTwist([0, 0, 0, 0, 0, 0, 2, 3, 4, 0, 0, 0], start, end).slice(0, 3)).toEqual([-2, -3, -4]);
  });

  test("typed tolerances: ± each way, the axis only across itself", () => {
    const error = typedEndError(1, [0, 0, 1], 3, 0.02);
    const variance = (k: number) => error.columns.reduce((sum, column) => sum + column[k]! ** 2, 0);
    expect([6, 7, 8].map(variance)).toEqual([2.25, 2.25, 2.25]);
    expect([9, 10, 11].map(variance).map((v) => Math.round(v * 1e8) / 1e8)).toEqual([1e-4, 1e-4, 0]);
    expect(variance(0)).toBe(0);
  });
});

describe("shares and advice", () => {
  const readings = [reading("tape A-B", [0.1, 0.1, 0]), reading("tape D-F", [0.2, 1.4, 0.4], [0, 0.002, 0]), reading("tape C-E", [0.1, 0, 0.2])];

  test("shares add to one, largest first, and a planted reading is named", () => {
    for (const fitUp of ["shared", "set-true"] as const) {
      const { contributions, advice } = fitOfClosing(inputOf(ROLLING, readings, { fitUp, settings: fitUp === "shared" ? usualFitSettings("metric") : EXACT }));
      expect(contributions.reduce((sum, { share }) => sum + share, 0)).toBeCloseTo(1, 9);
      expect(contributions.map(({ share }) => share)).toEqual([...contributions.map(({ share }) => share)].sort((a, b) => b - a));
      expect(advice).toContain("Measure tape D-F better");
    }
  });

  test("of forty random plants the advice names the planted one", () => {
    for (let k = 0; k < 40; k++) {
      const planted = k % readings.length;
      const errors = ["P", "Q", "R"].map((name, at) => reading(`tape ${name}`, at === planted ? [0.4, 1.2, 0.5 + (k % 7) / 10] : [0.1, 0.15, (k % 5) / 20]));
      const { contributions, advice } = fitOfClosing(inputOf(ROLLING, errors, { fitUp: k % 2 ? "shared" : "set-true" }));
      expect(contributions[0]!.name).toBe(`tape ${"PQR"[planted]}`);
      if (advice !== "") expect(advice).toContain(`tape ${"PQR"[planted]}`);
    }
  });

  test("less error never fits worse (Anderson's inequality for symmetric convex limits)", () => {
    const { contributions, probability } = fitOfClosing(inputOf(ROLLING, readings, { fitUp: "shared", settings: usualFitSettings("metric") }));
    for (const { exact, halved } of contributions) {
      expect(halved).toBeGreaterThan(probability! - 0.01);
      expect(exact).toBeGreaterThan(halved - 0.01);
    }
  });

  test("the same whichever end is called 0", () => {
    const turned: ClosingInput = { ...ROLLING, p0: ROLLING.p1, d0: ROLLING.d1, p1: ROLLING.p0, d1: ROLLING.d0 };
    const errors = [typedEndError(0, ROLLING.d0, 1.6, 0.3 * RAD), typedEndError(1, ROLLING.d1, 3, 0.2 * RAD)];
    const swapped = errors.map((error) => ({ ...error, columns: error.columns.map((column) => [...column.slice(6), ...column.slice(0, 6)]) }));
    const settings = usualFitSettings("metric");
    const one = fitOfClosing(inputOf(ROLLING, errors, { fitUp: "shared", settings }));
    const other = fitOfClosing(inputOf(turned, swapped, { fitUp: "shared", settings }));
    expect(Math.abs(one.probability! - other.probability!)).toBeLessThan(0.006);
  });
});

describe("trim", () => {
  test("a straight pipe off by its length only: the trim is the bell's quantile, less what the gap takes", () => {
    const sigma = 8;
    const { trims, sentence, probability } = fitOfClosing(inputOf(STRAIGHT, [reading("A", [sigma, 0, 0])]));
    expect(probability!).toBeLessThan(0.1);
    const least = 1.644854 * sigma - LIMITS.gapMm;
    expect(trims[0]).toMatchObject({ trimMm: Math.ceil(least / 5) * 5, reached: true });
    expect(trims[0]!.probability).toBeGreaterThanOrEqual(0.95);
    expect(sentence).toMatch(/^Fits without trim about 8 times in 100; leave 15 mm at end [01] and it is 9\d\.$/);
  });

  test("what is across the pipe cannot be trimmed away, and that is said", () => {
    const { trims, sentence } = fitOfClosing(inputOf(STRAIGHT, [reading("A", [0, 3, 0])]));
    expect(trims.every(({ reached }) => !reached)).toBe(true);
    expect(sentence).toContain("Trim alone does not");
  });

  test("no trim where a flange, or an elbow, stands at the joint", () => {
    const flange = { kind: "flange", boltCircleMm: 190 } as const;
    const ids = fitOfClosing(inputOf(ROLLING, [reading("A", [3, 1, 1])], { faces: [flange, flange] })).trims.map(({ jointId }) => jointId);
    expect([...ids].sort()).toEqual(["elbow0", "elbow1"]);
  });

  test("a chosen value already met needs none", () => {
    expect(fitOfClosing(inputOf(STRAIGHT, [reading("A", [0.2, 0, 0])])).sentence).toBe("Fits without trim more than 99 times in 100; no trim is needed for 95.");
  });
});

describe("flags instead of a number", () => {
  test("near a fold the bends are a guess: position 1.6 mm each way, 45 mm between the bends", () => {
    const { R, v } = { R: 152.4, v: 400 };
    // Closed form of parallel facing ends: S² = v² + h² - 4hR, smallest at h = 2R.
    const closing: ClosingInput = { ...STRAIGHT, gap: 0, p1: [v, 2 * R, 0] };
    const solution = solveClosing(closing).solutions[0]!;
    expect(solution.length).toBeCloseTo(Math.sqrt(v * v - 4 * R * R), 6);
    const near: ClosingInput = { ...closing, p1: [Math.sqrt(4 * R * R + 45 ** 2), 2 * R, 0] };
    expect(fitOfClosing(inputOf(near, [typedEndError(0, [1, 0, 0], 1.6, 0), typedEndError(1, [-1, 0, 0], 1.6, 0)]))).toMatchObject({ probability: null, flag: "near-fold" });
    expect(fitOfClosing(inputOf(closing, [typedEndError(0, [1, 0, 0], 1.6, 0), typedEndError(1, [-1, 0, 0], 1.6, 0)])).flag).toBeNull();
    const fold: ClosingInput = { ...closing, p1: [Math.sqrt(4 * R * R + 1), 2 * R, 0] };
    expect(fitOfClosing(inputOf(fold, [typedEndError(0, [1, 0, 0], 1.6, 0)]))).toMatchObject({ probability: null, flag: "fold" });
  });

  test("an axis known by guess only", () => {
    expect(fitOfClosing(inputOf(ROLLING, [typedEndError(0, [1, 0, 0], 1, 12 * RAD)])).flag).toBe("too-loose");
  });

  test("nothing off, and nonsense", () => {
    expect(fitOfClosing(inputOf(ROLLING, [])).flag).toBe("no-errors");
    expect(fitOfClosing(inputOf(ROLLING, [reading("A", [Number.NaN, 0, 0])])).flag).toBe("bad-input");
    expect(fitOfClosing(inputOf(ROLLING, [reading("A", [1, 0, 0])], { odMm: 0 })).flag).toBe("bad-input");
    expect(fitOfChain({ start: { position: [0, 0, 0], axis: [1, 0, 0], side: [0, 0, 1] }, pieces: [], end: { position: [1, 0, 0], axis: [-1, 0, 0] }, odMm: 1, errors: [], settings: EXACT, fitUp: "shared", target: 0.9, units: "metric" }).flag).toBe("bad-input");
  });
});
