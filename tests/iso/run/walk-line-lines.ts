/** Random lines for the walk of whole lines (tests/oracle/walk-line.ts), and the run documents that say the same. */
import type { AxisName, Item, Nps, Offset, Point, Run, RunDocument } from "../../../iso/run/document";
import { defaultLineSettings, newRunDocument } from "../../../iso/run/defaults";
import { newPoint } from "../../../iso/run/edit";
import { end, flange, joint, outlet, pipe, support, tee, valve } from "../../fixtures/run-builder";
import { seededRandom } from "../../oracle/random";
import type { LinePoint, LineRun, Size, Stand, Triple } from "../../oracle/walk-line";

const INCH = 25.4;
const SIZES: readonly Size[] = ["2", "3", "4", "6", "8"];
const SMALLER: Readonly<Record<string, readonly Size[]>> = { "3": ["2"], "4": ["2", "3"], "6": ["3", "4"], "8": ["4", "6"] };
const LARGER: Readonly<Record<string, readonly Size[]>> = { "2": ["3", "4"], "3": ["4", "6"], "4": ["6", "8"], "6": ["8"] };
const AXES: Readonly<Record<string, Triple>> = { E: [1, 0, 0], N: [0, 1, 0], U: [0, 0, 1] };
const AXIS_OF: readonly AxisName[] = ["E", "N", "U"];

const cross = (a: Triple, b: Triple): Triple => [a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]];
const sum = (a: Triple, b: Triple, k: number): Triple => [a[0] + b[0] * k, a[1] + b[1] * k, a[2] + b[2] * k];
const unit = (v: Triple): Triple => sum([0, 0, 0], v, 1 / Math.hypot(...v));

/** A direction turned by `deg` in the plane rolled `roll` degrees about it. */
function turned(d: Triple, deg: number, roll: number): Triple {
  const side = unit(cross(d, Math.abs(d[2]) < 0.9 ? [0, 0, 1] : [0, 1, 0]));
  const up = cross(side, d);
  const [t, r] = [(deg * Math.PI) / 180, (roll * Math.PI) / 180];
  return unit(sum(sum(sum([0, 0, 0], d, Math.cos(t)), side, Math.sin(t) * Math.cos(r)), up, Math.sin(t) * Math.sin(r)));
}

/** A line of one seed: a main run, branches, and branches of branches; some in socket-weld NPS 1. */
export function randomLine(seed: number): LineRun[] {
  const random = seededRandom(seed);
  const pick = <T>(list: readonly T[]): T => list[Math.floor(random() * list.length)]!;
  const runs: LineRun[] = [];
  let serial = 0;
  const grow = (from: LinePoint | null, way: Triple, size: Size, depth: number): void => {
    const points: LinePoint[] = [];
    const leaving: { readonly point: LinePoint; readonly way: Triple; readonly size: Size }[] = [];
    const count = 2 + Math.floor(random() * (depth === 0 ? 8 : 4));
    let [d, now] = [way, size];
    if (from === null) points.push({ id: `p${(serial += 1)}`, stand: size === "1" ? "open" : pick(["open", "flange"] as const), step: [0, 0, 0], size });
    for (let i = 0; i < count; i++) {
      const length = 60 + Math.floor(random() * 2_000) / 16;
      const step = sum([0, 0, 0], d, length);
      const stand: Stand = i === count - 1 ? (now === "1" ? "open" : pick(["open", "flange"] as const)) : pick(now === "1" ? SOCKET_STANDS : BUTT_STANDS);
      const made = { id: `p${(serial += 1)}`, stand, step, size: now };
      const roll = pick([0, 90, 180, 270, random() * 360]);
      const axis = AXIS_OF.find((a) => Math.abs(d[AXIS_OF.indexOf(a)]!) < 0.6) ?? "U";
      const point = furnished(made, AXES[axis]!, pick, random);
      if (!point) {
        points.push({ ...made, stand: "support" });
        continue;
      }
      points.push(point);
      if ((stand === "tee" || stand === "sw-tee" || stand === "outlet") && i < count - 1) leaving.push({ point, way: turned(d, 90, roll), size: point.size2 ?? now });
      d = afterPoint(point, d, roll, pick, random);
      if (stand === "reducer") now = point.size2!;
    }
    runs.push({ id: from === null ? "main" : `b${runs.length}`, from: from?.id ?? null, points });
    if (depth < 2) for (const branch of leaving) grow(branch.point, branch.way, branch.size, depth + 1);
  };
  grow(null, pick<Triple>([[1, 0, 0], [0, 1, 0], unit([1, 1, 0])]), seed % 6 === 0 ? "1" : pick(SIZES), 0);
  return runs;
}

const BUTT_STANDS: readonly Stand[] = ["turn", "turn", "sr", "mitre", "bend", "return", "tee", "tee", "outlet", "reducer", "reducer", "gate", "globe", "pair", "weld", "support"];
const SOCKET_STANDS: readonly Stand[] = ["sw90", "sw45", "sw-tee", "coupling", "support"];

/** The point with its sizes, side and radius; null where the tables typed by hand have no such fitting. */
function furnished(p: LinePoint, side: Triple, pick: <T>(list: readonly T[]) => T, random: () => number): LinePoint | null {
  switch (p.stand) {
    case "tee": {
      const size2 = pick([p.size, ...(SMALLER[p.size] ?? [])]);
      return size2 === p.size ? p : { ...p, size2 };
    }
    case "outlet":
      return Number(p.size) >= 4 ? { ...p, size2: "2" } : null;
    case "reducer": {
      const size2 = pick([...(SMALLER[p.size] ?? []), ...(LARGER[p.size] ?? []).filter((l) => SMALLER[l]?.includes(p.size))]);
      return random() < 0.5 ? { ...p, size2 } : { ...p, size2, side };
    }
    case "return":
      return { ...p, side };
    case "mitre":
    case "bend":
      return { ...p, radius: 2 * Number(p.size) };
    default:
      return p;
  }
}

function afterPoint(p: LinePoint, d: Triple, roll: number, pick: <T>(list: readonly T[]) => T, random: () => number): Triple {
  switch (p.stand) {
    case "turn":
      return turned(d, pick([90, 90, 45, 88 + random() * 4.9, 43 + random() * 4, 5 + random() * 35, 50 + random() * 35]), roll);
    case "sr":
    case "sw90":
      return turned(d, 90, roll);
    case "sw45":
      return turned(d, 45, roll);
    case "mitre":
    case "bend":
      return turned(d, pick([90, 60, 30 + random() * 50]), roll);
    case "return":
      return sum([0, 0, 0], d, -1);
    default:
      return d;
  }
}

/** The run document of a line. Every third level-ish leg is typed as a slope, the others as offsets. */
export function lineDocument(runs: readonly LineRun[]): RunDocument {
  const main = runs[0]!;
  const settings = { ...defaultLineSettings("imperial"), pipe: pipe(main.points[0]!.size as Nps, "80"), shippingBoxMm: [1e6, 1e6, 1e6] as [number, number, number] };
  return {
    ...newRunDocument("W-2", settings),
    runs: runs.map((run): Run => ({ id: run.id, name: run.from === null ? "" : run.id, from: run.from, pipe: null, points: run.points.map((p, i) => documentPoint(p, i)) })),
  };
}

function documentPoint(p: LinePoint, index: number): Point {
  return { ...newPoint(p.id), offset: offsetOf(p.step, index), item: itemOf(p) };
}

function offsetOf(step: Triple, index: number): Offset {
  const entry = (inches: number) => ({ text: "", mm: inches * INCH });
  const level = Math.hypot(step[0], step[1]);
  if (index % 3 === 2 && level > 1 && Math.abs(step[2]) < level) {
    return { kind: "slope", direction: { text: "", e: step[0] / level, n: step[1] / level, u: 0 }, length: entry(level), slope: { text: "", ratio: step[2] / level } };
  }
  return { kind: "enu", e: entry(step[0]), n: entry(step[1]), u: entry(step[2]) };
}

function itemOf(p: LinePoint): Item {
  const side = p.side ? AXIS_OF[p.side.findIndex((c) => c !== 0)]! : null;
  const items: Readonly<Record<Stand, () => Item>> = {
    open: () => end("open", "BEVEL"), flange: () => flange(), turn: () => ({ kind: "none" }), sr: () => ({ kind: "elbow", elbow: "sr-90" }),
    mitre: () => ({ kind: "mitre", pieces: 3, radiusMm: p.radius! * INCH }), bend: () => ({ kind: "bend", radiusMm: p.radius! * INCH }),
    return: () => ({ kind: "return", radius: "LR", toward: side ?? "U" }), tee: () => tee((p.size2 ?? null) as Nps | null), outlet: () => outlet("2"),
    reducer: () => ({ kind: "reducer", shape: side ? "eccentric" : "concentric", toNps: p.size2 as Nps, toSchedule: null, flat: side }),
    gate: () => valve(), globe: () => valve({ valve: "globe" }), pair: () => flange(), weld: () => joint, support: () => support(),
    sw90: () => ({ kind: "elbow", elbow: "sw-90" }), sw45: () => ({ kind: "elbow", elbow: "sw-45" }), "sw-tee": () => tee(null, "socket"),
    coupling: () => ({ kind: "coupling", half: false }),
  };
  return items[p.stand]();
}
