/** Crosses: the run straight on and two branches opposite each other; at a run's end up to three branch runs. */
import type { Vec3 } from "../geometry/types";
import { vecAngle, vecDot, vecNegate, vecReject, vecUnit } from "../geometry/vec3";
import { crossBranchKey, crossRunKey } from "../catalogue/keys";
import { STRAIGHT_RAD } from "../geometry/tolerances";
import { naturalSide } from "./axes";
import { sentenceStart, takeOutTerm, type BuildContext } from "./build-context";
import type { Fitting, PlacedPoint, Side } from "./build-types";
import type { Item } from "./document";
import { branchMake, checkBranch, reportLean } from "./fit-branch";
import { endedSide, endSide, fittingOf, flowAt, makeComponent, port, unconfirmedOf } from "./fit-common";
import type { Port } from "./model-types";
import { sizePairText } from "./words";

type Way = "in" | "out" | "branch" | "branch-2";
const WAYS: readonly Way[] = ["in", "out", "branch", "branch-2"];

/** A pipe that comes to the cross, with the port it takes. */
interface Stub {
  readonly way: Way;
  readonly mismatchRad: number;
}

export function fitCross(p: PlacedPoint, item: Extract<Item, { kind: "cross" }>, ctx: BuildContext): Fitting {
  const branchNps = item.branchNps ?? p.pipeIn.nps;
  checkBranch(p, branchNps, p.isFirst || p.isLast ? 3 : 2, ctx);
  const directions = crossPorts(p);
  const taken = new Set<Way>();
  const stubOf = (direction: Vec3): Stub => takePort(p, direction, directions, taken, ctx);
  const inward = p.arriving ? stubOf(vecNegate(p.arriving)) : null;
  const onward = p.leaving ? stubOf(p.leaving) : null;
  const branches = p.branches.map((branch) => (branch.direction ? stubOf(branch.direction) : null));
  const words = sizePairText(p.pipeIn.nps, branchNps, ctx.units);
  const make = branchMake("cross", item.ends, p, ctx);
  const run = ctx.takeOut(make.key ?? crossRunKey(p.pipeIn.nps, branchNps), `${make.word} run take-out, ${words}`, p);
  const branch = ctx.takeOut(make.key ?? crossBranchKey(p.pipeIn.nps, branchNps), `${make.word} branch take-out, ${words}`, p);
  const isBranch = (way: Way) => way === "branch" || way === "branch-2";
  const side = (name: Way, stub: Stub | null): Side => {
    if (!stub) return endSide();
    const own = isBranch(stub.way);
    const term = takeOutTerm(own ? "cross branch take-out" : "cross run take-out", own ? branch : run, p.uid);
    return endedSide(item.ends, p, name, ctx, { terms: [term], componentId: p.uid, mismatchRad: stub.mismatchRad }, own ? branchNps : p.pipeIn.nps);
  };
  const ports = WAYS.map((way): Port => port(way, p.position, directions[way], isBranch(way) ? branch.mm : run.mm, isBranch(way) ? branchNps : p.pipeIn.nps));
  const component = makeComponent(p, p.pipeIn, {
    kind: item.ends === "butt" ? "cross" : "socket-cross", ends: item.ends, nps2: branchNps === p.pipeIn.nps ? null : branchNps,
    schedule: item.ends === "butt" ? p.pipeIn.schedule : null, ports, source: run.source, unconfirmedKey: unconfirmedOf(run, branch),
    description: make.description ?? (branchNps === p.pipeIn.nps ? "Cross, butt-weld" : "Reducing cross, butt-weld"),
  });
  const spare: readonly Way[] = ["branch", "branch-2", p.isLast ? "out" : "in"];
  return fittingOf({
    components: [component], in: side("in", inward), out: side("out", onward),
    branches: p.branches.map((_, i) => (spare[i] ? side(spare[i], branches[i] ?? null) : endSide())),
  });
}

/** Where the four ports look: the run's along the arriving pipe, the branches' along the first pipe that stands across it. */
function crossPorts(p: PlacedPoint): Record<Way, Vec3> {
  const flow = flowAt(p);
  const others = [p.leaving, ...p.branches.map((b) => b.direction)];
  const across = others.find((d) => d !== null && Math.abs(vecDot(d, flow)) < Math.SQRT1_2);
  const side = (across && vecUnit(vecReject(across, flow))) ?? naturalSide(flow);
  return { in: vecNegate(flow), out: flow, branch: side, "branch-2": vecNegate(side) };
}

/** The port nearest a pipe's direction; each takes one pipe. */
function takePort(p: PlacedPoint, direction: Vec3, ports: Readonly<Record<Way, Vec3>>, taken: Set<Way>, ctx: BuildContext): Stub {
  const way = WAYS.reduce((a, b) => (vecAngle(ports[b], direction) < vecAngle(ports[a], direction) ? b : a));
  if (taken.has(way)) {
    ctx.report("cross-port", "stop", `${sentenceStart(p.label)}: two pipes leave the cross the same way. Give each its own side.`, { pointId: p.point.id, runId: p.runId });
  }
  taken.add(way);
  const off = vecAngle(ports[way], direction);
  reportLean(p, off, ctx);
  return { way, mismatchRad: off < STRAIGHT_RAD ? 0 : off };
}
