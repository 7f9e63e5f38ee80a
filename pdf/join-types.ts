/** A page of a joined package, as its bookmarks, labels and tags name it. */
import type { PDFRef } from "pdf-lib";

export interface JoinedPage {
  readonly ref: PDFRef;
  /** Which sheet it belongs to; below 0 for the pages in front. */
  readonly sheet: number;
  readonly name: string;
}
