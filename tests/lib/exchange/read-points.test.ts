/** Files of points as shops send them: good rows become points, every broken one is named with what to do. */
import { describe, expect, test } from "vitest";
import { newRunDocument, parseRunDocument, type RunDocument } from "@/iso";
import { defaultLineSettings } from "@/lib/rules/default-settings";
import { csvTable, decodeText, guessDecimal, guessSeparator } from "@/lib/rules/exchange/csv-read";
import { cellShown, tableRefusal, type ImportCell } from "@/lib/rules/exchange/import-cell";
import { planImport } from "@/lib/rules/exchange/plan-import";
import { matchRefusal, suggestColumns, suggestForm, suggestUnit } from "@/lib/rules/exchange/point-columns";
import { readLength } from "@/lib/rules/exchange/read-length";
import { readPoints } from "@/lib/rules/exchange/read-points";
import { BASE, freshIds, readCsv } from "./import-support";

const line = (): RunDocument => newRunDocument("L-1", defaultLineSettings("imperial"));
const bytes = (text: string): Uint8Array => new TextEncoder().encode(text);

describe("a file of 5 000 rows with 50 broken ones", () => {
  const broken = new Map<number, { cells: string; column: string; value: string; says: RegExp }>();
  const kinds = [
    { cells: "abc,0,0,,", column: "East", value: "abc", says: /not a length/ },
    { cells: "0,6-Feb,0,,", column: "North", value: "6-Feb", says: /date/ },
    { cells: "0,0,1/3,,", column: "Up", value: "1/3", says: /tape has no/ },
    { cells: "1000,0,0,sprocket,", column: "Item", value: "sprocket", says: /no item/ },
    { cells: ",,,wn,a note", column: "East", value: "", says: /no dimension/ },
  ];
  for (let index = 0; index < 50; index += 1) broken.set(17 + index * 99, kinds[index % kinds.length]!);
  const rows = Array.from({ length: 5_000 }, (_, index) => broken.get(index + 2)?.cells ?? `${(index % 7) + 1}-0 1/2,${index % 3},-${index % 5},${index % 50 === 7 ? "weld" : ""},row ${index + 2}`);
  const text = `East,North,Up,Item,Note\r\n${rows.join("\r\n")}\r\n`;
  const read = readCsv(text);

  test("every broken row is named by its number, column and value, and says what to do", () => {
    expect(read.badRows).toEqual([...broken.keys()].sort((a, b) => a - b));
    expect(read.faults.length).toBe(50);
    for (const fault of read.faults) {
      const wanted = broken.get(fault.row)!;
      expect([fault.column, fault.value]).toEqual([wanted.column, wanted.value]);
      expect(fault.message).toMatch(wanted.says);
    }
  });

  test("the 4 950 good ones are points, in their order", () => {
    expect(read.good.length).toBe(4_950);
    expect(read.good.map((row) => row.row)).toEqual(rows.map((_, index) => index + 2).filter((row) => !broken.has(row)));
    expect(read.good[0]!.point.offset).toEqual({ kind: "enu", e: { text: "1-0 1/2", mm: 317.5 }, n: { text: "0", mm: 0 }, u: { text: "-0", mm: 0 } });
    expect(read.good.every((row) => row.point.note === `row ${row.row}`)).toBe(true);
  });

  test("a line holds 2 000: all of them are refused in words, a part of them comes in", () => {
    const all = planImport(line(), read.good, { kind: "line" }, freshIds());
    expect(all).toMatchObject({ ok: false });
    expect(!all.ok && all.message).toMatch(/2.000 points; this would make 4.950/);
    const part = planImport(line(), read.good.filter((row) => row.row <= 1_500), { kind: "line" }, freshIds());
    if (!part.ok) throw new Error(part.message);
    expect(part.points).toBe(read.good.filter((row) => row.row <= 1_500).length);
    expect(parseRunDocument(part.document).ok).toBe(true);
  });

  test("5 000 rows are taken, one more is refused in words", () => {
    const table = csvTable(text, ",", "file");
    expect(tableRefusal(table, 1)).toBeNull();
    expect(tableRefusal(csvTable(`${text}1,2,3,,\r\n`, ",", "file"), 1)).toMatch(/5.001 rows; one import reads 5.000/);
  });
});

describe("how a row may say where it goes", () => {
  test("direction and length, straight on, a slope, a position, a move in one cell", () => {
    const { good, faults } = readCsv("Direction,Length,Slope,Form,East,North,Up,Move\nE,3-0,,,,,,\n,2-6,,,,,,\nn30e,10-0,1 in 100,,,,,\n,,,absolute,10-0,0,8-0,\n,,,,,,,u 1-0\n");
    expect(faults).toEqual([]);
    expect(good.map(({ point }) => point.offset.kind)).toEqual(["polar", "polar", "slope", "absolute", "polar"]);
    expect(good[1]!.point.offset).toMatchObject({ direction: { text: "E", e: 1 }, length: { mm: 762 } });
    expect(good[2]!.point.offset).toMatchObject({ slope: { ratio: 0.01 } });
  });

  test("what is given twice, half or upside down is asked about", () => {
    const says = (row: string) => readCsv(`East,North,Up,Direction,Length,Slope\n0,0,0,,,\n${row}\n`).faults.map((fault) => `${fault.row} ${fault.column}: ${fault.message}`);
    expect(says("1,0,0,E,2,")).toEqual([expect.stringMatching(/^3 Direction: .*Keep one/)]);
    expect(says(",,,E,,")).toEqual([expect.stringMatching(/^3 Length: .*no length/)]);
    expect(says(",,,,2,")).toEqual([expect.stringMatching(/^3 Direction: .*no row before it/)]);
    expect(says(",,,U,2,2%")).toEqual([expect.stringMatching(/^3 Direction: .*level direction/)]);
    expect(says(",,,E,2,1:0")).toEqual([expect.stringMatching(/^3 Slope: /)]);
  });

  test("runs, their branches and a tee without one", () => {
    const { good, faults } = readCsv("Run,Branch from,Point,East,North,Up,Item\nmain,,A,0,0,0,end\nmain,,B,3-0,0,0,tee 2\nmain,,C,3-0,0,0,tee 2\ndrain,B,D,0,2-0,0,cap\nvent,,E,0,0,1-0,cap\n");
    expect(faults.map((fault) => [fault.row, fault.column])).toEqual([[6, "Branch from"]]);
    const plan = planImport(line(), good, { kind: "line" }, freshIds());
    if (!plan.ok) throw new Error(plan.message);
    expect(plan.document.runs.map((run) => run.points.length)).toEqual([3, 1, 0]);
    const [main, drain, empty] = plan.document.runs;
    expect([drain!.name, drain!.from, empty!.from]).toEqual(["drain", main!.points[1]!.id, main!.points[2]!.id]);
  });

  test("a branch from a point nobody names is refused with its row", () => {
    const { good } = readCsv("Run,Branch from,Point,East,North,Up\nmain,,A,1,0,0\nb,Z,B,0,1,0\n");
    expect(planImport(line(), good, { kind: "line" }, freshIds())).toMatchObject({ ok: false, message: expect.stringMatching(/Row 3: .*"Z"/) });
  });
});

describe("into one run", () => {
  const start = planned(line(), readCsv("Point,East,North,Up,Item\nA,0,0,0,end\nB,3-0,0,0,tee\nC,3-0,0,0,cap\n").good);

  test("after its points, or instead of them when no branch is lost", () => {
    const { good } = readCsv("East,North,Up\n1-0,0,0\n2-0,0,0\n");
    const runId = start.runs[0]!.id;
    const after = planImport(start, good, { kind: "run", fileRun: "", runId, where: "after" }, freshIds());
    expect(after.ok && after.document.runs[0]!.points.length).toBe(5);
    const instead = planImport(start, good, { kind: "run", fileRun: "", runId, where: "instead" }, freshIds());
    expect(instead).toMatchObject({ ok: false, message: expect.stringMatching(/branch leaves/) });
  });

  test("a name in the file never takes the id of a point that was deleted", () => {
    const { good } = readCsv("Point,East,North,Up\nold1,1-0,0,0\n");
    const plan = planImport(start, good, { kind: "run", fileRun: "", runId: start.runs[0]!.id, where: "after" }, freshIds());
    expect(plan.ok && plan.document.runs[0]!.points.some((point) => point.id === "old1")).toBe(false);
  });
});

function planned(document: RunDocument, good: ReturnType<typeof readCsv>["good"]): RunDocument {
  const plan = planImport(document, good, { kind: "line" }, freshIds());
  if (!plan.ok) throw new Error(plan.message);
  return plan.document;
}

describe("bytes", () => {
  const text = "Nord;Ost;Höhe\n1,5;2;3\n";
  const utf16 = (big: boolean, mark: boolean): Uint8Array => {
    const units = [...(mark ? "\ufeff" : ""), ...text].map((character) => character.charCodeAt(0));
    return Uint8Array.from(units.flatMap((unit) => (big ? [unit >> 8, unit & 255] : [unit & 255, unit >> 8])));
  };
  test.each([
    ["UTF-8", bytes(text), "utf-8"], ["UTF-8 with its mark", bytes(`\ufeff${text}`), "utf-8"],
    ["UTF-16 little end first", utf16(false, true), "utf-16le"], ["UTF-16 big end first", utf16(true, true), "utf-16be"], ["UTF-16 without a mark", utf16(false, false), "utf-16le"],
    ["Windows-1252", Uint8Array.from([...text].map((character) => character.charCodeAt(0))), "windows-1252"],
  ] as const)("%s", (_name, given, encoding) => {
    const decoded = decodeText(given);
    expect(decoded.encoding).toBe(encoding);
    expect(csvTable(decoded.text, guessSeparator(decoded.text), "f").rows[0]!.cells.map(cellShown)).toEqual(["Nord", "Ost", "Höhe"]);
  });

  test.each([["a,b\n1,2\n", ","], ["a;b\n1,5;2,5\n", ";"], ["a\tb\n1,5\t2;5\n", "\t"], ['"x, y";b\n1;2\n', ";"]] as const)("%j is parted by its separator", (value, separator) => {
    expect(guessSeparator(value)).toBe(separator);
  });

  test("a decimal comma is seen, and rows keep the number a spreadsheet gives them", () => {
    const table = csvTable("E;N;U\n1,5;2;3\n\n\n4,25;\"two\nlines\";6\n", ";", "f");
    expect(guessDecimal(table, ";")).toBe("comma");
    expect(table.rows.map((row) => row.row)).toEqual([1, 2, 5]);
  });
});

describe("lengths", () => {
  const mm = (cell: ImportCell | string, more: Partial<Parameters<typeof readLength>[1]> = {}) => {
    const read = readLength(typeof cell === "string" ? { kind: "text", text: cell } : cell, { unit: "in", decimal: "point", units: "imperial", ...more });
    return read.ok ? read.value.mm : read.message;
  };
  test.each([
    ["2'-6 1/2\"", {}, 774.7], ["30.5", {}, 774.7], ["'-2-0", {}, -609.6], ["1,250", { unit: "mm", units: "metric" }, 1250], ["1.250,5", { unit: "mm", decimal: "comma", units: "metric" }, 1250.5],
    ["1 250", { unit: "mm", units: "metric" }, 1250], ["1.5", { unit: "m", units: "metric" }, 1500], ["10", { unit: "ft" }, 3048], ["775", { unit: "mm" }, 775], ["30 1/2\"", { unit: "mm", units: "metric" }, 774.7],
    ["2-6", { unit: "in", units: "metric" }, 762],
  ] as const)("%s %j", (text, more, wanted) => expect(mm(text, more)).toBeCloseTo(wanted, 9));

  test("numbers, dates and errors of a workbook", () => {
    expect(mm({ kind: "number", value: 30.500000000000004 })).toBeCloseTo(774.7, 9);
    expect(mm({ kind: "date", text: "2026-02-06" })).toMatch(/date/);
    expect(mm({ kind: "bad", text: "#REF!", why: "Mend the formula." })).toBe("Mend the formula.");
    expect(mm("12,5")).toMatch(/comma/);
    expect(mm("2026-02-06")).toMatch(/date/);
  });
});

describe("heads", () => {
  test("are matched by their names, once each", () => {
    expect(suggestColumns(["Pt", "Easting (m)", "Northing (m)", "Elev. [m]", "Fitting", "Remarks", "Color", "East"])).toEqual(["point", "east", "north", "up", "item", "note", null, null]);
    expect(suggestForm(["Easting", "Northing", "Elev"])).toBe("absolute");
    expect(suggestForm(["dE", "dN", "dU"])).toBe("offset");
    expect([suggestUnit(["E (mm)", "N"]), suggestUnit(["Length [ft]"]), suggestUnit(["E"])]).toEqual(["mm", "ft", null]);
  });

  test("a match without dimensions, or with a meaning twice, is refused in words", () => {
    expect(matchRefusal(["item", "note"])).toMatch(/which columns hold the dimensions/);
    expect(matchRefusal(["east", "east"])).toMatch(/Two columns/);
    expect(matchRefusal(["direction", "length"])).toBeNull();
  });

  test("a fault of a column nobody headed is named by its letter", () => {
    const { faults } = readPoints([{ row: 1, cells: [{ kind: "text", text: "x" }] }], { ...BASE, heads: [""], match: ["east"] });
    expect(faults).toMatchObject([{ row: 1, column: "A", value: "x" }]);
  });
});
