/** The north arrow with PLANT N, east and up; flow arrows on the pipe. */
import type { PaperBox, PaperPoint } from "../geometry/types";
import type { DisplayItem, MeasureText } from "./drawing-types";
import { edgePoint, type PassInk } from "./drawn";
import type { InkMap } from "./ink-map";
import type { LabelField } from "./label-field";
import { centredText, lineItem, pathItem, polygonSegments } from "./paths";
import { hiddenCuts, type Stretch } from "./pipe";
import type { Segment, TurnedBox } from "./plane";
import type { Projection } from "./project";
import * as size from "./sizes";

const HALF_WIDTH = 15;
const HALF_HEIGHT = 13.5;

export interface NorthInk {
  readonly items: readonly DisplayItem[];
  readonly box: TurnedBox;
}

/** Puts the arrow in the emptiest corner of the room. */
export function northPass(projection: Projection, room: PaperBox, heavy: InkMap, light: InkMap, field: LabelField, measure: MeasureText): NorthInk {
  const corners: PaperPoint[] = [
    [room.minX + HALF_WIDTH, room.minY + HALF_HEIGHT], [room.maxX - HALF_WIDTH, room.minY + HALF_HEIGHT],
    [room.minX + HALF_WIDTH, room.maxY - HALF_HEIGHT], [room.maxX - HALF_WIDTH, room.maxY - HALF_HEIGHT],
  ];
  let best: PaperPoint | null = null;
  let bestCost = Infinity;
  corners.forEach((at, i) => {
    const box: TurnedBox = { centre: at, halfWidth: HALF_WIDTH, halfHeight: HALF_HEIGHT, angle: 0 };
    if (field.overlapping(box)) return;
    const cost = i + heavy.inBox(at[0] - HALF_WIDTH, at[1] - HALF_HEIGHT, at[0] + HALF_WIDTH, at[1] + HALF_HEIGHT) * 2 + light.inBox(at[0] - HALF_WIDTH, at[1] - HALF_HEIGHT, at[0] + HALF_WIDTH, at[1] + HALF_HEIGHT);
    if (cost < bestCost) [best, bestCost] = [at, cost];
  });
  // Every corner taken: stand outside the room, above it, which the bounds then report.
  const centre: PaperPoint = best ?? clearAbove(room, field);
  const box: TurnedBox = { centre, halfWidth: HALF_WIDTH, halfHeight: HALF_HEIGHT, angle: 0 };
  field.add(box);
  return { items: northItems(projection, [centre[0], centre[1] - 2.5], measure), box };
}

function clearAbove(room: PaperBox, field: LabelField): PaperPoint {
  for (let y = room.minY - HALF_HEIGHT - 2; ; y -= 10) {
    const centre: PaperPoint = [room.minX + HALF_WIDTH, y];
    if (!field.overlapping({ centre, halfWidth: HALF_WIDTH, halfHeight: HALF_HEIGHT, angle: 0 })) return centre;
  }
}

function northItems(projection: Projection, at: PaperPoint, measure: MeasureText): readonly DisplayItem[] {
  const [east, north, up] = projection.axes;
  const out = (d: PaperPoint, k: number): PaperPoint => [at[0] + d[0] * k, at[1] + d[1] * k];
  const tip = out(north, 9);
  const side: PaperPoint = [-north[1], north[0]];
  const back = out(north, 4.6);
  const head: PaperPoint[] = [tip, [back[0] + side[0] * 1.5, back[1] + side[1] * 1.5], [back[0] - side[0] * 1.5, back[1] - side[1] * 1.5]];
  const width = measure("PLANT N", size.TEXT_CAP, "bold");
  return [
    lineItem("north", null, out(north, -7), out(north, 4.6), 0.5),
    pathItem("north", null, polygonSegments(head), { fill: "ink" }),
    lineItem("north", null, at, out(east, 6), 0.25), lineItem("north", null, at, out(up, 6.5), 0.25),
    centredText("north", null, out(north, 11.6), "N", { capMm: 3.5, face: "bold" }),
    centredText("north", null, out(east, 8.4), "E", { capMm: size.TEXT_CAP }),
    centredText("north", null, [at[0], at[1] - 8.6], "UP", { capMm: size.TEXT_CAP }),
    centredText("north", null, [at[0] + Math.min(0, HALF_WIDTH - width / 2), at[1] + HALF_HEIGHT - 0.6], "PLANT N", { capMm: size.TEXT_CAP, face: "bold" }),
  ];
}

const ARROW = 4.4;
const ARROW_HALF_WIDTH = 1.35;
/** A stretch shorter than this has no room for a flow arrow between its weld dots. */
const LEAST_STRETCH = ARROW + 4.6;

/** Flow arrows near both ends of every run and now and then between, clear of crossings. */
export function flowPass(stretches: readonly Stretch[]): PassInk {
  const cuts = hiddenCuts(stretches);
  const items: DisplayItem[] = [];
  const heavy: Segment[] = [];
  const byRun = new Map<string, number[]>();
  stretches.forEach((stretch, i) => {
    if (stretch.neighbour || stretch.to - stretch.from < LEAST_STRETCH) return;
    const runId = stretch.drawn.edge.leg.runId;
    byRun.set(runId, [...(byRun.get(runId) ?? []), i]);
  });
  for (const indices of byRun.values()) {
    const last = indices.length - 1;
    indices.forEach((index, k) => {
      if (k !== 0 && k !== last && k % 5 !== 0) return;
      const stretch = stretches[index];
      const at = stretch ? arrowPlace(stretch, cuts[index] ?? []) : null;
      if (stretch && at !== null) {
        const [tip, left, right] = arrowCorners(stretch, at);
        items.push(pathItem("flow", { kind: "leg", id: stretch.drawn.edge.id }, polygonSegments([tip, left, right]), { fill: "ink" }));
        heavy.push({ from: tip, to: left }, { from: left, to: right }, { from: right, to: tip });
      }
    });
  }
  return { items, heavy, light: [] };
}

function arrowPlace(stretch: Stretch, cuts: readonly (readonly [number, number])[]): number | null {
  const length = stretch.to - stretch.from;
  for (const share of [0.5, 0.4, 0.6, 0.3, 0.7]) {
    const at = length * share;
    if (at < LEAST_STRETCH / 2 || at > length - LEAST_STRETCH / 2) continue;
    if (cuts.every(([a, b]) => at + ARROW / 2 + 1 < a || at - ARROW / 2 - 1 > b)) return stretch.from + at;
  }
  return null;
}

function arrowCorners(stretch: Stretch, at: number): readonly [PaperPoint, PaperPoint, PaperPoint] {
  const { direction } = stretch.drawn;
  const tip = edgePoint(stretch.drawn, at + ARROW / 2);
  const back = edgePoint(stretch.drawn, at - ARROW / 2);
  const side: PaperPoint = [-direction[1] * ARROW_HALF_WIDTH, direction[0] * ARROW_HALF_WIDTH];
  return [tip, [back[0] + side[0], back[1] + side[1]], [back[0] - side[0], back[1] - side[1]]];
}
