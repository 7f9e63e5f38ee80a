/** What a column of a file of points may mean, how it is headed when it leaves, and what its head suggests when it comes. */
import type { FileUnit } from "./read-length";

export const POINT_COLUMNS = [
  { key: "run", head: "Run", means: "Run or branch", also: ["branch", "runname", "branchname", "runid", "lineno", "leg"] },
  { key: "runName", head: "Run name", means: "Name of the run", also: [] },
  { key: "from", head: "Branch from", means: "Point the branch leaves from", also: ["from", "branchat", "leavesfrom", "parent", "startsat"] },
  { key: "point", head: "Point", means: "Name of the point", also: ["pt", "no", "number", "id", "pointid", "pointno", "node", "station"] },
  { key: "form", head: "Form", means: "How the row is given", also: ["kind", "mode", "entry"] },
  { key: "east", head: "East", means: "East (west negative)", also: ["e", "x", "easting", "dx", "de", "deltae", "deltax", "deltaeast", "eoffset", "xcoordinate", "xcoord"] },
  { key: "north", head: "North", means: "North (south negative)", also: ["n", "y", "northing", "dy", "dn", "deltan", "deltay", "deltanorth", "noffset", "ycoordinate", "ycoord"] },
  { key: "up", head: "Up", means: "Up (down negative)", also: ["u", "z", "elevation", "elev", "el", "level", "height", "dz", "du", "deltau", "deltaz", "rise", "zcoordinate", "zcoord"] },
  { key: "direction", head: "Direction", means: "Direction (E, UN, 045/30)", also: ["dir", "heading", "bearing", "towards"] },
  { key: "length", head: "Length", means: "Length along the direction", also: ["len", "l", "distance", "dist", "centertocenter", "centretocentre", "cc", "dimension", "travel"] },
  { key: "slope", head: "Slope", means: "Slope (2%, 1:100)", also: ["fall", "grade", "gradient", "pitch"] },
  { key: "move", head: "Move", means: "Move in one cell (e 3-1 1/2)", also: ["offset"] },
  { key: "item", head: "Item", means: "What stands there (wn, gate, red 3)", also: ["fitting", "component", "part", "type", "what"] },
  { key: "joint", head: "Joint", means: "Where it is welded (shop, field, fit)", also: ["weld", "shopfield", "shoporfield", "place", "joints"] },
  { key: "source", head: "Source", means: "Where the number comes from", also: ["provenance", "status", "origin"] },
  { key: "tolerance", head: "Tolerance", means: "Tolerance of the reading", also: ["tol", "plusminus"] },
  { key: "second", head: "Second reading", means: "Second reading", also: ["reading2", "secondreading", "check", "checkreading"] },
  { key: "by", head: "Read by", means: "Who read it", also: ["by", "readby", "measuredby", "surveyor", "who"] },
  { key: "date", head: "Read on", means: "When it was read", also: ["date", "when", "day", "readon"] },
  { key: "note", head: "Note", means: "Note", also: ["notes", "remark", "remarks", "comment", "comments", "text"] },
  { key: "detail", head: "Detail", means: "Detail, as this program wrote it", also: ["details"] },
] as const;

export type PointColumn = (typeof POINT_COLUMNS)[number]["key"];

/** For each column of the file, what it means; null = left out. */
export type ColumnMatch = readonly (PointColumn | null)[];

const BRACKETS = /[([{][^)\]}]*[)\]}]/g;

/** Letters and digits of a head, without what stands in brackets. */
export function plainHead(head: string): string {
  return head.replace(BRACKETS, "").toLowerCase().replace(/[^a-z0-9]/g, "").replace(/(mm|inches|feet)$/, "");
}

/** Suggests what each head means; the first of two that would mean the same keeps it. */
export function suggestColumns(heads: readonly string[]): ColumnMatch {
  const taken = new Set<PointColumn>();
  return heads.map((head) => {
    const plain = plainHead(head);
    const hit = POINT_COLUMNS.find(({ key, head: own, also }) => !taken.has(key) && (plainHead(own) === plain || (also as readonly string[]).includes(plain)));
    if (hit) taken.add(hit.key);
    return hit?.key ?? null;
  });
}

/** Offsets from the point before, or positions on the line's axes: survey words mean positions. */
export function suggestForm(heads: readonly string[]): "offset" | "absolute" {
  const plain = heads.map(plainHead);
  return plain.some((head) => ["easting", "northing", "elevation", "elev", "xcoordinate", "ycoordinate", "zcoordinate", "xcoord", "ycoord"].includes(head)) ? "absolute" : "offset";
}

const HEAD_UNITS: readonly (readonly [RegExp, FileUnit])[] = [
  [/\b(mm|millimet(?:er|re)s?)\b/i, "mm"], [/\b(cm|centimet(?:er|re)s?)\b/i, "cm"], [/\b(in|inch|inches|ft-in)\b/i, "in"], [/\b(ft|feet|foot)\b/i, "ft"], [/\b(m|met(?:er|re)s?)\b/i, "m"],
];

/** The unit the heads name in brackets, or null. */
export function suggestUnit(heads: readonly string[]): FileUnit | null {
  const named = heads.flatMap((head) => head.match(BRACKETS) ?? []).join(" ");
  return HEAD_UNITS.find(([words]) => words.test(named))?.[1] ?? null;
}

/** Why this matching cannot give points, as a sentence; null when it can. */
export function matchRefusal(match: ColumnMatch): string | null {
  const has = new Set(match);
  const twice = POINT_COLUMNS.find(({ key }) => match.filter((each) => each === key).length > 1);
  if (twice) return `Two columns mean "${twice.means}". Keep one.`;
  const offset = has.has("east") || has.has("north") || has.has("up");
  if (offset || has.has("move") || has.has("length")) return null;
  return "Say which columns hold the dimensions: east, north and up, or a direction and a length.";
}

/** Key under which a matching is remembered: files with the same heads are matched the same. */
export function headsKey(heads: readonly string[]): string {
  return heads.map((head) => head.trim().toLowerCase()).join("|").slice(0, 400);
}
