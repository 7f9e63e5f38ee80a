/** Where labels are looked for: rings, directions, and the prices of what is found there. Millimetres of paper. */
import type { PaperPoint } from "../geometry/types";
import { ALONG_COSINE } from "./label-leaders";

/** Rings by tiers, mm of leader: a farther tier is looked at while the nearer ones leave something to wish for. */
export const RINGS: readonly (readonly number[])[] = [[1.5], [2.8], [4.5], [6.5], [9], [12], [16], [21], [27], [34]];
/** Places on pipe or outside the room come after those, then places beyond all usual rings. */
export const POOR_TIER = RINGS.length;
export const POOR_RINGS = [1.5, 2.8, 4.5, 6.5, 9, 12, 16, 21, 27, 34] as const;
export const FAR_RINGS: readonly (readonly number[])[] = [[42, 52], [64, 80], [100, 130], [170, 220], [290, 380], [500, 700], [1000, 1500], [2200, 3200]];
/** Anchors looked at on the near rings; Fineness says how many beyond them. */
export const NEAR_TIERS = 4;
export const MOST_ANCHORS = 3;
/** Tiers of a label: clear ones by ring, poor ones, far ones. */
export const TIER_COUNT = RINGS.length + 1 + FAR_RINGS.length;

/** Prices are whole numbers, this many to one, so that the search need not make a number of them on the heap each time. */
export const PRICE = 64;
/** Price of a millimetre of leader; of a touch, which leaves a label (or two) unclean; of thin lines under box and leader. */
export const COST_PER_MM = 0.85 * PRICE;
export const COST_OF_TOUCH = 34 * PRICE;
export const COST_PER_CELL = 0.4 * PRICE;
export const COST_ON_THIN = 2.5 * PRICE;
export const COST_PER_THIN_CELL = 0.08 * PRICE;
/** Words have no white ground of their own. */
export const COST_OF_WORDS_ON_THIN = 6 * PRICE;
export const COST_OVER_THIN = 6 * PRICE;
export const COST_PER_OVER_CELL = 0.6 * PRICE;
export const COST_OUTSIDE = 40 * PRICE;
export const COST_PER_OUTSIDE = 3 * PRICE;
export const COST_ALONG_PIPE = 8 * PRICE;
export const COST_ALONG_AXIS = 1.2 * PRICE;
export const COST_OF_ANCHOR = 0.6 * PRICE;

export const AXES: readonly PaperPoint[] = [[Math.cos(Math.PI / 6), 0.5], [Math.cos(Math.PI / 6), -0.5], [0, 1]];

/** Directions round an anchor, and the price of each for lying along an axis. */
export interface Directions {
  readonly count: number;
  readonly dx: Float64Array;
  readonly dy: Float64Array;
  readonly axial: Float64Array;
}

/** Directions all round, the first half a step from level, so that none lies along an axis. */
function directions(count: number): Directions {
  const angles = Array.from({ length: count }, (_, i) => ((i + 0.5) * 2 * Math.PI) / count);
  const alongAxis = (angle: number): boolean => AXES.some((axis) => Math.abs(axis[0] * Math.cos(angle) + axis[1] * Math.sin(angle)) > ALONG_COSINE);
  return { count, dx: Float64Array.from(angles, Math.cos), dy: Float64Array.from(angles, Math.sin), axial: Float64Array.from(angles, (angle) => (alongAxis(angle) ? COST_ALONG_AXIS : 0)) };
}

/** How closely places are looked for: few for a sheet with room, more where many labels cannot be kept clean otherwise. */
export interface Fineness {
  readonly directions: Directions;
  /** Anchors looked at on the far rings. */
  readonly farAnchors: number;
  /** Rings of the near tiers, mm of leader; the first of each is that of RINGS. */
  readonly rings: readonly (readonly number[])[];
}
/** Twice as many in the same tiers. */
const FINE_RINGS = [[1.5, 2.1], [2.8, 3.6], [4.5, 5.5], [6.5, 7.7], [9, 10.5], [12, 14], [16, 18.5], [21, 24], [27, 30], [34, 38]] as const;
export const COARSE: Fineness = { directions: directions(24), farAnchors: 1, rings: RINGS };
export const FINE: Fineness = { directions: directions(48), farAnchors: 3, rings: FINE_RINGS };

/** On rings under and over these every other direction is enough, mm. */
export const HALF_ANGLES_UNDER = 2;
export const HALF_ANGLES_OVER = 14;
/** Paper kept between a label and pipe or numbers, beyond what whole cells of the maps keep already, mm. */
export const MARGIN = 0.15;
/** So far before its end a leader is still outside its label, mm. */
export const LEADER_END = 0.8;
export const MOST_IN_TIER = 65_536;
