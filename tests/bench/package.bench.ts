/**
 * A package of 500 spool sheets, from the stored files to the finished PDF with its index, bookmarks and marks, in a process of its
 * own with everything loaded that a worker has; the database and the store are left out. Beside it, in the same run, warm
 * headless Chromium prints the demo sheets' pages from one page that stays open, all at once, which costs it least per
 * page. The 500 sheets are the demo sheets, each with a number of its own, so that no page's drawing equals another's.
 * Told besides: the same with each sheet composed and painted first, as if nothing were stored.
 */
import { createHash } from "node:crypto";
import { fork } from "node:child_process";
import { once } from "node:events";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { PDFDocument } from "pdf-lib";
import { measureText } from "../../fonts/widths";
import { composeSheet, type SheetPage } from "../../iso";
import type { PackageSource, PackedSheet } from "../../lib/rules/packages";
import { paintSheet } from "../../pdf/paint-sheet";
import { demoSheetInput, demoSpools } from "../../scripts/gallery/demo-sheets";
import { openWarmPage } from "./chromium-page";
import type { MakeAnswer, MakeQuestion } from "./package-process";
import { median, type BenchLine } from "./stopwatch";

const SHEETS = 500;
const PRINTS = 3;
const ROUNDS = 2;
const KILOBYTE = 1000;
const AT = "2026-11-16T15:20:00Z";

interface Demo {
  readonly number: string;
  readonly pages: readonly SheetPage[];
}

function composedDemos(): { readonly demos: Demo[]; readonly ms: number } {
  const from = performance.now();
  const demos = demoSpools().map((spool) => {
    const input = demoSheetInput(spool, "tabloid", "for-fabrication");
    return { number: input.revision.sheetNumber, pages: composeSheet(input, measureText) };
  });
  return { demos, ms: performance.now() - from };
}

/** The demo sheet under another number, as a stored file would be. */
function stored({ number, pages }: Demo, sheetNumber: string): Promise<Uint8Array> {
  const renamed = pages.map((page) => ({ ...page, items: page.items.map((item) => (item.type === "text" && item.text === number ? { ...item, text: sheetNumber } : item)) }));
  return paintSheet({ pages: renamed, issuedAt: AT, title: `Sheet ${sheetNumber}`, logo: null });
}

async function storeSheets(folder: string, demos: readonly Demo[]): Promise<{ readonly sheets: PackedSheet[]; readonly paintMs: number }> {
  const sheets: PackedSheet[] = [];
  const from = performance.now();
  for (let index = 0; index < SHEETS; index += 1) {
    const sheetNumber = String(1000 + index);
    const bytes = await stored(demos[index % demos.length]!, sheetNumber);
    const sha256 = createHash("sha256").update(bytes).digest("hex");
    writeFileSync(path.join(folder, sha256), bytes);
    const line = `L-${100 + Math.floor(index / 5)}`;
    sheets.push({ revisionId: "r", sheetId: "s", spoolId: "p", kind: "fabrication", sheetNumber, code: "A", state: "for-fabrication", hold: false, line, letter: "ABCDE"[index % 5]!, sha256, objectKey: sha256, signed: true });
  }
  return { sheets, paintMs: performance.now() - from };
}

function sourceOf(sheets: readonly PackedSheet[]): PackageSource {
  return {
    version: 1, form: "pdf", copies: "marked", extras: [], paper: null, title: "Measured package", jobNumber: "2614", jobTitle: "Chilled water tie-ins", client: "Gull Rock Cannery", area: "",
    shopName: "Copper Bay Pipe Works", frontPaper: "tabloid", printedBy: "Miles Okafor", printedAt: AT, address: "https://sheets.copperbay.example/packages/1", transmittal: null, sheets, partSheets: 20,
  };
}

async function make(question: MakeQuestion): Promise<MakeAnswer> {
  // Begun as `npm run worker` begins one. The process's place is the working folder: this file is bundled elsewhere when it runs.
  const child = fork(path.resolve("tests/bench/package-process.mjs"), { serialization: "advanced", execArgv: ["--max-semi-space-size=2"] });
  const ended = once(child, "exit").then(() => Promise.reject(new Error("The process that makes packages ended early.")));
  ended.catch(() => undefined);
  await Promise.race([once(child, "message"), ended]);
  child.send(question);
  const [said] = (await Promise.race([once(child, "message"), ended])) as [MakeAnswer];
  return said;
}

async function chromiumMsPerPage(pages: readonly SheetPage[]): Promise<number> {
  const warm = await openWarmPage(pages);
  try {
    await warm.print();
    const taken: number[] = [];
    for (let print = 0; print < PRINTS; print += 1) {
      const from = performance.now();
      const bytes = await warm.print();
      taken.push((performance.now() - from) / pages.length);
      const count = (await PDFDocument.load(bytes)).getPageCount();
      if (count !== pages.length) throw new Error(`Chromium printed ${count} pages of ${pages.length}: the two cannot be compared.`);
    }
    return median(taken);
  } finally {
    await warm.close();
  }
}

async function againstChromium(pages: readonly SheetPage[], oursMs: number, drawnMs: number): Promise<BenchLine[]> {
  const name = "print a page by Chromium : package a page";
  try {
    const theirsMs = await chromiumMsPerPage(pages);
    return [
      { name, figure: theirsMs / oursMs, budget: 3, atLeast: true, detail: `${theirsMs.toFixed(1)} : ${oursMs.toFixed(2)} ms, ${pages.length} pages at once there, two threads here` },
      { name: "the same, composing and painting counted", figure: theirsMs / (oursMs + drawnMs), detail: `${theirsMs.toFixed(1)} : ${(oursMs + drawnMs).toFixed(1)} ms` },
    ];
  } catch (error) {
    return [{ name, skipped: `Chromium does not print here: ${String(error).split("\n")[0]}` }];
  }
}

export async function measure(): Promise<BenchLine[]> {
  const folder = mkdtempSync(path.join(tmpdir(), "quarterline-bench-"));
  try {
    const { demos, ms: composeMs } = composedDemos();
    const demoPages = demos.flatMap((demo) => demo.pages);
    const { sheets, paintMs } = await storeSheets(folder, demos);
    const source = sourceOf(sheets);
    const one: MakeAnswer[] = [];
    const two: MakeAnswer[] = [];
    // Turn by turn, so that a slow moment of the machine touches both.
    for (let round = 0; round < ROUNDS; round += 1) {
      one.push(await make({ folder, source, threads: 1, runs: 1 }));
      two.push(await make({ folder, source, threads: 2, runs: 1 }));
    }
    const { bytes, pages } = two[0]!;
    const [oneMs, twoMs] = [one, two].map((all) => median(all.flatMap((said) => said.ms))) as [number, number];
    const peak = Math.max(...two.map((said) => said.peakMb));
    const drawnMs = composeMs / demoPages.length + paintMs / pages;
    return [
      ...(await againstChromium(demoPages, twoMs / pages, drawnMs)),
      { name: "bytes a page of the package", figure: bytes / pages / KILOBYTE, unit: "KB", budget: 20, detail: `${bytes} bytes, ${pages} pages, index, marks and fonts within` },
      { name: "one thread : two threads", figure: oneMs / twoMs, budget: 1.4, atLeast: true, detail: `${(oneMs / 1000).toFixed(2)} : ${(twoMs / 1000).toFixed(2)} s, the joining at the end is one thread's` },
      { name: "peak memory of the process, two threads", figure: peak, unit: "MB", budget: 250, detail: `${Math.max(...two.map((said) => said.restMb)).toFixed(0)} MB of it before the first package; threads counted, measured by the system` },
    ];
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}
