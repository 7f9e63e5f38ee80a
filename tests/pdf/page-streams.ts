/** Content streams of a PDF's pages, unpacked, in page order: what is drawn, in the PDF's own operators. */
import { inflateSync } from "node:zlib";

/** Streams that set up a page's millimetre frame first; fonts and pictures do not. */
export function pageStreams(bytes: Uint8Array): string[] {
  const file = Buffer.from(bytes);
  const streams: string[] = [];
  for (let at = file.indexOf("stream\n"); at >= 0; at = file.indexOf("stream\n", at + 1)) {
    if (file.toString("latin1", at - 3, at) === "end") continue;
    const end = file.indexOf("endstream", at);
    const text = unpacked(file.subarray(at + "stream\n".length, end));
    if (text !== null && /^\s*1 0 0 -1 0 [\d.]+ cm/.test(text)) streams.push(text);
  }
  return streams;
}

function unpacked(stream: Buffer): string | null {
  try {
    return inflateSync(stream).toString("latin1");
  } catch {
    return null;
  }
}
