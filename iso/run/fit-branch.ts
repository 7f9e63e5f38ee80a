/** Tees, outlets and stub-ins, with the side each of their branch runs starts from. */
import type { Vec3 } from "../geometry/types";
import { vecAddScaled, vecAngle, vecDot, vecNegate } from "../geometry/vec3";
import { pipeOdMm, pipeWall } from "../catalogue/pipe";
import { outletKey, socketKey, teeBranchKey, teeRunKey } from "../catalogue/keys";
import { STRAIGHT_RAD, WELD_MISMATCH_RAD } from "../geometry/tolerances";
import { formatAngleDeg } from "../units/format";
import { naturalSide } from "./axes";
import { plainTerm, sentenceStart, takeOutTerm, type BuildContext } from "./build-context";
import type { Fitting, PlacedPoint, Side } from "./build-types";
import { NPS_SIZES, type Item, type Nps } from "./document";
import {
  bareSide, branchWeldSide, buttSide, endSide, fittingOf, flowAt, makeComponent, makeJoint, port, reachOf, socketSide, THROUGH, unconfirmedOf,
} from "./fit-common";
import type { Component, CutTerm, Port } from "./model-types";
import { SOCKET_CLASS, sizePairText } from "./words";

type TeeItem = Extract<Item, { kind: "tee" }>;
type Way = "in" | "out" | "branch";

const RIGHT = Math.PI / 2;

/** Findings every branch fitting shares: too many branches, a branch larger than the run, a branch not square to it. */
function checkBranch(p: PlacedPoint, branchNps: Nps, most: number, ctx: BuildContext): void {
  const where = { pointId: p.point.id, runId: p.runId };
  if (p.branches.length > most) ctx.report("branches-too-many", "stop", `${sentenceStart(p.label)} has more branches than its fitting takes: give each its own tee or outlet.`, where);
  if (p.branches.length === 0) ctx.report("branch-missing", "warning", `${sentenceStart(p.label)} has a branch fitting without a branch: add the branch's points, or take the fitting out.`, where);
  if (NPS_SIZES.indexOf(branchNps) > NPS_SIZES.indexOf(p.pipeIn.nps)) {
    ctx.report("branch-larger", "stop", `${sentenceStart(p.label)}: the branch (NPS ${branchNps}) is larger than the run (NPS ${p.pipeIn.nps}). Turn the tee round, or reduce after it.`, where);
  }
  for (const branch of p.branches) {
    if (branch.pipe.nps !== branchNps) ctx.report("branch-size", "stop", `${sentenceStart(p.label)}: the branch pipe is NPS ${branch.pipe.nps} but the fitting's branch is NPS ${branchNps}. Make them equal, or put a reducer in the branch.`, where);
  }
}

/** A tee: straight on, or turning the run (then the arriving or the leaving pipe stands on the branch port). */
export function fitTee(p: PlacedPoint, item: TeeItem, ctx: BuildContext): Fitting {
  const branchNps = item.branchNps ?? p.pipeIn.nps;
  checkBranch(p, branchNps, p.isFirst || p.isLast ? 2 : 1, ctx);
  const ways = teeWays(p, ctx);
  const socket = item.ends === "socket";
  const words = sizePairText(p.pipeIn.nps, branchNps, ctx.units);
  const run = ctx.takeOut(socket ? socketKey("tee", SOCKET_CLASS, p.pipeIn.nps) : teeRunKey(p.pipeIn.nps, branchNps), `${socket ? "socket tee" : "tee"} run take-out, ${words}`, p);
  const branch = ctx.takeOut(socket ? socketKey("tee", SOCKET_CLASS, p.pipeIn.nps) : teeBranchKey(p.pipeIn.nps, branchNps), `${socket ? "socket tee" : "tee"} branch take-out, ${words}`, p);
  const termOf = (isBranch: boolean): CutTerm => takeOutTerm(isBranch ? "tee branch take-out" : "tee run take-out", isBranch ? branch : run, p.uid);
  const side = (way: Way): Side => {
    const given = { terms: [termOf(ways.stub === way)], componentId: p.uid, mismatchRad: ways.mismatch[way] };
    return socket ? socketSide(p, way, ctx, given) : buttSide(p, way, ctx, given);
  };
  const ports: Port[] = (["in", "out", "branch"] as const).map((way) =>
    port(way, p.position, ways.directions[way], -termOf(ways.stub === way).valueMm, ways.stub === way ? branchNps : p.pipeIn.nps));
  const component = makeComponent(p, p.pipeIn, {
    kind: socket ? "socket-tee" : branchNps === p.pipeIn.nps ? "tee" : "reducing-tee", ends: item.ends, nps2: branchNps === p.pipeIn.nps ? null : branchNps,
    schedule: socket ? null : p.pipeIn.schedule, ports, source: run.source, unconfirmedKey: unconfirmedOf(run, branch),
    description: socket ? `Tee, socket-weld, class ${SOCKET_CLASS}` : branchNps === p.pipeIn.nps ? "Tee, butt-weld" : "Reducing tee, butt-weld",
  });
  return fittingOf({
    components: [component], in: side("in"), out: side("out"),
    branches: p.branches.map((_, i) => (i === 0 ? side("branch") : i === 1 && ways.spare ? side(ways.spare) : endSide())),
  });
}

interface TeeWays {
  readonly directions: Readonly<Record<Way, Vec3>>;
  /** Which way is the tee's own branch port. */
  readonly stub: Way;
  /** The way a second branch run takes, at the end of a run. */
  readonly spare: "in" | "out" | null;
  readonly mismatch: Readonly<Record<Way, number>>;
}

/** Finds the two ways that lie in one line; the third is the branch port. */
function teeWays(p: PlacedPoint, ctx: BuildContext): TeeWays {
  const flow = flowAt(p);
  const spare = p.isLast ? "out" : p.isFirst ? "in" : null;
  const second = p.branches[1]?.direction ?? null;
  const branch = p.branches[0]?.direction ?? null;
  const directions: Record<Way, Vec3> = {
    in: (p.arriving && vecNegate(p.arriving)) ?? (spare === "in" ? second : null) ?? vecNegate(flow),
    out: p.leaving ?? (spare === "out" ? second : null) ?? flow,
    branch: branch ?? naturalSide(flow),
  };
  if (!branch && p.turnRad > RIGHT / 2) directions.branch = flow;
  const pairs: readonly (readonly [Way, Way, Way])[] = [["in", "out", "branch"], ["in", "branch", "out"], ["branch", "out", "in"]];
  const straight = (pair: readonly [Way, Way, Way]) => vecDot(directions[pair[0]], directions[pair[1]]);
  const best = pairs.reduce((a, b) => (straight(b) < straight(a) - STRAIGHT_RAD ? b : a));
  const bend = Math.PI - vecAngle(directions[best[0]], directions[best[1]]);
  const lean = Math.abs(RIGHT - vecAngle(directions[best[2]], directions[best[1]]));
  reportLean(p, Math.max(bend, lean), ctx);
  const small = (rad: number) => (rad < STRAIGHT_RAD ? 0 : rad);
  const mismatch: Record<Way, number> = { in: 0, out: 0, branch: 0 };
  mismatch[best[1]] = small(bend);
  mismatch[best[2]] = small(lean);
  return { directions, stub: best[2], spare, mismatch };
}

function reportLean(p: PlacedPoint, rad: number, ctx: BuildContext): void {
  const where = { pointId: p.point.id, runId: p.runId };
  if (rad > WELD_MISMATCH_RAD) {
    ctx.report("branch-angle", "stop", `${sentenceStart(p.label)}: the pipes miss the square of the fitting by ${formatAngleDeg(rad)}. Correct the offsets, or turn the line with an elbow. Over 3° needs the engineer's permission.`, where);
  } else if (rad >= STRAIGHT_RAD) {
    ctx.report("branch-mismatch", "note", `${sentenceStart(p.label)}: ${formatAngleDeg(rad)} of mismatch is taken up at the branch weld.`, where);
  }
}

/** An outlet welded on the run: it stands half the run's OD plus its height off the centre line. */
export function fitOutlet(p: PlacedPoint, branchNps: Nps, ctx: BuildContext): Fitting {
  checkBranch(p, branchNps, 1, ctx);
  const halfOd = (pipeOdMm(p.pipeIn.nps, ctx.units) ?? 0) / 2;
  const height = ctx.takeOut(outletKey(branchNps, p.pipeIn.nps), `outlet height, ${sizePairText(p.pipeIn.nps, branchNps, ctx.units).replace(" x ", " run, branch ")}`, p);
  const terms = [plainTerm("take-out", "half the run's OD", halfOd, p.uid), takeOutTerm("outlet height", height, p.uid)];
  const direction = branchDirection(p, ctx);
  const component = makeComponent(p, p.pipeIn, {
    kind: "outlet", ends: "butt", nps2: branchNps, ports: [
      port("in", p.position, vecNegate(direction), -halfOd, branchNps), port("branch", p.position, direction, reachOf(terms), branchNps),
    ],
    source: height.source, unconfirmedKey: unconfirmedOf(height), description: "Outlet, butt-weld", weightSource: "not known",
  });
  const lean = direction ? branchLean(p, direction) : 0;
  const side = buttSide(p, "branch", ctx, { terms, componentId: p.uid, mismatchRad: lean });
  return onPipe(p, component, `${p.uid}:header`, p.branches.length === 0 ? (p.point.places.branch ?? "shop") : "shop", halfOd, direction, [side], ctx);
}

/**
 * A branch pipe set on the run. Its blank reaches down to the ears of the saddle: sqrt(Rh² - r²) from the run's centre
 * line, Rh the run's outside radius and r the branch's inside radius (set-on, common practice).
 */
export function fitStubIn(p: PlacedPoint, branchNps: Nps, ctx: BuildContext): Fitting {
  checkBranch(p, branchNps, 1, ctx);
  const header = (pipeOdMm(p.pipeIn.nps, ctx.units) ?? 0) / 2;
  const wall = pipeWall(branchNps, (p.branches[0]?.pipe ?? p.pipeIn).schedule, ctx.units);
  const bore = wall ? wall.odMm / 2 - wall.wallMm : (pipeOdMm(branchNps, ctx.units) ?? 0) / 2;
  const ears = Math.sqrt(Math.max(header * header - bore * bore, 0));
  const direction = branchDirection(p, ctx);
  const component = makeComponent(p, p.pipeIn, {
    kind: "stub-in", ends: "butt", nps2: branchNps, ports: [port("branch", p.position, direction, ears, branchNps)],
    description: "Stub-in, branch pipe set on", weightKg: 0, weightSource: "in the branch pipe", source: "geometry of the saddle",
  });
  const terms = [plainTerm("take-out", "run centre to ears of the saddle", ears, p.uid, "geometry of the saddle")];
  const side = branchWeldSide(p, ctx, { terms, componentId: p.uid, mismatchRad: 0 });
  return onPipe(p, component, null, "shop", header, direction, [side], ctx);
}

function branchDirection(p: PlacedPoint, ctx: BuildContext): Vec3 {
  const direction = p.branches[0]?.direction ?? null;
  if (!direction) return naturalSide(flowAt(p));
  reportLean(p, branchLean(p, direction), ctx);
  return direction;
}

function branchLean(p: PlacedPoint, direction: Vec3): number {
  const lean = Math.abs(RIGHT - vecAngle(direction, flowAt(p)));
  return lean < STRAIGHT_RAD ? 0 : lean;
}

/** Puts a branch part on the run's pipe, which runs through uncut; at the end of a run the pipe just ends there. */
function onPipe(
  p: PlacedPoint, component: Component, key: string | null, place: "shop" | "field" | "field-fit", halfOd: number, direction: Vec3, sides: readonly Side[], ctx: BuildContext,
): Fitting {
  if (p.turnRad > 0) {
    ctx.report("branch-on-turn", "stop", `${sentenceStart(p.label)} has its branch at a change of direction (${formatAngleDeg(p.turnRad)}): move it to straight pipe.`, { pointId: p.point.id, runId: p.runId });
  }
  const nps = component.nps2 ?? component.nps;
  const joint = key === null ? null : makeJoint(p, {
    key, kind: "branch", place, a: null, b: p.uid, position: vecAddScaled(p.position, direction, halfOd), direction, nps,
  });
  const ends = p.isFirst || p.isLast ? endSide() : p.turnRad > 0 ? bareSide([], p.uid) : THROUGH;
  return fittingOf({
    components: [component], riders: [{ componentId: p.uid, joint }], in: ends, out: p.isFirst || p.isLast ? ends : p.turnRad > 0 ? ends : THROUGH,
    branches: p.branches.map((_, i) => sides[i] ?? endSide()),
  });
}

