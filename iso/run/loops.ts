/**
 * Runs that come back: the last point of a run with `to` stands for the fitting it meets. Where its dimensions lead close
 * enough (the line's tolerance, 3 mm unless said) the last leg takes up the miss and ends in the fitting's free port;
 * else the loop stays open and a stop says by how much. A branch port takes a run once; so does an open end.
 */
import type { Vec3 } from "../geometry/types";
import { LOOP_CLOSES_MM, STRAIGHT_RAD } from "../geometry/tolerances";
import { vecAngle, vecDistance, vecLength, vecNegate, vecSub, vecUnit } from "../geometry/vec3";
import { formatTerm } from "../units/format";
import { sentenceStart, type BuildContext } from "./build-context";
import type { LoopEnd, PlacedPoint, PlacedRun } from "./build-types";
import type { Item, UnitSystem } from "./document";
import { isBranchFitting } from "./edit";
import type { Leg, Loop } from "./model-types";

/** How far a loop may miss before it is a stop, mm, where the line does not say (common practice: under a root gap). */
const DEFAULT_TOLERANCE_MM = 3;

export interface Closed {
  readonly runs: readonly PlacedRun[];
  readonly loops: readonly Loop[];
}

/** The runs with their loops closed where they close; what does not is reported. */
export function closeLoops(runs: readonly PlacedRun[], ctx: BuildContext): Closed {
  if (runs.every((r) => r.run.to === undefined)) return { runs, loops: [] };
  const now = new Map(runs.map((r) => [r.run.id, r]));
  const taken = new Set<string>();
  const loops: Loop[] = [];
  for (const { run } of runs) {
    const placed = now.get(run.id);
    if (run.to === undefined || !placed) continue;
    const loop = closeLoop(placed, run.to, now, taken, ctx);
    if (loop) loops.push(loop);
  }
  return { runs: runs.map((r) => now.get(r.run.id) ?? r), loops };
}

type Now = Map<string, PlacedRun>;

function closeLoop(run: PlacedRun, to: string, now: Now, taken: Set<string>, ctx: BuildContext): Loop | null {
  const last = run.points[run.points.length - 1];
  const host = [...now.values()].find((r) => r.points.some((p) => p.point.id === to));
  const target = host?.points.find((p) => p.point.id === to);
  const name = run.label === "" ? "the main run" : run.label;
  if (!last || !run.legs[run.points.length - 1]) return null;
  const where = { pointId: last.point.id, runId: run.run.id };
  if (!host || !target || host.run.id === run.run.id) {
    ctx.report("loop-lost", "stop", `${sentenceStart(name)} comes back to a point that is not there: pick the fitting its last point meets, or let it end by itself.`, where);
    return null;
  }
  const port = freePort(target, taken);
  if (port === null) {
    ctx.report("loop-no-port", "stop", `${sentenceStart(name)} comes back to ${target.label}, where no free branch or open end is: put a tee or an outlet there, or let the run end by itself.`, where);
    return null;
  }
  if (port !== "branch") taken.add(target.uid);
  if (!STANDS_FOR_FITTING.has(last.point.item.kind)) {
    ctx.report("loop-item", "warning", `${sentenceStart(last.label)} stands for the fitting that ${name} comes back to: take its own item out, or put it on a point before.`, where);
  }
  const missMm = vecSub(last.position, target.position);
  const closes = vecLength(missMm) <= (ctx.settings.loopToleranceMm ?? DEFAULT_TOLERANCE_MM);
  reportMiss({ run, name, target, missMm, closes }, ctx);
  join(run, target, port, closes, now);
  return { runId: run.run.id, toPointId: to, missMm, closes };
}

const STANDS_FOR_FITTING: ReadonlySet<Item["kind"]> = new Set(["none", "end", "joint"]);

/** The port a run that comes back may take: the branch of a branch fitting, or the open side of a run's end. */
function freePort(target: PlacedPoint, taken: ReadonlySet<string>): LoopEnd["port"] | null {
  const { item } = target.point;
  if (isBranchFitting(item) && !(target.isFirst && target.branches.length > 0) && !(target.isLast && target.branches.length > 0)) {
    return target.branches.length < (item.kind === "cross" ? 2 : 1) ? "branch" : null;
  }
  const isOpen = STANDS_FOR_FITTING.has(item.kind) || item.kind === "flange" || item.kind === "valve" || isBranchFitting(item);
  if (!isOpen || taken.has(target.uid)) return null;
  return target.isFirst ? "in" : target.isLast ? "out" : null;
}

/** Puts the run's last point on the fitting and tells the fitting what comes in there. */
function join(run: PlacedRun, target: PlacedPoint, port: LoopEnd["port"], closes: boolean, now: Now): void {
  const lastIndex = run.points.length - 1;
  const leg = closes ? closedLeg(run.legs[lastIndex]!, target.position) : run.legs[lastIndex]!;
  const points = run.points.map((p, i): PlacedPoint => {
    if (i === lastIndex) return { ...p, position: leg.to, departure: leg.to, arriving: leg.direction, closesLoop: true };
    return i === lastIndex - 1 ? withLeaving(p, leg.direction) : p;
  });
  const loop: LoopEnd = { targetUid: target.uid, port, branchIndex: target.branches.length, closes };
  now.set(run.run.id, { ...run, points, legs: run.legs.map((l, i) => (i === lastIndex ? leg : l)), loop });
  const pipe = points[lastIndex]!.pipeOut;
  if (lastIndex === 0 && run.parentUid !== null) {
    edit(run.parentUid, now, (p) => ({ ...p, branches: p.branches.map((b) => (b.runId === run.run.id ? { ...b, direction: leg.direction } : b)) }));
  }
  edit(target.uid, now, (p) => {
    if (port === "branch") return { ...p, branches: [...p.branches, { runId: run.run.id, direction: vecNegate(leg.direction), pipe }] };
    if (!closes) return p;
    return opened(port === "in" ? { ...p, arriving: leg.direction, isFirst: false } : { ...p, leaving: vecNegate(leg.direction), isLast: false });
  });
}

function edit(uid: string, now: Now, change: (p: PlacedPoint) => PlacedPoint): void {
  for (const [id, r] of now) {
    if (r.points.some((p) => p.uid === uid)) now.set(id, { ...r, points: r.points.map((p) => (p.uid === uid ? change(p) : p)) });
  }
}

/** The last leg to where the fitting is. Its direction is kept as typed while the miss is less than shows. */
function closedLeg(leg: Leg, to: Vec3): Leg {
  const direction = vecDistance(leg.to, to) > LOOP_CLOSES_MM ? (vecUnit(vecSub(to, leg.from)) ?? leg.direction) : leg.direction;
  return { ...leg, to, lengthMm: vecDistance(leg.from, to), direction };
}

function withLeaving(p: PlacedPoint, leaving: Vec3): PlacedPoint {
  const turn = p.arriving ? vecAngle(p.arriving, leaving) : 0;
  return { ...p, leaving, turnRad: p.arriving === null || turn < STRAIGHT_RAD ? 0 : turn };
}

/** An end of a run that is one no more: an elbow where the line turns there, a plain weld where it goes straight on. */
function opened(p: PlacedPoint): PlacedPoint {
  const turn = p.arriving && p.leaving ? vecAngle(p.arriving, p.leaving) : 0;
  const { item, places } = p.point;
  const turnRad = turn < STRAIGHT_RAD ? 0 : turn;
  if (!STANDS_FOR_FITTING.has(item.kind)) return { ...p, turnRad };
  const place = places.in ?? places.out ?? (item.kind === "end" && item.goes === "field-weld" ? ("field" as const) : undefined);
  const point = { ...p.point, item: { kind: turnRad > 0 ? "none" : "joint" } as const, places: place === undefined ? places : { ...places, in: place } };
  return { ...p, point, turnRad };
}

interface Miss { readonly run: PlacedRun; readonly name: string; readonly target: PlacedPoint; readonly missMm: Vec3; readonly closes: boolean }

function reportMiss({ run, name, target, missMm, closes }: Miss, ctx: BuildContext): void {
  const where = { pointId: run.points[run.points.length - 1]?.point.id ?? null, runId: run.run.id };
  const words = missWords(missMm, ctx.units);
  if (!closes) {
    ctx.report("loop-open", "stop", `Loop does not close by ${words}: ${name} ends there beside ${target.label}. Check ${whatToCheck(run, missMm)}, and those of the line between its two ends.`, where);
  } else if (vecLength(missMm) > LOOP_CLOSES_MM) {
    ctx.report("loop-taken-up", "note", `${sentenceStart(name)} comes back to ${target.label} with a miss of ${words}: its last leg takes it up.`, where);
  }
}

const WAYS = [["E", "W", "east-west"], ["N", "S", "north-south"], ["U", "D", "vertical"]] as const;

/** "1/4 in E, 2 in N": how far beside its fitting a loop ends. */
export function missWords(missMm: Vec3, units: UnitSystem): string {
  const unit = units === "metric" ? "mm" : "in";
  const parts = WAYS.flatMap(([plus, minus], i) => {
    const mm = missMm[i as 0 | 1 | 2];
    return Math.abs(mm) > LOOP_CLOSES_MM ? [`${formatTerm(Math.abs(mm), units)} ${unit} ${mm > 0 ? plus : minus}`] : [];
  });
  return parts.length === 0 ? `0 ${unit}` : parts.join(", ");
}

/** The points of the run whose legs go the ways the loop misses. */
function whatToCheck(run: PlacedRun, missMm: Vec3): string {
  const parts = WAYS.flatMap(([, , word], i) => {
    const axis = i as 0 | 1 | 2;
    if (Math.abs(missMm[axis]) <= LOOP_CLOSES_MM) return [];
    const rows = run.points.flatMap((p, row) => (Math.abs(run.legs[row]?.direction[axis] ?? 0) > STRAIGHT_RAD ? [String(row + 1)] : []));
    return [rows.length === 0 ? `the ${word} dimensions` : `the ${word} dimensions of point${rows.length === 1 ? "" : "s"} ${rows.join(", ")}`];
  });
  return parts.join(" and ");
}
