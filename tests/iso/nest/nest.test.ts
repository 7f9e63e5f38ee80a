/** Nesting against published cutting-stock examples, best-fit-decreasing by another hand, and a checker that shares no code. */
import { beforeAll, describe, expect, it } from "vitest";
import { nestPieces, type NestInput, type NestOptions, type NestStock, type OpenLp } from "@/iso";
import { loadLpSolver } from "@/lib/commands/lp-solver";
import { bestFitCost, nestFaults } from "../../oracle/check-nest";
import { fullRack, seededShop } from "../../oracle/nest-racks";

let openLp: OpenLp;
beforeAll(async () => {
  openLp = await loadLpSolver();
});

/** Time of this process alone, milliseconds: a busy machine must not change what is found. */
const cpuMs = () => {
  const { user, system } = process.cpuUsage();
  return (user + system) / 1000;
};
const options = (seconds: number): NestOptions => ({ openLp, seconds, now: cpuMs });

function rolls(length: number, widths: readonly (readonly [number, number])[]): NestInput {
  return {
    demands: widths.map(([width, count]) => ({ length: width, heat: null, marks: Array.from({ length: count }, (_, i) => `${width}-${i + 1}`) })),
    stocks: [{ id: "roll", length, quantity: null, cost: 1, heat: null }],
    kerf: 0, endTrim: 0, leastOffcut: 0, offcutValue: 0,
  };
}

describe("published cutting-stock examples (figures from memory of the books named)", () => {
  it.each([
    // Chvátal, Linear Programming (1983), chapter 13: 100 in rolls, 453 of them.
    ["Chvátal", rolls(100, [[45, 97], [36, 610], [31, 395], [14, 211]]), 453],
    // Fourer, Gay, Kernighan, AMPL (2nd ed.), chapter 15: 110 in rolls, 47 of them.
    ["Fourer, Gay and Kernighan", rolls(110, [[20, 48], [45, 35], [50, 24], [55, 10], [75, 8]]), 47],
    // The paper-machine example of many introductions to the problem: 5600 mm rolls, 13 widths, 73 of them.
    ["paper machine", rolls(5600, [[1380, 22], [1520, 25], [1560, 12], [1710, 14], [1820, 18], [1880, 18], [1930, 20], [2000, 10], [2050, 12], [2100, 14], [2140, 16], [2150, 18], [2200, 20]]), 73],
  ] as const)("%s", (_, input, best) => {
    const plan = nestPieces(input, options(10));
    expect(nestFaults(input, plan)).toEqual([]);
    expect(plan.cost).toBe(best);
    expect(plan.proven).toBe(true);
  });
});

describe("seeded shops", () => {
  it("never costs more than best-fit-decreasing, and every plan can be cut as it says (1 000 shops)", { timeout: 480_000 }, () => {
    let better = 0;
    for (let seed = 1; seed <= 1000; seed++) {
      const input = seededShop(seed, 30);
      const plan = nestPieces(input, options(0.015));
      expect(nestFaults(input, plan), `shop ${seed}`).toEqual([]);
      const hand = bestFitCost(input);
      expect(plan.unplaced.length, `shop ${seed}`).toBeLessThanOrEqual(hand.missing);
      if (plan.unplaced.length === hand.missing) expect(plan.cost, `shop ${seed}`).toBeLessThanOrEqual(hand.cost + 1e-9);
      if (plan.cost < hand.cost - 1e-9) better++;
    }
    expect(better).toBeGreaterThan(500);
  });

  it("comes within 0.7 % of the bound at the median in one second of the processor: 60 to 100 pieces, two lengths, 15 offcuts", { timeout: 240_000 }, () => {
    const gaps = Array.from({ length: 15 }, (_, i) => {
      const full = fullRack(5000 + i);
      const plan = nestPieces(full, options(1));
      expect(nestFaults(full, plan)).toEqual([]);
      return (plan.cost - plan.bound) / plan.cost;
    }).sort((a, b) => a - b);
    expect(gaps[7]).toBeLessThanOrEqual(0.007);
  });

  it("agrees with trying everything on small racks", () => {
    for (let seed = 1; seed <= 40; seed++) {
      const small = seededShop(seed, 5);
      const input = { ...small, stocks: small.stocks.slice(0, 4) };
      const plan = nestPieces(input, options(2));
      if (plan.unplaced.length > 0) continue;
      expect(plan.cost).toBeCloseTo(cheapest(input), 6);
      expect(plan.proven).toBe(true);
    }
  });
});

describe("what cannot be cut", () => {
  const one: NestInput = { ...rolls(100, [[60, 2]]), kerf: 1 };
  it("says which piece is too long, of a heat that is not there, or for which the stock ran out", () => {
    const input: NestInput = {
      ...one, stocks: [{ id: "bar", length: 100, quantity: 1, cost: 1, heat: "A" }],
      demands: [...one.demands, { length: 101, heat: null, marks: ["long"] }, { length: 10, heat: "B", marks: ["heat"] }],
    };
    const plan = nestPieces(input, options(1));
    expect(Object.fromEntries(plan.unplaced.map((u) => [u.mark, u.reason]))).toEqual({ long: "too-long", heat: "no-heat", "60-2": "stock-short" });
    expect(nestFaults(input, plan)).toEqual([]);
  });
  it("takes no pieces, and no stock", () => {
    expect(nestPieces({ ...one, demands: [] }, options(1))).toMatchObject({ bars: [], cost: 0, proven: true });
    expect(nestPieces({ ...one, stocks: [] }, options(1)).unplaced).toHaveLength(2);
  });
  it("places 3 000 pieces in its time", () => {
    const input = rolls(6000, Array.from({ length: 60 }, (_, i) => [400 + 37 * i, 50] as const));
    const start = cpuMs();
    const plan = nestPieces({ ...input, kerf: 3 }, options(5));
    expect(nestFaults({ ...input, kerf: 3 }, plan)).toEqual([]);
    expect(cpuMs() - start).toBeLessThan(20_000);
  });
});

/** Every way to share the pieces out over bars, one by one: the least cost. */
function cheapest(input: NestInput): number {
  const pieces = input.demands.flatMap((d) => d.marks.map(() => d)).sort((a, b) => b.length - a.length);
  let best = Infinity;
  const bars: { s: NestStock; used: number }[] = [];
  const go = (k: number): void => {
    if (k === pieces.length) {
      const cost = bars.reduce((sum, { s, used }) => {
        const rest = s.length - input.endTrim - used;
        return sum + s.cost - (rest >= input.leastOffcut && rest > 0 ? rest * input.offcutValue : 0);
      }, 0);
      best = Math.min(best, cost);
      return;
    }
    const p = pieces[k]!;
    const fits = (s: NestStock, used: number) => (p.heat === null || p.heat === s.heat) && input.endTrim + used + p.length + input.endTrim <= s.length;
    for (const bar of bars) {
      if (!fits(bar.s, bar.used)) continue;
      bar.used += p.length + input.kerf;
      go(k + 1);
      bar.used -= p.length + input.kerf;
    }
    for (const s of input.stocks) {
      if (!fits(s, 0) || (s.quantity !== null && bars.filter((b) => b.s === s).length >= s.quantity)) continue;
      bars.push({ s, used: p.length + input.kerf });
      go(k + 1);
      bars.pop();
    }
  };
  go(0);
  return best;
}
