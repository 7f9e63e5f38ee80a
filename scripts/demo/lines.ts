/** The lines of the demo job, all invented: one of each kind a shop meets in a week. */
import { closeBetween, formatLength, type Item, type LineSettings, type Nps, type RunDocument } from "@/iso";
import { defaultLineSettings } from "@/lib/rules/default-settings";
import { demoDocument } from "./line-builder";

const imperial = defaultLineSettings("imperial");
const metric = defaultLineSettings("metric");

function sized(nps: Nps, base: LineSettings, more: Partial<LineSettings> = {}): LineSettings {
  return { ...base, pipe: { ...base.pipe, nps, specification: "CB-11" }, ...more };
}

const flange = (goes: "nozzle" | "continued" | "existing" | "open", text: string): Item => ({
  kind: "flange", flange: "weld-neck", ratingClass: null, boltHoles: "straddle", gasketSide: "after", goes, text,
});
const valve = (kind: "gate" | "globe" | "check" | "ball", tag: string, stem: "U" | "N" | "E" | "W" | "S" | null = null): Item => ({
  kind: "valve", valve: kind, ends: "flanged", ratingClass: null, mating: "weld-neck", stem, faceToFaceMm: null, tag,
});
const end = (goes: "open" | "field-weld" | "continued" | "existing", text: string): Item => ({ kind: "end", goes, text });

const measured = { kind: "measured", toleranceMm: 1.5875, by: "D. Kowal", at: "2026-11-12" } as const;
/** Read twice with a tape: the second reading stands beside the first. */
const twice = (text: string, mm: number) => ({ ...measured, second: { text, mm } });
const assumed = { kind: "assumed", toleranceMm: null, by: "M. Okafor", at: "2026-11-12", second: null } as const;

/** A planar offset up a step, flange to flange. */
export const coolingSupply = demoDocument('4"-CWS-1101', "Cooling water supply to chiller 1", sized("4", imperial), [
  {
    id: "m",
    rows: [
      { move: "@ 112-6, 48-0, 9-3", item: flange("nozzle", "N1, P-101") },
      { move: "E 3-1 1/2" },
      { move: "EU 2-4" },
      { move: "E 4-3" },
      { move: "U 3-6", item: flange("nozzle", "N3, CH-1") },
    ],
  },
]);

/** A true rolling offset: set 20 in on a run of 20 in, so two 45s fit. */
export const coolingReturn = demoDocument('6"-CWR-1102', "Cooling water return, rolling offset at grid C", sized("6", imperial), [
  {
    id: "m",
    rows: [
      { move: "@ 96-0, 52-6, 11-0", item: flange("continued", "6\"-CWR-1100") },
      { move: "E 3-4" },
      { move: "E 1-8, N 1-4, U 1-0" },
      { move: "E 3-0" },
      { move: "N 4-6", item: end("field-weld", "6\"-CWR-1103"), more: { places: { in: "field" } } },
    ],
  },
]);

/** Two nozzles that face past each other: the closing piece between them is solved, not guessed. */
export function glycolClosing(): RunDocument {
  const settings = sized("3", imperial);
  const inches = (x: number) => x * 25.4;
  const answer = closeBetween({
    end0: { position: [inches(30), 0, 0], direction: [1, 0, 0] },
    end1: { position: [inches(82), inches(31), inches(22)], direction: [0, 0, -1] },
    radius0Mm: inches(4.5),
    radius1Mm: inches(4.5),
    rootGapMm: settings.allowances.rootGapMm,
    thetaMaxRad: Math.PI / 2,
    units: "imperial",
    odMm: inches(3.5),
  });
  if (!answer.ok) throw new Error(`The demo closing is refused: ${answer.sentence}`);
  const [a, b] = answer.points;
  if (a === undefined || b === undefined) throw new Error("The demo closing has lost a bend.");
  const from = (p: readonly number[], q: readonly number[]) => {
    const text = (axis: number) => ((q[axis] ?? 0) - (p[axis] ?? 0)) / 25.4;
    return (["E", "N", "U"] as const).map((letter, axis) => `${letter} ${text(axis).toFixed(4)}in`).join(", ");
  };
  const trimmed: Item = { kind: "elbow", elbow: "trimmed-lr" };
  const calculated = { kind: "calculated", toleranceMm: null, by: "M. Okafor", at: "2026-11-14", second: null } as const;
  return demoDocument('3"-GLY-1203', "Glycol cross-over, closing piece between fixed nozzles", settings, [
    {
      id: "m",
      rows: [
        { item: flange("nozzle", "N4, E-210") },
        { move: from([0, 0, 0], a), item: trimmed, more: { provenance: calculated } },
        { move: from(a, b), item: trimmed, more: { provenance: calculated } },
        { move: from(b, [inches(82), inches(31), inches(58)]), item: flange("nozzle", "N2, T-204"), more: { provenance: twice(formatLength(inches(58 + 1 / 32) - b[2], "imperial"), inches(58 + 1 / 32) - b[2]) } },
      ],
    },
  ], ["Closing piece: verify both fixed ends by tape, two readings, before cutting."]);
}

/** A header with a reducing tee, a reducer on the run and an outlet for a drain. */
export const chillerHeader = demoDocument('6"-CWH-1104', "Chiller header with branch and reducer", sized("6", imperial), [
  {
    id: "m",
    rows: [
      { move: "@ 120-0, 61-6, 12-8", item: flange("continued", "6\"-CWH-1100") },
      { move: "E 2-9", item: { kind: "outlet", branchNps: "1" } },
      { move: "E 2-0", item: { kind: "tee", ends: "butt", branchNps: "4" } },
      { move: "E 2-6", item: { kind: "reducer", shape: "concentric", toNps: "4", toSchedule: null, flat: null } },
      { move: "E 3-6" },
      { move: "U 4-0", item: flange("nozzle", "CH-2 INLET") },
    ],
  },
  { id: "b1", name: "Drain", from: "m-2", rows: [{ move: "D 1-2", item: { kind: "cap" } }] },
  { id: "b2", name: "Branch to CH-1", from: "m-3", rows: [{ move: "N 3-3" }, { move: "U 2-0", item: flange("nozzle", "CH-1 INLET") }] },
]);

/** A valve station: block, check and block, flanged. */
export const valveStation = demoDocument('4"-CWS-1305', "Pump discharge valve station", sized("4", imperial), [
  {
    id: "m",
    rows: [
      { move: "@ 101-0, 47-3, 6-9", item: flange("nozzle", "N2, P-102") },
      { move: "U 2-10" },
      { move: "E 2-6", item: valve("check", "V-121") },
      { move: "E 3-2", item: valve("gate", "V-122") },
      { move: "E 2-10" },
      { move: "N 3-8" },
      { move: "U 2-9", item: flange("continued", "4\"-CWS-1300") },
    ],
  },
]);

/** A drain sloped 1/4 in per foot, with its riser off the slope. */
export const slopedDrain = demoDocument('3"-DR-1406', "Sloped drain from the chiller sump", sized("3", imperial), [
  {
    id: "m",
    rows: [
      { move: "@ 118-0, 60-0, 2-9", item: flange("nozzle", "N6, SUMP") },
      { move: "D 1-8" },
      { move: "W 12-0, D 3", more: { provenance: assumed } },
      { move: "S 6-0, D 1 1/2" },
      { move: "D 1-10", item: end("existing", "DRAIN"), more: { places: { in: "field-fit" } } },
    ],
  },
], ["Slope 1/4 in per ft down to the existing drain."]);

/** A metric line with an eccentric reducer, flat on top. */
export const wellWater = demoDocument("DN80-WW-1507", "Well water to make-up tank", sized("3", metric), [
  {
    id: "m",
    rows: [
      { move: "@ 34200, 18150, 2450", item: flange("nozzle", "N1, P-104") },
      { move: "E 620", item: { kind: "reducer", shape: "eccentric", toNps: "2", toSchedule: null, flat: "U" } },
      { move: "E 900" },
      { move: "U 1450" },
      { move: "N 1210", item: end("continued", "DN50-WW-1508") },
    ],
  },
]);

/** Small bore socket weld. */
export const instrumentAir = demoDocument('1"-IA-1608', "Instrument air drop", sized("1", imperial, { pipe: { nps: "1", schedule: "80", material: "ASTM A106 Gr B", specification: "CB-21" } }), [
  {
    id: "m",
    rows: [
      { move: "@ 99-0, 66-0, 14-0", item: end("continued", "1\"-IA-1600") },
      { move: "E 2-6", item: { kind: "elbow", elbow: "sw-90" } },
      { move: "D 2-0", item: { kind: "coupling", half: false } },
      { move: "D 3-4", item: { kind: "elbow", elbow: "sw-90" } },
      { move: "N 1-6", item: end("open", "TUBING BY OTHERS") },
    ],
  },
]);

/** Two spools parted by a field weld. */
export const rackLine = demoDocument('8"-CW-1109', "Rack crossing in two spools", sized("8", imperial), [
  {
    id: "m",
    rows: [
      { move: "@ 80-0, 40-0, 16-0", item: flange("continued", "8\"-CW-1100") },
      { move: "E 5-6" },
      { move: "N 10-0", item: { kind: "joint" }, more: { places: { in: "field" } } },
      { move: "N 5-2" },
      { move: "D 6-8" },
      { move: "E 3-9", item: flange("nozzle", "CT-1 OUTLET") },
    ],
  },
]);
