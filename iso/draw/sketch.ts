/**
 * What is drawn: vertices (working points), edges (legs) with their arms, for the whole line or for one spool with stubs of
 * its neighbours.
 */
import { vecAddScaled, vecScale } from "../geometry/vec3";
import type { Vec3 } from "../geometry/types";
import type { Component, Joint, Leg, Model, Node, Piece } from "../run/model-types";
import { armAlong, NO_ARM, type Arm } from "./arms";
import { paperModel } from "./paper-model";
import * as size from "./sizes";
import { groupBy, jointIsOwn, meetingPoints, ownParts, piecesOfLegs, type SheetShare } from "./sketch-parts";

export { groupBy, type SheetShare };

export interface SketchVertex {
  readonly id: string;
  /** null for the loose end of a stub. */
  readonly node: Node | null;
  readonly position: Vec3;
}

export type EdgeKind = "axis" | "slope" | "offset" | "none";

export interface SketchEdge {
  readonly id: string;
  readonly leg: Leg;
  readonly from: string;
  readonly to: string;
  /** Components of the leg, mm, with what is level or too small to see set to zero (a slope counts as level). */
  readonly real: Vec3;
  readonly kind: EdgeKind;
  readonly fromArm: Arm;
  readonly toArm: Arm;
  readonly pieces: readonly Piece[];
  /** The end that is loose: the leg belongs to a neighbour spool and only a stub of it is drawn. */
  readonly stub: "from" | "to" | null;
  /** Belongs to a neighbour spool, or to another sheet. */
  readonly neighbour: boolean;
  /** A stub that hangs on a point of another sheet: drawn, but its words stand there. */
  readonly beyond: boolean;
  /** Its number in the revision it is compared with, where that was another. */
  readonly was?: string;
}

export interface Sketch {
  readonly model: Model;
  readonly spool: string | null;
  readonly vertices: ReadonlyMap<string, SketchVertex>;
  readonly edges: readonly SketchEdge[];
  readonly edgesAt: ReadonlyMap<string, readonly SketchEdge[]>;
  readonly componentsAt: ReadonlyMap<string, readonly Component[]>;
  /** Those shown with their marks (not the neighbours'). */
  readonly components: readonly Component[];
  readonly joints: readonly Joint[];
  readonly pieces: readonly Piece[];
  /** Nothing is left out: neither neighbour spools nor what other sheets show. */
  readonly whole: boolean;
  /** False for a component or piece of a neighbour spool, or of another sheet. */
  readonly isOwn: (id: string) => boolean;
  /** False for a point whose fitting another sheet shows. */
  readonly isHome: (pointId: string) => boolean;
  /** Vertex a point of the document stands at: its own, or where its run comes back. */
  readonly vertexOf: (pointId: string) => string;
}

/** Components of a leg that count on paper, and what kind of leg that makes it. */
export function legShape(leg: Leg): { readonly real: Vec3; readonly kind: EdgeKind } {
  const way: Vec3 = [leg.to[0] - leg.from[0], leg.to[1] - leg.from[1], leg.to[2] - leg.from[2]];
  const least = Math.max(size.LEVEL_MM, size.LEVEL_RATIO * leg.lengthMm);
  const real = way.map((c) => (Math.abs(c) < least ? 0 : c)) as unknown as [number, number, number];
  const level = Math.hypot(real[0], real[1]);
  const sloped = real[2] !== 0 && level > 0 && Math.abs(real[2]) <= size.SLOPE_RATIO * level;
  if (sloped) real[2] = 0;
  const count = real.filter((c) => c !== 0).length;
  if (count === 0) return { real, kind: "none" };
  if (count === 1) return { real, kind: sloped ? "slope" : "axis" };
  return { real, kind: "offset" };
}

/**
 * @param spool its letter, or null for the whole line
 * @param share what of it this sheet shows; null = all
 */
export function sketchOf(given: Model, spool: string | null, share: SheetShare | null = null): Sketch {
  const { model, vertexOf, nodes, componentsAt, legs } = groundOf(given);
  const own = ownParts(model, spool, share);
  const vertices = new Map<string, SketchVertex>();
  const drafts = legs.map((drawn): LegDraft => ({ ...drawn, own: (share === null || share.legs.has(drawn.leg.id)) && legIsOwn(drawn, spool) }));
  const inside = new Set<string>();
  for (const draft of drafts) if (draft.own) inside.add(draft.from).add(draft.to);
  for (const component of model.components) if (own.has(component.id)) inside.add(vertexOf(component.pointId));
  for (const pointId of inside) {
    const node = nodes.get(pointId);
    if (node) vertices.set(pointId, { id: pointId, node, position: node.position });
  }
  const edges = drafts.flatMap((draft) => edgeOf(draft, inside, share, vertices));
  const edgesAt = new Map<string, SketchEdge[]>();
  for (const edge of edges) for (const id of [edge.from, edge.to]) {
    const there = edgesAt.get(id);
    if (there) there.push(edge);
    else edgesAt.set(id, [edge]);
  }
  const all = spool === null && share === null;
  return {
    model, spool, vertices, edges, edgesAt, componentsAt, vertexOf,
    joints: all ? model.joints : model.joints.filter((joint) => jointIsOwn(joint, own, spool, share)),
    whole: all,
    isOwn: (id) => all || own.has(id),
    isHome: (pointId) => share === null || share.points.has(vertexOf(pointId)),
    components: model.components.filter((component) => own.has(component.id)),
    pieces: model.pieces.filter((piece) => own.has(piece.key)),
  };
}

interface GroundLeg {
  readonly leg: Leg;
  readonly from: string;
  readonly to: string;
  readonly real: Vec3;
  readonly kind: EdgeKind;
  readonly arms: readonly [Arm, Arm];
  readonly pieces: readonly Piece[];
}

interface LegDraft extends GroundLeg {
  readonly own: boolean;
}

/** What all sketches of a model have in common. */
interface Ground {
  readonly model: Model;
  readonly vertexOf: (pointId: string) => string;
  readonly nodes: ReadonlyMap<string, Node>;
  readonly componentsAt: ReadonlyMap<string, readonly Component[]>;
  readonly legs: readonly GroundLeg[];
}

/** Kept while its model is: a line on several sheets is sketched once for each of them, and once whole. */
const grounds = new WeakMap<Model, Ground>();

function groundOf(given: Model): Ground {
  const known = grounds.get(given);
  if (known) return known;
  const model = paperModel(given);
  const meets = meetingPoints(model);
  const vertexOf = (pointId: string): string => meets.get(pointId) ?? pointId;
  const nodes = new Map(model.nodes.map((node) => [node.pointId, node]));
  const componentsAt = groupBy(model.components, (component) => vertexOf(component.pointId));
  const piecesOf = piecesOfLegs(model);
  const legs: GroundLeg[] = [];
  for (const leg of model.legs) {
    if (!nodes.has(leg.fromPointId) || !nodes.has(leg.toPointId)) continue;
    const [from, to] = [vertexOf(leg.fromPointId), vertexOf(leg.toPointId)];
    const arms: GroundLeg["arms"] = [armAlong(componentsAt.get(from) ?? [], leg.from, leg.direction), armAlong(componentsAt.get(to) ?? [], leg.to, vecScale(leg.direction, -1))];
    legs.push({ leg, from, to, ...legShape(leg), arms, pieces: piecesOf.get(leg.id) ?? [] });
  }
  const ground: Ground = { model, vertexOf, nodes, componentsAt, legs };
  grounds.set(given, ground);
  return ground;
}

/** Longest real length of a neighbour's leg that counts for where its stub points, mm. */
const STUB_REAL_MM = 400;

function edgeOf(draft: LegDraft, inside: ReadonlySet<string>, share: SheetShare | null, vertices: Map<string, SketchVertex>): readonly SketchEdge[] {
  const { leg, from, to, real, kind, arms, pieces, own } = draft;
  const stub = inside.has(from) ? (inside.has(to) ? null : "to") : inside.has(to) ? "from" : "outside";
  if (stub === "outside") return [];
  const loose = `${leg.id}~stub`;
  const reach = Math.min(leg.lengthMm, STUB_REAL_MM);
  if (stub === "to") vertices.set(loose, { id: loose, node: null, position: vecAddScaled(leg.from, leg.direction, reach) });
  if (stub === "from") vertices.set(loose, { id: loose, node: null, position: vecAddScaled(leg.to, leg.direction, -reach) });
  const near = stub === "to" ? from : to;
  return [{
    id: leg.id, leg, real, kind, stub, neighbour: !own, pieces, beyond: stub !== null && share !== null && !share.points.has(near),
    from: stub === "from" ? loose : from, to: stub === "to" ? loose : to,
    fromArm: stub === "from" ? NO_ARM : arms[0], toArm: stub === "to" ? NO_ARM : arms[1],
  }];
}

/** A leg is the spool's own when a piece of it is, or when it has no pipe and the fittings at both ends are. */
function legIsOwn({ arms, pieces }: GroundLeg, spool: string | null): boolean {
  if (spool === null || pieces.some((piece) => piece.spool === spool)) return true;
  return pieces.length === 0 && arms.every((arm) => arm.parts.some((part) => part.component.spool === spool));
}
