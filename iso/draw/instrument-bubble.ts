/** The bubble of an instrument: a heavy circle, larger than an item's balloon, with letters over number. */
import type { PaperPoint } from "../geometry/types";
import type { DisplayItem, MeasureText, Ref } from "./drawing-types";
import type { Label } from "./label-candidates";
import type { MarkPlace } from "./mark-labels";
import { centredText, circleSegments, lineItem, pathItem } from "./paths";
import * as size from "./sizes";

const LEAST = 10.5;
const LINE = 0.5;
/** Distance of each of two rows from the middle. */
const ROW = 2;

/** "PI-101" as "PI" over "101"; a tag without letters or number stays whole. */
export function tagRows(tag: string): readonly string[] {
  const found = /^([A-Z]{1,4})[\s-]*(\d\w*)$/.exec(tag.trim().toUpperCase());
  return found ? [found[1] ?? "", found[2] ?? ""] : [tag.trim().toUpperCase()];
}

export function bubbleItems(tag: string, centre: PaperPoint, radius: number, ref: Ref | null, layer: "balloon" | "title"): DisplayItem[] {
  const rows = tagRows(tag);
  const texts = rows.map((row, i) => centredText(layer, ref, [centre[0], centre[1] + (rows.length === 1 ? 0 : (2 * i - 1) * ROW)], row, { capMm: size.TEXT_CAP, face: "bold" }));
  return [pathItem(layer, ref, circleSegments(centre, radius), { stroke: "ink", fill: "paper", widthMm: LINE }), ...texts];
}

export function bubbleLabel(tag: string, place: MarkPlace, ref: Ref, measure: MeasureText): Label {
  const radius = Math.max(LEAST, ...tagRows(tag).map((row) => measure(row, size.TEXT_CAP, "bold") + 3.6)) / 2;
  return {
    ...place, leaderFrom: 0, hubs: [{ offset: [0, 0], radius }], halfWidth: radius, halfHeight: radius,
    draw: (centre, leader) => [...(leader ? [lineItem("leader", ref, leader.from, leader.to, 0.35)] : []), ...bubbleItems(tag, centre, radius, ref, "balloon")],
  };
}
