/**
 * The model as paper sees it. Two things have no leg or part of their own and get one here: a bend of the pipe itself, a part
 * that rounds the corner between its tangent points; a 180 degree return, a short leg across between its two ends, so that
 * the line that comes back stands beside the one that went out.
 */
import { vecAddScaled, vecDistance, vecNegate, vecScale, vecSub, vecUnit } from "../geometry/vec3";
import type { Component, Leg, Model, Node, Piece, PieceBend } from "../run/model-types";
import * as size from "./sizes";

const BEND_SOURCE = "bend of the pipe itself";
const TURN = "~turn";
const BACK = "~back";
/** Real reach of a return's part along its leg across, mm: enough to count as standing there. */
const RETURN_REACH_MM = 10;

export const isBend = (component: Component): boolean => component.source === BEND_SOURCE;
/** The leg across of a return: its ends are joined by a half circle, not by straight pipe. */
export const isTurnLeg = (leg: Leg): boolean => leg.id.endsWith(TURN);

/** The same model when it has neither bends nor returns. */
export function paperModel(model: Model): Model {
  const bends = bendParts(model);
  const returns = model.components.filter((component) => component.kind === "return");
  if (bends.length === 0 && returns.length === 0) return model;
  return returns.reduce(withTurnLeg, { ...model, components: [...model.components, ...bends] });
}

function bendParts(model: Model): readonly Component[] {
  const nodes = new Map(model.nodes.map((node) => [node.pointId, node]));
  return model.pieces.flatMap((piece) => (piece.bends ?? []).flatMap((bend) => {
    const node = nodes.get(bend.pointId);
    return node ? bendPart(piece, bend, node) : [];
  }));
}

function bendPart(piece: Piece, bend: PieceBend, { position, arriving, leaving, runId }: Node): Component[] {
  if (!arriving || !leaving) return [];
  const tangent = bend.radiusMm * Math.tan(bend.angleRad / 2);
  const end = (id: "in" | "out", direction: Node["position"]) => ({ id, position: vecAddScaled(position, direction, tangent), direction, nps: piece.nps });
  return [{
    id: `${bend.pointId}.bend`, pointId: bend.pointId, runId, kind: "elbow", valve: null, ends: null, nps: piece.nps, nps2: null, schedule: piece.schedule,
    ratingClass: null, centre: position, ports: [end("in", vecNegate(arriving)), end("out", leaving)], aside: null, asideName: null,
    angleRad: bend.angleRad, radiusMm: bend.radiusMm, unconfirmedKey: null, description: "", material: piece.material, weightKg: null, weightSource: "",
    source: BEND_SOURCE, text: "", spool: piece.spool,
  }];
}

/** Puts the leg across between a return's ends, and the leg that comes back on its far end. */
function withTurnLeg(model: Model, component: Component): Model {
  const { pointId } = component;
  const back = model.legs.find((leg) => leg.fromPointId === pointId && leg.runId === component.runId);
  const node = model.nodes.find((one) => one.pointId === pointId);
  const far = back?.from ?? component.ports.find((port) => port.id === "out")?.position;
  const toward = far && node ? vecUnit(vecSub(far, node.position)) : null;
  if (!far || !node || !toward || vecDistance(far, node.position) < size.LEVEL_MM) return model;
  const backId = `${pointId}${BACK}`;
  const turn: Leg = {
    id: `${pointId}${TURN}`, runId: node.runId, fromPointId: pointId, toPointId: backId, from: node.position, to: far, lengthMm: vecDistance(far, node.position), direction: toward,
    nps: component.nps, unverified: false, provenance: { kind: "calculated", toleranceMm: null, by: null, at: null, second: null },
  };
  const mouth = (position: Node["position"], direction: Node["position"]) => ({ id: "out" as const, position: vecAddScaled(position, direction, RETURN_REACH_MM), direction, nps: component.nps });
  return {
    ...model,
    nodes: model.nodes.flatMap((one) => (one === node ? [{ ...node, leaving: toward }, { ...node, pointId: backId, position: far, arriving: toward }] : [one])),
    legs: model.legs.flatMap((leg) => (leg === back ? [turn, { ...leg, fromPointId: backId }] : [leg])).concat(back ? [] : [turn]),
    components: [
      ...model.components.map((one) => (one === component ? { ...component, ports: [...component.ports, mouth(node.position, toward)] } : one)),
      { ...component, id: backId, pointId: backId, ports: [mouth(far, vecScale(toward, -1))] },
    ],
  };
}
