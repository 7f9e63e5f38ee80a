/** The drawing on one sheet: where the passes stand, made to fit its room. Pure: equal input gives equal items. */
import type { PaperBox } from "../geometry/types";
import type { View } from "../run/document";
import type { Model } from "../run/model-types";
import { drawLabels, drawLines, ONE_SHEET, type SheetPlace } from "./draw-passes";
import type { Drawing, DrawOptions } from "./drawing-types";
import { fitStretch } from "./fit";
import { bestView } from "./orient";
import { placeAll, placePlan, type PlacePlan } from "./place";
import { PROJECTIONS } from "./project";
import { NO_ROWS, separateRows, type ExtraRows } from "./separate";
import { sketchOf } from "./sketch";

/** Tries to make everything fit by drawing the legs shorter. */
const FIT_TRIES = 5;
/** Times the labels are placed afresh because they stood out of the room. */
const LABEL_TRIES = 3;
/** A stretch under this is not worth another try: the legs stand at their least room. */
const STRETCH_LEAST = 0.15;
/** Paper kept beyond the pipe at the first try, and beyond dimensions for the labels, mm. */
const FIRST_MARGIN = 20;
const LABEL_MARGIN = 7;

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

/** Draws a plan on the sheet of a set that `place` names. */
export function drawPlan(plan: PlacePlan, view: View, options: DrawOptions, place: SheetPlace): Drawing {
  const projection = PROJECTIONS[view];
  let margin = FIRST_MARGIN;
  const fitted = (rows: ExtraRows): number => fitStretch(plan, projection, options.widthMm - 2 * margin, options.heightMm - 2 * margin, rows);
  let rows = NO_ROWS;
  let first = fitted(rows);
  // Twice: room taken by moving pipes apart shortens the legs, which can bring others close.
  for (let pass = 0; pass < 2; pass++) {
    const moved = separateRows(plan, projection, first, rows);
    if (moved === rows) break;
    rows = moved;
    first = fitted(rows);
  }
  let best: Drawing | null = null;
  let labelled = 0;
  for (let attempt = 0; attempt < FIT_TRIES; attempt++) {
    const wished = attempt === 0 ? first : fitted(rows);
    const stretch = wished < STRETCH_LEAST ? 0 : wished;
    const lines = drawLines(placeAll(plan, projection, stretch, rows), options, place);
    const over = boxOverrun(lines.extent, options.widthMm - 2 * LABEL_MARGIN, options.heightMm - 2 * LABEL_MARGIN);
    const last = stretch === 0 || attempt === FIT_TRIES - 1;
    if (over > 0 && !last) {
      margin += over / 2 + 1;
      continue;
    }
    const next = drawLabels(lines, options, view);
    if (!best || overrun(next) < overrun(best)) best = next;
    labelled++;
    if (stretch === 0 || labelled >= LABEL_TRIES || overrun(next) <= 0) break;
    margin += Math.max(3, overrun(next) / 2);
  }
  return best ?? drawLabels(drawLines(placeAll(plan, projection, 0, rows), options, place), options, view);
}

function boxOverrun(box: PaperBox, widthMm: number, heightMm: number): number {
  return Number.isFinite(box.minX) ? Math.max(0, box.maxX - box.minX - widthMm, box.maxY - box.minY - heightMm) : 0;
}

/** How far a drawing stands out of its room, mm; 0 when it is inside. */
export function overrun(drawing: Drawing): number {
  const { bounds } = drawing;
  return Math.max(0, -bounds.minX, -bounds.minY, bounds.maxX - drawing.widthMm, bounds.maxY - drawing.heightMm);
}
