/**
 * 180 degree returns. The point is where the arriving centre line meets the plane of the return's two ends; the line
 * leaves backwards from there, shifted by the centre-to-centre distance (ASME B16.9). Nothing is taken out.
 */
import { STRAIGHT_RAD, WELD_MISMATCH_RAD } from "../geometry/tolerances";
import { vecNegate, vecReject, vecUnit } from "../geometry/vec3";
import { returnKey } from "../catalogue/keys";
import { formatAngleDeg } from "../units/format";
import { axisVector, axisWord } from "./axes";
import { sentenceStart, type BuildContext } from "./build-context";
import type { Fitting, PlacedPoint, Side } from "./build-types";
import type { Item } from "./document";
import { bareSide, buttSide, fittingOf, flowAt, makeComponent, port, unconfirmedOf } from "./fit-common";
import { sizeText } from "./words";

export function fitReturn(p: PlacedPoint, item: Extract<Item, { kind: "return" }>, ctx: BuildContext): Fitting {
  const where = { pointId: p.point.id, runId: p.runId };
  const flow = p.arriving ?? (p.leaving ? vecNegate(p.leaving) : flowAt(p));
  const value = ctx.takeOut(returnKey(item.radius, "centres", p.pipeIn.nps), `${item.radius} return, centre to centre, in ${sizeText(p.pipeIn.nps, ctx.units)}`, p);
  const toward = vecUnit(vecReject(axisVector(item.toward), flow));
  if (!toward) ctx.report("return-along", "stop", `${sentenceStart(p.label)}: the return cannot shift the line ${axisWord(item.toward)}, along the pipe. Choose another side.`, where);
  const mismatchRad = reportReturn(p, ctx);
  const component = makeComponent(p, p.pipeIn, {
    kind: "return", ends: "butt", schedule: p.pipeIn.schedule, angleRad: Math.PI, radiusMm: value.missing ? null : value.mm / 2,
    ports: [port("in", p.position, vecNegate(flow), 0, p.pipeIn.nps), port("out", p.departure, vecNegate(flow), 0, p.pipeIn.nps)],
    aside: toward, asideName: toward ? item.toward : null, source: value.source, unconfirmedKey: unconfirmedOf(value),
    description: `Return 180 ${item.radius}, butt-weld`,
  });
  const side = (name: "in" | "out"): Side =>
    (name === "in" ? p.isFirst : p.isLast) ? bareSide([], p.uid) : buttSide(p, name, ctx, { terms: [], componentId: p.uid, mismatchRad: name === "out" ? mismatchRad : 0 });
  return fittingOf({ components: [component], in: side("in"), out: side("out") });
}

/** Says how far the line misses running back the way it came; that angle, radians, is taken up at the weld after it. */
function reportReturn(p: PlacedPoint, ctx: BuildContext): number {
  const where = { pointId: p.point.id, runId: p.runId };
  if (!p.arriving || !p.leaving) {
    ctx.report("return-at-end", "note", `${sentenceStart(p.label)}: the return ends the run with one end open. Continue the line.`, where);
    return 0;
  }
  const off = Math.PI - p.turnRad;
  if (off < STRAIGHT_RAD) return 0;
  if (off > WELD_MISMATCH_RAD) {
    ctx.report("return-angle", "stop", `${sentenceStart(p.label)}: after the return the line has to run back the way it came, but it misses that by ${formatAngleDeg(off)}. Correct the next offset.`, where);
  } else {
    ctx.report("weld-mismatch", "note", `${sentenceStart(p.label)}: ${formatAngleDeg(off)} of mismatch is taken up at the weld after the return.`, where);
  }
  return off;
}
