/** A line's model and drawing for the screen; made in workers, or on the page where there are none. */
import { buildModel, drawModel, type Drawing, type MarksRegister, type Model, type RunDocument, type TakeOutWord, type View } from "@/iso";
import { measureText } from "@/fonts/widths";

export interface DrawingRoom {
  readonly widthMm: number;
  readonly heightMm: number;
}

/** What a model follows from. */
export interface ModelRequest {
  readonly document: RunDocument;
  readonly marks: MarksRegister;
  readonly takeOuts: readonly TakeOutWord[];
}

export interface DrawRequest extends ModelRequest {
  readonly room: DrawingRoom;
  readonly view: View | null;
}

export function modelOf({ document, marks, takeOuts }: ModelRequest): Model {
  return buildModel(document, marks, takeOuts);
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
