/**
 * The peer of the label comparison: labelgun 6.1 from npm, a greedy show-or-hide placer over an R-tree, fed the anchors,
 * boxes and obstacles of a finished drawing. Each label is offered up and to the right of its anchor, as map labels are,
 * first come first served; obstacles (pipe, symbols, numbers) come first and cannot be hidden. What it hides is not clean.
 * `corners` offers what was hidden again at the other corners of the anchor, which is more than the library does itself.
 */
import { createRequire } from "node:module";
import type { Drawing } from "@/iso";
import { heavyOf, labelsOf, leadersTo, type Box, type MeasuredLabel } from "./drawing-measure";

/** Pipe is fed in pieces no longer than this, since the library knows level boxes only, mm. */
const PIECE_MM = 1.5;
/** Distance of a label's corner from its anchor, mm: the nearest ring of our own search. */
const OFF_MM = 1.5 * Math.SQRT1_2;
const OBSTACLE_WEIGHT = 1_000_000;
const CORNERS = [[1, -1], [1, 1], [-1, 1], [-1, -1]] as const;

/** What is used of labelgun, which comes without types. */
interface Gun {
  ingestLabel(box: { bottomLeft: readonly number[]; topRight: readonly number[] }, id: string, weight: number, labelObject: unknown, name: string, isDragged: boolean): void;
  update(onlyChanges: boolean): void;
  getShown(): readonly { readonly id: string }[];
}

// Required rather than imported: its only export is a default inside a default.
const { default: LabelGun } = createRequire(import.meta.url)("labelgun") as { readonly default: new (hide: () => void, show: () => void) => Gun };

const ingest = (gun: Gun, id: string, { x0, y0, x1, y1 }: Box, weight: number): void => gun.ingestLabel({ bottomLeft: [x0, y0], topRight: [x1, y1] }, id, weight, null, id, false);

function obstacles(gun: Gun, drawing: Pick<Drawing, "items">, fixed: readonly MeasuredLabel[]): void {
  let id = 0;
  for (const { a, b, half } of heavyOf(drawing.items)) {
    const pieces = Math.max(1, Math.ceil(Math.hypot(b[0] - a[0], b[1] - a[1]) / PIECE_MM));
    for (let i = 0; i < pieces; i++) {
      const at = (t: number, k: 0 | 1): number => a[k] + (b[k] - a[k]) * t;
      const [p, q] = [i / pieces, (i + 1) / pieces];
      ingest(gun, `pipe ${id++}`, {
        x0: Math.min(at(p, 0), at(q, 0)) - half, x1: Math.max(at(p, 0), at(q, 0)) + half, y0: Math.min(at(p, 1), at(q, 1)) - half, y1: Math.max(at(p, 1), at(q, 1)) + half,
      }, OBSTACLE_WEIGHT);
    }
  }
  for (const label of fixed) ingest(gun, `number ${id++}`, boxAround(label), OBSTACLE_WEIGHT);
}

function boxAround({ parts }: MeasuredLabel): Box {
  return { x0: Math.min(...parts.map((p) => p.box.x0)), y0: Math.min(...parts.map((p) => p.box.y0)), x1: Math.max(...parts.map((p) => p.box.x1)), y1: Math.max(...parts.map((p) => p.box.y1)) };
}

/** How many of a drawing's freely placed labels the peer shows: those meet nothing. Numbers on their lines are obstacles to it as to us. */
export function greedyClean(drawing: Pick<Drawing, "items">, corners: 1 | 4): number {
  const labels = labelsOf(drawing.items);
  leadersTo(labels, drawing.items);
  const fixed = labels.filter((label) => label.layer === "dimension-text");
  const wanted = labels.filter((label) => label.layer !== "dimension-text");
  const placed: Box[] = [];
  let waiting = wanted;
  for (const [sx, sy] of CORNERS.slice(0, corners)) {
    const gun = new LabelGun(() => undefined, () => undefined);
    obstacles(gun, drawing, fixed);
    placed.forEach((box, i) => ingest(gun, `placed ${i}`, box, OBSTACLE_WEIGHT));
    const boxes = waiting.map((label): Box => {
      const own = boxAround(label);
      const [w, h] = [own.x1 - own.x0, own.y1 - own.y0];
      const [x, y] = label.leader?.a ?? [(own.x0 + own.x1) / 2, own.y1];
      const [x0, y0] = [sx > 0 ? x + OFF_MM : x - OFF_MM - w, sy > 0 ? y + OFF_MM : y - OFF_MM - h];
      return { x0, y0, x1: x0 + w, y1: y0 + h };
    });
    boxes.forEach((box, i) => ingest(gun, `label ${i}`, box, waiting.length - i));
    gun.update(false);
    const shown = new Set(gun.getShown().map(({ id }) => id));
    boxes.forEach((box, i) => {
      if (shown.has(`label ${i}`)) placed.push(box);
    });
    waiting = waiting.filter((_, i) => !shown.has(`label ${i}`));
  }
  return placed.length;
}
