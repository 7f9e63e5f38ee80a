/** The window over the drawing: a box in paper millimetres, moved and scaled. Pure. */
import type { PaperBox, PaperPoint } from "@/iso";

export interface Viewport {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}

/** White left around a fitted drawing, mm. */
const MARGIN_MM = 4;
/** Closest and widest look, as the window's width in mm. */
const NARROWEST_MM = 20;
const WIDEST_MM = 3_000;

/** The window that shows a whole drawing. */
export function fitViewport(bounds: PaperBox): Viewport {
  const width = Math.max(NARROWEST_MM, bounds.maxX - bounds.minX + 2 * MARGIN_MM);
  const height = Math.max(NARROWEST_MM, bounds.maxY - bounds.minY + 2 * MARGIN_MM);
  return { x: (bounds.minX + bounds.maxX - width) / 2, y: (bounds.minY + bounds.maxY - height) / 2, width, height };
}

/** Scales the window about a point that stays where it is on screen; factor under 1 looks closer. */
export function zoomViewport(view: Viewport, about: PaperPoint, factor: number): Viewport {
  const width = Math.min(WIDEST_MM, Math.max(NARROWEST_MM, view.width * factor));
  const k = width / view.width;
  return { x: about[0] - (about[0] - view.x) * k, y: about[1] - (about[1] - view.y) * k, width, height: view.height * k };
}

/** Moves the window by a part of its own size. */
export function panViewport(view: Viewport, partX: number, partY: number): Viewport {
  return { ...view, x: view.x + partX * view.width, y: view.y + partY * view.height };
}

export function viewportCentre(view: Viewport): PaperPoint {
  return [view.x + view.width / 2, view.y + view.height / 2];
}
