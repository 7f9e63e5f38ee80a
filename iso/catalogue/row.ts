/** Shapes shared by the tables, and the small builders that turn compact tuples into rows with a source each. */
import type { Nps } from "../run/document";

/** "no": read in a source. "partial": from memory, checked against a second column. "yes": from memory, unchecked. */
export type Memory = "no" | "partial" | "yes";

/** NPS, inches, millimetres (null where no table was read), from memory, index of the source. */
export type SizeTuple = readonly [Nps, number, number | null, Memory, number];

export interface SizeRow {
  readonly nps: Nps;
  readonly inches: number;
  readonly mm: number | null;
  readonly fromMemory: Memory;
  readonly source: string;
}

/** Large or run size, small or branch size, inches, millimetres, from memory, index of the source. */
export type PairTuple = readonly [Nps, Nps, number, number | null, Memory, number];

export interface PairRow {
  readonly large: Nps;
  readonly small: Nps;
  readonly inches: number;
  readonly mm: number | null;
  readonly fromMemory: Memory;
  readonly source: string;
}

/** Rows from tuples; a programmer's wrong source index throws at load. */
export function sizeRows(tuples: readonly SizeTuple[], sources: readonly string[]): readonly SizeRow[] {
  return tuples.map(([nps, inches, mm, fromMemory, source]) => ({ nps, inches, mm, fromMemory, source: named(sources, source) }));
}

export function pairRows(tuples: readonly PairTuple[], sources: readonly string[]): readonly PairRow[] {
  return tuples.map(([large, small, inches, mm, fromMemory, source]) => ({
    large, small, inches, mm, fromMemory, source: named(sources, source),
  }));
}

function named(sources: readonly string[], index: number): string {
  const source = sources[index];
  if (!source) throw new Error(`catalogue row without a source (${index})`);
  return source;
}
