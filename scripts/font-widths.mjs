/**
 * Writes fonts/width-table.ts: the advance widths of every character that all three faces on paper have.
 * Run `node scripts/font-widths.mjs` after changing a face. tests/pdf/fonts.test.ts fails when the table is stale.
 */
import { readFileSync, writeFileSync } from "node:fs";
import path from "node:path";
import * as fontkit from "fontkit";

const folder = path.resolve(import.meta.dirname, "../fonts");
const FILES = { regular: "roboto-regular.ttf", bold: "roboto-bold.ttf", mono: "roboto-mono-regular.ttf" };

/** Not for paper: controls, spaces other than the plain one, marks that need placing by a shaper, private use, twins of other characters. */
const isLeftOut = (c) =>
  c < 0x20 || (c >= 0x7f && c <= 0xa0) || c === 0xad || (c >= 0x300 && c <= 0x36f) || (c >= 0x483 && c <= 0x489) ||
  (c >= 0x2000 && c <= 0x200f) || (c >= 0x2028 && c <= 0x202f) || (c >= 0xe000 && c <= 0xf8ff) || c === 0xfeff ||
  c === 0xfffc || c === 0xffff || c === 0x2044 || c === 0x2206 || c === 0x2126 || c === 0x2c9;

const fonts = Object.fromEntries(
  Object.entries(FILES).map(([face, file]) => [face, fontkit.create(readFileSync(path.join(folder, file)))]),
);
const sets = Object.values(fonts).map((font) => new Set(font.characterSet));
const codes = [...sets[0]].filter((c) => !isLeftOut(c) && sets.every((set) => set.has(c))).sort((a, b) => a - b);

/** Consecutive characters share a run: [first code point, width, width, ...]. */
function runsOf(font) {
  const runs = [];
  for (const code of codes) {
    const last = runs.at(-1);
    const width = font.glyphForCodePoint(code).advanceWidth;
    if (last && code === last[0] + last.length - 1) last.push(width);
    else runs.push([code, width]);
  }
  return runs;
}

const { regular, bold, mono } = fonts;
for (const font of [regular, bold, mono]) {
  if (font.unitsPerEm !== 2048 || font.capHeight !== 1456) throw new Error(`${font.postscriptName}: units or capital height differ`);
}
const monoWidth = mono.glyphForCodePoint(0x30).advanceWidth;
if (codes.some((c) => mono.glyphForCodePoint(c).advanceWidth !== monoWidth)) throw new Error("The mono face is not of one width");

const print = (runs) => `[\n${runs.map((run) => `  [${run.join(",")}],`).join("\n")}\n]`;
writeFileSync(
  path.join(folder, "width-table.ts"),
  `/**
 * Made by scripts/font-widths.mjs from the faces beside it; do not edit. Advance widths in font units of every character
 * that all faces have, as runs: first code point, then one width per character.
 */
export const UNITS_PER_EM = ${regular.unitsPerEm};
export const CAPITAL_UNITS = ${regular.capHeight};
export const MONO_WIDTH = ${monoWidth};
export const REGULAR_RUNS: readonly (readonly number[])[] = ${print(runsOf(regular))};
export const BOLD_RUNS: readonly (readonly number[])[] = ${print(runsOf(bold))};
`,
);
console.log(`${codes.length} characters`);
