"use client";
import clsx from "clsx";
import { memo, useId } from "react";
import type { Column } from "./cell-commit";
import type { TypingEcho } from "./editor-types";
import { ItemPicker } from "./item-picker";
import { useCellTyping, type TypedCell } from "./use-cell-typing";

export const COLUMN_LABEL: Readonly<Record<Column, string>> = {
  move: "Move", item: "Item", joint: "Joint", source: "Source", note: "Note",
};
const COLUMN_INDEX: Readonly<Record<Column, number>> = { move: 2, item: 3, joint: 4, source: 5, note: 6 };

/** A sentence longer than its column hangs over the rows below while its cell is the current one. */
const HANGING = "sm:absolute sm:top-[calc(100%-1.1rem)] sm:z-20 sm:w-72 sm:max-w-none sm:border sm:border-alert sm:bg-sheet sm:py-1.5 sm:shadow-md";

export interface GridCellProps extends TypedCell {
  /** Name of the row for a screen reader: "row 3". */
  readonly rowName: string;
  readonly echo: string;
  readonly placeholder: string;
  /** Within a block of several cells. */
  readonly inBlock: boolean;
  readonly typing: TypingEcho | null;
}

/** One cell: an entry field that takes the text, shows how it was understood, and keeps a text it did not understand. */
export const GridCell = memo(function GridCell(props: GridCellProps) {
  const { column, active, draft, rowName } = props;
  const id = useId();
  const cell = useCellTyping(props);
  const message = cell.typed === null ? (draft?.message ?? null) : null;
  const echo = cell.typed !== null ? (props.typing?.words ?? "") : props.echo;
  const unclear = cell.typed !== null && props.typing !== null && !props.typing.ok;
  return (
    <div role="gridcell" aria-colindex={COLUMN_INDEX[column]} aria-selected={props.inBlock || undefined} className={clsx("relative min-w-0 border-hair px-1 py-1 sm:border-l", props.inBlock && "bg-dye/15", column === "move" && "max-sm:col-span-2")}>
      <span aria-hidden className="cell-label block px-1 sm:hidden">
        {COLUMN_LABEL[column]}
      </span>
      <input
        {...cell.input}
        id={id}
        data-cell={`${props.runId}|${props.row}|${column}`}
        aria-label={`${COLUMN_LABEL[column]}, ${rowName}`}
        aria-describedby={`${id}-echo`}
        aria-invalid={message ? true : undefined}
        {...(column === "item" ? { role: "combobox", "aria-expanded": cell.list.length > 0, "aria-controls": `${id}-list`, "aria-autocomplete": "list" as const, "aria-activedescendant": cell.picked === null ? undefined : `${id}-list-${cell.picked}` } : {})}
        placeholder={cell.input.readOnly ? "" : props.placeholder}
        tabIndex={active ? 0 : -1}
        autoComplete="off"
        autoCapitalize="none"
        autoCorrect="off"
        spellCheck={column === "note"}
        enterKeyHint="next"
        className={clsx(
          "w-full min-w-0 border px-1.5 py-1 leading-6 -outline-offset-1 max-sm:min-h-11 max-sm:text-base placeholder:text-soft/85",
          column === "move" || column === "item" ? "figure text-[0.9375rem]" : "text-sm",
          message ? "border-alert bg-alert-tint" : active ? "border-dye bg-sheet" : "border-transparent bg-transparent hover:border-rule max-sm:border-hair",
        )}
      />
      <p id={`${id}-echo`} role={message ? "alert" : undefined} className={clsx("px-1.5 text-xs leading-[1.1rem] max-sm:empty:hidden sm:min-h-[1.1rem]", message ? clsx("font-medium text-alert", active ? [HANGING, column === "move" || column === "item" ? "sm:left-1" : "sm:right-1"] : "sm:line-clamp-2") : unclear ? "text-caution" : "text-soft")}>
        {message ?? echo}
      </p>
      {cell.list.length > 0 ? <ItemPicker id={`${id}-list`} words={cell.list} picked={cell.picked} grouped={cell.grouped} onTake={cell.take} /> : null}
    </div>
  );
});
