/** Widths of text on paper from the generated table: the same numbers in the browser and in the PDF. */
import type { FaceName } from "./families";
import { printableText } from "./printable";
import { BOLD_RUNS, CAPITAL_UNITS, MONO_WIDTH, REGULAR_RUNS, UNITS_PER_EM } from "./width-table";

/** Font size over capital height: 1.4066 for these faces. */
export const EM_PER_CAPITAL = UNITS_PER_EM / CAPITAL_UNITS;

const tableOf = (runs: readonly (readonly number[])[]): ReadonlyMap<string, number> =>
  new Map(runs.flatMap((run) => run.slice(1).map((width, index) => [String.fromCodePoint(run[0]! + index), width] as const)));

const TABLES: Readonly<Record<Exclude<FaceName, "mono">, ReadonlyMap<string, number>>> = {
  regular: tableOf(REGULAR_RUNS),
  bold: tableOf(BOLD_RUNS),
};

/**
 * Advance width of a text in mm at a capital height in mm. What has no glyph counts as the substitute that is painted
 * for it, so any text may be handed in.
 */
export function measureText(text: string, capMm: number, face: FaceName): number {
  const printed = printableText(text).text;
  const scale = capMm / CAPITAL_UNITS;
  if (face === "mono") return [...printed].length * MONO_WIDTH * scale;
  const table = TABLES[face];
  let units = 0;
  for (const character of printed) units += table.get(character) ?? 0;
  return units * scale;
}
