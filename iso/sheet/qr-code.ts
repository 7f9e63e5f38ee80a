/** A QR code as filled paths: dark modules of a row merged, so that painters leave no hairlines between them. */
import { create } from "qrcode";
import type { DisplayItem, PathSegment } from "../draw/drawing-types";
import type { PaperBox } from "../geometry/types";
import { boxOutline, pathOf } from "./items";

/** Light modules a reader needs on every side (ISO/IEC 18004, from memory). */
const QUIET_MODULES = 4;

/** The code for a text, filling a square box with its quiet zone inside. Text must not be empty. */
export function qrItems(text: string, box: PaperBox): DisplayItem[] {
  const { modules } = create(text, { errorCorrectionLevel: "M" });
  const module = (box.maxX - box.minX) / (modules.size + 2 * QUIET_MODULES);
  const left = box.minX + QUIET_MODULES * module;
  const top = box.minY + QUIET_MODULES * module;
  const segments: PathSegment[] = [];
  for (let row = 0; row < modules.size; row += 1) {
    for (const [start, end] of darkRuns(modules.data, modules.size, row)) {
      segments.push(...rectangle(left + start * module, top + row * module, left + end * module, top + (row + 1) * module));
    }
  }
  return [
    boxOutline(box, { layer: "qr", stroke: null, fill: "paper" }),
    pathOf(segments, { layer: "qr", stroke: null, fill: "ink" }),
  ];
}

/** Columns [from, to) of consecutive dark modules in a row. */
function darkRuns(data: Uint8Array, size: number, row: number): [number, number][] {
  const runs: [number, number][] = [];
  for (let column = 0; column < size; column += 1) {
    if (!data[row * size + column]) continue;
    const last = runs.at(-1);
    if (last && last[1] === column) last[1] = column + 1;
    else runs.push([column, column + 1]);
  }
  return runs;
}

function rectangle(minX: number, minY: number, maxX: number, maxY: number): PathSegment[] {
  return [
    { op: "M", to: [minX, minY] }, { op: "L", to: [maxX, minY] }, { op: "L", to: [maxX, maxY] }, { op: "L", to: [minX, maxY] }, { op: "Z" },
  ];
}
