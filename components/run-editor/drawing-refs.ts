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
