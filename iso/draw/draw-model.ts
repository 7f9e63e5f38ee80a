/** The drawing on one sheet: where the passes stand, made to fit its room. Pure: equal input gives equal items. */
import type { PaperBox } from "../geometry/types";
import type { View } from "../run/document";
import type { Model } from "../run/model-types";
import { drawLabels, drawLines, ONE_SHEET, type SheetPlace } from "./draw-passes";
import type { Drawing, DrawOptions } from "./drawing-types";
import { fitStretch, type PipeRoom } from "./fit";
import { bestView } from "./orient";
import { NO_ROWS, placeAll, placePlan, type ExtraRows, type Placed, type PlacePlan } from "./place";
import { paperBoxAround } from "./plane";
import { PROJECTIONS } from "./project";
import { separateRows } from "./separate";
import { sketchOf } from "./sketch";

/** Turns of moving pipes apart and fitting what came of it. */
const SEPARATIONS = 4;
/** Tries to make everything fit by drawing the legs shorter. */
const FIT_TRIES = 5;
/** Times the labels are placed afresh because they stood out of the room, and the least the pipe then gives up, mm. */
const LABEL_TRIES = 3;
const LEAST_STEP = 6;
/** A stretch under this is not worth another try: the legs stand at their least room. */
const STRETCH_LEAST = 0.15;
/** Paper kept beyond the pipe at the first try, and beyond dimensions for the labels, mm. */
const FIRST_MARGIN = 25;
const LEAST_MARGIN = 13;
const LABEL_MARGIN = 7;
/** Dimensions may take this much of the labels' margin before the legs are drawn shorter for it: another try costs more than it gives. */
const LABEL_SLACK = 6;

/**
 * Draws a model inside its room, on one sheet whatever it holds (drawSheets takes as many as it needs). Labels never overlap
 * each other; what cannot fit at the least sizes goes beyond the room, which `bounds` tells.
 */
export function drawModel(model: Model, options: DrawOptions): Drawing {
  const plan = placePlan(sketchOf(model, options.spool), options.measure);
  return drawPlan(plan, viewOf(model, options, options.spool === null ? plan : null), options, ONE_SHEET);
}

/** @param plan that of the whole line when it is at hand: one view serves every spool and sheet of a line */
export function viewOf(model: Model, options: DrawOptions, plan: PlacePlan | null): View {
  return options.view ?? model.document.view ?? bestView(plan ?? placePlan(sketchOf(model, null), options.measure));
}

/** How far legs are stretched, and the rows that hold pipes apart. */
export interface Standing {
  readonly stretch: number;
  readonly rows: ExtraRows;
}

/**
 * Draws a plan on the sheet of a set that `place` names.
 * @param standing when it is at hand
 */
export function drawPlan(plan: PlacePlan, view: View, options: DrawOptions, place: SheetPlace, standing: Standing = standingOf(plan, view, options)): Drawing {
  const projection = PROJECTIONS[view];
  let room = roomWithin(options, FIRST_MARGIN);
  let stretch = standing.stretch;
  let best: Drawing | null = null;
  let labelled = 0;
  for (let attempt = 0; ; attempt++) {
    const at = placeAll(plan, projection, stretch, standing.rows);
    const lines = drawLines(at, options, place);
    const over = beyond(lines.extent, roomWithin(options, LABEL_MARGIN));
    const last = stretch === 0 || attempt === FIT_TRIES - 1;
    if (last || Math.max(over.widthMm, over.heightMm) <= LABEL_SLACK) {
      const next = drawLabels(lines, options, view);
      if (!best || overrun(next) < overrun(best)) best = next;
      labelled++;
      if (last || labelled >= LABEL_TRIES || overrun(next) <= 0) return best;
      const out = Math.max(LEAST_STEP, overrun(next));
      room = { widthMm: room.widthMm - out, heightMm: room.heightMm - out };
    } else {
      const pipe = boxOf(at);
      room = { widthMm: tighter(room.widthMm, pipe.widthMm, over.widthMm), heightMm: tighter(room.heightMm, pipe.heightMm, over.heightMm) };
    }
    const fitted = fitStretch(plan, projection, room, standing.rows) ?? 0;
    stretch = fitted < STRETCH_LEAST ? 0 : fitted;
  }
}

/** True when the pipe and its dimensions, at their least sizes, stand inside the sheet. */
export function linesFit(plan: PlacePlan, view: View, options: DrawOptions, { stretch, rows }: Standing): boolean {
  if (stretch > 0) return true;
  const projection = PROJECTIONS[view];
  if (fitStretch(plan, projection, roomWithin(options, LEAST_MARGIN), rows) === null) return false;
  const over = beyond(drawLines(placeAll(plan, projection, 0, rows), options, ONE_SHEET).extent, roomWithin(options, 0));
  return over.widthMm <= 0 && over.heightMm <= 0;
}

/** In turns: room taken by moving pipes apart shortens the legs, which can bring others close. */
export function standingOf(plan: PlacePlan, view: View, options: DrawOptions): Standing {
  const projection = PROJECTIONS[view];
  const room = roomWithin(options, FIRST_MARGIN);
  const fitted = (rows: ExtraRows): number => {
    const stretch = fitStretch(plan, projection, room, rows) ?? 0;
    return stretch < STRETCH_LEAST ? 0 : stretch;
  };
  let rows = NO_ROWS;
  let stretch = fitted(rows);
  for (let pass = 0; pass < SEPARATIONS; pass++) {
    const moved = separateRows(plan, projection, stretch, rows);
    if (moved === rows) break;
    rows = moved;
    const before = stretch;
    stretch = fitted(rows);
    if (stretch === before) break;
  }
  return { stretch, rows };
}

function roomWithin(options: DrawOptions, margin: number): PipeRoom {
  return { widthMm: options.widthMm - 2 * margin, heightMm: options.heightMm - 2 * margin };
}

/** How much wider and higher a box is than a room. */
function beyond(box: PaperBox, room: PipeRoom): PipeRoom {
  if (!Number.isFinite(box.minX)) return { widthMm: 0, heightMm: 0 };
  return { widthMm: box.maxX - box.minX - room.widthMm, heightMm: box.maxY - box.minY - room.heightMm };
}

function boxOf(at: Placed): PipeRoom {
  const box = paperBoxAround([...at.paper.values()]);
  return { widthMm: box.maxX - box.minX, heightMm: box.maxY - box.minY };
}

/** Dimensions stand off the pipe by the same however long it is drawn: what they stick out, the pipe gives up. */
function tighter(roomMm: number, pipeMm: number, overMm: number): number {
  return overMm <= 0 ? roomMm : Math.min(roomMm, pipeMm) - overMm - 1;
}

/** How far a drawing stands out of its room, mm; 0 when it is inside. */
export function overrun(drawing: Drawing): number {
  const { bounds } = drawing;
  return Math.max(0, -bounds.minX, -bounds.minY, bounds.maxX - drawing.widthMm, bounds.maxY - drawing.heightMm);
}
