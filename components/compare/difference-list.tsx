"use client";
import clsx from "clsx";
import { useEffect, useRef, type KeyboardEvent } from "react";
import { compareRowName, type CompareRow } from "@/iso";

const KINDS: Readonly<Record<CompareRow["kind"], string>> = { added: "+ Added", removed: "− Removed", moved: "Moved", changed: "Changed" };

export interface DifferenceListProps {
  readonly rows: readonly CompareRow[];
  readonly current: number | null;
  readonly pointed: number | null;
  readonly onCurrent: (no: number | null) => void;
  readonly onPointed: (no: number | null) => void;
}

/** The differences in words, numbered as on the overlay. Up and down go from row to row, Escape lets go. */
export function DifferenceList({ rows, current, pointed, onCurrent, onPointed }: DifferenceListProps) {
  const list = useRef<HTMLOListElement>(null);
  useEffect(() => {
    if (current !== null) list.current?.querySelector(`[data-row="${current}"]`)?.scrollIntoView?.({ block: "nearest" });
  }, [current]);
  const onKeyDown = (event: KeyboardEvent): void => {
    const next = keyedRow(event.key, rows, current);
    if (next === undefined) return;
    event.preventDefault();
    onCurrent(next);
    if (next !== null) list.current?.querySelector<HTMLElement>(`[data-row="${next}"] button`)?.focus();
  };
  return (
    <ol ref={list} onKeyDown={onKeyDown} aria-label="Differences" className="max-h-[75dvh] overflow-y-auto border-t border-hair max-xl:max-h-none">
      {rows.map((row) => (
        <li key={row.no} data-row={row.no} className="border-b border-hair">
          <button
            type="button"
            aria-pressed={row.no === current}
            tabIndex={row.no === (current ?? rows[0]?.no) ? 0 : -1}
            onClick={() => onCurrent(row.no === current ? null : row.no)}
            onPointerEnter={(event) => onPointed(event.pointerType === "touch" ? null : row.no)}
            onPointerLeave={() => onPointed(null)}
            className={clsx("grid min-h-11 w-full grid-cols-[2.5rem_minmax(0,1fr)] gap-x-2 border-l-4 px-2 py-2 text-left", row.no === current ? "border-dye bg-dye-tint" : row.no === pointed ? "border-rule bg-shade" : "border-transparent")}
          >
            <span className="figure text-right">{row.no}</span>
            <RowWords row={row} />
          </button>
        </li>
      ))}
    </ol>
  );
}

function RowWords({ row }: { readonly row: CompareRow }) {
  return (
    <span className="min-w-0">
      <strong className="mr-2 whitespace-nowrap">{KINDS[row.kind]}</strong>
      <span className="break-words">{compareRowName(row)}</span>
      {row.before === null ? null : <del className="figure block text-sm break-words text-soft">{row.before}</del>}
      {row.after === null ? null : <ins className="figure block text-sm break-words no-underline">{row.after}</ins>}
      {row.at === null && row.refsBefore.length + row.refsAfter.length === 0 ? <span className="block text-sm text-soft">Not on the drawing</span> : null}
    </span>
  );
}

/** undefined = not a key of the list; null = let go. */
function keyedRow(key: string, rows: readonly CompareRow[], current: number | null): number | null | undefined {
  const at = rows.findIndex((row) => row.no === current);
  switch (key) {
    case "ArrowDown": return rows[Math.min(rows.length - 1, at + 1)]?.no;
    case "ArrowUp": return rows[Math.max(0, at - 1)]?.no;
    case "Home": return rows[0]?.no;
    case "End": return rows.at(-1)?.no;
    case "Escape": return null;
    default: return undefined;
  }
}
