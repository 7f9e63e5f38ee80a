/** Which row a thing on the drawing belongs to: every ref of the display list leads to a point of the document. */
import type { Model, Ref } from "@/iso";

export type PointOfRef = (ref: Ref) => string | null;

/** Looks refs up in a model. A leg and its piece belong to the point the leg ends at. */
export function pointFinder(model: Model): PointOfRef {
  const points = new Set(model.nodes.map((node) => node.pointId));
  const byId = new Map<string, string>();
  for (const component of model.components) byId.set(`component:${component.id}`, component.pointId);
  for (const joint of model.joints) byId.set(`joint:${joint.key}`, joint.pointId);
  for (const piece of model.pieces) byId.set(`piece:${piece.key}`, piece.legId);
  return (ref) => {
    const found = byId.get(`${ref.kind}:${ref.id}`);
    if (found) return found;
    if (points.has(ref.id)) return ref.id;
    const words = ref.id.split(/[:.>|]/).filter((word) => points.has(word));
    return words[words.length - 1] ?? null;
  };
}

/** Key of the cut piece a thing on the drawing shows, or null: its mark, its pipe, its leg. */
export function pieceFinder(model: Model): (ref: Ref) => string | null {
  const keys = new Set(model.pieces.map((piece) => piece.key));
  const byLeg = new Map(model.pieces.flatMap((piece) => (piece.legIds ?? [piece.legId]).map((leg) => [leg, piece.key] as const)));
  return (ref) => {
    if (ref.kind === "piece") return keys.has(ref.id) ? ref.id : null;
    return ref.kind === "leg" ? (byLeg.get(ref.id) ?? null) : null;
  };
}
