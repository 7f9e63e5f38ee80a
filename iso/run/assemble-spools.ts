/** Sixth pass: each group of parts becomes a spool with its list, weight, box and content key. */
import type { BuildContext } from "./build-context";
import type { JointDraft } from "./build-types";
import { formatLength } from "../units/format";
import type { Point, RatingClass, RunDocument } from "./document";
import type { Parts, SpoolGroup } from "./group-spools";
import type { Leg, Spool } from "./model-types";
import { spoolBody } from "./spool-body";
import { spoolContent } from "./spool-content";
import { spoolMaterials } from "./spool-materials";

/** Spools with letters, in flow order. `letters[i]` belongs to `groups[i]`. */
export function assembleSpools(
  parts: Parts, groups: readonly SpoolGroup[], letters: readonly string[], legs: readonly Leg[], document: RunDocument, ctx: BuildContext,
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
  const classes = new Map(parts.components.map((c) => [c.id, c.ratingClass]));
  const classOf = (j: JointDraft): RatingClass | null => (j.a === null ? null : classes.get(j.a)) ?? (j.b === null ? null : classes.get(j.b)) ?? null;
  const byId = { components: new Map(parts.components.map((c) => [c.id, c])), pieces: new Map(parts.pieces.map((p) => [p.key, p])) };
  return groups.map((g, i) => {
    const components = g.componentIds.flatMap((id) => byId.components.get(id) ?? []);
    const pieces = g.pieceKeys.flatMap((key) => byId.pieces.get(key) ?? []);
    const joints = carried[i] ?? [];
    const body = spoolBody(components, pieces, ctx.units);
    const letter = letters[i] ?? "?";
    checkShipping(letter, body.boxMm, components[0]?.pointId ?? null, ctx);
    return {
      letter, anchor: g.anchor, componentIds: g.componentIds, pieceKeys: g.pieceKeys, jointKeys: joints.map((j) => j.key), ...body,
      materials: spoolMaterials({ components, pieces, bolted: joints.filter((j) => j.kind === "bolted" && j.gasketId !== null), loose: g.loose, classOf }, ctx.units),
      content: spoolContent({ components, pieces, joints: touching[i] ?? [], loose: g.loose, points, legs: legById }, document),
    };
  });
}

function groupIndex(id: string | null, groupOf: ReadonlyMap<string, number>): number | null {
  return id === null ? null : (groupOf.get(id) ?? null);
}

/** Compares the boxes side by side, longest with longest (a spool may be laid any way round). */
function checkShipping(letter: string, boxMm: readonly [number, number, number], pointId: string | null, ctx: BuildContext): void {
  const have = [...boxMm].sort((a, b) => b - a);
  const room = [...ctx.settings.shippingBoxMm].sort((a, b) => b - a);
  if (have.every((mm, i) => mm <= (room[i] ?? 0))) return;
  const say = have.map((mm) => formatLength(mm, ctx.units)).join(" x ");
  ctx.report("shipping-box", "warning", `Spool ${letter} is ${say}, outside the shipping box: put a field weld where it should come apart.`, { pointId, runId: null });
}
