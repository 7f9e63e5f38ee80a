import { describe, expect, it } from "vitest";
import { threeElbowWays, WALK_STEPS, type Way } from "@/iso";
import { centreLength, NPS4, threeElbowGrid, tiltedFrom, type Ends, type P } from "../../oracle/elbow-search";
import { layWay } from "../../oracle/lay-way";
import { seededRandom } from "../../oracle/random";
import { IN, mm, pick, question, randomEnds, walkedEnds } from "./cases";

/** How well a laid way meets the end, mm; how much longer than the fine grid's best the search may be. */
const MEETS_MM = 1e-6;
const NEVER_WORSE = 1.02;
const CASES = 12;

/** Long enough for a crowded machine; the search and the grid take some 12 s of processor. */
const CLOCK_MS = 240_000;

const ALL = [90, 45].flatMap((a) => [90, 45].flatMap((b) => [90, 45].map((c) => [a, b, c] as const)));

function cases(count: number): Ends[] {
  const random = seededRandom(7103);
  const pup = () => 6 + 24 * random();
  return Array.from({ length: count }, (_, i) =>
    i % 4 === 3 ? randomEnds(random) : walkedEnds(random, [pick(random, [90, 45]), pick(random, [90, 45]), pick(random, [90, 45])], [0, 1, 2, 3].map(() => (random() < 0.3 ? 0 : pup()))));
}

function meets(way: Way, ends: Ends): void {
  const angles = way.turns.map((turn) => Number(/\d+$/.exec(turn.fitting.name)?.[0]));
  const laid = layWay(mm(ends.p0), way.straights.map((s) => ({ direction: s.direction, cut: s.cutMm })), angles.map((a) => NPS4.reach.get(a)! * IN), ends.gap * IN);
  const goal = mm(ends.p1);
  expect(Math.hypot(...laid.end.map((x, i) => x - goal[i as 0]))).toBeLessThan(MEETS_MM);
  laid.turned.forEach((angle, i) => expect(angle).toBeCloseTo(angles[i]!, 5));
  for (const { cutMm } of way.straights) if (cutMm !== null) expect(cutMm).toBeGreaterThan(ends.leastPup * IN - MEETS_MM);
}

describe("three whole elbows", () => {
  it(`is never more than 2 % longer than a grid ten times finer, per choice of elbows, on ${CASES} seeded cases`, () => {
    let compared = 0;
    let worst = 0;
    for (const [i, ends] of cases(CASES).entries()) {
      const { ways, complete } = threeElbowWays(question(ends));
      expect(complete).toBe(true);
      for (const angles of ALL) {
        const grid = threeElbowGrid(ends, angles, 10 * WALK_STEPS);
        if (!grid) continue;
        const own = ways.filter((way) => way.turns.every((turn, k) => turn.fitting.name === `LR ${angles[k]}`)).map((way) => way.lengthMm / IN);
        const ratio = Math.min(...own) / grid.length;
        expect(ratio, `case ${i}, ${angles.join("+")}: ${Math.min(...own)} against ${grid.length}`).toBeLessThanOrEqual(NEVER_WORSE);
        worst = Math.max(worst, ratio);
        compared += 1;
      }
      ways.forEach((way) => meets(way, ends));
    }
    expect(compared).toBeGreaterThan(CASES);
    // Refined between the steps, the search finds what the grid finds, and mostly a little less.
    expect(worst).toBeLessThan(1.0005);
  }, CLOCK_MS);

  it("loses nothing by holding one straight at a bound: letting it slide on a grid is never shorter", () => {
    const random = seededRandom(55);
    for (let i = 0; i < 3; i += 1) {
      const angles = [90, 45, 90] as const;
      const ends = walkedEnds(random, angles, [8, 9, 10, 11]);
      const own = threeElbowWays(question(ends)).ways.filter((way) => way.title === "LR 90, LR 45, LR 90").map((way) => way.lengthMm / IN);
      const slid = threeElbowGrid(ends, angles, WALK_STEPS, 60);
      expect(Math.min(...own)).toBeLessThanOrEqual((slid?.length ?? Infinity) * 1.0005);
    }
  });

  it.each([
    ["a turn into the end's direction, then an offset that rolls", [[1, 0, 0], [0, 1, 0], tiltedFrom([0, 1, 0], Math.PI / 4, 0.7), [0, 1, 0]]],
    ["an offset that rolls, then the turn", [[1, 0, 0], tiltedFrom([1, 0, 0], Math.PI / 4, 1.1), [1, 0, 0], [0, 0, 1]]],
    ["parallel ends out of one plane", [[1, 0, 0], tiltedFrom([1, 0, 0], Math.PI / 4, 0.3), tiltedFrom([1, 0, 0], Math.PI / 4, 0.3 + 2 * Math.asin(Math.sin(Math.PI / 8) / Math.sin(Math.PI / 4))), [1, 0, 0]]],
  ] satisfies (readonly [string, readonly P[]])[])("knows the special families: %s", (_, asked) => {
    const angleOf = (a: P, b: P) => Math.round((Math.acos(Math.max(-1, Math.min(1, a[0] * b[0] + a[1] * b[1] + a[2] * b[2]))) * 180) / Math.PI);
    const directions: readonly P[] = asked;
    const angles = directions.slice(1).map((u, i) => angleOf(directions[i]!, u));
    expect(angles.every((a) => a === 90 || a === 45)).toBe(true);
    const pups = [8, 9, 10, 11];
    const lengths = directions.map((_u, j) => (NPS4.reach.get(angles[j - 1] ?? 0) ?? 0) + (NPS4.reach.get(angles[j] ?? 0) ?? 0) + pups[j]! + 0.25);
    const p1 = [0, 1, 2].map((axis) => directions.reduce((sum, u, j) => sum + u[axis as 0] * lengths[j]!, 0)) as unknown as P;
    const into = directions[3]!;
    const ends: Ends = { p0: [0, 0, 0], d0: directions[0]!, p1, d1: [-into[0], -into[1], -into[2]], gap: 0.125, leastPup: 6 };
    const title = angles.map((a) => `LR ${a}`).join(", ");
    const ways = threeElbowWays(question(ends)).ways.filter((way) => way.title === title);
    ways.forEach((way) => meets(way, ends));
    expect(Math.min(...ways.map((way) => way.lengthMm / IN))).toBeLessThanOrEqual(centreLength(angles, lengths) + 1e-6);
  });

  it("tells its progress, stops when asked, and gives the same list each time", () => {
    const ends = cases(8)[4]!;
    const steps: string[] = [];
    const whole = threeElbowWays(question(ends), (done, total) => {
      steps.push(`${done}/${total}`);
      return false;
    });
    expect(steps).toEqual(Array.from({ length: 8 }, (_, k) => `${k + 1}/8`));
    const heard: Way[] = [];
    const stopped = threeElbowWays(question(ends), (done) => done === 1, (ways) => heard.push(...ways));
    expect(stopped.complete).toBe(false);
    expect(stopped.ways.length).toBeLessThan(whole.ways.length);
    expect(new Set(heard.map((way) => way.id))).toEqual(new Set(stopped.ways.map((way) => way.id)));
    expect(threeElbowWays(question(ends)).ways).toEqual(whole.ways);
  });
});
