/**
 * First pass: puts every point of every run in space. The main run starts at the datum (0, 0, 0), a branch at the centre
 * of the fitting it leaves from; sizes change after reducers, and an eccentric reducer shifts the centre line after it.
 */
import { STRAIGHT_RAD } from "../geometry/tolerances";
import type { Vec3 } from "../geometry/types";
import { VEC_ZERO, vecAdd, vecAngle, vecDistance, vecReject, vecScale, vecUnit } from "../geometry/vec3";
import { returnKey } from "../catalogue/keys";
import { pipeOdMm } from "../catalogue/pipe";
import type { BuildContext } from "./build-context";
import { sentenceStart } from "./build-context";
import type { BranchHead, PlacedPoint, PlacedRun, Service } from "./build-types";
import { firstService, pipeOfService, serviceAfter } from "./service";
import { axisVector } from "./axes";
import type { Pipe, Point, Run, RunDocument } from "./document";
import type { Leg } from "./model-types";
import { offsetPlace } from "./offset-place";
import { legVerification } from "./verify-legs";

interface RawPoint {
  uid: string;
  point: Point;
  label: string;
  position: Vec3;
  departure: Vec3;
  pipeIn: Pipe;
  pipeOut: Pipe;
  serviceIn: Service;
  serviceOut: Service;
}

interface RawRun {
  run: Run;
  label: string;
  start: RawPoint | null;
  branchIndex: number;
  pipe: Pipe;
  points: RawPoint[];
  /** Unit directions of the legs, index of the point each ends at; null where it has no length. */
  directions: (Vec3 | null)[];
}

/** Places all runs, main run first and each branch after the run it leaves from, in flow order. */
export function placeRuns(document: RunDocument, ctx: BuildContext): PlacedRun[] {
  const raw = rawRuns(document, ctx);
  const branchesOf = new Map<string, RawRun[]>();
  for (const r of raw) {
    if (r.start) branchesOf.set(r.start.uid, [...(branchesOf.get(r.start.uid) ?? []), r]);
  }
  return raw.map((r) => placedRun(r, branchesOf, ctx));
}

function rawRuns(document: RunDocument, ctx: BuildContext): RawRun[] {
  const used = new Map<string, number>();
  const byId = new Map<string, RawPoint>();
  const branchCount = new Map<string, number>();
  const out: RawRun[] = [];
  const [main, ...branches] = document.runs;
  if (main) out.push(placeRaw(main, "", null, 0, ctx, used, byId));
  let waiting = branches.map((run, i) => ({ run, label: branchLabel(run, i) }));
  while (waiting.length > 0) {
    const ready = waiting.filter(({ run }) => run.from !== null && byId.has(run.from));
    const next = ready.length > 0 ? inFlowOrder(ready, byId) : waiting;
    waiting = ready.length > 0 ? waiting.filter((w) => !ready.includes(w)) : [];
    for (const { run, label } of next) {
      const start = (run.from !== null && byId.get(run.from)) || null;
      if (!start) {
        ctx.report("branch-lost", "stop", `${sentenceStart(label)} leaves from a point that is not there: pick the tee or outlet it leaves from, or remove it.`, { pointId: null, runId: run.id });
      }
      const count = start ? (branchCount.get(start.uid) ?? 0) : 0;
      if (start) branchCount.set(start.uid, count + 1);
      out.push(placeRaw(run, label, start, count, ctx, used, byId));
    }
  }
  return out;
}

/** "branch B1", or "branch 2" when it has no name. */
function branchLabel(run: Run, index: number): string {
  const name = run.name.trim();
  return /^branch\b/i.test(name) ? name : `branch ${name === "" ? index + 1 : name}`;
}

/** Branches in the order in which flow meets the points they leave from (points were entered in flow order). */
function inFlowOrder<T extends { run: Run }>(ready: T[], byId: Map<string, RawPoint>): T[] {
  const order = new Map([...byId.keys()].map((id, i) => [id, i]));
  return [...ready].sort((a, b) => (order.get(a.run.from ?? "") ?? 0) - (order.get(b.run.from ?? "") ?? 0));
}

function placeRaw(
  run: Run, label: string, start: RawPoint | null, branchIndex: number, ctx: BuildContext,
  used: Map<string, number>, byId: Map<string, RawPoint>,
): RawRun {
  const result: RawRun = { run, label, start, branchIndex, pipe: runPipe(run, start, ctx), points: [], directions: [] };
  let base: Vec3 = start?.position ?? VEC_ZERO;
  let service = firstService(run, start, result.pipe, start === null ? run.points[0] : undefined, ctx.settings);
  let pipe = pipeOfService(result.pipe, service);
  run.points.forEach((point, index) => {
    const times = used.get(point.id) ?? 0;
    used.set(point.id, times + 1);
    const name = label === "" ? `point ${index + 1}` : `point ${index + 1} of ${label}`;
    if (times > 0) ctx.report("duplicate-point", "stop", `${sentenceStart(name)} repeats the id of an earlier point: remove it and enter it afresh.`, { pointId: point.id, runId: run.id });
    const { position, direction } = offsetPlace(base, point.offset);
    const hasLeg = index > 0 || start !== null;
    result.directions.push(hasLeg ? direction : null);
    const serviceOut = serviceAfter(service, point);
    const pipeOut = pipeOfService(pipeAfter(pipe, point), serviceOut);
    const flow = (hasLeg ? direction : null) ?? lastOf(result.directions) ?? nextDirection(run.points[index + 1]);
    const departure = vecAdd(position, centreShift(pipe, pipeOut, point, flow, ctx));
    const raw: RawPoint = { uid: times === 0 ? point.id : `${point.id}~${times + 1}`, point, label: name, position, departure, pipeIn: pipe, pipeOut, serviceIn: service, serviceOut };
    result.points.push(raw);
    if (times === 0) byId.set(point.id, raw);
    base = departure;
    [pipe, service] = [pipeOut, serviceOut];
  });
  return result;
}

/** Pipe of a run: its own, or the branch size of the fitting it leaves from in the line's schedule and material. */
function runPipe(run: Run, start: RawPoint | null, ctx: BuildContext): Pipe {
  if (run.pipe) return run.pipe;
  if (!start) return ctx.settings.pipe;
  const item = start.point.item;
  const branch = item.kind === "tee" || item.kind === "cross" || item.kind === "outlet" || item.kind === "stub-in" ? item.branchNps : null;
  return { ...start.pipeIn, nps: branch ?? start.pipeIn.nps };
}

function pipeAfter(pipe: Pipe, point: Point): Pipe {
  if (point.item.kind !== "reducer") return pipe;
  return { ...pipe, nps: point.item.toNps, schedule: point.item.toSchedule ?? pipe.schedule };
}

function nextDirection(next: Point | undefined): Vec3 | null {
  return next && next.offset.kind !== "absolute" ? offsetPlace(VEC_ZERO, next.offset).direction : null;
}

function lastOf(directions: readonly (Vec3 | null)[]): Vec3 | null {
  for (let i = directions.length - 1; i >= 0; i--) if (directions[i]) return directions[i] ?? null;
  return null;
}

/** How far the centre line leaves a point beside where it came in: at an eccentric reducer, and across a return. */
function centreShift(before: Pipe, after: Pipe, point: Point, flow: Vec3 | null, ctx: BuildContext): Vec3 {
  const { item } = point;
  if (item.kind !== "return") return eccentricShift(before, after, point, flow, ctx);
  const side = flow && vecUnit(vecReject(axisVector(item.toward), flow));
  const across = ctx.peek(returnKey(item.radius, "centres", before.nps));
  return side && across !== null ? vecScale(side, across) : VEC_ZERO;
}

/**
 * How far an eccentric reducer moves the centre line: half the difference of the outside diameters, towards its flat
 * side when the size goes down and away from it when it goes up (the flat sides stay in one plane).
 */
function eccentricShift(before: Pipe, after: Pipe, point: Point, flow: Vec3 | null, ctx: BuildContext): Vec3 {
  const item = point.item;
  if (item.kind !== "reducer" || item.shape !== "eccentric" || item.flat === null || !flow) return VEC_ZERO;
  const side = vecUnit(vecReject(axisVector(item.flat), flow));
  const [od1, od2] = [pipeOdMm(before.nps, ctx.units), pipeOdMm(after.nps, ctx.units)];
  if (!side || od1 === null || od2 === null) return VEC_ZERO;
  return [side[0] * (od1 - od2) / 2, side[1] * (od1 - od2) / 2, side[2] * (od1 - od2) / 2];
}

function placedRun(r: RawRun, branchesOf: Map<string, RawRun[]>, ctx: BuildContext): PlacedRun {
  const count = r.points.length;
  const before: (Vec3 | null)[] = [];
  const after: (Vec3 | null)[] = new Array<Vec3 | null>(count).fill(null);
  r.directions.forEach((d, i) => before.push(d ?? before[i - 1] ?? null));
  for (let i = count - 2; i >= 0; i--) after[i] = r.directions[i + 1] ?? after[i + 1] ?? null;
  const points = r.points.map((p, index): PlacedPoint => {
    const hasLegIn = index > 0 || r.start !== null;
    const arriving = hasLegIn ? (before[index] ?? after[index] ?? null) : null;
    const leaving = index < count - 1 ? (after[index] ?? before[index] ?? null) : null;
    const turn = arriving && leaving ? vecAngle(arriving, leaving) : 0;
    return {
      uid: p.uid, point: p.point, runId: r.run.id, index, label: p.label, position: p.position, departure: p.departure,
      arriving, leaving, turnRad: turn < STRAIGHT_RAD ? 0 : turn, isFirst: !hasLegIn, isLast: index === count - 1,
      boltedIn: false, boltedOut: false, pipeIn: p.pipeIn, pipeOut: p.pipeOut,
      serviceIn: p.serviceIn, serviceOut: p.serviceOut, branches: (branchesOf.get(p.uid) ?? []).map(branchHead),
    };
  });
  return {
    run: r.run, label: r.label, points, legs: points.map((p, i) => legTo(p, r, i, ctx)),
    parentUid: r.start?.uid ?? null, branchIndex: r.branchIndex,
  };
}

function branchHead(r: RawRun): BranchHead {
  return { runId: r.run.id, direction: r.directions.find((d) => d !== null) ?? null, pipe: r.pipe };
}

function legTo(p: PlacedPoint, r: RawRun, index: number, ctx: BuildContext): Leg | null {
  const from = index === 0 ? r.start : (r.points[index - 1] ?? null);
  if (!from) return null;
  const start = index === 0 ? from.position : from.departure;
  const lengthMm = vecDistance(start, p.position);
  return {
    id: p.uid, runId: r.run.id, fromPointId: from.point.id, toPointId: p.point.id, from: start, to: p.position, lengthMm,
    direction: r.directions[index] ?? p.arriving ?? [1, 0, 0], nps: p.pipeIn.nps, provenance: p.point.provenance,
    unverified: legVerification(p.point, lengthMm, ctx.units).unverified,
  };
}
