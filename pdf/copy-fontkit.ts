/**
 * The font reader as pdf-lib asks for it. pdf-lib was written for an older one whose subsets were streams; ours gives
 * bytes at once, so they are handed over as a stream of one chunk.
 */
import * as fontkit from "fontkit";

interface ByteListener {
  on(event: string, listener: (bytes: Uint8Array) => void): ByteListener;
}

interface StreamedSubset {
  encode(): Uint8Array;
  encodeStream?: () => ByteListener;
}

function oneChunk(bytes: Uint8Array): ByteListener {
  const stream: ByteListener = {
    on(event, listener) {
      if (event === "data" || event === "end") listener(bytes);
      return stream;
    },
  };
  return stream;
}

type Registered = Parameters<import("pdf-lib").PDFDocument["registerFontkit"]>[0];

/** For PDFDocument.registerFontkit. */
export const copyFontkit = {
  create(bytes: Uint8Array, name?: string) {
    const font = fontkit.create(Buffer.from(bytes), name) as unknown as { createSubset(): StreamedSubset };
    const createSubset = font.createSubset.bind(font);
    font.createSubset = () => {
      const subset = createSubset();
      subset.encodeStream = () => oneChunk(subset.encode());
      return subset;
    };
    return font;
  },
} as unknown as Registered;
