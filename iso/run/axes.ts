/** The six named axes as unit vectors and back. x east, y north, z up. */
import { AXIS_COMPONENT } from "../geometry/tolerances";
import type { Vec3 } from "../geometry/types";
import { VEC_EAST, VEC_NORTH, VEC_UP, vecAngle, vecNegate, vecPerpendicular } from "../geometry/vec3";
import type { AxisName } from "./document";

const AXES: Readonly<Record<AxisName, Vec3>> = {
  E: VEC_EAST, W: vecNegate(VEC_EAST), N: VEC_NORTH, S: vecNegate(VEC_NORTH), U: VEC_UP, D: vecNegate(VEC_UP),
};
const NAMES: Readonly<Record<AxisName, string>> = { E: "east", W: "west", N: "north", S: "south", U: "up", D: "down" };

/** Unit vector of a named axis. */
export function axisVector(axis: AxisName): Vec3 {
  return AXES[axis];
}

/** "east", "up" ... */
export function axisWord(axis: AxisName): string {
  return NAMES[axis];
}

/** The named axis a direction lies along within `withinRad`, or null. */
export function axisNameOf(direction: Vec3, withinRad: number = AXIS_COMPONENT): AxisName | null {
  const hit = (Object.keys(AXES) as AxisName[]).find((name) => vecAngle(direction, AXES[name]) <= withinRad);
  return hit ?? null;
}

/** Side a valve stem or a lone branch takes when nobody says: up, or north on a vertical pipe. Square to the flow. */
export function naturalSide(flow: Vec3): Vec3 {
  return vecPerpendicular(flow);
}
