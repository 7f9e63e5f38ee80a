/** Small files of each kind, made here. */
import { PNG } from "pngjs";

/** A PNG picture of one colour. */
export function pngFile(width = 8, height = 8): Uint8Array {
  const png = new PNG({ width, height });
  png.data.fill(120);
  return new Uint8Array(PNG.sync.write(png));
}

/** Header of a JPEG up to its frame: enough to be told by content. */
export function jpegFile(width = 8, height = 8): Uint8Array {
  const frame = [0xff, 0xc0, 0x00, 0x11, 0x08, height >> 8, height & 255, width >> 8, width & 255, 3, 1, 0x22, 0, 2, 0x11, 1, 3, 0x11, 1];
  const head = [0xff, 0xd8, 0xff, 0xe0, 0x00, 0x10, 0x4a, 0x46, 0x49, 0x46, 0, 1, 1, 0, 0, 1, 0, 1, 0, 0];
  return new Uint8Array([...head, ...frame, 0xff, 0xd9]);
}

export const SVG = `<?xml version="1.0"?><svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 10 10"><path d="M0 0H10V10Z"/></svg>`;

export const textBytes = (text: string): Uint8Array => new TextEncoder().encode(text);
