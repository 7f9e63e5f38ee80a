/** The search itself, group by group. Blocks its thread: called from a worker thread only. */
import { nestPieces } from "@/iso";
import { groupInput } from "@/lib/rules/nest-input";
import type { NestGroupPlan, NestResult, NestSource } from "@/lib/rules/nest-plans";
import { loadLpSolver } from "./lp-solver";

export interface SearchHooks {
  /** Milliseconds. */
  readonly now: () => number;
  /** Told what all groups come to so far; true stops the search. */
  readonly progress: (state: { readonly cost: number; readonly bound: number }) => boolean;
}

/** Groups share out the time by how many pieces they have; what one takes from the rack the next does not find. */
export async function searchNest(source: NestSource, { now, progress }: SearchHooks): Promise<NestResult> {
  const openLp = await loadLpSolver();
  const used = new Map<string, number>();
  const groups: NestGroupPlan[] = [];
  const all = source.groups.reduce((sum, group) => sum + group.pieces.length, 0);
  const before = { cost: 0, bound: 0 };
  for (const group of source.groups) {
    const { input, costed } = groupInput(source, group, used);
    const seconds = Math.max(LEAST_SECONDS, (source.seconds * group.pieces.length) / all);
    const plan = nestPieces(input, { openLp, seconds, now, progress: ({ cost, bound }) => progress({ cost: before.cost + cost, bound: before.bound + bound }) });
    for (const bar of plan.bars) used.set(bar.stockId, (used.get(bar.stockId) ?? 0) + 1);
    before.cost += plan.cost;
    before.bound += plan.bound;
    groups.push({ ...plan, costed });
  }
  return { groups };
}

const LEAST_SECONDS = 0.3;
