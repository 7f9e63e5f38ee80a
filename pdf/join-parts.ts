/**
 * Joins parts into one PDF with bookmarks, page labels and tagged pages. Faces are embedded once, equal objects kept
 * once, and small objects packed together, so that a page costs little more than its own drawing.
 */
import { ParseSpeeds, PDFArray, PDFDict, PDFDocument, PDFHexString, PDFName, PDFNumber, PDFRef, type PDFContext, type PDFObject } from "pdf-lib";
import { FACE_NAMES, type FaceName } from "@/fonts/families";
import { embedFace, noFaceUse } from "./join-faces";
import { ObjectPool } from "./join-objects";
import { addOutline, type Bookmark } from "./join-outline";
import { JOIN } from "./join-part";
import { tagPages } from "./join-tags";

export interface JoinInput {
  readonly title: string;
  readonly author: string;
  readonly subject: string;
  readonly keywords: string;
  /** ISO time written into the document's dates. */
  readonly at: string;
  /** In order. Read one after another, so that they need not all be in memory unpacked. */
  readonly parts: readonly Uint8Array[];
  readonly bookmarks: readonly Bookmark[];
}

export interface JoinedPage {
  readonly ref: PDFRef;
  /** Which sheet it belongs to; below 0 for the pages in front. */
  readonly sheet: number;
  readonly name: string;
}

/** Equal input gives equal bytes. @throws when a part is none. */
export async function joinParts(input: JoinInput): Promise<Uint8Array> {
  const joined = await PDFDocument.create({ updateMetadata: false });
  describe(joined, input);
  const { context } = joined;
  const faces: Readonly<Record<FaceName, PDFRef>> = { regular: context.nextRef(), bold: context.nextRef(), mono: context.nextRef() };
  const use = noFaceUse();
  const pool = new ObjectPool(context);
  const pages: JoinedPage[] = [];
  for (const bytes of input.parts) {
    const part = await PDFDocument.load(bytes, { updateMetadata: false, parseSpeed: ParseSpeeds.Fastest });
    const swap = (ref: PDFRef) => faceOf(part.context, ref, (face, codePoints) => {
      for (const codePoint of codePoints) use[face].add(codePoint);
      return faces[face];
    });
    for (const page of part.getPages()) pages.push(addPage(joined, pool, page.node, swap));
  }
  for (const face of FACE_NAMES) if (use[face].size > 0) embedFace(context, faces[face], face, use[face]);
  addOutline(joined, input.bookmarks, pages);
  labelPages(joined, pages);
  tagPages(joined, pages);
  return joined.save({ useObjectStreams: true, addDefaultPage: false, updateFieldAppearances: false, objectsPerTick: Infinity });
}

/** How many pages each sheet has in these parts, by the sheet's number. */
export async function countPages(parts: readonly Uint8Array[]): Promise<Map<number, number>> {
  const counts = new Map<number, number>();
  for (const bytes of parts) {
    const part = await PDFDocument.load(bytes, { updateMetadata: false, parseSpeed: ParseSpeeds.Fastest });
    for (const page of part.getPages()) {
      const { sheet } = toldBy(page.node);
      counts.set(sheet, (counts.get(sheet) ?? 0) + 1);
    }
  }
  return counts;
}

function describe(joined: PDFDocument, { title, author, subject, keywords, at }: JoinInput): void {
  joined.setTitle(title, { showInWindowTitleBar: true });
  joined.setAuthor(author);
  joined.setSubject(subject);
  joined.setKeywords([keywords]);
  joined.setProducer("Quarterline");
  joined.setCreator("Quarterline");
  joined.setLanguage("en-US");
  joined.setCreationDate(new Date(at));
  joined.setModificationDate(new Date(at));
}

/** Among a part's references, one that stands for a face: what it needs of it is told, and the face's place put in. */
function faceOf(part: PDFContext, ref: PDFRef, place: (face: FaceName, codePoints: readonly number[]) => PDFRef): PDFObject | null {
  const object = part.lookup(ref);
  if (!(object instanceof PDFDict)) return null;
  const word = object.get(JOIN);
  const face = word instanceof PDFName ? FACE_NAMES.find((name) => name === word.decodeText()) : undefined;
  if (face === undefined) return null;
  return place(face, object.lookup(PDFName.of("Used"), PDFArray).asArray().map((one) => (one as PDFNumber).asNumber()));
}

function addPage(joined: PDFDocument, pool: ObjectPool, node: PDFDict, swap: (ref: PDFRef) => PDFObject | null): JoinedPage {
  const box = node.lookup(PDFName.of("MediaBox"), PDFArray).asRectangle();
  const added = joined.addPage([box.width, box.height]);
  for (const key of [PDFName.of("Contents"), PDFName.of("Resources")]) added.node.set(key, pool.copy(node.get(key)!, node.context, swap));
  return { ref: added.ref, ...toldBy(node) };
}

function toldBy(node: PDFDict): { sheet: number; name: string } {
  const told = node.lookup(JOIN, PDFDict);
  return { sheet: told.lookup(PDFName.of("Sheet"), PDFNumber).asNumber(), name: told.lookup(PDFName.of("Name"), PDFHexString).decodeText() };
}

/** A label for every page, so that a viewer's page list shows which sheet it is. */
function labelPages(joined: PDFDocument, pages: readonly JoinedPage[]): void {
  const numbers = pages.flatMap(({ name }, index) => [index, { P: PDFHexString.fromText(name) }]);
  joined.catalog.set(PDFName.of("PageLabels"), joined.context.obj({ Nums: numbers }));
}
