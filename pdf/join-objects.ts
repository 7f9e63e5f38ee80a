/** Objects taken from one PDF into another, each kept once however often it is met: a logo, a shading, a font. */
import { createHash } from "node:crypto";
import { inflateSync } from "node:zlib";
import { decodePDFRawStream, PDFArray, PDFDict, PDFName, PDFRawStream, PDFRef, type PDFContext, type PDFObject } from "pdf-lib";

/** A stream's contents as they are before packing. */
export function unpacked(stream: PDFRawStream): Uint8Array {
  const filter = stream.dict.get(PDFName.of("Filter"));
  const isPlain = stream.dict.get(PDFName.of("DecodeParms")) === undefined;
  if (filter === undefined) return stream.contents;
  return isPlain && filter === PDFName.of("FlateDecode") ? inflateSync(stream.contents) : decodePDFRawStream(stream).decode();
}

/** Deeper than any page of ours; what leads back to itself is refused here instead of followed for ever. */
const DEEPEST = 40;

/** The objects of one document by what is in them. */
export class ObjectPool {
  readonly context: PDFContext;
  readonly #known = new Map<string, PDFRef>();

  constructor(context: PDFContext) {
    this.context = context;
  }

  /** The object's place in this document: the place of an equal one that is there already. */
  keep(object: PDFObject): PDFRef {
    const bytes = new Uint8Array(object.sizeInBytes());
    object.copyBytesInto(bytes, 0);
    const hash = createHash("sha256").update(bytes).digest("base64");
    const known = this.#known.get(hash);
    if (known !== undefined) return known;
    const ref = this.context.register(object);
    this.#known.set(hash, ref);
    return ref;
  }

  /**
   * A copy of an object of another document, with all it leads to.
   * @param swap what to put in the place of one of its references instead of a copy; null = copy it.
   * @throws when it leads back to itself.
   */
  copy(object: PDFObject, from: PDFContext, swap: (ref: PDFRef) => PDFObject | null = () => null, depth = 0): PDFObject {
    if (depth > DEEPEST) throw new Error("An object of a stored sheet leads back to itself.");
    const inner = (one: PDFObject) => this.copy(one, from, swap, depth + 1);
    if (object instanceof PDFRef) {
      const swapped = swap(object);
      if (swapped !== null) return swapped;
      const target = from.lookup(object);
      return target === undefined ? this.context.obj(null) : this.keep(inner(target));
    }
    if (object instanceof PDFRawStream) return PDFRawStream.of(inner(object.dict) as PDFDict, object.contents);
    if (object instanceof PDFDict) {
      const copy = PDFDict.withContext(this.context);
      for (const [key, value] of object.entries()) copy.set(key, inner(value));
      return copy;
    }
    if (object instanceof PDFArray) {
      const copy = PDFArray.withContext(this.context);
      for (const value of object.asArray()) copy.push(inner(value));
      return copy;
    }
    return object;
  }
}
