/** Sheets of the demo lines and of the sample runs as PDF, and each page as a picture made by pdftoppm. */
import { execFile } from "node:child_process";
import { mkdir, readdir, writeFile } from "node:fs/promises";
import path from "node:path";
import { promisify } from "node:util";
import { composeSheet, SHEET_SIZES, type RevisionState, type SheetInput, type SheetSize } from "@/iso";
import { measureText } from "@/fonts/widths";
import { paintSheet } from "@/pdf/paint-sheet";
import { sampleInput, sampleNames } from "@/tests/pdf/sheet-inputs";
import { DEMO_LOGO } from "../demo/logo";
import { demoSheetInput, demoSpools } from "./demo-sheets";
import type { Picture } from "./picture";

const run = promisify(execFile);
const DPI = 110;

interface Wanted {
  readonly name: string;
  readonly group: string;
  readonly input: SheetInput;
  readonly isGreyToo: boolean;
}

const STATES: readonly RevisionState[] = ["for-fabrication", "for-review", "draft", "superseded", "returned", "void", "as-built"];
/** Demo lines that are shown on every size of paper and in grey: the plainest, the most crowded and the metric one. */
const ON_ALL_SIZES = new Set(["coolingSupply", "chillerHeader", "wellWater"]);

function demoSheets(): Wanted[] {
  return demoSpools().flatMap((spool) => {
    const isFull = ON_ALL_SIZES.has(spool.name);
    const sizes: readonly SheetSize[] = isFull ? SHEET_SIZES : ["tabloid"];
    return sizes.map((size) => ({ name: `${spool.name}-${size}`, group: "Demo lines", input: demoSheetInput(spool, size, "for-fabrication"), isGreyToo: isFull && size === "tabloid" }));
  });
}

/** Each sample on tabloid, the sizes of one more in turn, every state among them. */
function sampleSheets(): Wanted[] {
  return sampleNames.flatMap((name, index) => {
    const other = SHEET_SIZES[index % SHEET_SIZES.length]!;
    const sizes: readonly SheetSize[] = other === "tabloid" ? ["tabloid"] : ["tabloid", other];
    return sizes.map((size) => ({ name: `${name}-${size}`, group: "Sample runs", input: sampleInput(name, size, STATES[index % STATES.length]!), isGreyToo: false }));
  });
}

/**
 * Writes PDFs and pictures into a folder, one after another.
 * @param only names that contain none of these words are left out; empty = all
 */
export async function writeSheets(folder: string, only: readonly string[], say: (text: string) => void): Promise<Picture[]> {
  await mkdir(folder, { recursive: true });
  const logo = new TextEncoder().encode(DEMO_LOGO);
  const wanted = [...demoSheets(), ...sampleSheets()].filter(({ name }) => only.length === 0 || only.some((word) => name.includes(word)));
  const pictures: Picture[] = [];
  for (const [index, { name, group, input, isGreyToo }] of wanted.entries()) {
    say(`sheet ${index + 1} of ${wanted.length}: ${name}`);
    const pages = composeSheet(input, measureText);
    const bytes = await paintSheet({ pages, issuedAt: input.revision.issuedAt, title: `${input.document.number} spool ${input.spool}`, logo: input.titleBlock.logo ? logo : null });
    const stem = path.join(folder, `${group === "Demo lines" ? "demo" : "sample"}-${name}`);
    await writeFile(`${stem}.pdf`, bytes);
    pictures.push(...(await rasters(stem, false)).map((file) => ({ group, file, link: `${stem}.pdf` })));
    if (isGreyToo) pictures.push(...(await rasters(stem, true)).map((file) => ({ group: "In grey", file, link: `${stem}.pdf` })));
  }
  return pictures;
}

/** A PDF's pages as PNG beside it. */
export async function rasters(stem: string, isGrey: boolean): Promise<string[]> {
  const out = isGrey ? `${stem}-grey` : `${stem}-page`;
  await run("pdftoppm", ["-r", String(DPI), "-png", ...(isGrey ? ["-gray"] : []), `${stem}.pdf`, out]);
  const folder = path.dirname(stem);
  return (await readdir(folder)).filter((name) => name.startsWith(`${path.basename(out)}-`) && name.endsWith(".png")).sort().map((name) => path.join(folder, name));
}
