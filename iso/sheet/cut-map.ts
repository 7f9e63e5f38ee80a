/** The cut map: each piece as a scaled bar with its ends, its arithmetic, and where it comes out of the stock. */
import type { MeasureText } from "../draw/drawing-types";
import { cutListTable } from "./cut-list";
import { pageDraft, type PageDraft } from "./page-draft";
import { followingFrame } from "./page-frame";
import type { SheetSetExtras } from "./set-types";
import type { SheetFacts } from "./sheet-facts";
import { flowTables } from "./table-flow";

/** Pages of the cut map before they are numbered. */
export function cutMapDrafts(facts: SheetFacts, _extras: SheetSetExtras, first: number, measure: MeasureText): PageDraft[] {
  const frame = followingFrame(facts, measure, [{ label: "PAGES", value: "Cut map", maxLines: 1 }]);
  const table = cutListTable(facts);
  return flowTables(table ? [{ table, width: "full", startRow: 0 }] : [], frame.body, first, measure).pages.map((items) => pageDraft(facts.input.size, frame, items, "cuts"));
}
