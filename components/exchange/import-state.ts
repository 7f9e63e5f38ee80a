"use client";
/** What the import dialog holds, and everything that follows from it. Only choices are kept; the rest is worked out. */
import { useMemo, useState } from "react";
import type { Provenance, RunDocument } from "@/iso";
import type { Decimal, Separator } from "@/lib/rules/exchange/csv-read";
import { cellShown, tableRefusal, type ImportRow, type ImportTable } from "@/lib/rules/exchange/import-cell";
import { fileRuns, planImport, type FreshIds, type ImportPlan, type ImportTarget } from "@/lib/rules/exchange/plan-import";
import { headsKey, matchRefusal, suggestColumns, suggestForm, suggestUnit, type ColumnMatch } from "@/lib/rules/exchange/point-columns";
import { OWN_UNIT, type FileUnit } from "@/lib/rules/exchange/read-length";
import { readPoints, type PointsRead } from "@/lib/rules/exchange/read-points";
import { recallColumns } from "./column-memory";
import { POINT_READERS } from "./point-words";
import { decimalOf, tablesOf, type FileRead } from "./read-file";

export type GoodFile = Extract<FileRead, { ok: true }>;

export interface ImportChoices {
  readonly separator: Separator;
  readonly sheet: string;
  readonly hasHead: boolean;
  readonly decimal: Decimal;
  readonly match: ColumnMatch;
  readonly unit: FileUnit;
  readonly form: "offset" | "absolute";
  readonly source: Provenance["kind"];
  /** Rows of the file to take, as typed; empty = from its first, to its last. */
  readonly fromRow: string;
  readonly toRow: string;
  readonly target: ImportTarget | null;
  /** Whether the reader said to leave the bad rows out. */
  readonly leaveOut: boolean;
}

export interface ImportFacts {
  readonly tables: readonly ImportTable[];
  readonly heads: readonly string[];
  readonly rows: readonly ImportRow[];
  readonly refusal: string | null;
  readonly read: PointsRead | null;
  readonly runs: readonly string[];
  readonly target: ImportTarget;
  readonly plan: ImportPlan | null;
}

/** Choices to start from: what the heads suggest, or how such a file was matched before. */
export function firstChoices(file: GoodFile, document: RunDocument, kept: Partial<ImportChoices> = {}): ImportChoices {
  const separator = kept.separator ?? (file.kind === "csv" ? file.separator : ",");
  const tables = tablesOf(file, separator);
  const table = tables.find(({ name }) => name === kept.sheet) ?? tables[0];
  const cells = table?.rows[0]?.cells ?? [];
  const hasHead = kept.hasHead ?? suggestColumns(cells.map(cellShown)).some((key) => key !== null);
  const heads = headsOf(table, hasHead);
  const before = recallColumns(headsKey(heads));
  return {
    separator, sheet: table?.name ?? "", hasHead,
    decimal: table ? decimalOf(file, table, separator) : "point",
    match: before?.match ?? suggestColumns(heads),
    unit: before?.unit ?? suggestUnit(heads) ?? OWN_UNIT[document.settings.units],
    form: before?.form ?? suggestForm(heads),
    source: kept.source ?? "from-drawing", fromRow: "", toRow: "", target: null, leaveOut: false,
  };
}

function headsOf(table: ImportTable | undefined, hasHead: boolean): readonly string[] {
  const width = Math.max(0, ...(table?.rows.slice(0, 50).map((row) => row.cells.length) ?? []));
  return Array.from({ length: width }, (_, index) => (hasHead ? cellShown(table?.rows[0]?.cells[index]) : ""));
}

/** Everything that follows from a file and the choices. */
export function useImportFacts(file: GoodFile, choices: ImportChoices, document: RunDocument, by: string, fresh: FreshIds): ImportFacts {
  const { separator, sheet, hasHead, match, unit, decimal, form, source, fromRow, toRow } = choices;
  const [at] = useState(() => new Date().toISOString().slice(0, 10));
  const tables = useMemo(() => tablesOf(file, separator), [file, separator]);
  const table = tables.find(({ name }) => name === sheet) ?? tables[0];
  const heads = useMemo(() => headsOf(table, hasHead), [table, hasHead]);
  const rows = useMemo(() => rowsBetween(table?.rows.slice(hasHead ? 1 : 0) ?? [], fromRow, toRow), [table, hasHead, fromRow, toRow]);
  const refusal = (table ? tableRefusal(table, hasHead ? 1 : 0) : "The file is empty.") ?? matchRefusal(match);
  const { units } = document.settings;
  const read = useMemo(
    () => (refusal ? null : readPoints(rows, { match, heads, unit, decimal, form, source, units, by, at, readers: POINT_READERS })),
    [refusal, rows, match, heads, unit, decimal, form, source, units, by, at],
  );
  const runs = useMemo(() => (read ? fileRuns(read.good) : []), [read]);
  const target = choices.target ?? firstTarget(document, runs);
  const plan = useMemo(() => (read ? planImport(document, read.good, target, fresh) : null), [document, read, target, fresh]);
  return { tables, heads, rows, refusal, read, runs, target, plan };
}

function rowsBetween(rows: readonly ImportRow[], from: string, to: string): readonly ImportRow[] {
  const [first, last] = [Number.parseInt(from, 10) || 0, Number.parseInt(to, 10) || Infinity];
  return rows.filter(({ row }) => row >= first && row <= last);
}

/** An empty line takes the whole file; one with points gets the file's first run after its main run. */
function firstTarget(document: RunDocument, runs: readonly string[]): ImportTarget {
  const points = document.runs.reduce((sum, run) => sum + run.points.length, 0);
  if (points === 0 || runs.length > 1) return { kind: "line" };
  return { kind: "run", fileRun: runs[0] ?? "", runId: document.runs[0]?.id ?? "", where: "after" };
}
