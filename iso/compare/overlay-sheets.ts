/**
 * The overlay on paper: the whole spool where one sheet can hold it, else sheets of what lies round the differences, in
 * the order of flow, so that no difference is left out and nothing is drawn under its least size.
 */
import type { Model } from "../run/model-types";
import { sketchOf, type Sketch, type SheetShare } from "../draw/sketch";
import type { CompareRow } from "./compare-types";
import { drawOverlay, type OverlayDrawing, type OverlayOptions } from "./overlay";

export interface OverlaySheet {
  readonly drawing: OverlayDrawing;
  /** True when only what lies round some differences is drawn. */
  readonly part: boolean;
}

/** Paper a drawing may stand out of its room before it counts as too large, mm. */
const SLACK = 0.5;
/** Legs drawn beyond a difference, most first. */
const REACHES: readonly number[] = [3, 1];

export function overlaySheets(before: Model, after: Model, rows: readonly CompareRow[], options: OverlayOptions): readonly OverlaySheet[] {
  const whole = drawOverlay(before, after, rows, options);
  if (fits(whole)) return [{ drawing: whole, part: false }];
  const [then, now] = [sketchOf(before, options.spools[0]), sketchOf(after, options.spools[1])];
  const order = [...new Set([...now.vertices.keys(), ...then.vertices.keys()])];
  const touched = new Set(rows.flatMap((row) => [...pointsOf(row, then), ...pointsOf(row, now)]));
  const points = order.filter((id) => touched.has(id));
  return points.length === 0 ? [] : chunks(points).map((drawing) => ({ drawing, part: true }));

  function chunks(ids: readonly string[]): readonly OverlayDrawing[] {
    for (const reach of REACHES) {
      const drawing = around(ids, reach);
      if (fits(drawing) || (ids.length === 1 && reach === REACHES.at(-1))) return [drawing];
    }
    const half = Math.ceil(ids.length / 2);
    return [...chunks(ids.slice(0, half)), ...chunks(ids.slice(half))];
  }

  function around(ids: readonly string[], reach: number): OverlayDrawing {
    const near = neighbourhood(ids, reach, [then, now]);
    const shown = new Set(ids);
    const own = rows.filter((row) => [...pointsOf(row, then), ...pointsOf(row, now)].some((id) => shown.has(id)));
    return drawOverlay(before, after, own, options, [shareOf(then, near), shareOf(now, near)]);
  }
}

const fits = ({ bounds, widthMm, heightMm }: OverlayDrawing): boolean =>
  bounds.minX >= -SLACK && bounds.minY >= -SLACK && bounds.maxX <= widthMm + SLACK && bounds.maxY <= heightMm + SLACK;

/** Points of a sketch that a row speaks of. */
function pointsOf({ at }: CompareRow, sketch: Sketch): readonly string[] {
  if (at === null) return [];
  const id = at.kind === "joint" ? sketch.joints.find((joint) => joint.key === at.id)?.pointId : at.id;
  const vertex = id === undefined ? null : sketch.vertexOf(id);
  return vertex !== null && sketch.vertices.has(vertex) ? [vertex] : [];
}

function neighbourhood(ids: readonly string[], reach: number, sketches: readonly Sketch[]): ReadonlySet<string> {
  const near = new Set(ids);
  let edge = [...ids];
  for (let step = 0; step < reach; step++) {
    edge = edge.flatMap((id) => sketches.flatMap((sketch) => (sketch.edgesAt.get(id) ?? []).filter((one) => one.stub === null).map((one) => (one.from === id ? one.to : one.from)))).filter((id) => !near.has(id));
    for (const id of edge) near.add(id);
  }
  return near;
}

function shareOf(sketch: Sketch, points: ReadonlySet<string>): SheetShare {
  return { points, legs: new Set(sketch.edges.filter((edge) => points.has(edge.from) && points.has(edge.to)).map((edge) => edge.id)) };
}
