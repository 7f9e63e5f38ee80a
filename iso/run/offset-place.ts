/** One typed offset in space. */
import { ZERO_LENGTH_MM } from "../geometry/tolerances";
import type { Vec3 } from "../geometry/types";
import { vecAdd, vecAddScaled, vecDistance, vecSub, vecUnit } from "../geometry/vec3";
import type { Offset } from "./document";

/** Where an offset leads from `base`, and its unit direction taken from the numbers as typed (null when it has no length). */
export function offsetPlace(base: Vec3, offset: Offset): { position: Vec3; direction: Vec3 | null } {
  if (offset.kind === "absolute") {
    const position: Vec3 = [offset.e.mm, offset.n.mm, offset.u.mm];
    return { position, direction: vecDistance(position, base) > ZERO_LENGTH_MM ? vecUnit(vecSub(position, base)) : null };
  }
  if (offset.kind === "polar") {
    const along = vecUnit([offset.direction.e, offset.direction.n, offset.direction.u]);
    if (!along) return { position: base, direction: null };
    const length = offset.length.mm;
    const towards: Vec3 = length < 0 ? [-along[0], -along[1], -along[2]] : along;
    return { position: vecAddScaled(base, along, length), direction: Math.abs(length) > ZERO_LENGTH_MM ? towards : null };
  }
  if (offset.kind === "slope") return slopePlace(base, offset);
  const step: Vec3 = [offset.e.mm, offset.n.mm, offset.u.mm];
  return { position: vecAdd(base, step), direction: Math.hypot(...step) > ZERO_LENGTH_MM ? vecUnit(step) : null };
}

/** Along a level direction by its level length, rising by the slope times that length (a negative length goes back down a rise). */
function slopePlace(base: Vec3, offset: Extract<Offset, { kind: "slope" }>): { position: Vec3; direction: Vec3 | null } {
  const level = vecUnit([offset.direction.e, offset.direction.n, 0]);
  if (!level) return { position: base, direction: null };
  const length = offset.length.mm;
  const step: Vec3 = [level[0] * length, level[1] * length, length * offset.slope.ratio];
  return { position: vecAdd(base, step), direction: Math.abs(length) > ZERO_LENGTH_MM ? vecUnit(step) : null };
}
