/** Fits measured faces and corners to the sheet: which way each measured axis points is chosen by what lies nearest. */
import type { Vec3 } from "../geometry/types";
import { vecNegate, vecSub } from "../geometry/vec3";
import { DIRECTION_LEVER_MM, motionPoint, motionTurned, motionWay, rigidMotion, type Motion, type MotionFit, type Pair } from "./as-fitted-motion";
import type { Measured } from "./as-fitted-types";
import { holeTurn, type Wanted, type WantedHoles } from "./as-fitted-wanted";

export interface Fitted extends MotionFit {
  /** Measured with their axes the right way round. */
  readonly measured: readonly Measured[];
  /** Sum of squares left over, directions at their lever, mm squared. */
  readonly squares: number;
  /** Readings over those the motion takes up. */
  readonly spare: number;
}

export interface WantedPlace {
  readonly position: Vec3;
  /** null at a corner. */
  readonly direction: Vec3 | null;
  readonly holes: WantedHoles | null;
}

/** More axes than this are turned one after another and not in every combination. */
const MOST_TOGETHER = 5;

export function wantedPlaces(wanted: Wanted): ReadonlyMap<string, WantedPlace> {
  return new Map<string, WantedPlace>([
    ...wanted.faces.map(({ mark, position, direction, holes }) => [mark, { position, direction, holes }] as const),
    ...wanted.corners.map(({ mark, position }) => [mark, { position, direction: null, holes: null }] as const),
  ]);
}

/** @param hold mark of a face laid exactly on the sheet; "" = best fit on all. null when nothing has a centre. */
export function fitMeasured(measured: readonly Measured[], places: ReadonlyMap<string, WantedPlace>, hold: string): Fitted | null {
  const centred = measured.filter((one) => one.centre !== null && places.has(one.mark));
  if (centred.length === 0) return null;
  const withAxis = centred.filter((one) => one.axis !== null && places.get(one.mark)!.direction !== null).map((one) => one.mark);
  let best: Fitted | null = null;
  const trial = (turned: ReadonlySet<string>) => {
    const fitted = fitOnce(centred.map((one) => (turned.has(one.mark) ? { ...one, axis: vecNegate(one.axis!) } : one)), places, hold);
    if (!best || fitted.squares < best.squares) best = fitted;
    return fitted;
  };
  if (withAxis.length <= MOST_TOGETHER) {
    for (let mask = 0; mask < 2 ** withAxis.length; mask++) trial(new Set(withAxis.filter((_, i) => mask & (1 << i))));
    return best;
  }
  const turned = new Set<string>();
  for (const mark of [...withAxis, ...withAxis]) {
    const before = trial(turned).squares;
    const other = new Set(turned);
    if (!other.delete(mark)) other.add(mark);
    if (trial(other).squares >= before) continue;
    if (!turned.delete(mark)) turned.add(mark);
  }
  return best;
}

/** As fitMeasured, axes taken as they point. */
export function fitOnce(measured: readonly Measured[], places: ReadonlyMap<string, WantedPlace>, hold: string): Fitted {
  const points: Pair[] = measured.map((one) => ({ measured: one.centre!, wanted: places.get(one.mark)!.position, weight: 1 }));
  const ways = measured.flatMap((one): Pair[] => {
    const direction = places.get(one.mark)!.direction;
    return one.axis && direction ? [{ measured: one.axis, wanted: direction, weight: 1 }] : [];
  });
  const base = measured.find((one) => one.mark === hold);
  const place = base && places.get(base.mark)!;
  const held = base && place ? { measured: base.centre!, wanted: place.position, axis: base.axis && place.direction ? { measured: base.axis, wanted: place.direction } : null } : null;
  const loose = rigidMotion(points, ways, held);
  const fit = base && place && held?.axis ? { ...loose, motion: clocked(loose.motion, base, place) } : loose;
  const miss = (moved: Vec3, wanted: Vec3, lever: number) => vecSub(moved, wanted).reduce((sum, x) => sum + (x * lever) ** 2, 0);
  const squares = points.reduce((sum, p) => sum + miss(motionPoint(fit.motion, p.measured), p.wanted, 1), 0) + ways.reduce((sum, w) => sum + miss(motionWay(fit.motion, w.measured), w.wanted, DIRECTION_LEVER_MM), 0);
  return { ...fit, measured, squares, spare: 3 * points.length + 2 * ways.length - 6 };
}

/** The turn about a held face's axis is its bolt holes' where they were measured: they are what holds it when bolted up. */
function clocked(motion: Motion, base: Measured, { position, direction, holes }: WantedPlace): Motion {
  if (!direction || !holes || base.holes.length === 0) return motion;
  const turn = holeTurn({ direction, holes }, position, base.holes.map((hole) => motionPoint(motion, hole)));
  return turn === null ? motion : motionTurned(motion, position, direction, turn);
}
