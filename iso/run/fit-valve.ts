/** Valves. The point is the centre; a flanged valve brings mating flange and gasket on each side a pipe comes to. */
import { vecReject, vecUnit } from "../geometry/vec3";
import { valveKey } from "../catalogue/keys";
import { axisNameOf, axisVector, naturalSide } from "./axes";
import { sentenceStart, takeOutTerm, type BuildContext, type TakeOut } from "./build-context";
import type { BoltedFace, Fitting, PlacedPoint, Side, StudShare } from "./build-types";
import type { Item, RatingClass } from "./document";
import { bareSide, endedSide, fittingOf, flowAt, makeComponent, straightPorts, unconfirmedOf } from "./fit-common";
import { NO_STUDS } from "./bolted-face";
import { matingFlange, type MatedSide } from "./mating-flange";
import type { Component, CutTerm } from "./model-types";
import { VALVE_WORDS, sizeText } from "./words";

type ValveItem = Extract<Item, { kind: "valve" }>;

const END_WORDS: Readonly<Record<ValveItem["ends"], string>> = { flanged: "flanged", butt: "butt-weld", socket: "socket-weld", threaded: "threaded" };

/** A butterfly between flanges is taken as a wafer: no flanges of its own, its studs pass from flange to flange (common practice). */
function isWafer(item: ValveItem): boolean {
  return item.valve === "butterfly" && item.ends === "flanged";
}

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
  return fittingOf({
    components: [...ins.components, component, ...outs.components], joints: [...ins.joints, ...outs.joints], held: [...ins.held, ...outs.held],
    in: ins.side, out: outs.side,
  });
}

/** Face to face: what the detailer gave, else the shop's word or the table. */
function valveLength(p: PlacedPoint, item: ValveItem, ratingClass: RatingClass, ctx: BuildContext): TakeOut {
  const key = valveKey(item.valve, ratingClass, p.pipeIn.nps, item.ends);
  if (item.faceToFaceMm !== null) return { key, mm: item.faceToFaceMm, source: "given with the valve", unconfirmed: false, missing: false };
  const what = `${END_WORDS[item.ends]} ${VALVE_WORDS[item.valve]} length, class ${ratingClass}, in ${sizeText(p.pipeIn.nps, ctx.units)}`;
  return ctx.takeOut(key, what, p);
}

function valvePart(p: PlacedPoint, item: ValveItem, ratingClass: RatingClass, half: number, whole: TakeOut, ctx: BuildContext): Component {
  const flow = flowAt(p);
  const named = item.stem ? vecUnit(vecReject(axisVector(item.stem), flow)) : null;
  if (item.stem && !named) {
    ctx.report("stem-along-pipe", "warning", `${sentenceStart(p.label)}: the valve's stem cannot lie along the pipe. Choose another direction.`, { pointId: p.point.id, runId: p.runId });
  }
  const aside = named ?? naturalSide(flow);
  const ends = isWafer(item) ? "wafer" : item.ends === "flanged" ? "flanged, raised face" : END_WORDS[item.ends];
  const word = VALVE_WORDS[item.valve];
  return makeComponent(p, p.pipeIn, {
    kind: "valve", valve: item.valve, ends: item.ends, ratingClass, aside, asideName: axisNameOf(aside), text: item.tag,
    ports: straightPorts(p.position, flow, half, half, p.pipeIn.nps), source: whole.source, unconfirmedKey: unconfirmedOf(whole),
    description: `${sentenceStart(word)}, ${ends}, class ${ratingClass}`, material: "as specified", weightSource: "not known",
  });
}

function valveSide(p: PlacedPoint, item: ValveItem, ratingClass: RatingClass, name: "in" | "out", term: CutTerm, half: number, ctx: BuildContext): MatedSide {
  const alone = (side: Side): MatedSide => ({ side, components: [], joints: [], held: [] });
  const studs = studsOf(p, item, name, half, ctx);
  const face: BoltedFace = { componentId: p.uid, place: p.point.places.bolts ?? "shop", ratingClass, ...(studs ? { studs } : {}) };
  if (name === "in" ? p.boltedIn : p.boltedOut) return alone(bareSide([term], p.uid, face));
  if (name === "in" ? p.isFirst : p.isLast) return alone(bareSide([term], p.uid));
  if (item.ends === "flanged") return matingFlange(p, { mating: item.mating, ratingClass, name, term, halfMm: half, studs }, ctx);
  return alone(endedSide(item.ends, p, name, ctx, { terms: [term], componentId: p.uid }, (name === "in" ? p.pipeIn : p.pipeOut).nps));
}

/** A wafer's studs pass both its faces: they are counted at its first face, the valve and the second gasket added to their length. */
function studsOf(p: PlacedPoint, item: ValveItem, name: "in" | "out", half: number, ctx: BuildContext): StudShare | null {
  if (!isWafer(item)) return null;
  const isFirstFace = name === "in" || (p.isFirst && !p.boltedIn);
  return isFirstFace ? { extraMm: 2 * half + ctx.settings.allowances.gasketMm, because: "wafer valve" } : NO_STUDS;
}
