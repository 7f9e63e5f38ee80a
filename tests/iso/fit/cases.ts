/** Random closings with random errors, once as the core takes them and once as the simulation does. */
import { closingWalk, turned, unit, type V } from "../../oracle/closing-walk";
import { normals } from "../../oracle/fit-numbers";
import type { SimJoint, SimPiece, Simulation } from "../../oracle/fit-simulation";
import { seededRandom } from "../../oracle/random";
import { fitOfClosing, solveClosing, usualFitSettings, type ClosingFitInput, type EndError, type FitFace, type FitSettings } from "@/iso";

export interface FitCase {
  readonly seed: number;
  readonly input: ClosingFitInput;
  readonly axis0: V;
}

const INCH = 25.4;
/** ASME B36.10M outside diameters and B16.9 long radii. */
const SIZES: readonly (readonly [number, number])[] = [[2.375, 3], [4.5, 6], [6.625, 9], [8.625, 12]];

/** Bends of 8 to 88°, pipe from one to twenty diameters, now and then a straight, a flange, ends measured together. */
export function fitCase(seed: number): FitCase {
  const random = seededRandom(seed);
  const normal = normals(seed + 77_000);
  const between = (low: number, high: number) => low + (high - low) * random();
  const [odIn, radiusIn] = SIZES[Math.floor(random() * SIZES.length)]!;
  const [od, r] = [odIn * INCH, radiusIn * INCH];
  const d0 = unit([normal(), normal(), normal()]);
  const axis0 = unit(cross(d0, [normal(), normal(), normal()]));
  const gap = between(1.5, 4);
  const walk = {
    p0: [between(-3000, 3000), between(-3000, 3000), between(0, 5000)] as V, d0, r0: r, r1: r, axis0, gap,
    a: random() < 0.3 ? between(50, 400) : 0, b: random() < 0.3 ? between(50, 400) : 0,
    theta0: between(8, 88) * RAD, theta1: between(8, 88) * RAD, roll: between(-Math.PI, Math.PI), length: od * between(1, 20),
  };
  const { p1, d1 } = closingWalk(walk);
  const closing = { p0: walk.p0, d0, p1, d1, r0: r, r1: r, a: walk.a, b: walk.b, gap, thetaMax: Math.PI / 2 };
  const solution = solveClosing(closing).solutions[0];
  if (!solution) throw new Error(`case ${seed} does not close`);
  const face = (): FitFace => (random() < 0.3 ? { kind: "flange", boltCircleMm: od * 1.6 } : { kind: "butt" });
  const settings = scaled(usualFitSettings("metric"), between(0.2, 1.2), between(0.7, 2.5));
  return {
    seed, axis0,
    input: {
      closing, solution, odMm: od, units: seed % 2 ? "imperial" : "metric", settings, target: 0.95, fitUp: random() < 0.75 ? "shared" : "set-true",
      faces: [face(), face()], errors: randomErrors(d0, d1, between(0.1, 1), random, normal),
    },
  };
}

const RAD = Math.PI / 180;

function cross(a: V, b: V): V {
  return [a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]];
}

function scaled({ shop, limits }: FitSettings, of: number, wide: number): FitSettings {
  const times = <T extends object>(values: T, factor: number) => Object.fromEntries(Object.entries(values).map(([key, value]) => [key, (value as number) * factor])) as T;
  return { shop: times(shop, of), limits: times(limits, wide) };
}

/** A handful of readings, each moving positions and axes of one end or of both. */
function randomErrors(d0: V, d1: V, size: number, random: () => number, normal: () => number): EndError[] {
  const part = (mm: number) => [normal() * mm, normal() * mm, normal() * mm] as V;
  const across = (v: V, d: V): V => {
    const along = v[0] * d[0] + v[1] * d[1] + v[2] * d[2];
    return [v[0] - along * d[0], v[1] - along * d[1], v[2] - along * d[2]];
  };
  return Array.from({ length: 5 }, (_, k) => {
    const both = random() < 0.3;
    const [at0, at1] = [both || k % 2 === 0, both || k % 2 === 1];
    const column = [...(at0 ? part(size) : [0, 0, 0]), ...(at0 ? across(part(size * 0.002), d0) : [0, 0, 0]), ...(at1 ? part(size) : [0, 0, 0]), ...(at1 ? across(part(size * 0.002), d1) : [0, 0, 0])];
    return { id: `r${k}`, kind: "reading" as const, name: `tape ${k}`, columns: [column] };
  });
}

/** The same as the simulation takes it: nothing of the core but the numbers a bench is given. */
export function simulationOf({ seed, input, axis0 }: FitCase, draws: number, trim: { readonly joint: "elbow0" | "elbow1"; readonly mm: number } | null = null): Simulation {
  const { closing, solution: s, odMm: od, settings: { shop, limits }, fitUp } = input;
  const [face0, face1] = input.faces ?? [{ kind: "butt" }, { kind: "butt" }];
  const off = [shop.gapMm / 2, shop.hiLoMm / 2, shop.squareMm / 2 / od] as const;
  const field = (face: FitFace, set: boolean): SimJoint => jointOf(face, limits, od, closing.gap, set ? off : null);
  const set = fitUp === "set-true";
  const weld: SimPiece = { kind: "weld", gap: closing.gap, off };
  const straight = (length: number): SimPiece[] => (length > 0 ? [{ kind: "straight", length, sigma: shop.cutLengthMm / 2 }] : []);
  const turnOf = (angle: number, radius: number): SimPiece => ({ kind: "turn", angle, radius, sigma: (shop.elbowAngleDeg / 2) * RAD });
  const first = [...straight(closing.a), turnOf(s.theta0, closing.r0)];
  const pipe = straight(s.length);
  const second: SimPiece[] = [{ kind: "roll", angle: s.roll!, sigma: (shop.rollDeg / 2) * RAD }, turnOf(s.theta1, closing.r1), ...straight(closing.b)];
  const ends = field(face0, set);
  const last = field(face1, set && trim !== null);
  const trimmed: SimJoint = { ...jointOf({ kind: "butt" }, limits, od, closing.gap, null), gapLimit: Infinity, tiltLimit: 3 * RAD, give: [1e4, limits.hiLoMm ** 2, limits.hiLoMm ** 2, 0.01, (3 * RAD) ** 2, (3 * RAD) ** 2] };
  const segments = trim === null ? [[...first, weld, ...pipe, weld, ...second]] : trim.joint === "elbow0" ? [first, [...pipe, weld, ...second]] : [[...first, weld, ...pipe], second];
  const joints = trim === null ? [ends, last] : [ends, trimmed, last];
  const columns = input.errors.flatMap((error) => error.columns);
  const side = turned(unit([...closing.d0] as V), axis0, Math.PI / 2);
  return {
    start: Float64Array.from([...closing.p0, ...closing.d0, ...side, ...axis0]), joints, segments, od, draws, seed: seed + 5, trim: (trim?.mm ?? 0) + limits.gapMm,
    ends: Array.from({ length: 12 }, (_, i) => columns.map((column) => column[i]!)),
  };
}

function jointOf(face: FitFace, limits: FitSettings["limits"], od: number, gap: number, off: readonly [number, number, number] | null): SimJoint {
  const flange = face.kind === "flange" ? face.boltCircleMm / 2 : null;
  const gapLimit = flange ? limits.flangeGapMm : limits.gapMm;
  const shiftLimit = flange ? limits.boltHoleMm : limits.hiLoMm;
  const tiltLimit = Math.atan(flange ? limits.flangeParallelPercent / 100 : limits.openingMm / od);
  const turn = flange ? (limits.boltHoleMm / flange) ** 2 : 0.01;
  const give = off ? [0, 0, 0, flange ? 0 : turn, 0, 0] : [gapLimit ** 2, shiftLimit ** 2, shiftLimit ** 2, turn, tiltLimit ** 2, tiltLimit ** 2];
  return { gap, gapLimit, shiftLimit, tiltLimit, holes: flange ? [limits.boltHoleMm, flange] : null, give, off };
}

/** The first seeds whose linear answer is a number worth checking: neither nearly never nor nearly always. */
export function checkedCases(count: number): FitCase[] {
  const found: FitCase[] = [];
  for (let seed = 1; found.length < count; seed++) {
    const each = fitCase(seed);
    const { probability } = fitOfClosing(each.input);
    if (probability !== null && probability > 0.03 && probability < 0.985) found.push(each);
  }
  return found;
}
