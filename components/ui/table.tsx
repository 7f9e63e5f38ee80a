"use client";
import clsx from "clsx";
import type { ReactNode } from "react";

export interface Column<Row> {
  readonly key: string;
  /** Column head; also stands before the value on a narrow screen. "" = the cell speaks for itself. */
  readonly head: string;
  readonly cell: (row: Row) => ReactNode;
  /** Numbers: Roboto Mono, set right. */
  readonly figure?: boolean;
  /** May be sorted by; the caller sorts. */
  readonly sortable?: boolean;
  readonly className?: string;
}

export interface SortState {
  readonly key: string;
  readonly descending: boolean;
}

export interface TableProps<Row> {
  /** What the table lists; read out by screen readers. */
  readonly caption: string;
  readonly columns: readonly Column<Row>[];
  readonly rows: readonly Row[];
  readonly rowKey: (row: Row) => string;
  readonly sort?: SortState;
  readonly onSort?: (key: string) => void;
  readonly className?: string;
}

/** A ruled table; on a narrow screen each row becomes a block of named lines. */
export function Table<Row>({ caption, columns, rows, rowKey, sort, onSort, className }: TableProps<Row>) {
  return (
    <table role="table" data-stack className={clsx("ruled", className)}>
      <caption className="sr-only">{caption}</caption>
      <thead role="rowgroup">
        <tr role="row">
          {columns.map((column) => (
            <HeadCell key={column.key} column={column} sort={sort} onSort={onSort} />
          ))}
        </tr>
      </thead>
      <tbody role="rowgroup">
        {rows.map((row) => (
          <tr role="row" key={rowKey(row)}>
            {columns.map((column) => (
              <td
                key={column.key}
                role="cell"
                data-label={column.head}
                data-figure={column.figure || undefined}
                className={clsx(column.figure && "figure", column.className)}
              >
                <div className="min-w-0">{column.cell(row)}</div>
              </td>
            ))}
          </tr>
        ))}
      </tbody>
    </table>
  );
}

function HeadCell<Row>({
  column,
  sort,
  onSort,
}: {
  column: Column<Row>;
  sort: SortState | undefined;
  onSort: ((key: string) => void) | undefined;
}) {
  const active = sort?.key === column.key;
  const direction = active ? (sort.descending ? "descending" : "ascending") : undefined;
  if (!column.sortable || !onSort) {
    return (
      <th role="columnheader" scope="col" data-figure={column.figure || undefined}>
        <span className="-my-1 inline-flex min-h-9 items-center">
          {column.head || <span className="sr-only">Actions</span>}
        </span>
      </th>
    );
  }
  return (
    <th
      role="columnheader"
      scope="col"
      aria-sort={direction ?? "none"}
      data-figure={column.figure || undefined}
    >
      <button
        type="button"
        onClick={() => onSort(column.key)}
        className={clsx(
          "-my-1 inline-flex min-h-9 items-center gap-1 font-medium hover:text-dye",
          active && "text-dye",
        )}
      >
        {column.head}
        <svg aria-hidden viewBox="0 0 10 10" className={clsx("size-2.5", !active && "opacity-40")}>
          <path d={active && sort.descending ? "M1 3h8L5 8z" : "M1 7h8L5 2z"} fill="currentColor" />
        </svg>
      </button>
    </th>
  );
}

/** Next sort after a press on a column's head: the same column turns round, another starts ascending. */
export function nextSort(sort: SortState, key: string): SortState {
  return sort.key === key ? { key, descending: !sort.descending } : { key, descending: false };
}

/** Compares texts as a person would file them: 2 before 10, capitals beside small letters. */
export function compareText(a: string, b: string): number {
  return a.localeCompare(b, "en-US", { numeric: true, sensitivity: "base" });
}
