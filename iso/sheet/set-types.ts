/** What a sheet set is asked for and gives: which parts, what the shop knows beyond the sheet's input, and the pages with their bookmarks. */
import type { SheetPage } from "./sheet-types";

/** Parts of a set, in the order they print. The spool sheet leads, so that the numbers on its signed pages are the set's own. */
export const SHEET_PARTS = ["sheet", "index", "cuts", "welds", "bench", "templates", "legend"] as const;

export type SheetPart = (typeof SHEET_PARTS)[number];

/** Words for a part, as bookmarks, the index and the screen name it. */
export const SHEET_PART_WORDS: Readonly<Record<SheetPart, string>> = {
  sheet: "Spool sheet", index: "Sheet index", cuts: "Cut map", welds: "Weld map and log", bench: "Bench pages", templates: "Templates, print at 100 %", legend: "Legend",
};

/** Where a locked cutting plan takes a piece from. */
export interface StockPlace {
  /** Title of the plan. */
  readonly plan: string;
  /** Number of the length in the plan, from 1. */
  readonly length: number;
  readonly stockMm: number;
  readonly offcut: boolean;
  /** "" = not known. */
  readonly heat: string;
  /** This piece is the n-th cut of so many. */
  readonly cut: number;
  readonly cuts: number;
  /** From the length's end to where the piece begins, mm. */
  readonly startMm: number;
  /** As the plan has it, mm. */
  readonly plannedMm: number;
}

/** One entry of the work record, as entered. */
export interface WorkRecord {
  readonly kind: "cut" | "fit-up" | "weld" | "visual" | "actual";
  /** Key of the piece or joint. */
  readonly key: string;
  readonly values: Readonly<Record<string, string>>;
  readonly by: string;
  /** ISO time. */
  readonly at: string;
}

/** What the shop knows at the time of printing. Everything may be absent: then the pages carry blanks to write in. */
export interface SheetSetExtras {
  /** Stock by piece key, out of locked cutting plans. */
  readonly stock?: Readonly<Record<string, StockPlace>>;
  /** Work record of the spool, oldest first, and the ISO time it was read at; null or absent = none is shown. */
  readonly work?: { readonly entries: readonly WorkRecord[]; readonly readAt: string } | null;
  /** Who prints it when, said at every foot; absent = nothing is said. */
  readonly printed?: { readonly by: string; readonly at: string } | null;
  /** Re-lays every page inside half an inch of margin. True-scale pages keep their scale. */
  readonly safeMargins?: boolean;
  /** Thickness of the paper that templates are printed on, mm; absent = ordinary printing paper. */
  readonly paperMm?: number;
  /** Pages of the stored sheet that take the place of the spool sheet; absent = the spool sheet is composed. */
  readonly storedSheetPages?: number;
}

export interface SetBookmark {
  readonly part: SheetPart;
  readonly title: string;
  /** From 1, of all pages, the stored sheet's counted. */
  readonly page: number;
  readonly pages: number;
}

export interface SheetSet {
  /** Without the stored sheet's pages. */
  readonly pages: readonly SheetPage[];
  readonly bookmarks: readonly SetBookmark[];
  /** How many pages there are in all, the stored sheet's counted. */
  readonly of: number;
}
