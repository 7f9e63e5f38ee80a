/**
 * Best rigid motion: Kabsch's (Acta Cryst. A32 (1976) 922) in the core against Horn's quaternion (J. Opt. Soc. Am. A 4
 * (1987) 629) in the oracle; planted motions come back; what is left over has the statistics of its noise.
 */
import { describe, expect, test } from "vitest";
import { vecAdd, vecAngle, vecCross, vecDistance, vecDot, vecNegate, vecRotate, vecScale, vecSub, vecUnit, type Vec3 } from "@/iso";
import { motionPoint, motionWay, rigidMotion, type Pair } from "@/iso/layout/as-fitted-motion";
import { hornMotion } from "../../oracle/horn";
import { seededRandom } from "../../oracle/random";

const CASES = 400;
const RECOVERED_MM = 1e-9;

function toolbox(seed: number) {
  const random = seededRandom(seed);
  const gauss = () => Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random());
  const point = (span: number): Vec3 => [span * (random() - 0.5), span * (random() - 0.5), span * (random() - 0.5)];
  const unit = (): Vec3 => vecUnit([gauss(), gauss(), gauss()])!;
  const motion = (span: number) => {
    const [axis, angle, shift] = [unit(), (random() - 0.5) * 2 * Math.PI, point(span)];
    return { move: (p: Vec3) => vecAdd(vecRotate(p, axis, angle), shift), turn: (p: Vec3) => vecRotate(p, axis, angle) };
  };
  return { random, gauss, point, unit, motion };
}

describe("planted motions", () => {
  test(`${CASES} come back within ${RECOVERED_MM} mm, flat sets and half turns among them`, () => {
    const { random, point, motion } = toolbox(11);
    for (let k = 0; k < CASES; k++) {
      const count = 3 + Math.floor(random() * 6);
      const flat = k % 3 === 0;
      const wanted = Array.from({ length: count }, (): Vec3 => { const [x, y, z] = point(4000); return flat ? [x, y, 0] : [x, y, z]; });
      const { move } = motion(4000);
      const fit = rigidMotion(wanted.map((w): Pair => ({ measured: move(w), wanted: w, weight: 0.2 + random() })));
      for (const w of wanted) expect(vecDistance(motionPoint(fit.motion, move(w)), w)).toBeLessThan(RECOVERED_MM);
      const [a, b, c] = fit.motion.turn;
      expect(vecDot(vecCross(a, b), c)).toBeCloseTo(1, 12);
    }
  });

  test("with noise and weights it is the motion Horn's quaternion finds", () => {
    const { random, gauss, point, motion } = toolbox(12);
    for (let k = 0; k < CASES; k++) {
      const wanted = Array.from({ length: 3 + Math.floor(random() * 6) }, () => point(3000));
      const { move } = motion(3000);
      const weights = wanted.map(() => 0.1 + random());
      const measured = wanted.map((w) => vecAdd(move(w), [20 * gauss(), 20 * gauss(), 20 * gauss()]));
      const fit = rigidMotion(wanted.map((w, i): Pair => ({ measured: measured[i]!, wanted: w, weight: weights[i]! })));
      const horn = hornMotion(measured, wanted, weights);
      for (const m of measured) expect(vecDistance(motionPoint(fit.motion, m), horn.move(m))).toBeLessThan(1e-6);
    }
  });

  test("a mirror image is met with a turn, never with a mirror, and is told", () => {
    const { point, motion } = toolbox(13);
    for (let k = 0; k < 50; k++) {
      const wanted = Array.from({ length: 6 }, () => point(3000));
      const { move } = motion(3000);
      const measured = wanted.map(([x, y, z]) => move([-x, y, z]));
      const fit = rigidMotion(wanted.map((w, i): Pair => ({ measured: measured[i]!, wanted: w, weight: 1 })));
      const [a, b, c] = fit.motion.turn;
      expect(vecDot(vecCross(a, b), c)).toBeCloseTo(1, 9);
      expect(fit.mirrorNearer).toBe(true);
      const horn = hornMotion(measured, wanted, wanted.map(() => 1));
      const left = (move2: (p: Vec3) => Vec3) => measured.reduce((sum, m, i) => sum + vecDistance(move2(m), wanted[i]!) ** 2, 0);
      expect(left((p) => motionPoint(fit.motion, p)) / left(horn.move)).toBeCloseTo(1, 9);
    }
  });
});

describe("noise", () => {
  test("what is left over is chi-square with three readings a point less six: mean within four standard errors", () => {
    const { gauss, point, motion } = toolbox(14);
    const [count, sigma, draws] = [5, 1.5, 3000];
    const wanted = Array.from({ length: count }, () => point(3000));
    let [sum, squares] = [0, 0];
    for (let k = 0; k < draws; k++) {
      const { move } = motion(3000);
      const pairs = wanted.map((w): Pair => ({ measured: vecAdd(move(w), [sigma * gauss(), sigma * gauss(), sigma * gauss()]), wanted: w, weight: 1 }));
      const best = rigidMotion(pairs).motion;
      const q = pairs.reduce((total, pair) => total + vecDistance(motionPoint(best, pair.measured), pair.wanted) ** 2, 0) / sigma ** 2;
      sum += q;
      squares += q * q;
    }
    const free = 3 * count - 6;
    const mean = sum / draws;
    expect(Math.abs(mean - free)).toBeLessThan(4 * Math.sqrt((2 * free) / draws));
    expect((squares / draws - mean * mean) / (2 * free)).toBeGreaterThan(0.85);
    expect((squares / draws - mean * mean) / (2 * free)).toBeLessThan(1.15);
  });

  test("a point of great weight is met, and its error goes to the others", () => {
    const wanted: Vec3[] = [[0, 0, 0], [1000, 0, 0], [0, 1000, 0], [0, 0, 1000]];
    const measured = wanted.map((w, i): Vec3 => (i === 0 ? [w[0] + 5, w[1], w[2]] : w));
    const offAt0 = (weight: number) => vecDistance(motionPoint(rigidMotion(wanted.map((w, i): Pair => ({ measured: measured[i]!, wanted: w, weight: i === 0 ? weight : 1 }))).motion, measured[0]!), wanted[0]!);
    expect(offAt0(1e9)).toBeLessThan(1e-5);
    expect(offAt0(1)).toBeGreaterThan(1);
  });
});

describe("one face held", () => {
  test("its centre and axis are exact; the turn about the axis is the best of all turns", () => {
    const { gauss, point, unit, motion } = toolbox(15);
    for (let k = 0; k < 100; k++) {
      const wanted = Array.from({ length: 4 }, () => point(3000));
      const axis = unit();
      const { move, turn } = motion(3000);
      const pairs = wanted.map((w): Pair => ({ measured: vecAdd(move(w), [5 * gauss(), 5 * gauss(), 5 * gauss()]), wanted: w, weight: 1 }));
      const held = { measured: pairs[0]!.measured, wanted: wanted[0]!, axis: { measured: turn(axis), wanted: axis } };
      const { motion: found } = rigidMotion(pairs, [], held);
      expect(vecDistance(motionPoint(found, held.measured), held.wanted)).toBeLessThan(1e-8);
      expect(vecAngle(motionWay(found, held.axis.measured), axis)).toBeLessThan(1e-7);
      const left = (by: number) => pairs.reduce((sum, pair) => sum + vecDistance(vecAdd(held.wanted, vecRotate(vecSub(motionPoint(found, pair.measured), held.wanted), axis, by)), pair.wanted) ** 2, 0);
      for (const by of [-0.3, -1e-3, 1e-3, 0.3, 2]) expect(left(by)).toBeGreaterThanOrEqual(left(0));
    }
  });

  test("an axis measured backwards in the given sense turns the spool end for end: nobody else settles its sense", () => {
    const axis: Vec3 = [1, 0, 0];
    const { motion } = rigidMotion([{ measured: [0, 0, 0], wanted: [0, 0, 0], weight: 1 }], [], { measured: [0, 0, 0], wanted: [0, 0, 0], axis: { measured: vecNegate(axis), wanted: axis } });
    expect(motionWay(motion, [-1, 0, 0])).toEqual([expect.closeTo(1, 9), expect.closeTo(0, 9), expect.closeTo(0, 9)]);
  });
});

describe("what holds the turn", () => {
  const at = (points: readonly Vec3[], ways: readonly Vec3[] = []) => rigidMotion(points.map((p): Pair => ({ measured: p, wanted: p, weight: 1 })), ways.map((w): Pair => ({ measured: w, wanted: w, weight: 1 }))).free;
  test.each<[string, readonly Vec3[], readonly Vec3[], string]>([
    ["one point", [[5, 5, 5]], [], "any turn"],
    ["two points", [[0, 0, 0], [1000, 0, 0]], [], "turn about a line"],
    ["three points on one line", [[0, 0, 0], [500, 0, 0], [1000, 0, 0]], [], "turn about a line"],
    ["three points a hair off it", [[0, 0, 0], [500, 2, 0], [1000, 0, 0]], [], "turn about a line"],
    ["three points off it", [[0, 0, 0], [500, 300, 0], [1000, 0, 0]], [], "nothing"],
    ["two points and an axis along them", [[0, 0, 0], [1000, 0, 0]], [[1, 0, 0]], "turn about a line"],
    ["two points and an axis across", [[0, 0, 0], [1000, 0, 0]], [[0, 1, 0]], "nothing"],
  ])("%s", (_, points, ways, free) => {
    expect(at(points, ways)).toBe(free);
    expect(at(points.map((p) => vecAdd(vecScale(p, 1), [9e4, -7e4, 300])), ways)).toBe(free);
  });
});
