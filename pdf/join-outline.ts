/** Bookmarks of a package: lines, their spools, what is in front. */
import { PDFHexString, PDFName, type PDFDocument, type PDFRef } from "pdf-lib";
import type { JoinedPage } from "./join-types";

export interface Bookmark {
  readonly title: string;
  /** Leads to the first page of this sheet; below 0 the pages in front. */
  readonly sheet: number;
  readonly within: readonly Bookmark[];
}

/** Writes the tree (ISO 32000-1, 12.3.3), its branches closed. A bookmark of a sheet that has no page is left out. */
export function addOutline(joined: PDFDocument, bookmarks: readonly Bookmark[], pages: readonly JoinedPage[]): void {
  const firstPages = new Map<number, PDFRef>();
  for (const { sheet, ref } of pages) if (!firstPages.has(sheet)) firstPages.set(sheet, ref);
  const root = joined.context.nextRef();
  const rows = addRow(joined, bookmarks, root, firstPages);
  if (rows.length === 0) return;
  joined.context.assign(root, joined.context.obj({ Type: "Outlines", First: rows[0]!, Last: rows.at(-1)!, Count: rows.length }));
  joined.catalog.set(PDFName.of("Outlines"), root);
  joined.catalog.set(PDFName.of("PageMode"), PDFName.of("UseOutlines"));
}

function addRow(joined: PDFDocument, bookmarks: readonly Bookmark[], parent: PDFRef, firstPages: ReadonlyMap<number, PDFRef>): PDFRef[] {
  const shown = bookmarks.filter(({ sheet }) => firstPages.has(sheet));
  const refs = shown.map(() => joined.context.nextRef());
  for (const [index, { title, sheet, within }] of shown.entries()) {
    const inner = addRow(joined, within, refs[index]!, firstPages);
    const dictionary = joined.context.obj({ Title: PDFHexString.fromText(title), Parent: parent, Dest: [firstPages.get(sheet)!, "Fit"] });
    if (index > 0) dictionary.set(PDFName.of("Prev"), refs[index - 1]!);
    if (index + 1 < refs.length) dictionary.set(PDFName.of("Next"), refs[index + 1]!);
    if (inner.length > 0) {
      dictionary.set(PDFName.of("First"), inner[0]!);
      dictionary.set(PDFName.of("Last"), inner.at(-1)!);
      dictionary.set(PDFName.of("Count"), joined.context.obj(-inner.length));
    }
    joined.context.assign(refs[index]!, dictionary);
  }
  return refs;
}
