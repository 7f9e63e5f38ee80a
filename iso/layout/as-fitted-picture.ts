/**
 * A picture of the spool as drawn with the faces where they were measured: the centre lines true to scale, deviations drawn
 * larger by a round number that the picture states. Isometric, plan, or the elevation that shows more of it.
 */
import type { DisplayItem, MeasureText } from "../draw/drawing-types";
import { circleSegments, lineItem, pathItem, polygonSegments, textItem } from "../draw/paths";
import { project, PROJECTIONS } from "../draw/project";
import { boxOfPoints, paperAdd, paperAddScaled, paperDistance, paperScale, paperSub, paperUnit } from "../geometry/paper";
import type { PaperBox, PaperPoint, Vec3 } from "../geometry/types";
import { vecAddScaled, vecAngle, vecCross, vecLength, vecPerpendicular, vecRotate, vecUnit } from "../geometry/vec3";
import type { View } from "../run/document";
import type { AsFittedResult, FaceResult, FittedVerdict } from "./as-fitted-types";
import type { Wanted } from "./as-fitted-wanted";
import { spotLabels, type SpotLabel, type Stroke } from "./label-spots";

export const FITTED_VIEWS = ["isometric", "plan", "elevation"] as const;
export type FittedView = (typeof FITTED_VIEWS)[number];

/** Words of a verdict, on screen and on paper. */
export const FITTED_WORDS: Readonly<Record<FittedVerdict, string>> = { go: "GO", near: "WITHIN, NEAR", trim: "TRIM", stop: "STOP", none: "NOT JUDGED" };

/** Room round the picture for its labels, mm. */
const MARGIN = 13;
const HEAD = 5;
/** The largest deviation is drawn about this long, mm, and the largest lean about this wide, radians. */
const LONGEST = 11;
const WIDEST = 0.45;
/** A shift drawn shorter than this has no arrow, mm. */
const LEAST_ARROW = 1.2;
const CIRCLE = 24;

/** @param none = the spool as drawn alone, for a blank form. */
export function fittedPicture(wanted: Wanted, result: AsFittedResult | null, view: FittedView, corner: View, box: PaperBox, measure: MeasureText): DisplayItem[] {
  const flat = flatten(wanted, view, corner);
  const room = { minX: box.minX + MARGIN, minY: box.minY + HEAD + MARGIN, maxX: box.maxX - MARGIN, maxY: box.maxY - MARGIN };
  const bounds = boxOfPoints([...wanted.lines.flat(), ...wanted.faces.map((face) => face.position)].map(flat.to)) ?? { minX: 0, minY: 0, maxX: 1, maxY: 1 };
  const scale = Math.min((room.maxX - room.minX) / Math.max(bounds.maxX - bounds.minX, 1), (room.maxY - room.minY) / Math.max(bounds.maxY - bounds.minY, 1));
  const middle: PaperPoint = [(bounds.minX + bounds.maxX) / 2, (bounds.minY + bounds.maxY) / 2];
  const home: PaperPoint = [(room.minX + room.maxX) / 2, (room.minY + room.maxY) / 2];
  const paper = (at: Vec3): PaperPoint => paperAdd(home, paperScale(paperSub(flat.to(at), middle), scale));
  const larger = largerBy(result, scale);
  const strokes: Stroke[] = wanted.lines.map(([from, to]): Stroke => [paper(from), paper(to)]);
  const rings = wanted.faces.map((face) => ring(face.position, face.direction, face.odMm / 2).map(paper));
  const shifts = [...(result?.faces ?? []), ...(result?.corners ?? [])].flatMap((one) => measuredItems(wanted, one, larger, paper));
  const inner = { ...box, minX: box.minX + 1, minY: box.minY + HEAD, maxX: box.maxX - 1, maxY: box.maxY - 1 };
  return [
    textItem("label", null, [box.minX + 1.2, box.minY + 3.8], titleOf(flat.title, result, larger), { capMm: 2.5 }),
    ...strokes.map(([from, to]) => lineItem("symbol", null, from, to, 0.5)),
    ...rings.map((points) => pathItem("symbol", null, polygonSegments(points), { stroke: "ink", widthMm: 0.35 })),
    ...shifts.map((shift) => shift.items).flat(),
    ...northItems(flat.north, [box.maxX - 8, box.minY + HEAD + 7], measure),
    ...spotLabels(labelsOf(wanted, result, paper), [...strokes, ...rings.flatMap(around), ...shifts.flatMap((shift) => shift.strokes)], inner, measure),
  ];
}

interface Flat {
  readonly to: (at: Vec3) => PaperPoint;
  readonly title: string;
  /** Paper direction of plant north; null where it points at the reader or away. */
  readonly north: PaperPoint | null;
}

function flatten(wanted: Wanted, view: FittedView, corner: View): Flat {
  if (view === "isometric") return { to: (at) => project(PROJECTIONS[corner], at), title: "ISOMETRIC", north: PROJECTIONS[corner].axes[1] };
  if (view === "plan") return { to: ([e, n]) => [e, -n], title: "PLAN, looking down", north: [0, -1] };
  const reach = (axis: 0 | 1) => {
    const all = wanted.lines.flat().map((at) => at[axis]);
    return Math.max(...all, -Infinity) - Math.min(...all, Infinity);
  };
  if (reach(1) > reach(0)) return { to: ([, n, u]) => [n, -u], title: "ELEVATION, looking west", north: [1, 0] };
  return { to: ([e, , u]) => [e, -u], title: "ELEVATION, looking north", north: null };
}

interface Larger {
  readonly shift: number;
  readonly lean: number;
}

/** 1, 2, 5, 10 ... at or under a number; never under 1. */
function roundFactor(most: number): number {
  if (!(most > 1)) return 1;
  const ten = 10 ** Math.floor(Math.log10(most));
  return ten * (most / ten >= 5 ? 5 : most / ten >= 2 ? 2 : 1);
}

/** Fainter than this, deviations are what float64 leaves over. */
const NO_SHIFT_MM = 1e-3;
const MOST_LARGER = 500;

function largerBy(result: AsFittedResult | null, scale: number): Larger {
  const all = [...(result?.faces ?? []), ...(result?.corners ?? [])];
  const most = Math.max(0, ...all.map((one) => (one.off ? vecLength(one.off) : 0)));
  const lean = Math.max(0, ...all.map((one) => one.leanRad ?? 0));
  return { shift: most < NO_SHIFT_MM ? 1 : Math.min(MOST_LARGER, roundFactor(LONGEST / (most * scale))), lean: lean < NO_SHIFT_MM ? 1 : roundFactor(WIDEST / lean) };
}

function titleOf(title: string, result: AsFittedResult | null, larger: Larger): string {
  if (!result?.motion) return title;
  return `${title}. Measured dashed, deviations x ${larger.shift}${result.faces.some((face) => face.leanRad !== null) ? `, leans x ${larger.lean}` : ""}`;
}

function ring(centre: Vec3, axis: Vec3, radius: number): Vec3[] {
  const side = vecPerpendicular(axis);
  const other = vecCross(axis, side);
  return Array.from({ length: CIRCLE }, (_, i) => vecAddScaled(vecAddScaled(centre, side, radius * Math.cos((2 * Math.PI * i) / CIRCLE)), other, radius * Math.sin((2 * Math.PI * i) / CIRCLE)));
}

const around = (points: readonly PaperPoint[]): Stroke[] => points.map((to, i) => [points.at(i - 1)!, to]);

/** The face where it was measured, and an arrow to it from where it should be. */
function measuredItems(wanted: Wanted, one: FaceResult, larger: Larger, paper: (at: Vec3) => PaperPoint): { readonly items: DisplayItem[]; readonly strokes: Stroke[] }[] {
  const face = wanted.faces.find(({ mark }) => mark === one.mark);
  const place = face?.position ?? wanted.corners.find(({ mark }) => mark === one.mark)?.position;
  if (!one.off || !place) return [];
  const at = vecAddScaled(place, one.off, larger.shift);
  const [from, to] = [paper(place), paper(at)];
  const items: DisplayItem[] = face ? [pathItem("symbol", null, polygonSegments(ring(at, leant(face.direction, one.axis, larger.lean), face.odMm / 2).map(paper)), { stroke: "dye", widthMm: 0.5, dash: [1.6, 1] })] : [pathItem("symbol", null, circleSegments(to, 0.9), { fill: "dye" })];
  if (paperDistance(from, to) >= LEAST_ARROW) items.push(lineItem("symbol", null, from, to, 0.35, "dye"), arrowHead(from, to));
  return [{ items, strokes: [[from, to]] }];
}

function leant(wanted: Vec3, measured: Vec3 | null, times: number): Vec3 {
  const hinge = measured && vecUnit(vecCross(wanted, measured));
  return hinge && measured ? vecRotate(wanted, hinge, vecAngle(wanted, measured) * times) : wanted;
}

function arrowHead(from: PaperPoint, to: PaperPoint): DisplayItem {
  const way = paperUnit(paperSub(to, from)) ?? [1, 0];
  const back = paperAddScaled(to, way, -1.8);
  const side: PaperPoint = [-way[1], way[0]];
  return pathItem("symbol", null, polygonSegments([to, paperAddScaled(back, side, 0.6), paperAddScaled(back, side, -0.6)]), { fill: "dye" });
}

function labelsOf(wanted: Wanted, result: AsFittedResult | null, paper: (at: Vec3) => PaperPoint): SpotLabel[] {
  const verdict = (mark: string) => [...(result?.faces ?? []), ...(result?.corners ?? [])].find((one) => one.mark === mark)?.verdict ?? "none";
  const word = (mark: string) => (result && verdict(mark) !== "none" ? ` ${FITTED_WORDS[verdict(mark)]}` : "");
  return [
    ...wanted.faces.map((face): SpotLabel => ({ at: paper(face.position), text: `END ${face.mark}${word(face.mark)}`, face: "bold" })),
    ...wanted.corners.map((corner): SpotLabel => ({ at: paper(corner.position), text: `${corner.mark}${verdict(corner.mark) === "go" ? "" : word(corner.mark)}` })),
  ];
}

function northItems(north: PaperPoint | null, at: PaperPoint, measure: MeasureText): DisplayItem[] {
  if (!north) return [];
  const tip = paperAddScaled(at, north, 5);
  const tail = paperAddScaled(at, north, -4);
  const way = paperUnit(north) ?? north;
  const side: PaperPoint = [-way[1], way[0]];
  const back = paperAddScaled(tip, way, -2.2);
  const word = "PLANT N";
  return [
    lineItem("symbol", null, tail, back, 0.35), pathItem("symbol", null, polygonSegments([tip, paperAddScaled(back, side, 0.9), paperAddScaled(back, side, -0.9)]), { fill: "ink" }),
    textItem("label", null, [at[0] - measure(word, 2.5, "regular") + 7, at[1] + 9], word, { capMm: 2.5 }),
  ];
}
