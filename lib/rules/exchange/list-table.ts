/** A list as it leaves the house: columns with their kind, rows of values, and the facts that say what it is a list of. */
import { STATE_WORDS, type SheetInput } from "@/iso";
import type { Cell } from "./csv-cells";

export interface ListColumn {
  /** With its unit where it has one. */
  readonly head: string;
  /** In characters. */
  readonly width: number;
}

export interface ListTable {
  readonly title: string;
  readonly columns: readonly ListColumn[];
  readonly rows: readonly (readonly Cell[])[];
  /** Label and value, in order: line, revision, state, units. */
  readonly facts: readonly (readonly [string, string])[];
  /** Cautions, which stand at the head. */
  readonly cautions: readonly string[];
}

/** State of a sheet in words, HOLD first: "HOLD, FOR FABRICATION". */
export function stateText({ revision }: SheetInput): string {
  return `${revision.hold ? "HOLD, " : ""}${STATE_WORDS[revision.state]}`;
}

/** Columns at the end of every row, so that a row cut from its file still says what it is of. */
export const ORIGIN_COLUMNS: readonly ListColumn[] = [
  { head: "Line", width: 16 }, { head: "Spool", width: 8 }, { head: "Sheet", width: 12 }, { head: "Revision", width: 10 }, { head: "State", width: 20 },
];

export function originCells(input: SheetInput): readonly Cell[] {
  const { sheetNumber, code, state } = input.revision;
  return [input.document.number, input.spool, sheetNumber || "not numbered", state === "draft" ? "none" : code, stateText(input)];
}

/** What a list is of, for the head of a workbook. */
export function originFacts(inputs: readonly SheetInput[]): ListTable["facts"] {
  const first = inputs[0];
  if (!first) return [];
  const each = (of: (input: SheetInput) => string): string => [...new Set(inputs.map(of))].join(", ");
  return [
    ["Shop", first.titleBlock.shopName], ["Job", first.titleBlock.jobNumber], ["Line", first.document.number],
    ["Spool", each((input) => input.spool)],
    ["Sheet", each((input) => input.revision.sheetNumber || "not numbered")],
    ["Revision", each((input) => (input.revision.state === "draft" ? "none" : input.revision.code))],
    ["State", each(stateText)],
    ["Units", first.units === "metric" ? "millimetres, kilograms" : "inches, pounds"],
  ];
}

/** Foot of every sheet, and so of every list (TRADE: the tool is a layout and records aid). */
export const LAYOUT_CAUTION = "A layout and records aid: code, WPS, design and acceptance come from the engineer, the owner and local law. Uncontrolled copy.";

/** The list as rows of a CSV file: head, then one record a row. */
export function listRows(table: ListTable): readonly (readonly Cell[])[] {
  return [table.columns.map((column) => column.head), ...table.rows];
}
