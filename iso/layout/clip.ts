/** Clipping to a box on paper (Liang and Barsky's method, a textbook one). Points on the border count as inside. */
import type { PaperBox, PaperPoint } from "../geometry/types";

/** The part of a segment within the box; null when it passes by. */
export function clipSegment(from: PaperPoint, to: PaperPoint, box: PaperBox): readonly [PaperPoint, PaperPoint] | null {
  const [dx, dy] = [to[0] - from[0], to[1] - from[1]];
  let [low, high] = [0, 1];
  const sides = [[-dx, from[0] - box.minX], [dx, box.maxX - from[0]], [-dy, from[1] - box.minY], [dy, box.maxY - from[1]]] as const;
  for (const [p, q] of sides) {
    if (p === 0) {
      if (q < 0) return null;
    } else if (p < 0) low = Math.max(low, q / p);
    else high = Math.min(high, q / p);
    if (low > high) return null;
  }
  const at = (t: number): PaperPoint => [from[0] + dx * t, from[1] + dy * t];
  return [low === 0 ? from : at(low), high === 1 ? to : at(high)];
}

/** The stretches of a polyline within the box. */
export function clipPolyline(points: readonly PaperPoint[], box: PaperBox): readonly (readonly PaperPoint[])[] {
  const parts: PaperPoint[][] = [];
  for (let i = 1; i < points.length; i++) {
    const kept = clipSegment(points[i - 1]!, points[i]!, box);
    if (!kept) continue;
    const open = parts.at(-1);
    const end = open?.at(-1);
    if (open && end && end[0] === kept[0][0] && end[1] === kept[0][1]) open.push(kept[1]);
    else parts.push([kept[0], kept[1]]);
  }
  return parts;
}
