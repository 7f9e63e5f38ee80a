/** Paper sizes, the frame, and the lettering of a sheet. Millimetres. */
import type { PaperBox } from "../geometry/types";
import type { SheetSize } from "./sheet-types";

/** Landscape. Letter and tabloid as ASME Y14.1 A and B sizes, A4 and A3 as ISO 216 (from memory). */
const SIZES: Readonly<Record<SheetSize, readonly [number, number]>> = {
  letter: [279.4, 215.9],
  tabloid: [431.8, 279.4],
  A4: [297, 210],
  A3: [420, 297],
};

export const SHEET_SIZES: readonly SheetSize[] = ["letter", "tabloid", "A4", "A3"];

/** Width and height of a sheet, landscape, mm. */
export function sheetSizeMm(size: SheetSize): { readonly widthMm: number; readonly heightMm: number } {
  const [widthMm, heightMm] = SIZES[size];
  return { widthMm, heightMm };
}

/** Filing margin on the left, the other three (ISO 5457, from memory). */
export const FILING_MARGIN_MM = 20;
export const MARGIN_MM = 10;

/** What a printer surely reaches: half an inch from each edge (common practice: desktop printers leave 4 to 13 mm blank). */
export const SAFE_MARGIN_MM = 12.7;

/** The frame line of a page: everything printed lies within it, but for a marked copy's foot. @param leastMm margin on every side at least. */
export function frameBox(widthMm: number, heightMm: number, leastMm = MARGIN_MM): PaperBox {
  const margin = Math.max(MARGIN_MM, leastMm);
  return { minX: Math.max(FILING_MARGIN_MM, margin), minY: margin, maxX: widthMm - margin, maxY: heightMm - margin };
}

/** Capital heights. Nothing on a sheet is set smaller than TEXT_CAP (ISO 3098, from memory: 2.5 mm). */
export const TEXT_CAP = 2.5;
export const HEAD_CAP = 3;
export const CUT_CAP = 3.5;
export const NUMBER_CAP = 5;

/**
 * Distance from one baseline to the next at a capital height. Roboto's ascent and descent together are 1.65 capitals,
 * so at this pitch even accented capitals and the boxes that PDF readers report stay apart.
 */
export const PITCH_PER_CAP = 1.68;
/** Baseline below the top of its line's box, per capital height. */
export const BASELINE_PER_CAP = 1.31;

/** Lines: frame, block edges, table rules. */
export const FRAME_LINE = 0.7;
export const EDGE_LINE = 0.35;
export const RULE_LINE = 0.18;

/** A4 and letter give the whole first page to the isometric; the tables follow on the next. */
export function isSmallSheet(size: SheetSize): boolean {
  return size === "letter" || size === "A4";
}
