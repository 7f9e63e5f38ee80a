/** A way as working points of a run: its fittings in order, and where the run's ends then stand. */
import type { Vec3 } from "../geometry/types";
import type { Item } from "../run/document";
import type { Way, WayTurn } from "./ways-types";

export interface WayStop {
  readonly position: Vec3;
  readonly item: Item;
}

export interface WayStops {
  readonly start: Vec3;
  readonly stops: readonly WayStop[];
  readonly end: Vec3;
}

/**
 * Working points to put between two ends. Whole 90s and 45s stand as such; an angle no table gives stands as an elbow cut to
 * it; mitres and reducers as themselves. Start and end are the ends' places after what is cut back there.
 */
export function wayStops(way: Way): WayStops {
  const stops = way.straights.flatMap((straight, j): WayStop[] => {
    const { reducer } = straight;
    const turn = way.turns[j];
    return [
      ...(reducer ? [{ position: reducer.largeEnd, item: { kind: "reducer" as const, shape: "concentric" as const, toNps: straight.nps, toSchedule: null, flat: null } }] : []),
      ...(turn ? [{ position: turn.corner, item: turnItem(turn) }] : []),
    ];
  });
  const [first, last] = [way.straights[0], way.straights[way.straights.length - 1]];
  return { start: first?.from ?? [0, 0, 0], stops, end: last?.to ?? [0, 0, 0] };
}

function turnItem({ fitting, angleRad, radiusMm }: WayTurn): Item {
  if (fitting.make === "mitre") return { kind: "mitre", pieces: fitting.pieces, radiusMm };
  const radius = fitting.radius === "LR" ? "lr" : "sr";
  if (!fitting.whole || !fitting.tabulated) return { kind: "elbow", elbow: `trimmed-${radius}` };
  return { kind: "elbow", elbow: angleRad > Math.PI / 3 ? `${radius}-90` : `${radius}-45` };
}
