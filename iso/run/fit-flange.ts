/** Flanges at the ends of runs, flange pairs within them, and flanges bolted straight to a flanged part. */
import type { Vec3 } from "../geometry/types";
import { vecAddScaled, vecNegate } from "../geometry/vec3";
import { flangeThicknessKey } from "../catalogue/keys";
import { boltedParts } from "./bolted-face";
import { plainTerm, sentenceStart, type BuildContext } from "./build-context";
import type { BoltedFace, Fitting, PlacedPoint } from "./build-types";
import type { Item, Pipe, Place, RatingClass } from "./document";
import { bareSide, fittingOf, flowAfter, flowAt, makeComponent, makeJoint, port, unconfirmedOf } from "./fit-common";
import { boltTurnOf, pipeFlange, type SeatedFlange } from "./flange-seat";
import type { Component, CutTerm } from "./model-types";
import { originalSide } from "./original-side";
import { sizeText } from "./words";

type FlangeItem = Extract<Item, { kind: "flange" }>;

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
  const own = item.gasketMm === undefined ? {} : { gasketMm: item.gasketMm };
  const faceSide = pipeSide === "in" ? "out" : "in";
  const pipe = pipeSide === "in" ? p.pipeIn : p.pipeOut;
  if (item.flange === "blind") {
    const outward = pipeSide === "out" ? flowAt(p) : vecNegate(flowAfter(p));
    const blind = blindPart(p, item, ratingClass, pipe, p.position, outward, p.uid, ctx);
    const face: BoltedFace = { componentId: p.uid, place: boltPlace(p), ratingClass, ...own };
    return fittingOf({ components: [blind], [faceSide]: bareSide([], p.uid, face), [pipeSide]: bareSide([], p.uid) });
  }
  const flange = pipeFlange(p, {
    id: p.uid, side: pipeSide, type: item.flange, ratingClass, pipe, toFace: [], faceReachMm: 0, text: item.text, stubEnd: item.stubEnd, boltTurn: boltTurnOf(item),
  }, ctx);
  const face: BoltedFace = { componentId: flange.faceId, place: boltPlace(p), ratingClass, ...own, ...(flange.studs ? { studs: flange.studs } : {}) };
  return fittingOf({ components: flange.components, held: flange.held, [faceSide]: bareSide([], flange.faceId, face), [pipeSide]: flange.side });
}

function itemClass(item: FlangeItem, ctx: BuildContext): RatingClass {
  return item.ratingClass ?? ctx.settings.ratingClass;
}

function itemGasketMm(item: FlangeItem, ctx: BuildContext): number {
  return item.gasketMm ?? ctx.settings.allowances.gasketMm;
}

function boltPlace(p: PlacedPoint): Place {
  return p.point.places.bolts ?? "shop";
}

/** A flange that ends the run; what it bolts to lies outside, but for a blind, which comes with its gasket. */
function fitEndFlange(p: PlacedPoint, item: FlangeItem, side: "in" | "out", ctx: BuildContext): Fitting {
  const ratingClass = itemClass(item, ctx);
  const pipe = side === "in" ? p.pipeIn : p.pipeOut;
  const gasketMm = itemGasketMm(item, ctx);
  const counted = ctx.settings.faceIncludesGasket && item.flange !== "blind" ? gasketMm : 0;
  const toFace = counted > 0 ? [plainTerm("gasket", "gasket at the face", counted)] : [];
  const id = item.flange === "blind" ? `${p.uid}.flange` : p.uid;
  const type = item.flange === "blind" ? "weld-neck" : item.flange;
  const flange = pipeFlange(p, {
    id, side, type, ratingClass, pipe, toFace, faceReachMm: counted, text: item.flange === "blind" ? "" : item.text,
    stubEnd: item.stubEnd, boltTurn: boltTurnOf(item),
  }, ctx);
  if (item.flange === "blind") return fitBlind(p, item, side, flange, ctx);
  const outward = side === "in" ? flowAt(p) : flowAfter(p);
  const outside = item.goes === "open" ? [] : [makeJoint(p, {
    key: `${p.uid}:face`, kind: "bolted", place: p.point.places.bolts ?? "field", position: p.position, direction: outward,
    a: side === "in" ? flange.faceId : null, b: side === "in" ? null : flange.faceId,
  })];
  if (item.goes === "open" && item.text.trim() === "") {
    ctx.report("open-flange", "note", `${sentenceStart(p.label)} is a flange that bolts to nothing yet: say what it meets (nozzle, continued, existing).`, { pointId: p.point.id, runId: p.runId });
  }
  return fittingOf({ components: flange.components, held: flange.held, joints: outside, [side]: flange.side, [side === "in" ? "out" : "in"]: bareSide([], flange.faceId) });
}

/** A blind closing the run: the point is the contact face of the flange on the pipe; gasket and blind lie outside it. */
function fitBlind(p: PlacedPoint, item: FlangeItem, side: "in" | "out", flange: SeatedFlange, ctx: BuildContext): Fitting {
  const ratingClass = itemClass(item, ctx);
  const pipe = side === "in" ? p.pipeIn : p.pipeOut;
  const flow = side === "in" ? flowAt(p) : flowAfter(p);
  const outward: Vec3 = side === "in" ? flow : vecNegate(flow);
  const gasketMm = itemGasketMm(item, ctx);
  const blind = blindPart(p, item, ratingClass, pipe, vecAddScaled(p.position, outward, gasketMm), outward, p.uid, ctx);
  const bolted = boltedParts(p, {
    key: `${p.uid}:bolts`, gasketId: `${p.uid}.gasket`, pipe, ratingClass, centre: vecAddScaled(p.position, outward, gasketMm / 2), flow,
    sides: side === "in" ? [flange.faceId, blind.id] : [blind.id, flange.faceId], place: boltPlace(p), gasketMm, shares: [flange.studs],
  }, ctx);
  const [gasket, ...studs] = bolted.components;
  return fittingOf({
    components: [...flange.components, ...(gasket ? [gasket] : []), blind, ...studs], held: [...flange.held, ...bolted.held], joints: [bolted.joint],
    [side]: flange.side, [side === "in" ? "out" : "in"]: bareSide([], blind.id),
  });
}

function blindPart(p: PlacedPoint, item: FlangeItem, ratingClass: RatingClass, pipe: Pipe, face: Vec3, outward: Vec3, id: string, ctx: BuildContext): Component {
  const thickness = ctx.takeOut(flangeThicknessKey(ratingClass, pipe.nps), `blind flange, class ${ratingClass}, in ${sizeText(pipe.nps, ctx.units)}`, p);
  return makeComponent(p, pipe, {
    id, kind: "flange-blind", ends: "flanged", ratingClass, centre: face, text: item.text, source: thickness.source,
    unconfirmedKey: unconfirmedOf(thickness), ports: [port("in", face, vecNegate(outward), 0, pipe.nps)],
    description: `Flange, blind, class ${ratingClass}, raised face`, ...(boltTurnOf(item) ? { boltTurn: boltTurnOf(item) } : {}),
  });
}

/** Two flanges and a gasket at one point; the gasket lies before or after the face the point marks. */
function fitPair(p: PlacedPoint, item: FlangeItem, ctx: BuildContext): Fitting {
  const ratingClass = itemClass(item, ctx);
  const gasketMm = itemGasketMm(item, ctx);
  const flow = flowAt(p);
  const [before, after] = item.gasketSide === "before" ? [gasketMm, 0] : [0, gasketMm];
  const one = (side: "in" | "out", mm: number): SeatedFlange => pipeFlange(p, {
    id: `${p.uid}.flange-${originalSide(p.point, side)}`, side, type: item.flange === "blind" ? "weld-neck" : item.flange, ratingClass,
    pipe: side === "in" ? p.pipeIn : p.pipeOut, toFace: gasketTerms(mm), faceReachMm: mm, text: side === "in" ? item.text : "",
    stubEnd: item.stubEnd, boltTurn: boltTurnOf(item),
  }, ctx);
  const [first, second] = [one("in", before), one("out", after)];
  const bolted = boltedParts(p, {
    key: `${p.uid}:bolts`, gasketId: `${p.uid}.gasket`, pipe: p.pipeIn, ratingClass, centre: vecAddScaled(p.position, flow, (after - before) / 2), flow,
    sides: [first.faceId, second.faceId], place: boltPlace(p), gasketMm, shares: [first.studs, second.studs],
  }, ctx);
  return fittingOf({
    components: [...first.components, ...second.components, ...bolted.components], held: [...first.held, ...second.held, ...bolted.held],
    joints: [bolted.joint], in: first.side, out: second.side,
  });
}

function gasketTerms(mm: number): CutTerm[] {
  return mm > 0 ? [plainTerm("gasket", "gasket", mm)] : [];
}
