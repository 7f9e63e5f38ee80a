/** A point in a reader's words: where it lies, what stands there, where its number is from, what starts there. */
import { formatAngleDeg, formatLength, type Item, type Offset, type Point, type UnitSystem } from "@/iso";

/** An offset in a reader's words. */
export function offsetText(offset: Offset, input: { readonly units: UnitSystem }): string {
  const text = (mm: number) => formatLength(mm, input.units);
  if (offset.kind === "polar") return `${text(offset.length.mm)} ${offset.direction.text}`;
  if (offset.kind === "slope") return `${text(offset.length.mm)} ${offset.direction.text} at ${offset.slope.text}`;
  const parts = (["e", "n", "u"] as const)
    .filter((axis) => offset.kind === "absolute" || offset[axis].mm !== 0)
    .map((axis) => `${axis.toUpperCase()} ${text(offset[axis].mm)}`);
  return (offset.kind === "absolute" ? "at " : "") + (parts.join(" ") || "no offset");
}

/** All of a point that a revision's list of changes compares. */
export function pointText(point: Point, units: UnitSystem): string {
  const { offset, item, from, places, rest, note } = pointParts(point, units);
  return `${offset}${item === "" ? "" : `, ${item}`} (${from})${places}${rest}${note === "" ? "" : `, note "${note}"`}`;
}

export interface PointParts {
  readonly offset: string;
  /** "" where nothing is named. */
  readonly item: string;
  /** Where its number is from. */
  readonly from: string;
  readonly places: string;
  /** Trim, what starts, turned round. */
  readonly rest: string;
  readonly note: string;
}

/** The same by its parts, so that each can be compared by itself. */
export function pointParts(point: Point, units: UnitSystem): PointParts {
  const second = point.provenance.second === null ? "" : `, second reading ${formatLength(point.provenance.second.mm, units)}`;
  const trim = point.trimMm === null ? "" : `, trim ${formatLength(point.trimMm, units)}`;
  const starts = Object.entries(point.starts ?? {}).map(([field, value]) => `, ${field} ${value === "" ? "ends" : `"${value}" starts`}`).join("");
  return {
    offset: offsetText(point.offset, { units }),
    item: point.item.kind === "none" ? "" : itemText(point.item, units),
    from: `${point.provenance.kind}${second}`,
    places: Object.entries(point.places).map(([role, place]) => `, ${role} weld ${place}`).join(""),
    rest: `${trim}${starts}${point.flipped ? ", run turned round" : ""}`,
    note: point.note,
  };
}

/** What a length of an item is called. */
const LENGTHS: Readonly<Record<string, string>> = { radiusMm: "radius", padMm: "pad", lengthMm: "length", gasketMm: "gasket", faceToFaceMm: "face to face" };
const WORDS: Readonly<Record<string, (value: string) => string>> = {
  set: (value) => `set ${value}`, toward: (value) => `toward ${value}`, pieces: (value) => `of ${value} pieces`, stubEnd: (value) => `${value} stub end`,
  stem: (value) => `stem ${value}`, flat: (value) => `flat ${value}`, gasketSide: (value) => `gasket ${value}`, ratingClass: (value) => `class ${value}`,
};
const FLAGS: Readonly<Record<string, string>> = { half: "half", against: "against the run" };

function itemText(item: Item, units: UnitSystem): string {
  const { kind, ...rest } = item as { kind: string } & Record<string, unknown>;
  return [kind, ...Object.entries(rest).flatMap(([key, value]) => factText(key, value, units))].join(" ");
}

function factText(key: string, value: unknown, units: UnitSystem): string[] {
  if (value === null || value === undefined || value === "" || value === false) return [];
  if (value === true) return [FLAGS[key] ?? key];
  const length = LENGTHS[key];
  if (length !== undefined && typeof value === "number") return [`${length} ${formatLength(value, units)}`];
  if (isTurn(value)) return [`holes turned ${formatAngleDeg((value.turnDeg * Math.PI) / 180)} from ${value.from}`];
  const text = typeof value === "object" ? Object.values(value).join(" ") : String(value);
  return [WORDS[key]?.(text) ?? text];
}

function isTurn(value: unknown): value is { turnDeg: number; from: string } {
  return typeof value === "object" && value !== null && "turnDeg" in value && "from" in value;
}
