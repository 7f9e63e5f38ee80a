/** Pictures of the golden runs: one PDF and PNG each, and in grey those that must read without colour. */
import { mkdir, writeFile } from "node:fs/promises";
import path from "node:path";
import { paintSheet } from "@/pdf/paint-sheet";
import { goldenPages } from "./golden-pages";
import type { Picture } from "./picture";
import { rasters } from "./write-sheets";

/** A date of the invented shop: the same pictures each time. */
const DRAWN_AT = "2026-11-16T15:20:00Z";
/** Runs in which colour helps most, shown without it as well. */
const GREY_TOO: ReadonlySet<string> = new Set(["revision-cloud", "control-station", "field-weld", "spool-of-two", "spec-break"]);

/** @param only names that contain none of these words are left out; empty = all */
export async function writeGolden(folder: string, only: readonly string[], say: (text: string) => void): Promise<Picture[]> {
  await mkdir(folder, { recursive: true });
  const wanted = goldenPages().filter(({ run }) => only.length === 0 || only.some((word) => run.name.includes(word)));
  if (wanted.length > 0) say(`${wanted.length} golden runs`);
  const pictures: Picture[] = [];
  for (const { theme, run, page } of wanted) {
    const stem = path.join(folder, run.name);
    await writeFile(`${stem}.pdf`, await paintSheet({ pages: [page], issuedAt: DRAWN_AT, title: `${run.document.number} ${run.name}`, logo: null }));
    pictures.push(...(await rasters(stem, false)).map((file) => ({ group: `Golden runs: ${theme}`, file, link: `${stem}.pdf` })));
    if (GREY_TOO.has(run.name)) pictures.push(...(await rasters(stem, true)).map((file) => ({ group: "In grey", file, link: `${stem}.pdf` })));
  }
  return pictures;
}
