/** Candidate places of a label: rings of points around its anchors, priced against fixed ink. */
import type { PaperBox, PaperPoint } from "../geometry/types";
import type { DisplayItem } from "./drawing-types";
import { boxInside, type InkMap } from "./ink-map";
import type { TurnedBox } from "./plane";

/** Where a leader may meet a label: a disc about `offset` from the label's middle. */
export interface Hub {
  readonly offset: PaperPoint;
  readonly radius: number;
}

export interface Label {
  readonly id: string;
  readonly anchors: readonly PaperPoint[];
  /** The leader starts this far from the anchor. */
  readonly clear: number;
  readonly halfWidth: number;
  readonly halfHeight: number;
  readonly hubs: readonly Hub[];
  /** Paper directions of the pipe at the anchor: a leader along them reads as pipe. */
  readonly along: readonly PaperPoint[];
  /** A leader shorter than this is left out. */
  readonly leaderFrom: number;
  readonly draw: (centre: PaperPoint, leader: { readonly from: PaperPoint; readonly to: PaperPoint } | null) => readonly DisplayItem[];
}

export interface LabelInk {
  readonly heavy: InkMap;
  readonly light: InkMap;
  readonly room: PaperBox;
}

export interface Candidate {
  readonly centre: PaperPoint;
  readonly from: PaperPoint;
  readonly to: PaperPoint;
  readonly ring: number;
  /** Price of ring, box and angle; never more than the whole. */
  readonly base: number;
  readonly boxTouches: boolean;
  /** Price of the fixed ink under the leader, counted when first asked for; -1 before. */
  leaderCost: number;
  leaderTouches: boolean;
}

export const NEAR_RINGS = [1.5, 2.8, 4.5, 6.5, 9] as const;
export const OUTER_RINGS = [12, 16, 21, 27, 34] as const;
/** Price of a millimetre of leader. */
const COST_PER_MM = 0.7;
/** A seat cheaper than this cannot be bettered on the outer rings. */
export const OUTER_WORTH = OUTER_RINGS[0] * COST_PER_MM;
export const FAR_RINGS = [42, 52, 64, 80, 100, 130, 170, 220, 290, 380, 500, 700, 1000, 1500, 2200, 3200] as const;
const ANGLES = 24;
const OFFSET_DEG = 7.5;
/** cos 9°: nearer than this to a pipe or an axis a leader reads as one of them. */
const ALONG_COSINE = Math.cos((9 * Math.PI) / 180);
const AXIS_DIRECTIONS: readonly PaperPoint[] = [[Math.cos(Math.PI / 6), 0.5], [Math.cos(Math.PI / 6), -0.5], [0, 1]];
const DIRECTIONS: readonly PaperPoint[] = Array.from({ length: ANGLES }, (_, i) => {
  const angle = ((OFFSET_DEG + (i * 360) / ANGLES) * Math.PI) / 180;
  return [Math.cos(angle), Math.sin(angle)];
});
const AXIAL: readonly boolean[] = DIRECTIONS.map((d) => AXIS_DIRECTIONS.some((axis) => Math.abs(axis[0] * d[0] + axis[1] * d[1]) > ALONG_COSINE));

export function labelBox(label: Label, centre: PaperPoint): TurnedBox {
  return { centre, halfWidth: label.halfWidth, halfHeight: label.halfHeight, angle: 0 };
}

/** Candidates on the given rings, cheapest base price first. */
export function candidatesOf(label: Label, rings: readonly number[], ink: LabelInk): Candidate[] {
  const list: Candidate[] = [];
  label.anchors.forEach((anchor, place) => {
    for (const hub of label.hubs) {
      DIRECTIONS.forEach((direction, i) => {
        // The label must lie beyond its hub, not back over the anchor.
        if (-(hub.offset[0] * direction[0] + hub.offset[1] * direction[1]) < -0.35 * Math.hypot(hub.offset[0], hub.offset[1])) return;
        const follows = label.along.some((d) => Math.abs(d[0] * direction[0] + d[1] * direction[1]) > ALONG_COSINE) ? 8 : 0;
        const fixed = place * 0.6 + follows + (AXIAL[i] ? 1.2 : 0);
        for (const ring of rings) {
          const candidate = candidateAt(label, anchor, hub, direction, ring, fixed, ink);
          if (candidate) list.push(candidate);
        }
      });
    }
  });
  return list.sort((p, q) => p.base - q.base);
}

function candidateAt(label: Label, anchor: PaperPoint, hub: Hub, d: PaperPoint, ring: number, fixed: number, ink: LabelInk): Candidate | null {
  const reach = label.clear + ring;
  const from: PaperPoint = [anchor[0] + d[0] * label.clear, anchor[1] + d[1] * label.clear];
  const to: PaperPoint = [anchor[0] + d[0] * reach, anchor[1] + d[1] * reach];
  const centre: PaperPoint = [to[0] + d[0] * hub.radius - hub.offset[0], to[1] + d[1] * hub.radius - hub.offset[1]];
  if (coversLeader(label, centre, anchor, to)) return null;
  const [w, h] = [label.halfWidth + 0.6, label.halfHeight + 0.6];
  const heavy = ink.heavy.inBox(centre[0] - w, centre[1] - h, centre[0] + w, centre[1] + h);
  const light = ink.light.inBox(centre[0] - w, centre[1] - h, centre[0] + w, centre[1] + h);
  const out = boxInside(ink.room, centre[0] - w, centre[1] - h, centre[0] + w, centre[1] + h);
  const base = ring * COST_PER_MM + fixed + (heavy > 0 ? 30 + heavy * 0.5 : 0) + (light > 0 ? 9 + light * 0.25 : 0) + (out > 0 ? 25 + out * 3 : 0);
  return { centre, from, to, ring, base, boxTouches: heavy > 0, leaderCost: -1, leaderTouches: false };
}

/** True when the label would lie over its own leader or anchor. */
function coversLeader(label: Label, centre: PaperPoint, anchor: PaperPoint, to: PaperPoint): boolean {
  const inside = (p: PaperPoint): boolean => Math.abs(p[0] - centre[0]) < label.halfWidth - 0.1 && Math.abs(p[1] - centre[1]) < label.halfHeight - 0.1;
  return inside(anchor) || inside([anchor[0] * 0.4 + to[0] * 0.6, anchor[1] * 0.4 + to[1] * 0.6]);
}

/** Price of fixed ink under the leader, remembered on the candidate. */
export function leaderPrice(candidate: Candidate, ink: LabelInk): number {
  if (candidate.leaderCost >= 0) return candidate.leaderCost;
  const { from, to, ring } = candidate;
  let cost = 0;
  if (ring > 1.6) {
    const skip = 0.9 / ring;
    const begin: PaperPoint = [from[0] + (to[0] - from[0]) * skip, from[1] + (to[1] - from[1]) * skip];
    const crossed = ink.heavy.along(begin, to);
    const thin = ink.light.along(begin, to);
    cost = (crossed > 0 ? 16 + crossed : 0) + (thin > 0 ? 5 + thin * 0.6 : 0);
    candidate.leaderTouches = crossed > 0;
  }
  candidate.leaderCost = cost;
  return cost;
}
