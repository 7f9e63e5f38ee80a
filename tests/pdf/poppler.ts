/** Reading PDFs back with poppler-utils: words with their boxes, and rasters. */
import { execFileSync } from "node:child_process";
import { mkdtempSync, readFileSync, readdirSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { PNG } from "pngjs";

export interface PdfWord {
  readonly page: number;
  readonly text: string;
  /** Millimetres from the page's top left corner. */
  readonly minX: number;
  readonly minY: number;
  readonly maxX: number;
  readonly maxY: number;
}

export interface Raster {
  readonly width: number;
  readonly height: number;
  /** RGBA, row by row. */
  readonly data: Uint8Array;
}

const MM_PER_POINT = 25.4 / 72;

function withFile<T>(bytes: Uint8Array, work: (file: string, folder: string) => T): T {
  const folder = mkdtempSync(path.join(tmpdir(), "sheet-"));
  try {
    const file = path.join(folder, "sheet.pdf");
    writeFileSync(file, bytes);
    return work(file, folder);
  } finally {
    rmSync(folder, { recursive: true });
  }
}

/** Words as pdftotext finds them. */
export function pdfWords(bytes: Uint8Array): PdfWord[] {
  const html = withFile(bytes, (file) => execFileSync("pdftotext", ["-bbox-layout", file, "-"], { maxBuffer: 1 << 26 }).toString());
  let page = 0;
  const words: PdfWord[] = [];
  for (const match of html.matchAll(/<page |<word xMin="([\d.-]+)" yMin="([\d.-]+)" xMax="([\d.-]+)" yMax="([\d.-]+)">(.*?)<\/word>/g)) {
    if (match[0] === "<page ") page += 1;
    else {
      const [minX, minY, maxX, maxY] = match.slice(1, 5).map((value) => Number(value) * MM_PER_POINT) as [number, number, number, number];
      words.push({ page, text: unescaped(match[5]!), minX, minY, maxX, maxY });
    }
  }
  return words;
}

const unescaped = (text: string): string => text.replace(/&lt;/g, "<").replace(/&gt;/g, ">").replace(/&quot;/g, '"').replace(/&#39;|&apos;/g, "'").replace(/&amp;/g, "&");

/** Text in reading order, by pdftotext. */
export function pdfText(bytes: Uint8Array): string {
  return withFile(bytes, (file) => execFileSync("pdftotext", ["-layout", file, "-"], { maxBuffer: 1 << 26 }).toString());
}

/** Pages as pixels, by pdftoppm. */
export function pdfRasters(bytes: Uint8Array, dpi: number, gray = false): Raster[] {
  return withFile(bytes, (file, folder) => {
    execFileSync("pdftoppm", ["-r", String(dpi), "-png", ...(gray ? ["-gray"] : []), file, path.join(folder, "page")]);
    return readdirSync(folder).filter((name) => name.endsWith(".png")).sort().map((name) => PNG.sync.read(readFileSync(path.join(folder, name))));
  });
}
