/**
 * Empty weight of a way by the same rules as the sheet's: pipe and mitres by cut length, LR 90s by a published table where it
 * has them, every other bend by the pipe's weight along its centre line (a torus of one wall, Pappus), a reducer by the mean.
 */
import { elbowWeightKg } from "../catalogue/pipe";
import { RIGHT_ANGLE_WITHIN } from "./words";
import type { WaysPipe, WaysProblem } from "./problem";
import type { WayStraight, WayTurn } from "./ways-types";

export interface WayWeight {
  readonly weightKg: number | null;
  readonly weightSource: string;
}

/** Weight of turns and straights; null when a wall is not known. */
export function wayWeight(problem: WaysProblem, turns: readonly WayTurn[], straights: readonly WayStraight[], mitrePipeMm: readonly { readonly nps: WayTurn["nps"]; readonly mm: number }[]): WayWeight {
  const pipeOf = (nps: WayTurn["nps"]): WaysPipe => problem.pipes.find((pipe) => pipe.nps === nps) ?? problem.pipes[0];
  if (problem.pipes.some((pipe) => pipe.kgPerM === null)) return { weightKg: null, weightSource: "wall not known" };
  const run = (nps: WayTurn["nps"], mm: number) => ((pipeOf(nps).kgPerM ?? 0) * mm) / 1000;
  const sources = new Set<string>();
  let kg = 0;
  for (const { nps, cutMm, reducer } of straights) {
    if (cutMm !== null) sources.add(`pipe by cut length, ${pipeOf(nps).wallSource}`);
    kg += run(nps, cutMm ?? 0);
    if (!reducer) continue;
    kg += (run(reducer.largeNps, reducer.lengthMm) + run(reducer.smallNps, reducer.lengthMm)) / 2;
    sources.add("reducer as pipe of the mean weight");
  }
  for (const { nps, mm } of mitrePipeMm) kg += run(nps, mm);
  for (const turn of turns) {
    if (turn.fitting.make === "mitre") continue;
    const table = tableWeight(problem, turn);
    kg += table?.kg ?? run(turn.nps, turn.radiusMm * turn.angleRad);
    sources.add(table?.source ?? "bends as pipe along the center line");
  }
  return { weightKg: kg, weightSource: [...sources].join("; ") };
}

function tableWeight({ input, pipes }: WaysProblem, turn: WayTurn) {
  const { fitting } = turn;
  if (fitting.make !== "elbow" || !fitting.whole || fitting.radius !== "LR" || Math.abs(turn.angleRad - Math.PI / 2) > RIGHT_ANGLE_WITHIN) return null;
  const schedule = turn.nps === pipes[1].nps && turn.nps !== pipes[0].nps ? (input.schedule1 ?? input.schedule) : input.schedule;
  return elbowWeightKg("lr-90", turn.nps, schedule);
}
