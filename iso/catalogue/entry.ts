/** One tabulated take-out, and how the tables' rows become them. */
import type { Nps } from "../run/document";
import type { Memory, SizeRow } from "./row";

/** One tabulated take-out. Inches null = the tables read have millimetres only; mm null = inches only. */
export interface Entry {
  readonly key: string;
  /** What it is, in the trade's words: "LR 90 elbow NPS 4, centre to end". */
  readonly words: string;
  readonly inches: number | null;
  readonly mm: number | null;
  readonly fromMemory: Memory;
  readonly source: string;
}

/** An entry; one from memory says so in its source and names no page it was not read from. */
export function entryOf(key: string, words: string, inches: number | null, mm: number | null, fromMemory: Memory, source: string): Entry {
  return { key, words, inches, mm, fromMemory, source: fromMemory === "yes" ? `${source.split(" (")[0]} (from memory)` : source };
}

/** Entries of a table by size. */
export function sizeEntries(rows: readonly SizeRow[], keyOf: (nps: Nps) => string, wordsOf: (nps: Nps) => string): Entry[] {
  return rows.map((r) => entryOf(keyOf(r.nps), wordsOf(r.nps), r.inches, r.mm, r.fromMemory, r.source));
}
