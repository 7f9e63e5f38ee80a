/**
 * How each fitting is turned against the one before it on its run. A fitting's plane is told by a direction square to the
 * pipe: where an elbow turns to, where a branch, a stem, a flat side or a turned bolt hole looks. Through an elbow that
 * direction turns with the pipe, so an elbow that turns on in the same plane and sense has no roll and one that turns
 * back has half a turn. Looking along flow, clockwise positive; the arc lies on the pipe's outside (common practice).
 */
import { SAME_POINT_MM } from "../geometry/tolerances";
import type { Vec3 } from "../geometry/types";
import { vecNegate, vecReject, vecRotate, vecSignedAngle, vecUnit } from "../geometry/vec3";
import { pipeOdMm } from "../catalogue/pipe";
import { axisVector, naturalSide } from "./axes";
import type { PieceDraft, PlacedPoint, PlacedRun } from "./build-types";
import type { UnitSystem } from "./document";
import { flowAt } from "./fit-common";
import type { Component, Roll } from "./model-types";
import { bendOf } from "./pipe-bend";

/** A fitting's direction as the pipe comes in, and the same one as the pipe goes out. */
interface Plane {
  readonly id: string;
  readonly point: PlacedPoint;
  readonly inward: Vec3;
  readonly outward: Vec3;
}

export interface Rolls {
  readonly components: ReadonlyMap<string, Roll | null>;
  /** By the bend's point. */
  readonly bends: ReadonlyMap<string, Roll>;
}

/** Rolls of all components with a plane, and of bends; null for the first of a run. */
export function rollsOf(runs: readonly PlacedRun[], components: readonly Component[], units: UnitSystem): Rolls {
  const atPoint = new Map<string, Component[]>();
  for (const c of components) {
    const key = c.id.split(".")[0] ?? c.id;
    atPoint.set(key, [...(atPoint.get(key) ?? []), c]);
  }
  const found = new Map<string, Roll | null>();
  const bends = new Map<string, Roll>();
  for (const run of runs) {
    let last: Plane | null = null;
    for (const p of run.points) {
      const planes = planesAt(p, atPoint.get(p.uid) ?? []);
      for (const plane of planes) {
        const roll: Roll | null = last ? rollBetween(last, plane, units) : null;
        if (!isBend(plane)) found.set(plane.id, roll);
        else if (roll) bends.set(p.point.id, roll);
      }
      last = planes[planes.length - 1] ?? last;
    }
  }
  return { components: found, bends };
}

/** The pieces with the roll of each of their bends. */
export function rolledPieces(pieces: readonly PieceDraft[], rolls: Rolls): PieceDraft[] {
  if (rolls.bends.size === 0) return [...pieces];
  return pieces.map((piece) => (piece.bends
    ? { ...piece, bends: piece.bends.map((bend) => { const roll = rolls.bends.get(bend.pointId); return roll ? { ...bend, roll } : bend; }) }
    : piece));
}

const BEND = ".bend";

function isBend(plane: Plane): boolean {
  return plane.id.endsWith(BEND);
}

function rollBetween(last: Plane, plane: Plane, units: UnitSystem): Roll | null {
  const flow = flowAt(plane.point);
  const from = vecUnit(vecReject(last.outward, flow));
  if (!from) return null;
  const angleRad = vecSignedAngle(from, plane.inward, flow);
  const od = pipeOdMm(plane.point.pipeIn.nps, units) ?? 0;
  const arcMm = (od * angleRad) / 2;
  return Math.abs(arcMm) < SAME_POINT_MM ? { againstId: last.id, angleRad: 0, arcMm: 0 } : { againstId: last.id, angleRad, arcMm };
}

function planesAt(p: PlacedPoint, components: readonly Component[]): Plane[] {
  const planes = components.flatMap((c) => planeOf(p, c) ?? []);
  if (!bendOf(p)) return planes;
  const turn = turnPlane(p, `${p.uid}${BEND}`);
  return turn ? [turn, ...planes] : planes;
}

function planeOf(p: PlacedPoint, c: Component): Plane | null {
  switch (c.kind) {
    case "elbow":
    case "trimmed-elbow":
    case "socket-elbow":
    case "mitre":
      return turnPlane(p, c.id);
    case "return":
      return c.aside ? { id: c.id, point: p, inward: c.aside, outward: vecNegate(c.aside) } : null;
    case "tee":
    case "reducing-tee":
    case "socket-tee":
    case "cross":
    case "socket-cross":
      return p.turnRad > 0 ? turnPlane(p, c.id) : sidePlane(p, c.id, c.ports.find((port) => port.id === "branch")?.direction);
    case "outlet":
    case "stub-in":
      return sidePlane(p, c.id, c.ports.find((port) => port.id === "branch")?.direction);
    case "valve":
    case "reducer-eccentric":
      return sidePlane(p, c.id, c.aside);
    default:
      return c.boltTurn ? sidePlane(p, c.id, holeDirection(p, c.boltTurn)) : null;
  }
}

/** Where the line turns to, carried round the turn. */
function turnPlane(p: PlacedPoint, id: string): Plane | null {
  if (!p.arriving || !p.leaving) return null;
  const inward = vecUnit(vecReject(p.leaving, p.arriving));
  const outward = vecUnit(vecReject(vecNegate(p.arriving), p.leaving));
  return inward && outward ? { id, point: p, inward, outward } : null;
}

function sidePlane(p: PlacedPoint, id: string, direction: Vec3 | null | undefined): Plane | null {
  const side = direction ? vecUnit(vecReject(direction, flowAt(p))) : null;
  return side ? { id, point: p, inward: side, outward: side } : null;
}

/** The natural centre line of a flange's holes, turned as given: clockwise as seen from the named side. */
function holeDirection(p: PlacedPoint, { turnDeg, from }: NonNullable<Component["boltTurn"]>): Vec3 {
  const flow = flowAt(p);
  const seen = axisVector(from);
  const isAlong = seen[0] * flow[0] + seen[1] * flow[1] + seen[2] * flow[2] < 0;
  return vecRotate(naturalSide(flow), flow, ((isAlong ? turnDeg : -turnDeg) * Math.PI) / 180);
}
