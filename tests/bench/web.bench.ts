/**
 * The signed-in job list over 20 keep-alive connections: as JSON from the built application and as its page, against a
 * bare node:http and pg server (bare-server.mjs) that opens the same cookie, checks the session and reads the
 * list with the very statements the application sends, and whose rows are compared with the application's before
 * anything is timed. One process each, the same database, the same number of connections to it, turn by turn; one
 * client for all, whose own work takes part of the machine from each alike. The page comes without rows: the browser asks
 * for them with the JSON request.
 */
import { existsSync } from "node:fs";
import path from "node:path";
import { isDeepStrictEqual } from "node:util";
import { isBuildCurrent } from "../../scripts/lib/build.mjs";
import { ask, load, type Load, type Target } from "./load";
import { median, type BenchLine } from "./stopwatch";
import { startWebStack, type WebStack } from "./web-stack";

const CONNECTIONS = 20;
const ROUNDS = 5;
const ROUND_MS = 1200;
/** Long enough for a few hundred answers: a server just started is slow. */
const WARM_UP_MS = 4000;
const NAME = "the job list over 20 connections";

export async function measure(): Promise<BenchLine[]> {
  if (!existsSync(path.resolve(import.meta.dirname, "../../.next/BUILD_ID"))) return [{ name: NAME, skipped: "The pages are not built; npm start builds them." }];
  const stack = await startWebStack();
  try {
    await assertSameRows(stack);
    return rowsOf(await rounds([stack.bare, stack.json, stack.page]));
  } finally {
    await stack.stop();
  }
}

async function assertSameRows({ bare, json, page }: WebStack): Promise<void> {
  const [one, other, html] = [await ask(bare), await ask(json), await ask(page)];
  if ([one, other, html].some(({ status }) => status !== 200)) throw new Error(`Not all answer: bare ${one.status}, JSON ${other.status}, page ${html.status}.`);
  const rows = JSON.parse(other.text) as unknown[];
  if (rows.length === 0 || !isDeepStrictEqual(JSON.parse(one.text), rows)) throw new Error("The bare server answers other rows than the application: the two cannot be compared.");
}

/** Every target in turn, several times over; the rounds of each. */
async function rounds(targets: readonly Target[]): Promise<Load[][]> {
  const loads: Load[][] = targets.map(() => []);
  for (const target of targets) await load(target, CONNECTIONS, WARM_UP_MS);
  for (let round = 0; round < ROUNDS; round += 1) {
    for (const [index, target] of targets.entries()) loads[index]?.push(await load(target, CONNECTIONS, ROUND_MS));
  }
  return loads;
}

function rowsOf([bare = [], json = [], page = []]: Load[][]): BenchLine[] {
  const rate = (loads: readonly Load[]): number => median(loads.map(({ perSecond }) => perSecond));
  const count = (loads: readonly Load[], of: "answers" | "errors"): number => loads.reduce((sum, one) => sum + one[of], 0);
  const detail = (loads: readonly Load[]): string => `${rate(loads).toFixed(0)} : ${rate(bare).toFixed(0)} a second${isBuildCurrent() ? "" : ", pages built before the last changes"}`;
  const errors = [bare, json, page].map((loads) => count(loads, "errors"));
  const answers = [bare, json, page].map((loads) => count(loads, "answers"));
  return [
    { name: "job list as JSON : bare server", figure: rate(json) / rate(bare), budget: 0.2, atLeast: true, detail: detail(json) },
    { name: "job list's page : bare server", figure: rate(page) / rate(bare), budget: 0.045, atLeast: true, detail: detail(page) },
    { name: "errors, all three", figure: errors.reduce((sum, one) => sum + one, 0), unit: "errors", budget: 0, detail: `bare ${errors[0]} in ${answers[0]} answers, JSON ${errors[1]} in ${answers[1]}, page ${errors[2]} in ${answers[2]}` },
  ];
}
