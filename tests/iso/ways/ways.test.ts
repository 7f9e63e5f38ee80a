import { describe, expect, it } from "vitest";
import { quickWays, sortWays, threeElbowRefusal, threeElbowWays, type KeepOut, type Way, type WaysInput, type WaysResult } from "@/iso";
import { layWay } from "../../oracle/lay-way";
import type { Ends, P } from "../../oracle/elbow-search";
import { seededRandom } from "../../oracle/random";
import { IN, mm, question, walkedEnds } from "./cases";

const MEETS_MM = 1e-6;
/** NPS 4 OD 4 1/2, half of it: ASME B36.10M. */
const HALF_OD = 2.25;
const ROLLING: Ends = { p0: [0, 0, 0], d0: [1, 0, 0], p1: [48, 40, 30], d1: [0, -1, 0], gap: 0.125, leastPup: 6 };
const OFFSET: Ends = { ...ROLLING, p1: [36, 30, 0], d1: [-1, 0, 0] };

function found(result: WaysResult): readonly Way[] {
  if (!result.ok) throw new Error(result.sentence);
  return result.ways;
}

const said = (change: Partial<WaysInput>, ends = ROLLING): string => {
  const result = quickWays(question(ends, change));
  return result.ok ? "" : result.sentence;
};

/** Walked by another program, take-outs by R·tan(θ/2) with R 6 in (a common formula) or the table's 6 and 2 1/2. */
function meets(way: Way, ends: Ends): void {
  const reaches = way.turns.map(({ fitting, angleRad }) => (fitting.name === "LR 90" ? 6 : fitting.name === "LR 45" ? 2.5 : 6 * Math.tan(angleRad / 2)) * IN);
  const laid = layWay(mm(ends.p0), way.straights.map((s) => ({ direction: s.direction, cut: s.cutMm })), reaches, ends.gap * IN);
  const goal = mm(ends.p1);
  expect(Math.hypot(...laid.end.map((x, i) => x - goal[i as 0])), way.id).toBeLessThan(MEETS_MM);
  laid.turned.forEach((deg, i) => expect(deg, way.id).toBeCloseTo((way.turns[i]!.angleRad * 180) / Math.PI, 6));
}

describe("ways that take a saw", () => {
  it("lists the one trimmed pair of the closing (check: 36 run, 30 set, no gaps: 46.75° and 33.407 in of pipe in NPS 6, common practice)", () => {
    const ends = { ...OFFSET, gap: 0 };
    const six = question(ends);
    const input: WaysInput = { ...six, end0: { ...six.end0, nps: "6" }, end1: { ...six.end1, nps: "6" } };
    const pair = found(quickWays(input)).filter((way) => way.kind === "trimmed-pair");
    expect(pair).toHaveLength(1);
    expect(pair[0]?.title).toBe("LR cut to 46.75°, LR cut to 46.75°");
    expect((pair[0]?.cuts[0] ?? 0) / IN).toBeCloseTo(33.407, 2);
    expect(pair[0]?.trimmedCuts).toBe(2);
    expect(pair[0]?.warnings.join(" ")).toContain("confirm with the engineer that trimming is permitted");
  });

  it("welds elbow to elbow where just one gap is between them: S = sqrt(v² + h² - 2hRs) = g (closed form of parallel ends)", () => {
    const [h, g] = [6, 0.125];
    const v = Math.sqrt(g * g - h * h + 2 * h * 12);
    const pair = found(quickWays(question({ ...OFFSET, p1: [v + 2 * g, h, 0] }))).find((way) => way.kind === "trimmed-pair");
    expect(pair).toMatchObject({ cuts: [], welds: 3, minimumPupMm: null });
    // Half a set of 6 on R 6 turns 60 degrees: 6 = 12 (1 - cos θ), but for the gap.
    expect(((pair?.turns[0]?.angleRad ?? 0) * 180) / Math.PI).toBeGreaterThan(59);
    expect(((pair?.turns[0]?.angleRad ?? 0) * 180) / Math.PI).toBeLessThan(60);
  });

  it("keeps the straights asked for at the ends, with pipe in them and never an elbow welded on", () => {
    const asked = question(ROLLING);
    const ways = [...found(quickWays({ ...asked, end0: { ...asked.end0, straightMm: 12 * IN } })), ...threeElbowWays({ ...asked, end0: { ...asked.end0, straightMm: 12 * IN } }).ways];
    expect(ways.length).toBeGreaterThan(10);
    for (const way of ways.filter((each) => each.kind !== "mitre")) {
      const first = way.straights[0]!;
      const reach = way.turns[0]!.takeOutMm;
      expect(first.cutMm, way.id).not.toBeNull();
      expect(first.lengthMm - reach - IN / 8, way.id).toBeGreaterThan(12 * IN - MEETS_MM);
    }
  });

  it("joins one whole and one trimmed elbow, on either side, each laid by another program, never trimmed past what is allowed", () => {
    const random = seededRandom(12);
    let count = 0;
    for (let i = 0; i < 25; i += 1) {
      const ends = walkedEnds(random, [90, 20 + 60 * random()].map((a, k) => (k === 0 ? a : 45)), [8, 9, 10]);
      for (const way of found(quickWays(question(ends, { trimMaxDeg: 60 }))).filter((each) => each.kind === "one-trimmed")) {
        meets(way, ends);
        const trimmed = way.turns.find((turn) => turn.fitting.make === "elbow" && !turn.fitting.whole);
        expect(trimmed?.angleRad).toBeLessThanOrEqual(Math.PI / 3 + 1e-9);
        expect(way.straights.every((s) => s.cutMm === null || s.cutMm >= 6 * IN - MEETS_MM)).toBe(true);
        count += 1;
      }
    }
    expect(count).toBeGreaterThan(20);
  });

  it("says the nearest trims of the ends that open whole elbows: after them the walk meets, before them it does not close", () => {
    const trims = found(quickWays(question(OFFSET, { angles: [45], trimMaxDeg: 0 }))).filter((way) => way.kind === "field-trim");
    expect(trims.length).toBeGreaterThan(0);
    for (const way of trims) {
      meets(way, { ...OFFSET, p0: [-way.trims.end0Mm / IN, 0, 0], p1: [36 + way.trims.end1Mm / IN, 30, 0] });
      expect(way.warnings[0]).toMatch(/End [01] (cut back|made)/);
    }
    // Two 45s on a 30 in set run 30, with their centres 30·√2 apart and 2 x (2 1/2 + 1/8) outside: 35 1/4 of the 36.
    const least = Math.min(...trims.map((way) => Math.abs(way.trims.end0Mm) + Math.abs(way.trims.end1Mm))) / IN;
    expect(least).toBeCloseTo(0.75, 9);
    expect(found(quickWays(question(OFFSET, { angles: [45], trimMaxDeg: 0 }))).filter((way) => way.kind === "two-standard")).toEqual([]);
  });
});

describe("keep-outs", () => {
  it("measures the clearance from the outside of the pipe, and puts last what comes too near", () => {
    const floor: KeepOut = { kind: "plane", name: "floor", point: [0, 0, -10 * IN], normal: [0, 0, 1], clearMm: 2 * IN };
    const flat = found(quickWays(question(OFFSET, { keepOuts: [floor] })));
    flat.forEach((way) => expect((way.keepOut.spareMm ?? 0) / IN).toBeCloseTo(10 - HALF_OD - 2, 6));
    const ball: KeepOut = { kind: "sphere", name: "nozzle", centre: mm([18, 15, 0]), radiusMm: 3 * IN, clearMm: 0 };
    const near = sortWays(found(quickWays(question(OFFSET, { keepOuts: [ball] }))), "shortest");
    const blocked = near.map((way) => !way.keepOut.clear);
    expect(blocked).toContain(true);
    expect(blocked).toContain(false);
    expect(blocked.indexOf(true)).toBe(blocked.lastIndexOf(false) + 1);
    const middle = near.find((way) => way.kind === "trimmed-pair");
    expect(middle?.keepOut).toMatchObject({ clear: false, nearest: "nozzle" });
    // The offset's pipe runs through the middle of the ball: short by its radius and half the OD.
    expect((middle?.keepOut.spareMm ?? 0) / IN).toBeCloseTo(-3 - HALF_OD, 6);
    expect(middle?.warnings.join(" ")).toContain("too near nozzle");
  });

  it("keeps a box clear by sampling it against points along the path", () => {
    const box: KeepOut = { kind: "box", name: "beam", low: mm([10, 5, 8]), high: mm([30, 60, 14]), clearMm: 0 };
    for (const way of found(quickWays(question(ROLLING, { keepOuts: [box] })))) {
      let least = Infinity;
      way.path.slice(1).forEach((b, i) => {
        const a = way.path[i]!;
        for (let k = 0; k <= 400; k += 1) {
          const p = a.map((x, axis) => x + ((b[axis as 0] - x) * k) / 400);
          least = Math.min(least, Math.hypot(...p.map((x, axis) => Math.max(box.low[axis as 0] - x, 0, x - box.high[axis as 0]))));
        }
      });
      expect((way.keepOut.spareMm ?? 0) / IN).toBeCloseTo(least / IN - HALF_OD, 1);
    }
  });

  it("finds threes that go round what the shortest would run into", () => {
    const shortest = sortWays(threeElbowWays(question(ROLLING)).ways, "shortest")[0]!;
    const long = [...shortest.straights].sort((a, b) => b.lengthMm - a.lengthMm)[0]!;
    const centre = long.from.map((x, i) => (x + long.to[i as 0]) / 2) as unknown as P;
    const ball: KeepOut = { kind: "sphere", name: "nozzle", centre, radiusMm: 2 * IN, clearMm: 0 };
    const round = threeElbowWays(question(ROLLING, { keepOuts: [ball] })).ways;
    expect(round.map((way) => way.id)).not.toContain(shortest.id);
    const clear = sortWays(round, "shortest").filter((way) => way.keepOut.clear);
    expect(clear[0]!.lengthMm).toBeGreaterThan(shortest.lengthMm - 0.01);
    for (const way of clear.slice(0, 20)) {
      const nearest = Math.min(...way.path.map((p) => Math.hypot(...p.map((x, i) => x - centre[i as 0]))));
      expect(nearest).toBeGreaterThan(2 * IN + HALF_OD * IN - 0.01);
    }
  });
});

describe("what an error of the tape does", () => {
  it("agrees with laying the way again for a moved end: each cut length by its rate, no bend turned", () => {
    const ways = found(quickWays(question(ROLLING))).filter((way) => way.kind === "two-standard" && way.sensitivity.takenBy === "lengths");
    expect(ways.length).toBeGreaterThan(0);
    for (const way of ways) {
      const change = ([0, 1, 2] as const).map((axis) => {
        const p1 = ROLLING.p1.map((x, i) => x + (i === axis ? 0.001 : 0)) as unknown as P;
        const moved = found(quickWays(question({ ...ROLLING, p1 }))).find((each) => each.title === way.title && each.straights.every((s, j) => Math.abs(s.lengthMm - way.straights[j]!.lengthMm) < 1));
        return moved!.straights.map((s, j) => (s.lengthMm - way.straights[j]!.lengthMm) / (0.001 * IN));
      });
      const worst = Math.max(...[0, 1, 2].map((j) => Math.hypot(...change.map((rates) => rates[j]!))));
      expect(way.sensitivity.lengthMm / way.sensitivity.perMm).toBeCloseTo(worst, 4);
      expect(way.sensitivity.bendDeg).toBe(0);
    }
  });

  it("takes the trimmed pair's own rates: a bend turns about 0.1° for 1/16 in when the pipe is 30 in long (|δu| ≤ |δD|/S)", () => {
    const pair = found(quickWays(question({ ...OFFSET, p1: [31, 20.5, 0] }))).find((way) => way.kind === "trimmed-pair");
    expect((pair?.cuts[0] ?? 0) / IN).toBeGreaterThan(25);
    expect(pair?.sensitivity.takenBy).toBe("bends");
    expect(pair?.sensitivity.bendDeg).toBeGreaterThan(0.05);
    expect(pair?.sensitivity.bendDeg).toBeLessThan(0.2);
  });

  it("says so where welded faces leave nothing to take it up", () => {
    const flat = found(quickWays(question(OFFSET))).find((way) => way.kind === "two-standard");
    expect(flat?.sensitivity.takenBy).toBe("nothing");
    expect(flat?.sensitivity.words).toContain("stays at a weld");
  });
});

describe("the shop's order", () => {
  it("puts first what is asked for, and never leaves a tie to chance", () => {
    const ways = [...found(quickWays(question(ROLLING))), ...threeElbowWays(question(ROLLING)).ways];
    const of = (preference: Parameters<typeof sortWays>[1]) => sortWays(ways, preference).filter((way) => way.kind !== "field-trim" && way.kind !== "mitre");
    const rising = (values: readonly number[]) => values.every((value, i) => i === 0 || value >= values[i - 1]! - 0.01);
    expect(rising(of("fewest-welds").map((way) => way.welds))).toBe(true);
    expect(rising(of("least-trimmed").map((way) => way.trimmedCuts))).toBe(true);
    expect(rising(of("shortest").map((way) => way.lengthMm))).toBe(true);
    expect(of("standard-first")[0]?.trimmedCuts).toBe(0);
    for (const preference of ["fewest-welds", "least-trimmed", "shortest", "standard-first"] as const) {
      expect(sortWays([...ways].reverse(), preference).map((way) => way.id)).toEqual(sortWays(ways, preference).map((way) => way.id));
    }
  });
});

describe("bad questions", () => {
  it.each([
    ["no axis", { end0: { ...question(ROLLING).end0, direction: [0, 0, 0] as const } }, /End 0 has no direction/],
    ["one place", { end1: { ...question(ROLLING).end1, position: [0, 0, 0] as const } }, /same place/],
    ["one inside the other", { end1: { ...question(ROLLING).end1, position: [-3 * IN, IN, 0] as const } }, /inside each other/],
    ["inches read as millimetres", { end0: { ...question(ROLLING).end0, position: [10, 20, 5] as const }, end1: { ...question(ROLLING).end1, position: [254, 508, 127] as const } }, /25\.4/],
    ["feet read as inches", { end0: { ...question(ROLLING).end0, position: [10, 20, 5] as const }, end1: { ...question(ROLLING).end1, position: [120, 240, 60] as const } }, /12 \(feet/],
    ["miles away", { end1: { ...question(ROLLING).end1, position: [1e7, 0, 0] as const } }, /Check the units/],
    ["no number", { end1: { ...question(ROLLING).end1, position: [Number.NaN, 0, 0] as const } }, /three numbers/],
    ["a gap under nothing", { rootGapMm: -1 }, /root gap/],
    ["nothing to turn with", { angles: [], trimMaxDeg: 0 }, /at least one elbow angle/],
    ["no such reducer", { end1: { ...question(ROLLING).end1, nps: "1/2" as const } }, /no reducer/],
  ] satisfies (readonly [string, Partial<WaysInput>, RegExp])[])("says in words: %s", (_, change, sentence) => {
    expect(said(change)).toMatch(sentence);
  });

  it("says when three elbows are too few, by their angles or by the search with its step", () => {
    const back: Ends = { ...ROLLING, p1: [10, 20, 0], d1: [1, 0, 0], d0: [1, 0, 0] };
    expect(threeElbowRefusal(question(back, { angles: [45] }))?.sentence).toMatch(/180.*more than three of the shop's elbows can \(135/);
    expect(threeElbowRefusal(question(back))?.sentence).toMatch(/steps of 1\.5°.*four elbows or more/);
  });

  it("knows when nothing fits and keeps the closing's own refusal", () => {
    const result = quickWays(question({ ...OFFSET, p1: [5, 3, 0] }));
    if (!result.ok) throw new Error(result.sentence);
    expect(result.refusals.find((r) => r.about === "trimmed-pair")?.sentence).toBeTruthy();
    expect(result.ways.filter((way) => way.kind === "two-standard")).toEqual([]);
  });
});
