/** A list as an XLSX workbook: what it is of at the head, cautions, then a frozen row of heads over the rows. */
import ExcelJS from "exceljs";
import type { ListTable } from "@/lib/rules/exchange/list-table";

/** @param madeAt stands in the workbook's properties; handed in. */
export async function xlsxFile(table: ListTable, madeAt: Date): Promise<Uint8Array> {
  const book = new ExcelJS.Workbook();
  book.created = madeAt;
  book.modified = madeAt;
  book.title = [table.title, ...table.facts.map(([, value]) => value)].join(", ");
  const sheet = book.addWorksheet(table.title);
  table.columns.forEach((column, index) => (sheet.getColumn(index + 1).width = column.width));
  sheet.addRow([table.title]).font = { bold: true, size: 14 };
  for (const [label, value] of table.facts) sheet.addRow([label, value]).getCell(1).font = { bold: true };
  sheet.addRow(["Made", `${madeAt.toISOString().slice(0, 16).replace("T", " ")} UTC`]).getCell(1).font = { bold: true };
  for (const caution of table.cautions) sheet.addRow([caution]).font = { italic: true };
  sheet.addRow([]);
  const head = sheet.addRow(table.columns.map((column) => column.head));
  head.font = { bold: true };
  head.alignment = { wrapText: true, vertical: "bottom" };
  head.eachCell((cell) => (cell.border = { bottom: { style: "medium" } }));
  for (const row of table.rows) sheet.addRow([...row]).alignment = { vertical: "top", wrapText: true };
  sheet.views = [{ state: "frozen", ySplit: head.number, xSplit: 0 }];
  sheet.pageSetup = { orientation: "landscape", fitToPage: true, fitToWidth: 1, fitToHeight: 0, printTitlesRow: `${head.number}:${head.number}` };
  return new Uint8Array(await book.xlsx.writeBuffer());
}
