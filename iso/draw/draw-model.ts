/** The drawing, as a readable list of passes. Pure: equal input gives equal items. */
import type { PaperBox, PaperPoint } from "../geometry/types";
import type { View } from "../run/document";
import type { Model } from "../run/model-types";
import { componentMarks, pieceMarks, revisionMarks, weldMarks } from "./collect-marks";
import { dimensionPass, NO_DIMENSIONS, type DimensionInk } from "./dimensions";
import { drawnEdges, drawnJoints, type DrawnEdge, type DrawnJoint } from "./drawn";
import type { DisplayItem, Drawing, DrawOptions, Layer, Ref } from "./drawing-types";
import { endLabels } from "./end-texts";
import { placeLineText } from "./fixed-text";
import { fitStretch, roomAround } from "./fit";
import { inkMap, type InkMap } from "./ink-map";
import { inkBounds } from "./item-bounds";
import { LabelField } from "./label-field";
import { legendOf } from "./legend-keys";
import type { Label } from "./label-candidates";
import { placeLabels } from "./labels";
import { blockLabel } from "./mark-labels";
import { flowPass, northPass } from "./north";
import { offsetPass, type OffsetInk } from "./offset-box";
import { bestView } from "./orient";
import { itemMoved, pathItem, polygonSegments } from "./paths";
import { pipePass, pipeStretches } from "./pipe";
import { placeAll, placePlan, type Placed } from "./place";
import { boxCorners, paperBoxAround, segmentInBox, type Segment, type TurnedBox } from "./plane";
import { PROJECTIONS } from "./project";
import { NO_ROWS, separateRows, type ExtraRows } from "./separate";
import { sketchOf } from "./sketch";
import { slopePass } from "./slopes";
import { symbolPass } from "./symbols";
import { weldPass } from "./weld-marks";

/** Painted from back to front. */
const LAYERS: readonly Layer[] = ["hatch", "box", "dimension", "halo", "pipe", "symbol", "weld", "flow", "leader", "balloon", "dimension-text", "label", "north"];
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
 * Draws a model inside its room. Labels never overlap each other; what cannot fit at the least sizes goes beyond the room,
 * which `bounds` tells.
 */
export function drawModel(model: Model, options: DrawOptions): Drawing {
  const sketch = sketchOf(model, options.spool);
  const plan = placePlan(sketch, options.measure);
  const view: View = options.view ?? model.document.view ?? bestView(options.spool === null ? plan : placePlan(sketchOf(model, null), options.measure));
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
    const lines = drawLines(placeAll(plan, projection, stretch, rows), options);
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
  return best ?? drawLabels(drawLines(placeAll(plan, projection, 0, rows), options), options, view);
}

function boxOverrun(box: PaperBox, widthMm: number, heightMm: number): number {
  return Number.isFinite(box.minX) ? Math.max(0, box.maxX - box.minX - widthMm, box.maxY - box.minY - heightMm) : 0;
}

function overrun(drawing: Drawing): number {
  const { bounds } = drawing;
  return Math.max(0, -bounds.minX, -bounds.minY, bounds.maxX - drawing.widthMm, bounds.maxY - drawing.heightMm);
}

/** Everything but the labels: what stands where its geometry says. */
interface Lines {
  readonly placed: Placed;
  readonly drawn: readonly DrawnEdge[];
  readonly joints: readonly DrawnJoint[];
  readonly items: readonly DisplayItem[];
  readonly offsets: OffsetInk;
  readonly dimensions: DimensionInk;
  readonly homeless: readonly Homeless[];
  readonly heavy: readonly Segment[];
  readonly light: readonly Segment[];
  readonly heavyMap: InkMap;
  readonly field: LabelField;
  readonly fixed: readonly TurnedBox[];
  readonly extent: PaperBox;
}

function drawLines(placed: Placed, options: DrawOptions): Lines {
  const { measure } = options;
  const drawn = drawnEdges(placed);
  const joints = drawnJoints(placed, drawn);
  const stretches = pipeStretches(placed, drawn);
  const offsets = offsetPass(placed, drawn);
  const inks = [pipePass(placed, drawn, stretches), symbolPass(placed, drawn), weldPass(joints), flowPass(stretches)];
  const heavy = inks.flatMap((ink) => ink.heavy);
  const heavyMap = inkMap(heavy, 1.2);
  const boxMap = inkMap(offsets.light, 0.5);
  const field = new LabelField();
  const texts = offsets.texts.map((text) => placeLineText(text, field, heavyMap, boxMap, measure));
  const slopes = slopePass(placed, drawn, field, heavyMap, boxMap, measure);
  const around = paperBoxAround([...heavy, ...offsets.light].flatMap((s) => [s.from, s.to]));
  const centre: PaperPoint = [(around.minX + around.maxX) / 2 || 0, (around.minY + around.maxY) / 2 || 0];
  const dimensions = options.show.dimensions ? dimensionPass(placed, drawn, { heavy: heavyMap, light: boxMap, field, centre, extent: around }, measure) : NO_DIMENSIONS;
  const light = [...offsets.light, ...dimensions.light, ...slopes.light];
  const fixed = [...texts.flatMap((text) => text.box ?? []), ...slopes.boxes, ...dimensions.boxes];
  return {
    placed, drawn, joints, offsets, dimensions, heavy, light, heavyMap, field, fixed,
    items: [...inks.flatMap((ink) => ink.items), ...offsets.items, ...slopes.items, ...dimensions.items, ...texts.flatMap((text) => text.items), ...knockOuts([...texts.flatMap((text) => text.box ?? []), ...dimensions.boxes], light)],
    homeless: [
      ...texts.filter((text) => text.box === null).map(({ text }) => ({ ref: text.ref, text: text.text, line: text.line })),
      ...dimensions.homeless.map((text) => ({ ref: text.ref, text: text.text, line: { from: text.from, to: text.to } })),
    ],
    extent: paperBoxAround([...[...heavy, ...light].flatMap((s) => [s.from, s.to]), ...fixed.flatMap((box) => boxCorners(box))]),
  };
}

/** White under a number that thin lines run through; pipe is painted over it. */
function knockOuts(boxes: readonly TurnedBox[], light: readonly Segment[]): readonly DisplayItem[] {
  return boxes
    .filter((box) => light.some((line) => segmentInBox(line.from, line.to, box) > 0))
    .map((box) => pathItem("halo", null, polygonSegments(boxCorners({ ...box, halfWidth: box.halfWidth + 0.5, halfHeight: box.halfHeight + 0.45 })), { fill: "paper" }));
}

function drawLabels(lines: Lines, options: DrawOptions, view: View): Drawing {
  const { measure } = options;
  const { placed, drawn, joints, offsets, heavyMap, light } = lines;
  const lightMap = inkMap(light, 0.5);
  const room = roomAround(lines.extent, options.widthMm, options.heightMm);
  const north = northPass(placed.projection, room, heavyMap, lightMap, lines.field, measure);
  const welds = weldMarks(placed, joints, options);
  const components = componentMarks(placed, drawn, options);
  const pieces = pieceMarks(placed, drawn, options);
  const labels: Label[] = [
    ...endLabels(placed, drawn, measure),
    ...offsets.notes.map((note) => blockLabel(note.lines.map((text, i) => ({ text, bold: i === 0 })), { id: `offset ${note.id}`, anchors: note.anchors, clear: 0.5, along: [] }, { kind: "leg", id: note.id }, measure)),
    ...homelessLabels(lines.homeless, options), ...revisionMarks(placed, options), ...welds.labels, ...components.labels, ...pieces.labels,
  ];
  const marks = placeLabels(labels, [...lines.fixed, north.box], { heavy: heavyMap, light: lightMap, room });
  const shown: Ref[] = [
    ...welds.shown, ...components.shown, ...pieces.shown,
    ...[...lines.dimensions.shown, ...offsets.notes.map((note) => note.id)].map((id): Ref => ({ kind: "dimension", id })),
  ];
  return finished(layered([...lines.items, ...north.items, ...marks.items]), room, options, view, marks.report, shown, placed);
}

interface Homeless {
  readonly ref: Ref | null;
  readonly text: string;
  readonly line: Segment;
}

/** Numbers that found no free place on their line become led labels, so that none is lost and none overlaps. */
function homelessLabels(texts: readonly Homeless[], options: DrawOptions): readonly Label[] {
  return texts.map(({ ref, text, line }) =>
    blockLabel([{ text, bold: false }], { id: `number ${ref?.id ?? text}`, anchors: [[(line.from[0] + line.to[0]) / 2, (line.from[1] + line.to[1]) / 2]], clear: 0.4, along: [] }, ref, options.measure),
  );
}

function layered(items: readonly DisplayItem[]): readonly DisplayItem[] {
  return LAYERS.flatMap((layer) => items.filter((item) => item.layer === layer));
}

function finished(items: readonly DisplayItem[], room: PaperBox, options: DrawOptions, view: View, report: Drawing["report"], shown: readonly Ref[], placed: Placed): Drawing {
  const raw = inkBounds(items, options.measure);
  const by: PaperPoint = [
    -room.minX + spare(raw.minX - room.minX, room.maxX - raw.maxX),
    -room.minY + spare(raw.minY - room.minY, room.maxY - raw.maxY),
  ];
  const moved = items.map((item) => itemMoved(item, by));
  return {
    view, widthMm: options.widthMm, heightMm: options.heightMm, items: moved, bounds: inkBounds(moved, options.measure),
    legend: legendOf(placed.sketch, options, items), report, shown,
  };
}

/** Shift that brings what stands out on one side back in when the other side has room. */
function spare(before: number, after: number): number {
  if (before < 0 && after > 0) return Math.min(-before, after);
  return after < 0 && before > 0 ? -Math.min(-after, before) : 0;
}
