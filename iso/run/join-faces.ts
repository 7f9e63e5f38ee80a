/**
 * Second pass: finds legs that are no pipe at all but two flanged parts bolted face to face with one gasket (valve to
 * valve, valve to flange, valve to blind, flange to flange), by their lengths, so that no mating flanges are added there.
 */
import { FACE_TO_FACE_MM } from "../geometry/tolerances";
import { valveKey } from "../catalogue/keys";
import type { BuildContext } from "./build-context";
import type { PlacedPoint, PlacedRun } from "./build-types";

/** The runs with boltedIn and boltedOut set. */
export function joinFaces(runs: readonly PlacedRun[], ctx: BuildContext): PlacedRun[] {
  return runs.map((run) => {
    const bolted = boltedLegs(run, ctx);
    if (!bolted.includes(true)) return run;
    const points = run.points.map((p, i) => ({ ...p, boltedIn: bolted[i] ?? false, boltedOut: bolted[i + 1] ?? false }));
    return { ...run, points };
  });
}

/** Per point: whether the leg that ends at it is bolted face to face. A flange has one face, so at most one such leg. */
function boltedLegs(run: PlacedRun, ctx: BuildContext): boolean[] {
  const bolted = run.points.map(() => false);
  for (let i = 1; i < run.points.length; i++) {
    const [before, after] = [run.points[i - 1], run.points[i]];
    if (!before || !after) continue;
    if (bolted[i - 1] && before.point.item.kind === "flange") continue;
    const reach = [faceReach(before, ctx), faceReach(after, ctx)];
    const length = run.legs[i]?.lengthMm;
    if (reach[0] == null || reach[1] == null || length === undefined) continue;
    bolted[i] = Math.abs(length - reach[0] - reach[1] - gasketBetween(before, after, ctx)) <= FACE_TO_FACE_MM;
  }
  return bolted;
}

/** Gasket between two parts: what either flange says, the first one's word first, else the line's. */
function gasketBetween(before: PlacedPoint, after: PlacedPoint, ctx: BuildContext): number {
  const own = (p: PlacedPoint) => (p.point.item.kind === "flange" ? p.point.item.gasketMm : undefined);
  return own(before) ?? own(after) ?? ctx.settings.allowances.gasketMm;
}

/** From the working point to a part's own bolting face, mm; null when it has none. */
function faceReach(p: PlacedPoint, ctx: BuildContext): number | null {
  const item = p.point.item;
  if (item.kind === "flange") return 0;
  if (item.kind !== "valve" || item.ends !== "flanged") return null;
  const whole = item.faceToFaceMm ?? ctx.peek(valveKey(item.valve, item.ratingClass ?? ctx.settings.ratingClass, p.pipeIn.nps, "flanged"));
  return whole === null ? null : whole / 2;
}
