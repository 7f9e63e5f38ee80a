"use client";
import { useMemo, useState } from "react";
import { compareText, nextSort, type SortState } from "@/components/ui/table";

export interface ListOptions<Row> {
  readonly rows: readonly Row[];
  /** Text searched in. */
  readonly textOf: (row: Row) => string;
  /** What each sortable column sorts by. */
  readonly keys: Readonly<Record<string, (row: Row) => string | number>>;
  readonly start: SortState;
  readonly keep?: (row: Row) => boolean;
}

/** Search (every word must occur) and sort of a list held in the browser. */
export function useList<Row>({ rows, textOf, keys, start, keep }: ListOptions<Row>) {
  const [search, setSearch] = useState("");
  const [sort, setSort] = useState(start);
  const shown = useMemo(() => {
    const words = search.toLowerCase().split(/\s+/).filter(Boolean);
    const matching = rows.filter(
      (row) => (keep?.(row) ?? true) && words.every((word) => textOf(row).toLowerCase().includes(word)),
    );
    const key = keys[sort.key];
    if (!key) return matching;
    const ordered = [...matching].sort((a, b) => compareKeys(key(a), key(b)));
    return sort.descending ? ordered.reverse() : ordered;
  }, [rows, search, sort, textOf, keys, keep]);
  return { shown, search, setSearch, sort, sortBy: (key: string) => setSort((now) => nextSort(now, key)) };
}

function compareKeys(a: string | number, b: string | number): number {
  return typeof a === "number" && typeof b === "number" ? a - b : compareText(String(a), String(b));
}
