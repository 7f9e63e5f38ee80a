/** The passes that ink one sheet: everything that stands where its geometry says, then the labels among it. */
import type { PaperBox, PaperPoint } from "../geometry/types";
import type { View } from "../run/document";
import { breakPass, type BreakInk } from "./break-flags";
import { componentMarks, pieceMarks, revisionMarks, weldMarks } from "./collect-marks";
import { numberItem } from "./dimension-lines";
import { dimensionPass, NO_DIMENSIONS, type DimensionInk } from "./dimensions";
import { drawnEdges, drawnJoints, type DrawnEdge, type DrawnJoint } from "./drawn";
import type { DisplayItem, Drawing, DrawOptions, Layer, Ref } from "./drawing-types";
import { endLabels } from "./end-texts";
import { placeLineText } from "./fixed-text";
import { roomAround } from "./fit";
import { inkMap, type InkMap } from "./ink-map";
import { inkBounds } from "./item-bounds";
import { LabelField } from "./label-field";
import { legendOf } from "./legend-keys";
import type { Label } from "./label-candidates";
import { placeLabels } from "./labels";
import { blockLabel } from "./mark-labels";
import { matchPass, type MatchInk } from "./match-marks";
import { flowPass, northPass } from "./north";
import { offsetPass, type OffsetInk } from "./offset-box";
import { itemMoved, pathItem, polygonSegments } from "./paths";
import { pipePass, pipeStretches } from "./pipe";
import type { Placed } from "./place";
import { boxAroundBoxes, boxAroundSegments, boxCorners, segmentInBox, type Segment, type TurnedBox } from "./plane";
import type { Match } from "./sheet-split";
import { cloudPass } from "./revision-cloud";
import { slopePass } from "./slopes";
import { spoolLabels } from "./spool-marks";
import { symbolPass } from "./symbols";
import { mitreJoints } from "./turns";
import { weldPass } from "./weld-marks";

/** Painted from back to front. */
const LAYERS: readonly Layer[] = ["hatch", "box", "dimension", "halo", "pipe", "symbol", "weld", "flow", "leader", "balloon", "dimension-text", "label", "north"];

/** Which of several sheets is being drawn, and where they meet. */
export interface SheetPlace {
  readonly sheet: number;
  readonly matches: readonly Match[];
}

export const ONE_SHEET: SheetPlace = { sheet: 1, matches: [] };

/** Everything but the labels: what stands where its geometry says. */
export interface Lines {
  readonly placed: Placed;
  readonly drawn: readonly DrawnEdge[];
  readonly joints: readonly DrawnJoint[];
  readonly items: readonly DisplayItem[];
  readonly offsets: OffsetInk;
  readonly dimensions: DimensionInk;
  readonly matches: MatchInk;
  readonly breaks: BreakInk;
  readonly homeless: readonly Homeless[];
  readonly heavy: readonly Segment[];
  readonly light: readonly Segment[];
  readonly heavyMap: InkMap;
  readonly field: LabelField;
  readonly fixed: readonly TurnedBox[];
  readonly extent: PaperBox;
}

export function drawLines(placed: Placed, options: DrawOptions, place: SheetPlace): Lines {
  const { measure } = options;
  const drawn = drawnEdges(placed);
  const joints = mitreJoints(placed, drawn, drawnJoints(placed, drawn));
  const stretches = pipeStretches(placed, drawn);
  const offsets = offsetPass(placed, drawn);
  const matches = matchPass(placed, drawn, joints, place.matches, place.sheet, measure);
  const breaks = breakPass(placed, drawn, measure);
  const cloud = cloudPass(placed, options);
  const inks = [pipePass(placed, drawn, stretches), symbolPass(placed, drawn), weldPass(joints), flowPass(stretches), matches, breaks, cloud];
  const heavy = inks.flatMap((ink) => ink.heavy);
  const heavyMap = inkMap(heavy, 1.2);
  const boxMap = inkMap(offsets.light, 0.5);
  const field = new LabelField();
  const texts = offsets.texts.map((text) => placeLineText(text, field, heavyMap, boxMap, measure));
  const slopes = slopePass(placed, drawn, field, heavyMap, boxMap, measure);
  const around = boxAroundSegments(offsets.light, boxAroundSegments(heavy));
  const centre: PaperPoint = [(around.minX + around.maxX) / 2 || 0, (around.minY + around.maxY) / 2 || 0];
  const dimensions = options.show.dimensions ? dimensionPass(placed, drawn, { heavy: heavyMap, light: boxMap, field, centre, extent: around }, measure) : NO_DIMENSIONS;
  const light = [...offsets.light, ...dimensions.light, ...slopes.light, ...cloud.light];
  const fixed = [...texts.flatMap((text) => text.box ?? []), ...slopes.boxes];
  return {
    placed, drawn, joints, offsets, dimensions, matches, breaks, heavy, light, heavyMap, field, fixed,
    items: [...inks.flatMap((ink) => ink.items), ...offsets.items, ...slopes.items, ...dimensions.items, ...texts.flatMap((text) => text.items), ...knockOuts(texts.flatMap((text) => text.box ?? []), light)],
    homeless: [
      ...texts.filter((text) => text.box === null).map(({ text }) => ({ ref: text.ref, text: text.text, line: text.line })),
      ...dimensions.homeless.map((text) => ({ ref: text.ref, text: text.text, line: { from: text.from, to: text.to } })),
    ],
    extent: boxAroundBoxes(fixed, boxAroundBoxes(dimensions.numbers.map(({ box }) => box), boxAroundSegments(light, boxAroundSegments(heavy)))),
  };
}

/** White under a number that thin lines run through; pipe is painted over it. */
export function knockOuts(boxes: readonly TurnedBox[], light: readonly Segment[]): readonly DisplayItem[] {
  return boxes
    .filter((box) => light.some((line) => segmentInBox(line.from, line.to, box) > 0))
    .map((box) => pathItem("halo", null, polygonSegments(boxCorners({ ...box, halfWidth: box.halfWidth + 0.5, halfHeight: box.halfHeight + 0.45 })), { fill: "paper" }));
}

export function drawLabels(lines: Lines, options: DrawOptions, view: View): Drawing {
  const { measure } = options;
  const { placed, drawn, joints, offsets, heavyMap, light } = lines;
  const lightMap = inkMap(light, 0.5);
  const room = roomAround(lines.extent, options.widthMm, options.heightMm);
  const north = northPass(placed.projection, room, heavyMap, lightMap, lines.field, measure);
  const welds = weldMarks(placed, joints, options);
  const components = componentMarks(placed, drawn, options);
  const pieces = pieceMarks(placed, drawn, options);
  const labels: Label[] = [
    ...endLabels(placed, drawn, measure), ...spoolLabels(placed, drawn, measure), ...lines.matches.labels, ...lines.breaks.labels,
    ...offsets.notes.map((note) => blockLabel(note.lines.map((text, i) => ({ text, bold: i === 0 })), { id: `offset ${note.id}`, anchors: note.anchors, clear: 0.5, along: [] }, { kind: "leg", id: note.id }, measure)),
    ...homelessLabels(lines.homeless, options), ...revisionMarks(placed, options), ...welds.labels, ...components.labels, ...pieces.labels,
  ];
  const marks = placeLabels(labels, [...lines.fixed, north.box], { heavy: heavyMap, light: lightMap, room }, lines.dimensions.numbers);
  const numbers = lines.dimensions.numbers.map(({ text }, i) => numberItem(text, marks.numbers[i]?.centre ?? [0, 0]));
  const shown: Ref[] = [
    ...welds.shown, ...components.shown, ...pieces.shown,
    ...[...lines.dimensions.shown, ...offsets.notes.map((note) => note.id)].map((id): Ref => ({ kind: "dimension", id })),
  ];
  return finished(layered([...lines.items, ...knockOuts(marks.numbers, light), ...numbers, ...north.items, ...marks.items]), room, options, view, marks.report, shown, placed);
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
  const byLayer = new Map<Layer, DisplayItem[]>(LAYERS.map((layer) => [layer, []]));
  for (const item of items) byLayer.get(item.layer)?.push(item);
  return [...byLayer.values()].flat();
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
