"use client";
import { memo } from "react";
import type { Problem, RunDocument, Severity } from "@/iso";
import type { CellTarget } from "./cell-commit";
import { pointPlace } from "./document-edits";
import type { Draft } from "./editor-types";
import { COLUMN_LABEL } from "./grid-cell";
import { ProblemMark } from "./point-row";
import { countText } from "@/components/ui/format";

export interface ProblemListProps {
  readonly document: RunDocument;
  readonly problems: readonly Problem[];
  readonly waiting: readonly { readonly target: CellTarget; readonly draft: Draft }[];
  /** The current row's point: its findings stand first. */
  readonly activePointId: string | null;
  readonly onPoint: (pointId: string) => void;
  readonly onCell: (target: CellTarget) => void;
}

const ORDER: Readonly<Record<Severity, number>> = { stop: 0, warning: 1, note: 2 };

/** Findings in plain words, what stops the sheet first; each leads to its point. */
export const ProblemList = memo(function ProblemList({ document, problems, waiting, activePointId, onPoint, onCell }: ProblemListProps) {
  const here = (problem: Problem): number => (activePointId !== null && problem.pointId === activePointId ? 0 : 1);
  const sorted = [...problems].sort((a, b) => here(a) - here(b) || ORDER[a.severity] - ORDER[b.severity]);
  const stops = sorted.filter((problem) => problem.severity === "stop").length + waiting.length;
  if (sorted.length + waiting.length === 0) return <p className="py-2 text-soft">Nothing found. Verify by tape all the same.</p>;
  return (
    <>
      <p className="py-1 text-sm text-soft">{stops > 0 ? `${countText(stops, "finding")} stop${stops === 1 ? "s" : ""} the sheet.` : "Nothing here stops the sheet."}</p>
      <ul className="divide-y divide-hair border-y border-hair [contain-intrinsic-size:auto_20rem] [content-visibility:auto]">
        {waiting.map(({ target, draft }) => (
          <Finding key={`${target.runId}${target.row}${target.column}`} severity="stop" place={`${COLUMN_LABEL[target.column]}, row ${target.row + 1}`} text={`"${draft.text}" is not taken yet: ${draft.message}`} onPress={() => onCell(target)} />
        ))}
        {sorted.map((problem, i) => (
          <Finding
            key={`${problem.code}${problem.pointId ?? ""}${i}`}
            severity={problem.severity}
            here={here(problem) === 0}
            place={/^point \d/i.test(problem.text) ? "" : placeName(document, problem.pointId)}
            text={problem.text}
            onPress={problem.pointId ? () => onPoint(problem.pointId ?? "") : null}
          />
        ))}
      </ul>
    </>
  );
});

function Finding({ severity, here = false, place, text, onPress }: { readonly severity: Severity; readonly here?: boolean; readonly place: string; readonly text: string; readonly onPress: (() => void) | null }) {
  const words = (
    <>
      <span className="mt-0.5 shrink-0">
        <ProblemMark severity={severity} />
      </span>
      <span className="min-w-0 flex-1">
        {text} {place ? <span className="whitespace-nowrap text-soft">({place})</span> : null}
      </span>
    </>
  );
  return (
    <li data-here={here || undefined} className={here ? "bg-dye-tint px-1" : undefined}>
      {onPress ? (
        <button type="button" onClick={onPress} className="flex min-h-11 w-full gap-2 py-2 text-left hover:bg-dye-tint">
          {words}
        </button>
      ) : (
        <p className="flex gap-2 py-2">{words}</p>
      )}
    </li>
  );
}

/** "row 4", or "row 2 of a branch". */
export function placeName(document: RunDocument, pointId: string | null): string {
  const place = pointId === null ? null : pointPlace(document, pointId);
  if (!place) return "";
  return place.runId === document.runs[0]?.id ? `row ${place.row + 1}` : `row ${place.row + 1} of a branch`;
}
