/** Made-up values tests start from. */
import { newRunDocument, type Entry, type Item, type LineSettings, type Point, type RunDocument } from "@/iso";
import { defaultLineSettings } from "@/lib/rules/default-settings";

const ZERO: Entry = { text: "0", mm: 0 };

/** A length as typed in millimetres. */
export function entryMm(mm: number): Entry {
  return { text: `${mm}mm`, mm };
}

/** A point east, north and up of the one before it, mm, from drawing, with the item named. */
export function pointAt(id: string, [e, n, u]: readonly [number, number, number], item: Item = { kind: "none" }): Point {
  return {
    id,
    offset: { kind: "enu", e: e === 0 ? ZERO : entryMm(e), n: n === 0 ? ZERO : entryMm(n), u: u === 0 ? ZERO : entryMm(u) },
    item,
    places: {},
    trimMm: null,
    provenance: { kind: "from-drawing", toleranceMm: null, by: null, at: null, second: null },
    note: "",
  };
}

/** A face of a class 150 weld-neck flange at a run's end. */
export const endFlange: Item = {
  kind: "flange", flange: "weld-neck", ratingClass: null, boltHoles: "straddle", gasketSide: "after", goes: "nozzle", text: "N1",
};

/** NPS 4 STD from a flange east, up and north to an open end: one spool, three pieces, no problem that stops it. */
export function sampleDocument(number: string, eastMm = 1_000, settings: LineSettings = defaultLineSettings("imperial")): RunDocument {
  const document = newRunDocument(number, settings);
  const main = document.runs[0]!;
  const points = [
    pointAt("a", [0, 0, 0], endFlange),
    pointAt("b", [eastMm, 0, 0]),
    pointAt("c", [0, 0, 800]),
    pointAt("d", [0, 600, 0], { kind: "end", goes: "open", text: "" }),
  ];
  return { ...document, runs: [{ ...main, points }] };
}

/** A chain of spools: straight pipe with field welds between stretches, so that a line has `count` of them. */
export function chainDocument(number: string, count: number): RunDocument {
  const document = newRunDocument(number, defaultLineSettings("imperial"));
  const main = document.runs[0]!;
  const welds = Array.from({ length: count - 1 }, (_, index) => ({ ...pointAt(`w${index}`, [1_000, 0, 0], { kind: "joint" }), places: { in: "field" as const } }));
  const points = [
    pointAt("start", [0, 0, 0], { kind: "end", goes: "open", text: "" }),
    ...welds,
    pointAt("last", [1_000, 0, 0], { kind: "end", goes: "open", text: "" }),
  ];
  return { ...document, runs: [{ ...main, points }] };
}
