/** Points of a total station or tracker, pasted as rows: name, E, N, U and, if given, sigma. */
import type { UnitSystem } from "../run/document";
import { parseLength } from "../units/length";
import type { SurveyReading, SurveyTool } from "./survey-document";
import { DEVIATIONS_IN_TOLERANCE } from "./survey-tools";

export interface PastedPoints {
  readonly readings: readonly SurveyReading[];
  /** One sentence per row that was not taken. */
  readonly refused: readonly string[];
}

const MOST_ROWS = 200;
const PLAIN_NUMBER = /^\+?(\d+\.?\d*|\.\d+)$/;

/**
 * Reads pasted rows, parted by tab, semicolon or comma. A row of words only is taken for a heading.
 * @param ids one fresh id per row; @param tool what took the points.
 */
export function pastePoints(text: string, units: UnitSystem, tool: SurveyTool, ids: readonly string[]): PastedPoints {
  const rows = text.split(/\r?\n/).map((row) => row.trim()).filter((row) => row !== "").slice(0, Math.min(MOST_ROWS, ids.length));
  const readings: SurveyReading[] = [];
  const refused: string[] = [];
  rows.forEach((row, at) => {
    const cells = row.split(row.includes("\t") ? "\t" : row.includes(";") ? ";" : ",").map((cell) => cell.trim().replace(/^"(.*)"$/, "$1"));
    const numbers = cells.slice(1, 4).map((cell) => parseLength(cell, units));
    if (at === 0 && cells.slice(1).every((cell) => !/\d/.test(cell))) return;
    const wrong = numbers.findIndex((each) => !each.ok);
    if (cells.length < 4 || !cells[0] || wrong >= 0) {
      refused.push(`Row ${at + 1}: ${!cells[0] ? "the mark's name is missing" : cells.length < 4 ? "name, E, N and U are needed" : `"${cells[wrong + 1]}" is not a length`}.`);
      return;
    }
    readings.push({ id: ids[at]!, kind: "point", from: "", to: cells[0].slice(0, 24), first: cells.slice(1, 4), again: [], tool, tolerance: toleranceText(cells[4]), leftOut: false, note: "" });
  });
  return { readings, refused };
}

/** A sigma as the tolerance it comes to, in the unit it was given in. */
function toleranceText(sigma: string | undefined): string {
  const plain = (sigma ?? "").trim();
  return PLAIN_NUMBER.test(plain) && Number(plain) > 0 ? String(Number(plain) * DEVIATIONS_IN_TOLERANCE) : "";
}
