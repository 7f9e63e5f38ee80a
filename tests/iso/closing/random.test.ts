/**
 * Twenty thousand seeded closings in eight families, and two thousand of them against a dense search that shares no code with
 * the solver (tests/oracle/closing-search.ts); then ends put anywhere near each other, which close or do not.
 */
import { describe, expect, it } from "vitest";
import { solveClosing, type ClosingInput, type ClosingSolution } from "@/iso";
import { closingSearch } from "../../oracle/closing-search";
import { closingWalk, unit, type V, type Walk } from "../../oracle/closing-walk";
import { seededRandom } from "../../oracle/random";
import { FAMILIES, randomDirection, type Case } from "./closing-families";

/** Eight times this is 20 000. */
const OF_EACH = 2_500;
/** Eight times this is 2 000. */
const SEARCHED_OF_EACH = 250;
const LOOSE = 500;
/** Past this no elbow is ever cut, and a bend near 180° falls through the search's grid. */
const LARGEST_SEARCHED = (120 * Math.PI) / 180;

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

/** The cases of a family: the same ones in every test. */
function casesOf(name: string, count: number): Case[] {
  const random = seededRandom(Object.keys(FAMILIES).indexOf(name) * 1_000_003 + 20_240_607);
  return Array.from({ length: count }, (_, index) => FAMILIES[name]!(random, index));
}

it("are eight families of 2 500, 20 000 in all, 2 000 of them searched", () => {
  expect(Object.keys(FAMILIES)).toEqual(["planar", "rolling", "perpendicular", "skew", "unequal radii", "tangents", "near-degenerate", "impossible"]);
  expect([Object.keys(FAMILIES).length * OF_EACH, Object.keys(FAMILIES).length * SEARCHED_OF_EACH]).toEqual([20_000, 2_000]);
});

describe.each(Object.keys(FAMILIES))("closings: %s", (name) => {
  it(`${OF_EACH} close to 1e-9 relative, or are refused for the reason they were made with`, { timeout: 120_000 }, () => {
    const wrong: string[] = [];
    for (const [index, { input, walk, reason }] of casesOf(name, OF_EACH).entries()) {
      const { miss, scale } = reason === null && walk ? missOf(walk, input) : { miss: 0, scale: 1 };
      if (miss > 1e-9 * scale) wrong.push(`${index} misses by ${miss / scale}: ${JSON.stringify(input)}`);
      if (reason !== null && solveClosing(input).reason !== reason) wrong.push(`${index} is ${solveClosing(input).reason}, not ${reason}: ${JSON.stringify(input)}`);
    }
    expect(wrong).toEqual([]);
  });

  it(`${SEARCHED_OF_EACH} agree with a dense search: none missed, none wrong`, { timeout: 300_000 }, () => {
    const wrong = casesOf(name, SEARCHED_OF_EACH).flatMap(({ input, reason }, index) => {
      const ours = pathOf(input);
      if (reason !== null && closesWithin(input)) return [`${index}: the search closes what must be refused: ${JSON.stringify(input)}`];
      return isSame(input, ours) ? [] : [`${index}: ${JSON.stringify({ input, ours })}`];
    });
    expect(wrong).toEqual([]);
  });
});

it(`${LOOSE} ends anywhere near each other agree with the dense search, closing or not`, { timeout: 300_000 }, () => {
  const random = seededRandom(71);
  const wrong: string[] = [];
  const counted = { closed: 0, refused: 0 };
  for (let i = 0; i < LOOSE; i += 1) {
    const input = looseInput(random, i);
    const ours = pathOf(input);
    counted[ours ? "closed" : "refused"] += 1;
    if (!isSame(input, ours)) wrong.push(`${i}: ${JSON.stringify({ input, ours })}`);
  }
  expect(wrong).toEqual([]);
  expect(counted.closed).toBeGreaterThan(LOOSE / 8);
  expect(counted.refused).toBeGreaterThan(LOOSE / 4);
});

/** The one path there is whatever the elbows' limit, if the search can see it. */
function pathOf(input: ClosingInput): ClosingSolution | null {
  const result = solveClosing({ ...input, thetaMax: Math.PI });
  const path = result.solutions[0] ?? result.nearest;
  return path && Math.max(path.theta0, path.theta1) <= LARGEST_SEARCHED ? path : null;
}

/** Whether the search finds a way within the input's own limits: neither elbow bent too far, the pipe no shorter than nothing. */
function closesWithin(input: ClosingInput): boolean {
  return closingSearch(input).some((hit) => Math.max(hit.theta0, hit.theta1) < input.thetaMax && hit.straight >= 2 * input.gap);
}

/** Where the two differ, a thorough search on a finer grid decides: near a fold two dips lie within one cell. */
function isSame(input: ClosingInput, ours: ClosingSolution | null): boolean {
  return agrees(input, ours, 36, false) || agrees(input, ours, 144, true);
}

function agrees(input: ClosingInput, ours: ClosingSolution | null, steps: number, thorough: boolean): boolean {
  const hits = closingSearch(input, steps, thorough).filter((h) => Math.max(h.theta0, h.theta1) <= LARGEST_SEARCHED);
  const hit = hits[0];
  if (!ours || !hit || hits.length > 1) return !ours && !hit;
  const turn = Math.abs(hit.theta0 - ours.theta0) + Math.abs(hit.theta1 - ours.theta1);
  return turn < 1e-5 && Math.abs(hit.straight - 2 * input.gap - ours.length) < 1e-4;
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
