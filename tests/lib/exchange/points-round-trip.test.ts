/** A line written to a CSV and read back is the same line: same points, same model, whatever stands on it. */
import { describe, expect, test } from "vitest";
import { buildModel, emptyMarks, newRunDocument, parseRunDocument, type Item, type Model, type Offset, type Point, type RunDocument } from "@/iso";
import { defaultLineSettings } from "@/lib/rules/default-settings";
import { pointRows } from "@/lib/rules/exchange/write-points";
import { planImport } from "@/lib/rules/exchange/plan-import";
import { OWN_UNIT } from "@/lib/rules/exchange/read-length";
import { POINT_READERS, POINT_WRITERS } from "@/components/exchange/point-words";
import { parseMove } from "@/components/run-editor/move-entry";
import { sampleRuns } from "../../fixtures/sample-runs";
import { pointAt } from "../../factories";
import { freshIds, readCsv, writtenText } from "./import-support";

/** The line as its file gives it back. */
function roundTrip(document: RunDocument, into: RunDocument = document): RunDocument {
  const text = writtenText(pointRows(document, POINT_WRITERS, POINT_READERS));
  const { units } = document.settings;
  const read = readCsv(text, { units, unit: OWN_UNIT[units] });
  expect(read.faults).toEqual([]);
  const plan = planImport(into, read.good, { kind: "line" }, freshIds());
  if (!plan.ok) throw new Error(plan.message);
  return plan.document;
}

/** The model without the document's typed words: what it means. */
function meaning(document: RunDocument): Omit<Model, "document"> {
  const model = buildModel(document, emptyMarks(), []);
  return Object.fromEntries(Object.entries(model).filter(([key]) => key !== "document")) as Omit<Model, "document">;
}

/** Typed texts left out: a spreadsheet-safe spelling of the same number may stand in their place. */
function untyped(document: unknown): unknown {
  return JSON.parse(JSON.stringify(document, (key, value: unknown) => (key === "text" && typeof value === "string" && /^[-+]?[\d.]|^$|%|mm/.test(value) ? "" : value)));
}

describe.each(Object.entries(sampleRuns))("%s", (_name, document) => {
  test("comes back as the same line and the same model", () => {
    const back = roundTrip(document);
    expect(untyped(back)).toEqual(untyped(document));
    expect(meaning(back)).toEqual(meaning(document));
  });
});

const ITEMS: readonly Item[] = [
  { kind: "none" }, { kind: "end", goes: "vent", text: "to atmosphere; =up" }, { kind: "elbow", elbow: "trimmed-sr" }, { kind: "elbow", elbow: "th-90" },
  { kind: "return", radius: "SR", toward: "W" }, { kind: "mitre", pieces: 4, radiusMm: 300 }, { kind: "bend", radiusMm: 571.5 },
  { kind: "tee", ends: "threaded", branchNps: "2" }, { kind: "cross", ends: "butt", branchNps: null }, { kind: "outlet", branchNps: "1", ends: "socket", set: "in" },
  { kind: "stub-in", branchNps: "2", padMm: 120 }, { kind: "reducer", shape: "eccentric", toNps: "3", toSchedule: "80", flat: "N" },
  { kind: "flange", flange: "lap-joint", stubEnd: "short", gasketMm: 4.5, ratingClass: 300, boltHoles: { turnDeg: 22.5, from: "E" }, gasketSide: "before", goes: "existing", text: "300" },
  { kind: "valve", valve: "globe", ends: "threaded", ratingClass: 600, mating: "lap-joint", stem: "S", faceToFaceMm: 203.5, tag: "true" },
  { kind: "coupling", half: true, ends: "threaded" }, { kind: "union", ends: "threaded" }, { kind: "cap", ends: "socket" },
  { kind: "instrument", tag: 'TI "7"', ends: "flanged", ratingClass: 150, lengthMm: 95 }, { kind: "support", text: "-shoe" }, { kind: "joint" },
];

const OFFSETS: readonly string[] = ["e 2-6", "un 1/2", "045/30 6-1/2", "n -3-1 1/2", "@ 10-0, -2-6, 8-0", "e 10-0 @ 1:100", "w 6-0 @ down 1/4 in/ft", "e 775mm", "E 2-0 N 1-0 U 3", "d 0.1"];

function everything(units: "imperial" | "metric"): RunDocument {
  const offsets = OFFSETS.map((text): Offset => {
    const read = parseMove(text, "imperial");
    if (!read.ok) throw new Error(read.message);
    return read.value;
  });
  const points = ITEMS.map((item, index): Point => ({
    ...pointAt(`pt${index}`, [0, 0, 0], item), offset: offsets[index % offsets.length]!,
    places: index % 3 === 0 ? { in: "field-fit", bolts: "field" } : index % 3 === 1 ? { out: "field" } : {},
    trimMm: index % 4 === 0 ? 150 : null, note: index % 2 === 0 ? "=HYPERLINK(1)\nsecond line" : " two  blanks ",
    ...(index % 5 === 0 ? { starts: { specification: "B2", insulation: "50 mm; warm" }, flipped: true } : {}),
    provenance: { kind: index % 2 === 0 ? "measured" : "assumed", toleranceMm: 1.5875, by: "O'Neill, \"Pat\"", at: "2026-02-03", second: index % 2 === 0 ? { text: "2-6", mm: 762 } : null },
  }));
  const document = newRunDocument("L-7", defaultLineSettings(units));
  const branch = { id: "b1", name: "-drain", from: "pt7", to: "pt8", pipe: { nps: "2" as const, schedule: "80", material: "A106 B", specification: "=s" }, points: [pointAt("q1", [0, 0, 500]), pointAt("q2", [0, 300, 0], { kind: "cap" })] };
  const branches = ["pt8", "pt9", "pt10"].map((from, index) => ({ id: `b${index + 2}`, name: "", from, pipe: null, points: [pointAt(`r${index}`, [0, 0, -400])] }));
  return { ...document, runs: [{ ...document.runs[0]!, points }, branch, ...branches] };
}

test.each(["imperial", "metric"] as const)("every kind of item, offset and field comes back on an %s line", (units) => {
  const document = everything(units);
  expect(parseRunDocument(document).ok).toBe(true);
  const back = roundTrip(document);
  expect(untyped(back)).toEqual(untyped(document));
  expect(untyped(meaning(back))).toEqual(untyped(meaning(document)));
});

test("in another line the points get new ids and the branches still leave from theirs", () => {
  const document = sampleRuns.branchWithReducer!;
  const back = roundTrip(document, newRunDocument("L-8", document.settings));
  expect(back.runs.flatMap((run) => run.points).every((point) => /^np\d+$/.test(point.id))).toBe(true);
  expect(back.runs.map((run) => run.points.length)).toEqual(document.runs.map((run) => run.points.length));
  const rowOf = (line: RunDocument) => line.runs.map((run) => (run.from === null ? null : line.runs.flatMap((each) => each.points).findIndex((point) => point.id === run.from)));
  expect(rowOf(back)).toEqual(rowOf(document));
});

test("no cell of the file runs as a formula or turns into a date", () => {
  const rows = pointRows(everything("imperial"), POINT_WRITERS, POINT_READERS);
  const text = writtenText(rows);
  const cells = readCells(text);
  expect(cells.filter((cell) => /^[=+@\t\r]/.test(cell) || /^-(?!\d+(\.\d+)?$)/.test(cell))).toEqual([]);
  // The day a number was read is a date and may be one.
  expect(cells.filter((cell) => cell !== "2026-02-03" && /^[-+]?\d+\s*[-/:]\s*\d+(\s*[-/]\s*\d+)?$/.test(cell))).toEqual([]);
});

function readCells(text: string): string[] {
  return [...text.replace(/^\ufeff/, "").matchAll(/(?:^|,|\r\n)(?:"((?:[^"]|"")*)"|([^,"\r\n]*))/g)].map((match) => match[1] ?? match[2] ?? "");
}
