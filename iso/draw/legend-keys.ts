/** Which marks the legend has to explain: only those that are on the paper. */
import type { DisplayItem, DrawOptions, LegendKey } from "./drawing-types";
import type { Sketch } from "./sketch";

const BRACKETED = /^\(\d.*\)$/;

/** @param items what is drawn: a bracketed dimension is explained only where one stands */
export function legendOf(sketch: Sketch, options: DrawOptions, items: readonly DisplayItem[]): readonly LegendKey[] {
  const { show } = options;
  const welds = sketch.joints.filter((joint) => joint.kind !== "bolted" && joint.kind !== "attachment");
  const places = new Set(welds.map((joint) => joint.place));
  const keys: readonly (readonly [LegendKey, boolean])[] = [
    ["shop-weld", places.has("shop")], ["field-weld", places.has("field")], ["field-fit-weld", places.has("field-fit")],
    ["material-item", show.items && sketch.components.length > 0], ["weld-number", show.welds && welds.length > 0],
    ["cut-piece", show.pieces && sketch.pieces.length > 0], ["spool", sketch.spool !== null && sketch.model.spools.length > 1],
    ["flow", sketch.edges.length > 0], ["support", sketch.components.some((component) => component.kind === "support")],
    ["revision", Boolean(options.changed && options.changed.pointIds.length > 0)],
    ["reference-dimension", items.some((item) => item.type === "text" && BRACKETED.test(item.text))], ["unverified", sketch.edges.some((edge) => edge.leg.unverified)],
  ];
  return keys.filter(([, used]) => used).map(([key]) => key);
}
