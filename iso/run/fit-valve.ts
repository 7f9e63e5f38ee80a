/** Valves. The point is the centre; a flanged valve brings mating flange and gasket on each side a pipe comes to. */
import { vecAddScaled, vecNegate, vecReject, vecUnit } from "../geometry/vec3";
import { valveKey } from "../catalogue/keys";
import { axisNameOf, axisVector, naturalSide } from "./axes";
import { plainTerm, sentenceStart, takeOutTerm, type BuildContext, type TakeOut } from "./build-context";
import type { BoltedFace, Fitting, JointDraft, PlacedPoint, Side } from "./build-types";
import type { Item, RatingClass } from "./document";
import { bareSide, buttSide, fittingOf, flowAfter, flowAt, makeComponent, socketSide, straightPorts, unconfirmedOf } from "./fit-common";
import { boltedJoint, gasketPart, pipeFlange } from "./fit-flange";
import type { Component, CutTerm } from "./model-types";
import { originalSide } from "./original-side";
import { VALVE_WORDS, sizeText } from "./words";

type ValveItem = Extract<Item, { kind: "valve" }>;

export function fitValve(p: PlacedPoint, item: ValveItem, ctx: BuildContext): Fitting {
  const ratingClass = item.ratingClass ?? ctx.settings.ratingClass;
  const whole = valveLength(p, item, ratingClass, ctx);
  const half = whole.mm / 2;
  const word = VALVE_WORDS[item.valve];
  const term = takeOutTerm(`half the ${word}`, whole, p.uid, 0.5);
  const component = valvePart(p, item, ratingClass, half, whole, ctx);
  const ins = valveSide(p, item, ratingClass, "in", term, half, ctx);
  const outs = valveSide(p, item, ratingClass, "out", term, half, ctx);
  if (p.isFirst || p.isLast) {
    ctx.report("valve-at-end", "note", `${sentenceStart(p.label)}: the ${word} ends the run with its far side open. Continue the line or close it with a blind flange.`, { pointId: p.point.id, runId: p.runId });
  }
  return fittingOf({ components: [...ins.components, component, ...outs.components], joints: [...ins.joints, ...outs.joints], in: ins.side, out: outs.side });
}

/** Face to face: what the detailer gave, else the shop's word or the table. */
function valveLength(p: PlacedPoint, item: ValveItem, ratingClass: RatingClass, ctx: BuildContext): TakeOut {
  const key = valveKey(item.valve, ratingClass, p.pipeIn.nps, item.ends);
  if (item.faceToFaceMm !== null) return { key, mm: item.faceToFaceMm, source: "given with the valve", unconfirmed: false, missing: false };
  const what = `${item.ends === "butt" ? "butt-weld" : item.ends === "socket" ? "socket-weld" : "flanged"} ${VALVE_WORDS[item.valve]} length, class ${ratingClass}, in ${sizeText(p.pipeIn.nps, ctx.units)}`;
  return ctx.takeOut(key, what, p);
}

function valvePart(p: PlacedPoint, item: ValveItem, ratingClass: RatingClass, half: number, whole: TakeOut, ctx: BuildContext): Component {
  const flow = flowAt(p);
  const named = item.stem ? vecUnit(vecReject(axisVector(item.stem), flow)) : null;
  if (item.stem && !named) {
    ctx.report("stem-along-pipe", "warning", `${sentenceStart(p.label)}: the valve's stem cannot lie along the pipe. Choose another direction.`, { pointId: p.point.id, runId: p.runId });
  }
  const aside = named ?? naturalSide(flow);
  const ends = item.ends === "flanged" ? "flanged, raised face" : item.ends === "butt" ? "butt-weld" : "socket-weld";
  const word = VALVE_WORDS[item.valve];
  return makeComponent(p, p.pipeIn, {
    kind: "valve", valve: item.valve, ends: item.ends, ratingClass, aside, asideName: axisNameOf(aside), text: item.tag,
    ports: straightPorts(p.position, flow, half, half, p.pipeIn.nps), source: whole.source, unconfirmedKey: unconfirmedOf(whole),
    description: `${sentenceStart(word)}, ${ends}, class ${ratingClass}`, material: "as specified", weightSource: "not known",
  });
}

interface ValveSide {
  readonly side: Side;
  readonly components: readonly Component[];
  readonly joints: readonly JointDraft[];
}

function valveSide(p: PlacedPoint, item: ValveItem, ratingClass: RatingClass, name: "in" | "out", term: CutTerm, half: number, ctx: BuildContext): ValveSide {
  const alone = (side: Side): ValveSide => ({ side, components: [], joints: [] });
  const face: BoltedFace = { componentId: p.uid, place: p.point.places.bolts ?? "shop", ratingClass };
  if (name === "in" ? p.boltedIn : p.boltedOut) return alone(bareSide([term], p.uid, face));
  if (name === "in" ? p.isFirst : p.isLast) return alone(bareSide([term], p.uid));
  if (item.ends === "flanged") return matingFlange(p, item, ratingClass, name, term, half, ctx);
  const welded = item.ends === "butt" ? buttSide : socketSide;
  return alone(welded(p, name, ctx, { terms: [term], componentId: p.uid }));
}

/** The mating flange and gasket a flanged valve brings towards a pipe. */
function matingFlange(p: PlacedPoint, item: ValveItem, ratingClass: RatingClass, name: "in" | "out", term: CutTerm, half: number, ctx: BuildContext): ValveSide {
  const gasketMm = ctx.settings.allowances.gasketMm;
  const pipe = name === "in" ? p.pipeIn : p.pipeOut;
  const flow = name === "in" ? flowAt(p) : flowAfter(p);
  const toPipe = name === "in" ? vecNegate(flow) : flow;
  const id = `${p.uid}.flange-${originalSide(p.point, name)}`;
  const flange = pipeFlange(p, {
    id, side: name, type: item.mating, ratingClass, pipe, faceReachMm: half + gasketMm, text: "",
    toFace: [term, plainTerm("gasket", "gasket", gasketMm)],
  }, ctx);
  const gasket = gasketPart(p, pipe, `${p.uid}.gasket-${originalSide(p.point, name)}`, ratingClass, vecAddScaled(p.position, toPipe, half + gasketMm / 2), flow);
  const joint = boltedJoint(p, `${p.uid}:bolts-${originalSide(p.point, name)}`, name === "in" ? [id, p.uid] : [p.uid, id], gasket, p.point.places.bolts ?? "shop", ctx);
  return { side: flange.side, components: [flange.component, gasket], joints: [joint] };
}
