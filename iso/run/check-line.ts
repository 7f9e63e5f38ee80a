/** Findings about the line as a whole: empty runs, folds, sizes without a table, dimensions that cannot be trusted yet. */
import { pipeSize, pipeWall, schedulesFor } from "../catalogue/pipe";
import { FOLD_RAD, ZERO_LENGTH_MM } from "../geometry/tolerances";
import { formatAngleDeg } from "../units/format";
import { sentenceStart, type BuildContext } from "./build-context";
import type { PlacedRun } from "./build-types";
import type { Pipe } from "./document";
import { legVerification } from "./verify-legs";

export function checkRuns(runs: readonly PlacedRun[], ctx: BuildContext): void {
  const told = new Set<string>();
  for (const run of runs) {
    checkLength(run, ctx);
    for (const p of run.points) {
      const where = { pointId: p.point.id, runId: p.runId };
      if (p.turnRad > Math.PI - FOLD_RAD && p.point.item.kind !== "return") {
        ctx.report("fold-back", "stop", `${sentenceStart(p.label)} turns ${formatAngleDeg(p.turnRad)}, back on itself: correct a sign, or build a return of two elbows.`, where);
      }
      for (const pipe of [p.pipeIn, p.pipeOut]) checkPipe(pipe, where, told, ctx);
      const leg = run.legs[p.index];
      if (leg && leg.lengthMm <= ZERO_LENGTH_MM) ctx.report("zero-length", "stop", `${sentenceStart(p.label)} lies on the point before it: give its offset, or remove it.`, where);
      const verdict = leg ? legVerification(p.point, leg.lengthMm, ctx.units) : null;
      if (verdict?.unverified) ctx.report(`unverified-${verdict.code}`, "warning", `${sentenceStart(p.label)}: ${verdict.reason}`, where);
    }
  }
}

function checkLength(run: PlacedRun, ctx: BuildContext): void {
  const where = { pointId: run.points[0]?.point.id ?? null, runId: run.run.id };
  const name = run.label === "" ? "The main run" : sentenceStart(run.label);
  if (run.points.length === 0) ctx.report("run-empty", "warning", `${name} has no points: type its first one${run.label === "" ? "" : ", or remove the branch"}.`, where);
  else if (run.points.length === 1 && run.parentUid === null) ctx.report("run-single-point", "note", `${name} has one point: type the next one to get pipe.`, where);
}

function checkPipe(pipe: Pipe, where: { pointId: string; runId: string }, told: Set<string>, ctx: BuildContext): void {
  const key = `${pipe.nps} ${pipe.schedule}`;
  if (told.has(key)) return;
  told.add(key);
  if (!pipeSize(pipe.nps)) {
    ctx.report("pipe-size", "stop", `The tables have no pipe of NPS ${pipe.nps}: choose another size.`, where);
  } else if (!pipeWall(pipe.nps, pipe.schedule, ctx.units)) {
    const known = schedulesFor(pipe.nps).join(", ");
    ctx.report("pipe-schedule", "warning", `NPS ${pipe.nps} does not come in schedule ${pipe.schedule}: choose one of ${known}. Weights and cut marks wait for it.`, where);
  }
}
