/** Cutting plans in one second each: 60 to 100 pieces, two stock lengths, 15 offcuts. How far from the bound, and from best fit. */
import { loadLpSolver } from "@/lib/commands/lp-solver";
import { nestPieces } from "../../iso";
import { bestFitCost } from "../oracle/check-nest";
import { fullRack } from "../oracle/nest-racks";
import type { BenchRow } from "./stopwatch";

const RACKS = 11;
const SECONDS = 1;
/** Per cent, from the design. */
const BUDGET = 0.7;

const median = (list: readonly number[]) => [...list].sort((a, b) => a - b)[Math.floor(list.length / 2)] ?? Number.NaN;

export async function measure(): Promise<BenchRow[]> {
  const openLp = await loadLpSolver();
  const options = { openLp, seconds: SECONDS, now: () => performance.now() };
  nestPieces(fullRack(1), options);
  const plans = Array.from({ length: RACKS }, (_, k) => fullRack(100 + k)).map((input) => ({ input, plan: nestPieces(input, options) }));
  const gaps = plans.map(({ plan }) => (100 * (plan.cost - plan.bound)) / plan.cost);
  const saved = plans.map(({ input, plan }) => (100 * (bestFitCost(input).cost - plan.cost)) / plan.cost);
  return [
    { name: "median gap to the bound, one second", figure: median(gaps), unit: "%", budget: BUDGET, detail: `${RACKS} racks, worst ${Math.max(...gaps).toFixed(2)} %` },
    { name: "median saving over best-fit-decreasing", figure: median(saved), unit: "%", detail: `${RACKS} racks` },
  ];
}
