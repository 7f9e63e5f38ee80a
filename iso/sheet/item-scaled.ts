/** Display items made smaller or larger about the origin; line widths and letters go with them, dashes too. */
import type { DisplayItem } from "../draw/drawing-types";
import type { PaperPoint } from "../geometry/types";

/** Lines of a picture made small stay this wide, so that they print. */
const THINNEST = 0.18;

export function itemScaled(item: DisplayItem, factor: number): DisplayItem {
  const scale = (p: PaperPoint): PaperPoint => [p[0] * factor, p[1] * factor];
  const dash = (given: readonly number[] | undefined) => (given ? { dash: given.map((d) => d * factor) } : {});
  if (item.type === "text") return { ...item, at: scale(item.at), capMm: item.capMm * factor };
  const widthMm = Math.max(THINNEST, item.widthMm * factor);
  if (item.type === "line") return { ...item, from: scale(item.from), to: scale(item.to), widthMm, ...dash(item.dash) };
  return {
    ...item, widthMm, ...dash(item.dash),
    segments: item.segments.map((s) => (s.op === "Z" ? s : s.op === "C" ? { op: "C", c1: scale(s.c1), c2: scale(s.c2), to: scale(s.to) } : { op: s.op, to: scale(s.to) })),
  };
}
