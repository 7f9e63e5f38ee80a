/** Paths as straight chains: cubics are cut into chords that stay within a stated distance of the curve. Paper millimetres. */
import { FLATTEN_MM } from "../geometry/tolerances";
import type { PaperPoint } from "../geometry/types";
import type { PathSegment } from "../draw/drawing-types";

/** One subpath: its corners in order, the first not repeated when it is closed. */
export interface Chain {
  readonly points: readonly PaperPoint[];
  readonly closed: boolean;
}

type Cubic = readonly [PaperPoint, PaperPoint, PaperPoint, PaperPoint];

/** The subpaths of a path with every cubic flattened within `FLATTEN_MM`. A subpath of fewer than two points is left out. */
export function pathChains(segments: readonly PathSegment[]): Chain[] {
  const chains: { points: PaperPoint[]; closed: boolean }[] = [];
  for (const segment of segments) {
    const chain = chains[chains.length - 1];
    if (segment.op === "M") chains.push({ points: [segment.to], closed: false });
    else if (segment.op === "Z") {
      if (chain) chain.closed = true;
    } else if (chain) chain.points.push(...(segment.op === "C" ? cubicPoints([last(chain.points), segment.c1, segment.c2, segment.to]) : [segment.to]));
  }
  return chains.map(withoutRepeat).filter(({ points }) => points.length > 1);
}

/** A closed chain whose last corner lies on its first loses it. */
function withoutRepeat({ points, closed }: Chain): Chain {
  const [first, end] = [points[0], points[points.length - 1]];
  const repeats = closed && points.length > 2 && first && end && Math.hypot(first[0] - end[0], first[1] - end[1]) < FLATTEN_MM / 2;
  return { points: repeats ? points.slice(0, -1) : points, closed };
}

function last(points: readonly PaperPoint[]): PaperPoint {
  return points[points.length - 1] ?? [0, 0];
}

/**
 * Points of a cubic after its start, at equal parameters. n parts keep every chord within L·/(8·n²) of the curve, L the
 * largest second derivative, which the control polygon bounds by 6·max(|p0 - 2p1 + p2|, |p1 - 2p2 + p3|).
 */
export function cubicPoints(cubic: Cubic): PaperPoint[] {
  const [p0, p1, p2, p3] = cubic;
  const bend = Math.max(Math.hypot(p0[0] - 2 * p1[0] + p2[0], p0[1] - 2 * p1[1] + p2[1]), Math.hypot(p1[0] - 2 * p2[0] + p3[0], p1[1] - 2 * p2[1] + p3[1]));
  const parts = Math.max(1, Math.ceil(Math.sqrt((6 * bend) / (8 * FLATTEN_MM))));
  return Array.from({ length: parts }, (_, index) => (index === parts - 1 ? p3 : cubicAt(cubic, (index + 1) / parts)));
}

function cubicAt([p0, p1, p2, p3]: Cubic, t: number): PaperPoint {
  const s = 1 - t;
  const at = (axis: 0 | 1): number => s * s * s * p0[axis] + 3 * s * s * t * p1[axis] + 3 * s * t * t * p2[axis] + t * t * t * p3[axis];
  return [at(0), at(1)];
}
