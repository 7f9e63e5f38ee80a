/**
 * The isometric projection: two level axes at 30 degrees to the horizontal, the vertical upright, equal scale on all three
 * (Navy training manual 14265; ISO 5456-3, from memory). The four views look from the four level corners.
 */
import type { PaperPoint, Vec3 } from "../geometry/types";
import type { View } from "../run/document";
import { PAPER_EPS } from "./sizes";

const C = Math.cos(Math.PI / 6);
const S = Math.sin(Math.PI / 6);

export interface Projection {
  readonly view: View;
  /** Paper vectors of one unit east, north, up (y down). */
  readonly axes: readonly [PaperPoint, PaperPoint, PaperPoint];
  /** Vector towards the reader: a larger dot product is nearer. */
  readonly near: Vec3;
}

const UP: PaperPoint = [0, -1];

/** 1 looks from the south-west, 2 south-east, 3 north-east, 4 north-west. */
export const PROJECTIONS: Readonly<Record<View, Projection>> = {
  1: { view: 1, axes: [[C, -S], [-C, -S], UP], near: [-1, -1, 1] },
  2: { view: 2, axes: [[C, S], [C, -S], UP], near: [1, -1, 1] },
  3: { view: 3, axes: [[-C, S], [C, S], UP], near: [1, 1, 1] },
  4: { view: 4, axes: [[-C, -S], [-C, S], UP], near: [-1, 1, 1] },
};

export function project(projection: Projection, at: Vec3): PaperPoint {
  const [e, n, u] = projection.axes;
  return [at[0] * e[0] + at[1] * n[0] + at[2] * u[0], at[0] * e[1] + at[1] * n[1] + at[2] * u[1]];
}

export function depthOf(projection: Projection, at: Vec3): number {
  return at[0] * projection.near[0] + at[1] * projection.near[1] + at[2] * projection.near[2];
}

/** Angle in radians, 0 to 90 degrees, between a paper direction and the nearest of the three axes. */
export function axisAngle(projection: Projection, direction: PaperPoint): number {
  const length = Math.hypot(direction[0], direction[1]);
  let least = Math.PI / 2;
  if (length < PAPER_EPS) return 0;
  for (const axis of projection.axes) {
    const cross = Math.abs(axis[0] * direction[1] - axis[1] * direction[0]) / length;
    least = Math.min(least, Math.asin(Math.min(1, cross)));
  }
  return least;
}
