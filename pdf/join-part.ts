/**
 * A part of a package: some sheets' pages, ready to be joined with other parts. It is a PDF whose pages name the
 * package's faces without holding them, and tell what they belong to; only joinParts reads one. Equal sheets give equal bytes.
 */
import { deflateSync } from "node:zlib";
import {
  ParseSpeeds, PDFArray, PDFDict, PDFDocument, PDFHexString, PDFName, PDFNumber, PDFRawStream, PDFRef, PDFString, type PDFContext, type PDFPage,
} from "pdf-lib";
import { FACE_NAMES, type FaceName } from "@/fonts/families";
import { FACE_KEYS, noFaceUse, type FaceUse } from "./join-faces";
import { ObjectPool, unpacked } from "./join-objects";
import { stampText, VEILS } from "./join-stamp";
import { knownFont, sharedText } from "./join-text";
import type { CopyMark } from "./mark-copy";

export interface PartSheet {
  /** A PDF of ours: stored, or just painted. */
  readonly bytes: Uint8Array;
  /** Put on every page of it; null = none. */
  readonly mark: CopyMark | null;
  /** Which sheet of the package its pages belong to; a list has one for each page. */
  readonly sheet: number | readonly number[];
  /** Set before the pages' own names in their labels. */
  readonly name: string;
}

/** Key of what a part's pages and faces say to joinParts. */
export const JOIN = PDFName.of("Join");
const EPOCH = new Date("2000-01-01T00:00:00Z");

/**
 * @param word makes a part's bytes its package's own, so that no two packages share a stored part.
 * @throws when the bytes are no PDF.
 */
export async function makePart(sheets: readonly PartSheet[], word: string): Promise<{ readonly bytes: Uint8Array; readonly pages: number }> {
  const part = await PDFDocument.create({ updateMetadata: false });
  part.setCreationDate(EPOCH);
  part.setSubject(word);
  const builder = new PartBuilder(part);
  for (const sheet of sheets) await builder.add(sheet);
  builder.end();
  const bytes = await part.save({ useObjectStreams: true, addDefaultPage: false, updateFieldAppearances: false, objectsPerTick: Infinity });
  return { bytes, pages: part.getPageCount() };
}

/** How many pages a stored sheet has. @throws when the bytes are no PDF. */
export async function storedPages(bytes: Uint8Array): Promise<number> {
  return (await PDFDocument.load(bytes, { updateMetadata: false, parseSpeed: ParseSpeeds.Fastest })).getPageCount();
}

class PartBuilder {
  readonly #part: PDFDocument;
  readonly #pool: ObjectPool;
  readonly #use: FaceUse = noFaceUse();
  readonly #faces: Readonly<Record<FaceName, PDFRef>>;
  readonly #veils: ReadonlyMap<PDFName, PDFRef>;

  constructor(part: PDFDocument) {
    this.#part = part;
    this.#pool = new ObjectPool(part.context);
    this.#faces = { regular: part.context.nextRef(), bold: part.context.nextRef(), mono: part.context.nextRef() };
    this.#veils = new Map(Object.entries(VEILS).map(([name, cover]) => [PDFName.of(name), this.#pool.keep(part.context.obj({ ca: cover, CA: cover }))]));
  }

  async add({ bytes, mark, sheet, name }: PartSheet): Promise<void> {
    const stored = await PDFDocument.load(bytes, { updateMetadata: false, parseSpeed: ParseSpeeds.Fastest });
    const names = pageNames(stored);
    const fonts = new Map<PDFRef, ReturnType<typeof knownFont>>();
    for (const [index, page] of stored.getPages().entries()) {
      const told = `${name} ${names.get(index) ?? index + 1}`.trim();
      const { width, height } = page.getSize();
      const added = this.#part.addPage([width, height]);
      this.#draw(page, added, fonts, mark, stored.context);
      added.node.set(JOIN, this.#part.context.obj({ Sheet: typeof sheet === "number" ? sheet : (sheet[index] ?? 0), Name: PDFHexString.fromText(told) }));
    }
  }

  #draw(page: PDFPage, added: PDFPage, fonts: Map<PDFRef, ReturnType<typeof knownFont>>, mark: CopyMark | null, from: PDFContext): void {
    const { context } = this.#part;
    const resources = page.node.Resources();
    const pageFonts = resources?.lookupMaybe(PDFName.of("Font"), PDFDict);
    const content = contentOf(page);
    const shared = sharedText(content, knownOf(pageFonts, fonts, from), this.#use);
    const { width, height } = page.getSize();
    const stamp = mark === null ? "" : stampText(mark, width, height, this.#use);
    const text = `q\n${shared ?? content}\nQ\n${stamp}`;
    // Packing tighter takes twice the time and saves one byte in a hundred.
    const drawn = deflateSync(Buffer.from(text, "latin1"));
    const stream = PDFRawStream.of(context.obj({ Filter: "FlateDecode", Length: drawn.length }), new Uint8Array(drawn));
    added.node.set(PDFName.of("Contents"), context.register(stream));
    added.node.set(PDFName.of("Resources"), this.#resources(resources, from, shared === null, FACE_NAMES.filter((face) => text.includes(`/${FACE_KEYS[face]} `)), mark));
  }

  #resources(resources: PDFDict | undefined, from: PDFContext, keepsFonts: boolean, faces: readonly FaceName[], mark: CopyMark | null): PDFRef {
    const { context } = this.#part;
    const copy = PDFDict.withContext(context);
    for (const [key, value] of resources?.entries() ?? []) {
      if (key !== PDFName.of("Font") && key !== PDFName.of("ProcSet")) copy.set(key, this.#pool.copy(from.lookup(value) ?? value, from));
    }
    const own = resources?.lookupMaybe(PDFName.of("Font"), PDFDict);
    const fonts = keepsFonts && own !== undefined ? (this.#pool.copy(own, from) as PDFDict) : PDFDict.withContext(context);
    for (const face of faces) fonts.set(PDFName.of(FACE_KEYS[face]), this.#faces[face]);
    copy.set(PDFName.of("Font"), fonts);
    if (mark !== null && mark.word !== null) {
      const states = copy.lookupMaybe(PDFName.of("ExtGState"), PDFDict) ?? PDFDict.withContext(context);
      for (const [name, veil] of this.#veils) states.set(name, veil);
      copy.set(PDFName.of("ExtGState"), states);
    }
    return this.#pool.keep(copy);
  }

  /** Writes which characters of each face the part needs. */
  end(): void {
    for (const face of FACE_NAMES) {
      const used = [...this.#use[face]].sort((a, b) => a - b);
      this.#part.context.assign(this.#faces[face], this.#part.context.obj({ Join: face, Used: used }));
    }
  }
}

function knownOf(fonts: PDFDict | undefined, known: Map<PDFRef, ReturnType<typeof knownFont>>, context: PDFContext): Map<string, ReturnType<typeof knownFont>> {
  return new Map((fonts?.entries() ?? []).map(([name, ref]) => {
    if (!(ref instanceof PDFRef)) return [name.decodeText(), null];
    const font = context.lookup(ref);
    if (!known.has(ref)) known.set(ref, font instanceof PDFDict ? knownFont(context, font) : null);
    return [name.decodeText(), known.get(ref) ?? null];
  }));
}

function contentOf(page: PDFPage): string {
  const contents = page.node.Contents();
  const streams = contents instanceof PDFArray ? contents.asArray().map((ref) => page.node.context.lookup(ref)) : [contents];
  return streams.map((stream) => (stream instanceof PDFRawStream ? Buffer.from(unpacked(stream)).toString("latin1") : "")).join("\n");
}

/** The pages' names as the stored sheet's own page labels have them. */
function pageNames(stored: PDFDocument): Map<number, string> {
  const labels = stored.catalog.lookupMaybe(PDFName.of("PageLabels"), PDFDict)?.lookupMaybe(PDFName.of("Nums"), PDFArray);
  const names = new Map<number, string>();
  for (let at = 0; labels !== undefined && at + 1 < labels.size(); at += 2) {
    const name = labels.lookupMaybe(at + 1, PDFDict)?.lookup(PDFName.of("P"));
    if (name instanceof PDFString || name instanceof PDFHexString) names.set(labels.lookup(at, PDFNumber).asNumber(), name.decodeText());
  }
  return names;
}
