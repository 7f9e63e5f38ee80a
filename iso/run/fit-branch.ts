/** Tees, with the side each of their branch runs starts from, and the findings every branch fitting shares. */
import type { Vec3 } from "../geometry/types";
import { vecAngle, vecDot, vecNegate } from "../geometry/vec3";
import { socketKey, teeBranchKey, teeRunKey, threadedKey } from "../catalogue/keys";
import { STRAIGHT_RAD, WELD_MISMATCH_RAD } from "../geometry/tolerances";
import { formatAngleDeg } from "../units/format";
import { naturalSide } from "./axes";
import { sentenceStart, takeOutTerm, type BuildContext } from "./build-context";
import type { Fitting, PlacedPoint, Side } from "./build-types";
import { NPS_SIZES, type Item, type Nps } from "./document";
import { endedSide, endSide, fittingOf, flowAt, makeComponent, port, unconfirmedOf, type FittingEnds } from "./fit-common";
import type { CutTerm, Port } from "./model-types";
import { forgedClass, sizePairText } from "./words";

type TeeItem = Extract<Item, { kind: "tee" }>;
type Way = "in" | "out" | "branch";

const RIGHT = Math.PI / 2;

/** Findings every branch fitting shares: too many branches, a branch larger than the run, a branch not square to it. */
export function checkBranch(p: PlacedPoint, branchNps: Nps, most: number, ctx: BuildContext): void {
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
  const words = sizePairText(p.pipeIn.nps, branchNps, ctx.units);
  const make = branchMake("tee", item.ends, p, ctx);
  const run = ctx.takeOut(make.key ?? teeRunKey(p.pipeIn.nps, branchNps), `${make.word} run take-out, ${words}`, p);
  const branch = ctx.takeOut(make.key ?? teeBranchKey(p.pipeIn.nps, branchNps), `${make.word} branch take-out, ${words}`, p);
  const termOf = (isBranch: boolean): CutTerm => takeOutTerm(isBranch ? "tee branch take-out" : "tee run take-out", isBranch ? branch : run, p.uid);
  const side = (way: Way): Side => {
    const given = { terms: [termOf(ways.stub === way)], componentId: p.uid, mismatchRad: ways.mismatch[way] };
    return endedSide(item.ends, p, way, ctx, given, ways.stub === way ? branchNps : p.pipeIn.nps);
  };
  const ports: Port[] = (["in", "out", "branch"] as const).map((way) =>
    port(way, p.position, ways.directions[way], -termOf(ways.stub === way).valueMm, ways.stub === way ? branchNps : p.pipeIn.nps));
  const isStraight = branchNps === p.pipeIn.nps;
  const component = makeComponent(p, p.pipeIn, {
    kind: item.ends !== "butt" ? "socket-tee" : isStraight ? "tee" : "reducing-tee", ends: item.ends, nps2: isStraight ? null : branchNps,
    schedule: item.ends === "butt" ? p.pipeIn.schedule : null, ports, source: run.source, unconfirmedKey: unconfirmedOf(run, branch),
    description: make.description ?? (isStraight ? "Tee, butt-weld" : "Reducing tee, butt-weld"),
  });
  return fittingOf({
    components: [component], in: side("in"), out: side("out"),
    branches: p.branches.map((_, i) => (i === 0 ? side("branch") : i === 1 && ways.spare ? side(ways.spare) : endSide())),
  });
}

/** Key and words of a forged tee or cross; null where they are those of the butt-weld one. One key serves run and branch (ASME B16.11). */
export function branchMake(kind: "tee" | "cross", ends: FittingEnds, p: PlacedPoint, ctx: BuildContext): { key: string | null; word: string; description: string | null } {
  if (ends === "butt") return { key: null, word: kind, description: null };
  const c = forgedClass(ctx.settings, ends);
  const key = ends === "socket" ? socketKey(kind, c, p.pipeIn.nps) : threadedKey(kind, c, p.pipeIn.nps);
  return { key, word: `${ends} ${kind}`, description: `${sentenceStart(kind)}, ${ends === "socket" ? "socket-weld" : "threaded"}, class ${c}` };
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

export function reportLean(p: PlacedPoint, rad: number, ctx: BuildContext): void {
  const where = { pointId: p.point.id, runId: p.runId };
  if (rad > WELD_MISMATCH_RAD) {
    ctx.report("branch-angle", "stop", `${sentenceStart(p.label)}: the pipes miss the square of the fitting by ${formatAngleDeg(rad)}. Correct the offsets, or turn the line with an elbow. Over 3° needs the engineer's permission.`, where);
  } else if (rad >= STRAIGHT_RAD) {
    ctx.report("branch-mismatch", "note", `${sentenceStart(p.label)}: ${formatAngleDeg(rad)} of mismatch is taken up at the branch weld.`, where);
  }
}
