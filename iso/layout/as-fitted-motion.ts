/**
 * The rigid motion that lays measured points on wanted ones: least weighted squares over a turn and a shift, no stretch.
 *
 * With both sets moved to their weighted centroids the best turn is the rotation nearest to H = sum w·wanted·measuredT, which
 * the singular value decomposition H = U·S·VT gives as R = U·diag(1, 1, d)·VT (Kabsch, Acta Cryst. A32 (1976) 922 and A34
 * (1978) 827). d = det(U·VT): without it the best orthogonal matrix may be a mirror image, which no spool can be turned
 * into. Directions (axes of faces) enter H by themselves, not about a centroid (Wahba, SIAM Review 7 (1965) 409), weighted by
 * a lever squared, so that they count as a point that far out would.
 *
 * How well the turn is held is read off the wanted set: a small turn about a line moves it by the root of what stands
 * off that line. Under a limit the turn about it is said to be free.
 */
import { determinant, EigenvalueDecomposition, Matrix, SingularValueDecomposition } from "ml-matrix";
import type { Vec3 } from "../geometry/types";
import { VEC_ZERO, vecAdd, vecAddScaled, vecAngle, vecCross, vecDot, vecPerpendicular, vecReject, vecRotate, vecScale, vecSub, vecUnit } from "../geometry/vec3";

export interface Motion {
  /** Rows of the turn; its determinant is +1. */
  readonly turn: readonly [Vec3, Vec3, Vec3];
  readonly shift: Vec3;
}

export interface Pair {
  readonly measured: Vec3;
  readonly wanted: Vec3;
  /** Above 0. */
  readonly weight: number;
}

/** A face laid exactly on the sheet's: its centre, and its axis where that was measured (unit vectors). */
export interface Held {
  readonly measured: Vec3;
  readonly wanted: Vec3;
  readonly axis: { readonly measured: Vec3; readonly wanted: Vec3 } | null;
}

export interface MotionFit {
  readonly motion: Motion;
  /** What the points leave open: nothing, the turn about one line, every turn. */
  readonly free: "nothing" | "turn about a line" | "any turn";
  /** Whether the mirror image would lie nearer. */
  readonly mirrorNearer: boolean;
}

/** A direction counts as a point this far out, mm: a tape's 1/16 in against an angle finder's 0.2 degrees. */
export const DIRECTION_LEVER_MM = 450;
/** Points that stand off their line by less than this, in the mean, do not hold the turn about it, mm. */
const LINE_HOLDS_MM = 10;

export function motionPoint({ turn, shift }: Motion, at: Vec3): Vec3 {
  return vecAdd(motionWay({ turn, shift }, at), shift);
}

/** A direction has no place: it is turned only. */
export function motionWay({ turn }: Motion, way: Vec3): Vec3 {
  return [vecDot(turn[0], way), vecDot(turn[1], way), vecDot(turn[2], way)];
}

/** A motion followed by a right-handed turn about a unit axis through a point of the sheet's frame. */
export function motionTurned({ turn, shift }: Motion, about: Vec3, axis: Vec3, angleRad: number): Motion {
  const columns = [0, 1, 2].map((k) => vecRotate([turn[0][k]!, turn[1][k]!, turn[2][k]!], axis, angleRad));
  return { turn: [0, 1, 2].map((row) => columns.map((column) => column[row]!)) as unknown as Motion["turn"], shift: vecAdd(about, vecRotate(vecSub(shift, about), axis, angleRad)) };
}

/**
 * Best motion from the measurer's frame into the sheet's.
 * @param points mm, one or more; @param ways unit directions; @param held lies exactly on its place, the others follow.
 */
export function rigidMotion(points: readonly Pair[], ways: readonly Pair[] = [], held: Held | null = null): MotionFit {
  const total = points.reduce((sum, pair) => sum + pair.weight, 0) || 1;
  const from = held?.measured ?? centroid(points, "measured", total);
  const to = held?.wanted ?? centroid(points, "wanted", total);
  const arms = [
    ...points.map(({ measured, wanted, weight }) => ({ measured: vecSub(measured, from), wanted: vecSub(wanted, to), weight })),
    ...ways.map(({ measured, wanted, weight }) => ({ measured: vecScale(measured, DIRECTION_LEVER_MM), wanted: vecScale(wanted, DIRECTION_LEVER_MM), weight })),
  ];
  const { turn, mirrorNearer } = held?.axis ? { turn: turnAbout(arms, held.axis), mirrorNearer: false } : bestTurn(arms);
  return { motion: { turn, shift: vecSub(to, motionWay({ turn, shift: VEC_ZERO }, from)) }, free: freedom(arms, total, held?.axis?.wanted ?? null), mirrorNearer };
}

function centroid(points: readonly Pair[], side: "measured" | "wanted", total: number): Vec3 {
  return points.reduce((sum, pair) => vecAddScaled(sum, pair[side], pair.weight / total), VEC_ZERO);
}

function bestTurn(arms: readonly Pair[]): { readonly turn: Motion["turn"]; readonly mirrorNearer: boolean } {
  const h = new Matrix([0, 1, 2].map((i) => [0, 1, 2].map((j) => arms.reduce((sum, { measured, wanted, weight }) => sum + weight * wanted[i]! * measured[j]!, 0))));
  const { leftSingularVectors: u, rightSingularVectors: v, diagonal } = new SingularValueDecomposition(h, { autoTranspose: true });
  const hand = determinant(u.mmul(v.transpose())) < 0 ? -1 : 1;
  const turn = u.mmul(Matrix.diag([1, 1, hand])).mmul(v.transpose());
  return { turn: [0, 1, 2].map((row) => turn.getRow(row)) as unknown as Motion["turn"], mirrorNearer: hand < 0 && diagonal[2]! > MIRROR_SHARE * diagonal[0]! };
}

/** A third singular value under this share of the first is a flat set, which is its own mirror image: rounding, not a hand. */
const MIRROR_SHARE = 1e-9;

/** The axis exactly on its place by the shortest turn, then the best turn about it, which has a closed form. */
function turnAbout(arms: readonly Pair[], { measured, wanted }: { readonly measured: Vec3; readonly wanted: Vec3 }): Motion["turn"] {
  const hinge = vecUnit(vecCross(measured, wanted)) ?? vecPerpendicular(measured);
  const angle = vecAngle(measured, wanted);
  const laid = (way: Vec3) => vecRotate(way, hinge, angle);
  const [sine, cosine] = arms.reduce(([s, c], arm) => {
    const across = vecReject(laid(arm.measured), wanted);
    return [s + arm.weight * vecDot(wanted, vecCross(across, arm.wanted)), c + arm.weight * vecDot(across, arm.wanted)];
  }, [0, 0]);
  const about = Math.atan2(sine!, cosine!);
  const columns = ([[1, 0, 0], [0, 1, 0], [0, 0, 1]] as const).map((unit) => vecRotate(laid(unit), wanted, about));
  return [0, 1, 2].map((row) => columns.map((column) => column[row]!)) as unknown as Motion["turn"];
}

/** What holds the turns: moments of the wanted arms about each line. @param axis held exactly, so that only the turn about it is asked. */
function freedom(arms: readonly Pair[], total: number, axis: Vec3 | null): MotionFit["free"] {
  const holds = (moment: number) => Math.sqrt(Math.max(0, moment) / total) > LINE_HOLDS_MM;
  if (axis) return holds(arms.reduce((sum, { wanted, weight }) => sum + weight * vecDot(vecReject(wanted, axis), vecReject(wanted, axis)), 0)) ? "nothing" : "turn about a line";
  const spread = new Matrix([0, 1, 2].map((i) => [0, 1, 2].map((j) => arms.reduce((sum, { wanted, weight }) => sum + weight * wanted[i]! * wanted[j]!, 0))));
  const [least, middle, most] = [...new EigenvalueDecomposition(spread, { assumeSymmetric: true }).realEigenvalues].sort((a, b) => a - b);
  if (holds(least! + middle!)) return "nothing";
  return holds(most!) ? "turn about a line" : "any turn";
}
