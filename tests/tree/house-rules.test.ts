/** Rules of the house that a reader would otherwise have to look for: exports, sizes, words, folders, tests left out. */
import { execFileSync } from "node:child_process";
import { readFileSync } from "node:fs";
import path from "node:path";
import { expect, test } from "vitest";
import { ROOT, sourceFiles } from "./source-tree";

const files = sourceFiles();

/** Committed and new files alike, without what git ignores. */
const tracked = execFileSync("git", ["ls-files", "--cached", "--others", "--exclude-standard"], { cwd: ROOT, encoding: "utf8" }).trim().split("\n");

const NEXT_DEFAULTS = /^app\/(.*\/)?(page|layout|template|error|global-error|not-found|loading|default)\.tsx$/;
const CONFIG_DEFAULTS = /^[a-z-]+\.config\.(ts|mjs)$/;

test("exports are named, except where a framework wants a default", () => {
  const found = files.filter((file) => file.hasDefaultExport).map((file) => file.file);
  expect(found.filter((file) => !NEXT_DEFAULTS.test(file) && !CONFIG_DEFAULTS.test(file))).toEqual([]);
});

test("there is one door for writes: no server actions", () => {
  expect(files.filter((file) => /^\s*["']use server["']/m.test(file.text)).map((file) => file.file)).toEqual([]);
});

test("file names are kebab-case", () => {
  const plain = /^(\[?\.{0,3}[a-z0-9-]+\]?)(\.[a-z0-9-]+)*$/;
  const nextRoute = /^\[{1,2}(\.\.\.)?[a-zA-Z-]+\]{1,2}$/;
  const wrong = files.filter(({ file }) => file.split("/").some((part) => !plain.test(part) && !nextRoute.test(part)));
  expect(wrong.map(({ file }) => file)).toEqual([]);
});

test("a file has at most 300 lines, or its header says why it is long", () => {
  const long = files.filter(({ text }) => text.split("\n").length > 301 && !/\blong\b|\blines\b/i.test(text.slice(0, 1200)));
  expect(long.map(({ file, text }) => `${file}: ${text.split("\n").length}`)).toEqual([]);
});

test("a tolerance has a name: no bare power of ten in the core or on paper", () => {
  const named = /^(export )?const [A-Z][A-Z0-9_]* = .*$/gm;
  const bare = files
    .filter(({ file }) => /^(iso|pdf)\//.test(file) && !/tolerances\.ts$/.test(file))
    .filter(({ text }) => /(?<![\w.])\d+(\.\d+)?e-\d+/.test(text.replace(/\/\*[\s\S]*?\*\//g, "").replace(/\/\/.*$/gm, "").replace(named, "")));
  expect(bare.map(({ file }) => file)).toEqual([]);
});

test("no test is left out", () => {
  const left = files.filter(({ file, text }) => /\.test\.tsx?$/.test(file) && /\b(test|it|describe)\.(skip|todo|only|fails)\b|\bx(it|describe)\(/.test(text));
  expect(left.map(({ file }) => file).filter((file) => !file.startsWith("tests/tree/"))).toEqual([]);
});

/** Spelled in halves, so that this file does not hold what it looks for. */
const UNWANTED = [
  `trans${"cript"}`, `\\blec${"ture"}`, `(seed|subject) docu${"ment"}`, `coming ${"soon"}`, `lorem ${"ipsum"}`,
].map((words) => new RegExp(words, "i"));
const UNWANTED_EXACT = [`\\bTO${"DO"}\\b`, `\\bFIX${"ME"}\\b`, `\\bHA${"CK"}\\b`, `(?<![\\w.])/wo${"rk"}/`, `(?<!/var)(?<![\\w.])/t${"mp"}\\b`, `\\.\\./sha${"red"}`].map((words) => new RegExp(words));

test("no word or path that does not belong here", () => {
  const found = tracked
    .filter((file) => /\.(ts|tsx|mts|mjs|json|css|svg|md|csv|html|txt)$|^\.ci\/|^\.gitignore$/.test(file) && file !== "package-lock.json")
    .flatMap((file) => {
      const text = readText(file);
      return [...UNWANTED, ...UNWANTED_EXACT].filter((words) => words.test(text)).map((words) => `${file}: ${words.source}`);
    });
  expect(found).toEqual([]);
});

function readText(file: string): string {
  try {
    return readFileSync(path.join(ROOT, file), "utf8");
  } catch {
    return "";
  }
}

test("the folders at the top are those of the plan", () => {
  const folders = new Set(tracked.filter((file) => file.includes("/")).map((file) => file.split("/")[0]));
  const plan = [".ci", "app", "components", "docs", "fonts", "iso", "lib", "migrations", "models", "pdf", "public", "scripts", "tests"];
  expect([...folders].filter((folder) => !plan.includes(folder ?? ""))).toEqual([]);
});

test("every script of package.json leads to a file", () => {
  const { scripts } = JSON.parse(readText("package.json")) as { scripts: Record<string, string> };
  const named = Object.values(scripts).flatMap((command) => /^node (\S+)/.exec(command)?.[1] ?? []);
  expect(named.length).toBeGreaterThan(3);
  expect(named.filter((file) => readText(file) === "")).toEqual([]);
});
