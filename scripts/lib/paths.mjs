/** Where things are: the project's folder and its data folder. */
import path from "node:path";
import { fileURLToPath } from "node:url";

export const ROOT = path.resolve(path.dirname(fileURLToPath(import.meta.url)), "../..");

/** The data folder: QUARTERLINE_DATA_DIR, else .data in the project. */
export function dataFolder() {
  return path.resolve(process.env.QUARTERLINE_DATA_DIR || path.join(ROOT, ".data"));
}
