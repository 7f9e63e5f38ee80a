/**
 * A frame for what no reading ties to the datum, so that the same tapes always answer the same numbers: the first mark
 * at zero; where the whole can also turn, the second to the east of it and the third level with them, on the north side.
 */
import { SAME_POINT_MM } from "../geometry/tolerances";
import type { Vec3 } from "../geometry/types";
import { VEC_UP, vecCross, vecDot, vecLength, vecReject, vecRotate, vecSub, vecUnit } from "../geometry/vec3";
import type { Places } from "./observations";
import { DATUM, type SurveyNetwork } from "./survey-types";

const ALL_FREE = 6;
const SHIFTS = 3;

/**
 * The places moved as a whole into the frame; unchanged when the readings decide it.
 * @param freedoms rigid motions no reading feels.
 */
export function frameFree(network: SurveyNetwork, places: Places, freedoms: number): Places {
  const marks = network.marks;
  const origin = marks[0] === undefined ? undefined : places.get(marks[0]);
  if (origin === undefined || freedoms < SHIFTS || network.fixed.size > 0) return places;
  if (freedoms === ALL_FREE) return intoAxes(marks, places, origin);
  if (network.observations.some((o) => o.from === DATUM)) return places;
  const shifted = new Map(marks.map((mark) => [mark, vecSub(places.get(mark) ?? origin, origin)]));
  const turns = network.observations.every((o) => o.type !== "azimuth" && (o.type !== "along" || o.axis === 2));
  return turns ? turnedEast(marks, shifted) : shifted;
}

/** Turned about the plumb line of the first mark until the second lies due east of it. */
function turnedEast(marks: readonly string[], places: Places): Places {
  const [e, n] = marks.map((mark) => places.get(mark)!).find((place) => Math.hypot(place[0], place[1]) > SAME_POINT_MM) ?? [1, 0];
  const angle = -Math.atan2(n, e);
  return new Map(marks.map((mark) => [mark, vecRotate(places.get(mark)!, VEC_UP, angle)]));
}

function intoAxes(marks: readonly string[], places: Places, origin: Vec3): Places {
  const way = (mark: string): Vec3 => vecSub(places.get(mark) ?? origin, origin);
  const second = marks.find((mark) => vecLength(way(mark)) > SAME_POINT_MM);
  const east = second === undefined ? null : vecUnit(way(second));
  if (!east) return places;
  const third = marks.find((mark) => vecLength(vecReject(way(mark), east)) > SAME_POINT_MM);
  const north = third === undefined ? null : vecUnit(vecReject(way(third), east));
  if (!north) return places;
  const turned = (mark: string, up: Vec3): Vec3 => [vecDot(way(mark), east), vecDot(way(mark), north), vecDot(way(mark), up)];
  // Tapes know no up from down: the mark farthest from the level plane is taken to stand above it.
  const up = vecCross(east, north);
  const heights = marks.map((mark) => vecDot(way(mark), up));
  const farthest = heights.reduce((most, height) => (Math.abs(height) > Math.abs(most) ? height : most), 0);
  const upward: Vec3 = farthest < 0 ? [-up[0], -up[1], -up[2]] : up;
  return new Map(marks.map((mark) => [mark, turned(mark, upward)]));
}
