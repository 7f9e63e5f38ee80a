"use client";
import clsx from "clsx";
import { memo, useEffect, useMemo, useRef, type RefObject } from "react";
import type { Problem, Run, RunDocument, Severity } from "@/iso";
import { COLUMNS, nearSideAt, type Column } from "./cell-commit";
import { blockOf, isBlock } from "./block";
import { rowCount } from "./cursor-steps";
import { pointPlace } from "./document-edits";
import { useEditor } from "./editor-context";
import type { Draft, EditorState } from "./editor-types";
import { COLUMN_LABEL } from "./grid-cell";
import { itemEcho } from "./item-text";
import { GRID_COLUMNS, PointRow } from "./point-row";
import { meetsAt } from "./loop-entry";
import { pointUnder } from "./pointed-store";
import { isTouchScreen } from "./touch-screen";

export interface PointGridProps {
  readonly state: EditorState;
  readonly problems: readonly Problem[];
}

/** The keyboard grid: a group of rows per run, each ending in an empty row that takes the next point. */
export function PointGrid({ state, problems }: PointGridProps) {
  const box = useRef<HTMLDivElement>(null);
  const { pointed } = useEditor();
  useCursorFocus(box, state);
  const severities = useMemo(() => worstByPoint(problems), [problems]);
  const drafts = useMemo(() => draftsByRow(state.drafts), [state.drafts]);
  const { document, emptyRows } = state;
  const firstRows = useMemo(() => document.runs.map((_, index) => rowsBefore(document, index, emptyRows) + 1), [document, emptyRows]);
  return (
    <div ref={box} onPointerOver={(event) => pointed.set(pointUnder(event.target))} onPointerLeave={() => pointed.set(null)} role="grid" aria-label={`Points of line ${document.number}`} aria-multiselectable aria-rowcount={rowsBefore(document, document.runs.length, emptyRows)} aria-colcount={COLUMNS.length + 1} className="min-w-0">
      <GridHead />
      {document.runs.map((run, index) => (
        <RunRows key={run.id} run={run} index={index} first={firstRows[index] ?? 2} state={state} severities={severities} drafts={drafts} last={index === document.runs.length - 1} />
      ))}
    </div>
  );
}

/** Rows of the grid before a run, the head counted. */
function rowsBefore(document: RunDocument, index: number, emptyRows: boolean): number {
  return document.runs.slice(0, index).reduce((sum, run) => sum + rowCount(run, emptyRows), 1);
}

const GridHead = memo(function GridHead() {
  return (
    <div role="row" aria-rowindex={1} className={clsx("sticky top-0 z-10 hidden border-b border-ink bg-paper sm:grid", GRID_COLUMNS)}>
      <div role="columnheader" aria-colindex={1} className="cell-label px-1 py-1.5 text-center">
        No.
      </div>
      {COLUMNS.map((column, i) => (
        <div key={column} role="columnheader" aria-colindex={i + 2} className="cell-label border-l border-hair px-2.5 py-1.5">
          {COLUMN_LABEL[column]}
        </div>
      ))}
    </div>
  );
});

interface RunRowsProps {
  readonly run: Run;
  readonly index: number;
  readonly first: number;
  readonly state: EditorState;
  readonly severities: ReadonlyMap<string, Severity>;
  readonly drafts: ReadonlyMap<string, Readonly<Partial<Record<Column, Draft>>>>;
  readonly last: boolean;
}

function RunRows({ run, index, first, state, severities, drafts, last }: RunRowsProps) {
  const { document, cursor, typing } = state;
  const block = blockOf(state);
  const shown = block.runId === run.id && isBlock(state);
  const inBlock = (row: number): boolean => shown && row >= block.fromRow && row <= block.toRow;
  const rows = Array.from({ length: rowCount(run, state.emptyRows) }, (_, row) => run.points[row] ?? null);
  return (
    <div role="rowgroup" aria-label={index === 0 ? "Main run" : branchName(document, run)}>
      {index > 0 ? (
        <div role="presentation" className="border-b border-ink bg-shade px-2 py-1.5 text-sm font-medium">
          {branchName(document, run)}
        </div>
      ) : null}
      {rows.map((point, row) => {
        const here = cursor.runId === run.id && cursor.row === row;
        return (
          <PointRow
            key={point?.id ?? state.nextIds[run.id] ?? "new"}
            runId={run.id}
            row={row}
            point={point}
            ariaRow={first + row}
            units={document.settings.units}
            nearSide={nearSideAt(document, run.id, row)}
            meets={meetsAt(document, run.id, row)}
            blockFrom={inBlock(row) ? block.fromColumn : -1}
            blockTo={inBlock(row) ? block.toColumn : -1}
            drafts={drafts.get(point?.id ?? `${run.id}:new`) ?? null}
            cursor={here ? cursor.column : null}
            typing={here ? typing : null}
            severity={point ? (severities.get(point.id) ?? null) : null}
            firstOfGrid={index === 0 && row === 0}
            lastOfGrid={last && row === rows.length - 1}
            branch={index}
          />
        );
      })}
    </div>
  );
}

/** "Branch from row 4, tee" with the size it takes. */
export function branchName(document: RunDocument, run: Run): string {
  const place = run.from === null ? null : pointPlace(document, run.from);
  const from = place ? document.runs.find((each) => each.id === place.runId)?.points[place.row] : null;
  if (!place || !from) return run.name || "Branch from a point that is gone";
  const item = itemEcho(from.item);
  const nested = place.runId === document.runs[0]?.id ? "" : ` of ${document.runs.find((each) => each.id === place.runId)?.name || "its branch"}`;
  return `${branchHead(run.name)}from row ${place.row + 1}${nested}: ${item || "no branch item there"}`;
}

/** "Branch ", or its own name: "Drain, branch ", "Branch to CH-1, ". */
function branchHead(name: string): string {
  if (name === "") return "Branch ";
  return /branch/i.test(name) ? `${name}, ` : `${name}, branch `;
}

const RANK: Readonly<Record<Severity, number>> = { stop: 2, warning: 1, note: 0 };

function worstByPoint(problems: readonly Problem[]): ReadonlyMap<string, Severity> {
  const worst = new Map<string, Severity>();
  for (const { pointId, severity } of problems) {
    const now = pointId === null ? null : worst.get(pointId);
    if (pointId !== null && (!now || RANK[severity] > RANK[now])) worst.set(pointId, severity);
  }
  return worst;
}

/** Drafts by row key; a row without any keeps its memo. */
function draftsByRow(drafts: EditorState["drafts"]): ReadonlyMap<string, Readonly<Partial<Record<Column, Draft>>>> {
  const rows = new Map<string, Partial<Record<Column, Draft>>>();
  for (const [key, draft] of Object.entries(drafts)) {
    const cut = key.lastIndexOf(":");
    const row = key.slice(0, cut);
    rows.set(row, { ...rows.get(row), [key.slice(cut + 1)]: draft });
  }
  return rows;
}

/** Moves the focus to the cursor's cell whenever an action asked for it, and on opening where that raises no keyboard. */
function useCursorFocus(box: RefObject<HTMLDivElement | null>, { cursor, focusTurn }: EditorState): void {
  const seen = useRef(-1);
  useEffect(() => {
    const opening = seen.current === -1;
    if (seen.current === focusTurn) return;
    seen.current = focusTurn;
    if (opening && isTouchScreen()) return;
    const cell = box.current?.querySelector<HTMLInputElement>(`[data-cell="${cursor.runId}|${cursor.row}|${cursor.column}"]`);
    if (!cell) return;
    cell.focus({ preventScroll: true });
    cell.select();
    if (!opening) cell.closest('[role="row"]')?.scrollIntoView?.({ block: "nearest" });
  }, [box, cursor, focusTurn]);
}
