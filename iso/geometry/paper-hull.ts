/** Convex hull on paper (Andrew's monotone chain, a textbook method). */
import type { PaperPoint } from "./types";

/** Corners of the hull, clockwise as seen on paper (y down), without points on its sides; fewer than three points come back as they are. */
export function convexHull(points: readonly PaperPoint[]): readonly PaperPoint[] {
  const sorted = [...points].sort((p, q) => p[0] - q[0] || p[1] - q[1]);
  if (sorted.length < 3) return sorted;
  const lower = halfHull(sorted);
  const upper = halfHull([...sorted].reverse());
  return [...lower.slice(0, -1), ...upper.slice(0, -1)];
}

function halfHull(points: readonly PaperPoint[]): PaperPoint[] {
  const hull: PaperPoint[] = [];
  for (const p of points) {
    for (;;) {
      const [a, b] = [hull[hull.length - 2], hull[hull.length - 1]];
      if (!a || !b || (b[0] - a[0]) * (p[1] - a[1]) - (b[1] - a[1]) * (p[0] - a[0]) > 0) break;
      hull.pop();
    }
    hull.push(p);
  }
  return hull;
}
