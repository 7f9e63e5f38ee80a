/** Sheet inputs of runs that need templates: trimmed elbows, mitres and a stub-in set on and set in. */
import { emptyMarks, type Item, type RevisionState, type RunDocument, type SheetInput, type SheetSize } from "@/iso";
import { end, flange, pipe, RunBuilder } from "../../fixtures/run-builder";
import { GOLDEN_RUNS } from "../../fixtures/golden-runs";
import { sampleRuns } from "../../fixtures/sample-runs";
import { stubInput } from "../sheet/sheet-stubs";

/** A branch of NPS 4 STD on a run of NPS 6 STD. */
export function branchRun(set: "on" | "in"): RunDocument {
  const stub: Item = { kind: "stub-in", branchNps: "4", set };
  return new RunBuilder(`BR-${set}`, "imperial", { pipe: pipe("6") }, "Branch of 4 on 6").start(flange({ text: "P-1" })).go("E", `4'`, stub).go("E", `4'`, end("continued", "BR-2"))
    .branch(2).go("U", `3'`, flange({ goes: "continued", text: "BR-3" })).done();
}

const goldenOf = (number: string): RunDocument => GOLDEN_RUNS.map((run) => run.document).find((document) => document.number === number)!;

/** Every kind of template, both unit systems. */
export const TEMPLATE_RUNS: Readonly<Record<string, RunDocument>> = {
  "set on": branchRun("on"), "set in": branchRun("in"), "skew closing": sampleRuns.skewClosing!, "rolling offset": sampleRuns.rollingOffset!, metric: sampleRuns.metricLine!,
  "mitre of 2": goldenOf("VD-201"), "mitre of 3": goldenOf("VD-202"), "stub-in with pad": goldenOf("FW-117"),
};

export function benchInput(document: RunDocument, size: SheetSize, state: RevisionState = "for-fabrication"): SheetInput {
  return { ...stubInput(size, state, document), marks: emptyMarks() };
}
