/** One tagged section a page, as on the single sheets: readers that speak a page aloud find where each begins. */
import { PDFHexString, PDFName, PDFNumber, type PDFDocument } from "pdf-lib";
import type { JoinedPage } from "./join-types";

/** The drawing of each of our pages is marked as content 0 of its page (ISO 32000-1, 14.7.4.2). */
const CONTENT = 0;

export function tagPages(joined: PDFDocument, pages: readonly JoinedPage[]): void {
  const { context } = joined;
  const [root, document] = [context.nextRef(), context.nextRef()];
  const sections = pages.map(({ ref, name }) =>
    context.register(context.obj({ Type: "StructElem", S: "Sect", P: document, Pg: ref, T: PDFHexString.fromText(name), K: CONTENT })),
  );
  for (const [index, page] of joined.getPages().entries()) {
    page.node.set(PDFName.of("StructParents"), PDFNumber.of(index));
    page.node.set(PDFName.of("Tabs"), PDFName.of("S"));
  }
  const parents = sections.flatMap((section, index) => [index, [section]]);
  context.assign(document, context.obj({ Type: "StructElem", S: "Document", P: root, K: sections }));
  context.assign(root, context.obj({ Type: "StructTreeRoot", K: [document], ParentTree: { Nums: parents }, ParentTreeNextKey: pages.length }));
  joined.catalog.set(PDFName.of("StructTreeRoot"), root);
  joined.catalog.set(PDFName.of("MarkInfo"), context.obj({ Marked: true }));
}
