/**
 * What a stroke shows once everything painted over it is on the page. Paper hides by painting order (a rear pipe breaks
 * under the knock-out of the front one, a symbol covers the pipe it sits on); an exchange format without fills that hide
 * needs the hidden parts cut away. Each segment is cut at the outlines of later opaque shapes, and parts whose middle
 * lies inside one are dropped. Paper millimetres.
 */
import type { DisplayItem, LineItem } from "../draw/drawing-types";
import { SAME_PAPER_MM } from "../geometry/tolerances";
import type { PaperBox, PaperPoint } from "../geometry/types";
import { pathChains, type Chain } from "./flatten";

/** An opaque region: the corners of its outline and its box. */
interface Cover {
  readonly order: number;
  readonly corners: readonly PaperPoint[];
  readonly box: PaperBox;
}

/** What is seen of an item. */
export interface Visible {
  readonly strokes: readonly Chain[];
  readonly fills: readonly Chain[];
}

/**
 * What is seen of each item: strokes cut where something hides them, and dark fills that no single later shape hides whole.
 * An item with nothing left has empty lists; texts have none.
 */
export function visibleParts(items: readonly DisplayItem[]): readonly Visible[] {
  const covers = items.flatMap((item, order) => coversOf(item, order));
  return items.map((item, order) => ({
    strokes: strokesOf(item).flatMap((chain) => uncovered(chain, covers, order)),
    fills: fillsOf(item).filter((chain) => !covers.some((cover) => cover.order > order && chain.points.every((point) => isInside(point, cover.corners)))),
  }));
}

/** Outlines filled with a dark ink; paper and pale hide or tint, which is not a fill of its own elsewhere. */
function fillsOf(item: DisplayItem): readonly Chain[] {
  if (item.type !== "path" || item.fill === null || item.fill === "paper" || item.fill === "pale") return [];
  return pathChains(item.segments).filter(({ points }) => points.length > 2);
}

function strokesOf(item: DisplayItem): readonly Chain[] {
  if (item.type === "text") return [];
  if (item.type === "line") return item.ink === "paper" ? [] : [{ points: [item.from, item.to], closed: false }];
  return item.stroke === null || item.stroke === "paper" ? [] : pathChains(item.segments);
}

function coversOf(item: DisplayItem, order: number): Cover[] {
  if (item.type === "line") return item.ink === "paper" ? [coverOf(bandCorners(item), order)] : [];
  if (item.type !== "path" || item.fill === null || item.fill === "pale") return [];
  return pathChains(item.segments).filter(({ points }) => points.length > 2).map(({ points }) => coverOf(points, order));
}

function coverOf(corners: readonly PaperPoint[], order: number): Cover {
  return { order, corners, box: boxOf(corners) };
}

/** A knock-out line as the band it paints, its round ends left out. */
function bandCorners({ from, to, widthMm }: LineItem): PaperPoint[] {
  const length = Math.hypot(to[0] - from[0], to[1] - from[1]);
  const [x, y] = length > 0 ? [((to[1] - from[1]) / length) * (widthMm / 2), ((from[0] - to[0]) / length) * (widthMm / 2)] : [0, 0];
  return [[from[0] + x, from[1] + y], [to[0] + x, to[1] + y], [to[0] - x, to[1] - y], [from[0] - x, from[1] - y]];
}

function boxOf(points: readonly PaperPoint[]): PaperBox {
  const [xs, ys] = [points.map((p) => p[0]), points.map((p) => p[1])];
  return { minX: Math.min(...xs), minY: Math.min(...ys), maxX: Math.max(...xs), maxY: Math.max(...ys) };
}

const meet = (a: PaperBox, b: PaperBox): boolean => a.minX <= b.maxX && b.minX <= a.maxX && a.minY <= b.maxY && b.minY <= a.maxY;

/** The parts of a chain that later covers leave; the chain itself when they touch none of it. */
function uncovered(chain: Chain, covers: readonly Cover[], order: number): Chain[] {
  const box = boxOf(chain.points);
  const over = covers.filter((cover) => cover.order > order && meet(cover.box, box));
  if (over.length === 0) return [chain];
  const corners = chain.closed ? [...chain.points, chain.points[0]!] : chain.points;
  const parts: PaperPoint[][] = [];
  let whole = true;
  for (let at = 1; at < corners.length; at += 1) {
    const [from, to] = [corners[at - 1]!, corners[at]!];
    const seen = seenParts(from, to, over);
    whole &&= seen.length === 1 && seen[0]![0] === 0 && seen[0]![1] === 1;
    for (const [start, end] of seen) addPart(parts, between(from, to, start), between(from, to, end), start === 0);
  }
  return whole ? [chain] : parts.map((points) => ({ points, closed: false }));
}

/** Joins a part to the one before it where they meet at a corner. */
function addPart(parts: PaperPoint[][], from: PaperPoint, to: PaperPoint, fromCorner: boolean): void {
  const open = parts[parts.length - 1];
  const end = open?.[open.length - 1];
  if (fromCorner && open && end && end[0] === from[0] && end[1] === from[1]) open.push(to);
  else parts.push([from, to]);
}

function between(from: PaperPoint, to: PaperPoint, t: number): PaperPoint {
  if (t === 0) return from;
  return t === 1 ? to : [from[0] + (to[0] - from[0]) * t, from[1] + (to[1] - from[1]) * t];
}

type Span = readonly [number, number];

/** Spans of a segment, as fractions of it, that lie in no cover; neighbours are joined. */
function seenParts(from: PaperPoint, to: PaperPoint, covers: readonly Cover[]): Span[] {
  const box = boxOf([from, to]);
  const over = covers.filter((cover) => meet(cover.box, box));
  const cuts = [0, ...over.flatMap((cover) => crossings(from, to, cover.corners)), 1].sort((a, b) => a - b);
  const spans: [number, number][] = [];
  for (let at = 1; at < cuts.length; at += 1) {
    const [start, end] = [cuts[at - 1]!, cuts[at]!];
    const tiny = Math.hypot(to[0] - from[0], to[1] - from[1]) * (end - start) < SAME_PAPER_MM;
    if (end <= start || (tiny && cuts.length > 2)) continue;
    const middle = between(from, to, (start + end) / 2);
    if (over.some((cover) => isInside(middle, cover.corners))) continue;
    const before = spans[spans.length - 1];
    if (before && before[1] === start) before[1] = end;
    else spans.push([start, end]);
  }
  return spans;
}

/** Where a segment crosses an outline, as fractions of the segment strictly inside it. */
function crossings(from: PaperPoint, to: PaperPoint, corners: readonly PaperPoint[]): number[] {
  const [dx, dy] = [to[0] - from[0], to[1] - from[1]];
  return corners.flatMap((a, index) => {
    const b = corners[(index + 1) % corners.length]!;
    const [ex, ey] = [b[0] - a[0], b[1] - a[1]];
    const area = dx * ey - dy * ex;
    if (area === 0) return [];
    const t = ((a[0] - from[0]) * ey - (a[1] - from[1]) * ex) / area;
    const s = ((a[0] - from[0]) * dy - (a[1] - from[1]) * dx) / area;
    return t > 0 && t < 1 && s >= 0 && s <= 1 ? [t] : [];
  });
}

/** Even-odd; a point on the outline may fall on either side. */
function isInside([x, y]: PaperPoint, corners: readonly PaperPoint[]): boolean {
  let inside = false;
  corners.forEach((a, index) => {
    const b = corners[(index + 1) % corners.length]!;
    if (a[1] > y !== b[1] > y && x < ((b[0] - a[0]) * (y - a[1])) / (b[1] - a[1]) + a[0]) inside = !inside;
  });
  return inside;
}
