/** Third pass: what stands at each point, and what it offers the pipe on either side. */
import { formatAngleDeg } from "../units/format";
import { sentenceStart, type BuildContext } from "./build-context";
import type { Fitting, PlacedPoint } from "./build-types";
import { fitTee } from "./fit-branch";
import { endSide, fittingOf } from "./fit-common";
import { fitCross } from "./fit-cross";
import { fitElbow } from "./fit-elbow";
import { fitFlange } from "./fit-flange";
import { fitCap, fitCoupling, fitUnion } from "./fit-forged";
import { fitReducer } from "./fit-inline";
import { fitInstrument } from "./fit-instrument";
import { fitMitre } from "./fit-mitre";
import { fitOutlet, fitStubIn } from "./fit-on-pipe";
import { fitEnd, fitEndInside, fitPlainWeld, fitSupport } from "./fit-plain";
import { fitReturn } from "./fit-return";
import { fitValve } from "./fit-valve";
import { fitBend } from "./pipe-bend";

/** Items a line cannot turn at, in the trade's words. */
const STRAIGHT_ONLY: Readonly<Record<string, string>> = { flange: "flange", valve: "valve", reducer: "reducer", coupling: "coupling", union: "union", instrument: "instrument" };

export function fitPoint(p: PlacedPoint, ctx: BuildContext): Fitting {
  const item = p.point.item;
  if (p.turnRad > 0 && item.kind in STRAIGHT_ONLY) reportTurn(p, STRAIGHT_ONLY[item.kind] ?? "item", ctx);
  const fitted = fitItem(p, ctx);
  if (fitted.in.through && p.pipeIn.material !== p.pipeOut.material) {
    ctx.report("break-on-pipe", "warning", `${sentenceStart(p.label)}: the material changes to ${p.pipeOut.material || "none"} on uncut pipe. Put a joint or a flange there.`, { pointId: p.point.id, runId: p.runId });
  }
  return p.branches.length > fitted.branches.length ? withLooseBranches(p, fitted, ctx) : fitted;
}

function fitItem(p: PlacedPoint, ctx: BuildContext): Fitting {
  const item = p.point.item;
  const isEnd = p.isFirst || p.isLast;
  switch (item.kind) {
    case "none":
      if (isEnd) return fitEnd(p, item, ctx);
      return p.turnRad > 0 ? fitElbow(p, null, ctx) : isWeldNamed(p) ? fitPlainWeld(p, ctx) : fittingOf({});
    case "end":
      return isEnd ? fitEnd(p, item, ctx) : fitEndInside(p, item, ctx);
    case "joint":
      return isEnd ? fitEnd(p, item, ctx) : fitPlainWeld(p, ctx);
    case "support":
      return isEnd ? fitEnd(p, item, ctx) : p.turnRad > 0 ? supportOnElbow(p, item.text, ctx) : fitSupport(p, item.text);
    case "elbow":
      return fitElbow(p, item.elbow, ctx);
    case "tee":
      return fitTee(p, item, ctx);
    case "outlet":
      return fitOutlet(p, item, ctx);
    case "stub-in":
      return fitStubIn(p, item, ctx);
    case "reducer":
      return fitReducer(p, item, ctx);
    case "flange":
      return fitFlange(p, item, ctx);
    case "valve":
      return fitValve(p, item, ctx);
    case "coupling":
      return fitCoupling(p, item.half, item.ends ?? "socket", ctx);
    case "union":
      return fitUnion(p, item.ends, ctx);
    case "cap":
      return fitCap(p, item.ends ?? "butt", ctx);
    case "instrument":
      return fitInstrument(p, item, ctx);
    case "cross":
      return fitCross(p, item, ctx);
    case "return":
      return fitReturn(p, item, ctx);
    case "mitre":
      return fitMitre(p, item, ctx);
    case "bend":
      return fitBend(p, item, ctx);
  }
}

/** A field or field-fit weld asked for on straight pipe with no item named: the weld is meant. */
function isWeldNamed(p: PlacedPoint): boolean {
  return [p.point.places.in, p.point.places.out].some((place) => place === "field" || place === "field-fit");
}

/** A support under a change of direction: the elbow is there all the same. */
function supportOnElbow(p: PlacedPoint, text: string, ctx: BuildContext): Fitting {
  const elbow = fitElbow(p, null, ctx);
  const support = fitSupport(p, text);
  const [part, rider] = [support.components[0], support.riders[0]];
  if (!part || !rider || elbow.components.length === 0) return { ...elbow, components: [...elbow.components, ...support.components], riders: support.riders };
  const id = `${p.uid}.support`;
  const joint = rider.joint && { ...rider.joint, a: p.uid, b: id };
  return { ...elbow, components: [...elbow.components, { ...part, id }], joints: joint ? [...elbow.joints, joint] : elbow.joints };
}

function reportTurn(p: PlacedPoint, word: string, ctx: BuildContext): void {
  ctx.report("turn-at-item", "stop", `${sentenceStart(p.label)} turns ${formatAngleDeg(p.turnRad)} at a ${word}, which cannot turn the line: put an elbow before or after it, or correct the offsets.`, { pointId: p.point.id, runId: p.runId });
}

/** Branch runs that nothing at their point takes. */
function withLooseBranches(p: PlacedPoint, fitted: Fitting, ctx: BuildContext): Fitting {
  ctx.report("branch-no-fitting", "stop", `A branch leaves from ${p.label}, but no tee, cross, outlet or stub-in stands there: choose one, or remove the branch.`, { pointId: p.point.id, runId: p.runId });
  return { ...fitted, branches: p.branches.map((_, i) => fitted.branches[i] ?? endSide()) };
}
