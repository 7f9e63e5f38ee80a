/** Who may import whom. The table is the house's plan: a breach means a rule, a query or a clock in the wrong room. */
import { describe, expect, test } from "vitest";
import { sourceFiles, type Import, type SourceFile } from "./source-tree";

type Room =
  | "iso" | "fonts" | "pdf" | "models" | "migrations" | "lib/rules" | "lib/server" | "lib/queries" | "lib/commands"
  | "lib/jobs" | "components" | "app" | "scripts" | "tests" | "top";

/** What a room may import besides itself. "types:iso" allows types only. */
const MAY_IMPORT: Readonly<Record<Exclude<Room, "scripts" | "tests" | "top">, readonly string[]>> = {
  iso: [],
  fonts: ["types:iso"],
  migrations: [],
  "lib/rules": ["iso"],
  models: ["lib/rules", "types:iso"],
  pdf: ["iso", "fonts"],
  "lib/server": ["models", "lib/rules"],
  "lib/queries": ["models", "lib/rules", "lib/server", "iso"],
  "lib/commands": ["models", "lib/rules", "lib/server", "lib/queries", "iso", "pdf", "fonts"],
  "lib/jobs": ["lib/commands", "lib/queries", "lib/server"],
  components: ["iso", "lib/rules", "fonts"],
  app: ["components", "lib/rules", "lib/server", "lib/queries", "lib/commands", "lib/jobs", "iso"],
};

/** Packages the pure core must not know: it has no screen, no server, no database, no clock of its own. */
const KEPT_FROM_ISO = /^(node:|react|next|sequelize|pg|pino|pdfkit|fs$|path$|crypto$|os$)/;
const KEPT_FROM_BROWSER = /^(node:|sequelize|pg$|pg-boss|pino|nodemailer|@aws-sdk)/;

function roomOf(file: string): Room {
  const [first = "", second = ""] = file.split("/");
  if (first === "lib") return `lib/${second}` as Room;
  if (!file.includes("/")) return /^(proxy|instrumentation)\.ts$/.test(file) ? "app" : "top";
  return first as Room;
}

const files = sourceFiles();

function breaches(check: (file: SourceFile, wanted: Import) => string | null): string[] {
  return files.flatMap((file) => file.imports.flatMap((wanted) => {
    const why = check(file, wanted);
    return why === null ? [] : [`${file.file} imports ${wanted.text}: ${why}`];
  }));
}

function breachOfTable(file: SourceFile, wanted: Import): string | null {
  const from = roomOf(file.file);
  if (from === "scripts" || from === "tests" || from === "top" || wanted.target === null) return null;
  const to = roomOf(wanted.target);
  if (to === from) return null;
  const allowed = MAY_IMPORT[from] ?? [];
  if (allowed.includes(to) || (wanted.typeOnly && allowed.includes(`types:${to}`))) return null;
  return `${from} may not import ${to}`;
}

test("the walk finds the house", () => {
  expect(files.length).toBeGreaterThan(100);
  expect(files.flatMap((file) => file.imports).length).toBeGreaterThan(300);
});

describe("imports", () => {
  test("every import of ours leads to a file", () => {
    const present = new Set(files.map((file) => file.file));
    expect(breaches((_, wanted) => (wanted.target === null || present.has(wanted.target) || /\.(css|json)$/.test(wanted.target) ? null : "there is no such file"))).toEqual([]);
  });

  test("the table is kept", () => {
    expect(breaches(breachOfTable)).toEqual([]);
  });

  test("iso is entered through iso/index.ts only, and never uses that door itself", () => {
    expect(breaches((file, wanted) => {
      const from = roomOf(file.file);
      if (from === "tests" || from === "scripts" || wanted.target === null || roomOf(wanted.target) !== "iso") return null;
      if (from === "iso") return wanted.target === "iso/index.ts" ? "inside iso files import each other" : null;
      return wanted.target === "iso/index.ts" ? null : "iso is entered through @/iso";
    })).toEqual([]);
  });

  test("the core knows no screen, server, database or file; the browser's side no server", () => {
    expect(breaches((file, wanted) => {
      const room = roomOf(file.file);
      if (room === "iso" && wanted.target === null && KEPT_FROM_ISO.test(wanted.text)) return "not in the pure core";
      if ((room === "components" || room === "lib/rules") && !wanted.typeOnly && wanted.target === null && KEPT_FROM_BROWSER.test(wanted.text)) return "not in the browser";
      return null;
    })).toEqual([]);
  });

  test("no file imports itself by a detour", () => {
    expect(findCycles()).toEqual([]);
  });
});

/** Each cycle once, as "a -> b -> a". Type imports count: they too tie two files together. */
function findCycles(): string[] {
  const graph = new Map(files.map((file) => [file.file, [...new Set(file.imports.flatMap(({ target }) => (target === null ? [] : [target])))]]));
  const state = new Map<string, "open" | "done">();
  const cycles: string[] = [];
  const visit = (file: string, trail: readonly string[]): void => {
    if (state.get(file) === "done") return;
    if (state.get(file) === "open") {
      cycles.push([...trail.slice(trail.indexOf(file)), file].join(" -> "));
      return;
    }
    state.set(file, "open");
    for (const next of graph.get(file) ?? []) visit(next, [...trail, file]);
    state.set(file, "done");
  };
  for (const file of graph.keys()) visit(file, []);
  return cycles;
}

test("the core has no clock, chance or environment, and paper no clock or chance", () => {
  const clockOrChance = /\b(Date\.now|new Date\(\)|Math\.random|crypto\.|performance\.)/;
  const surroundings = /\b(process\.|localStorage|window\.|document\.(query|body|create))/;
  const found = files.filter(({ file, text }) => {
    const room = roomOf(file);
    const code = withoutComments(text);
    return ((room === "iso" || room === "pdf") && clockOrChance.test(code)) || (room === "iso" && surroundings.test(code));
  });
  expect(found.map(({ file }) => file)).toEqual([]);
});

function withoutComments(text: string): string {
  return text.replace(/\/\*[\s\S]*?\*\//g, "").replace(/(^|\s)\/\/.*$/gm, "");
}
