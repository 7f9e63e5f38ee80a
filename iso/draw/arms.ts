/**
 * Arms: what stands along a leg next to one of its ends, and the paper it needs. Symbols have a fixed size on paper, so each
 * arm carries pairs (real distance, paper distance) from the working point by which joints find their place.
 */
import { vecDot, vecLength, vecScale, vecSub } from "../geometry/vec3";
import type { Vec3 } from "../geometry/types";
import type { Component, ComponentKind } from "../run/model-types";
import * as size from "./sizes";

export interface ArmPart {
  readonly component: Component;
  /** Paper distances from the working point. */
  readonly inner: number;
  readonly outer: number;
}

export interface Arm {
  readonly parts: readonly ArmPart[];
  readonly room: number;
  /** Real and paper distance from the working point, rising. */
  readonly knots: readonly { readonly real: number; readonly paper: number }[];
}

export const NO_ARM: Arm = { parts: [], room: 0, knots: [{ real: 0, paper: 0 }] };

const ARM_ROOM: Readonly<Record<ComponentKind, number>> = {
  elbow: size.ELBOW_ARM, "trimmed-elbow": size.ELBOW_ARM, return: size.ELBOW_ARM, mitre: 12, "socket-elbow": size.ELBOW_ARM - 1,
  tee: size.TEE_ARM, "reducing-tee": size.TEE_ARM, cross: size.TEE_ARM, "socket-tee": size.TEE_ARM, "socket-cross": size.TEE_ARM,
  outlet: 7, "stub-in": 2, pad: 0,
  "reducer-concentric": size.REDUCER_ROOM, "reducer-eccentric": size.REDUCER_ROOM,
  "flange-weld-neck": size.FLANGE_ARM, "flange-slip-on": size.FLANGE_ARM - 0.6, "flange-socket-weld": 5.2,
  "flange-threaded": 4.6, "flange-lap-joint": 2, "stub-end": size.FLANGE_ARM, "bolt-set": 0,
  "flange-blind": size.BLIND_ROOM, gasket: size.GASKET_ROOM, valve: size.VALVE_HALF, instrument: size.VALVE_HALF,
  coupling: size.COUPLING_HALF, union: size.COUPLING_HALF + 1, "half-coupling": 6.6, cap: 5, "socket-cap": 4.6, support: 0,
};

/** A reach that begins this close to the working point begins at it: take-outs are tens of millimetres, gaps a few. */
const AT_POINT_MM = 8;
/** Paper distance from the run's line to the weld of an outlet or half-coupling on it. */
const SADDLE_ROOM = 1.6;
const ON_RUN: ReadonlySet<ComponentKind> = new Set(["outlet", "half-coupling", "stub-in"]);

/** Least real distance between two knots, so that they rise. */
const REAL_STEP_MM = 0.001;

interface Reach {
  readonly component: Component;
  readonly from: number;
  readonly to: number;
}

function reachAlong(component: Component, origin: Vec3, outward: Vec3): Reach | null {
  let to = -Infinity;
  let from = Infinity;
  for (const port of component.ports) {
    const offset = vecSub(port.position, origin);
    const along = vecDot(offset, outward);
    const beside = vecLength(vecSub(offset, vecScale(outward, along)));
    const facing = vecDot(port.direction, outward);
    if (beside > size.BESIDE_MM || Math.abs(facing) < size.PORT_COSINE) continue;
    if (facing > 0) to = Math.max(to, along);
    else from = Math.min(from, along);
  }
  if (to === -Infinity) return oneEnded(component, origin, outward);
  const centre = vecDot(vecSub(component.centre, origin), outward);
  return { component, from: from === Infinity ? Math.min(centre, to) : Math.min(from, to), to };
}

/** Caps and blind flanges have one port or none along the leg: they count from the port to their own centre. */
function oneEnded(component: Component, origin: Vec3, outward: Vec3): Reach | null {
  if (component.kind !== "cap" && component.kind !== "flange-blind") return null;
  const along = vecDot(vecSub(component.centre, origin), outward);
  return along > AT_POINT_MM ? { component, from: along, to: along } : null;
}

/**
 * The arm of a point along one of its legs.
 * @param components those of the point
 * @param origin working point on the leg's line, model frame
 * @param outward unit vector from the working point into the leg
 */
export function armAlong(components: readonly Component[], origin: Vec3, outward: Vec3): Arm {
  const reaches = components
    .map((component) => reachAlong(component, origin, outward))
    .filter((reach): reach is Reach => reach !== null && reach.to > 0)
    .sort((p, q) => p.from + p.to - q.from - q.to);
  // The loose ring of a lap joint lies round its stub end and takes no room of its own.
  const ring = reaches.some(({ component }) => component.kind === "stub-end") ? reaches.find(({ component }) => component.kind === "flange-lap-joint") : undefined;
  const parts: ArmPart[] = [];
  const knots = [{ real: 0, paper: 0 }];
  let paper = 0;
  let real = 0;
  for (const reach of reaches) {
    const { component, from, to } = reach;
    if (reach === ring) continue;
    const inner = paper;
    // A part that begins well away from the one before is a pup's far neighbour: keep a little pipe between.
    const onRun = ON_RUN.has(component.kind);
    const apart = from > real + 40 && !onRun ? size.PIPE_LEAST : 0;
    paper += apart + ARM_ROOM[component.kind];
    if (onRun) knots.push({ real: from, paper: inner + SADDLE_ROOM });
    if (apart > 0) knots.push({ real: from, paper: inner + apart });
    real = Math.max(real + REAL_STEP_MM, to);
    knots.push({ real, paper });
    parts.push({ component, inner: inner + apart, outer: paper });
    if (ring && component.kind === "stub-end") parts.push({ component: ring.component, inner: inner + apart, outer: paper });
  }
  return parts.length === 0 ? NO_ARM : { parts, room: paper, knots };
}

/**
 * Paper distance along a drawn leg of a real distance along it, both from its start; symbols keep their fixed room and the
 * pipe between takes the rest.
 */
export function paperAlong(real: number, realLength: number, paperLength: number, from: Arm, to: Arm): number {
  const start = from.knots[from.knots.length - 1] ?? { real: 0, paper: 0 };
  const end = to.knots[to.knots.length - 1] ?? { real: 0, paper: 0 };
  if (real <= start.real) return interpolate(from, real);
  if (real >= realLength - end.real) return paperLength - interpolate(to, realLength - real);
  const span = realLength - end.real - start.real;
  const share = span <= 0 ? 0 : (real - start.real) / span;
  return start.paper + share * (paperLength - end.paper - start.paper);
}

function interpolate(arm: Arm, real: number): number {
  let before = { real: 0, paper: 0 };
  for (const knot of arm.knots) {
    if (real <= knot.real) {
      const span = knot.real - before.real;
      return span <= 0 ? knot.paper : before.paper + ((Math.max(0, real) - before.real) / span) * (knot.paper - before.paper);
    }
    before = knot;
  }
  return before.paper;
}
