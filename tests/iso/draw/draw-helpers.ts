/** Helpers of the drawing tests: drawing at a usual room, an overlap check that shares no code with iso/draw, random runs. */
import { measureText } from "@/fonts/widths";
import { buildModel, drawModel, emptyMarks, type DisplayItem, type Drawing, type DrawOptions, type Model, type PaperPoint, type RunDocument, type TextItem } from "@/iso";

/** Room of an A3 spool sheet's drawing. */
export const ROOM = { widthMm: 285, heightMm: 235 } as const;
export const SHOW_ALL = { items: true, welds: true, pieces: true, dimensions: true } as const;

export function modelOf(document: RunDocument): Model {
  return buildModel(document, emptyMarks(), []);
}

export function drawn(model: Model, options: Partial<DrawOptions> = {}): Drawing {
  return drawModel(model, { ...ROOM, measure: measureText, view: null, spool: null, show: SHOW_ALL, ...options });
}

/** Corners of a text's box, from its anchor, advance and capital height. */
export function textCorners(item: TextItem): PaperPoint[] {
  const width = measureText(item.text, item.capMm, item.face);
  const start = item.anchor === "start" ? 0 : item.anchor === "middle" ? -width / 2 : -width;
  const place = (x: number, y: number): PaperPoint => [
    item.at[0] + x * Math.cos(item.rotateRad) - y * Math.sin(item.rotateRad),
    item.at[1] + x * Math.sin(item.rotateRad) + y * Math.cos(item.rotateRad),
  ];
  return [place(start, 0), place(start + width, 0), place(start + width, -item.capMm), place(start, -item.capMm)];
}

const cross = (o: PaperPoint, a: PaperPoint, b: PaperPoint): number => (a[0] - o[0]) * (b[1] - o[1]) - (a[1] - o[1]) * (b[0] - o[0]);

/** Area two convex polygons share, by clipping one with the other (Sutherland-Hodgman). */
export function sharedArea(subject: readonly PaperPoint[], clip: readonly PaperPoint[]): number {
  const turn = Math.sign(clip.reduce((sum, p, i) => sum + p[0] * clip[(i + 1) % clip.length]![1] - p[1] * clip[(i + 1) % clip.length]![0], 0));
  let points = [...subject];
  clip.forEach((a, i) => {
    const b = clip[(i + 1) % clip.length]!;
    const kept: PaperPoint[] = [];
    points.forEach((p, j) => {
      const q = points[(j + 1) % points.length]!;
      const [sp, sq] = [cross(a, b, p) * turn, cross(a, b, q) * turn];
      if (sp >= 0) kept.push(p);
      if (sp * sq < 0) kept.push([p[0] + ((q[0] - p[0]) * sp) / (sp - sq), p[1] + ((q[1] - p[1]) * sp) / (sp - sq)]);
    });
    points = kept;
  });
  return Math.abs(points.reduce((sum, p, i) => sum + p[0] * points[(i + 1) % points.length]![1] - p[1] * points[(i + 1) % points.length]![0], 0)) / 2;
}

/** Pairs of texts, and of closed marks (balloons, hexagons, piece boxes), that share paper. */
export function overlappingLabels(items: readonly DisplayItem[]): string[] {
  const boxes: { name: string; group: string; corners: readonly PaperPoint[] }[] = [];
  for (const item of items) {
    if (item.type === "text") boxes.push({ name: item.text, group: "text", corners: textCorners(item) });
    if (item.type === "path" && item.layer === "balloon") {
      const points = item.segments.flatMap((s) => (s.op === "Z" ? [] : [s.to]));
      boxes.push({ name: `${item.ref?.kind} ${item.ref?.id}`, group: "mark", corners: outline(points) });
    }
  }
  const found: string[] = [];
  boxes.forEach((a, i) => boxes.slice(i + 1).forEach((b) => {
    if (a.group !== b.group || apart(a.corners, b.corners)) return;
    if (sharedArea(a.corners, b.corners) > 0.02) found.push(`${a.name} | ${b.name}`);
  }));
  return found;
}

function apart(a: readonly PaperPoint[], b: readonly PaperPoint[]): boolean {
  return ([0, 1] as const).some((k) => Math.max(...a.map((p) => p[k])) < Math.min(...b.map((p) => p[k])) || Math.max(...b.map((p) => p[k])) < Math.min(...a.map((p) => p[k])));
}

function outline(points: readonly PaperPoint[]): readonly PaperPoint[] {
  const [cx, cy] = [points.reduce((s, p) => s + p[0], 0) / points.length, points.reduce((s, p) => s + p[1], 0) / points.length];
  return [...points].sort((p, q) => Math.atan2(p[1] - cy, p[0] - cx) - Math.atan2(q[1] - cy, q[0] - cx));
}

export function everyNumber(items: readonly DisplayItem[]): number[] {
  return items.flatMap((item) => {
    if (item.type === "line") return [...item.from, ...item.to, item.widthMm];
    if (item.type === "text") return [...item.at, item.capMm, item.rotateRad];
    return item.segments.flatMap((s) => (s.op === "Z" ? [] : s.op === "C" ? [...s.c1, ...s.c2, ...s.to] : [...s.to]));
  });
}

/** Small seeded generator (mulberry32), so that a failing run can be named by its seed. */
export function seeded(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}
