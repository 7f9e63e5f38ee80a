/**
 * A second answer to "how sure is the fit": draws the ends and the shop's work again and again, builds the piece by its
 * own kinematics (rotation matrices, no small angles), sets it between the true ends as a fitter does, and counts how
 * often every joint is within its limits. Setting: least weighted squares of the joints' mismatches, found by iteration on
 * the built piece itself. Shares no code with iso. Millimetres and radians.
 */
import { inverted, normals } from "./fit-numbers";

/** Position, then along, side and up as columns: twelve numbers. */
export type Pose = Float64Array;
type Three = readonly [number, number, number];

export interface SimJoint {
  readonly gap: number;
  /** Infinite: trimmed there. */
  readonly gapLimit: number;
  readonly shiftLimit: number;
  readonly tiltLimit: number;
  /** Offset and radius of bolt holes; null for a butt weld. */
  readonly holes: readonly [number, number] | null;
  /** Squared give of gap, two shifts, rotation about the axis, two tilts. */
  readonly give: readonly number[];
  /** One deviation of gap, shift and tilt where the joint is made like a shop weld. */
  readonly off: readonly [number, number, number] | null;
}

export type SimPiece =
  | { readonly kind: "straight"; readonly length: number; readonly sigma: number }
  | { readonly kind: "turn"; readonly angle: number; readonly radius: number; readonly sigma: number }
  | { readonly kind: "roll"; readonly angle: number; readonly sigma: number }
  | { readonly kind: "weld"; readonly gap: number; readonly off: readonly [number, number, number] };

export interface Simulation {
  readonly start: Pose;
  /** Field joints: before the first segment, between segments, after the last. */
  readonly joints: readonly SimJoint[];
  readonly segments: readonly (readonly SimPiece[])[];
  /** Twelve rows of columns: end 0 position and axis, end 1 position and axis. */
  readonly ends: readonly (readonly number[])[];
  readonly od: number;
  readonly seed: number;
  readonly draws: number;
  /** Length left on at the trimmed joint. */
  readonly trim: number;
}

const ROUNDS = 2;
/** Working space of the inner loops: a new array for every pose would cost more than the sums. */
const [AT, TARGET, OUTER] = [new Float64Array(12), new Float64Array(12), new Float64Array(12)];

function copy(from: Pose, into: Pose): void {
  for (let i = 0; i < 12; i++) into[i] = from[i]!;
}

/** Share of the draws that fit. */
export function simulateFit(sim: Simulation): number {
  const random = normals(sim.seed);
  const nominal = nominalEnd(sim);
  const gain = gainOf(sim, sim.start, builtSegments(sim, () => 0), nominal);
  const [error, z] = [new Float64Array(12), new Float64Array(sim.ends[0]!.length)];
  const ends = Float64Array.from(sim.ends.flat());
  const [from, to] = [new Float64Array(12), new Float64Array(12)];
  const segments = builtSegments(sim, () => 0);
  let fits = 0;
  for (let n = 0; n < sim.draws; n++) {
    for (let k = 0; k < z.length; k++) z[k] = random();
    for (let i = 0; i < 12; i++) {
      let sum = 0;
      for (let k = 0; k < z.length; k++) sum += ends[i * z.length + k]! * z[k]!;
      error[i] = sum;
    }
    elsewhere(sim.start, error, 0, 1, from);
    elsewhere(nominal, error, 6, -1, to);
    segments.forEach((at, k) => build(at, sim.segments[k]!, random));
    const set = sim.joints.map((joint) => (joint.off ? [random() * joint.off[0], random() * joint.off[1], random() * joint.off[1], 0, random() * joint.off[2], random() * joint.off[2]] : null));
    if (judged(sim, placed(sim, from, to, segments, gain, set))) fits += 1;
  }
  return fits / sim.draws;
}

/** Where the chain of nominal pieces ends, along being the way into end 1. */
export function nominalEnd(sim: Pick<Simulation, "start" | "joints" | "segments">): Pose {
  const at = Float64Array.from(sim.start);
  const still = () => 0;
  sim.joints.forEach((joint, k) => {
    advance(at, joint.gap);
    for (const piece of sim.segments[k] ?? []) lay(at, piece, still);
  });
  return at;
}

/** Mismatch of every joint once set: the unknown ones, and last what is left at the end. */
function placed(sim: Simulation, from: Pose, to: Pose, segments: readonly Pose[], gain: Gain, set: readonly (readonly number[] | null)[]): Float64Array {
  const size = gain.size;
  const x = new Float64Array(size + 6);
  const slope = new Float64Array(size);
  for (let round = 0; ; round++) {
    leftOver(sim, from, to, segments, x, set, x, size);
    if (round === ROUNDS) return x;
    // Gradient of the weighted squares: the joints' own part, and what the end feels.
    for (let i = 0; i < size; i++) {
      let sum = x[i]! * gain.give[i]!;
      for (let k = 0; k < 6; k++) sum += gain.felt[i * 6 + k]! * x[size + k]!;
      slope[i] = sum;
    }
    for (let i = 0; i < size; i++) {
      let step = 0;
      for (let k = 0; k < size; k++) step += gain.inverse[i * size + k]! * slope[k]!;
      x[i]! -= step;
    }
  }
}

/** Gauss and Newton's step, its slopes taken once: weights of the unknowns, what the end feels of each, inverse. */
interface Gain {
  readonly size: number;
  readonly give: Float64Array;
  readonly felt: Float64Array;
  readonly inverse: Float64Array;
}

/** A joint that cannot give still takes a division. */
const STIFF = 1e-9;

function gainOf(sim: Simulation, from: Pose, segments: readonly Pose[], to: Pose): Gain {
  const count = sim.joints.length - 1;
  const size = count * 6;
  const give = sim.joints.slice(0, count).flatMap((joint) => joint.give.map((v) => 1 / Math.max(v, STIFF)));
  const last = sim.joints[count]!.give.map((v) => Math.max(v, STIFF));
  const none = sim.joints.map(() => null);
  const columns = Array.from({ length: size }, (_, i) => {
    const h = i % 6 < 3 ? 0.01 : 1e-5;
    const moved = (by: number) => {
      const left = new Float64Array(6);
      leftOver(sim, from, to, segments, Float64Array.from({ length: size }, (__, k) => (k === i ? by : 0)), none, left, 0);
      return left;
    };
    const [above, below] = [moved(h), moved(-h)];
    return Array.from(above, (v, k) => (v - below[k]!) / (2 * h));
  });
  const felt = columns.map((column) => column.map((v, k) => v / last[k]!));
  const matrix = columns.map((a, i) => columns.map((_, j) => (i === j ? give[i]! : 0) + a.reduce((sum, v, k) => sum + v * felt[j]![k]!, 0)));
  return { size, give: Float64Array.from(give), felt: Float64Array.from(felt.flat()), inverse: Float64Array.from(inverted(matrix).flat()) };
}

/** What is left at the last joint: gap, two shifts, rotation about the axis, two tilts, as its own frame sees them. */
function leftOver({ joints }: Simulation, from: Pose, to: Pose, segments: readonly Pose[], x: Float64Array, set: readonly (readonly number[] | null)[], into: Float64Array, offset: number): void {
  const at = AT;
  copy(from, at);
  const last = joints.length - 1;
  for (let k = 0; k < last; k++) {
    advance(at, joints[k]!.gap / 2);
    const own = set[k];
    move(at, x, k * 6);
    if (own) move(at, own, 0);
    advance(at, joints[k]!.gap / 2);
    compose(at, segments[k]!);
  }
  advance(at, joints[last]!.gap / 2);
  const made = set[last];
  if (made) move(at, made, 0);
  const target = TARGET;
  copy(to, target);
  advance(target, -joints[last]!.gap / 2);
  relative(at, target, into, offset);
}

function judged(sim: Simulation, x: Float64Array): boolean {
  return sim.joints.every((joint, k) => {
    if (joint.off) return true;
    const [gap, level, up, turn, tilt1, tilt2] = [x[k * 6]!, x[k * 6 + 1]!, x[k * 6 + 2]!, x[k * 6 + 3]!, x[k * 6 + 4]!, x[k * 6 + 5]!];
    const tilt = Math.sqrt(tilt1 * tilt1 + tilt2 * tilt2);
    const shift = Math.sqrt(level * level + up * up);
    if (tilt > joint.tiltLimit) return false;
    if (joint.holes ? shift + Math.abs(turn) * joint.holes[1] > joint.holes[0] : shift > joint.shiftLimit) return false;
    if (joint.gapLimit === Infinity) return gap + (sim.od / 2) * Math.tan(tilt) <= sim.trim;
    return Math.abs(gap) <= joint.gapLimit;
  });
}

/** Each segment from its first face to its last, in its own frame. */
function builtSegments(sim: Simulation, random: () => number): Pose[] {
  return sim.segments.map((pieces) => build(new Float64Array(12), pieces, random));
}

const UNMOVED = Float64Array.from([0, 0, 0, 1, 0, 0, 0, 1, 0, 0, 0, 1]);

function build(at: Pose, pieces: readonly SimPiece[], random: () => number): Pose {
  copy(UNMOVED, at);
  for (const piece of pieces) lay(at, piece, random);
  return at;
}

function lay(at: Pose, piece: SimPiece, random: () => number): void {
  if (piece.kind === "straight") return advance(at, piece.length + piece.sigma * random());
  if (piece.kind === "roll") return spin(at, 0, piece.angle + piece.sigma * random());
  if (piece.kind === "turn") {
    const { radius } = piece;
    for (let i = 0; i < 3; i++) at[i]! += radius * at[6 + i]!;
    spin(at, 2, piece.angle + piece.sigma * random());
    for (let i = 0; i < 3; i++) at[i]! -= radius * at[6 + i]!;
    return;
  }
  advance(at, piece.gap / 2);
  const [gap, shift, tilt] = piece.off;
  move(at, [gap * random(), shift * random(), shift * random(), 0, tilt * random(), tilt * random()], 0);
  advance(at, piece.gap / 2);
}

function advance(at: Pose, length: number): void {
  for (let i = 0; i < 3; i++) at[i]! += length * at[3 + i]!;
}

/** Turns the frame about its own along (0), side (1) or up (2). */
function spin(at: Pose, axis: 0 | 1 | 2, angle: number): void {
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  const a = 3 + ((axis + 1) % 3) * 3;
  const b = 3 + ((axis + 2) % 3) * 3;
  for (let i = 0; i < 3; i++) {
    const [p, q] = [at[a + i]!, at[b + i]!];
    at[a + i] = c * p + s * q;
    at[b + i] = c * q - s * p;
  }
}

/** Shifts along and across, then turns by a rotation vector, all in the frame's own axes. */
function move(at: Pose, x: ArrayLike<number>, from: number): void {
  const [g, l, u, rx, ry, rz] = [x[from]!, x[from + 1]!, x[from + 2]!, x[from + 3]!, x[from + 4]!, x[from + 5]!];
  for (let i = 0; i < 3; i++) at[i]! += g * at[3 + i]! + l * at[6 + i]! + u * at[9 + i]!;
  const angle = Math.sqrt(rx * rx + ry * ry + rz * rz);
  if (angle === 0) return;
  const world = [0, 1, 2].map((i) => (rx * at[3 + i]! + ry * at[6 + i]! + rz * at[9 + i]!) / angle) as unknown as Three;
  for (const k of [3, 6, 9]) turn(at, k, world, angle);
}

function turn(at: Pose, k: number, [x, y, z]: Three, angle: number): void {
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  const [a, b, d] = [at[k]!, at[k + 1]!, at[k + 2]!];
  const along = (x * a + y * b + z * d) * (1 - c);
  at[k] = a * c + (y * d - z * b) * s + x * along;
  at[k + 1] = b * c + (z * a - x * d) * s + y * along;
  at[k + 2] = d * c + (x * b - y * a) * s + z * along;
}

function compose(at: Pose, inner: Pose): void {
  const outer = OUTER;
  copy(at, outer);
  for (let k = 0; k < 12; k += 3) {
    const [v, w, u] = [inner[k]!, inner[k + 1]!, inner[k + 2]!];
    for (let i = 0; i < 3; i++) at[k + i] = (k === 0 ? outer[i]! : 0) + v * outer[3 + i]! + w * outer[6 + i]! + u * outer[9 + i]!;
  }
}

/** Motion that takes one frame to another, in the first one's axes: shift, then rotation vector. */
function relative(at: Pose, target: Pose, into: Float64Array, offset: number): void {
  const dot = (k: number, m: number) => at[k]! * target[m]! + at[k + 1]! * target[m + 1]! + at[k + 2]! * target[m + 2]!;
  const [x, y, z] = [target[0]! - at[0]!, target[1]! - at[1]!, target[2]! - at[2]!];
  for (let i = 0; i < 3; i++) into[offset + i] = at[3 + i * 3]! * x + at[4 + i * 3]! * y + at[5 + i * 3]! * z;
  const [a, b, c] = [dot(9, 6) - dot(6, 9), dot(3, 9) - dot(9, 3), dot(6, 3) - dot(3, 6)];
  const sine = Math.sqrt(a * a + b * b + c * c) / 2;
  const angle = Math.atan2(sine, (dot(3, 3) + dot(6, 6) + dot(9, 9) - 1) / 2);
  const factor = sine > 1e-12 ? angle / (2 * sine) : 0.5;
  into[offset + 3] = a * factor;
  into[offset + 4] = b * factor;
  into[offset + 5] = c * factor;
}

/** A pose moved and tilted by twelve errors, from the given one; `sense` -1 when along points against the end's axis. */
function elsewhere(pose: Pose, error: Float64Array, from: number, sense: 1 | -1, into: Pose): Pose {
  copy(pose, into);
  for (let i = 0; i < 3; i++) into[i]! += error[from + i]!;
  const [x, y, z] = [pose[3]!, pose[4]!, pose[5]!];
  const [a, b, c] = [x + sense * error[from + 3]!, y + sense * error[from + 4]!, z + sense * error[from + 5]!];
  const size = Math.sqrt(a * a + b * b + c * c);
  const [nx, ny, nz] = [(y * c - z * b) / size, (z * a - x * c) / size, (x * b - y * a) / size];
  const sine = Math.sqrt(nx * nx + ny * ny + nz * nz);
  if (sine > 0) for (let k = 3; k < 12; k += 3) turn(into, k, [nx / sine, ny / sine, nz / sine], Math.asin(Math.min(sine, 1)));
  return into;
}
