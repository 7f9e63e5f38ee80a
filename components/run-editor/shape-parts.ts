/**
 * The true shape of a line as plain solids: tubes along a path, cones, balls. Model millimetres. Pipe and turns are true to
 * their outside diameter and center line; flanges, valves and hubs are simple bodies of likely size, to check by eye only.
 */
import { pipeSize, vecAddScaled, vecCross, vecDistance, vecDot, vecLength, vecScale, vecSub, vecUnit } from "@/iso";
import type { Component, Model, Nps, Piece, Port, Vec3 } from "@/iso";

export type ShapePart =
  | { readonly solid: "tube"; readonly path: readonly Vec3[]; readonly radiusMm: number; readonly tint: Tint; readonly pointId: string }
  | { readonly solid: "cone"; readonly from: Vec3; readonly to: Vec3; readonly fromRadiusMm: number; readonly toRadiusMm: number; readonly tint: Tint; readonly pointId: string }
  | { readonly solid: "ball"; readonly at: Vec3; readonly radiusMm: number; readonly tint: Tint; readonly pointId: string };
export type Tint = "pipe" | "fitting" | "flange" | "valve";

/** Shorter bodies cannot be seen and have no direction, mm. */
const LEAST_MM = 0.5;
/** Points along a quarter turn. */
const ARC_STEPS = 12;
/** Fittings stand a little proud of the pipe, so that they can be told from it. */
const PROUD = 1.04;

/** Every solid of a model; what has no length is left out. */
export function shapeParts(model: Model): readonly ShapePart[] {
  const parts = [...model.pieces.flatMap((piece) => piecePart(model, piece)), ...model.components.flatMap((component) => componentParts(model, component))];
  return parts.filter((part) => part.solid === "ball" || (part.solid === "cone" ? vecDistance(part.from, part.to) > LEAST_MM : part.path.length > 1));
}

/** Radius on the outside, mm; a size no table has counts as 2. */
function outside(model: Model, nps: Nps): number {
  const size = pipeSize(nps) ?? pipeSize("2");
  return ((model.document.settings.units === "metric" ? size?.odMetricMm : size?.odInchMm) ?? 60) / 2;
}

function piecePart(model: Model, piece: Piece): ShapePart[] {
  if (piece.cutLengthMm <= 0) return [];
  const corners = (piece.bends ?? []).flatMap((bend) => {
    const node = model.nodes.find((each) => each.pointId === bend.pointId);
    if (!node?.arriving || !node.leaving) return [];
    const tangent = bend.radiusMm * Math.tan(bend.angleRad / 2);
    return arc(vecAddScaled(node.position, node.arriving, -tangent), node.arriving, vecAddScaled(node.position, node.leaving, tangent), node.leaving);
  });
  const path = [piece.start, ...corners, piece.end];
  if (vecDistance(piece.start, piece.end) < LEAST_MM) return [];
  return [{ solid: "tube", path, radiusMm: piece.odMm / 2, tint: "pipe", pointId: piece.legId }];
}

function componentParts(model: Model, component: Component): ShapePart[] {
  const { kind, pointId, centre } = component;
  const radius = outside(model, component.nps);
  const [first, second] = throughPorts(component);
  switch (kind) {
    case "elbow": case "trimmed-elbow": case "socket-elbow": case "return": case "mitre": {
      if (!first || !second) return [];
      return [{ solid: "tube", path: arc(first.position, vecScale(first.direction, -1), second.position, second.direction, kind === "mitre" ? MITRE_STEPS : ARC_STEPS), radiusMm: radius * PROUD, tint: "fitting", pointId }];
    }
    case "flange-weld-neck": case "flange-slip-on": case "flange-socket-weld": case "flange-threaded": case "flange-lap-joint": case "flange-blind":
      return flangeParts(component, radius);
    case "valve": return valveParts(component, radius);
    case "reducer-concentric": case "reducer-eccentric": {
      if (!first || !second) return [];
      return [{ solid: "cone", from: first.position, to: second.position, fromRadiusMm: outside(model, first.nps) * PROUD, toRadiusMm: outside(model, second.nps) * PROUD, tint: "fitting", pointId }];
    }
    case "coupling": case "half-coupling": case "union": case "stub-end":
      return first && second ? [{ solid: "tube", path: [first.position, second.position], radiusMm: radius * (kind === "stub-end" ? PROUD : 1.35), tint: "fitting", pointId }] : [];
    case "cap": case "socket-cap":
      return first ? [{ solid: "cone", from: first.position, to: vecAddScaled(first.position, first.direction, -radius * 0.9), fromRadiusMm: radius * PROUD, toRadiusMm: radius * 0.5, tint: "fitting", pointId }] : [];
    case "instrument": return instrumentParts(component, radius);
    case "support": return [{ solid: "cone", from: vecAddScaled(centre, DOWN, radius), to: vecAddScaled(centre, DOWN, radius * 2.4), fromRadiusMm: radius * 0.3, toRadiusMm: radius, tint: "valve", pointId }];
    case "gasket": case "bolt-set": case "pad": return [];
    default: return component.ports.map((port) => ({ solid: "tube", path: [centre, port.position], radiusMm: outside(model, port.nps) * PROUD, tint: "fitting", pointId }));
  }
}

const DOWN: Vec3 = [0, 0, -1];
const UP: Vec3 = [0, 0, 1];
const MITRE_STEPS = 3;

function throughPorts({ ports }: Component): readonly [Port | undefined, Port | undefined] {
  return [ports.find((port) => port.id === "in") ?? ports[0], ports.find((port) => port.id === "out") ?? ports[1]];
}

/** A flange's outside by its pipe's: about twice in small sizes, a third more in large ones (by eye from the tables). */
function flangeRadius(radius: number): number {
  return radius * 1.25 + 45;
}

function flangeParts(component: Component, radius: number): ShapePart[] {
  const { centre, ports, pointId } = component;
  const weld = [...ports].sort((a, b) => vecDistance(b.position, centre) - vecDistance(a.position, centre))[0];
  const toWeld = weld ? (vecUnit(vecSub(weld.position, centre)) ?? weld.direction) : DOWN;
  const thick = Math.min(radius * 0.35 + 8, Math.max(12, weld ? vecDistance(weld.position, centre) : 24));
  const back = vecAddScaled(centre, toWeld, thick);
  const disc: ShapePart = { solid: "cone", from: centre, to: back, fromRadiusMm: flangeRadius(radius), toRadiusMm: flangeRadius(radius), tint: "flange", pointId };
  return weld && component.kind !== "flange-blind" ? [disc, { solid: "cone", from: back, to: weld.position, fromRadiusMm: radius * 1.3, toRadiusMm: radius * PROUD, tint: "flange", pointId }] : [disc];
}

function valveParts(component: Component, radius: number): ShapePart[] {
  const { centre, pointId, aside } = component;
  const [first, second] = throughPorts(component);
  const flanged = component.ends === "flanged";
  const body = [first, second].flatMap((port): ShapePart[] => {
    if (!port) return [];
    const cone: ShapePart = { solid: "cone", from: port.position, to: centre, fromRadiusMm: radius * 1.2, toRadiusMm: radius * 0.55, tint: "valve", pointId };
    const thick = Math.min(radius * 0.3 + 6, vecDistance(port.position, centre) / 2);
    return flanged ? [cone, { solid: "cone", from: port.position, to: vecAddScaled(port.position, port.direction, -thick), fromRadiusMm: flangeRadius(radius), toRadiusMm: flangeRadius(radius), tint: "valve", pointId }] : [cone];
  });
  const round: ShapePart[] = component.valve === "ball" || component.valve === "globe" ? [{ solid: "ball", at: centre, radiusMm: radius * 1.15, tint: "valve", pointId }] : [];
  if (component.valve === "check") return [...body, ...round];
  const stem = aside ?? UP;
  const top = vecAddScaled(centre, stem, radius * 3.2 + 60);
  const wheel = component.valve === "gate" || component.valve === "globe" ? radius * 1.3 + 20 : radius * 0.5;
  return [
    ...body, ...round,
    { solid: "cone", from: centre, to: top, fromRadiusMm: radius * 0.35, toRadiusMm: radius * 0.12 + 4, tint: "valve", pointId },
    { solid: "cone", from: top, to: vecAddScaled(top, stem, radius * 0.15 + 6), fromRadiusMm: wheel, toRadiusMm: wheel, tint: "valve", pointId },
  ];
}

function instrumentParts(component: Component, radius: number): ShapePart[] {
  const { centre, pointId } = component;
  const [first, second] = throughPorts(component);
  const body: ShapePart[] = first && second ? [{ solid: "tube", path: [first.position, second.position], radiusMm: radius * 1.3, tint: "valve", pointId }] : [];
  const out = first ? vecScale(first.direction, -1) : UP;
  const away = second ? UP : out;
  const head = vecAddScaled(centre, away, radius * 2.5 + 40);
  return [...body, { solid: "cone", from: centre, to: head, fromRadiusMm: radius * 0.3, toRadiusMm: radius * 0.3, tint: "valve", pointId }, { solid: "ball", at: head, radiusMm: radius * 0.7 + 30, tint: "valve", pointId }];
}

/**
 * Points of the circular arc between two places with the tangents there (both along flow). Two places in line give the
 * straight between them. The arc is turned about its own center, found from the chord and the angle.
 */
export function arc(from: Vec3, along: Vec3, to: Vec3, leaving: Vec3, steps = ARC_STEPS): readonly Vec3[] {
  const cos = Math.max(-1, Math.min(1, vecDot(along, leaving)));
  const angle = Math.acos(cos);
  const chord = vecSub(to, from);
  const width = vecLength(chord);
  const across = vecUnit(vecSub(chord, vecScale(along, vecDot(chord, along))));
  if (angle < LEAST_TURN_RAD || width < LEAST_MM || !across || vecLength(vecCross(along, across)) === 0) return [from, to];
  const radius = width / (2 * Math.sin(angle / 2));
  return Array.from({ length: steps + 1 }, (_, i) => {
    const turned = (angle * i) / steps;
    return vecAddScaled(vecAddScaled(from, along, radius * Math.sin(turned)), across, radius * (1 - Math.cos(turned)));
  });
}

/** Straighter turns are drawn straight, radians. */
const LEAST_TURN_RAD = 0.01;
