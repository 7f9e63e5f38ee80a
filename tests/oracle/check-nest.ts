/** An independent look at a cutting plan: lays the pieces along each bar with a saw's eye and counts. Shares no code with iso/nest. */
import type { NestInput, NestPlan } from "@/iso";

/** Everything wrong with a plan, in words; empty when it can be cut as it says. */
export function nestFaults(input: NestInput, plan: NestPlan): string[] {
  const faults: string[] = [];
  const wanted = new Map<string, { length: number; heat: string | null }>();
  for (const d of input.demands) for (const mark of d.marks) wanted.set(mark, { length: d.length, heat: d.heat });
  const seen = new Set<string>();
  const used = new Map<string, number>();
  let cost = 0;
  for (const bar of plan.bars) {
    const stock = input.stocks.find((s) => s.id === bar.stockId);
    if (!stock) { faults.push(`no stock ${bar.stockId}`); continue; }
    used.set(stock.id, (used.get(stock.id) ?? 0) + 1);
    let at = input.endTrim;
    bar.pieces.forEach((piece, i) => {
      const asked = wanted.get(piece.mark);
      if (!asked) faults.push(`${piece.mark} was never asked for`);
      else if (asked.length !== piece.length) faults.push(`${piece.mark} is cut ${piece.length}, not ${asked.length}`);
      if (asked?.heat != null && asked.heat !== stock.heat) faults.push(`${piece.mark} from another heat`);
      if (seen.has(piece.mark)) faults.push(`${piece.mark} twice`);
      seen.add(piece.mark);
      at += piece.length;
      if (at > stock.length - input.endTrim) faults.push(`${piece.mark} (${i}) runs past the end of ${stock.id}`);
      at += input.kerf;
    });
    if (bar.pieces.length === 0) faults.push(`bar of ${stock.id} with nothing on it`);
    const rest = Math.max(0, stock.length - at);
    if (rest !== bar.rest) faults.push(`rest ${bar.rest}, should be ${rest}`);
    const back = rest >= input.leastOffcut && rest > 0 && input.offcutValue > 0;
    if (back !== bar.returned) faults.push(`rest ${rest} ${bar.returned ? "goes" : "does not go"} back`);
    cost += stock.cost - (back ? rest * input.offcutValue : 0);
  }
  for (const s of input.stocks) if (s.quantity !== null && (used.get(s.id) ?? 0) > s.quantity) faults.push(`${s.id} used ${used.get(s.id)} times, there are ${s.quantity}`);
  for (const { mark } of plan.unplaced) {
    if (seen.has(mark)) faults.push(`${mark} both placed and not`);
    seen.add(mark);
  }
  for (const mark of wanted.keys()) if (!seen.has(mark)) faults.push(`${mark} forgotten`);
  if (Math.abs(cost - plan.cost) > 1e-6 * Math.max(1, Math.abs(cost))) faults.push(`costs ${cost}, says ${plan.cost}`);
  if (plan.bound > plan.cost + 1e-6 * Math.max(1, Math.abs(plan.cost))) faults.push(`bound ${plan.bound} over the cost ${plan.cost}`);
  return faults;
}

/** Best-fit-decreasing by another hand: its cost, and how many pieces it left out. */
export function bestFitCost(input: NestInput): { cost: number; missing: number } {
  const left = new Map(input.stocks.map((s) => [s.id, s.quantity ?? Infinity]));
  const bars: { stock: NestInput["stocks"][number]; free: number }[] = [];
  let missing = 0;
  const pieces = input.demands.flatMap((d) => d.marks.map(() => d)).sort((a, b) => b.length - a.length);
  for (const p of pieces) {
    const heatOk = (h: string | null) => p.heat === null || p.heat === h;
    let target = bars.filter((b) => b.free >= p.length && heatOk(b.stock.heat)).sort((a, b) => a.free - b.free)[0];
    if (!target) {
      const stock = input.stocks
        .filter((s) => left.get(s.id)! > 0 && heatOk(s.heat) && s.length - 2 * input.endTrim >= p.length)
        .sort((a, b) => a.cost / a.length - b.cost / b.length)[0];
      if (!stock) { missing++; continue; }
      left.set(stock.id, left.get(stock.id)! - 1);
      bars.push((target = { stock, free: stock.length - 2 * input.endTrim }));
    }
    target.free -= p.length + input.kerf;
  }
  const cost = bars.reduce((sum, { stock, free }) => {
    const rest = Math.max(0, free + input.endTrim);
    return sum + stock.cost - (rest >= input.leastOffcut && rest > 0 ? rest * input.offcutValue : 0);
  }, 0);
  return { cost, missing };
}
