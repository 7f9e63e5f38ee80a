/**
 * Three whole elbows out of a plane: the directions u1, u2 between fixed axes d0 and d, with all three angles given, form
 * closed loops. u1 lies on the circle turned θ1 from d0, at azimuth φ from the plane of d; u2 lies on the circles θ2 about
 * u1 and θ3 about d, which meet where
 *
 *     |θ2 - θ3| <= ψ <= θ2 + θ3,    cos ψ = u1·d = cos θ1 cos δ + sin θ1 sin δ cos φ,    δ the angle from d0 to d.
 *
 * So φ fills the whole circle (two loops, one for each meeting point) or intervals that lie symmetrically about 0 or π; at
 * an interval's ends the two meeting points run into one another, and φ = middle + half·sin τ, with the side by the sign of
 * cos τ, runs round the loop without a kink. Where the first elbow already turns into d (θ1 = δ, θ2 = θ3) the other two
 * make an offset that may roll freely: a loop of its own.
 */
import { WAYS_ANGLE } from "../geometry/tolerances";
import type { Vec3 } from "../geometry/types";
import { vecAddScaled, vecAngle, vecCross, vecPerpendicular, vecReject, vecRotate, vecScale, vecUnit } from "../geometry/vec3";
import { directionBetween } from "./directions";

/** Directions of the four straights at a place of the loop, 0 to 2π; null where they are not defined. */
export type DirectionLoop = (t: number) => readonly [Vec3, Vec3, Vec3, Vec3] | null;

export type ThreeAngles = readonly [number, number, number];

/** All loops of directions for three turns between two axes. */
export function directionLoops(d0: Vec3, into: Vec3, angles: ThreeAngles): DirectionLoop[] {
  const [theta1, theta2, theta3] = angles;
  const delta = vecAngle(d0, into);
  const loops = azimuthLoops(delta, angles).map(({ middle, half, side }) => loopOf(d0, into, angles, middle, half, side));
  const offsets = Math.abs(theta1 - delta) <= WAYS_ANGLE && Math.abs(theta2 - theta3) <= WAYS_ANGLE;
  return offsets ? [...loops, offsetLoop(d0, into, theta2)] : loops;
}

interface Azimuths {
  readonly middle: number;
  /** null = the whole circle, on one side. */
  readonly half: number | null;
  readonly side: 1 | -1;
}

function azimuthLoops(delta: number, [theta1, theta2, theta3]: ThreeAngles): Azimuths[] {
  const across = Math.sin(theta1) * Math.sin(delta);
  const along = Math.cos(theta1) * Math.cos(delta);
  const [least, most] = [Math.cos(theta2 + theta3), Math.cos(theta2 - theta3)];
  const round: Azimuths[] = [{ middle: 0, half: null, side: 1 }, { middle: 0, half: null, side: -1 }];
  if (across <= WAYS_ANGLE) return along >= least - WAYS_ANGLE && along <= most + WAYS_ANGLE ? round : [];
  const [low, high] = [(least - along) / across, (most - along) / across];
  if (low >= 1 || high <= -1) return [];
  if (low <= -1 && high >= 1) return round;
  if (high >= 1) return [{ middle: 0, half: Math.acos(low), side: 1 }];
  if (low <= -1) return [{ middle: Math.PI, half: Math.PI - Math.acos(high), side: 1 }];
  const [from, to] = [Math.acos(high), Math.acos(low)];
  const [middle, half] = [(from + to) / 2, (to - from) / 2];
  return [{ middle, half, side: 1 }, { middle: -middle, half, side: 1 }];
}

function loopOf(d0: Vec3, into: Vec3, [theta1, theta2, theta3]: ThreeAngles, middle: number, half: number | null, side: 1 | -1): DirectionLoop {
  const flat = vecReject(into, d0);
  const e1 = (Math.hypot(...flat) > WAYS_ANGLE ? vecUnit(flat) : null) ?? vecPerpendicular(d0);
  const e2 = vecCross(d0, e1);
  return (t) => {
    const phi = half === null ? t : middle + half * Math.sin(t);
    const here = half === null ? side : Math.cos(t) >= 0 ? 1 : -1;
    const u1 = vecAddScaled(vecAddScaled(vecScale(d0, Math.cos(theta1)), e1, Math.sin(theta1) * Math.cos(phi)), e2, Math.sin(theta1) * Math.sin(phi));
    const u2 = directionBetween(u1, into, theta2, theta3, here);
    return u2 && [d0, u1, u2, into];
  };
}

/** A turn into the end's direction, then an offset there and back that rolls about it. */
function offsetLoop(d0: Vec3, into: Vec3, theta: number): DirectionLoop {
  const tilted = vecRotate(into, vecPerpendicular(into), theta);
  return (t) => [d0, into, vecRotate(tilted, into, t), into];
}
