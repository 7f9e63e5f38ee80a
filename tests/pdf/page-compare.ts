/**
 * Two PDFs held against each other pixel by pixel, by pdftoppm in grey. A pixel agrees when its grey lies within GREY_STEP
 * of what the other page has there or in one of the eight pixels around: a stroke's soft edge may fall one pixel aside, but a
 * mark that is not there, another letter or a thinner line has nothing to agree with.
 */
import { execFileSync } from "node:child_process";
import { mkdtempSync, readFileSync, readdirSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";

export const DPI = 150;
/** Of 255: a quarter of the scale from black to white. */
export const GREY_STEP = 64;

export interface Grey {
  readonly width: number;
  readonly height: number;
  /** One byte a pixel, row by row, 255 = white. */
  readonly data: Uint8Array;
}

export interface Agreement {
  /** Pixels of either page that agree with nothing near them on the other. */
  readonly astray: number;
  /** Pixels of the first page darker than mid-grey. */
  readonly inked: number;
  /** Where the first few stray pixels are, millimetres from the top left corner, for the message. */
  readonly at: readonly string[];
}

/** Each page of one file against the same page of the other. Throws when their numbers or sizes differ. */
export function comparePages(one: Uint8Array, other: Uint8Array): Agreement[] {
  const folder = mkdtempSync(path.join(tmpdir(), "pages-"));
  try {
    const [a, b] = [rasterFiles(one, folder, "one"), rasterFiles(other, folder, "other")];
    if (a.length !== b.length) throw new Error(`${a.length} pages against ${b.length}`);
    return a.map((file, index) => compareGreys(readGrey(file), readGrey(b[index]!)));
  } finally {
    rmSync(folder, { recursive: true });
  }
}

function rasterFiles(bytes: Uint8Array, folder: string, name: string): string[] {
  const file = path.join(folder, `${name}.pdf`);
  writeFileSync(file, bytes);
  execFileSync("pdftoppm", ["-r", String(DPI), "-gray", file, path.join(folder, name)]);
  return readdirSync(folder).filter((entry) => entry.startsWith(`${name}-`)).sort().map((entry) => path.join(folder, entry));
}

/** A binary PGM as pdftoppm writes it: three numbers and one blank before the pixels. */
function readGrey(file: string): Grey {
  const bytes = readFileSync(file);
  const head = /^P5\s+(\d+)\s+(\d+)\s+255\s/.exec(bytes.toString("latin1", 0, 64));
  if (!head) throw new Error(`${path.basename(file)} is no grey picture`);
  return { width: Number(head[1]), height: Number(head[2]), data: bytes.subarray(head[0].length) };
}

export function compareGreys(a: Grey, b: Grey): Agreement {
  if (a.width !== b.width || a.height !== b.height) throw new Error(`${a.width} x ${a.height} pixels against ${b.width} x ${b.height}`);
  let [astray, inked] = [0, 0];
  const at: string[] = [];
  for (let i = 0; i < a.data.length; i += 1) {
    if (a.data[i]! < 128) inked += 1;
    if (Math.abs(a.data[i]! - b.data[i]!) <= GREY_STEP || (isNear(a.data[i]!, b, i) && isNear(b.data[i]!, a, i))) continue;
    astray += 1;
    if (at.length < 4) at.push([i % a.width, Math.floor(i / a.width)].map((pixels) => ((pixels * 25.4) / DPI).toFixed(1)).join(", "));
  }
  return { astray, inked, at };
}

/** Whether a grey lies within the step of the range that nine pixels of a page span. */
function isNear(grey: number, { data, width }: Grey, i: number): boolean {
  let [low, high] = [255, 0];
  for (const row of [i - width, i, i + width]) {
    for (let k = row - 1; k <= row + 1; k += 1) {
      const here = data[k] ?? 255;
      if (here < low) low = here;
      if (here > high) high = here;
    }
  }
  return grey >= low - GREY_STEP && grey <= high + GREY_STEP;
}
