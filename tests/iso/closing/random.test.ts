/** Twenty thousand random closings, two thousand of them against a dense search that shares no code with the solver. */
import { describe, expect, it } from "vitest";
import { solveClosing, type ClosingInput, type ClosingSolution } from "@/iso";
import { closingSearch } from "../../oracle/closing-search";
import { closingWalk, turned, unit, type V, type Walk } from "../../oracle/closing-walk";
import { seededRandom } from "../../oracle/random";

const CASES = 20_000;
const SEARCHED = 2_000;
/** Past this no elbow is ever cut, and a bend near 180° falls through the search's grid. */
const LARGEST_SEARCHED = (120 * Math.PI) / 180;

function randomDirection(random: () => number): V {
  const z = 2 * random() - 1;
  const t = 2 * Math.PI * random();
  const q = Math.sqrt(1 - z * z);
  return [q * Math.cos(t), q * Math.sin(t), z];
}

/** A closing that exists, walked from end 0: inches, radii of NPS 2 to 24, pipes of nothing to 20 ft, bends of 0.1° to 90°. */
function randomWalk(random: () => number): Walk {
  const pick = (list: readonly number[]) => list[Math.floor(random() * list.length)]!;
  const d0 = randomDirection(random);
  const aside = unit([d0[1] - d0[2], d0[2] - d0[0], d0[0] - d0[1]]);
  const angle = () => ((0.1 + 89.9 * random()) * Math.PI) / 180;
  return {
    p0: [200 * random(), 200 * random(), 200 * random()], d0,
    r0: pick([3, 6, 9, 12, 18, 36]), r1: pick([3, 6, 9, 12, 18, 36]),
    a: pick([0, 0, 3, 6.25]), b: pick([0, 0, 4, 12]), gap: pick([0, 0.0625, 0.125]),
    axis0: turned(aside, d0, 2 * Math.PI * random()),
    theta0: angle(), length: 0.1 + 240 * random() ** 2, roll: 2 * Math.PI * random(), theta1: angle(),
  };
}

/** How far the answer's own path, walked from end 0, misses end 1. */
function missOf(walk: Walk, input: ClosingInput): { miss: number; scale: number } {
  const { solutions } = solveClosing(input);
  const s = solutions[0];
  if (!s || solutions.length !== 1 || s.roll === null) return { miss: Infinity, scale: 1 };
  const axis0 = unit([
    walk.d0[1] * s.u[2] - walk.d0[2] * s.u[1],
    walk.d0[2] * s.u[0] - walk.d0[0] * s.u[2],
    walk.d0[0] * s.u[1] - walk.d0[1] * s.u[0],
  ]);
  const end = closingWalk({ ...walk, axis0, theta0: s.theta0, length: s.length, roll: s.roll, theta1: s.theta1 });
  const miss = Math.hypot(...end.p1.map((x, i) => x - input.p1[i]!));
  const tilt = Math.hypot(...end.d1.map((x, i) => x - input.d1[i]!));
  const scale = s.length + walk.r0 + walk.r1 + 1;
  return { miss: Math.max(miss, tilt * scale), scale };
}

describe("random closings", () => {
  it(`closes ${CASES} of them to 1e-9 relative`, { timeout: 120_000 }, () => {
    const random = seededRandom(20_240_607);
    let worst = 0;
    for (let i = 0; i < CASES; i += 1) {
      const walk = randomWalk(random);
      const { p1, d1 } = closingWalk(walk);
      const { p0, d0, r0, r1, a, b, gap } = walk;
      const { miss, scale } = missOf(walk, { p0, d0, p1, d1, r0, r1, a, b, gap, thetaMax: Math.PI / 2 });
      worst = Math.max(worst, miss / scale);
    }
    expect(worst).toBeLessThan(1e-9);
  });

  it(`agrees with a dense search on ${SEARCHED} of them: none missed, none wrong`, { timeout: 300_000 }, () => {
    const random = seededRandom(71);
    const wrong: string[] = [];
    const counted = { closed: 0, refused: 0 };
    for (let i = 0; i < SEARCHED; i += 1) {
      const input = i % 4 === 0 ? walkedInput(random) : looseInput(random, i);
      const wide = { ...input, thetaMax: Math.PI };
      const result = solveClosing(wide);
      const path = result.solutions[0] ?? result.nearest;
      const ours = path && Math.max(path.theta0, path.theta1) <= LARGEST_SEARCHED ? path : null;
      counted[ours ? "closed" : "refused"] += 1;
      // Where the two differ, a thorough search on a finer grid decides: near a fold two dips lie within one cell.
      const same = agrees(input, ours, 36, false) || agrees(input, ours, 144, true);
      if (!same) wrong.push(`${i}: ${JSON.stringify({ input, ours })}`);
    }
    expect(wrong).toEqual([]);
    expect(counted.closed).toBeGreaterThan(SEARCHED / 4);
    expect(counted.refused).toBeGreaterThan(SEARCHED / 4);
  });
});

function agrees(input: ClosingInput, ours: ClosingSolution | null, steps: number, thorough: boolean): boolean {
  const hits = closingSearch(input, steps, thorough).filter((h) => Math.max(h.theta0, h.theta1) <= LARGEST_SEARCHED);
  const hit = hits[0];
  if (!ours || !hit || hits.length > 1) return !ours && !hit;
  const turn = Math.abs(hit.theta0 - ours.theta0) + Math.abs(hit.theta1 - ours.theta1);
  return turn < 1e-5 && Math.abs(hit.straight - 2 * input.gap - ours.length) < 1e-4;
}

function walkedInput(random: () => number): ClosingInput {
  const walk = randomWalk(random);
  const { p0, d0, r0, r1, a, b, gap } = walk;
  return { p0, d0, ...closingWalk(walk), r0, r1, a, b, gap, thetaMax: Math.PI / 2 };
}

/** Two ends anywhere near each other: closes or not. Every fifth has axes along the plant's. */
function looseInput(random: () => number, i: number): ClosingInput {
  const r = [3, 6, 9, 12][Math.floor(random() * 4)]!;
  const reach = r * (1 + 6 * random());
  const near = () => (2 * random() - 1) * reach;
  const axes: V[] = [[-1, 0, 0], [0, 1, 0], [1, 0, 0], [0, 0, -1]];
  const square = i % 5 === 0;
  return {
    p0: [0, 0, 0], d0: square ? [1, 0, 0] : randomDirection(random),
    p1: [near(), near(), near()], d1: square ? axes[Math.floor(random() * 4)]! : randomDirection(random),
    r0: r, r1: r, a: 0, b: 0, gap: 0.125, thetaMax: Math.PI,
  };
}
