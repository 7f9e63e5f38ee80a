/**
 * Weld marks: a solid dot at each weld, a flag at a field weld, the cut's line through the dot within a mitre; two leaning
 * ticks at a threaded joint. Bolted joints have no mark of their own.
 */
import type { PaperPoint } from "../geometry/types";
import type { DrawnJoint, PassInk } from "./drawn";
import type { DisplayItem, Ref } from "./drawing-types";
import { circleSegments, lineItem, pathItem, polygonSegments } from "./paths";
import type { Segment } from "./plane";
import * as size from "./sizes";
import { isWeldJoint } from "./weld-joint";

/** Reach of a mitre's cut line to each side of the pipe, mm. */
const CUT_HALF = 3.2;

export const isWeld = (mark: DrawnJoint): boolean => isWeldJoint(mark.joint);

export function weldPass(joints: readonly DrawnJoint[]): PassInk {
  const items: DisplayItem[] = [];
  const heavy: Segment[] = [];
  for (const mark of joints) {
    const ref: Ref = { kind: "joint", id: mark.joint.key };
    if (mark.joint.kind === "threaded") items.push(...threadItems(mark, ref));
    if (!isWeld(mark)) continue;
    if (mark.joint.kind === "mitre") {
      const cut = cutLine(mark);
      items.push(lineItem("weld", ref, cut.from, cut.to, size.SYMBOL_WIDTH));
      heavy.push(cut);
    }
    items.push(pathItem("weld", ref, circleSegments(mark.at, size.WELD_DOT / 2), { fill: "ink" }));
    const r = size.WELD_DOT / 2 - 0.3;
    const [x, y] = mark.at;
    heavy.push({ from: [x - r, y], to: [x + r, y] }, { from: [x, y - r], to: [x, y + r] });
    if (mark.joint.place === "shop") continue;
    const pole = poleDirection(mark.direction);
    const top: PaperPoint = [x + pole[0] * 7.5, y + pole[1] * 7.5];
    items.push(lineItem("weld", ref, mark.at, top, 0.3), pathItem("weld", ref, polygonSegments(pennant(top, pole)), { fill: "ink" }));
    const [a, b, c] = pennant(top, pole);
    if (a && b && c) heavy.push({ from: mark.at, to: top }, { from: a, to: b }, { from: b, to: c });
  }
  return { items, heavy, light: [] };
}

/** Upright, or leaning where the pipe itself stands near upright. */
function poleDirection(pipe: PaperPoint): PaperPoint {
  return Math.abs(pipe[0]) < 0.45 ? [Math.SQRT1_2, -Math.SQRT1_2] : [0, -1];
}

function pennant(top: PaperPoint, pole: PaperPoint): readonly PaperPoint[] {
  const foot: PaperPoint = [top[0] - pole[0] * 2.6, top[1] - pole[1] * 2.6];
  const side: PaperPoint = [1, 0];
  return [top, [(top[0] + foot[0]) / 2 + side[0] * 3.4, (top[1] + foot[1]) / 2 + side[1] * 3.4], foot];
}

function cutLine({ at, direction }: DrawnJoint): Segment {
  const side: PaperPoint = [-direction[1], direction[0]];
  return { from: [at[0] - side[0] * CUT_HALF, at[1] - side[1] * CUT_HALF], to: [at[0] + side[0] * CUT_HALF, at[1] + side[1] * CUT_HALF] };
}

function threadItems({ at, direction: [dx, dy] }: DrawnJoint, ref: Ref): DisplayItem[] {
  const p = (along: number, side: number): PaperPoint => [at[0] + dx * along - dy * side, at[1] + dy * along + dx * side];
  return [-0.55, 0.55].map((k) => lineItem("weld", ref, p(k - 0.5, -1.7), p(k + 0.5, 1.7), 0.35));
}
