/**
 * `npm test`: types, lint, pure tests, database tests on a real PostgreSQL, and the browser walk on a fresh build and
 * throw-away data. Sets up what is missing by itself; prints one closing line with the sums. Plain Node.
 * Suites can be named to run fewer of them: `npm test -- pure database`.
 */
import { mkdtempSync, readFileSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { interrupt } from "./lib/interrupt.mjs";
import { checkNode, checkRoom, ensureDebianPackages, ensurePackages } from "./lib/machine.mjs";
import { ROOT } from "./lib/paths.mjs";
import { PlainError, say, sayHeading, sayWhy } from "./lib/say.mjs";
import { runProgram, stopSteps } from "./lib/steps.mjs";

const ROOM_MB = 1500;
const bin = (name) => path.join(ROOT, "node_modules", name);
const reports = mkdtempSync(path.join(tmpdir(), "quarterline-test-"));
const environment = { ...process.env, VITE_CONFIG_NATIVE_IGNORE_WARNING: "true", AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED: "true", NEXT_TELEMETRY_DISABLED: "1", QUARTERLINE_QUIET: "1" };
delete environment.NODE_ENV;

/** Each answers how many checks passed and failed. */
const SUITES = {
  types: () => runCheck([bin("typescript/bin/tsc"), "--noEmit"]),
  lint: () => runCheck([bin("eslint/bin/eslint.js"), "--quiet", "--cache", "--cache-location", path.join(ROOT, "node_modules/.cache/eslint/"), "."]),
  pure: () => runVitest("pure"),
  database: () => runVitest("database"),
  browser: async () => {
    const { ensureBuild, leaveBuild } = await import("./lib/build.mjs");
    await ensureBuild();
    try {
      return await runVitest("browser");
    } finally {
      leaveBuild();
    }
  },
};

/** A program that passes or fails as a whole. */
async function runCheck(args) {
  const { code } = await runProgram(process.execPath, args, { cwd: ROOT, env: environment, show: true });
  return code === 0 ? { passed: 1, failed: 0 } : { passed: 0, failed: 1 };
}

/** One of vitest's projects; a file that cannot even be loaded counts as one failure, as does a run without a report. */
async function runVitest(project) {
  const report = path.join(reports, `${project}.json`);
  const args = [bin("vitest/vitest.mjs"), "run", "--project", project, "--reporter=default", "--reporter=json", `--outputFile.json=${report}`];
  const { code } = await runProgram(process.execPath, args, { cwd: ROOT, env: { ...environment, NO_COLOR: "1" }, show: true });
  try {
    const { numPassedTests: passed, numFailedTests, testResults, numPendingTests, numTodoTests } = JSON.parse(readFileSync(report, "utf8"));
    const unloaded = testResults.filter((file) => file.status === "failed" && file.assertionResults.length === 0).length;
    const left = (numPendingTests ?? 0) + (numTodoTests ?? 0);
    if (left > 0) console.error(`  ! ${left} tests of "${project}" were left out, which counts as failed`);
    const failed = numFailedTests + unloaded + left;
    return { passed, failed: failed === 0 && (code !== 0 || passed === 0) ? 1 : failed };
  } catch {
    return { passed: 0, failed: 1 };
  }
}

function wantedSuites() {
  const named = process.argv.slice(2);
  const unknown = named.filter((name) => !(name in SUITES));
  if (unknown.length > 0) throw new PlainError(`There is no suite ${unknown.join(", ")}. There are: ${Object.keys(SUITES).join(", ")}.`, 64);
  return Object.keys(SUITES).filter((name) => named.length === 0 || named.includes(name));
}

async function main() {
  sayHeading("Quarterline: tests");
  const began = Date.now();
  checkNode();
  const wanted = wantedSuites();
  checkRoom(ROOT, ROOM_MB);
  await ensureDebianPackages(["postgresql", "chromium", "poppler-utils", "qpdf", "openssl"]);
  interrupt.checkpoint();
  await ensurePackages();
  const sum = { passed: 0, failed: 0 };
  for (const name of wanted) {
    interrupt.checkpoint();
    sayHeading(`${name} ...`);
    const from = Date.now();
    const result = await SUITES[name]().catch((error) => {
      sayWhy(error);
      return { passed: 0, failed: 1 };
    });
    say(`${name}: ${result.passed} passed, ${result.failed} failed in ${Math.round((Date.now() - from) / 1000)} s`);
    sum.passed += result.passed;
    sum.failed += result.failed;
  }
  interrupt.checkpoint();
  say(`all in ${Math.round((Date.now() - began) / 1000)} s`);
  console.log(`\n${sum.passed} passed, ${sum.failed} failed`);
  return sum.failed === 0 ? 0 : 1;
}

for (const [signal, code] of [["SIGINT", 130], ["SIGTERM", 143]]) {
  process.on(signal, () => {
    interrupt.code = code;
    stopSteps();
  });
}

let exitCode = 1;
try {
  exitCode = await main();
} catch (error) {
  exitCode = sayWhy(error);
} finally {
  rmSync(reports, { recursive: true, force: true });
}
process.exit(exitCode);
