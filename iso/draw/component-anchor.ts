/** Component anchors: where the leader of a component's mark or note starts. */
import type { PaperPoint } from "../geometry/types";
import type { PartFrame } from "./part-frames";
import type { Placed } from "./place";
import * as size from "./sizes";
import { TURN_KINDS } from "./turns";

export interface Anchor {
  readonly anchors: readonly PaperPoint[];
  readonly clear: number;
  readonly own?: number;
  readonly along: readonly PaperPoint[];
}

/** Half a symbol's line on the ink map, mm. */
const OWN_EDGE = 0.8;

/** Where a leader meets a component: the middle of its symbol. */
export function componentAnchor(placed: Placed, kind: string, pointId: string, frames: readonly PartFrame[]): Anchor | null {
  const corner = placed.paper.get(pointId);
  const [a, b] = frames;
  if (!a) return corner ? { anchors: [corner], clear: kind === "support" ? 3.4 : kind === "instrument" ? 1.6 : 0.5, along: [] } : null;
  const along = frames.map((frame) => frame.drawn.direction);
  if (TURN_KINDS.has(a.component.kind) && corner && b) {
    const [p, q] = [a.at(a.outer, 0), b.at(b.outer, 0)];
    // Middle of the elbow's cubic.
    const k = kind === "socket-elbow" ? 1 : 0.664;
    const chord: PaperPoint = [(p[0] + q[0]) / 2, (p[1] + q[1]) / 2];
    return { anchors: [[chord[0] + (corner[0] - chord[0]) * k, chord[1] + (corner[1] - chord[1]) * k]], clear: 0.4, along };
  }
  if (kind === "valve") return { anchors: [a.at(0, 0)], clear: 1.2, own: size.VALVE_HALF_HEIGHT + OWN_EDGE, along };
  if (kind === "instrument") return { anchors: [a.at(0, 0)], clear: 2.4, own: size.VALVE_HALF_HEIGHT, along };
  if (kind.startsWith("flange")) return { anchors: [a.at(a.inner + 1.2, 0)], clear: 1, own: size.FLANGE_STROKE_HALF + OWN_EDGE, along };
  if (frames.length > 1 && corner) return { anchors: [corner], clear: 0.4, along };
  return { anchors: [a.at((a.inner + a.outer) / 2, 0)], clear: 1, own: size.FLANGE_STROKE_HALF + OWN_EDGE, along };
}
