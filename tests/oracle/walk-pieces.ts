/**
 * A second, slow and obvious answer to the cut arithmetic: lay out pieces, fittings and gaps end to end in space as a
 * fitter would on the floor, and see where each working point comes to lie. Shares no code with iso: take-outs are
 * typed here by hand from the standards' tables (inches), vectors are plain arrays.
 */

/** ASME B16.9 centre to end of LR 90, LR 45 and SR 90 elbows and straight tees; B16.5 class 150 weld-neck hub with its 1/16 face; B16.10 gate and globe (the last two from memory). */
export const HAND_TABLE: Readonly<Record<string, { lr90: number; lr45: number; sr90: number; tee: number; hub: number; gate: number; globe: number }>> = {
  "2": { lr90: 3, lr45: 1.375, sr90: 2, tee: 2.5, hub: 2.5, gate: 7, globe: 8 },
  "3": { lr90: 4.5, lr45: 2, sr90: 3, tee: 3.375, hub: 2.75, gate: 8, globe: 9.5 },
  "4": { lr90: 6, lr45: 2.5, sr90: 4, tee: 4.125, hub: 3, gate: 9, globe: 11.5 },
  "6": { lr90: 9, lr45: 3.75, sr90: 6, tee: 5.625, hub: 3.5, gate: 10.5, globe: 16 },
  "8": { lr90: 12, lr45: 5, sr90: 8, tee: 7, hub: 4, gate: 11.5, globe: 19.5 },
};

export type Stand = "open-end" | "end-flange" | "turn" | "turn-sr" | "tee" | "gate" | "globe" | "pair" | "weld" | "through";

export interface WalkPoint {
  readonly stand: Stand;
  /** Offset from the point before, inches; ignored at the first. */
  readonly step: readonly [number, number, number];
}

type Triple = readonly [number, number, number];

const ROOT_GAP = 0.125;
const GASKET = 0.125;

/** Where the cut points come to lie (inches), given the pipes between them as cut (inches), in flow order; points passed through are left out. */
export function walkPieces(nps: string, points: readonly WalkPoint[], cuts: readonly number[]): Triple[] {
  const table = HAND_TABLE[nps];
  if (!table) throw new Error(`no hand table for NPS ${nps}`);
  const at: [number, number, number] = [0, 0, 0];
  const landed: Triple[] = [[0, 0, 0]];
  let before = 0;
  for (let i = 1; i < points.length; i++) {
    const here = points[i]!;
    if (here.stand === "through") continue;
    const parts = [
      ...partsOf(points[before]!.stand, turnAt(points, before), table, "after"), gapOf(points[before]!.stand),
      cuts[landed.length - 1] ?? Number.NaN,
      gapOf(here.stand), ...partsOf(here.stand, turnAt(points, i), table, "before"),
    ];
    const along = unit(here.step);
    for (const inches of parts) for (const k of [0, 1, 2] as const) at[k] += along[k] * inches;
    landed.push([at[0], at[1], at[2]]);
    before = i;
  }
  return landed;
}

/** Lengths of steel and gasket on one side of a point, from the point outwards. */
function partsOf(stand: Stand, turn: number, table: (typeof HAND_TABLE)[string], side: "before" | "after"): number[] {
  switch (stand) {
    case "end-flange":
      return [table.hub];
    case "gate":
    case "globe":
      return [table[stand] / 2, GASKET, table.hub];
    case "pair":
      return side === "before" ? [table.hub] : [GASKET, table.hub];
    case "tee":
      return [table.tee];
    case "turn":
      return [elbowReach(turn, table.lr90, table.lr45)];
    case "turn-sr":
      return [elbowReach(turn, table.sr90, table.lr45)];
    default:
      return [];
  }
}

/**
 * From the corner to the face of an elbow. A standard elbow is a rigid body with two faces; put symmetrically into the
 * corner, half its chord over the half angle gives the reach (3° either side of its own angle). Else a trimmed arc.
 */
function elbowReach(turn: number, of90: number, of45: number): number {
  const degrees = (turn * 180) / Math.PI;
  const halfChord = Math.abs(degrees - 90) <= 3 ? of90 * Math.SQRT1_2 : Math.abs(degrees - 45) <= 3 ? of45 * Math.sqrt((2 + Math.SQRT2) / 4) : null;
  const reach = halfChord === null ? of90 * Math.tan(turn / 2) : halfChord / Math.sin((Math.PI - turn) / 2);
  return Math.abs(degrees - 90) < 0.004 ? of90 : Math.abs(degrees - 45) < 0.004 ? of45 : reach;
}

function gapOf(stand: Stand): number {
  return stand === "open-end" ? 0 : stand === "weld" ? ROOT_GAP / 2 : ROOT_GAP;
}

function turnAt(points: readonly WalkPoint[], i: number): number {
  const [a, b] = [points[i], points[i + 1]];
  if (i === 0 || !a || !b) return 0;
  const [u, v] = [unit(a.step), unit(b.step)];
  return Math.acos(Math.max(-1, Math.min(1, u[0] * v[0] + u[1] * v[1] + u[2] * v[2])));
}

function unit(v: Triple): Triple {
  const length = Math.sqrt(v[0] ** 2 + v[1] ** 2 + v[2] ** 2);
  return [v[0] / length, v[1] / length, v[2] / length];
}
