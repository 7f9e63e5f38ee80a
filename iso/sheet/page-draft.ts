/** A page before it is known which of how many it is: parts of a set are composed one after another and numbered together. */
import type { DisplayItem } from "../draw/drawing-types";
import type { PaperBox } from "../geometry/types";
import type { SheetPlace } from "./identity-block";
import type { PageFrame } from "./page-frame";
import { sheetSizeMm } from "./sheet-size";
import type { SheetPage, SheetSize } from "./sheet-types";

export interface PageDraft {
  readonly size: SheetSize;
  /** Frame's ground and content, painted first. */
  readonly items: readonly DisplayItem[];
  /** Frame and title block. */
  readonly over: (place: SheetPlace) => readonly DisplayItem[];
  readonly logoBox: PaperBox | null;
  /** What it shows, for the page's label: "isometric", "lists". */
  readonly kind: string;
}

/** A page of a frame with this content. */
export function pageDraft(size: SheetSize, frame: Pick<PageFrame, "under" | "over" | "logoBox">, content: readonly DisplayItem[], kind: string): PageDraft {
  return { size, items: [...frame.under, ...content], over: frame.over, logoBox: frame.logoBox, kind };
}

/** Numbers pages that follow one another. @param first number of the first of them @param of how many sheets there are in all */
export function placePages(drafts: readonly PageDraft[], first = 1, of = first - 1 + drafts.length): SheetPage[] {
  return drafts.map(({ size, items, over, logoBox, kind }, i) => ({
    ...sheetSizeMm(size), items: [...items, ...over({ sheet: first + i, of })], logoBox, name: `${first + i} ${kind}`,
  }));
}
