/** One drawing of a line for the screen; called in the drawing worker, or on the page where there is none. */
import { drawModel, type Drawing, type Model, type View } from "@/iso";
import { measureText } from "@/fonts/widths";

export interface DrawingRoom {
  readonly widthMm: number;
  readonly heightMm: number;
}

export interface DrawRequest {
  readonly id: number;
  readonly model: Model;
  readonly room: DrawingRoom;
  readonly view: View | null;
}

export interface DrawAnswer {
  readonly id: number;
  /** null when the line cannot be drawn yet. */
  readonly drawing: Drawing | null;
}

const SHOW_ALL = { items: true, welds: true, pieces: true, dimensions: true };

/** The drawing, or null when there is nothing to draw or the core cannot draw it: never a broken page. */
export function drawLine(model: Model, room: DrawingRoom, view: View | null): Drawing | null {
  if (model.legs.length === 0) return null;
  try {
    return drawModel(model, { ...room, measure: measureText, view, spool: null, show: SHOW_ALL });
  } catch (error) {
    console.error("The drawing failed", error);
    return null;
  }
}
