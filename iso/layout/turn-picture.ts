/** Pictures of a turn in its own plane: the two legs with their diagonal, and the fitting with its arcs. True shape, not to one scale. */
import type { DisplayItem, MeasureText } from "../draw/drawing-types";
import { lineItem, pathItem, circleSegments, polygonSegments } from "../draw/paths";
import type { PaperBox, PaperPoint } from "../geometry/types";
import { paperAdd, paperAddScaled, paperScale, paperSub } from "../geometry/paper";
import type { UnitSystem } from "../run/document";
import { formatAngleDeg } from "../units/format";
import { formatMark, formatTapeLength } from "./lengths";
import { spotLabels, type SpotLabel, type Stroke } from "./label-spots";
import type { Turn } from "./turns";

/** Plane of a turn: the origin is the working point, x along the leg that arrives, y to the side it turns to. */
export type Shape = {
  readonly strokes: readonly ShapeStroke[];
  readonly labels: readonly SpotLabel[];
  readonly dots: readonly PaperPoint[];
};

interface ShapeStroke {
  readonly points: readonly PaperPoint[];
  readonly widthMm: number;
  readonly dash?: readonly number[];
  readonly ink?: "ink" | "dye" | "grey";
}

const CENTRE = [6, 1.2, 1, 1.2] as const;
const AUX = [2, 1.2] as const;
const ARC_STEPS = 48;
/** Room round a picture for its labels, mm. */
const MARGIN = 7;

/** The two legs, working point to working point, with the diagonal: base line, corner and end-to-end. */
export function legsShape(turn: Turn, units: UnitSystem): Shape {
  const a: PaperPoint = [-turn.legInMm, 0];
  const b = paperScale(unitAt(turn.angleRad), turn.legOutMm);
  const back: PaperPoint = [-turn.takeOutMm, 0];
  const front = paperScale(unitAt(turn.angleRad), turn.takeOutMm);
  const half = turn.odMm / 2;
  const normal = unitAt(turn.angleRad + Math.PI / 2);
  return {
    strokes: [
      { points: [a, [0, 0], b], widthMm: 0.5 },
      { points: [[0, 0], [Math.min(turn.legInMm, turn.legOutMm) * 0.45, 0]], widthMm: 0.2, dash: CENTRE },
      { points: [a, b], widthMm: 0.25, dash: AUX, ink: "dye" },
      { points: [[back[0], -half], [back[0], half]], widthMm: 0.35 },
      { points: [paperAddScaled(front, normal, -half), paperAddScaled(front, normal, half)], widthMm: 0.35 },
    ],
    dots: [a, [0, 0], b],
    labels: [
      { at: paperScale(paperAdd(a, back), 0.5), text: formatTapeLength(turn.legInMm, units), face: "bold" },
      { at: paperScale(paperAdd(b, front), 0.5), text: formatTapeLength(turn.legOutMm, units), face: "bold" },
      { at: paperScale(paperAdd(a, b), 0.5), text: formatTapeLength(turn.diagonalMm, units), face: "bold" },
      { at: [0, 0], text: formatAngleDeg(turn.angleRad), face: "bold" },
    ],
  };
}

/** The fitting: arcs at throat, centre line and back about the centre point, square-off points, take-outs; or a mitre's pieces, or a forged elbow's corner. */
export function fittingShape(turn: Turn, units: UnitSystem): Shape {
  if (turn.kind === "mitre") return mitreShape(turn, units);
  return turn.radiusMm === null ? forgedShape(turn, units) : elbowShape(turn, turn.radiusMm, units);
}

/** A fitting without a radius, socket or threaded: its corner and how far from it the pipes' ends stand. */
function forgedShape(turn: Turn, units: UnitSystem): Shape {
  const { angleRad, takeOutMm, odMm } = turn;
  const half = odMm / 2;
  const reach = takeOutMm + odMm * 0.9;
  const out = unitAt(angleRad);
  const normal = unitAt(angleRad + Math.PI / 2);
  const middle = paperScale(unitAt((angleRad + Math.PI) / 2), half / Math.cos(angleRad / 2));
  const side = (sign: 1 | -1): PaperPoint[] => [[-reach, sign * half], paperScale(middle, sign), paperAddScaled(paperScale(out, reach), normal, sign * half)];
  const [back, front]: [PaperPoint, PaperPoint] = [[-takeOutMm, 0], paperScale(out, takeOutMm)];
  return {
    strokes: [
      { points: side(1), widthMm: 0.5 }, { points: side(-1), widthMm: 0.5 },
      { points: [[-reach, 0], [0, 0], paperScale(out, reach)], widthMm: 0.25, dash: CENTRE },
      { points: [[-takeOutMm, -half], [-takeOutMm, half]], widthMm: 0.35 },
      { points: [paperAddScaled(front, normal, -half), paperAddScaled(front, normal, half)], widthMm: 0.35 },
    ],
    dots: [[0, 0], back, front],
    labels: [
      { at: [0, 0], text: `CORNER, ${formatAngleDeg(angleRad)}`, face: "bold" },
      { at: back, text: `PIPE'S END, ${formatMark(takeOutMm, units)}` }, { at: front, text: `PIPE'S END, ${formatMark(takeOutMm, units)}` },
    ],
  };
}

function elbowShape(turn: Turn, radius: number, units: UnitSystem): Shape {
  const { angleRad, odMm } = turn;
  const takeOut = radius * Math.tan(angleRad / 2);
  const centre: PaperPoint = [-takeOut, radius];
  const arc = (r: number, from: number, to: number) => arcPoints(centre, r, from, to);
  const end = (phi: number, r: number) => arc(r, phi, phi)[0]!;
  const corner: PaperPoint = [0, 0];
  const stub = odMm * 0.6;
  const out = unitAt(angleRad);
  const swing = radius + odMm / 2 + odMm * 0.35;
  const face = (phi: number): ShapeStroke => ({ points: [end(phi, radius - odMm / 2), end(phi, radius + odMm / 2)], widthMm: 0.5 });
  const rest = turn.kind === "trimmed" ? [radius - odMm / 2, radius + odMm / 2].map((r): ShapeStroke => ({ points: arc(r, angleRad, Math.PI / 2), widthMm: 0.25, dash: AUX, ink: "grey" })) : [];
  return {
    strokes: [
      ...[radius - odMm / 2, radius + odMm / 2].map((r): ShapeStroke => ({ points: arc(r, 0, angleRad), widthMm: 0.5 })),
      { points: arc(radius, 0, angleRad), widthMm: 0.25, dash: CENTRE }, face(0), face(angleRad), ...rest,
      { points: [paperAdd([-takeOut, 0], [-stub, 0]), corner, paperAddScaled(paperScale(out, takeOut), out, stub)], widthMm: 0.25, dash: CENTRE },
      { points: [centre, end(0, swing)], widthMm: 0.18, ink: "dye" }, { points: [centre, end(angleRad, swing)], widthMm: 0.18, ink: "dye" },
      { points: arc(swing, -0.06, angleRad + 0.06), widthMm: 0.18, dash: AUX, ink: "dye" },
    ],
    dots: [centre, [-takeOut, 0], paperScale(out, takeOut), corner],
    labels: [
      { at: centre, text: `CENTRE, ${formatAngleDeg(angleRad)}`, face: "bold" },
      { at: [-takeOut, 0], text: "SQUARE OFF" }, { at: paperScale(out, takeOut), text: turn.kind === "trimmed" ? "CUT HERE" : "SQUARE OFF" },
      { at: paperScale([-takeOut, 0], 0.5), text: formatMark(takeOut, units) },
      { at: end(angleRad * 0.55, radius + odMm / 2), text: "BACK" }, { at: end(angleRad * 0.55, radius - odMm / 2), text: "THROAT" },
      { at: paperScale(paperAdd(centre, end(0, radius - odMm / 2)), 0.5), text: `R ${formatMark(radius, units)}` },
    ],
  };
}

/** Pieces between cuts: the pipe's two sides meet on the planes of the cuts. */
function mitreShape(turn: Turn, units: UnitSystem): Shape {
  const welds = Math.max(1, turn.mitreWelds);
  const delta = turn.angleRad / welds;
  const half = turn.odMm / 2;
  const stub = turn.odMm * 0.9;
  const segment = turn.radiusMm === null || welds === 1 ? 0 : 2 * turn.radiusMm * Math.tan(delta / 2);
  const cuts: PaperPoint[] = [[-turn.takeOutMm, 0]];
  for (let k = 1; k < welds; k++) cuts.push(paperAddScaled(cuts[k - 1]!, unitAt(k * delta), segment));
  const line = [paperAdd(cuts[0]!, [-stub, 0]), ...cuts, paperAddScaled(cuts.at(-1)!, unitAt(turn.angleRad), stub)];
  const side = (sign: 1 | -1) => [
    paperAdd(line[0]!, [0, sign * half]),
    ...cuts.map((cut, k) => paperAddScaled(cut, unitAt((k + 0.5) * delta + Math.PI / 2), (sign * half) / Math.cos(delta / 2))),
    paperAddScaled(line.at(-1)!, unitAt(turn.angleRad + Math.PI / 2), sign * half),
  ];
  const [inner, outer] = [side(1), side(-1)];
  return {
    strokes: [
      { points: inner, widthMm: 0.5 }, { points: outer, widthMm: 0.5 }, { points: line, widthMm: 0.25, dash: CENTRE },
      ...cuts.map((_, k): ShapeStroke => ({ points: [inner[k + 1]!, outer[k + 1]!], widthMm: 0.5 })),
    ],
    dots: [[0, 0], ...cuts],
    labels: [
      { at: [0, 0], text: `CORNER, ${formatAngleDeg(turn.angleRad)}`, face: "bold" }, { at: outer[1]!, text: `CUT ${formatAngleDeg(delta / 2)} OFF SQUARE` },
      ...(segment > 0 ? [{ at: paperScale(paperAdd(cuts[0]!, cuts[1]!), 0.5), text: formatMark(segment, units) }] : []),
      { at: paperScale(paperAdd(outer[0]!, outer[1]!), 0.5), text: "BACK" }, { at: paperScale(paperAdd(inner[0]!, inner[1]!), 0.5), text: "THROAT" },
    ],
  };
}

/** A shape fitted into a box, the turn upward on paper, with its labels. */
export function shapeItems(shape: Shape, box: PaperBox, measure: MeasureText): DisplayItem[] {
  const all = [...shape.strokes.flatMap((stroke) => stroke.points), ...shape.dots];
  const xs = all.map(([x]) => x);
  const ys = all.map(([, y]) => -y);
  const [minX, maxX, minY, maxY] = [Math.min(...xs), Math.max(...xs), Math.min(...ys), Math.max(...ys)];
  const scale = Math.min((box.maxX - box.minX - 2 * MARGIN) / Math.max(maxX - minX, 1), (box.maxY - box.minY - 2 * MARGIN) / Math.max(maxY - minY, 1));
  const middle: PaperPoint = [(minX + maxX) / 2, (minY + maxY) / 2];
  const home: PaperPoint = [(box.minX + box.maxX) / 2, (box.minY + box.maxY) / 2];
  const paper = ([x, y]: PaperPoint): PaperPoint => paperAdd(home, paperScale(paperSub([x, -y], middle), scale));
  const strokes: Stroke[] = shape.strokes.flatMap((stroke) => stroke.points.slice(1).map((to, i): Stroke => [paper(stroke.points[i]!), paper(to)]));
  const lines = shape.strokes.map((stroke) => pathItem("symbol", null, polygonSegments(stroke.points.map(paper), false), { stroke: stroke.ink ?? "ink", widthMm: stroke.widthMm, ...(stroke.dash ? { dash: stroke.dash } : {}) }));
  const dots = shape.dots.map((dot) => pathItem("symbol", null, circleSegments(paper(dot), 0.7), { fill: "ink" }));
  return [...lines, ...dots, ...spotLabels(shape.labels.map((label) => ({ ...label, at: paper(label.at) })), strokes, box, measure)];
}

/** End of the pipe seen along flow: quarter lines, and the arc from one mark to the other. */
export function rollItems(rollRad: number, box: PaperBox, measure: MeasureText): DisplayItem[] {
  const centre: PaperPoint = [(box.minX + box.maxX) / 2, (box.minY + box.maxY) / 2];
  const r = Math.min(box.maxX - box.minX, box.maxY - box.minY) / 2 - 8;
  const at = (turn: number, reach: number): PaperPoint => [centre[0] + reach * Math.sin(turn), centre[1] - reach * Math.cos(turn)];
  const swept = Array.from({ length: ARC_STEPS + 1 }, (_, i) => at((rollRad * i) / ARC_STEPS, r + 2));
  const labels: SpotLabel[] = [{ at: at(0, r + 1.6), text: "0" }, { at: at(rollRad, r + 1.6), text: "MARK", face: "bold" }];
  const marks: Stroke[] = [[at(0, r - 3), at(0, r + 3)], [at(rollRad, r - 3), at(rollRad, r + 3)]];
  const quarters = [1, 2, 3].map((k): Stroke => [at((k * Math.PI) / 2, r - 1.6), at((k * Math.PI) / 2, r + 1.6)]);
  return [
    pathItem("symbol", null, circleSegments(centre, r), { stroke: "ink", widthMm: 0.5 }),
    ...quarters.map(([from, to]) => lineItem("symbol", null, from, to, 0.25)), ...marks.map(([from, to]) => lineItem("symbol", null, from, to, 0.5, "dye")),
    pathItem("symbol", null, polygonSegments(swept, false), { stroke: "dye", widthMm: 0.5 }),
    ...spotLabels(labels, [...marks, ...ringOf(centre, r), ...swept.slice(1).map((to, i): Stroke => [swept[i]!, to])], box, measure),
  ];
}

/** A circle as chords, so that labels keep clear of it. */
function ringOf(centre: PaperPoint, r: number): Stroke[] {
  const ring = arcPoints(centre, r, 0, 2 * Math.PI);
  return ring.slice(1).map((to, i): Stroke => [ring[i]!, to]);
}

function unitAt(turn: number): PaperPoint {
  return [Math.cos(turn), Math.sin(turn)];
}

/** Points of an arc about a centre, by the turn from the first square-off point. */
function arcPoints(centre: PaperPoint, r: number, from: number, to: number): readonly PaperPoint[] {
  return Array.from({ length: ARC_STEPS + 1 }, (_, i): PaperPoint => {
    const turn = from + ((to - from) * i) / ARC_STEPS;
    return [centre[0] + r * Math.sin(turn), centre[1] - r * Math.cos(turn)];
  });
}
