/**
 * The way to certainty when Newton has no start or jams: a spherical polygon that holds the answer if there is one, cut
 * through its centre of gravity again and again. Inside K the gradient of f says which half to keep; outside, the
 * gradient of S does (S is concave and grows with its vector, so S(x) <= ∇S(v)·x everywhere; inside K that cut holds
 * too). Each cut takes a good share of the area; an empty polygon proves that nothing closes.
 */
import type { Vec3 } from "../geometry/types";
import { CLOSING_ANGLE, CLOSING_FOLD, CLOSING_SMALLEST_POLYGON, CLOSING_THREAD } from "../geometry/tolerances";
import { vecAdd, vecAddScaled, vecCross, vecDistance, vecDot, vecLength, vecPerpendicular, vecReject, vecScale, vecUnit } from "../geometry/vec3";
import { newtonClimb } from "./newton";
import { stateAt, type Problem, type State } from "./problem";

const MOST_CUTS = 400;
/** Cuts between two tries of Newton from the polygon's centre. */
const CUTS_PER_TRY = 4;
/** Width under which the centre of gravity comes from the corners: the area's own formula has lost its digits there. */
const NARROW = 1e-4;
/** An arc is at most this much longer than its chord. */
const ARC_OVER_CHORD = Math.PI / 2;

/** The answer's state, or null when it is proven that there is none (or S falls to zero before it is reached). */
export function polygonSearch(problem: Problem): State | null {
  const middle = vecUnit(problem.D);
  if (!middle || peaksAtHalfTurn(problem)) return null;
  let polygon = hemisphere(middle);
  let within: Vec3 | null = null;
  for (let cut = 0; cut < MOST_CUTS; cut += 1) {
    const v = cut === 0 ? middle : centreOf(polygon);
    if (!v) return null;
    const width = farthest(polygon, v);
    const s = stateAt(problem, v[0], v[1], v[2]);
    if (width < CLOSING_SMALLEST_POLYGON || rulesOutRoot(problem, s, width)) return null;
    const inside = s.S > CLOSING_FOLD * problem.scale;
    if (inside) within = v;
    const found = inside && cut % CUTS_PER_TRY === 0 ? newtonClimb(problem, v) : null;
    if (found) return found;
    const kept = inside ? clipped(polygon, s.F, v) : polygon;
    polygon = clipped(kept, slopeOfS(problem, v), v);
    if (polygon.length < 3) return null;
    if (isThread(polygon, inside ? s.F : slopeOfS(problem, v))) return within && newtonClimb(problem, within);
  }
  return null;
}

/** Whether all that is left is a thread along the last cut, as happens where the ends lie in one plane: long, but without width. */
function isThread(polygon: readonly Vec3[], normal: Vec3): boolean {
  const size = vecLength(normal);
  return polygon.every((v) => Math.abs(vecDot(v, normal)) <= CLOSING_THREAD * size);
}

/**
 * A bend of 180° is a peak of f with a point on it: where f is highest there, no path with lesser bends exists. Checked
 * at once, because the cuts would only creep towards it. Two such points at one place add their peaks.
 */
function peaksAtHalfTurn(problem: Problem): boolean {
  const { d0, d1, r0, r1, D } = problem;
  const peak = (u: Vec3, otherAxis: Vec3, otherR: number, sign: 1 | -1, r: number) => {
    const c = sign * vecDot(otherAxis, u);
    const s = vecLength(vecCross(otherAxis, u));
    if (vecDot(D, u) - otherR * s <= 0) return false;
    if (c < 0 && s < CLOSING_ANGLE) return vecLength(vecReject(D, u)) <= 2 * (r + otherR);
    const pull = vecReject(vecAddScaled(D, otherAxis, (-sign * otherR * s) / (1 + c)), u);
    return vecLength(pull) <= 2 * r;
  };
  return peak(vecScale(d0, -1), d1, r1, -1, r0) || peak(d1, d0, r0, 1, r1);
}

/**
 * F turns to zero no faster than the largest eigenvalue of B allows, which is at most |D| + T0 + T1 with the largest
 * tangents found within reach; where |F| at the centre is more than that over the way to the farthest corner, no answer
 * lies in the polygon. Holds outside K too.
 */
function rulesOutRoot(problem: Problem, s: State, width: number): boolean {
  const reach = width * ARC_OVER_CHORD;
  const most = (sine: number, cosine: number, r: number) => {
    const half = (Math.atan2(sine, cosine) + reach) / 2;
    return half < Math.PI / 2 ? r * Math.tan(half) : Infinity;
  };
  return s.sizeF > reach * (vecLength(problem.D) + most(s.s0, s.c0, problem.r0) + most(s.s1, s.c1, problem.r1));
}

/** Gradient of S as a function of a vector: D - R0 ∇|d0×u| - R1 ∇|d1×u|; an axis itself takes the zero subgradient. */
function slopeOfS({ d0, d1, r0, r1, D }: Problem, u: Vec3): Vec3 {
  const across = (d: Vec3, r: number): Vec3 => {
    const aside = vecUnit(vecReject(u, d));
    return aside ? vecScale(aside, -r) : [0, 0, 0];
  };
  return vecAdd(D, vecAdd(across(d0, r0), across(d1, r1)));
}

/** K lies within a right angle of D. Four corners keep every edge at 90°. */
function hemisphere(middle: Vec3): readonly Vec3[] {
  const a = vecPerpendicular(middle);
  const b = vecCross(middle, a);
  return [a, b, vecScale(a, -1), vecScale(b, -1)];
}

/**
 * Keeps the part where normal·x >= 0. A new edge over 90° gets a middle corner: the first cut's edge joins two opposite
 * points, whose sum says nothing, so the corner is the cut's centre laid onto the edge.
 */
function clipped(polygon: readonly Vec3[], normal: Vec3, centre: Vec3): readonly Vec3[] {
  const kept: Vec3[] = [];
  const heights = polygon.map((v) => vecDot(normal, v));
  polygon.forEach((v, i) => {
    const j = (i + 1) % polygon.length;
    const [h, k] = [heights[i]!, heights[j]!];
    if (h >= 0) kept.push(v);
    if ((h > 0 && k < 0) || (h < 0 && k > 0)) {
      const crossing = vecUnit(vecAddScaled(vecScale(v, Math.abs(k)), polygon[j]!, Math.abs(h)));
      if (crossing) kept.push(crossing);
    }
  });
  const axis = vecUnit(normal);
  return kept.flatMap((v, i) => {
    const next = kept[(i + 1) % kept.length]!;
    const middle = vecDot(v, next) < -CLOSING_FOLD && axis ? vecUnit(vecReject(centre, axis)) : null;
    return middle ? [v, middle] : [v];
  });
}

/** Direction of the centre of gravity: half the sum of each edge's length times its inward normal; null when it is nothing. */
function centreOf(polygon: readonly Vec3[]): Vec3 | null {
  let sum: Vec3 = [0, 0, 0];
  const narrow = farthest(polygon, polygon[0]!) < NARROW;
  polygon.forEach((v, i) => {
    const next = polygon[(i + 1) % polygon.length]!;
    if (narrow) {
      sum = vecAdd(sum, v);
      return;
    }
    const normal = vecCross(v, next);
    const sine = vecLength(normal);
    if (sine > 0) sum = vecAddScaled(sum, normal, Math.atan2(sine, vecDot(v, next)) / sine);
  });
  return vecUnit(sum);
}

/** Distance from a direction to the farthest corner (chord). */
function farthest(polygon: readonly Vec3[], v: Vec3): number {
  let most = 0;
  for (const corner of polygon) most = Math.max(most, vecDistance(corner, v));
  return most;
}
