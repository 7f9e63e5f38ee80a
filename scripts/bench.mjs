/**
 * `npm run bench`: the measurements of tests/bench, each as a ratio to something measured beside it in the same run,
 * since bare times say more about the machine than about the program. Each file there exports
 * `measure(): Promise<BenchRow[]>`. Names after `--` run only the files that contain one of them.
 */
import { existsSync, readdirSync } from "node:fs";
import path from "node:path";
import { pathToFileURL } from "node:url";
import { checkNode, ensurePackages } from "./lib/machine.mjs";
import { ROOT } from "./lib/paths.mjs";
import { sayHeading, sayWhy } from "./lib/say.mjs";

const FOLDER = path.join(ROOT, "tests/bench");

function print({ name, ratio, budget, atLeast, detail }) {
  const kept = budget === undefined ? "" : (atLeast ? ratio >= budget : ratio <= budget) ? "kept" : "MISSED";
  const bound = budget === undefined ? "" : `budget ${atLeast ? ">=" : "<="} ${budget}`;
  console.log(`  ${name.padEnd(52)} ${ratio.toPrecision(3).padStart(9)}  ${bound.padEnd(18)} ${kept.padEnd(7)} ${detail}`);
  return kept !== "MISSED";
}

async function main() {
  checkNode();
  await ensurePackages();
  const { tsImport } = await import("tsx/esm/api");
  const wanted = process.argv.slice(2);
  const files = existsSync(FOLDER) ? readdirSync(FOLDER).filter((name) => name.endsWith(".bench.ts")).sort() : [];
  let missed = 0;
  for (const file of files.filter((name) => wanted.length === 0 || wanted.some((word) => name.includes(word)))) {
    sayHeading(file.replace(".bench.ts", ""));
    const loaded = await tsImport(pathToFileURL(path.join(FOLDER, file)).href, import.meta.url);
    for (const row of await (loaded.measure ?? loaded.default.measure)()) if (!print(row)) missed += 1;
  }
  console.log(missed === 0 ? "\nEvery budget is kept." : `\n${missed} ${missed === 1 ? "budget is" : "budgets are"} missed.`);
  return missed === 0 ? 0 : 1;
}

main().then(
  (code) => process.exit(code),
  (error) => process.exit(sayWhy(error)),
);
