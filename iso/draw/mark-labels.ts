/**
 * Marks as labels: material items in circles, weld numbers in hexagons, cut pieces in long rounded boxes, spools in heavy square
 * boxes, revisions in triangles; text blocks. Each kind has its own shape, so that black and white will do.
 */
import type { PaperPoint } from "../geometry/types";
import type { DisplayItem, Ink, MeasureText, PathSegment, Ref } from "./drawing-types";
import type { Hub, Label } from "./label-candidates";
import { centredText, circleSegments, hexagonSegments, lineItem, pathItem, polygonSegments, stadiumSegments, textItem } from "./paths";
import * as size from "./sizes";

export type MarkShape = "circle" | "hexagon" | "stadium" | "box" | "triangle" | "none";

/** Revision triangle. */
const TRIANGLE_WIDTH = 8.4;
const TRIANGLE_HEIGHT = 7;
/** Spool box, and its heavy line. */
const BOX_HEIGHT = 6.4;
const BOX_LINE = 0.6;

export interface Mark {
  readonly shape: MarkShape;
  readonly text: string;
  readonly ref: Ref;
}

export interface MarkPlace {
  readonly id: string;
  readonly anchors: readonly PaperPoint[];
  readonly clear: number;
  readonly own?: number;
  readonly along: readonly PaperPoint[];
}

function markWidth(mark: Mark, measure: MeasureText): number {
  const text = measure(mark.text, size.TEXT_CAP, "regular");
  switch (mark.shape) {
    case "circle": return Math.max(size.BALLOON, text + 2.4);
    case "hexagon": return Math.max(size.HEXAGON, text + 3.4);
    case "stadium": return text + 4.2;
    case "box": return Math.max(BOX_HEIGHT, text + 3.2);
    case "triangle": return Math.max(TRIANGLE_WIDTH, text + 5.5);
    case "none": return text + 1.2;
  }
}

function markHeight(mark: Mark): number {
  if (mark.shape === "none") return size.TEXT_CAP;
  if (mark.shape === "triangle") return TRIANGLE_HEIGHT;
  if (mark.shape === "hexagon") return size.HEXAGON * Math.sin(Math.PI / 3);
  if (mark.shape === "box") return BOX_HEIGHT;
  return mark.shape === "circle" ? size.BALLOON : size.PIECE_HEIGHT;
}

function markOutline(mark: Mark, centre: PaperPoint, width: number): readonly PathSegment[] {
  if (mark.shape === "stadium") return stadiumSegments(centre, width, size.PIECE_HEIGHT);
  if (mark.shape === "box") {
    const [w, h] = [width / 2 - 0.2, BOX_HEIGHT / 2];
    return polygonSegments([[centre[0] - w, centre[1] - h], [centre[0] + w, centre[1] - h], [centre[0] + w, centre[1] + h], [centre[0] - w, centre[1] + h]]);
  }
  if (mark.shape === "triangle") {
    const h = TRIANGLE_HEIGHT / 2;
    return polygonSegments([[centre[0], centre[1] - h], [centre[0] + width / 2, centre[1] + h], [centre[0] - width / 2, centre[1] + h]]);
  }
  if (mark.shape === "circle") return width > size.BALLOON ? stadiumSegments(centre, width, size.BALLOON) : circleSegments(centre, size.BALLOON / 2);
  return widened(hexagonSegments(centre, size.HEXAGON), centre, (width - size.HEXAGON) / 2);
}

/** Pulls a shape apart about its centre, for numbers of three figures. */
function widened(segments: readonly PathSegment[], centre: PaperPoint, by: number): readonly PathSegment[] {
  if (by <= 0) return segments;
  return segments.map((s) => (s.op === "M" || s.op === "L" ? { op: s.op, to: [s.to[0] + Math.sign(s.to[0] - centre[0]) * by, s.to[1]] as const } : s));
}

/** A row of marks that share one leader. */
export function marksLabel(marks: readonly Mark[], place: MarkPlace, measure: MeasureText): Label {
  const widths = marks.map((mark) => markWidth(mark, measure));
  const total = widths.reduce((sum, w) => sum + w, 0);
  const ink: Ink = marks.some((mark) => mark.shape === "hexagon") ? "dye" : marks.some((mark) => mark.shape === "triangle") ? "alert" : "ink";
  return {
    id: place.id, anchors: place.anchors, clear: place.clear, own: place.own ?? 0, along: place.along, leaderFrom: 0, hubs: markHubs(marks, widths, total),
    halfWidth: total / 2, halfHeight: Math.max(...marks.map(markHeight)) / 2,
    draw: (centre, leader) => {
      const items: DisplayItem[] = [];
      if (leader) items.push(lineItem("leader", marks[0]?.ref ?? null, leader.from, leader.to, size.LEADER_WIDTH, ink));
      let x = centre[0] - total / 2;
      marks.forEach((mark, i) => {
        const width = widths[i] ?? 0;
        items.push(...markItems(mark, [x + width / 2, centre[1]], width, ink));
        x += width;
      });
      return items;
    },
  };
}

/** The leader meets the first or the last closed shape of a row, never its words. */
function markHubs(marks: readonly Mark[], widths: readonly number[], total: number): readonly Hub[] {
  const hubs: Hub[] = [];
  let x = -total / 2;
  marks.forEach((mark, i) => {
    const width = widths[i] ?? 0;
    const radius = mark.shape === "stadium" ? size.PIECE_HEIGHT / 2 : mark.shape === "circle" ? size.BALLOON / 2 : mark.shape === "triangle" ? TRIANGLE_HEIGHT / 3 : mark.shape === "box" ? BOX_HEIGHT / 2 : size.HEXAGON / 2 - 0.25;
    if (mark.shape !== "none" && (i === 0 || i === marks.length - 1)) {
      if (i === 0) hubs.push({ offset: [x + radius, 0], radius });
      if (i > 0 || width > 2 * radius + 0.5) hubs.push({ offset: [x + width - radius, 0], radius });
    }
    x += width;
  });
  return hubs;
}

function markItems(mark: Mark, centre: PaperPoint, width: number, ink: Ink): readonly DisplayItem[] {
  const middle: PaperPoint = mark.shape === "triangle" ? [centre[0], centre[1] + 1.4] : centre;
  const text = centredText("balloon", mark.ref, middle, mark.text, { capMm: size.TEXT_CAP, ink: mark.shape === "none" ? "ink" : ink, face: mark.shape === "none" || mark.shape === "box" ? "bold" : "regular" });
  if (mark.shape === "none") return [text];
  return [pathItem("balloon", mark.ref, markOutline(mark, centre, width), { stroke: ink, fill: "paper", widthMm: mark.shape === "box" ? BOX_LINE : size.MARK_WIDTH }), text];
}

export interface BlockLine {
  readonly text: string;
  readonly bold: boolean;
}

/** Line pitch of a text block. */
const PITCH = size.TEXT_CAP * 1.62;

/** A leader meets a block beside its first or last line, or above or below it: always at words, never at the blank after a short line. */
function blockHubs(firstWidth: number, lastWidth: number, halfWidth: number, halfHeight: number): readonly Hub[] {
  const hub = (x: number, y: number): Hub => ({ offset: [x, y], radius: 0.9 });
  const side = halfHeight - size.TEXT_CAP / 2;
  const rows: readonly (readonly [number, number])[] = side > 0 ? [[firstWidth, -1], [lastWidth, 1]] : [[firstWidth, -1]];
  const across = rows.flatMap(([width, row]) => [hub(-halfWidth, row * side), hub(width - halfWidth, row * side)]);
  const level = ([[firstWidth, -1], [lastWidth, 1]] as const).flatMap(([width, row]) => [0.15, 0.5, 0.85].map((k) => hub(k * width - halfWidth, row * halfHeight)));
  return [...across, ...level];
}

/** A block of text lines: end texts, offset notes, tags. */
export function blockLabel(lines: readonly BlockLine[], place: MarkPlace, ref: Ref | null, measure: MeasureText): Label {
  const widths = lines.map((line) => measure(line.text, size.TEXT_CAP, line.bold ? "bold" : "regular"));
  const width = Math.max(...widths);
  const height = size.TEXT_CAP + (lines.length - 1) * PITCH;
  return {
    id: place.id, anchors: place.anchors, clear: place.clear, along: place.along, leaderFrom: 3.5,
    hubs: blockHubs(widths[0] ?? 0, widths.at(-1) ?? 0, width / 2, height / 2),
    halfWidth: width / 2, halfHeight: height / 2,
    draw: (centre, leader) => {
      const items: DisplayItem[] = [];
      if (leader) items.push(lineItem("leader", ref, leader.from, leader.to, size.LEADER_WIDTH));
      lines.forEach((line, i) => {
        const at: PaperPoint = [centre[0] - width / 2, centre[1] - height / 2 + size.TEXT_CAP + i * PITCH];
        items.push(textItem("label", ref, at, line.text, { capMm: size.TEXT_CAP, face: line.bold ? "bold" : "regular" }));
      });
      return items;
    },
  };
}
