/** From patterns to bars with the pieces' own marks, and pieces that no stock can hold. */
import { heatFits, restOf, restValue, roomOf, type Pattern } from "./pattern";
import type { NestBar, NestDemand, NestInput, NestPlan } from "./nest-types";

/** Sets aside demands that no stock can hold, or none of their heat. */
export function splitOff(input: NestInput): { readonly cuttable: NestInput; readonly unplaced: NestPlan["unplaced"] } {
  const unplaced: NestPlan["unplaced"][number][] = [];
  const demands = input.demands.filter((d) => {
    const long = input.stocks.filter((s) => roomOf(input, s) >= d.length + input.kerf);
    const reason = long.length === 0 ? "too-long" : long.some((s) => heatFits(d.heat, s.heat)) ? null : "no-heat";
    if (reason) unplaced.push(...d.marks.map((mark) => ({ mark, reason }) as const));
    return reason === null && d.marks.length > 0;
  });
  return { cuttable: { ...input, demands: alikeTogether(demands) }, unplaced };
}

/** One demand per length and heat: the fewer there are, the less there is to try. */
function alikeTogether(demands: readonly NestDemand[]): NestDemand[] {
  const alike = new Map<string, NestDemand>();
  for (const demand of demands) {
    const key = JSON.stringify([demand.length, demand.heat]);
    const known = alike.get(key);
    alike.set(key, known ? { ...known, marks: [...known.marks, ...demand.marks] } : demand);
  }
  return [...alike.values()];
}

/** Bars in the order of their stock, the longest piece of each first; marks given out in the order they came. */
export function barsOf(input: NestInput, patterns: readonly Pattern[]): { readonly bars: NestBar[]; readonly missing: readonly string[] } {
  const next = input.demands.map(() => 0);
  const ordered = [...patterns].sort((a, b) => a.stock - b.stock);
  const bars = ordered.map(({ stock, counts }): NestBar => {
    const s = input.stocks[stock]!;
    const pieces = counts
      .flatMap((n, i) => Array.from({ length: n }, () => ({ mark: input.demands[i]!.marks[next[i]!++]!, length: input.demands[i]!.length })))
      .sort((a, b) => b.length - a.length);
    const rest = restOf(input, s, pieces.reduce((sum, p) => sum + p.length + input.kerf, 0));
    return { stockId: s.id, stockLength: s.length, heat: s.heat, pieces, rest, returned: restValue(input, rest) > 0 };
  });
  return { bars, missing: input.demands.flatMap((d, i) => d.marks.slice(next[i]!)) };
}
