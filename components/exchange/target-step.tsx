"use client";
import type { RunDocument } from "@/iso";
import { Select } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import { countWords } from "@/lib/rules/exchange/import-cell";
import type { ImportTarget } from "@/lib/rules/exchange/plan-import";
import type { ImportChoices, ImportFacts } from "./import-state";

export interface TargetStepProps {
  readonly document: RunDocument;
  readonly facts: ImportFacts;
  readonly choices: ImportChoices;
  readonly onChange: (patch: Partial<ImportChoices>) => void;
}

/** Where the points go: the whole line anew, or one run of it. */
export function TargetStep({ document, facts, onChange }: TargetStepProps) {
  const { target, runs } = facts;
  const there = document.runs.reduce((sum, run) => sum + run.points.length, 0);
  const set = (next: ImportTarget): void => onChange({ target: next });
  const run = target.kind === "run" ? target : { kind: "run" as const, fileRun: runs[0] ?? "", runId: document.runs[0]?.id ?? "", where: "after" as const };
  const kinds = [
    { value: "after", label: "after the points of a run" }, { value: "instead", label: "instead of the points of a run" },
    { value: "line", label: there === 0 ? "as the whole line" : `as the whole line, instead of its ${countWords(there)} points` },
  ];
  return (
    <>
      <div className="grid gap-x-4 gap-y-3 sm:grid-cols-3">
        <Select label="Put them" options={kinds} value={target.kind === "line" ? "line" : target.where} onChange={(event) => set(event.target.value === "line" ? { kind: "line" } : { ...run, where: event.target.value as "after" | "instead" })} />
        {target.kind === "run" && runs.length > 1 ? (
          <Select label="Run of the file" options={runs.map((name) => ({ value: name, label: name || "main" }))} value={target.fileRun} onChange={(event) => set({ ...run, fileRun: event.target.value })} />
        ) : null}
        {target.kind === "run" ? (
          <Select label="Run of the line" options={document.runs.map((each, index) => ({ value: each.id, label: runLabel(each.name, index, each.points.length) }))} value={target.runId} onChange={(event) => set({ ...run, runId: event.target.value })} />
        ) : null}
      </div>
      {there > 0 && (target.kind === "line" || target.where === "instead") ? (
        <Notice tone="caution" className="mt-3">Points that the file does not name go, and what the file does not hold of the others with them. One Undo brings all of it back.</Notice>
      ) : null}
    </>
  );
}

function runLabel(name: string, index: number, points: number): string {
  return `${name || (index === 0 ? "main run" : `branch ${index}`)}, ${countWords(points)} ${points === 1 ? "point" : "points"}`;
}
