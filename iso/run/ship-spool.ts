/** Holds a spool against the shipping box, turned whichever way it fits best, and says where it could come apart. */
import type { Vec3 } from "../geometry/types";
import { vecDot } from "../geometry/vec3";
import { formatLength } from "../units/format";
import type { BuildContext } from "./build-context";
import type { JointDraft } from "./build-types";
import type { Component, Piece } from "./model-types";
import { boxFits, shippingBox, type ShippingBox } from "./shipping-box";
import { spoolExtents } from "./spool-extents";

export interface Shipped {
  readonly letter: string;
  readonly components: readonly Component[];
  readonly pieces: readonly Pick<Piece, "start" | "end" | "direction" | "odMm">[];
  readonly joints: readonly JointDraft[];
  /** Axis-parallel box, mm. */
  readonly boxMm: Vec3;
}

/**
 * The box a spool ships in, longest side first, mm; reports one that stands out of the shipping box however it is turned. A
 * search over rotations is made only where it can change the answer: not for a spool that ships as it lies, nor for one that
 * reaches farther along one of its own pipes than the shipping box does from corner to corner.
 */
export function shippedSpool(spool: Shipped, ctx: BuildContext): Vec3 {
  const room = ctx.settings.shippingBoxMm;
  if (boxFits(spool.boxMm, room)) return [...spool.boxMm].sort((a, b) => b - a) as [number, number, number];
  const discs = spoolExtents(spool.components, spool.pieces, ctx.units);
  const asItGoes = shippingBox(discs, room, 0);
  if (asItGoes.sizeMm[0] > Math.hypot(...room)) {
    reportOver(spool, asItGoes, "along its own pipes, longer than the shipping box is from corner to corner", ctx);
    return asItGoes.sizeMm;
  }
  const best = shippingBox(discs, room);
  if (best.overMm > 0) reportOver(spool, best, `turned to fit best and stands ${formatLength(best.overMm, ctx.units)} out of the shipping box however it is turned`, ctx);
  return best.sizeMm;
}

function reportOver(spool: Shipped, { sizeMm, along }: ShippingBox, how: string, ctx: BuildContext): void {
  const say = sizeMm.map((mm) => formatLength(mm, ctx.units)).join(" x ");
  const weld = middleWeld(spool.joints, along);
  const where = weld === null ? "where it should come apart" : "near its middle, at this point or the next";
  ctx.report("shipping-box", "warning", `Spool ${spool.letter} is ${say} ${how}: put a field weld ${where}.`, {
    pointId: weld?.pointId ?? spool.components[0]?.pointId ?? null, runId: weld?.runId ?? null,
  });
}

/** The shop weld nearest the middle of the spool's longest side. */
function middleWeld(joints: readonly JointDraft[], along: Vec3): JointDraft | null {
  const welds = joints.filter((j) => j.kind === "butt" && j.place === "shop" && j.a !== null && j.b !== null);
  if (welds.length === 0) return null;
  const at = joints.map((j) => vecDot(j.position, along));
  const middle = (Math.min(...at) + Math.max(...at)) / 2;
  const off = (j: JointDraft) => Math.abs(vecDot(j.position, along) - middle);
  return welds.reduce((best, j) => (off(j) < off(best) ? j : best));
}
