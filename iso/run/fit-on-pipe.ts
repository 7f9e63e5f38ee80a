/** Outlets and stub-ins: branches that leave the run's pipe without cutting it through. */
import type { Vec3 } from "../geometry/types";
import { vecAddScaled, vecAngle, vecNegate } from "../geometry/vec3";
import { outletKey } from "../catalogue/keys";
import { pipeOdMm, pipeWall } from "../catalogue/pipe";
import { STRAIGHT_RAD } from "../geometry/tolerances";
import { formatAngleDeg, formatTerm } from "../units/format";
import { naturalSide } from "./axes";
import { plainTerm, sentenceStart, takeOutTerm, type BuildContext } from "./build-context";
import type { Fitting, PlacedPoint, Rider, Side } from "./build-types";
import type { Item, Nps } from "./document";
import { checkBranch, reportLean } from "./fit-branch";
import { bareSide, branchWeldSide, endedSide, endSide, fittingOf, flowAt, makeComponent, makeJoint, port, reachOf, THROUGH, unconfirmedOf } from "./fit-common";
import type { Component } from "./model-types";
import { forgedClass, sizePairText } from "./words";

type OutletItem = Extract<Item, { kind: "outlet" }>;
type StubItem = Extract<Item, { kind: "stub-in" }>;

const RIGHT = Math.PI / 2;

/**
 * An outlet welded on the run: it stands half the run's OD plus its height off the centre line. A socket one is measured
 * to the socket's bottom, a threaded one to its end; no table was read for those two, so the shop measures one.
 */
export function fitOutlet(p: PlacedPoint, item: OutletItem, ctx: BuildContext): Fitting {
  const { branchNps } = item;
  const ends = item.ends ?? "butt";
  checkBranch(p, branchNps, 1, ctx);
  const halfOd = (pipeOdMm(p.pipeIn.nps, ctx.units) ?? 0) / 2;
  const words = sizePairText(p.pipeIn.nps, branchNps, ctx.units).replace(" x ", " run, branch ");
  const height = ctx.takeOut(outletKey(branchNps, p.pipeIn.nps, ends), `${ends === "butt" ? "" : `${ends} `}outlet height, ${words}`, p);
  const terms = [plainTerm("take-out", "half the run's OD", halfOd, p.uid), takeOutTerm("outlet height", height, p.uid)];
  const direction = branchDirection(p, ctx);
  const component = makeComponent(p, p.pipeIn, {
    kind: "outlet", ends, nps2: branchNps, ports: [
      port("in", p.position, vecNegate(direction), -halfOd, branchNps), port("branch", p.position, direction, reachOf(terms), branchNps),
    ],
    source: height.source, unconfirmedKey: unconfirmedOf(height), description: outletWords(item, ctx), weightSource: "not known",
  });
  const side = endedSide(ends, p, "branch", ctx, { terms, componentId: p.uid, mismatchRad: branchLean(p, direction) }, branchNps);
  const joint = makeJoint(p, {
    key: `${p.uid}:header`, kind: "branch", place: p.branches.length === 0 ? (p.point.places.branch ?? "shop") : "shop", a: null, b: p.uid,
    position: vecAddScaled(p.position, direction, halfOd), direction, nps: branchNps,
  });
  return onPipe(p, [component], [{ componentId: p.uid, joint }], [side], ctx);
}

function outletWords(item: OutletItem, ctx: BuildContext): string {
  const ends = item.ends ?? "butt";
  const made = ends === "butt" ? "butt-weld" : `${ends === "socket" ? "socket-weld" : "threaded"}, class ${forgedClass(ctx.settings, ends)}`;
  return `Outlet, ${made}${item.set === "in" ? ", set in" : ""}`;
}

/**
 * How far from the run's centre line a branch pipe reaches at the ears of its saddle: sqrt(Rh² - r²), Rh the run's outside
 * radius; r the branch's inside radius when it is set on, its outside radius when it is set into the run (common practice).
 */
export function saddleReachMm(headerOdMm: number, branchOdMm: number, branchWallMm: number, set: "on" | "in"): number {
  const r = set === "in" ? branchOdMm / 2 : branchOdMm / 2 - branchWallMm;
  return Math.sqrt(Math.max((headerOdMm / 2) ** 2 - r * r, 0));
}

/** A branch pipe welded to the run, set on it or into it, with its pad where one is given. */
export function fitStubIn(p: PlacedPoint, item: StubItem, ctx: BuildContext): Fitting {
  const { branchNps } = item;
  const set = item.set ?? "on";
  checkBranch(p, branchNps, 1, ctx);
  const header = pipeOdMm(p.pipeIn.nps, ctx.units) ?? 0;
  const wall = pipeWall(branchNps, (p.branches[0]?.pipe ?? p.pipeIn).schedule, ctx.units);
  const ears = saddleReachMm(header, wall?.odMm ?? pipeOdMm(branchNps, ctx.units) ?? 0, wall?.wallMm ?? 0, set);
  const direction = branchDirection(p, ctx);
  const component = makeComponent(p, p.pipeIn, {
    kind: "stub-in", ends: "butt", nps2: branchNps, ports: [port("branch", p.position, direction, ears, branchNps)],
    description: `Stub-in, branch pipe set ${set}`, weightKg: 0, weightSource: "in the branch pipe", source: "geometry of the saddle",
  });
  const terms = [plainTerm("take-out", "run centre to ears of the saddle", ears, p.uid, "geometry of the saddle")];
  const side = branchWeldSide(p, ctx, { terms, componentId: p.uid, mismatchRad: 0 });
  const riders: Rider[] = [{ componentId: p.uid, joint: null, at: p.position }];
  if (item.padMm === undefined) return onPipe(p, [component], riders, [side], ctx);
  const pad = padPart(p, branchNps, item.padMm, vecAddScaled(p.position, direction, header / 2), direction, ctx);
  const joint = makeJoint(p, { key: `${p.uid}:pad`, kind: "attachment", a: null, b: pad.id, position: pad.centre, direction, nps: branchNps });
  return onPipe(p, [component, pad], [...riders, { componentId: pad.id, joint }], [side], ctx);
}

/** The reinforcing pad around a stub-in; its outside diameter is the engineer's, its thickness too. */
function padPart(p: PlacedPoint, branchNps: Nps, padMm: number, centre: Vec3, direction: Vec3, ctx: BuildContext): Component {
  const branchOd = pipeOdMm(branchNps, ctx.units) ?? 0;
  if (padMm <= branchOd) {
    ctx.report("pad-small", "stop", `${sentenceStart(p.label)}: the pad's outside diameter is no larger than the branch. Give the engineer's.`, { pointId: p.point.id, runId: p.runId });
  }
  const unit = ctx.units === "metric" ? "mm" : "in";
  return makeComponent(p, p.pipeIn, {
    id: `${p.uid}.pad`, kind: "pad", nps2: branchNps, centre, ports: [port("branch", centre, direction, 0, branchNps)], radiusMm: padMm / 2,
    description: `Reinforcing pad, OD ${formatTerm(padMm, ctx.units)} ${unit}, thickness as the engineer says`, weightSource: "not known", source: "given with the stub-in",
  });
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

/** Puts branch parts on the run's pipe, which runs through uncut; at the end of a run the pipe just ends there. */
function onPipe(p: PlacedPoint, components: readonly Component[], riders: readonly Rider[], sides: readonly Side[], ctx: BuildContext): Fitting {
  if (p.turnRad > 0) {
    ctx.report("branch-on-turn", "stop", `${sentenceStart(p.label)} has its branch at a change of direction (${formatAngleDeg(p.turnRad)}): move it to straight pipe.`, { pointId: p.point.id, runId: p.runId });
  }
  const ends = p.isFirst || p.isLast ? endSide() : p.turnRad > 0 ? bareSide([], p.uid) : THROUGH;
  return fittingOf({ components, riders, in: ends, out: ends, branches: p.branches.map((_, i) => sides[i] ?? endSide()) });
}
