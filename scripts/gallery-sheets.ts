/**
 * Writes the sheets of all sample runs into a folder as PDF, and each page as PNG in colour and grey when pdftoppm is
 * there: `npx tsx scripts/gallery-sheets.ts <folder> [dpi]`. Runs and people are invented.
 */
import { execFileSync } from "node:child_process";
import { mkdirSync, writeFileSync } from "node:fs";
import path from "node:path";
import { SHEET_SIZES, type RevisionState } from "@/iso";
import { paintedSample, sampleNames } from "@/tests/pdf/sheet-inputs";

const STATES: readonly RevisionState[] = ["for-fabrication", "for-review", "draft", "superseded", "returned", "void", "as-built"];

/** Paths of the PDFs written: every run on every size, states in turn. */
export async function writeSheets(folder: string, dpi: number): Promise<string[]> {
  mkdirSync(folder, { recursive: true });
  const files: string[] = [];
  for (const [index, name] of sampleNames.entries()) {
    for (const [turn, size] of SHEET_SIZES.entries()) {
      const { bytes } = await paintedSample(name, size, STATES[(index + turn) % STATES.length]!);
      const file = path.join(folder, `${name}-${size}.pdf`);
      writeFileSync(file, bytes);
      files.push(file);
      const stem = file.slice(0, -".pdf".length);
      execFileSync("pdftoppm", ["-r", String(dpi), "-png", file, stem]);
      execFileSync("pdftoppm", ["-r", String(dpi), "-png", "-gray", file, `${stem}-grey`]);
    }
  }
  return files;
}

const [folder, dpi] = process.argv.slice(2);
if (folder && import.meta.url === `file://${path.resolve(process.argv[1] ?? "")}`) {
  void writeSheets(folder, Number(dpi ?? 110)).then((files) => console.log(`${files.length} sheets in ${folder}`));
}
