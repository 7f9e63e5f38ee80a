/**
 * Break flags: where the specification, insulation or tracing changes, a line across the pipe with a flag to each side and
 * what holds there. Words stand in a led label.
 */
import type { PaperPoint, Vec3 } from "../geometry/types";
import { paperAddScaled as plus } from "../geometry/paper";
import type { LineBreak } from "../run/model-types";
import { edgePlace, edgePoint, type DrawnEdge, type PassInk } from "./drawn";
import type { DisplayItem, MeasureText, Ref } from "./drawing-types";
import type { Label } from "./label-candidates";
import { blockLabel, type BlockLine } from "./mark-labels";
import { lineItem, pathItem, polygonSegments } from "./paths";
import type { Placed } from "./place";
import type { Segment } from "./plane";

/** Reach of the line to each side of the pipe, and size of a flag, mm. */
const REACH = 6.5;
const FLAG_LONG = 3.4;
const FLAG_HIGH = 2.4;
const BREAK_LINE = 0.35;

export interface BreakInk extends PassInk {
  readonly labels: readonly Label[];
}

interface BreakPlace {
  readonly pointId: string;
  readonly changes: readonly LineBreak[];
  readonly at: PaperPoint;
  readonly direction: PaperPoint;
}

export function breakPass(placed: Placed, drawn: readonly DrawnEdge[], measure: MeasureText): BreakInk {
  const items: DisplayItem[] = [];
  const heavy: Segment[] = [];
  const labels: Label[] = [];
  for (const place of breakPlaces(placed, drawn)) {
    const ref: Ref = { kind: "point", id: place.pointId };
    const flag = flagItems(place, ref);
    items.push(...flag.items);
    heavy.push(...flag.heavy);
    labels.push(blockLabel(place.changes.map(breakWords), { id: `break ${place.pointId}`, anchors: flag.tips, clear: 0.8, along: [place.direction] }, ref, measure));
  }
  return { items, heavy, light: [], labels };
}

/** Changes of one point share a flag; it stands on the pipe just after the point's fitting. */
function breakPlaces(placed: Placed, drawn: readonly DrawnEdge[]): readonly BreakPlace[] {
  const byPoint = new Map<string, LineBreak[]>();
  for (const one of placed.sketch.model.breaks ?? []) byPoint.set(one.pointId, [...(byPoint.get(one.pointId) ?? []), one]);
  return [...byPoint].flatMap(([pointId, changes]) => {
    const vertex = placed.sketch.vertexOf(pointId);
    if (!placed.sketch.isHome(pointId)) return [];
    const after = drawn.find((d) => d.edge.from === vertex && !d.edge.stub);
    const before = drawn.find((d) => d.edge.to === vertex && !d.edge.stub);
    const first = changes[0];
    if (!first || !(after ?? before)) return [];
    const isWelded = placed.sketch.joints.some((joint) => joint.pointId === pointId);
    return after ? placeOn(after, pointId, changes, first.position, "from", isWelded) : before ? placeOn(before, pointId, changes, first.position, "to", isWelded) : [];
  });
}

/** Beyond the symbols of the point's arm and its weld dot, or at the point itself where nothing stands. */
const BEYOND_ARM = 6;

function placeOn(d: DrawnEdge, pointId: string, changes: readonly LineBreak[], position: Vec3, end: "from" | "to", isWelded: boolean): readonly BreakPlace[] {
  const arm = end === "from" ? d.edge.fromArm.room : d.edge.toArm.room;
  const at = edgePlace(d, position);
  const off = arm + (arm > 0 || isWelded ? BEYOND_ARM : 0);
  const along = end === "from" ? Math.min(at + off, d.length / 2 + at / 2) : Math.max(at - off, at / 2);
  return [{ pointId, changes, at: edgePoint(d, along), direction: d.direction }];
}

function flagItems({ at, direction }: BreakPlace, ref: Ref): { readonly items: readonly DisplayItem[]; readonly heavy: readonly Segment[]; readonly tips: readonly PaperPoint[] } {
  const up: PaperPoint = direction[0] >= 0 ? [direction[1], -direction[0]] : [-direction[1], direction[0]];
  const [top, foot] = [plus(at, up, REACH), plus(at, up, -REACH)];
  const flag = (side: 1 | -1): readonly PaperPoint[] => [top, plus(plus(top, direction, FLAG_LONG * side), up, -FLAG_HIGH / 2), plus(top, up, -FLAG_HIGH)];
  return {
    items: [
      lineItem("symbol", ref, top, foot, BREAK_LINE),
      pathItem("symbol", ref, polygonSegments(flag(-1)), { stroke: "ink", fill: "paper", widthMm: 0.25 }),
      pathItem("symbol", ref, polygonSegments(flag(1)), { stroke: "ink", fill: "ink", widthMm: 0.25 }),
    ],
    heavy: [{ from: top, to: foot }, { from: plus(top, direction, -FLAG_LONG), to: plus(top, direction, FLAG_LONG) }],
    tips: [top, foot],
  };
}

const HEADS: Readonly<Record<LineBreak["what"], string>> = { specification: "SPEC", material: "MATERIAL", insulation: "INSULATION", tracing: "TRACING" };

/** "SPEC A1 | B2", "INSULATION 50 mm STARTS", "TRACING ENDS". The bar stands for the line across the pipe. */
export function breakWords({ what, before, after }: LineBreak): BlockLine {
  const [from, to] = [before.trim().toUpperCase(), after.trim().toUpperCase()];
  const bold = what === "specification";
  if (from !== "" && to !== "") return { text: `${HEADS[what]} ${from} | ${to}`, bold };
  if (to === "") return { text: `${HEADS[what]} ${from} ENDS`, bold };
  return { text: bold ? `${HEADS[what]} ${to} FROM HERE` : `${HEADS[what]} ${to} STARTS`, bold };
}
