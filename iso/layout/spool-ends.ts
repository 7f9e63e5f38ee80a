/**
 * The open ends of a spool, found by where its parts meet: a face that no other part of the spool meets is an end. Faces
 * meet when they look at each other within what a gap, a gasket, a socket or a slip-on's setting leaves between them.
 */
import type { Vec3 } from "../geometry/types";
import { vecDot, vecLength, vecNegate, vecReject, vecSub } from "../geometry/vec3";
import { pipeOdMm } from "../catalogue/pipe";
import type { Nps } from "../run/document";
import type { Component, Joint, Model, Piece, Spool } from "../run/model-types";

export interface SpoolEnd {
  /** From 1, along flow. */
  readonly number: number;
  /** "flange face, NOZZLE N1". */
  readonly name: string;
  readonly kind: "flange" | "plain" | "fitting";
  readonly position: Vec3;
  /** Unit vector out of the spool. */
  readonly direction: Vec3;
  readonly nps: Nps;
  readonly odMm: number;
  /** Supplied longer than finished by this much, to be trimmed in the field; 0 = none. */
  readonly trimMm: number;
}

interface Face {
  readonly owner: string;
  readonly position: Vec3;
  readonly direction: Vec3;
  readonly nps: Nps;
  readonly of: Component | Piece;
}

/** Along the pipe, and across it (an eccentric reducer has none of it), mm. */
const MEETS_ALONG = 45;
const MEETS_ACROSS = 3;
/** Faces of a mitre look at each other at an angle. */
const MEETS_COSINE = 0.5;
const NO_FACE: readonly Component["kind"][] = ["gasket", "bolt-set", "support", "pad"];

/** Ends along flow. */
export function spoolEnds(model: Model, spool: Spool): readonly SpoolEnd[] {
  const faces = facesOf(model, spool);
  const open = faces.filter((face) => !faces.some((other) => other.owner !== face.owner && meet(face, other)));
  return open.map((face, i) => endOf(model, face, i + 1));
}

function facesOf(model: Model, spool: Spool): Face[] {
  const components = model.components.filter((c) => spool.componentIds.includes(c.id) && !NO_FACE.includes(c.kind));
  const pieces = model.pieces.filter((p) => spool.pieceKeys.includes(p.key));
  const order = new Map(model.nodes.map((node, i) => [node.pointId, i]));
  const ported = components.flatMap((c) => c.ports
    .filter((port) => !(port.id === "in" && (c.kind === "outlet" || c.kind === "stub-in" || c.kind === "half-coupling")))
    .map((port) => ({ at: order.get(c.pointId) ?? 0, face: { owner: c.id, position: port.position, direction: port.direction, nps: port.nps, of: c } })));
  const cut = pieces.flatMap((p) => {
    const at = order.get(p.legId) ?? 0;
    const startWay = firstWay(model, p);
    return [
      { at: at - 0.5, face: { owner: p.key, position: p.start, direction: vecNegate(startWay), nps: p.nps, of: p } },
      { at: at - 0.4, face: { owner: p.key, position: p.end, direction: p.direction, nps: p.nps, of: p } },
    ];
  });
  return [...ported, ...cut].sort((a, b) => a.at - b.at).map(({ face }) => face);
}

/** Way a piece sets out: the direction of a bent one is that of its last straight, so its first leg tells. */
function firstWay(model: Model, piece: Piece): Vec3 {
  const first = piece.bends?.length ? model.legs.find((leg) => leg.id === piece.legIds?.[0]) : undefined;
  return first?.direction ?? piece.direction;
}

function meet(a: Face, b: Face): boolean {
  if (vecDot(a.direction, b.direction) > -MEETS_COSINE) return false;
  const apart = vecSub(b.position, a.position);
  const along = Math.abs(vecDot(apart, a.direction));
  return along <= MEETS_ALONG && vecLength(vecReject(apart, a.direction)) <= MEETS_ACROSS + (1 + vecDot(a.direction, b.direction)) * MEETS_ALONG;
}

function endOf(model: Model, face: Face, number: number): SpoolEnd {
  const { of } = face;
  const isPiece = "cutLengthMm" in of;
  const joint = isPiece ? jointAt(model, of, face) : null;
  const point = isPiece ? pointTextOf(model, of, face) : of.text;
  const kind = isPiece ? "plain" : of.kind.startsWith("flange") || of.kind === "stub-end" || (of.kind === "valve" && of.ends === "flanged") ? "flange" : "fitting";
  const what = isPiece ? `pipe end of ${of.mark}` : kind === "flange" ? (of.kind === "valve" ? "valve face" : "flange face") : of.description.split(",")[0]!.toLowerCase();
  const weld = joint?.number ? ` at weld ${joint.number}` : "";
  return {
    number, kind, position: face.position, direction: face.direction, nps: face.nps, odMm: pipeOdMm(face.nps, model.document.settings.units) ?? 0,
    name: `${what}${weld}${point ? `, ${point}` : ""}`,
    trimMm: isPiece && joint?.place === "field-fit" ? of.terms.filter((term) => term.kind === "trim").reduce((sum, term) => sum + term.valueMm, 0) : 0,
  };
}

function jointAt(model: Model, piece: Piece, face: Face): Joint | null {
  const end = face.position === piece.start ? piece.ends[0] : piece.ends[1];
  return model.joints.find((joint) => joint.key === end.jointKey) ?? null;
}

/** Text of the point a piece ends at, such as where it goes. */
function pointTextOf(model: Model, piece: Piece, face: Face): string {
  const leg = model.legs.find((one) => one.id === piece.legId);
  const pointId = face.position === piece.end ? leg?.toPointId : leg?.fromPointId;
  const point = model.document.runs.flatMap((run) => run.points).find((one) => one.id === pointId);
  return point && point.item.kind === "end" ? point.item.text : "";
}
