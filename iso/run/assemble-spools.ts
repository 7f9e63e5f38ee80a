/** Sixth pass: each group of parts becomes a spool with its list, weight, box and content key. */
import type { BuildContext } from "./build-context";
import type { JointDraft } from "./build-types";
import type { Point, RunDocument } from "./document";
import type { Parts, SpoolGroup } from "./group-spools";
import type { Leg, Spool } from "./model-types";
import { shippedSpool } from "./ship-spool";
import { spoolBody } from "./spool-body";
import { spoolContent } from "./spool-content";
import { spoolMaterials } from "./spool-materials";

/** Spools with letters, in flow order. `letters[i]` belongs to `groups[i]`. */
export function assembleSpools(
  parts: Parts, groups: readonly SpoolGroup[], letters: readonly string[], legs: readonly Leg[], document: RunDocument, ctx: BuildContext,
  services: ReadonlyMap<string, string> = new Map(),
): Spool[] {
  const groupOf = new Map<string, number>();
  groups.forEach((g, i) => [...g.componentIds, ...g.pieceKeys].forEach((id) => groupOf.set(id, i)));
  const carried = groups.map((): JointDraft[] => []);
  const touching = groups.map((): JointDraft[] => []);
  for (const j of parts.joints) {
    const [a, b] = [groupIndex(j.a, groupOf), groupIndex(j.b, groupOf)];
    const carrier = a ?? b;
    if (carrier !== null) carried[carrier]?.push(j);
    for (const side of new Set([a, b])) if (side !== null) touching[side]?.push(j);
  }
  const points = new Map<string, Point>(document.runs.flatMap((r) => r.points.map((p) => [p.id, p] as const)));
  const legById = new Map(legs.map((l) => [l.id, l]));
  const byId = { components: new Map(parts.components.map((c) => [c.id, c])), pieces: new Map(parts.pieces.map((p) => [p.key, p])) };
  return groups.map((g, i) => {
    const components = g.componentIds.flatMap((id) => byId.components.get(id) ?? []);
    const pieces = g.pieceKeys.flatMap((key) => byId.pieces.get(key) ?? []);
    const joints = carried[i] ?? [];
    const body = spoolBody(components, pieces, legById, ctx.units);
    const letter = letters[i] ?? "?";
    const shipping = shippedSpool({ letter, components, pieces, joints, boxMm: body.boxMm }, ctx);
    const [materials, content] = [
      once(() => spoolMaterials({ components, pieces, loose: g.loose }, ctx.units)),
      once(() => spoolContent({ components, pieces, joints: touching[i] ?? [], loose: g.loose, points, legs: legById, letter, services }, document)),
    ];
    return {
      ...body, letter, anchor: g.anchor, componentIds: g.componentIds, pieceKeys: g.pieceKeys, jointKeys: joints.map((j) => j.key), shippingMm: shipping,
      // Lists and keys are asked for on paper and at a submission, not at every stroke of a key: made when first read.
      get materials() {
        return materials();
      },
      get content() {
        return content();
      },
    };
  });
}

/** The same answer however often it is asked, worked out the first time. */
function once<Answer>(work: () => Answer): () => Answer {
  let known: { readonly answer: Answer } | null = null;
  return () => (known ??= { answer: work() }).answer;
}

function groupIndex(id: string | null, groupOf: ReadonlyMap<string, number>): number | null {
  return id === null ? null : (groupOf.get(id) ?? null);
}
