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
import type { JoinedPage } from "./join-types";
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
  /** A part to go in front, made when the pages of each sheet are counted; null = none. */
  readonly front: ((counts: PageCounts) => Promise<Uint8Array>) | null;
  readonly bookmarks: readonly Bookmark[];
}

/** How many pages each sheet has, by the sheet's number. */
export type PageCounts = ReadonlyMap<number, number>;

/** Equal input gives equal bytes. @throws when a part is none. */
export async function joinParts(input: JoinInput): Promise<{ readonly bytes: Uint8Array; readonly pages: number }> {
  const joined = await PDFDocument.create({ updateMetadata: false });
  describe(joined, input);
  const adder = new PageAdder(joined);
  const pages: JoinedPage[] = [];
  for (const bytes of input.parts) pages.push(...(await adder.add(bytes, pages.length)));
  if (input.front !== null) pages.unshift(...(await adder.add(await input.front(countsOf(pages)), 0)));
  adder.embedFaces();
  addOutline(joined, input.bookmarks, pages);
  labelPages(joined, pages);
  tagPages(joined, pages);
  return { bytes: await joined.save({ useObjectStreams: true, addDefaultPage: false, updateFieldAppearances: false, objectsPerTick: Infinity }), pages: pages.length };
}

function countsOf(pages: readonly JoinedPage[]): PageCounts {
  const counts = new Map<number, number>();
  for (const { sheet } of pages) counts.set(sheet, (counts.get(sheet) ?? 0) + 1);
  return counts;
}

/** Puts parts' pages into the joined document and gathers which characters of each face they need. */
class PageAdder {
  readonly #joined: PDFDocument;
  readonly #pool: ObjectPool;
  readonly #use = noFaceUse();
  readonly #faces: Readonly<Record<FaceName, PDFRef>>;

  constructor(joined: PDFDocument) {
    const { context } = joined;
    this.#joined = joined;
    this.#pool = new ObjectPool(context);
    this.#faces = { regular: context.nextRef(), bold: context.nextRef(), mono: context.nextRef() };
  }

  /** @param at how many pages stand before. */
  async add(bytes: Uint8Array, at: number): Promise<JoinedPage[]> {
    const part = await PDFDocument.load(bytes, { updateMetadata: false, parseSpeed: ParseSpeeds.Fastest });
    const swap = (ref: PDFRef) => faceOf(part.context, ref, (face, codePoints) => {
      for (const codePoint of codePoints) this.#use[face].add(codePoint);
      return this.#faces[face];
    });
    return part.getPages().map(({ node }, index) => {
      const box = node.lookup(PDFName.of("MediaBox"), PDFArray).asRectangle();
      const added = this.#joined.insertPage(at + index, [box.width, box.height]);
      added.node.set(PDFName.of("Resources"), this.#pool.copy(node.get(PDFName.of("Resources"))!, node.context, swap));
      // Every page's drawing is its own: looking for an equal one would only take time.
      added.node.set(PDFName.of("Contents"), this.#joined.context.register(this.#pool.copy(node.lookup(PDFName.of("Contents"))!, node.context)));
      return { ref: added.ref, ...toldBy(node) };
    });
  }

  embedFaces(): void {
    for (const face of FACE_NAMES) if (this.#use[face].size > 0) embedFace(this.#joined.context, this.#faces[face], face, this.#use[face]);
  }
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

function toldBy(node: PDFDict): { sheet: number; name: string } {
  const told = node.lookup(JOIN, PDFDict);
  return { sheet: told.lookup(PDFName.of("Sheet"), PDFNumber).asNumber(), name: told.lookup(PDFName.of("Name"), PDFHexString).decodeText() };
}

/** A label for every page, so that a viewer's page list shows which sheet it is. */
function labelPages(joined: PDFDocument, pages: readonly JoinedPage[]): void {
  const numbers = pages.flatMap(({ name }, index) => [index, { P: PDFHexString.fromText(name) }]);
  joined.catalog.set(PDFName.of("PageLabels"), joined.context.obj({ Nums: numbers }));
}
