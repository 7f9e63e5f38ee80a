/** Flanges at the ends of runs, flange pairs within them, and the mating flanges other flanged parts bring. */
import type { Vec3 } from "../geometry/types";
import { vecAddScaled, vecNegate } from "../geometry/vec3";
import { flangeFaceMm } from "../catalogue/catalogue";
import { flangeHubKey, flangeThicknessKey, socketKey } from "../catalogue/keys";
import { plainTerm, sentenceStart, takeOutTerm, type BuildContext } from "./build-context";
import type { BoltedFace, Fitting, JointDraft, PlacedPoint, Side } from "./build-types";
import type { Item, Pipe, Place, RatingClass } from "./document";
import {
  bareSide, buttSide, fittingOf, flowAfter, flowAt, makeComponent, makeJoint, port, slipOnSide, socketSide, unconfirmedOf,
} from "./fit-common";
import type { Component, CutTerm } from "./model-types";
import { originalSide } from "./original-side";
import { FLANGE_WORDS, SOCKET_CLASS, sizeText } from "./words";

export type PipeFlange = "weld-neck" | "slip-on" | "socket-weld";
type FlangeItem = Extract<Item, { kind: "flange" }>;

/** Where a flange sits: its contact face, at the end of the terms that lead to it, looking to the pipe. */
export interface FlangeSeat {
  readonly id: string;
  readonly side: "in" | "out";
  readonly type: PipeFlange;
  readonly ratingClass: RatingClass;
  readonly pipe: Pipe;
  /** Take-outs from the working point to the contact face. */
  readonly toFace: readonly CutTerm[];
  readonly faceReachMm: number;
  readonly text: string;
}

/** A flange on the pipe: the component, and the side it offers (butt, socket or slip-on). */
export function pipeFlange(p: PlacedPoint, seat: FlangeSeat, ctx: BuildContext): { component: Component; side: Side } {
  const body = flangeTerms(p, seat, ctx);
  const flow = seat.side === "in" ? flowAt(p) : flowAfter(p);
  const toPipe = seat.side === "in" ? vecNegate(flow) : flow;
  const centre = seat.side === "in" ? p.position : p.departure;
  const face = vecAddScaled(centre, toPipe, seat.faceReachMm);
  const pipeEnd = port(seat.side, face, toPipe, body.lengthMm, seat.pipe.nps);
  const contact = port(seat.side === "in" ? "out" : "in", face, vecNegate(toPipe), 0, seat.pipe.nps);
  const component = makeComponent(p, seat.pipe, {
    id: seat.id, kind: `flange-${seat.type}`, ends: seat.type === "socket-weld" ? "socket" : "butt", ratingClass: seat.ratingClass,
    schedule: seat.type === "weld-neck" ? seat.pipe.schedule : null, centre: face, text: seat.text, source: body.source,
    ports: seat.side === "in" ? [pipeEnd, contact] : [contact, pipeEnd], unconfirmedKey: body.unconfirmedKey,
    description: `Flange, ${FLANGE_WORDS[seat.type]}, class ${seat.ratingClass}, raised face`,
  });
  const welded = seat.type === "weld-neck" ? buttSide : seat.type === "socket-weld" ? socketSide : slipOnSide;
  const terms = [...seat.toFace, ...body.terms];
  const isOpen = seat.side === "in" ? p.isFirst : p.isLast;
  return { component, side: isOpen ? bareSide(terms, seat.id) : welded(p, seat.side, ctx, { terms, componentId: seat.id }) };
}

interface FlangeBody {
  readonly terms: CutTerm[];
  readonly lengthMm: number;
  readonly source: string;
  readonly unconfirmedKey: string | null;
}

/** From the contact face to where the pipe is welded: hub (and face), setting, or socket bottom. */
function flangeTerms(p: PlacedPoint, seat: FlangeSeat, ctx: BuildContext): FlangeBody {
  const what = `${FLANGE_WORDS[seat.type]} flange, class ${seat.ratingClass}, in ${sizeText(seat.pipe.nps, ctx.units)}`;
  if (seat.type === "slip-on") {
    const set = ctx.settings.allowances.slipOnSettingMm;
    return { terms: [plainTerm("setting", "slip-on setting", set, seat.id)], lengthMm: set, source: "setting of the line", unconfirmedKey: null };
  }
  const hub = ctx.takeOut(flangeHubKey(seat.type, seat.ratingClass, seat.pipe.nps), what, p);
  const faceMm = hub.missing ? 0 : flangeFaceMm(seat.ratingClass, ctx.units);
  const face = faceMm === 0 ? [] : [plainTerm("take-out", "raised face", faceMm, seat.id, "ASME B16.5")];
  if (seat.type === "weld-neck") {
    return { terms: [takeOutTerm("weld-neck hub", hub, seat.id), ...face], lengthMm: hub.mm + faceMm, source: hub.source, unconfirmedKey: unconfirmedOf(hub) };
  }
  // B16.5 socket depths were not read; the least depth of a B16.11 socket stands in (it is the same in the common sizes, from memory).
  const depth = ctx.takeOut(socketKey("depth", SOCKET_CLASS, seat.pipe.nps), `socket depth in ${sizeText(seat.pipe.nps, ctx.units)}`, p);
  const length = Math.max(hub.mm - depth.mm, 0);
  const term: CutTerm = { ...takeOutTerm("socket flange, face to socket bottom", hub, seat.id), valueMm: -length };
  return { terms: [term, ...face], lengthMm: length + faceMm, source: hub.source, unconfirmedKey: unconfirmedOf(hub, depth) };
}

/** Any flange point. */
export function fitFlange(p: PlacedPoint, item: FlangeItem, ctx: BuildContext): Fitting {
  if (p.boltedIn || p.boltedOut) return fitBoltedFlange(p, item, p.boltedIn ? "out" : "in", ctx);
  if (p.isFirst || p.isLast) return fitEndFlange(p, item, p.isFirst ? "out" : "in", ctx);
  if (item.flange === "blind") {
    ctx.report("blind-inside", "stop", `${sentenceStart(p.label)} is a blind flange inside the run: move it to the run's end, or make it a flange pair.`, { pointId: p.point.id, runId: p.runId });
  }
  return fitPair(p, item, ctx);
}

/** One flange bolted straight to the flanged part next to it; its pipe, if any, comes to the other side. */
function fitBoltedFlange(p: PlacedPoint, item: FlangeItem, pipeSide: "in" | "out", ctx: BuildContext): Fitting {
  const ratingClass = itemClass(item, ctx);
  const face: BoltedFace = { componentId: p.uid, place: boltPlace(p), ratingClass };
  const faceSide = pipeSide === "in" ? "out" : "in";
  const pipe = pipeSide === "in" ? p.pipeIn : p.pipeOut;
  if (item.flange === "blind") {
    const outward = pipeSide === "out" ? flowAt(p) : vecNegate(flowAfter(p));
    const blind = blindPart(p, item, ratingClass, pipe, p.position, outward, p.uid, ctx);
    return fittingOf({ components: [blind], [faceSide]: bareSide([], p.uid, face), [pipeSide]: bareSide([], p.uid) });
  }
  const flange = pipeFlange(p, { id: p.uid, side: pipeSide, type: item.flange, ratingClass, pipe, toFace: [], faceReachMm: 0, text: item.text }, ctx);
  return fittingOf({ components: [flange.component], [faceSide]: bareSide([], p.uid, face), [pipeSide]: flange.side });
}

function itemClass(item: FlangeItem, ctx: BuildContext): RatingClass {
  return item.ratingClass ?? ctx.settings.ratingClass;
}

function boltPlace(p: PlacedPoint): Place {
  return p.point.places.bolts ?? "shop";
}

/** A flange that ends the run; what it bolts to lies outside, but for a blind, which comes with its gasket. */
function fitEndFlange(p: PlacedPoint, item: FlangeItem, side: "in" | "out", ctx: BuildContext): Fitting {
  const ratingClass = itemClass(item, ctx);
  const pipe = side === "in" ? p.pipeIn : p.pipeOut;
  const gasketMm = ctx.settings.allowances.gasketMm;
  const counted = ctx.settings.faceIncludesGasket && item.flange !== "blind" ? gasketMm : 0;
  const toFace = counted > 0 ? [plainTerm("gasket", "gasket at the face", counted)] : [];
  const id = item.flange === "blind" ? `${p.uid}.flange` : p.uid;
  const type = item.flange === "blind" ? "weld-neck" : item.flange;
  const flange = pipeFlange(p, { id, side, type, ratingClass, pipe, toFace, faceReachMm: counted, text: item.flange === "blind" ? "" : item.text }, ctx);
  if (item.flange === "blind") return fitBlind(p, item, side, flange, ctx);
  const outward = side === "in" ? flowAt(p) : flowAfter(p);
  const outside = item.goes === "open" ? [] : [makeJoint(p, {
    key: `${p.uid}:face`, kind: "bolted", place: p.point.places.bolts ?? "field", position: p.position, direction: outward,
    a: side === "in" ? id : null, b: side === "in" ? null : id,
  })];
  if (item.goes === "open" && item.text.trim() === "") {
    ctx.report("open-flange", "note", `${sentenceStart(p.label)} is a flange that bolts to nothing yet: say what it meets (nozzle, continued, existing).`, { pointId: p.point.id, runId: p.runId });
  }
  return fittingOf({ components: [flange.component], joints: outside, [side]: flange.side, [side === "in" ? "out" : "in"]: bareSide([], id) });
}

/** A blind closing the run: the point is the contact face of the flange on the pipe; gasket and blind lie outside it. */
function fitBlind(p: PlacedPoint, item: FlangeItem, side: "in" | "out", flange: ReturnType<typeof pipeFlange>, ctx: BuildContext): Fitting {
  const ratingClass = itemClass(item, ctx);
  const pipe = side === "in" ? p.pipeIn : p.pipeOut;
  const flow = side === "in" ? flowAt(p) : flowAfter(p);
  const outward: Vec3 = side === "in" ? flow : vecNegate(flow);
  const gasketMm = ctx.settings.allowances.gasketMm;
  const face = vecAddScaled(p.position, outward, gasketMm);
  const blind = blindPart(p, item, ratingClass, pipe, face, outward, p.uid, ctx);
  const boltKey = `${p.uid}:bolts`;
  const gasket = gasketPart(p, pipe, `${p.uid}.gasket`, ratingClass, vecAddScaled(p.position, outward, gasketMm / 2), flow);
  const joint = boltedJoint(p, boltKey, side === "in" ? [flange.component.id, blind.id] : [blind.id, flange.component.id], gasket, boltPlace(p), ctx);
  return fittingOf({ components: [flange.component, gasket, blind], joints: [joint], [side]: flange.side, [side === "in" ? "out" : "in"]: bareSide([], blind.id) });
}

function blindPart(p: PlacedPoint, item: FlangeItem, ratingClass: RatingClass, pipe: Pipe, face: Vec3, outward: Vec3, id: string, ctx: BuildContext): Component {
  const thickness = ctx.takeOut(flangeThicknessKey(ratingClass, pipe.nps), `blind flange, class ${ratingClass}, in ${sizeText(pipe.nps, ctx.units)}`, p);
  return makeComponent(p, pipe, {
    id, kind: "flange-blind", ends: "flanged", ratingClass, centre: face, text: item.text, source: thickness.source,
    unconfirmedKey: unconfirmedOf(thickness), ports: [port("in", face, vecNegate(outward), 0, pipe.nps)],
    description: `Flange, blind, class ${ratingClass}, raised face`,
  });
}

/** Two flanges and a gasket at one point; the gasket lies before or after the face the point marks. */
function fitPair(p: PlacedPoint, item: FlangeItem, ctx: BuildContext): Fitting {
  const ratingClass = itemClass(item, ctx);
  const type = item.flange === "blind" ? "weld-neck" : item.flange;
  const gasketMm = ctx.settings.allowances.gasketMm;
  const flow = flowAt(p);
  const [before, after] = item.gasketSide === "before" ? [gasketMm, 0] : [0, gasketMm];
  const toFace = (mm: number) => (mm > 0 ? [plainTerm("gasket", "gasket", mm)] : []);
  const ids = { in: `${p.uid}.flange-${originalSide(p.point, "in")}`, out: `${p.uid}.flange-${originalSide(p.point, "out")}` };
  const seat = { type, ratingClass } as const;
  const first = pipeFlange(p, { ...seat, id: ids.in, side: "in", pipe: p.pipeIn, toFace: toFace(before), faceReachMm: before, text: item.text }, ctx);
  const second = pipeFlange(p, { ...seat, id: ids.out, side: "out", pipe: p.pipeOut, toFace: toFace(after), faceReachMm: after, text: "" }, ctx);
  const gasket = gasketPart(p, p.pipeIn, `${p.uid}.gasket`, ratingClass, vecAddScaled(p.position, flow, (after - before) / 2), flow);
  const boltKey = `${p.uid}:bolts`;
  const joint = boltedJoint(p, boltKey, [ids.in, ids.out], gasket, boltPlace(p), ctx);
  return fittingOf({
    components: [first.component, second.component, gasket], joints: [joint],
    in: first.side, out: second.side,
  });
}

/** A gasket between two faces. */
export function gasketPart(p: PlacedPoint, pipe: Pipe, id: string, ratingClass: RatingClass, centre: Vec3, flow: Vec3): Component {
  return makeComponent(p, pipe, {
    id, kind: "gasket", ends: "flanged", ratingClass, centre, material: "as specified", weightSource: "not counted",
    ports: [port("in", centre, vecNegate(flow), 0, pipe.nps), port("out", centre, flow, 0, pipe.nps)],
    description: `Gasket, class ${ratingClass}, raised face`, weightKg: 0,
  });
}

/** Two faces and the gasket between them. */
export function boltedJoint(p: PlacedPoint, key: string, sides: readonly [string, string], gasket: Component, place: Place, ctx: BuildContext): JointDraft {
  return makeJoint(p, {
    key, kind: "bolted", place, position: gasket.centre, direction: gasket.ports[1]?.direction ?? flowAt(p), a: sides[0], b: sides[1],
    nps: gasket.nps, gapMm: ctx.settings.allowances.gasketMm, gasketId: gasket.id,
  });
}
