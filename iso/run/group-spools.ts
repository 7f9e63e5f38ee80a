/**
 * Fifth pass: what stays connected when the field joints open. Bolted faces hold together unless their place is the
 * field. A set without any pipe or shop weld (a valve bolted in at site, a loose gasket) is no spool: it goes on its
 * neighbour's list, marked field.
 */
import type { JointDraft } from "./build-types";
import type { Component } from "./model-types";
import type { PieceDraft } from "./piece-draft";

export interface SpoolGroup {
  /** Id of its first part in flow order. */
  readonly anchor: string;
  readonly componentIds: readonly string[];
  readonly pieceKeys: readonly string[];
  /** Its loose parts, delivered with it and fitted in the field. */
  readonly loose: ReadonlySet<string>;
}

export interface Parts {
  /** Component ids and piece keys in flow order. */
  readonly order: readonly string[];
  readonly components: readonly Component[];
  readonly pieces: readonly PieceDraft[];
  readonly joints: readonly JointDraft[];
  readonly held: readonly (readonly [string, string])[];
}

/** Spools in flow order of their first part. Every component and piece is in exactly one. */
export function groupSpools(parts: Parts): SpoolGroup[] {
  const sets = new DisjointSets(parts.order);
  for (const [a, b] of parts.held) sets.unite(a, b);
  const solid = new Set<string>();
  for (const j of parts.joints) {
    const known = [j.a, j.b].filter((id): id is string => id !== null && sets.has(id));
    if (j.place === "shop" && known.length === 2) sets.unite(known[0]!, known[1]!);
    if (j.place === "shop" && j.gasketId !== null && known[0] !== undefined) sets.unite(known[0], j.gasketId);
  }
  for (const j of parts.joints) {
    if (j.place !== "shop" || j.kind === "bolted" || j.kind === "attachment") continue;
    for (const id of [j.a, j.b]) if (id !== null && sets.has(id)) solid.add(sets.rootOf(id));
  }
  for (const piece of parts.pieces) solid.add(sets.rootOf(piece.key));
  const home = looseHomes(parts, sets, solid);
  return collectGroups(parts, sets, solid, home);
}

/** Where each loose set goes: up the line if it can, else down it; sets of loose parts only stay by themselves. */
function looseHomes(parts: Parts, sets: DisjointSets, solid: ReadonlySet<string>): Map<string, string> {
  const home = new Map<string, string>();
  const links: (readonly [string, string])[] = [];
  for (const j of parts.joints) {
    const [a, b] = [j.a !== null && sets.has(j.a) ? sets.rootOf(j.a) : null, j.b !== null && sets.has(j.b) ? sets.rootOf(j.b) : null];
    const gasket = j.gasketId === null ? null : sets.rootOf(j.gasketId);
    if (a !== null && b !== null && a !== b) links.push([a, b]);
    const carrier = a ?? b;
    if (gasket !== null && carrier !== null && gasket !== carrier) links.push([carrier, gasket]);
  }
  const settled = (root: string) => solid.has(root) || home.has(root);
  const target = (root: string) => home.get(root) ?? root;
  const pass = (list: readonly (readonly [string, string])[], flip: boolean): boolean => {
    let moved = false;
    for (const [up, down] of list) {
      const [from, to] = flip ? [down, up] : [up, down];
      if (settled(from) && !settled(to)) {
        home.set(to, target(from));
        moved = true;
      }
    }
    return moved;
  };
  const backwards = [...links].reverse();
  while (pass(links, false) || pass(backwards, true)) {
    // each round settles at least one more set, so this ends
  }
  return home;
}

function collectGroups(parts: Parts, sets: DisjointSets, solid: ReadonlySet<string>, home: ReadonlyMap<string, string>): SpoolGroup[] {
  const pieces = new Set(parts.pieces.map((p) => p.key));
  const groups = new Map<string, { anchor: string | null; first: string; componentIds: string[]; pieceKeys: string[]; loose: Set<string> }>();
  for (const id of parts.order) {
    const own = sets.rootOf(id);
    const root = home.get(own) ?? own;
    const group = groups.get(root) ?? { anchor: null, first: id, componentIds: [], pieceKeys: [], loose: new Set<string>() };
    groups.set(root, group);
    (pieces.has(id) ? group.pieceKeys : group.componentIds).push(id);
    if (root !== own) group.loose.add(id);
    else group.anchor ??= id;
  }
  const place = new Map(parts.order.map((id, i) => [id, i]));
  return [...groups.values()]
    .map((g) => ({ ...g, anchor: g.anchor ?? g.first }))
    .sort((a, b) => (place.get(a.anchor) ?? 0) - (place.get(b.anchor) ?? 0));
}

/** Union-find with path halving; unions keep the part that comes first. */
class DisjointSets {
  private readonly parent = new Map<string, string>();

  constructor(ids: readonly string[]) {
    for (const id of ids) this.parent.set(id, id);
  }

  has(id: string): boolean {
    return this.parent.has(id);
  }

  rootOf(id: string): string {
    let at = id;
    for (;;) {
      const up = this.parent.get(at) ?? at;
      if (up === at) return at;
      const above = this.parent.get(up) ?? up;
      this.parent.set(at, above);
      at = above;
    }
  }

  unite(a: string, b: string): void {
    if (!this.has(a) || !this.has(b)) return;
    const [ra, rb] = [this.rootOf(a), this.rootOf(b)];
    if (ra !== rb) this.parent.set(rb, ra);
  }
}
