/** The list of differences as a table of a page; long texts run on in further rows, so that none is cut. */
import { KIND_WORDS, type CompareRow, type CompareSide, type CompareWhat } from "./compare-types";
import { wordAcross, STATE_WORDS } from "../sheet/state-mark";
import type { Cell, Row, Table } from "../sheet/table";

/** Characters of a text that surely fit the lines of one cell. */
const CELL_CHARACTERS = 320;

const NAMES: Readonly<Record<CompareWhat, (mark: string) => string>> = {
  point: (mark) => `Point ${mark}`, length: (mark) => `Length to point ${mark}`, fitting: (mark) => `Fitting at point ${mark}`, piece: (mark) => `Piece ${mark}`,
  weld: (mark) => `Weld ${mark}`, material: (mark) => `Material: ${mark}`, setting: (mark) => `Setting: ${mark}`, note: (mark) => (mark === "" ? "Note" : `Note at point ${mark}`),
};

/** "Length to point 3". */
export function rowName({ what, mark }: Pick<CompareRow, "what" | "mark">): string {
  return NAMES[what](mark);
}

/** "rev B, FOR FABRICATION"; a hold is said with it. */
export function sideWords({ code, state, hold }: CompareSide): string {
  const held = hold && wordAcross(state, true) === "HOLD" ? ", HOLD" : "";
  return state === "draft" ? `the draft, not submitted${held}` : `rev ${code}, ${STATE_WORDS[state]}${held}`;
}

export function compareTable(rows: readonly CompareRow[], from: CompareSide, to: CompareSide): Table {
  return {
    title: "DIFFERENCES",
    lead: [`From ${sideWords(from)} to ${sideWords(to)}. Numbers stand at their places on the overlay.`],
    columns: [
      { head: "NO.", share: 0, minMm: 11, align: "middle" }, { head: "CHANGE", share: 0, minMm: 23 }, { head: "OF WHAT", share: 0.8, minMm: 42 },
      { head: from.state === "draft" ? "DRAFT" : `REV ${from.code}`, share: 1, minMm: 44 }, { head: to.state === "draft" ? "DRAFT" : `REV ${to.code}`, share: 1, minMm: 44 },
    ],
    rows: rows.flatMap(tableRows),
    foot: [],
  };
}

function tableRows(row: CompareRow): Row[] {
  const [name, before, after] = [partsOf(rowName(row)), partsOf(row.before ?? "-"), partsOf(row.after ?? "-")];
  const count = Math.max(name.length, before.length, after.length);
  const bold = (text: string): Cell => [{ text, face: "bold" }];
  return Array.from({ length: count }, (_, i): Row => ({
    cells: [i === 0 ? bold(String(row.no)) : "", i === 0 ? bold(KIND_WORDS[row.kind]) : "", name[i] ?? "", before[i] ?? "", after[i] ?? ""],
    ...(i < count - 1 ? { open: true } : {}),
  }));
}

/** A text in parts that each fit a cell, cut at spaces where there are any. */
function partsOf(text: string): string[] {
  const parts: string[] = [];
  let rest = text;
  while (rest.length > CELL_CHARACTERS) {
    const space = rest.lastIndexOf(" ", CELL_CHARACTERS);
    const cut = space > CELL_CHARACTERS / 2 ? space : CELL_CHARACTERS;
    parts.push(rest.slice(0, cut));
    rest = rest.slice(cut).trimStart();
  }
  return [...parts, rest];
}
