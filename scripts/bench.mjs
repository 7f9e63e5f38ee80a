/**
 * `npm run bench`: the measurements of tests/bench, each as a ratio to something measured beside it in the same run,
 * since bare times say more about the machine than about the program. Each file there exports
 * `measure(): Promise<BenchLine[]>` and is bundled first, so that what is measured is the code as it ships and not a loader's
 * doing. Names after `--` run only the files that contain one of them.
 * A budget that is not met is printed as such and does not fail the command: it is a finding, not a fault. A part that
 * cannot be measured here says why. Only a measurement that breaks ends with exit code 1.
 */
import { fork } from "node:child_process";
import { once } from "node:events";
import { existsSync, readdirSync } from "node:fs";
import { availableParallelism, loadavg } from "node:os";
import path from "node:path";
import { fileURLToPath } from "node:url";
import { withBundle } from "./lib/bundle.mjs";
import { checkNode, ensurePackages } from "./lib/machine.mjs";
import { ROOT } from "./lib/paths.mjs";
import { sayHeading, sayWhy } from "./lib/say.mjs";

// Parts of the server run in this process; what they log is no measurement.
process.env.LOG_LEVEL ??= "error";

const FOLDER = path.join(ROOT, "tests/bench");
/** First word of the command line of a process that measures one file. */
const MEASURE = "--measure";
const COLUMNS = [52, 10, 12, 8];

const columns = (texts) => texts.map((text, index) => (index === 1 ? text.padStart(COLUMNS[1]) : text.padEnd(COLUMNS[index] ?? 0))).join("  ").trimEnd();

/** Three digits that count, without powers of ten. */
function figureText(figure, unit) {
  const digits = Math.abs(figure) >= 100 ? figure.toFixed(0) : String(Number(figure.toPrecision(3)));
  return unit === undefined ? digits : `${digits} ${unit}`;
}

/** Prints a line; answers whether it met its budget, or null when it has none. */
function print(line) {
  if ("skipped" in line) {
    console.log(`  ${line.name}: not measured. ${line.skipped}`);
    return null;
  }
  const { name, figure, unit, budget, atLeast = false, detail } = line;
  const met = budget === undefined ? null : atLeast ? figure >= budget : figure <= budget;
  const bound = budget === undefined ? "-" : `${atLeast ? ">=" : "<="} ${budget}`;
  console.log(`  ${columns([name, figureText(figure, unit), bound, met === null ? "-" : met ? "met" : "not met", detail])}`);
  return met;
}

/**
 * Measures one file in a process of its own, so that no measurement runs in what another left behind, and prints it.
 * Answers the verdicts of its lines, or null when it broke.
 */
async function runFile(file) {
  sayHeading(file.replace(".bench.ts", ""));
  const child = fork(fileURLToPath(import.meta.url), [MEASURE, file], { cwd: ROOT, serialization: "advanced" });
  const ended = once(child, "exit");
  const [said] = await Promise.race([once(child, "message"), ended.then(() => [{ broke: "It ended without a word." }])]);
  await ended;
  if (said.lines) return said.lines.map(print);
  console.log(`  This measurement broke: ${said.broke}`);
  return null;
}

/** The part within that process: tells its parent the lines, or why there are none. */
async function measure(file) {
  return withBundle(path.join(FOLDER, file), async (loaded) => ({ lines: await loaded.measure() }));
}

async function main() {
  checkNode();
  await ensurePackages();
  const wanted = process.argv.slice(2);
  const files = existsSync(FOLDER) ? readdirSync(FOLDER).filter((name) => name.endsWith(".bench.ts")).sort() : [];
  console.log(`\n  ${columns(["measured", "figure", "budget", "", "from"])}`);
  const verdicts = [];
  for (const file of files.filter((name) => wanted.length === 0 || wanted.some((word) => name.includes(word)))) verdicts.push(await runFile(file));
  const [all, broken] = [verdicts.flat(), verdicts.filter((verdict) => verdict === null).length];
  const [met, missed] = [all.filter((one) => one === true).length, all.filter((one) => one === false).length];
  console.log(`\n${met} of ${met + missed} budgets met, ${missed} not met. ${availableParallelism()} processors, load ${loadavg()[0].toFixed(1)}.`);
  if (broken > 0) console.log(`${broken} ${broken === 1 ? "measurement" : "measurements"} broke.`);
  return broken > 0 ? 1 : 0;
}

if (process.argv[2] === MEASURE) {
  const said = await measure(process.argv[3]).catch((error) => ({ broke: error instanceof Error ? error.message : String(error) }));
  process.send(said, () => process.exit(0));
} else {
  main().then(
    (code) => process.exit(code),
    (error) => process.exit(sayWhy(error)),
  );
}
