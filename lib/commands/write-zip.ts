/** A zip written to a file as it comes, so that it is never in memory whole. */
import { createWriteStream } from "node:fs";
import { finished } from "node:stream/promises";
import { Zip, ZipPassThrough } from "fflate";

/** Every entry's time: the same files give the same zip. */
const TIME = new Date("2000-01-01T00:00:00");

export interface ZipFile {
  add(name: string, bytes: Uint8Array): Promise<void>;
  /** Writes the list at its end. */
  close(): Promise<void>;
}

/** Files are stored as they are, in the order they are added. @throws when the file cannot be written. */
export function writeZip(file: string): ZipFile {
  const out = createWriteStream(file);
  const done = finished(out);
  done.catch(() => undefined);
  let trouble: Error | null = null;
  const zip = new Zip((error, chunk, isLast) => {
    if (error) trouble = error;
    else out.write(chunk);
    if (isLast) out.end();
  });
  const drained = async () => {
    if (trouble) throw trouble;
    if (out.writableNeedDrain) await Promise.race([new Promise<void>((resolve) => out.once("drain", resolve)), done]);
  };
  return {
    add: async (name, bytes) => {
      const entry = new ZipPassThrough(name);
      entry.mtime = TIME;
      zip.add(entry);
      entry.push(bytes, true);
      await drained();
    },
    close: async () => {
      zip.end();
      await done;
    },
  };
}
