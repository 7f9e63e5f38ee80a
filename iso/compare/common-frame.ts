/** One frame for two revisions: both sketches placed by one plan, so that what did not change coincides on paper. */
import { vecAdd, vecSub } from "../geometry/vec3";
import type { PaperPoint, Vec3 } from "../geometry/types";
import type { UnitSystem } from "../run/document";
import type { MeasureText } from "../draw/drawing-types";
import { placePlan, type Placed, type PlacePlan } from "../draw/place";
import type { Sketch, SketchEdge, SketchVertex } from "../draw/sketch";
import { legNumber } from "../draw/words";
import { unitedVertices } from "./united-vertices";

export interface CommonFrame {
  readonly plan: PlacePlan;
  readonly before: Sketch;
  /** The later sketch; its legs say what their numbers were. */
  readonly after: Sketch;
  /** Points of the earlier revision that stand where the later one has them. */
  readonly united: ReadonlySet<string>;
}

/** Name in the common frame of an earlier point that has a place of its own. */
const ownName = (id: string): string => `was ${id}`;

export function commonFrame(before: Sketch, later: Sketch, measure: MeasureText): CommonFrame {
  const united = unitedVertices(before, later);
  const after = withEdges(later, later.edges.map((edge) => withOldNumber(edge, before, later.model.document.settings.units)));
  const nameOf = (id: string): string => (united.has(id) ? id : ownName(id));
  const vertices = new Map<string, SketchVertex>(after.vertices);
  for (const [id, position] of ownPositions(before, after, united)) vertices.set(ownName(id), { id: ownName(id), node: null, position });
  const old = before.edges.map((edge): SketchEdge => ({ ...edge, id: ownName(edge.id), from: nameOf(edge.from), to: nameOf(edge.to) }));
  const edges = [...after.edges, ...old.filter((edge) => !after.edges.some((other) => sameRoom(edge, other)))];
  return { plan: placePlan({ ...withEdges(after, edges), vertices }, measure), before, after, united };
}

function withEdges(sketch: Sketch, edges: readonly SketchEdge[]): Sketch {
  const edgesAt = new Map<string, SketchEdge[]>();
  for (const edge of edges) for (const id of [edge.from, edge.to]) edgesAt.set(id, [...(edgesAt.get(id) ?? []), edge]);
  return { ...sketch, edges, edgesAt };
}

function withOldNumber(edge: SketchEdge, before: Sketch, units: UnitSystem): SketchEdge {
  const old = before.edges.find((other) => other.id === edge.id);
  if (!old || old.stub || edge.stub || old.neighbour || edge.neighbour || old.from !== edge.from || old.to !== edge.to) return edge;
  const was = legNumber(old.leg, units);
  return was === legNumber(edge.leg, units) ? edge : { ...edge, was };
}

/** An earlier leg that needs no more paper than a later one between the same places. */
function sameRoom(old: SketchEdge, edge: SketchEdge): boolean {
  if (old.from !== edge.from || old.to !== edge.to || old.stub !== edge.stub) return false;
  return edge.kind === "offset" || (old.fromArm.room === edge.fromArm.room && old.toArm.room === edge.toArm.room && old.pieces.length === edge.pieces.length);
}

/** Where earlier points with a place of their own lie in space: as they lay from the nearest point that was taken over. */
function ownPositions(before: Sketch, after: Sketch, united: ReadonlySet<string>): ReadonlyMap<string, Vec3> {
  const found = new Map<string, Vec3>();
  const at = (id: string): Vec3 | undefined => (united.has(id) ? after.vertices.get(id)?.position : found.get(id));
  const reached = [...before.vertices.keys()].filter((id) => united.has(id));
  const walk = (): void => {
    for (let id = reached.shift(); id !== undefined; id = reached.shift()) {
      for (const edge of before.edgesAt.get(id) ?? []) {
        const other = edge.from === id ? edge.to : edge.from;
        const [here, from, to] = [at(id), before.vertices.get(id), before.vertices.get(other)];
        if (at(other) || !here || !from || !to) continue;
        found.set(other, vecAdd(here, vecSub(to.position, from.position)));
        reached.push(other);
      }
    }
  };
  walk();
  for (const [id, { position }] of before.vertices) {
    if (at(id)) continue;
    found.set(id, position);
    reached.push(id);
    walk();
  }
  return found;
}

/** The two sketches where the common frame was placed. */
export function placedSides({ before, after, united }: CommonFrame, common: Placed): { readonly a: Placed; readonly b: Placed } {
  return { a: placedAs(before, common, (id) => (united.has(id) ? id : ownName(id))), b: placedAs(after, common, (id) => id) };
}

function placedAs(sketch: Sketch, common: Placed, nameOf: (id: string) => string): Placed {
  const at = new Map<string, Vec3>();
  const paper = new Map<string, PaperPoint>();
  const put = (id: string, name: string): void => {
    const [there, point] = [common.at.get(name), common.paper.get(name)];
    if (!there || !point) return;
    at.set(id, there);
    paper.set(id, point);
  };
  for (const id of sketch.vertices.keys()) put(id, nameOf(id));
  // A run that comes back ends at the fitting it meets, under its own point's name too.
  for (const { pointId } of sketch.model.nodes) if (!at.has(pointId)) put(pointId, nameOf(sketch.vertexOf(pointId)));
  return { sketch, projection: common.projection, at, paper };
}
