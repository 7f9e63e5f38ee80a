/**
 * A sheet set: the chosen parts of one spool as pages numbered through. The spool sheet leads; what follows is numbered on
 * from it. Tables say on which sheet they go on, so each part is told the number of its first page before it is composed.
 */
import type { MeasureText } from "../draw/drawing-types";
import { buildModel } from "../run/build-model";
import { benchDrafts } from "./bench-pages";
import { spoolSheetDrafts } from "./compose";
import { cutMapDrafts } from "./cut-map";
import { indexDrafts, indexTable, type IndexEntry } from "./index-pages";
import { legendDrafts } from "./legend-page";
import { placePages, type PageDraft } from "./page-draft";
import { followingFrame } from "./page-frame";
import { SHEET_PART_WORDS, SHEET_PARTS, type SetBookmark, type SheetPart, type SheetSet, type SheetSetExtras } from "./set-types";
import { sheetFacts, type PrintWish, type SheetFacts } from "./sheet-facts";
import { MARGIN_MM, SAFE_MARGIN_MM } from "./sheet-size";
import type { SheetInput } from "./sheet-types";
import { templateDrafts } from "./template-pages";
import { issuedText } from "./title-fields";
import { weldMapDrafts } from "./weld-map";

/**
 * Composes the parts asked for; those not known are left out, none gives no page. Pure: equal input, parts and extras give
 * equal pages. Never throws on user data.
 */
export function sheetSetPages(input: SheetInput, parts: readonly SheetPart[], extras: SheetSetExtras, measure: MeasureText): SheetSet {
  const facts: SheetFacts = { ...sheetFacts(input, buildModel(input.document, input.marks, input.takeOuts)), print: printWish(extras) };
  const wanted = SHEET_PARTS.filter((part) => parts.includes(part));
  const indexed = wanted.includes("index");
  const stored = wanted.includes("sheet") ? (extras.storedSheetPages ?? 0) : 0;
  const drafted = new Map<SheetPart, readonly PageDraft[]>();
  if (wanted.includes("sheet") && stored === 0) drafted.set("sheet", spoolSheetDrafts(facts, measure));
  const led = stored + (drafted.get("sheet")?.length ?? 0);
  // The index's length follows from how many parts there are, not from their pages.
  const blank = wanted.map((part): SetBookmark => ({ part, title: SHEET_PART_WORDS[part], page: 1, pages: 1 }));
  if (indexed) drafted.set("index", indexPages(facts, blank, led + 1, measure));
  let next = led + 1 + (drafted.get("index")?.length ?? 0);
  for (const part of wanted) {
    if (part === "sheet" || part === "index") continue;
    const drafts = draftsOf(part, facts, extras, next, measure);
    drafted.set(part, drafts);
    next += drafts.length;
  }
  const bookmarks = bookmarksOf(wanted, drafted, stored);
  if (indexed) drafted.set("index", indexPages(facts, bookmarks, led + 1, measure));
  const of = next - 1;
  return { pages: placePages(wanted.flatMap((part) => drafted.get(part) ?? []), stored + 1, of), bookmarks, of };
}

function draftsOf(part: Exclude<SheetPart, "sheet" | "index">, facts: SheetFacts, extras: SheetSetExtras, first: number, measure: MeasureText): readonly PageDraft[] {
  if (part === "cuts") return cutMapDrafts(facts, extras, first, measure);
  if (part === "welds") return weldMapDrafts(facts, extras, first, measure);
  if (part === "bench") return benchDrafts(facts, first, measure);
  return part === "templates" ? templateDrafts(facts, measure, extras.paperMm).drafts : legendDrafts(facts, measure);
}

function bookmarksOf(wanted: readonly SheetPart[], drafted: ReadonlyMap<SheetPart, readonly PageDraft[]>, stored: number): SetBookmark[] {
  let page = 1;
  return wanted.map((part) => {
    const pages = part === "sheet" && stored > 0 ? stored : (drafted.get(part)?.length ?? 0);
    const bookmark: SetBookmark = { part, title: SHEET_PART_WORDS[part], page, pages };
    page += pages;
    return bookmark;
  });
}

function indexPages(facts: SheetFacts, bookmarks: readonly SetBookmark[], first: number, measure: MeasureText): PageDraft[] {
  const { sheetNumber, code, state, hold } = facts.input.revision;
  const entries = bookmarks.filter(({ part }) => part !== "index").map(({ title, page, pages }): IndexEntry => ({
    sheetNumber, code, state, hold, title: `${title}, line ${facts.model.document.number} spool ${facts.input.spool}`, pages, firstPage: page,
  }));
  return indexDrafts(indexTable(entries), facts.input.size, followingFrame(facts, measure, [{ label: "PAGES", value: "Sheet index", maxLines: 1 }]), first, measure);
}

/** What is said of the print, and the room left round it. */
function printWish({ printed, safeMargins }: SheetSetExtras): PrintWish {
  return { leastMarginMm: safeMargins ? SAFE_MARGIN_MM : MARGIN_MM, foot: printed ? [`Printed ${issuedText(printed.at)} by ${printed.by}.`] : [] };
}
