/**
 * `npm run gallery`: pictures of what users see, in gallery/: the sixty golden runs, every sheet of the demo lines and of the
 * sample runs; with `-- --screens URL` the screens of a running demo as well. Other words after `--` keep to pictures whose
 * name has one of them.
 */
import { existsSync } from "node:fs";
import path from "node:path";
import { parseArgs } from "node:util";
import { checkNode, ensurePackages } from "./lib/machine.mjs";
import { ROOT } from "./lib/paths.mjs";
import { PlainError, sayHeading, sayWhy } from "./lib/say.mjs";
import { runProgram } from "./lib/steps.mjs";

const FOLDER = path.join(ROOT, "gallery");
const PARTS = path.join(ROOT, "scripts/gallery/make-gallery.ts");

/** Path of the first of some programs that is there, or null. */
function programPath(names) {
  const folders = (process.env.PATH ?? "").split(":").filter((folder) => folder !== "");
  return names.flatMap((name) => folders.map((folder) => path.join(folder, name))).find((file) => existsSync(file)) ?? null;
}

function readArguments() {
  try {
    return parseArgs({ allowPositionals: true, options: { screens: { type: "string" } } });
  } catch (error) {
    throw new PlainError(`${error.message}\nUse:  npm run gallery  or  npm run gallery -- --screens http://127.0.0.1:3000`, 64);
  }
}

/** @throws PlainError when the address is none or nothing answers there. */
async function checkDemo(address) {
  if (!URL.canParse(address)) throw new PlainError(`"${address}" is not an address. Give one like http://127.0.0.1:3000.`, 64);
  const answer = await fetch(new URL("/api/health", address)).catch(() => null);
  if (!answer?.ok) throw new PlainError(`Nothing answers at ${address}. Start the demo with  npm start  and use the address it ends with.`, 69);
}

async function main() {
  checkNode();
  const { values, positionals } = readArguments();
  if (programPath(["pdftoppm"]) === null) {
    throw new PlainError("pdftoppm is missing, which makes pictures of PDF pages. Install it with:  sudo apt-get install poppler-utils", 69);
  }
  const browser = process.env.CHROMIUM_PATH ?? programPath(["chromium"]);
  if (values.screens !== undefined) {
    if (browser === null) throw new PlainError("Chromium is missing, which takes the screens. Install it with:  sudo apt-get install chromium", 69);
    await checkDemo(values.screens);
  }
  await ensurePackages();
  sayHeading("Gallery");
  const screens = values.screens === undefined ? [] : ["--screens", values.screens, "--chromium", browser];
  const { code } = await runProgram(process.execPath, ["--import", "tsx", PARTS, "--folder", FOLDER, ...screens, ...positionals], { cwd: ROOT, show: true });
  return code ?? 1;
}

main().then(
  (code) => process.exit(code),
  (error) => process.exit(sayWhy(error)),
);
