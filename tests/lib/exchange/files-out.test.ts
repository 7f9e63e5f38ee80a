/** Lists as they leave: nothing runs as a formula, numbers are numbers, and a workbook is read by another library. */
import readXlsx from "read-excel-file/node";
import { describe, expect, test } from "vitest";
import { buildModel, formatInches, INCH_MM, type SheetInput } from "@/iso";
import { csvCell, csvFile, withoutApostrophe } from "@/lib/rules/exchange/csv-cells";
import { exportFileName } from "@/lib/rules/exchange/file-names";
import { listRows } from "@/lib/rules/exchange/list-table";
import { listTable, type ListName } from "@/lib/rules/exchange/lists";
import { xlsxFile } from "@/lib/server/xlsx-file";
import { sampleInput } from "../../pdf/sheet-inputs";

const LISTS: readonly ListName[] = ["materials", "cuts", "welds"];
const MADE = new Date("2026-03-04T05:06:07Z");

describe("cells", () => {
  test.each(["=1+1", "+1", "-cmd", "@SUM(A1)", "\tx", "\rx", "-2'-6\""])("%j gets an apostrophe, which a reading takes off again", (text) => {
    expect(csvCell(text)).toBe(`'${text}`);
    expect(withoutApostrophe(csvCell(text))).toBe(text);
  });
  test("numbers stay numbers, words stay words", () => {
    expect([csvCell(-2.5), csvCell(0), csvCell(null), csvCell(NaN), csvCell("'quoted'"), csvCell("a=b")]).toEqual(["-2.5", "0", "", "", "'quoted'", "a=b"]);
    expect(csvFile([["a", "b,c"], [1, 'say "x"\nnow']])).toBe('\ufeffa,"b,c"\r\n1,"say ""x""\nnow"\r\n');
  });
});

describe("lists", () => {
  const input = sampleInput("firstRun", "A3", "for-fabrication");
  const model = buildModel(input.document, input.marks, input.takeOuts);
  const spool = model.spools.find(({ letter }) => letter === input.spool)!;

  test("the cut list has every piece with its number and the text of the same number", () => {
    const table = listTable("cuts", [input]);
    const at = (head: string) => table.columns.findIndex((column) => column.head.startsWith(head));
    const pieces = model.pieces.filter((piece) => spool.pieceKeys.includes(piece.key));
    expect(pieces.length).toBeGreaterThan(0);
    expect(table.rows.map((row) => [row[0], row[at("Cut length, in")], row[at("Cut length as printed")]])).toEqual(
      pieces.map((piece) => [piece.mark, Math.round((piece.cutLengthMm / INCH_MM) * 16) / 16, formatInches(piece.cutLengthMm)]),
    );
  });

  test("welds: every numbered one of the spool, and the numbers that are void", () => {
    const marks = { ...input.marks, voided: [{ kind: "weld" as const, mark: "99", key: "gone" }] };
    const rows = listTable("welds", [{ ...input, marks }]).rows;
    const numbers = model.joints.filter((joint) => joint.number !== null && spool.jointKeys.includes(joint.key)).map((joint) => joint.number);
    expect(rows.map((row) => row[0])).toEqual(expect.arrayContaining([...numbers, "99"]));
    expect(rows[rows.length - 1]).toContain("VOID");
  });

  test.each(LISTS)("each row of %s says line, spool, sheet, revision and state; a draft says DRAFT and no revision", (name) => {
    const draft: SheetInput = { ...input, revision: { ...input.revision, state: "draft", code: "B" } };
    for (const row of listTable(name, [input]).rows) expect(row.slice(-5)).toEqual([input.document.number, input.spool, input.revision.sheetNumber, input.revision.code, "FOR FABRICATION"]);
    for (const row of listTable(name, [draft]).rows) expect(row.slice(-2)).toEqual(["none", "DRAFT"]);
    expect(exportFileName([draft], name, "csv")).toMatch(/DRAFT\.csv$/);
    expect(exportFileName([{ ...input, revision: { ...input.revision, hold: true, code: "C" } }], name, "csv")).toMatch(/rev-C-HOLD-FOR-FABRICATION\.csv$/);
  });

  test("a text that would run is harmless in every list", () => {
    const wild = { ...input, document: { ...input.document, number: "=cmd|'x'!A1" } };
    for (const name of LISTS) {
      const cells = listRows(listTable(name, [wild])).flat().map(csvCell);
      expect(cells.filter((cell) => /^[=+@]/.test(cell))).toEqual([]);
    }
  });
});

describe("workbooks, read back by another library", () => {
  test.each(LISTS)("%s: facts at the head, numbers as numbers, rows as in the CSV", async (name) => {
    const input = sampleInput("metricLine", "A3", "for-fabrication");
    const table = listTable(name, [input]);
    const bytes = await xlsxFile(table, MADE);
    const read = (await readXlsx(Buffer.from(bytes), { sheet: 1 } as never)) as unknown;
    const rows = (Array.isArray(read) && read[0] && typeof read[0] === "object" && "data" in read[0] ? (read[0] as { data: unknown[][] }).data : read) as unknown[][];
    const head = rows.findIndex((row) => row[0] === table.columns[0]!.head && row[1] === table.columns[1]!.head);
    expect(head).toBeGreaterThan(3);
    const facts = new Map(rows.slice(0, head).map((row) => [String(row[0]), row[1]]));
    expect([facts.get("Line"), facts.get("Spool"), facts.get("State")]).toEqual([input.document.number, input.spool, "FOR FABRICATION"]);
    expect(rows.slice(0, head).some((row) => String(row[0]).startsWith(table.cautions[0]!.slice(0, 20)))).toBe(true);
    const wanted = table.rows.map((row) => row.map((cell) => (cell === "" ? null : cell)));
    expect(rows.slice(head + 1)).toEqual(wanted);
    expect(wanted.flat().some((cell) => typeof cell === "number")).toBe(true);
  });
});
