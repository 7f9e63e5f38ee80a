/**
 * The Detail cell: what the plain columns of a file of points cannot say, as `item.stem=E; item.faceToFaceMm=203`. Each
 * name is a path into the point (or, under `run.`, into its run); an empty value takes the field away.
 */

export type Leaf = string | number | boolean | null;
export type Leaves = ReadonlyMap<string, Leaf>;
type Plain = Record<string, unknown>;

/** Every plain value of an object by its path. Absent and undefined are the same. */
export function leavesOf(value: unknown, path = ""): Map<string, Leaf> {
  if (value === undefined) return new Map();
  if (typeof value !== "object" || value === null) return new Map([[path, value as Leaf]]);
  return new Map(Object.entries(value).flatMap(([key, inner]) => [...leavesOf(inner, path === "" ? key : `${path}.${key}`)]));
}

/** Changes that turn `from` into `to`: undefined takes a value away. Removals come first. */
export function leafChanges(from: Leaves, to: Leaves): [string, Leaf | undefined][] {
  const gone = [...from.keys()].filter((path) => !to.has(path)).map((path): [string, undefined] => [path, undefined]);
  const set = [...to].filter(([path, value]) => !from.has(path) || from.get(path) !== value);
  return [...gone, ...set];
}

const PLAIN_WORD = /^[A-Za-z][A-Za-z0-9 _./-]*$/;
const RESERVED = /^(true|false|null)$/;

/** Writes changes as one cell. */
export function detailText(changes: readonly (readonly [string, Leaf | undefined])[]): string {
  return changes.map(([path, value]) => `${path}=${valueText(value)}`).join("; ");
}

function valueText(value: Leaf | undefined): string {
  if (value === undefined) return "";
  return typeof value === "string" && PLAIN_WORD.test(value) && !RESERVED.test(value) && value.trim() === value ? value : JSON.stringify(value);
}

const ENTRY = /\s*([A-Za-z][A-Za-z0-9.]*)\s*=\s*("(?:[^"\\]|\\.)*"|[^;"]*?)\s*(?:;|$)/y;

/** Reads a Detail cell, or says what is wrong with it. */
export function parseDetail(text: string): { readonly ok: true; readonly changes: readonly [string, Leaf | undefined][] } | { readonly ok: false; readonly message: string } {
  const changes: [string, Leaf | undefined][] = [];
  const plain = text.trim();
  ENTRY.lastIndex = 0;
  while (ENTRY.lastIndex < plain.length) {
    const at = ENTRY.lastIndex;
    const hit = ENTRY.exec(plain);
    if (!hit) return { ok: false, message: `From "${plain.slice(at, at + 20)}" on it is no name=value. Leave the cell as it was written, or empty it.` };
    changes.push([hit[1] ?? "", readValue(hit[2] ?? "")]);
  }
  return { ok: true, changes };
}

function readValue(text: string): Leaf | undefined {
  if (text === "") return undefined;
  try {
    const value: unknown = JSON.parse(text);
    return typeof value === "object" && value !== null ? text : (value as Leaf);
  } catch {
    return text;
  }
}

/** The object with the changes made; what was shared stays shared, nothing handed in is changed. */
export function withLeaves(value: Plain, changes: readonly (readonly [string, Leaf | undefined])[]): Plain {
  return changes.reduce<Plain>((now, [path, leaf]) => withLeaf(now, path.split("."), leaf), value);
}

function withLeaf(value: Plain, [key = "", ...rest]: readonly string[], leaf: Leaf | undefined): Plain {
  const without = Object.fromEntries(Object.entries(value).filter(([name]) => name !== key));
  if (rest.length === 0) return leaf === undefined ? without : { ...without, [key]: leaf };
  const inner = Object.hasOwn(value, key) ? value[key] : undefined;
  const base = typeof inner === "object" && inner !== null ? (inner as Plain) : {};
  return { ...without, [key]: withLeaf(base, rest, leaf) };
}
