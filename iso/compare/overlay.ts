/**
 * The overlay: both revisions of a spool drawn in one frame. What did not change coincides and is inked once; what came is
 * heavy, what went is dashed and crossed; a changed dimension carries its old number in square brackets; and each row of the
 * list stands by its number at its place. Pure: equal input gives equal items.
 */
import type { PaperPoint } from "../geometry/types";
import type { View } from "../run/document";
import type { Model } from "../run/model-types";
import { breakPass } from "../draw/break-flags";
import { dimensionPass } from "../draw/dimensions";
import { overrun, standingOf, viewOf, type Standing } from "../draw/draw-model";
import { drawLabels, type Lines } from "../draw/draw-passes";
import { drawnEdges, drawnJoints } from "../draw/drawn";
import type { DisplayItem, Drawing, DrawOptions, MeasureText } from "../draw/drawing-types";
import { placeLineText } from "../draw/fixed-text";
import { fitStretch } from "../draw/fit";
import { inkMap } from "../draw/ink-map";
import { LabelField } from "../draw/label-field";
import { NO_MATCHES } from "../draw/match-marks";
import { flowPass } from "../draw/north";
import { offsetPass } from "../draw/offset-box";
import { pathItem, polygonSegments } from "../draw/paths";
import { pipeStretches } from "../draw/pipe";
import { placeAll, type Placed } from "../draw/place";
import { boxCorners, paperBoxAround, segmentInBox, type Segment, type TurnedBox } from "../draw/plane";
import { PROJECTIONS } from "../draw/project";
import { sketchOf, type Sketch, type SheetShare } from "../draw/sketch";
import { slopePass } from "../draw/slopes";
import { mitreJoints } from "../draw/turns";
import { commonFrame, placedSides, type CommonFrame } from "./common-frame";
import type { CompareRow } from "./compare-types";
import { overlayInk, type InkSide } from "./overlay-ink";
import { rowLabels } from "./overlay-labels";

export interface OverlayOptions {
  /** Room for the drawing, mm. */
  readonly widthMm: number;
  readonly heightMm: number;
  readonly measure: MeasureText;
  /** null = the later document's view, or the proposed one when that is null. */
  readonly view: View | null;
  /** Letters of the spool in the earlier and the later line; null = the whole line. */
  readonly spools: readonly [string | null, string | null];
}

export interface OverlayDrawing extends Drawing {
  /** Marks that differ; 0 when both revisions are drawn alike. */
  readonly differences: number;
  /** Rows of the list that have a place on it. */
  readonly placedRows: ReadonlySet<number>;
}

const SHOW = { items: false, welds: false, pieces: false, dimensions: true } as const;
/** Paper kept beyond the pipe at the first try, mm; what it gives up when something stands out of the room; and how often. */
const FIRST_MARGIN = 27;
const LEAST_STEP = 6;
const TRIES = 6;
/** White kept round words on thin lines, mm. */
const WHITE_EDGE = 0.45;

/** Draws the overlay on one sheet whatever it holds; what cannot fit at the least sizes goes beyond the room, which `bounds` tells. */
export function drawOverlay(before: Model, after: Model, rows: readonly CompareRow[], options: OverlayOptions, shares: readonly [SheetShare | null, SheetShare | null] = [null, null]): OverlayDrawing {
  const { measure } = options;
  const [then, now] = [sketchOf(before, options.spools[0], shares[0]), sketchOf(after, options.spools[1], shares[1])];
  const frame = commonFrame(then, now, measure);
  const draw: DrawOptions = { ...options, spool: options.spools[1], show: SHOW, changed: null };
  const view = viewOf(after, draw, null);
  const standing = standingOf(frame.plan, view, draw);
  let best: OverlayDrawing | null = null;
  let stretch = standing.stretch;
  let [widthMm, heightMm] = [options.widthMm - 2 * FIRST_MARGIN, options.heightMm - 2 * FIRST_MARGIN];
  for (let attempt = 0; attempt < TRIES; attempt++) {
    const next = overlayAt(frame, rows, draw, view, { ...standing, stretch });
    if (!best || overrun(next) < overrun(best)) best = next;
    if (overrun(best) <= 0 || stretch === 0) break;
    const out = Math.max(LEAST_STEP, overrun(next));
    [widthMm, heightMm] = [widthMm - out, heightMm - out];
    stretch = fitStretch(frame.plan, PROJECTIONS[view], { widthMm, heightMm }, standing.rows) ?? 0;
  }
  return best!;
}

function overlayAt(frame: CommonFrame, rows: readonly CompareRow[], options: DrawOptions, view: View, { stretch, rows: apart }: Standing): OverlayDrawing {
  const { a, b } = overlaySides(frame, placeAll(frame.plan, PROJECTIONS[view], stretch, apart));
  const ink = overlayInk(a, b);
  const { labels, placed } = rowLabels(rows, a, b, frame.united, options.measure);
  const lines = overlayLines(b, ink, options.measure);
  const drawing = drawLabels({ ...lines, breaks: { ...lines.breaks, labels: [...lines.breaks.labels, ...labels] } }, options, view);
  return { ...drawing, items: drawing.items.map(markOldNumber), differences: ink.differences, placedRows: placed };
}

/** Both sides where the common frame stands. */
export function overlaySides(frame: CommonFrame, common: Placed): { readonly a: InkSide; readonly b: InkSide } {
  const { a, b } = placedSides(frame, common);
  return { a: sideOf(a), b: sideOf(b) };
}

function sideOf(placed: Placed): InkSide {
  const drawn = drawnEdges(placed);
  return { placed, drawn, joints: mitreJoints(placed, drawn, drawnJoints(placed, drawn)), stretches: pipeStretches(placed, drawn) };
}

/** Dimensions, offset boxes, slopes and breaks of the later revision, round what both of them ink. */
function overlayLines({ placed, drawn, joints, stretches }: InkSide, ink: ReturnType<typeof overlayInk>, measure: MeasureText): Lines {
  const offsets = offsetPass(placed, drawn);
  const breaks = breakPass(placed, drawn, measure);
  const flow = flowPass(stretches);
  const heavy = [...ink.heavy, ...flow.heavy, ...breaks.heavy];
  const heavyMap = inkMap(heavy, 1.2);
  const boxMap = inkMap(offsets.light, 0.5);
  const field = new LabelField();
  const texts = offsets.texts.map((text) => placeLineText(text, field, heavyMap, boxMap, measure));
  const slopes = slopePass(placed, drawn, field, heavyMap, boxMap, measure);
  const around = paperBoxAround([...heavy, ...offsets.light].flatMap((s) => [s.from, s.to]));
  const centre: PaperPoint = [(around.minX + around.maxX) / 2 || 0, (around.minY + around.maxY) / 2 || 0];
  const dimensions = dimensionPass(placed, drawn, { heavy: heavyMap, light: boxMap, field, centre, extent: around }, measure);
  const light = [...offsets.light, ...dimensions.light, ...slopes.light];
  const fixed = [...texts.flatMap((text) => text.box ?? []), ...slopes.boxes];
  return {
    placed, drawn, joints, offsets, dimensions, breaks, heavy, light, heavyMap, field, fixed, matches: NO_MATCHES,
    items: [...ink.items, ...flow.items, ...breaks.items, ...offsets.items, ...slopes.items, ...dimensions.items, ...texts.flatMap((text) => text.items), ...whiteUnder(texts.flatMap((text) => text.box ?? []), light)],
    homeless: [
      ...texts.filter((text) => text.box === null).map(({ text }) => ({ ref: text.ref, text: text.text, line: text.line })),
      ...dimensions.homeless.map((text) => ({ ref: text.ref, text: text.text, line: { from: text.from, to: text.to } })),
    ],
    extent: paperBoxAround([...[...heavy, ...light].flatMap((s) => [s.from, s.to]), ...[...fixed, ...dimensions.numbers.map(({ box }) => box)].flatMap((box) => boxCorners(box))]),
  };
}

/** White under words that thin lines run through. */
function whiteUnder(boxes: readonly TurnedBox[], light: readonly Segment[]): readonly DisplayItem[] {
  const crossed = boxes.filter((box) => light.some((line) => segmentInBox(line.from, line.to, box) > 0));
  return crossed.map((box) => pathItem("halo", null, polygonSegments(boxCorners({ ...box, halfWidth: box.halfWidth + WHITE_EDGE, halfHeight: box.halfHeight + WHITE_EDGE })), { fill: "paper" }));
}

/** A changed number in the colour of what is new, beside its brackets. */
function markOldNumber(item: DisplayItem): DisplayItem {
  return item.type === "text" && item.text.includes("[WAS ") ? { ...item, ink: "dye" } : item;
}

/** Sketches of both revisions in their common frame: for drawing, and for tests that measure it. */
export function overlayFrame(before: Model, after: Model, spools: OverlayOptions["spools"], measure: MeasureText): CommonFrame {
  const [then, now]: readonly [Sketch, Sketch] = [sketchOf(before, spools[0]), sketchOf(after, spools[1])];
  return commonFrame(then, now, measure);
}
