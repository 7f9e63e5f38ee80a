/** Where labels are looked for: rings, directions, and the prices of what is found there. Millimetres of paper. */
import type { PaperPoint } from "../geometry/types";
import { ALONG_COSINE } from "./label-leaders";

/** Rings by tiers, mm of leader: a farther tier is looked at while the nearer ones leave something to wish for. */
export const RINGS: readonly (readonly number[])[] = [[1.5], [2.8], [4.5], [6.5], [9], [12], [16], [21], [27], [34]];
/** Places on pipe or outside the room come after those, then places beyond all usual rings. */
export const POOR_TIER = RINGS.length;
export const POOR_RINGS = [1.5, 2.8, 4.5, 6.5, 9, 12, 16, 21, 27, 34] as const;
export const FAR_RINGS: readonly (readonly number[])[] = [[42, 52], [64, 80], [100, 130], [170, 220], [290, 380], [500, 700], [1000, 1500], [2200, 3200]];
/** Anchors looked at on the near rings, and beyond them. */
export const NEAR_TIERS = 4;
export const MOST_ANCHORS = 3;
export const MOST_ANCHORS_FAR = 1;
/** Tiers of a label: clear ones by ring, poor ones, far ones. */
export const TIER_COUNT = RINGS.length + 1 + FAR_RINGS.length;

/** Prices are whole numbers, this many to one, so that the search need not make a number of them on the heap each time. */
export const PRICE = 64;
/** Price of a millimetre of leader; of a touch, which leaves a label (or two) unclean; of thin lines under box and leader. */
export const COST_PER_MM = 0.7 * PRICE;
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

/** 24 directions, the first at 7.5°, so that none lies along an axis. */
export const ANGLES = 24;
export const OFFSET_DEG = 7.5;
export const AXES: readonly PaperPoint[] = [[Math.cos(Math.PI / 6), 0.5], [Math.cos(Math.PI / 6), -0.5], [0, 1]];
export const DX = new Float64Array(ANGLES);
export const DY = new Float64Array(ANGLES);
export const AXIAL = new Float64Array(ANGLES);
for (let i = 0; i < ANGLES; i++) {
  const angle = ((OFFSET_DEG + (i * 360) / ANGLES) * Math.PI) / 180;
  DX[i] = Math.cos(angle);
  DY[i] = Math.sin(angle);
  AXIAL[i] = AXES.some((axis) => Math.abs(axis[0] * Math.cos(angle) + axis[1] * Math.sin(angle)) > ALONG_COSINE) ? COST_ALONG_AXIS : 0;
}

/** On rings under and over these every other direction is enough, mm. */
export const HALF_ANGLES_UNDER = 2;
export const HALF_ANGLES_OVER = 14;
/** Paper kept between a label and pipe or numbers, beyond what whole cells of the maps keep already, mm. */
export const MARGIN = 0.15;
/** So far before its end a leader is still outside its label, mm. */
export const LEADER_END = 0.8;
export const MOST_IN_TIER = 65_536;
