/** Puts a package's parts together and the result into the store. */
import { mkdtemp, readdir, rm, stat, writeFile } from "node:fs/promises";
import { tmpdir } from "node:os";
import path from "node:path";
import { strToU8, unzipSync } from "fflate";
import type { PackageSource } from "@/lib/rules/packages";
import { getObject, sha256Hex, type StoredObject } from "@/lib/server/storage";
import { fileObject, putFile } from "@/lib/server/storage-files";
import { announceResult, storedParts, type PackageHold } from "./finish-package";
import { PART_WORD, type PackageTask, type PackageWork } from "./prepare-package";
import { writeZip } from "./write-zip";

const FOLDER = "quarterline-package-";
/** No package takes as long to put together. */
const LONGEST_FOLDER_MS = 3_600_000;

/** Does a task in another thread. */
export type RunTask = (task: PackageTask, transfer?: readonly ArrayBuffer[]) => Promise<PackageWork>;

/** @returns null when the package is not this worker's any more. @throws when a part is missing or the store fails. */
export async function storePackage(hold: PackageHold, source: PackageSource, run: RunTask): Promise<{ readonly object: StoredObject; readonly pages: number | null } | null> {
  const keys = await partKeys(hold, source);
  await clearOldFolders();
  const folder = await mkdtemp(path.join(tmpdir(), FOLDER));
  try {
    const file = path.join(folder, "package");
    const pages = source.form === "pdf" ? await joinTo(file, hold, source, keys, run) : await zipTo(file, hold, source, keys, run);
    const object = await fileObject(hold.shopId, file);
    if (!(await announceResult(hold, object))) return null;
    await putFile(file, object, source.form === "pdf" ? "application/pdf" : "application/zip");
    return { object, pages };
  } finally {
    await rm(folder, { recursive: true, force: true });
  }
}

/** Folders of workers that were killed while they had one. */
async function clearOldFolders(): Promise<void> {
  const names = (await readdir(tmpdir())).filter((name) => name.startsWith(FOLDER));
  for (const name of names) {
    const folder = path.join(tmpdir(), name);
    const changed = await stat(folder).catch(() => null);
    if (changed !== null && Date.now() - changed.mtimeMs > LONGEST_FOLDER_MS) await rm(folder, { recursive: true, force: true });
  }
}

/** @throws when one is not stored: the job then begins again. */
async function partKeys(hold: PackageHold, { sheets, partSheets }: PackageSource): Promise<string[]> {
  const parts = await storedParts(hold);
  const wanted = Math.ceil(sheets.length / partSheets);
  if (parts.length !== wanted || parts.some((part, index) => part.ordinal !== index)) throw new Error("Not every part of the package is stored.");
  return parts.map((part) => part.objectKey);
}

async function partBytes(key: string): Promise<Uint8Array> {
  const bytes = await getObject(key);
  if (bytes === null) throw new Error("A part of the package is missing from the object store.");
  return bytes;
}

async function joinTo(file: string, { packageId }: PackageHold, source: PackageSource, keys: readonly string[], run: RunTask): Promise<number> {
  const parts: Uint8Array[] = [];
  for (const key of keys) parts.push(await partBytes(key));
  const { bytes, pages } = await run({ kind: "join", packageId, source, parts }, [...new Set(parts.map((part) => part.buffer as ArrayBuffer))]);
  await writeFile(file, bytes);
  return pages;
}

async function zipTo(file: string, { packageId }: PackageHold, source: PackageSource, keys: readonly string[], run: RunTask): Promise<null> {
  const zip = writeZip(file);
  const sums: string[] = [];
  const add = async (name: string, bytes: Uint8Array) => {
    sums.push(`${sha256Hex(bytes)}  ${name}`);
    await zip.add(name, bytes);
  };
  const front = await run({ kind: "front", packageId, source });
  await add("index.pdf", front.bytes);
  for (const key of keys) {
    for (const [name, bytes] of Object.entries(unzipSync(await partBytes(key)))) if (name !== PART_WORD) await add(name, bytes);
  }
  await zip.add("SHA256SUMS", strToU8(`${sums.join("\n")}\n`));
  await zip.close();
  return null;
}
