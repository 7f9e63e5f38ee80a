/** Revision clouds: scallops round what the latest revision touched. Only the latest; its triangle carries the letter. */
import { convexHull } from "../geometry/paper-hull";
import type { PaperPoint } from "../geometry/types";
import type { DrawOptions, PathSegment } from "./drawing-types";
import type { PassInk } from "./drawn";
import { pathItem } from "./paths";
import type { Placed } from "./place";
import type { Segment } from "./plane";

/** Clear paper between a changed point and its cloud, and chord of one scallop, mm. */
const CLEAR = 6.6;
const SCALLOP = 4.2;
/** How far a scallop swells beyond its chord, as a share of it. */
const SWELL = 0.42;
const CLOUD_LINE = 0.35;
const CORNERS = 8;

export const NO_CLOUDS: PassInk = { items: [], heavy: [], light: [] };

export function cloudPass(placed: Placed, options: DrawOptions): PassInk {
  const ids = options.changed?.pointIds ?? [];
  if (ids.length === 0) return NO_CLOUDS;
  const outlines = changedGroups(placed, ids).map(({ outline }) => outline);
  return {
    items: outlines.map((outline) => pathItem("box", null, scallops(outline), { stroke: "alert", widthMm: CLOUD_LINE })),
    heavy: [],
    light: outlines.flatMap((outline) => outline.map((from, i): Segment => ({ from, to: outline[(i + 1) % outline.length] ?? from }))),
  };
}

export interface ChangedGroup {
  readonly ids: readonly string[];
  readonly outline: readonly PaperPoint[];
}

/** Changed points joined where a drawn leg has both of its ends among them, each group with the outline its cloud follows. */
export function changedGroups(placed: Placed, ids: readonly string[]): readonly ChangedGroup[] {
  const { sketch, paper } = placed;
  const own = [...new Set(ids.map((id) => sketch.vertexOf(id)))].filter((id) => paper.has(id));
  const group = new Map(own.map((id) => [id, id]));
  for (const edge of sketch.edges) {
    const [a, b] = [group.get(edge.from), group.get(edge.to)];
    if (a !== undefined && b !== undefined && a !== b) for (const [id, name] of group) if (name === b) group.set(id, a);
  }
  return [...new Set(group.values())].map((name) => {
    const members = own.filter((id) => group.get(id) === name);
    return { ids: members, outline: cloudOutline(members.map((id) => paper.get(id) ?? [0, 0])) };
  });
}

function cloudOutline(points: readonly PaperPoint[]): readonly PaperPoint[] {
  const around = points.flatMap(([x, y]) => Array.from({ length: CORNERS }, (_, i): PaperPoint => {
    const angle = ((i + 0.5) * 2 * Math.PI) / CORNERS;
    return [x + CLEAR * Math.cos(angle), y + CLEAR * Math.sin(angle)];
  }));
  return convexHull(around);
}

/** Arcs over equal chords of each side, swelling outwards (the outline turns clockwise on paper). */
function scallops(outline: readonly PaperPoint[]): readonly PathSegment[] {
  const segments: PathSegment[] = [];
  outline.forEach((from, i) => {
    const to = outline[(i + 1) % outline.length] ?? from;
    const way: PaperPoint = [to[0] - from[0], to[1] - from[1]];
    const length = Math.hypot(way[0], way[1]);
    const count = Math.max(1, Math.round(length / SCALLOP));
    const out: PaperPoint = [(way[1] / length) * (length / count) * SWELL * 1.33, (-way[0] / length) * (length / count) * SWELL * 1.33];
    for (let k = 0; k < count; k++) {
      const at = (t: number): PaperPoint => [from[0] + way[0] * t, from[1] + way[1] * t];
      const [a, b] = [at(k / count), at((k + 1) / count)];
      if (segments.length === 0) segments.push({ op: "M", to: a });
      segments.push({ op: "C", c1: [a[0] + out[0], a[1] + out[1]], c2: [b[0] + out[0], b[1] + out[1]], to: b });
    }
  });
  return [...segments, { op: "Z" }];
}
