/** The paper frame: millimetres, x right, y down. Points, segments, boxes. Pure functions on read-only values. */
import type { PaperBox, PaperPoint } from "./types";
import { ZERO_VECTOR } from "./tolerances";

export function paperAdd(a: PaperPoint, b: PaperPoint): PaperPoint {
  return [a[0] + b[0], a[1] + b[1]];
}

/** a - b: the way from b to a. */
export function paperSub(a: PaperPoint, b: PaperPoint): PaperPoint {
  return [a[0] - b[0], a[1] - b[1]];
}

export function paperScale(a: PaperPoint, factor: number): PaperPoint {
  return [a[0] * factor, a[1] * factor];
}

/** a + factor·direction. */
export function paperAddScaled(a: PaperPoint, direction: PaperPoint, factor: number): PaperPoint {
  return [a[0] + direction[0] * factor, a[1] + direction[1] * factor];
}

export function paperDot(a: PaperPoint, b: PaperPoint): number {
  return a[0] * b[0] + a[1] * b[1];
}

/** z of the cross product; positive when b lies clockwise of a as the reader sees it (y is down). */
export function paperCross(a: PaperPoint, b: PaperPoint): number {
  return a[0] * b[1] - a[1] * b[0];
}

export function paperLength(a: PaperPoint): number {
  return Math.hypot(a[0], a[1]);
}

export function paperDistance(a: PaperPoint, b: PaperPoint): number {
  return Math.hypot(a[0] - b[0], a[1] - b[1]);
}

/** Unit vector along a, or null when a has no direction. */
export function paperUnit(a: PaperPoint): PaperPoint | null {
  const length = paperLength(a);
  return length > ZERO_VECTOR && Number.isFinite(length) ? [a[0] / length, a[1] / length] : null;
}

/** a turned a quarter clockwise as the reader sees it. */
export function paperQuarterTurn(a: PaperPoint): PaperPoint {
  return [-a[1], a[0]];
}

/** a turned about the origin by an angle in radians, clockwise as the reader sees it. */
export function paperRotate(a: PaperPoint, angleRad: number): PaperPoint {
  const c = Math.cos(angleRad);
  const s = Math.sin(angleRad);
  return [a[0] * c - a[1] * s, a[0] * s + a[1] * c];
}

/** Point between a (t = 0) and b (t = 1). */
export function paperLerp(a: PaperPoint, b: PaperPoint, t: number): PaperPoint {
  return [a[0] + (b[0] - a[0]) * t, a[1] + (b[1] - a[1]) * t];
}

/** Place of the foot of p on the closed segment a-b, 0 at a, 1 at b; 0 when the segment has no length. */
export function segmentFoot(p: PaperPoint, a: PaperPoint, b: PaperPoint): number {
  const way = paperSub(b, a);
  const square = paperDot(way, way);
  if (square <= ZERO_VECTOR * ZERO_VECTOR) return 0;
  return Math.min(1, Math.max(0, paperDot(paperSub(p, a), way) / square));
}

/** Distance from p to the closed segment a-b. */
export function segmentDistance(p: PaperPoint, a: PaperPoint, b: PaperPoint): number {
  return paperDistance(p, paperLerp(a, b, segmentFoot(p, a, b)));
}

/**
 * Where two open segments cross: places along each, strictly between 0 and 1, or null. Touching ends, parallels and
 * overlaps are no crossing.
 */
export function segmentCrossingOpen(
  a: PaperPoint, b: PaperPoint, c: PaperPoint, d: PaperPoint,
): { readonly t: number; readonly s: number } | null {
  const ab = paperSub(b, a);
  const cd = paperSub(d, c);
  const det = paperCross(ab, cd);
  if (Math.abs(det) <= ZERO_VECTOR * paperLength(ab) * paperLength(cd)) return null;
  const ac = paperSub(c, a);
  const t = paperCross(ac, cd) / det;
  const s = paperCross(ac, ab) / det;
  return t > 0 && t < 1 && s > 0 && s < 1 ? { t, s } : null;
}

/** Distance between two closed segments; 0 where they cross or touch. */
export function segmentsDistance(a: PaperPoint, b: PaperPoint, c: PaperPoint, d: PaperPoint): number {
  if (segmentCrossingOpen(a, b, c, d)) return 0;
  return Math.min(segmentDistance(a, c, d), segmentDistance(b, c, d), segmentDistance(c, a, b), segmentDistance(d, a, b));
}

/** Smallest box round the points; null for none. */
export function boxOfPoints(points: readonly PaperPoint[]): PaperBox | null {
  if (points.length === 0) return null;
  let minX = Infinity, minY = Infinity, maxX = -Infinity, maxY = -Infinity;
  for (const [x, y] of points) {
    minX = Math.min(minX, x);
    minY = Math.min(minY, y);
    maxX = Math.max(maxX, x);
    maxY = Math.max(maxY, y);
  }
  return { minX, minY, maxX, maxY };
}

export function boxUnion(a: PaperBox, b: PaperBox): PaperBox {
  return {
    minX: Math.min(a.minX, b.minX), minY: Math.min(a.minY, b.minY),
    maxX: Math.max(a.maxX, b.maxX), maxY: Math.max(a.maxY, b.maxY),
  };
}

/** The box with a margin on all sides (negative shrinks it). */
export function boxGrow(a: PaperBox, margin: number): PaperBox {
  return { minX: a.minX - margin, minY: a.minY - margin, maxX: a.maxX + margin, maxY: a.maxY + margin };
}

export function boxWidth(a: PaperBox): number {
  return a.maxX - a.minX;
}

export function boxHeight(a: PaperBox): number {
  return a.maxY - a.minY;
}

export function boxCentre(a: PaperBox): PaperPoint {
  return [(a.minX + a.maxX) / 2, (a.minY + a.maxY) / 2];
}

/** True when the insides of two boxes share area; boxes that only touch do not overlap. */
export function boxesOverlapOpen(a: PaperBox, b: PaperBox): boolean {
  return a.minX < b.maxX && b.minX < a.maxX && a.minY < b.maxY && b.minY < a.maxY;
}

/** True when the inner box lies within the outer one; shared edges count as within. */
export function boxContains(outer: PaperBox, inner: PaperBox): boolean {
  return inner.minX >= outer.minX && inner.maxX <= outer.maxX && inner.minY >= outer.minY && inner.maxY <= outer.maxY;
}

/** True when the point is inside the box or on its edge. */
export function boxContainsPoint(box: PaperBox, [x, y]: PaperPoint): boolean {
  return x >= box.minX && x <= box.maxX && y >= box.minY && y <= box.maxY;
}

/** True when a segment passes through the inside of a box (Liang-Barsky clipping); touching an edge or corner does not count. */
export function segmentCrossesBoxOpen(a: PaperPoint, b: PaperPoint, box: PaperBox): boolean {
  let low = 0;
  let high = 1;
  for (const [start, way, min, max] of [
    [a[0], b[0] - a[0], box.minX, box.maxX],
    [a[1], b[1] - a[1], box.minY, box.maxY],
  ] as const) {
    if (way === 0) {
      if (start <= min || start >= max) return false;
      continue;
    }
    const t0 = (min - start) / way;
    const t1 = (max - start) / way;
    low = Math.max(low, Math.min(t0, t1));
    high = Math.min(high, Math.max(t0, t1));
    if (low >= high) return false;
  }
  return true;
}
