/** The legend page: every symbol, line, mark and abbreviation the set uses. */
import type { MeasureText } from "../draw/drawing-types";
import type { PageDraft } from "./page-draft";
import { pageDraft } from "./page-draft";
import { followingFrame } from "./page-frame";
import type { SheetFacts } from "./sheet-facts";

/** Pages of the legend before they are numbered. */
export function legendDrafts(facts: SheetFacts, _first: number, measure: MeasureText): PageDraft[] {
  const frame = followingFrame(facts, measure, [{ label: "PAGES", value: "Legend", maxLines: 1 }]);
  return [pageDraft(facts.input.size, frame, [], "legend")];
}
