/** How far the pipe stays from what it must keep clear of: the centre line's least distance, less OD/2 and the clearance asked. */
import type { Vec3 } from "../geometry/types";
import { vecAddScaled, vecDistance, vecDot, vecLerp, vecSub, vecUnit } from "../geometry/vec3";
import type { KeepOut, WayKeepOut } from "./ways-types";

/** Halvings of a segment in the search for its point nearest a box: distance to a convex body is convex along a line. */
const NARROWINGS = 60;
const GOLDEN = (Math.sqrt(5) - 1) / 2;

/** Least spare clearance of a path, and the keep-out it is nearest to. */
export function keepOutOf(path: readonly Vec3[], odMm: number, keepOuts: readonly KeepOut[]): WayKeepOut {
  let spareMm: number | null = null;
  let nearest: string | null = null;
  for (const each of keepOuts) {
    const spare = pathDistance(path, each) - odMm / 2 - each.clearMm;
    if (spareMm !== null && spare >= spareMm) continue;
    [spareMm, nearest] = [spare, each.name];
  }
  return { clear: spareMm === null || spareMm >= 0, spareMm, nearest };
}

/** Least distance of a path from a keep-out, mm; negative inside a sphere or behind a plane, 0 in a box. */
export function pathDistance(path: readonly Vec3[], keepOut: KeepOut): number {
  let least = Infinity;
  for (let i = 1; i < path.length; i += 1) {
    const [a, b] = [path[i - 1], path[i]];
    if (a && b) least = Math.min(least, segmentTo(a, b, keepOut));
  }
  return least;
}

function segmentTo(a: Vec3, b: Vec3, keepOut: KeepOut): number {
  switch (keepOut.kind) {
    case "plane": {
      const normal = vecUnit(keepOut.normal) ?? [0, 0, 1];
      return Math.min(vecDot(vecSub(a, keepOut.point), normal), vecDot(vecSub(b, keepOut.point), normal));
    }
    case "sphere": {
      const way = vecSub(b, a);
      const square = vecDot(way, way);
      const t = square === 0 ? 0 : Math.max(0, Math.min(1, vecDot(vecSub(keepOut.centre, a), way) / square));
      return vecDistance(vecAddScaled(a, way, t), keepOut.centre) - keepOut.radiusMm;
    }
    case "box":
      return leastAlong((t) => boxDistance(vecLerp(a, b, t), keepOut.low, keepOut.high));
  }
}

function boxDistance(p: Vec3, low: Vec3, high: Vec3): number {
  return Math.hypot(...([0, 1, 2] as const).map((i) => Math.max(Math.min(low[i], high[i]) - p[i], 0, p[i] - Math.max(low[i], high[i]))));
}

/** Least value of a convex function on 0..1 by the golden section. */
function leastAlong(f: (t: number) => number): number {
  let [low, high] = [0, 1];
  let [x, y] = [1 - GOLDEN, GOLDEN];
  let [fx, fy] = [f(x), f(y)];
  for (let k = 0; k < NARROWINGS; k += 1) {
    if (fx <= fy) {
      high = y;
      [y, fy] = [x, fx];
      x = high - GOLDEN * (high - low);
      fx = f(x);
    } else {
      low = x;
      [x, fx] = [y, fy];
      y = low + GOLDEN * (high - low);
      fy = f(y);
    }
  }
  return Math.min(fx, fy, f(0), f(1));
}
