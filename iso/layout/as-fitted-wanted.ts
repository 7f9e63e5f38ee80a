/** What a spool's sheet wants of it: faces with their bolt holes, corners, and its parts as lines and as a graph. */
import { flangeBolts } from "../catalogue/catalogue";
import { LOOP_CLOSES_MM } from "../geometry/tolerances";
import type { Vec3 } from "../geometry/types";
import { vecCross, vecDistance, vecDot, vecReject, vecRotate, vecSignedAngle, vecSub, vecUnit } from "../geometry/vec3";
import { axisVector, naturalSide } from "../run/axes";
import type { Component, Joint, Model, Piece, Spool } from "../run/model-types";
import { spoolEnds, type SpoolEnd } from "./spool-ends";
import { spoolTurns } from "./turns";

export interface WantedFace extends SpoolEnd {
  /** "1", "2". */
  readonly mark: string;
  /** Part of the spool it belongs to; "" = none was found. */
  readonly owner: string;
  readonly holes: WantedHoles | null;
}

export interface WantedHoles {
  readonly count: number;
  readonly circleMm: number;
  /** Unit vector from the centre, midway between two holes. */
  readonly midway: Vec3;
}

/** A working point where the centre line turns. */
export interface WantedCorner {
  /** "W1". */
  readonly mark: string;
  readonly name: string;
  readonly position: Vec3;
  readonly componentId: string;
  /** Unit normal of the turn's plane: the line turns counter-clockwise about it. */
  readonly normal: Vec3;
}

export interface Wanted {
  readonly faces: readonly WantedFace[];
  readonly corners: readonly WantedCorner[];
  /** Centre lines of the parts, for a picture. */
  readonly lines: readonly (readonly [Vec3, Vec3])[];
  readonly pieces: readonly Piece[];
  readonly joints: readonly Joint[];
  /** Ids of all parts. */
  readonly parts: readonly string[];
}

export function fittedWanted(model: Model, spool: Spool): Wanted {
  const components = model.components.filter((c) => spool.componentIds.includes(c.id));
  const pieces = model.pieces.filter((p) => spool.pieceKeys.includes(p.key));
  const parts = [...components.map((c) => c.id), ...pieces.map((p) => p.key)];
  const faces = spoolEnds(model, spool).map((end): WantedFace => {
    const component = components.find((c) => c.ports.some((port) => isAt(port, end)));
    const piece = pieces.find((p) => vecDistance(p.start, end.position) < LOOP_CLOSES_MM || vecDistance(p.end, end.position) < LOOP_CLOSES_MM);
    const owner = end.kind === "plain" ? (piece?.key ?? component?.id) : (component?.id ?? piece?.key);
    return { ...end, mark: String(end.number), owner: owner ?? "", holes: end.kind === "flange" && component ? holesOf(component, end) : null };
  });
  const within = (id: string | null) => id !== null && parts.includes(id);
  return {
    faces, corners: cornersOf(model, spool), pieces, parts,
    lines: [...components.flatMap(componentLines), ...pieces.flatMap((piece) => pieceLines(model, piece))],
    joints: model.joints.filter((joint) => within(joint.a) && within(joint.b)),
  };
}

const isAt = (port: Component["ports"][number], end: SpoolEnd): boolean => vecDistance(port.position, end.position) < LOOP_CLOSES_MM && vecDot(port.direction, end.direction) > 0;

/** Drilling of a face: holes straddle the natural centre line, turned as the sheet says (degrees clockwise from the side named). */
function holesOf(component: Component, end: SpoolEnd): WantedHoles | null {
  const bolts = component.ratingClass === null ? null : flangeBolts(component.ratingClass, component.nps);
  if (!bolts) return null;
  const straddled = naturalSide(end.direction);
  const { boltTurn } = component;
  if (!boltTurn) return { count: bolts.count, circleMm: bolts.circleMm, midway: straddled };
  const clockwise = vecDot(axisVector(boltTurn.from), end.direction) < 0 ? 1 : -1;
  return { count: bolts.count, circleMm: bolts.circleMm, midway: vecRotate(straddled, end.direction, (clockwise * boltTurn.turnDeg * Math.PI) / 180) };
}

function cornersOf(model: Model, spool: Spool): WantedCorner[] {
  return spoolTurns(model, spool).flatMap((turn, i): WantedCorner[] => {
    const node = model.nodes.find((n) => n.pointId === turn.component.pointId && n.runId === turn.component.runId);
    const normal = node?.arriving && node.leaving ? vecUnit(vecCross(node.arriving, node.leaving)) : null;
    return normal ? [{ mark: `W${i + 1}`, name: turn.name, position: turn.component.centre, componentId: turn.component.id, normal }] : [];
  });
}

function componentLines(component: Component): (readonly [Vec3, Vec3])[] {
  return component.kind === "gasket" || component.kind === "bolt-set" ? [] : component.ports.map((port) => [component.centre, port.position] as const);
}

/** A bent piece follows its legs. */
function pieceLines(model: Model, piece: Piece): (readonly [Vec3, Vec3])[] {
  const legs = piece.bends?.length ? (piece.legIds ?? []).slice(0, -1) : [];
  const stops: Vec3[] = [piece.start, ...model.legs.filter((leg) => legs.includes(leg.id)).map((leg) => leg.to), piece.end];
  return stops.slice(1).map((to, i) => [stops[i]!, to] as const);
}

/** How far measured holes stand turned from the sheet's, radians clockwise looking at the face; within half a pitch. null without holes. */
export function holeTurn(face: Pick<WantedFace, "direction" | "holes">, centre: Vec3, measured: readonly Vec3[]): number | null {
  const { holes } = face;
  if (!holes || measured.length === 0) return null;
  const aside = vecUnit(vecReject(holes.midway, face.direction))!;
  const [sine, cosine] = measured.reduce(([s, c], hole) => {
    const arm = vecReject(vecSub(hole, centre), face.direction);
    // Looked at against the outward direction, clockwise is left-handed about it.
    const clockwise = -vecSignedAngle(aside, arm, face.direction);
    const phase = holes.count * clockwise - Math.PI;
    return [s + Math.sin(phase), c + Math.cos(phase)];
  }, [0, 0]);
  return Math.atan2(sine!, cosine!) / holes.count;
}
