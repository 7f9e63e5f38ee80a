"use client";
import clsx from "clsx";
import { memo } from "react";
import type { Point, Severity, UnitSystem } from "@/iso";
import { cellEcho, cellText, COLUMNS, type Column, type RowFacts } from "./cell-commit";
import { useEditor } from "./editor-context";
import type { Draft, TypingEcho } from "./editor-types";
import { GridCell } from "./grid-cell";

export const GRID_COLUMNS = "sm:grid-cols-[2.75rem_minmax(9.5rem,1.7fr)_minmax(7.5rem,1.3fr)_minmax(4.75rem,0.7fr)_minmax(6rem,0.8fr)_minmax(4.5rem,0.9fr)]";

/** A row out of sight is neither laid out nor painted; the row of the cursor may let its list hang out. */
const RESTING = "[content-visibility:auto] [contain-intrinsic-size:auto_3.75rem] max-sm:[contain-intrinsic-size:auto_13rem]";

export interface PointRowProps {
  readonly runId: string;
  readonly row: number;
  /** null = the empty row at the run's end. */
  readonly point: Point | null;
  /** Index of the row in the whole grid, from 1, counting the head. */
  readonly ariaRow: number;
  readonly units: UnitSystem;
  readonly nearSide: "in" | "out";
  /** Name of the row this last row of a run meets; null elsewhere. */
  readonly meets: string | null;
  /** First and last column of the block in this row, -1 without one. */
  readonly blockFrom: number;
  readonly blockTo: number;
  readonly drafts: Readonly<Partial<Record<Column, Draft>>> | null;
  readonly cursor: Column | null;
  readonly typing: TypingEcho | null;
  readonly severity: Severity | null;
  readonly firstOfGrid: boolean;
  readonly lastOfGrid: boolean;
  /** 0 = the main run; n = its nth branch. */
  readonly branch: number;
}

/** One point of a run; on a narrow screen the row is a card with the same cells. */
export const PointRow = memo(function PointRow(props: PointRowProps) {
  const { point, row, cursor, branch } = props;
  const name = `${point ? "" : "new "}row ${row + 1}${branch > 0 ? ` of branch ${branch}` : ""}`;
  return (
    <div
      role="row"
      aria-rowindex={props.ariaRow}
      aria-selected={cursor !== null}
      data-row={point?.id ?? "new"}
      className={clsx(
        "grid grid-cols-2 border-b border-hair max-sm:mb-2 max-sm:border max-sm:p-1",
        GRID_COLUMNS,
        cursor !== null ? "bg-dye-tint max-sm:border-dye" : RESTING,
      )}
    >
      <RowNumber {...props} name={name} />
      {COLUMNS.map((column, i) => (
        <GridCell
          key={column}
          runId={props.runId}
          row={row}
          column={column}
          rowName={name}
          text={props.drafts?.[column]?.text ?? (point ? cellText(point, column, factsOf(props)) : "")}
          echo={point ? echoOf(props, point, column) : ""}
          placeholder={placeholderOf(props, column)}
          draft={props.drafts?.[column] ?? null}
          active={cursor === column}
          inBlock={i >= props.blockFrom && i <= props.blockTo}
          typing={cursor === column ? props.typing : null}
          first={props.firstOfGrid && i === 0}
          last={props.lastOfGrid && i === COLUMNS.length - 1}
        />
      ))}
    </div>
  );
});

function factsOf({ nearSide, units, meets }: PointRowProps): RowFacts {
  return { nearSide, units, meets };
}

function echoOf(props: PointRowProps, point: Point, column: Column): string {
  const words = cellEcho(point, column, factsOf(props));
  return column === "move" && words === "" && props.row === 0 && props.branch === 0 ? "at the datum 0, 0, 0" : words;
}

function placeholderOf({ point, row, branch, units }: PointRowProps, column: Column): string {
  if (column === "item") return point ? "" : "wn, tee, gate";
  if (column !== "move" || (point && (row > 0 || branch > 0))) return "";
  if (row === 0 && branch === 0) return "start: 0, 0, 0";
  return units === "imperial" ? "e 3-1 1/2" : "e 775";
}

/** The row's number; pressing it picks the row out, with Shift up to there. Under it the worst finding; on a phone the row's buttons. */
function RowNumber({ point, row, severity, name, runId, cursor, blockFrom }: PointRowProps & { readonly name: string }) {
  const { send, readOnly } = useEditor();
  const target = { runId, row, column: "move" as const };
  return (
    <div role="rowheader" aria-colindex={1} className="figure flex items-center gap-2 px-1 pt-1.5 text-sm text-soft max-sm:col-span-2 max-sm:text-base sm:flex-col sm:gap-0.5">
      <button
        type="button"
        tabIndex={-1}
        aria-label={`Pick out ${name}`}
        aria-pressed={blockFrom >= 0}
        onClick={(event) => (event.shiftKey ? send({ type: "stretch", target, rows: true }) : send({ type: "pick-rows", runId, from: row, to: row }))}
        className={clsx("min-w-7 max-sm:min-h-11 max-sm:min-w-11 max-sm:border max-sm:border-hair", blockFrom >= 0 ? "bg-dye text-white" : "hover:bg-dye-tint")}
      >
        {row + 1}
      </button>
      {severity ? <ProblemMark severity={severity} /> : null}
      {point && cursor !== null && !readOnly ? (
        <span className="ml-auto flex gap-1 font-sans sm:hidden">
          <RowButton label="Row above" onPress={() => send({ type: "row-insert", target })} />
          <RowButton label="Remove" onPress={() => send({ type: "row-remove", target })} />
        </span>
      ) : null}
    </div>
  );
}

function RowButton({ label, onPress }: { readonly label: string; readonly onPress: () => void }) {
  return (
    <button type="button" tabIndex={-1} onClick={onPress} className="min-h-11 border border-rule bg-sheet px-3 text-sm text-ink">
      {label}
    </button>
  );
}

const SEVERITY_WORD: Readonly<Record<Severity, string>> = { stop: "stops the sheet", warning: "to look at", note: "remark" };

/** Stop: filled triangle; warning: open triangle; note: small ring. */
export function ProblemMark({ severity }: { readonly severity: Severity }) {
  const ink = severity === "stop" ? "text-alert" : severity === "warning" ? "text-caution" : "text-dye";
  return (
    <span className={clsx("inline-block align-middle", ink)}>
      <span className="sr-only">, {SEVERITY_WORD[severity]}</span>
      <svg aria-hidden viewBox="0 0 16 16" className="inline size-4" fill={severity === "stop" ? "currentColor" : "none"} stroke="currentColor" strokeWidth="1.8">
        {severity === "note" ? <circle cx="8" cy="8" r="5" /> : <path d="M8 2 15 14H1z" />}
      </svg>
    </span>
  );
}
