/** The turns of a spool as they are laid out on a table: the plane of each pair of legs, and what bends there. */
import { NEARLY_ALONG, STRAIGHT_RAD } from "../geometry/tolerances";
import type { Vec3 } from "../geometry/types";
import { vecAngle, vecCross, vecDistance, vecUnit } from "../geometry/vec3";
import { pipeOdMm } from "../catalogue/pipe";
import type { Component, Model, Roll, Spool } from "../run/model-types";
import { formatAngleDeg } from "../units/format";

export interface Turn {
  readonly component: Component;
  /** "ELBOW BETWEEN WELDS 2 AND 3". */
  readonly name: string;
  readonly kind: "whole" | "trimmed" | "mitre";
  readonly angleRad: number;
  /** null for a mitre of two pieces and where the table has none. */
  readonly radiusMm: number | null;
  readonly odMm: number;
  /** Working point to the end of the fitting. */
  readonly takeOutMm: number;
  /** Working point to working point, before and after. */
  readonly legInMm: number;
  readonly legOutMm: number;
  /** Straight from the working point before to the one after. */
  readonly diagonalMm: number;
  /** Pipe that leaves each end of it, up to the next part: what a tape can lie on, mm. */
  readonly plainMm: number;
  /** "level plane", "upright plane", "plane tilted 34.2° from level". */
  readonly plane: string;
  readonly roll: Roll | null;
  /** What the roll is taken against, in words. */
  readonly rollFrom: string;
  /** Mitre welds in the turn; 0 for an elbow. */
  readonly mitreWelds: number;
}

const KINDS: Partial<Record<Component["kind"], Turn["kind"]>> = { elbow: "whole", "socket-elbow": "whole", "trimmed-elbow": "trimmed", mitre: "mitre" };

/** Turns of a spool along flow; those without two legs are left out. */
export function spoolTurns(model: Model, spool: Spool): readonly Turn[] {
  return model.components.filter((c) => spool.componentIds.includes(c.id)).flatMap((component) => turnOf(model, component) ?? []);
}

function turnOf(model: Model, component: Component): Turn | null {
  const kind = KINDS[component.kind];
  const before = model.legs.find((leg) => leg.toPointId === component.pointId && leg.runId === component.runId);
  const after = model.legs.find((leg) => leg.fromPointId === component.pointId && leg.runId === component.runId);
  if (!kind || !before || !after || component.angleRad === null) return null;
  const [inward, outward] = component.ports;
  const takeOutMm = inward ? vecDistance(inward.position, component.centre) : 0;
  const plain = model.pieces.filter((piece) => piece.legId === before.id || piece.legId === after.id).map((piece) => piece.cutLengthMm);
  return {
    component, kind, name: turnName(model, component), angleRad: component.angleRad, radiusMm: component.radiusMm, odMm: pipeOdMm(component.nps, model.document.settings.units) ?? 0,
    takeOutMm: outward ? Math.max(takeOutMm, vecDistance(outward.position, component.centre)) : takeOutMm,
    legInMm: before.lengthMm, legOutMm: after.lengthMm, diagonalMm: vecDistance(before.from, after.to), plainMm: plain.length > 1 ? Math.min(...plain) : 0,
    plane: planeWords(before.direction, after.direction), roll: component.roll ?? null,
    rollFrom: component.roll ? partName(model, component.roll.againstId) : "",
    mitreWelds: kind === "mitre" ? model.joints.filter((joint) => joint.kind === "mitre" && joint.pointId === component.pointId).length : 0,
  };
}

/** A part told by the welds at it, as they stand on the spool sheet. */
function partName(model: Model, id: string): string {
  const component = model.components.find((c) => c.id === id);
  return component ? turnName(model, component).toLowerCase() : "the turn before";
}

function turnName(model: Model, component: Component): string {
  const numbers = model.joints.filter((joint) => joint.number !== null && (joint.a === component.id || joint.b === component.id || (component.kind === "mitre" && joint.kind === "mitre" && joint.pointId === component.pointId))).map((joint) => joint.number);
  const words: Partial<Record<Component["kind"], string>> = { mitre: "MITRE", valve: "VALVE", tee: "TEE", "reducing-tee": "TEE", outlet: "OUTLET", "reducer-eccentric": "REDUCER", "stub-in": "STUB-IN" };
  const what = words[component.kind] ?? (component.kind.includes("elbow") ? "ELBOW" : component.kind.toUpperCase());
  if (numbers.length === 0) return what;
  return numbers.length === 1 ? `${what} AT WELD ${numbers[0]}` : `${what}, WELDS ${numbers[0]} TO ${numbers.at(-1)}`;
}

function planeWords(before: Vec3, after: Vec3): string {
  const normal = vecUnit(vecCross(before, after));
  if (!normal) return "no plane";
  const tilt = vecAngle([0, 0, 1], normal[2] < 0 ? [-normal[0], -normal[1], -normal[2]] : normal);
  if (tilt < STRAIGHT_RAD) return "level plane";
  return Math.abs(normal[2]) < Math.max(NEARLY_ALONG, STRAIGHT_RAD) ? "upright plane" : `plane tilted ${formatAngleDeg(tilt)} from level`;
}
