/** Files that leave the house: lists as CSV or XLSX, sheets as SVG or DXF, points as CSV. Nothing is kept of them. */
import { measureText } from "@/fonts/widths";
import { composeSheet, drawingDxf, drawingSvg, type RunDocument, type SheetInput, type SheetSize } from "@/iso";
import { lineExportInputs, spoolExportInput, type Issue } from "@/lib/queries/export-inputs";
import { storedDocument } from "@/lib/queries/stored-line";
import { csvFile, type Cell } from "@/lib/rules/exchange/csv-cells";
import { exportFileName, plainName } from "@/lib/rules/exchange/file-names";
import { listRows, stateText } from "@/lib/rules/exchange/list-table";
import { LIST_TITLES, listTable, type ListName } from "@/lib/rules/exchange/lists";
import { refuseInvalid } from "@/lib/server/errors";
import { inShop } from "@/lib/server/scope";
import type { SessionViewer } from "@/lib/server/session";
import { xlsxFile } from "@/lib/server/xlsx-file";
import { Line } from "@/models";

export interface ExportFile {
  readonly name: string;
  readonly type: string;
  readonly bytes: Uint8Array;
}

export type ListForm = "csv" | "xlsx";
export type DrawingForm = "svg" | "dxf";

export interface DrawingAsked {
  readonly as: DrawingForm;
  readonly of: Issue;
  /** Of a draft; null takes the job's. */
  readonly size: SheetSize | null;
  /** From 1. */
  readonly sheet: number;
}

const TYPES: Readonly<Record<ListForm | DrawingForm, string>> = {
  csv: "text/csv; charset=utf-8",
  xlsx: "application/vnd.openxmlformats-officedocument.spreadsheetml.sheet",
  svg: "image/svg+xml",
  dxf: "image/vnd.dxf",
};

const textBytes = (text: string): Uint8Array => new TextEncoder().encode(text);

/** A list of one spool. @throws Refusal as spoolExportInput does. */
export async function renderSpoolList(viewer: SessionViewer, spoolId: string, what: ListName, as: ListForm, of: Issue): Promise<ExportFile> {
  const now = new Date();
  return listFile([await spoolExportInput(viewer, spoolId, of, now)], what, as, now);
}

/** A list of all spools of a line. @throws Refusal as lineExportInputs does. */
export async function renderLineList(viewer: SessionViewer, lineId: string, what: ListName, as: ListForm, of: Issue): Promise<ExportFile> {
  const now = new Date();
  const inputs = await lineExportInputs(viewer, lineId, of, now);
  if (inputs.length === 0) throw refuseInvalid("The line has no spool yet, so there is nothing to list.");
  return listFile(inputs, what, as, now);
}

async function listFile(inputs: readonly SheetInput[], what: ListName, as: ListForm, now: Date): Promise<ExportFile> {
  const table = listTable(what, inputs);
  const bytes = as === "csv" ? textBytes(csvFile(listRows(table))) : await xlsxFile(table, now);
  const word = LIST_TITLES[what].toLowerCase().replace(" ", "-");
  const several = inputs.length > 1 || inputs[0] === undefined;
  return { name: exportFileName(inputs, several ? `line-${word}` : word, as), type: TYPES[as], bytes };
}

/**
 * A sheet of a spool as a drawing.
 * @throws Refusal as spoolExportInput does; 400 when the spool has fewer sheets.
 */
export async function renderSpoolDrawing(viewer: SessionViewer, spoolId: string, asked: DrawingAsked): Promise<ExportFile> {
  const { as, of, size, sheet } = asked;
  const input = await spoolExportInput(viewer, spoolId, of, new Date(), size);
  const pages = composeSheet(input, measureText);
  const page = pages[sheet - 1];
  if (!page) throw refuseInvalid(`This spool has ${pages.length === 1 ? "one sheet" : `${pages.length} sheets`}; ask for one of them.`);
  const remark = `${input.document.number} spool ${input.spool}, ${stateText(input)}, sheet ${sheet} of ${pages.length}. Millimetres on paper, not to scale. Uncontrolled copy.`;
  const text = as === "svg" ? drawingSvg(page.items, page.widthMm, page.heightMm, { measure: measureText }) : drawingDxf(page.items, page.widthMm, page.heightMm, remark);
  const part = pages.length === 1 ? "" : `-${sheet}-of-${pages.length}`;
  return { name: exportFileName([input], "sheet", as, part), type: TYPES[as], bytes: textBytes(text) };
}

/**
 * The points of a line as it is now.
 * @param rowsOf writes the rows in the editor's words; handed in, since the words are the screen's. @throws Refusal 404.
 */
export async function renderPoints(viewer: SessionViewer, lineId: string, rowsOf: (document: RunDocument) => readonly (readonly Cell[])[]): Promise<ExportFile> {
  const line = await inShop(viewer).one(Line, lineId);
  const document = storedDocument(line);
  return { name: `${plainName(`${document.number}-points-DRAFT`)}.csv`, type: TYPES.csv, bytes: textBytes(csvFile(rowsOf(document))) };
}
