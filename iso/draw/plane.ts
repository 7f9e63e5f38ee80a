/** Turned boxes and segments on paper, beside iso/geometry/paper.ts. Millimetres, y down, angles clockwise. */
import { segmentCrossingOpen } from "../geometry/paper";
import type { PaperBox, PaperPoint } from "../geometry/types";
import { PAPER_EPS } from "./sizes";

export interface Segment {
  readonly from: PaperPoint;
  readonly to: PaperPoint;
}

/** A box turned about its centre: half width along (cos, sin), half height across. */
export interface TurnedBox {
  readonly centre: PaperPoint;
  readonly halfWidth: number;
  readonly halfHeight: number;
  readonly angle: number;
}

/** Unit vector; [1, 0] for a vector of no length, so that drawing stays finite on bad input. */
export function paperDirection(a: PaperPoint): PaperPoint {
  const length = Math.sqrt(a[0] * a[0] + a[1] * a[1]);
  return length < PAPER_EPS ? [1, 0] : [a[0] / length, a[1] / length];
}

/** True when the axis-parallel boxes round two segments are apart: most pairs on a sheet are, and need no more arithmetic. */
export function segmentsApart(a: Segment, b: Segment, margin = 0): boolean {
  const p = a.from;
  const q = a.to;
  const r = b.from;
  const s = b.to;
  return (
    Math.max(p[0], q[0]) + margin < Math.min(r[0], s[0]) || Math.max(r[0], s[0]) + margin < Math.min(p[0], q[0]) ||
    Math.max(p[1], q[1]) + margin < Math.min(r[1], s[1]) || Math.max(r[1], s[1]) + margin < Math.min(p[1], q[1])
  );
}

export function crossingOf(a: Segment, b: Segment): { readonly t: number; readonly s: number } | null {
  return segmentsApart(a, b) ? null : segmentCrossingOpen(a.from, a.to, b.from, b.to);
}

/** True when two open segments cross: touching ends and parallels do not. Asked ten thousand times a sheet. */
export function segmentsCross(a: Segment, b: Segment): boolean {
  if (segmentsApart(a, b)) return false;
  const fx = a.from[0];
  const fy = a.from[1];
  const wx = a.to[0] - fx;
  const wy = a.to[1] - fy;
  const px = b.from[0] - fx;
  const py = b.from[1] - fy;
  const ux = b.to[0] - fx - px;
  const uy = b.to[1] - fy - py;
  if ((wx * py - wy * px) * (wx * (py + uy) - wy * (px + ux)) >= 0) return false;
  return (uy * px - ux * py) * (ux * (wy - py) - uy * (wx - px)) < 0;
}

export function boxCorners(box: TurnedBox): readonly PaperPoint[] {
  const c = Math.cos(box.angle);
  const s = Math.sin(box.angle);
  const at = (i: number, j: number): PaperPoint => [
    box.centre[0] + c * box.halfWidth * i - s * box.halfHeight * j,
    box.centre[1] + s * box.halfWidth * i + c * box.halfHeight * j,
  ];
  return [at(-1, -1), at(1, -1), at(1, 1), at(-1, 1)];
}

/** Half extents of the axis-parallel box around a turned one. */
export function boxReach(box: TurnedBox): readonly [number, number] {
  const c = Math.abs(Math.cos(box.angle));
  const s = Math.abs(Math.sin(box.angle));
  return [c * box.halfWidth + s * box.halfHeight, s * box.halfWidth + c * box.halfHeight];
}

/** True when two turned boxes come closer than `margin` (separating axes; exactly at the margin they are apart). */
export function boxesMeet(a: TurnedBox, b: TurnedBox, margin: number): boolean {
  const dx = b.centre[0] - a.centre[0];
  const dy = b.centre[1] - a.centre[1];
  if (a.angle === 0 && b.angle === 0) {
    return Math.abs(dx) < a.halfWidth + b.halfWidth + margin && Math.abs(dy) < a.halfHeight + b.halfHeight + margin;
  }
  const turn = b.angle - a.angle;
  return !apartAlong(a, b, dx, dy, turn, margin) && !apartAlong(b, a, dx, dy, turn, margin);
}

function apartAlong(a: TurnedBox, b: TurnedBox, dx: number, dy: number, turn: number, margin: number): boolean {
  const c = Math.cos(a.angle);
  const s = Math.sin(a.angle);
  const tc = Math.abs(Math.cos(turn));
  const ts = Math.abs(Math.sin(turn));
  return (
    Math.abs(dx * c + dy * s) >= a.halfWidth + tc * b.halfWidth + ts * b.halfHeight + margin ||
    Math.abs(dy * c - dx * s) >= a.halfHeight + ts * b.halfWidth + tc * b.halfHeight + margin
  );
}

/** Length of the part of a segment inside a turned box, widened by a margin on every side; 0 when outside. */
export function segmentInBox(from: PaperPoint, to: PaperPoint, box: TurnedBox, margin = 0): number {
  const ax = from[0] - box.centre[0];
  const ay = from[1] - box.centre[1];
  const wx = to[0] - from[0];
  const wy = to[1] - from[1];
  const halfWidth = box.halfWidth + margin;
  const halfHeight = box.halfHeight + margin;
  const reach = halfWidth + halfHeight;
  if ((ax > reach && ax + wx > reach) || (ax < -reach && ax + wx < -reach) || (ay > reach && ay + wy > reach) || (ay < -reach && ay + wy < -reach)) return 0;
  const c = box.angle === 0 ? 1 : Math.cos(box.angle);
  const s = box.angle === 0 ? 0 : Math.sin(box.angle);
  return clippedLength(ax * c + ay * s, wx * c + wy * s, halfWidth, ay * c - ax * s, wy * c - wx * s, halfHeight);
}

/** Length of a segment inside a box about the origin; its start (x, y) and its way (wx, wy). */
function clippedLength(x: number, wx: number, halfWidth: number, y: number, wy: number, halfHeight: number): number {
  let low = 0;
  let high = 1;
  if (Math.abs(wx) < PAPER_EPS) {
    if (Math.abs(x) >= halfWidth) return 0;
  } else {
    const [t0, t1] = [(-halfWidth - x) / wx, (halfWidth - x) / wx];
    low = Math.max(low, Math.min(t0, t1));
    high = Math.min(high, Math.max(t0, t1));
  }
  if (Math.abs(wy) < PAPER_EPS) {
    if (Math.abs(y) >= halfHeight) return 0;
  } else {
    const [t0, t1] = [(-halfHeight - y) / wy, (halfHeight - y) / wy];
    low = Math.max(low, Math.min(t0, t1));
    high = Math.min(high, Math.max(t0, t1));
  }
  return high <= low ? 0 : (high - low) * Math.sqrt(wx * wx + wy * wy);
}

/** Distance from the origin of a ray along a unit direction to the edge of an axis-parallel box centred on it. */
export function boxEdgeAlong(halfWidth: number, halfHeight: number, direction: PaperPoint): number {
  const x = Math.abs(direction[0]);
  const y = Math.abs(direction[1]);
  return Math.min(x < PAPER_EPS ? Infinity : halfWidth / x, y < PAPER_EPS ? Infinity : halfHeight / y);
}

export const EMPTY_BOX: PaperBox = { minX: Infinity, minY: Infinity, maxX: -Infinity, maxY: -Infinity };

export function paperBoxAround(points: readonly PaperPoint[], start: PaperBox = EMPTY_BOX): PaperBox {
  let { minX, minY, maxX, maxY } = start;
  for (const [x, y] of points) {
    if (x < minX) minX = x;
    if (x > maxX) maxX = x;
    if (y < minY) minY = y;
    if (y > maxY) maxY = y;
  }
  return { minX, minY, maxX, maxY };
}

/** Box round segments and a box. */
export function boxAroundSegments(segments: readonly Segment[], start: PaperBox = EMPTY_BOX): PaperBox {
  let { minX, minY, maxX, maxY } = start;
  for (const { from, to } of segments) {
    minX = Math.min(minX, from[0], to[0]);
    minY = Math.min(minY, from[1], to[1]);
    maxX = Math.max(maxX, from[0], to[0]);
    maxY = Math.max(maxY, from[1], to[1]);
  }
  return { minX, minY, maxX, maxY };
}

/** Box round turned boxes and a box. */
export function boxAroundBoxes(boxes: readonly TurnedBox[], start: PaperBox = EMPTY_BOX): PaperBox {
  let { minX, minY, maxX, maxY } = start;
  for (const box of boxes) {
    const [w, h] = boxReach(box);
    const [x, y] = box.centre;
    minX = Math.min(minX, x - w);
    minY = Math.min(minY, y - h);
    maxX = Math.max(maxX, x + w);
    maxY = Math.max(maxY, y + h);
  }
  return { minX, minY, maxX, maxY };
}

/** Turn of a line, radians in (-90°, 90°], so that text along it reads from the bottom or from the right. */
export function readingAngle(direction: PaperPoint): number {
  const [x, y] = paperDirection(direction);
  // A tolerance, so that solver noise cannot flip upright text.
  const turned = x < -PAPER_EPS * 1e3 || (Math.abs(x) <= PAPER_EPS * 1e3 && y > 0);
  return turned ? Math.atan2(-y, -x) : Math.atan2(y, x);
}

/** Part of `a`-`b` left after cutting out [from, to] intervals given as distances from a. */
export function remainingStretches(length: number, cuts: readonly (readonly [number, number])[]): readonly (readonly [number, number])[] {
  const left: (readonly [number, number])[] = [];
  let at = 0;
  for (const [from, to] of [...cuts].sort((p, q) => p[0] - q[0])) {
    if (from > at + PAPER_EPS) left.push([at, Math.min(from, length)]);
    at = Math.max(at, to);
    if (at >= length) break;
  }
  if (at < length - PAPER_EPS) left.push([at, length]);
  return left;
}

