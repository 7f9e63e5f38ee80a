/** A flange on the end of a pipe, of every type: its parts, its arithmetic, and the side it offers the pipe. */
import { flangeBolts, flangeFaceMm } from "../catalogue/catalogue";
import { flangeHubKey, socketFlangeDepthKey, stubEndKey } from "../catalogue/keys";
import type { Vec3 } from "../geometry/types";
import { vecAddScaled, vecNegate } from "../geometry/vec3";
import { lapShare } from "./bolted-face";
import { plainTerm, takeOutTerm, type BuildContext } from "./build-context";
import type { PlacedPoint, Side, StudShare } from "./build-types";
import type { Item, Pipe, RatingClass } from "./document";
import {
  bareSide, buttSide, flowAfter, flowAt, makeComponent, port, reachOf, slipOnSide, socketSide, threadedSide, unconfirmedOf,
} from "./fit-common";
import type { Component, CutTerm } from "./model-types";
import { FLANGE_WORDS, sizeText } from "./words";

export type PipeFlange = "weld-neck" | "slip-on" | "socket-weld" | "threaded" | "lap-joint";

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
  /** Stub end of a lap joint; long unless said. */
  readonly stubEnd?: "long" | "short" | undefined;
  readonly boltTurn?: Component["boltTurn"];
}

export interface SeatedFlange {
  /** The flange first; a lap joint brings its stub end after it. */
  readonly components: readonly Component[];
  readonly side: Side;
  /** The part with the contact face: what the bolted joint and the pipe's joint name. */
  readonly faceId: string;
  readonly held: readonly (readonly [string, string])[];
  readonly studs: StudShare | null;
}

interface FlangeBody {
  readonly terms: readonly CutTerm[];
  readonly lengthMm: number;
  readonly source: string;
  readonly unconfirmedKey: string | null;
}

/** A flange on the pipe: its components, and the side it offers (butt, socket, slip-on or threaded). */
export function pipeFlange(p: PlacedPoint, seat: FlangeSeat, ctx: BuildContext): SeatedFlange {
  const flow = seat.side === "in" ? flowAt(p) : flowAfter(p);
  const toPipe = seat.side === "in" ? vecNegate(flow) : flow;
  const centre = seat.side === "in" ? p.position : p.departure;
  const face = vecAddScaled(centre, toPipe, seat.faceReachMm);
  return seat.type === "lap-joint" ? lapJoint(p, seat, face, toPipe, ctx) : fixedFlange(p, seat, seat.type, face, toPipe, ctx);
}

const ENDS = { "weld-neck": "butt", "slip-on": "butt", "socket-weld": "socket", threaded: "threaded" } as const;
const SIDES = { "weld-neck": buttSide, "slip-on": slipOnSide, "socket-weld": socketSide, threaded: threadedSide } as const;

function fixedFlange(p: PlacedPoint, seat: FlangeSeat, type: Exclude<PipeFlange, "lap-joint">, face: Vec3, toPipe: Vec3, ctx: BuildContext): SeatedFlange {
  const body = flangeTerms(p, seat, type, ctx);
  const component = makeComponent(p, seat.pipe, {
    id: seat.id, kind: `flange-${type}`, ends: ENDS[type], ratingClass: seat.ratingClass, schedule: type === "weld-neck" ? seat.pipe.schedule : null,
    centre: face, text: seat.text, source: body.source, ports: facePorts(seat, face, toPipe, body.lengthMm), unconfirmedKey: body.unconfirmedKey,
    description: `Flange, ${FLANGE_WORDS[type]}, class ${seat.ratingClass}, raised face`, ...turnOf(seat),
  });
  return { components: [component], side: seatSide(p, seat, SIDES[type], body.terms, seat.id, ctx), faceId: seat.id, held: [], studs: null };
}

/** A loose flange behind a stub end: the stub end is welded to the pipe and carries the face. */
function lapJoint(p: PlacedPoint, seat: FlangeSeat, face: Vec3, toPipe: Vec3, ctx: BuildContext): SeatedFlange {
  const pattern = seat.stubEnd ?? "long";
  const size = sizeText(seat.pipe.nps, ctx.units);
  const stub = ctx.takeOut(stubEndKey(pattern, seat.pipe.nps), `${pattern} stub end in ${size}`, p);
  // The loose flange's own length enters no cut, so nobody need confirm it.
  const hubMm = ctx.peek(flangeHubKey("lap-joint", seat.ratingClass, seat.pipe.nps)) ?? 0;
  const stubId = `${seat.id}.stub`;
  const lap = lapShare(seat.ratingClass, seat.pipe, ctx);
  const flange = makeComponent(p, seat.pipe, {
    id: seat.id, kind: "flange-lap-joint", ends: "flanged", ratingClass: seat.ratingClass, centre: face, text: seat.text,
    source: flangeBolts(seat.ratingClass, seat.pipe.nps)?.source ?? "", ports: facePorts(seat, face, toPipe, hubMm), description: `Flange, lap-joint, class ${seat.ratingClass}`, ...turnOf(seat),
  });
  const stubEnd = makeComponent(p, seat.pipe, {
    id: stubId, kind: "stub-end", ends: "butt", schedule: seat.pipe.schedule, centre: face, source: stub.source,
    ports: facePorts(seat, face, toPipe, stub.mm), unconfirmedKey: unconfirmedOf(stub), description: `Stub end, ${pattern}, butt-weld`,
  });
  const terms = [takeOutTerm("stub end", stub, stubId)];
  return { components: [flange, stubEnd], side: seatSide(p, seat, buttSide, terms, stubId, ctx), faceId: stubId, held: [[seat.id, stubId]], studs: lap };
}

function turnOf(seat: FlangeSeat): Pick<Component, "boltTurn"> {
  return seat.boltTurn ? { boltTurn: seat.boltTurn } : {};
}

function facePorts(seat: FlangeSeat, face: Vec3, toPipe: Vec3, lengthMm: number): Component["ports"] {
  const pipeEnd = port(seat.side, face, toPipe, lengthMm, seat.pipe.nps);
  const contact = port(seat.side === "in" ? "out" : "in", face, vecNegate(toPipe), 0, seat.pipe.nps);
  return seat.side === "in" ? [pipeEnd, contact] : [contact, pipeEnd];
}

function seatSide(p: PlacedPoint, seat: FlangeSeat, welded: typeof buttSide, own: readonly CutTerm[], componentId: string, ctx: BuildContext): Side {
  const terms = [...seat.toFace, ...own];
  const isOpen = seat.side === "in" ? p.isFirst : p.isLast;
  return isOpen ? bareSide(terms, componentId) : welded(p, seat.side, ctx, { terms, componentId });
}

/** From the contact face to where the pipe is joined: hub (and face), setting, or socket bottom. */
function flangeTerms(p: PlacedPoint, seat: FlangeSeat, type: Exclude<PipeFlange, "lap-joint">, ctx: BuildContext): FlangeBody {
  const size = sizeText(seat.pipe.nps, ctx.units);
  if (type === "slip-on") {
    const set = ctx.settings.allowances.slipOnSettingMm;
    return { terms: [plainTerm("setting", "slip-on setting", set, seat.id)], lengthMm: set, source: "setting of the line", unconfirmedKey: null };
  }
  const hub = ctx.takeOut(flangeHubKey(type, seat.ratingClass, seat.pipe.nps), `${FLANGE_WORDS[type]} flange, class ${seat.ratingClass}, in ${size}`, p);
  const faceMm = hub.missing ? 0 : flangeFaceMm(seat.ratingClass, ctx.units);
  const face = faceMm === 0 ? [] : [plainTerm("take-out", "raised face", faceMm, seat.id, "ASME B16.5")];
  if (type !== "socket-weld") {
    const terms = [takeOutTerm(type === "weld-neck" ? "weld-neck hub" : "threaded hub", hub, seat.id), ...face];
    return { terms, lengthMm: reachOf(terms), source: hub.source, unconfirmedKey: unconfirmedOf(hub) };
  }
  const depth = ctx.takeOut(socketFlangeDepthKey(seat.pipe.nps), `flange socket depth in ${size}`, p);
  const length = Math.max(hub.mm - depth.mm, 0);
  const term: CutTerm = { ...takeOutTerm("socket flange, face to socket bottom", hub, seat.id), valueMm: -length, unconfirmed: hub.unconfirmed || depth.unconfirmed };
  return { terms: [term, ...face], lengthMm: length + faceMm, source: hub.source, unconfirmedKey: unconfirmedOf(hub, depth) };
}

/** Bolt holes of a flange item that do not straddle; null when they do. */
export function boltTurnOf(item: Extract<Item, { kind: "flange" }>): Component["boltTurn"] {
  return item.boltHoles === "straddle" ? null : item.boltHoles;
}
