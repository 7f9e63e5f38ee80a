/** Workbooks that come in: values, formulas by what they showed, dates in words, and a zip that unpacks to too much. */
import ExcelJS from "exceljs";
import { zipSync, unzipSync } from "fflate";
import { describe, expect, test } from "vitest";
import { cellShown } from "@/lib/rules/exchange/import-cell";
import { suggestColumns } from "@/lib/rules/exchange/point-columns";
import { readPoints } from "@/lib/rules/exchange/read-points";
import { readImportFile } from "@/components/exchange/read-file";
import { readWorkbook } from "@/components/exchange/xlsx-read";
import { BASE } from "./import-support";

async function workbook(rows: readonly (readonly unknown[])[]): Promise<Uint8Array> {
  const book = new ExcelJS.Workbook();
  book.addWorksheet("Empty");
  const sheet = book.addWorksheet("Points");
  for (const row of rows) sheet.addRow([...row]);
  return new Uint8Array(await book.xlsx.writeBuffer());
}

const HEAD = ["East", "North", "Up", "Slope", "Item"];

describe("a workbook", () => {
  test("gives its rows with the numbers of the spreadsheet, formulas by their saved value", async () => {
    const bytes = await workbook([
      HEAD, [36, "2'-6\"", 0, null, { richText: [{ text: "ta" }, { text: "il" }] }], [], [{ formula: "A2*2", result: 72 }, 0, 0, null, "cap"],
      [new Date("2026-02-06"), 0, 0], [{ formula: "A2+1", result: undefined }, 0, 0], [{ error: "#REF!" }, 0, 0],
    ]);
    const read = await readWorkbook(bytes);
    if (!read.ok) throw new Error(read.message);
    expect(read.tables.map(({ name }) => name)).toEqual(["Points"]);
    const [head, ...rows] = read.tables[0]!.rows;
    expect(rows.map(({ row }) => row)).toEqual([2, 4, 5, 6, 7]);
    const heads = head!.cells.map(cellShown);
    const points = readPoints(rows, { ...BASE, heads, match: suggestColumns(heads) });
    expect(points.good.map(({ row, point }) => [row, point.offset.kind === "enu" && point.offset.e.mm])).toEqual([[4, 1828.8]]);
    expect(points.faults.map(({ row, column, message }) => [row, column, message])).toEqual([
      [2, "Item", expect.stringMatching(/no item/)], [5, "East", expect.stringMatching(/date/)], [6, "East", expect.stringMatching(/formula was saved without its value/)], [7, "East", expect.stringMatching(/#REF!/)],
    ]);
  });

  test("that unpacks to more than the limit is refused before it is unpacked", async () => {
    const files = unzipSync(await workbook([HEAD]));
    const bomb = zipSync({ ...files, "xl/worksheets/sheet9.xml": new Uint8Array(40 * 1024 * 1024) }, { level: 9 });
    expect(bomb.length).toBeLessThan(200_000);
    expect(await readWorkbook(bomb)).toMatchObject({ ok: false, message: expect.stringMatching(/unpacks to more than 32 MB/) });
  });

  test("whose stated sizes lie is read within them, never beyond", async () => {
    const files = unzipSync(await workbook([HEAD, [1, 2, 3]]));
    const zip = zipSync({ ...files, "xl/worksheets/sheet9.xml": new Uint8Array(20 * 1024 * 1024) }, { level: 9 });
    // Every stated size of the large part becomes 16 bytes, in its own head and in the directory.
    const view = new DataView(zip.buffer);
    for (let at = 0; at + 4 < zip.length; at += 1) if (view.getUint32(at, true) === 20 * 1024 * 1024) view.setUint32(at, 16, true);
    const before = process.memoryUsage().arrayBuffers;
    const read = await readWorkbook(zip);
    expect(process.memoryUsage().arrayBuffers - before).toBeLessThan(15 * 1024 * 1024);
    expect(typeof read.ok).toBe("boolean");
  });
});

describe("other files are refused in words", () => {
  const file = (bytes: Uint8Array): File => new File([bytes.slice().buffer], "points");
  test.each([
    ["an old workbook", Uint8Array.from([0xd0, 0xcf, 0x11, 0xe0, 0, 0]), /old XLS kind/],
    ["a zip of something else", zipSync({ "a.xml": new Uint8Array(3) }), /no XLSX workbook|nothing on the sheets/],
    ["a picture", Uint8Array.from([0x89, 0x50, 0x4e, 0x47, 0, 0, 1, 2, 3, 0, 200, 0]), /neither a CSV nor an XLSX/],
    ["more than 8 MB", new Uint8Array(8 * 1024 * 1024 + 1).fill(65), /at most 8 MB/],
  ] as const)("%s", async (_name, bytes, says) => {
    expect(await readImportFile(file(bytes))).toMatchObject({ ok: false, message: expect.stringMatching(says) });
  });
});
