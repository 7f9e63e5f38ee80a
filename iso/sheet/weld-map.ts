/** The weld map: the isometric with weld numbers, and the log of every weld. */
import type { MeasureText } from "../draw/drawing-types";
import { pageDraft, type PageDraft } from "./page-draft";
import { followingFrame } from "./page-frame";
import type { SheetSetExtras } from "./set-types";
import type { SheetFacts } from "./sheet-facts";
import { weldsTable } from "./spool-tables";
import { flowTables } from "./table-flow";

/** Pages of the weld map before they are numbered. */
export function weldMapDrafts(facts: SheetFacts, _extras: SheetSetExtras, first: number, measure: MeasureText): PageDraft[] {
  const frame = followingFrame(facts, measure, [{ label: "PAGES", value: "Weld map", maxLines: 1 }]);
  const table = weldsTable(facts);
  return flowTables(table ? [{ table, width: "full", startRow: 0 }] : [], frame.body, first, measure).pages.map((items) => pageDraft(facts.input.size, frame, items, "welds"));
}
