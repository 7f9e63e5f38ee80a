/**
 * A second program for whole lines: lays cut pieces, fittings and gaps end to end in space, along the main run and each
 * branch from the fitting it leaves, and says where every working point comes to lie. Shares no code with iso. Every
 * length of a fitting below was typed by hand from the standard's inch table named beside it; of the model it is given
 * only what a bench is given: cut lengths, and where a bend begins on the pipe. Inches throughout.
 */
export type Triple = readonly [number, number, number];
export type Size = "1" | "2" | "3" | "4" | "6" | "8";

/** ASME B16.9 table of elbows (LR 90 and 45, SR 90), of returns (centre to centre, LR), of tees (run C); B36.10M OD; B16.5 class 150 weld-neck hub with its 1/16 face; B16.10 class 150 flanged gate and globe (these two from memory). */
export const BUTT: Readonly<Record<Exclude<Size, "1">, { od: number; lr90: number; lr45: number; sr90: number; returnCentres: number; tee: number; hub: number; gate: number; globe: number }>> = {
  "2": { od: 2.375, lr90: 3, lr45: 1.375, sr90: 2, returnCentres: 6, tee: 2.5, hub: 2.5, gate: 7, globe: 8 },
  "3": { od: 3.5, lr90: 4.5, lr45: 2, sr90: 3, returnCentres: 9, tee: 3.375, hub: 2.75, gate: 8, globe: 9.5 },
  "4": { od: 4.5, lr90: 6, lr45: 2.5, sr90: 4, returnCentres: 12, tee: 4.125, hub: 3, gate: 9, globe: 11.5 },
  "6": { od: 6.625, lr90: 9, lr45: 3.75, sr90: 6, returnCentres: 18, tee: 5.625, hub: 3.5, gate: 10.5, globe: 16 },
  "8": { od: 8.625, lr90: 12, lr45: 5, sr90: 8, returnCentres: 24, tee: 7, hub: 4, gate: 11.5, globe: 19.5 },
};
/** ASME B16.9 table of reducing tees: outlet M by run and branch. */
const TEE_OUTLET: Readonly<Record<string, number>> = { "3x2": 3, "4x2": 3.5, "4x3": 3.875, "6x3": 4.875, "6x4": 5.125, "8x4": 6.125, "8x6": 6.625 };
/** ASME B16.9 table of reducers: length H by large and small end. */
const REDUCER: Readonly<Record<string, number>> = { "3x2": 3.5, "4x2": 4, "4x3": 4, "6x3": 5.5, "6x4": 5.5, "8x4": 6, "8x6": 6 };
/** MSS SP-97 table of butt-welding outlets: height of a 2 in branch. */
const OUTLET_HEIGHT = 1.5;
/** ASME B16.11 class 3000 NPS 1: elbow 90 and tee centre to socket bottom 7/8, elbow 45 9/16, coupling between sockets 1/2. */
export const SOCKET = { sw90: 0.875, sw45: 0.5625, swTee: 0.875, coupling: 0.5 };

const [ROOT_GAP, GASKET, PULL_BACK] = [0.125, 0.125, 0.0625];

export type Stand =
  | "open" | "flange" | "turn" | "sr" | "mitre" | "bend" | "return" | "tee" | "outlet" | "reducer" | "gate" | "globe" | "pair" | "weld" | "support"
  | "sw90" | "sw45" | "sw-tee" | "coupling";

export interface LinePoint {
  readonly id: string;
  readonly stand: Stand;
  /** From where the centre line left the point before. */
  readonly step: Triple;
  readonly size: Size;
  /** Small or large end after a reducer, branch of a tee. */
  readonly size2?: Size;
  /** Flat side of an eccentric reducer, or the way a return goes; an axis. */
  readonly side?: Triple;
  /** Bends and mitres. */
  readonly radius?: number;
}
export interface LineRun { readonly id: string; readonly from: string | null; readonly points: readonly LinePoint[] }

/** What the bench is given: a pipe by the point it ends at, and segments of a mitre by its point. */
export interface Cuts {
  readonly pipes: ReadonlyMap<string, { readonly length: number; readonly bendStarts: readonly number[] }>;
  readonly segments: ReadonlyMap<string, readonly number[]>;
}

const THROUGH: ReadonlySet<Stand> = new Set(["support", "outlet", "bend"]);
const add = (a: Triple, d: Triple, k: number): Triple => [a[0] + d[0] * k, a[1] + d[1] * k, a[2] + d[2] * k];
const dot = (a: Triple, b: Triple): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
const unit = (v: Triple): Triple => add([0, 0, 0], v, 1 / Math.sqrt(dot(v, v)));
const square = (side: Triple, flow: Triple): Triple => unit(add(side, flow, -dot(side, flow)));
const angle = (a: Triple, b: Triple): number => Math.acos(Math.max(-1, Math.min(1, dot(a, b))));
const butt = (p: LinePoint) => BUTT[p.size as Exclude<Size, "1">];

/** Where each point lies when the pieces are laid end to end; points on uncut pipe are left out, but for outlets, marked off by tape. */
export function walkLine(runs: readonly LineRun[], cuts: Cuts): Map<string, Triple> {
  const landed = new Map<string, Triple>();
  const byId = new Map(runs.flatMap((r) => r.points.map((p) => [p.id, p] as const)));
  for (const run of runs) {
    const parent = run.from === null ? null : byId.get(run.from)!;
    walkRun(run, parent, cuts, landed);
  }
  return landed;
}

function walkRun(run: LineRun, parent: LinePoint | null, cuts: Cuts, landed: Map<string, Triple>): void {
  const { points } = run;
  let at: Triple = parent ? landed.get(parent.id)! : [0, 0, 0];
  let start = parent ? branchReach(parent) : 0;
  /** Where tape marks on the pipe are measured from: the working point, also where a mitre's last cut lies elsewhere. */
  let origin = at;
  let first = 0;
  if (!parent) {
    landed.set(points[0]!.id, at);
    start = endReach(points[0]!, "out", 0);
    first = 1;
  }
  let legs: number[] = [];
  for (let i = first; i < points.length; i++) {
    legs.push(i);
    const p = points[i]!;
    if (p.stand === "outlet") landed.set(p.id, legs.reduce((pos, k) => add(pos, points[k]!.step, 1), origin));
    if (THROUGH.has(p.stand)) continue;
    const way = unit(points[legs[0]!]!.step);
    const arriving = unit(p.step);
    const next = points[i + 1];
    const leaving = next ? unit(next.step) : arriving;
    const turn = p.stand === "return" ? 0 : angle(arriving, leaving);
    const pipe = cuts.pipes.get(p.id) ?? { length: Number.NaN, bendStarts: [] };
    const face = layPipe(add(at, way, start), legs.map((k) => points[k]!), pipe);
    const corner = add(face, arriving, endReach(p, "in", turn));
    landed.set(p.id, corner);
    [at, start] = onward(p, { corner, face, arriving, leaving, turn }, cuts);
    origin = p.stand === "mitre" ? corner : at;
    legs = [];
  }
}

/** A pipe with its bends: straight to where a bend begins, round its arc, on to the next. */
function layPipe(from: Triple, legs: readonly LinePoint[], pipe: { readonly length: number; readonly bendStarts: readonly number[] }): Triple {
  let [at, used, k] = [from, 0, 0];
  legs.forEach((p, i) => {
    const next = legs[i + 1];
    if (p.stand !== "bend" || !next) return;
    const [d, after, radius] = [unit(p.step), unit(next.step), p.radius!];
    const theta = angle(d, after);
    const begins = pipe.bendStarts[k] ?? Number.NaN;
    at = add(at, d, begins - used);
    at = add(add(at, d, radius * Math.sin(theta)), square(after, d), radius * (1 - Math.cos(theta)));
    used = begins + radius * theta;
    k += 1;
  });
  return add(at, unit(legs[legs.length - 1]!.step), pipe.length - used);
}

interface Corner { readonly corner: Triple; readonly face: Triple; readonly arriving: Triple; readonly leaving: Triple; readonly turn: number }

/** Where the next pipe is laid from, and how far along before it begins. A shifted centre line and a mitre's segments are walked here. */
function onward(p: LinePoint, { corner, face, arriving, leaving, turn }: Corner, cuts: Cuts): [Triple, number] {
  if (p.stand === "return") return [add(corner, square(p.side!, arriving), butt(p).returnCentres), ROOT_GAP];
  if (p.stand === "reducer") {
    const [large, small] = [Math.max(butt(p).od, BUTT[p.size2 as "2"].od), Math.min(butt(p).od, BUTT[p.size2 as "2"].od)];
    const shift = (butt(p).od === large ? 1 : -1) * ((large - small) / 2);
    return [p.side ? add(corner, square(p.side, arriving), shift) : corner, endReach(p, "out", turn)];
  }
  if (p.stand !== "mitre") return [corner, endReach(p, "out", turn)];
  const segments = cuts.segments.get(p.id) ?? [];
  const delta = turn / (segments.length + 1);
  const inPlane = square(leaving, arriving);
  let at = add(face, arriving, ROOT_GAP / 2);
  segments.forEach((length, i) => {
    const a = delta * (i + 1);
    at = add(at, add(add([0, 0, 0], arriving, Math.cos(a)), inPlane, Math.sin(a)), length + ROOT_GAP);
  });
  return [at, ROOT_GAP / 2];
}

/** From a pipe's end to the point, gap and all, on the side it comes from (in) or leaves (out). */
function endReach(p: LinePoint, side: "in" | "out", turn: number): number {
  switch (p.stand) {
    case "open":
      return 0;
    case "flange":
      return ROOT_GAP + butt(p).hub;
    case "gate":
    case "globe":
      return ROOT_GAP + butt(p).hub + GASKET + butt(p)[p.stand] / 2;
    case "pair":
      return ROOT_GAP + butt(p).hub + (side === "out" ? GASKET : 0);
    case "weld":
      return ROOT_GAP / 2;
    case "tee":
      return ROOT_GAP + butt(p).tee;
    case "turn":
    case "sr":
      return ROOT_GAP + elbowReach(turn, p.stand === "sr" ? butt(p).sr90 : butt(p).lr90, butt(p).lr45);
    case "mitre": {
      // The polygon around an arc of this radius: three pieces, two welds, each turning half the angle.
      return ROOT_GAP / 2 + p.radius! * (Math.tan(turn / 2) - Math.tan(turn / 4));
    }
    case "return":
      return ROOT_GAP;
    case "reducer": {
      const down = Number(p.size2) < Number(p.size);
      return ROOT_GAP + (down === (side === "out") ? REDUCER[down ? `${p.size}x${p.size2}` : `${p.size2}x${p.size}`]! : 0);
    }
    case "sw90":
      return PULL_BACK + SOCKET.sw90;
    case "sw45":
      return PULL_BACK + SOCKET.sw45;
    case "sw-tee":
      return PULL_BACK + SOCKET.swTee;
    case "coupling":
      return PULL_BACK + SOCKET.coupling / 2;
    default:
      return 0;
  }
}

function branchReach(p: LinePoint): number {
  if (p.stand === "outlet") return butt(p).od / 2 + OUTLET_HEIGHT + ROOT_GAP;
  if (p.stand === "sw-tee") return PULL_BACK + SOCKET.swTee;
  return ROOT_GAP + (p.size2 === p.size || !p.size2 ? butt(p).tee : TEE_OUTLET[`${p.size}x${p.size2}`]!);
}

/** A standard elbow is a rigid body with two faces, put symmetrically into the corner (3° either side of its own angle); else a trimmed arc. */
function elbowReach(turn: number, of90: number, of45: number): number {
  const off = (own: number) => Math.abs(turn - (own * Math.PI) / 180);
  const [exact, near] = [(0.005 * Math.PI) / 180, (3 * Math.PI) / 180];
  if (off(90) < exact) return of90;
  if (off(45) < exact) return of45;
  if (off(90) <= near) return (of90 * Math.SQRT1_2) / Math.cos(turn / 2);
  if (off(45) <= near) return (of45 * Math.cos(Math.PI / 8)) / Math.cos(turn / 2);
  return of90 * Math.tan(turn / 2);
}
