/** What changed of the runs themselves: their pipe, and the fitting one comes back to. */
import type { Run, RunDocument } from "@/iso";
import type { Change } from "./api-types";

/** Changes of runs that have points of the spool, before and after; a run that came or went shows by its points. */
export function runChanges(before: RunDocument, after: RunDocument, pointIds: ReadonlySet<string>): Change[] {
  const then = new Map(before.runs.map((run) => [run.id, run]));
  return after.runs.filter((run) => run.points.some((point) => pointIds.has(point.id))).flatMap((run) => {
    const old = then.get(run.id);
    return old ? [...changeOf(run, after, "pipe", pipeText(old), pipeText(run)), ...changeOf(run, after, "comes back to", backText(old, before), backText(run, after))] : [];
  });
}

function changeOf(run: Run, document: RunDocument, what: string, before: string | null, after: string | null): Change[] {
  if (before === after) return [];
  const mark = `${runName(run, document)}, ${what}`;
  return [{ kind: "changed", what: "setting", mark, text: `${mark}: ${before ?? "none"} is now ${after ?? "none"}`, before, after, pointId: null }];
}

function runName(run: Run, document: RunDocument): string {
  const index = document.runs.indexOf(run);
  return run.name.trim() !== "" ? run.name.trim() : index === 0 ? "main run" : `branch ${index}`;
}

function pipeText({ pipe }: Run): string | null {
  return pipe === null ? null : [`NPS ${pipe.nps}`, pipe.schedule, pipe.material, pipe.specification].filter((part) => part !== "").join(" ");
}

function backText({ to }: Run, document: RunDocument): string | null {
  if (to === undefined) return null;
  const index = document.runs.flatMap((run) => run.points.map((point) => point.id)).indexOf(to);
  return index < 0 ? "a point that is not there" : `point ${index + 1}`;
}
