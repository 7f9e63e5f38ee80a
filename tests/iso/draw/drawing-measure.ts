/**
 * What a reader would find wrong on a drawing, counted from its items alone: shares no code with the passes that made it.
 * A label is a row of touching marks, a block of words or a number, with its leader. It is clean when it lies on no other
 * label, on no pipe, weld or symbol and under no foreign leader, and its own leader runs over none of them; the first
 * LEADER_START of a leader belongs to the pipe or the symbol it starts from, and so does the rest of that symbol.
 */
import type { DisplayItem, Drawing, PaperPoint } from "@/iso";
import { sharedArea, textCorners } from "./draw-helpers";

interface Line {
  readonly a: PaperPoint;
  readonly b: PaperPoint;
  readonly id: string;
  readonly half: number;
  /** Of a symbol or a weld, not of pipe. */
  readonly symbol?: boolean;
}

interface Part {
  readonly corners: readonly PaperPoint[];
  readonly box: Box;
  readonly ref: string;
  readonly name: string;
}

export interface MeasuredLabel {
  readonly layer: string;
  readonly parts: Part[];
  leader: Line | null;
}

export interface Box {
  readonly x0: number;
  readonly y0: number;
  readonly x1: number;
  readonly y1: number;
}

export interface DrawingMeasure {
  readonly labels: number;
  readonly clean: number;
  /** Those that are placed freely: all but the numbers on their lines. */
  readonly free: number;
  readonly cleanFree: number;
  readonly onLabels: number;
  readonly onHeavy: number;
  readonly underLeaders: number;
  readonly leadersOnHeavy: number;
  /** Each leader's length, 0 for a mark that needs none, numbers on their lines left out. */
  readonly leaders: readonly number[];
  readonly leaderCrossings: number;
  /** Dimension lines that cross another, and leaders that cross a dimension line. */
  readonly dimensionCrossings: number;
  readonly leadersOverDimensions: number;
}

/** Shared paper under this is rounding, square mm. */
const SHARED_LEAST = 0.02;
const LEADER_START = 1.5;
/** Marks of one row stand edge to edge; words of one block a line apart. */
const ROW_GAP = 0.1;
const BLOCK_GAP = 1.9;

const boxOf = (points: readonly PaperPoint[]): Box => ({
  x0: Math.min(...points.map((p) => p[0])), y0: Math.min(...points.map((p) => p[1])), x1: Math.max(...points.map((p) => p[0])), y1: Math.max(...points.map((p) => p[1])),
});
const apart = (a: Box, b: Box, margin = 0): boolean => a.x0 > b.x1 + margin || b.x0 > a.x1 + margin || a.y0 > b.y1 + margin || b.y0 > a.y1 + margin;
/** As `apart` for the box round a line, which is not made: most lines are nowhere near. */
const lineApart = ({ a, b }: Line, box: Box, margin: number): boolean =>
  (a[0] > box.x1 + margin && b[0] > box.x1 + margin) || (a[0] < box.x0 - margin && b[0] < box.x0 - margin) || (a[1] > box.y1 + margin && b[1] > box.y1 + margin) || (a[1] < box.y0 - margin && b[1] < box.y0 - margin);
const lineBox = ({ a, b }: Line): Box => ({ x0: Math.min(a[0], b[0]), y0: Math.min(a[1], b[1]), x1: Math.max(a[0], b[0]), y1: Math.max(a[1], b[1]) });

function cubicPoint(p: readonly [PaperPoint, PaperPoint, PaperPoint, PaperPoint], t: number): PaperPoint {
  const u = 1 - t;
  const at = (k: 0 | 1): number => u * u * u * p[0][k] + 3 * u * u * t * p[1][k] + 3 * u * t * t * p[2][k] + t * t * t * p[3][k];
  return [at(0), at(1)];
}

/** Straight pieces of a path; curves in eight. */
function pathLines(item: Extract<DisplayItem, { type: "path" }>): Line[] {
  const lines: Line[] = [];
  const id = item.ref?.id ?? "";
  const half = item.stroke ? item.widthMm / 2 : 0.05;
  let at: PaperPoint = [0, 0];
  let start: PaperPoint = at;
  for (const s of item.segments) {
    if (s.op === "M") start = s.to;
    else if (s.op === "L") lines.push({ a: at, b: s.to, id, half });
    else if (s.op === "Z") lines.push({ a: at, b: start, id, half });
    else if (s.op === "C") {
      let before = at;
      for (let i = 1; i <= 8; i++) {
        const next = cubicPoint([at, s.c1, s.c2, s.to], i / 8);
        lines.push({ a: before, b: next, id, half });
        before = next;
      }
    }
    at = s.op === "Z" ? start : s.to;
  }
  return lines;
}

const linesOf = (item: DisplayItem): Line[] =>
  item.type === "line" ? [{ a: item.from, b: item.to, id: item.ref?.id ?? "", half: item.widthMm / 2 }] : item.type === "path" ? pathLines(item) : [];

function hull(points: readonly PaperPoint[]): readonly PaperPoint[] {
  const [cx, cy] = [points.reduce((s, p) => s + p[0], 0) / points.length, points.reduce((s, p) => s + p[1], 0) / points.length];
  return [...points].sort((p, q) => Math.atan2(p[1] - cy, p[0] - cx) - Math.atan2(q[1] - cy, q[0] - cx));
}

export function labelsOf(items: readonly DisplayItem[]): MeasuredLabel[] {
  const labels: MeasuredLabel[] = [];
  const part = (item: DisplayItem): Part | null => {
    const corners = item.type === "text" ? textCorners(item) : item.type === "path" ? hull([...item.segments.flatMap((s) => (s.op === "Z" ? [] : [s.to])), ...pathLines(item).map((l) => l.b)]) : [];
    return corners.length === 0 ? null : { corners, box: boxOf(corners), ref: `${item.ref?.kind} ${item.ref?.id}`, name: item.type === "text" ? item.text : (item.ref?.id ?? "") };
  };
  const joinsRow = (a: Part, b: Part): boolean => !apart(a.box, b.box, ROW_GAP) && Math.min(a.box.y1, b.box.y1) > Math.max(a.box.y0, b.box.y0);
  const joinsBlock = (a: Part, b: Part): boolean => a.ref === b.ref && Math.abs(a.box.x0 - b.box.x0) < ROW_GAP && b.box.y0 - a.box.y1 < BLOCK_GAP && b.box.y0 > a.box.y0;
  let last: MeasuredLabel | null = null;
  for (const item of items) {
    if (item.layer !== "balloon" && item.layer !== "label" && item.layer !== "dimension-text") continue;
    const next = part(item);
    if (!next) continue;
    const joins: boolean = last?.layer === item.layer && last.parts.some((part) => (item.layer === "balloon" ? joinsRow(part, next) : item.layer === "label" && joinsBlock(part, next)));
    if (joins && last) last.parts.push(next);
    else labels.push((last = { layer: item.layer, parts: [next], leader: null }));
  }
  return labels;
}

const cross = (o: PaperPoint, a: PaperPoint, b: PaperPoint): number => (a[0] - o[0]) * (b[1] - o[1]) - (a[1] - o[1]) * (b[0] - o[0]);

/** Where two segments properly cross, as a distance along the first; null when they do not. */
function crossingAt(l: Line, m: Line): number | null {
  const [p, q, r, s] = [cross(m.a, m.b, l.a), cross(m.a, m.b, l.b), cross(l.a, l.b, m.a), cross(l.a, l.b, m.b)];
  if (p * q >= 0 || r * s >= 0) return null;
  return (p / (p - q)) * Math.hypot(l.b[0] - l.a[0], l.b[1] - l.a[1]);
}

function inside(p: PaperPoint, corners: readonly PaperPoint[]): boolean {
  const turns = corners.map((a, i) => cross(a, corners[(i + 1) % corners.length]!, p));
  return turns.every((t) => t >= 0) || turns.every((t) => t <= 0);
}

function pointToLine(p: PaperPoint, l: Line): number {
  const [wx, wy] = [l.b[0] - l.a[0], l.b[1] - l.a[1]];
  const t = Math.max(0, Math.min(1, ((p[0] - l.a[0]) * wx + (p[1] - l.a[1]) * wy) / Math.max(1e-9, wx * wx + wy * wy)));
  return Math.hypot(p[0] - l.a[0] - wx * t, p[1] - l.a[1] - wy * t);
}

/** True when a drawn line, with its width, comes upon a part. */
function lineOnPart(line: Line, part: Part): boolean {
  if (lineApart(line, part.box, line.half)) return false;
  if (inside(line.a, part.corners) || inside(line.b, part.corners)) return true;
  return part.corners.some((a, i) => {
    const b = part.corners[(i + 1) % part.corners.length]!;
    return crossingAt({ a, b, id: "", half: 0 }, line) !== null || pointToLine(a, line) < line.half - 0.01;
  });
}

const near = (label: MeasuredLabel, p: PaperPoint): number =>
  Math.min(...label.parts.map((part) => (inside(p, part.corners) ? 0 : Math.min(...part.corners.map((a, i) => pointToLine(p, { a, b: part.corners[(i + 1) % part.corners.length]!, id: "", half: 0 }))))));

const pointOf = (id: string): string => id.split(/[.:]/)[0] ?? id;

function leaderOnHeavy(leader: Line, heavy: readonly Line[], symbols: ReadonlySet<Line>): boolean {
  const box = lineBox(leader);
  return heavy.some((line) => {
    if (lineApart(line, box, 0)) return false;
    const at = crossingAt(leader, line);
    if (at === null) return false;
    return at > LEADER_START && !(symbols.has(line) && pointOf(line.id) === pointOf(leader.id));
  });
}

/** Gives each leader to the label it ends at; answers all of them. */
export function leadersTo(labels: readonly MeasuredLabel[], items: readonly DisplayItem[]): readonly Line[] {
  const leaders = items.filter((item) => item.layer === "leader").flatMap(linesOf);
  for (const leader of leaders) {
    const best = labels.reduce<{ label: MeasuredLabel | null; gap: number }>((found, label) => {
      const gap = label.leader === null ? near(label, leader.b) : Infinity;
      return gap < found.gap ? { label, gap } : found;
    }, { label: null, gap: 2 });
    if (best.label) best.label.leader = leader;
  }
  return leaders;
}

/** Pipe, welds and symbols as straight lines. */
export function heavyOf(items: readonly DisplayItem[]): readonly Line[] {
  return items.flatMap((item) => (item.layer === "pipe" || item.layer === "symbol" || item.layer === "weld" ? linesOf(item).map((line) => ({ ...line, symbol: item.layer !== "pipe" })) : []));
}

export function measureDrawing(drawing: Pick<Drawing, "items">): DrawingMeasure {
  const { items } = drawing;
  const labels = labelsOf(items);
  const leaders = leadersTo(labels, items);
  const heavy = heavyOf(items);
  const symbols = new Set(heavy.filter((line) => line.symbol));
  const bad = new Set<MeasuredLabel>();
  let [onLabels, onHeavy, underLeaders, leadersOnHeavy] = [0, 0, 0, 0];
  labels.forEach((label, i) => {
    for (const other of labels.slice(i + 1)) {
      if (!label.parts.some((p) => other.parts.some((q) => !apart(p.box, q.box) && sharedArea(p.corners, q.corners) > SHARED_LEAST))) continue;
      onLabels++;
      bad.add(label).add(other);
    }
    if (label.parts.some((part) => heavy.some((line) => lineOnPart(line, part)))) {
      onHeavy++;
      bad.add(label);
    }
    for (const other of labels) {
      if (other === label || !other.leader || !label.parts.some((part) => lineOnPart(other.leader!, part))) continue;
      underLeaders++;
      bad.add(label).add(other);
    }
    if (label.leader && leaderOnHeavy(label.leader, heavy, symbols)) {
      leadersOnHeavy++;
      bad.add(label);
    }
  });
  const pairs = (lines: readonly Line[], others: readonly Line[] | null): number => {
    let count = 0;
    lines.forEach((l, i) => {
      const box = lineBox(l);
      (others ?? lines.slice(i + 1)).forEach((m) => {
        if (!lineApart(m, box, 0) && crossingAt(l, m) !== null) count++;
      });
    });
    return count;
  };
  const free = labels.filter((label) => label.layer !== "dimension-text");
  const dimensionLines = items.flatMap((item) => (item.type === "line" && item.layer === "dimension" && item.ref ? linesOf(item) : []));
  return {
    labels: labels.length, clean: labels.length - bad.size, free: free.length, cleanFree: free.filter((label) => !bad.has(label)).length, onLabels, onHeavy, underLeaders, leadersOnHeavy,
    leaders: free.map(({ leader }) => (leader ? Math.hypot(leader.b[0] - leader.a[0], leader.b[1] - leader.a[1]) : 0)),
    leaderCrossings: pairs(leaders, null), dimensionCrossings: pairs(dimensionLines, null), leadersOverDimensions: pairs(leaders, dimensionLines),
  };
}
