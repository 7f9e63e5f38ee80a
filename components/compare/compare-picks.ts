/** Which rows of the list belong to what is drawn, and the other way round. Pure. */
import type { CompareRow, DisplayItem, Ref } from "@/iso";

/** Which drawing: the earlier one, the later one, or both in one frame. */
export type DrawingSide = "before" | "after" | "both";

const keyOf = ({ kind, id }: Ref): string => `${kind}:${id}`;

function refsOf(row: CompareRow, side: DrawingSide): readonly Ref[] {
  const led = row.at ? [row.at] : [];
  if (side === "both") return [...row.refsBefore, ...row.refsAfter, ...led];
  return [...(side === "before" ? row.refsBefore : row.refsAfter), ...led];
}

/** Rows by what a drawing shows of them. */
export function rowsByRef(rows: readonly CompareRow[], side: DrawingSide): ReadonlyMap<string, readonly number[]> {
  const found = new Map<string, number[]>();
  for (const row of rows) for (const key of new Set(refsOf(row, side).map(keyOf))) found.set(key, [...(found.get(key) ?? []), row.no]);
  return found;
}

/** Hatching and boxes of an offset: a band under each of their lines would bury the pipe. */
const BEHIND: ReadonlySet<string> = new Set(["hatch", "box", "halo"]);

/** Items of a drawing that belong to any of the rows. */
export function pickedItems(items: readonly DisplayItem[], rows: readonly CompareRow[], side: DrawingSide, picked: ReadonlySet<number>): readonly DisplayItem[] {
  if (picked.size === 0) return [];
  const keys = new Set(rows.filter((row) => picked.has(row.no)).flatMap((row) => refsOf(row, side).map(keyOf)));
  return items.filter((item) => item.ref !== null && !BEHIND.has(item.layer) && keys.has(keyOf(item.ref)));
}

/** The row a press on a part picks: the next one of those it belongs to, so that a second press goes on. */
export function nextRow(numbers: readonly number[], current: number | null): number | null {
  const at = current === null ? -1 : numbers.indexOf(current);
  return numbers[(at + 1) % Math.max(1, numbers.length)] ?? null;
}
