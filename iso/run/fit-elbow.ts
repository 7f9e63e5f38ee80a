/**
 * Elbows, named or taken by themselves at a change of direction.
 *
 * A standard elbow of angle A welded into a turn of θ splits the mismatch equally. Its faces stand apart by the chord of
 * the fitting, 2·C·cos(A/2) with C its tabulated take-out; seen from the corner of the two pipe centre lines the same
 * chord is 2·t·cos(θ/2). So t = C·cos(A/2)/cos(θ/2), which is C·cos 45°/cos(θ/2) for a 90. A trimmed elbow of bend
 * radius R has t = R·tan(θ/2) (geometry of a tangent arc).
 */
import { SQUARE_RAD, STRAIGHT_RAD, WELD_MISMATCH_RAD } from "../geometry/tolerances";
import { vecNegate } from "../geometry/vec3";
import { elbowKey, socketKey, threadedKey } from "../catalogue/keys";
import { formatAngleDeg } from "../units/format";
import { takeOutTerm, plainTerm, sentenceStart, type BuildContext } from "./build-context";
import type { Fitting, PlacedPoint } from "./build-types";
import type { Item } from "./document";
import { buttSide, endedSide, endSide, fittingOf, flowAfter, flowAt, makeComponent, port, unconfirmedOf, type FittingEnds } from "./fit-common";
import { fitPlainWeld } from "./fit-plain";
import { forgedClass, sizeText } from "./words";

type ElbowName = Extract<Item, { kind: "elbow" }>["elbow"];

const RIGHT = Math.PI / 2;
const HALF_RIGHT = Math.PI / 4;

/** What stands at a change of direction where the detailer named nothing (common practice, a setting of the line). */
export function autoElbow(p: PlacedPoint, ctx: BuildContext): ElbowName | "plain-weld" {
  const within = (ctx.settings.standardElbowWithinDeg * Math.PI) / 180 + SQUARE_RAD;
  const radius = ctx.settings.elbow === "SR" ? "sr" : "lr";
  if (p.turnRad <= within) return "plain-weld";
  if (Math.abs(p.turnRad - RIGHT) <= within) return `${radius}-90`;
  if (Math.abs(p.turnRad - HALF_RIGHT) <= within) return "lr-45";
  return `trimmed-${radius}`;
}

/** The elbow of a point: the named one, else the one its turn asks for. */
export function fitElbow(p: PlacedPoint, named: ElbowName | null, ctx: BuildContext): Fitting {
  const where = { pointId: p.point.id, runId: p.runId };
  if (!p.arriving || !p.leaving) {
    ctx.report("elbow-at-end", "warning", `${sentenceStart(p.label)} is an elbow at the end of a run: give the next point, so that it knows where it turns.`, where);
    return fittingOf({ in: endSide(), out: endSide() });
  }
  const elbow = named ?? autoElbow(p, ctx);
  if (elbow === "plain-weld") return fitPlainWeld(p, ctx);
  if (p.turnRad === 0) {
    ctx.report("elbow-straight", "stop", `${sentenceStart(p.label)} names an elbow but the line runs straight on: correct the offsets or take the elbow out.`, where);
    return fittingOf({});
  }
  if (elbow === "trimmed-lr" || elbow === "trimmed-sr") return fitTrimmed(p, elbow, ctx);
  return fitStandard(p, elbow, ctx);
}

function fitStandard(p: PlacedPoint, elbow: Exclude<ElbowName, "trimmed-lr" | "trimmed-sr">, ctx: BuildContext): Fitting {
  const own = elbow.endsWith("90") ? RIGHT : HALF_RIGHT;
  const made = elbowMake(elbow, p, ctx);
  const { name, ends } = made;
  const value = ctx.takeOut(made.key, `${name} elbow take-out in ${sizeText(p.pipeIn.nps, ctx.units)}`, p);
  const off = Math.abs(p.turnRad - own) > SQUARE_RAD;
  const cos = Math.max(Math.cos(p.turnRad / 2), MIN_COS);
  const factor = off ? Math.cos(own / 2) / cos : 1;
  const mismatchRad = off ? Math.abs(p.turnRad - own) / 2 : 0;
  // Less than a weld shows is reckoned with and not talked about.
  const isTold = mismatchRad >= STRAIGHT_RAD;
  const label = isTold ? `${name} take-out at ${formatAngleDeg(p.turnRad)}` : `${name} take-out`;
  if (isTold) reportMismatch(p, name, mismatchRad, ctx);
  const term = takeOutTerm(label, value, p.uid, factor);
  const radius = ends === "butt" ? ctx.bendRadius(elbow.startsWith("sr") ? "SR" : "LR", p.pipeIn.nps) : null;
  const component = makeComponent(p, p.pipeIn, {
    kind: ends === "butt" ? "elbow" : "socket-elbow", ends, description: made.description, source: value.source,
    schedule: ends === "butt" ? p.pipeIn.schedule : null, angleRad: p.turnRad, radiusMm: radius, unconfirmedKey: unconfirmedOf(value),
    ports: elbowPorts(p, -term.valueMm),
  });
  const given = { terms: [term], componentId: p.uid, mismatchRad };
  return fittingOf({ components: [component], in: endedSide(ends, p, "in", ctx, given), out: endedSide(ends, p, "out", ctx, given) });
}

/** Name, table key and words of a whole elbow. */
function elbowMake(elbow: Exclude<ElbowName, "trimmed-lr" | "trimmed-sr">, p: PlacedPoint, ctx: BuildContext): { name: string; ends: FittingEnds; key: string; description: string } {
  const { nps } = p.pipeIn;
  const degrees = elbow.endsWith("90") ? 90 : 45;
  switch (elbow) {
    case "sw-90":
    case "sw-45": {
      const c = forgedClass(ctx.settings, "socket");
      return { name: `socket ${degrees}`, ends: "socket", key: socketKey(elbow, c, nps), description: `Elbow ${degrees}, socket-weld, class ${c}` };
    }
    case "th-90":
    case "th-45": {
      const c = forgedClass(ctx.settings, "threaded");
      return { name: `threaded ${degrees}`, ends: "threaded", key: threadedKey(elbow, c, nps), description: `Elbow ${degrees}, threaded, class ${c}` };
    }
    default: {
      const radius = elbow.startsWith("sr") ? "SR" : "LR";
      return { name: `${radius} ${degrees}`, ends: "butt", key: elbowKey(elbow, nps), description: `Elbow ${degrees} ${radius}, butt-weld` };
    }
  }
}

/** Keeps a take-out finite when a line folds back on itself; the fold itself is reported. */
const MIN_COS = 0.05;

function reportMismatch(p: PlacedPoint, name: string, eachRad: number, ctx: BuildContext): void {
  const where = { pointId: p.point.id, runId: p.runId };
  const turn = formatAngleDeg(p.turnRad);
  const each = formatAngleDeg(eachRad);
  if (eachRad > WELD_MISMATCH_RAD) {
    ctx.report("elbow-angle", "stop", `${sentenceStart(p.label)} turns ${turn}, which the ${name} elbow misses by ${each} at each weld: trim an elbow, or correct the offsets. Over 3° needs the engineer's permission.`, where);
  } else {
    ctx.report("elbow-mismatch", "note", `${sentenceStart(p.label)} turns ${turn}: the ${name} elbow takes ${each} of mismatch at each weld.`, where);
  }
}

function fitTrimmed(p: PlacedPoint, elbow: "trimmed-lr" | "trimmed-sr", ctx: BuildContext): Fitting {
  const where = { pointId: p.point.id, runId: p.runId };
  const name = elbow === "trimmed-sr" ? "SR" : "LR";
  const turn = formatAngleDeg(p.turnRad);
  const value = ctx.takeOut(elbowKey(elbow === "trimmed-sr" ? "sr-90" : "lr-90", p.pipeIn.nps), `${name} 90 elbow in ${sizeText(p.pipeIn.nps, ctx.units)} to trim`, p);
  const radius = value.mm;
  const tooMuch = p.turnRad > RIGHT + SQUARE_RAD;
  if (tooMuch) {
    ctx.report("trim-over-90", "stop", `${sentenceStart(p.label)} turns ${turn}: nothing over 90° can be trimmed from a 90. Use two elbows, or a return.`, where);
  } else {
    ctx.report("trimmed-elbow", "warning", `${sentenceStart(p.label)} takes an ${name} elbow trimmed to ${turn}: confirm that trimming is permitted (engineer's permission).`, where);
  }
  const angleRad = Math.min(p.turnRad, RIGHT);
  const takeOutMm = radius * Math.tan(angleRad / 2);
  const term = { ...plainTerm("take-out", `${name} trimmed to ${turn} take-out`, takeOutMm, p.uid, value.source || null), unconfirmed: value.unconfirmed };
  const component = makeComponent(p, p.pipeIn, {
    kind: "trimmed-elbow", ends: "butt", description: `Elbow 90 ${name}, butt-weld, trimmed to ${turn}`, source: value.source,
    schedule: p.pipeIn.schedule, angleRad, radiusMm: radius, unconfirmedKey: unconfirmedOf(value), ports: elbowPorts(p, takeOutMm),
  });
  const given = { terms: [term], componentId: p.uid };
  return fittingOf({ components: [component], in: buttSide(p, "in", ctx, given), out: buttSide(p, "out", ctx, given) });
}

function elbowPorts(p: PlacedPoint, takeOutMm: number) {
  return [
    port("in", p.position, vecNegate(flowAt(p)), takeOutMm, p.pipeIn.nps),
    port("out", p.position, flowAfter(p), takeOutMm, p.pipeIn.nps),
  ];
}
