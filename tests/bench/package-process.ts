/**
 * The process that makes the measured packages: it has everything loaded that a worker process has, and does what the queue's
 * job does from stored sheets to the finished file, with a folder in place of the store. Its memory is the whole process's, threads and all.
 */
import { readFileSync, writeFileSync } from "node:fs";
import path from "node:path";
import "@/lib/jobs/process";
import { PackageThreads } from "@/lib/jobs/package-threads";
import type { PackageSource } from "@/lib/rules/packages";

export interface MakeQuestion {
  readonly folder: string;
  readonly source: PackageSource;
  readonly threads: number;
  readonly runs: number;
}
export interface MakeAnswer {
  /** Time of each run, ms. */
  readonly ms: readonly number[];
  readonly bytes: number;
  readonly pages: number;
  /** Peak of the process's memory before the first package and over all, MB. */
  readonly restMb: number;
  readonly peakMb: number;
}

const MB = 1000;
const WARM_UP_SHEETS = 80;

/** Answers one question and ends. */
export function answer(): void {
  process.once("message", (question: MakeQuestion) => {
    void measured(question).then((said) => process.send?.(said, () => process.exit(0)));
  });
  process.send?.("loaded");
}

const peakMb = () => process.resourceUsage().maxRSS / MB;

async function measured({ folder, source, threads, runs }: MakeQuestion): Promise<MakeAnswer> {
  const restMb = peakMb();
  const pool = new PackageThreads(threads);
  // Every thread is warm when the measure begins, as the one alone is.
  await made(pool, folder, { ...source, sheets: source.sheets.slice(0, WARM_UP_SHEETS) }, pool.most);
  const ms: number[] = [];
  let last = { bytes: 0, pages: 0 };
  for (let run = 0; run < runs; run += 1) {
    const from = performance.now();
    last = await made(pool, folder, source);
    ms.push(performance.now() - from);
  }
  await pool.end();
  return { ms, ...last, restMb, peakMb: peakMb() };
}

/** @param kept threads left for the joining and after it */
async function made(pool: PackageThreads, folder: string, source: PackageSource, kept = 1): Promise<{ bytes: number; pages: number }> {
  const count = Math.ceil(source.sheets.length / source.partSheets);
  const open = Array.from({ length: count }, (_, ordinal) => ordinal);
  const partFile = (ordinal: number) => path.join(folder, `${pool.most}-part-${ordinal}`);
  const { sheets: _all, ...facts } = source;
  const lane = async () => {
    for (let ordinal = open.shift(); ordinal !== undefined; ordinal = open.shift()) {
      const first = ordinal * source.partSheets;
      const sheets = source.sheets.slice(first, first + source.partSheets).map((packed, index) => ({ ordinal: first + index, packed, stored: read(path.join(folder, packed.objectKey)), set: null }));
      const { bytes } = await pool.run({ kind: "part", packageId: "bench", source: facts, sheets }, sheets.map(({ stored }) => stored.buffer as ArrayBuffer));
      writeFileSync(partFile(ordinal), bytes);
    }
  };
  await Promise.all(Array.from({ length: pool.most }, lane));
  if (kept === 1) await pool.keepOne();
  const parts = Array.from({ length: count }, (_, ordinal) => read(partFile(ordinal)));
  const { bytes, pages } = await pool.run({ kind: "join", packageId: "bench", source, parts }, parts.map((part) => part.buffer as ArrayBuffer));
  writeFileSync(path.join(folder, `${pool.most}-package.pdf`), bytes);
  return { bytes: bytes.length, pages };
}

/** With a buffer of its own, to be handed over. */
function read(file: string): Uint8Array {
  return new Uint8Array(readFileSync(file));
}
