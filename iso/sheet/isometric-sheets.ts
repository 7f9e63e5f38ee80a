/** The isometric on one page or on several, each with its legend in a strip under it. */
import type { DisplayItem, Drawing, LegendKey, MeasureText } from "../draw/drawing-types";
import { endKeys, inLegendOrder, jointKeys, partKeys } from "../draw/legend-keys";
import { itemMoved } from "../draw/paths";
import type { PaperBox, PaperPoint } from "../geometry/types";
import { lineFrom, textAt } from "./items";
import { legendItems, legendLayout } from "./legend";
import type { SheetFacts } from "./sheet-facts";
import { EDGE_LINE } from "./sheet-size";

export interface DrawRoomSize {
  readonly widthMm: number;
  readonly heightMm: number;
}

/** Draws the spool on as many sheets as it needs: the first in one room, the others in another, mm. */
export type DrawRoom = (first: DrawRoomSize, later: DrawRoomSize) => readonly Drawing[];

/** Between the frame and the drawing's room, mm. */
const INSET = 3;

/**
 * Items of each sheet, at least one.
 * @param first box on the first page; @param later box on those after it
 */
export function isometricSheets(facts: SheetFacts, first: PaperBox, later: PaperBox, draw: DrawRoom, measure: MeasureText): readonly (readonly DisplayItem[])[] {
  if (facts.spool === null) {
    const middle: PaperPoint = [(first.minX + first.maxX) / 2, (first.minY + first.maxY) / 2];
    return [[textAt(middle, `No spool ${facts.input.spool} in this line yet.`, { layer: "label", anchor: "middle", capMm: 3.5 })]];
  }
  const strip = (keys: readonly LegendKey[], box: PaperBox): number => legendLayout(keys, box.maxX - box.minX, measure).heightMm;
  const drawFor = (keys: readonly LegendKey[]): readonly Drawing[] => draw(roomOf(first, strip(keys, first)), roomOf(later, strip(keys, later)));
  const expected = likelyLegend(facts);
  let drawings = drawFor(expected);
  const outgrown = drawings.find(({ legend }, i) => strip(legend, i === 0 ? first : later) > strip(expected, i === 0 ? first : later));
  if (outgrown) drawings = drawFor(outgrown.legend);
  return drawings.map((drawing, i) => sheetItems(drawing, i === 0 ? first : later, measure));
}

function roomOf(box: PaperBox, stripMm: number): DrawRoomSize {
  return { widthMm: box.maxX - box.minX - 2 * INSET, heightMm: box.maxY - box.minY - stripMm - 2 * INSET };
}

function sheetItems(drawing: Drawing, box: PaperBox, measure: MeasureText): readonly DisplayItem[] {
  const legend = { ...box, minY: box.maxY - legendLayout(drawing.legend, box.maxX - box.minX, measure).heightMm };
  return [
    ...drawing.items.map((item) => itemMoved(item, [box.minX + INSET, box.minY + INSET])),
    lineFrom([legend.minX, legend.minY], [legend.maxX, legend.minY], EDGE_LINE, "title"),
    ...legendItems(drawing.legend, legend, measure),
  ];
}

/** The most a drawing's legend can need, known before drawing. */
export function likelyLegend(facts: SheetFacts): readonly LegendKey[] {
  const points = new Map(facts.model.document.runs.flatMap((run) => run.points.map((point) => [point.id, point.item] as const)));
  const marks: (LegendKey | false)[] = [
    "material-item", "weld-number", "cut-piece", facts.model.spools.length > 1 && "spool", "flow",
    facts.input.revision.changedPointIds.length > 0 && "revision", "reference-dimension", facts.legs.some((leg) => leg.unverified) && "unverified",
  ];
  const here = facts.components.flatMap((component) => points.get(component.pointId) ?? []);
  return inLegendOrder(new Set([
    ...marks.filter((key) => key !== false), ...jointKeys(facts.welds), ...partKeys(facts.components, (id) => points.get(id) ?? null), ...endKeys(here),
  ]));
}
