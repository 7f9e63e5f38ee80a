/**
 * Onto which sheets a line or spool goes: parts of its tree (sheet-tree.ts), each small enough for its paper. A part too
 * full is cut at the joint whose two sides come nearest to equal sheets, counted from its beginning, so that the first is
 * the longest readable prefix; a branch stays with its tee and a straight line of dimensions together where they can.
 */
import type { SheetShare, Sketch } from "./sketch";
import { goesStraight, NO_LOAD, partingJoint, sheetTree, type Load, type SheetTree, type TreeVertex } from "./sheet-tree";

/** Where two sheets meet. */
export interface Match {
  /** "M1", in the order of the sheets. */
  readonly mark: string;
  readonly legId: string;
  /** The joint they meet at; null where a loop had to be opened between fittings without one. */
  readonly jointKey: string | null;
  readonly pointId: string;
  /** Sheet that shows the leg and its dimension in full, and the one that goes on; from 1. */
  readonly fromSheet: number;
  readonly toSheet: number;
}

export interface SheetPart extends SheetShare {
  readonly vertices: readonly TreeVertex[];
}

/** Most of each kind on one sheet. */
export type SheetCapacity = Load;

export function loadOf(vertices: readonly TreeVertex[]): Load {
  return vertices.reduce((sum, { load }) => ({ welds: sum.welds + load.welds, labels: sum.labels + load.labels }), NO_LOAD);
}

/** How many sheets' worth: 1 = one sheet just full. */
export function fullness(load: Load, capacity: SheetCapacity): number {
  return Math.max(load.welds / capacity.welds, load.labels / capacity.labels);
}

export interface SheetPlan {
  readonly tree: SheetTree;
  readonly parts: readonly SheetPart[];
}

export function wholePlan(sketch: Sketch): SheetPlan {
  const tree = sheetTree(sketch);
  return { tree, parts: [partOf(tree, tree.vertices)] };
}

/** Cuts every part that is fuller than its paper. */
export function splitFull(plan: SheetPlan, capacity: SheetCapacity): SheetPlan {
  const parts = plan.parts.flatMap((part) => splitPart(plan.tree, part.vertices, capacity));
  return inOrder(plan.tree, parts);
}

/** Cuts one part in two whatever it holds; null when nothing in it can be cut. */
export function splitOne(plan: SheetPlan, part: SheetPart, capacity: SheetCapacity): SheetPlan | null {
  const same = plan.parts.find((other) => other.vertices[0] === part.vertices[0]);
  const cut = same ? bestCut(plan.tree, same.vertices, capacity, 2) : null;
  return cut ? inOrder(plan.tree, [...plan.parts.filter((other) => other !== same).map((other) => other.vertices), ...cut]) : null;
}

/**
 * Joins neighbours that are not too full together, the emptiest pair first, as long as `holds` agrees.
 * @param holds whether a plan's parts all stand on their paper
 */
export function joinedParts(start: SheetPlan, capacity: SheetCapacity, holds: (plan: SheetPlan) => boolean): SheetPlan {
  let plan = start;
  const refused = new Set<string>();
  for (let again = true; again; ) {
    again = false;
    for (const [a, b] of neighbours(plan, capacity)) {
      const name = `${a.vertices[0]?.id} ${b.vertices[0]?.id} ${a.vertices.length} ${b.vertices.length}`;
      if (refused.has(name)) continue;
      const both = [...a.vertices, ...b.vertices].sort((p, q) => p.rank - q.rank);
      const joined = inOrder(plan.tree, [...plan.parts.filter((part) => part !== a && part !== b).map((part) => part.vertices), both]);
      if (holds(joined)) {
        plan = joined;
        again = true;
        break;
      }
      refused.add(name);
    }
  }
  return plan;
}

/** Pairs of parts that meet and would fill one sheet at most, the emptiest first. */
function neighbours({ parts, tree }: SheetPlan, capacity: SheetCapacity): readonly (readonly [SheetPart, SheetPart])[] {
  const partOfVertex = new Map<TreeVertex, SheetPart>();
  for (const part of parts) for (const vertex of part.vertices) partOfVertex.set(vertex, part);
  const pairs: { readonly pair: readonly [SheetPart, SheetPart]; readonly full: number }[] = [];
  for (const vertex of tree.vertices) {
    const [a, b] = [vertex.parent && partOfVertex.get(vertex.parent), partOfVertex.get(vertex)];
    if (!a || !b || a === b) continue;
    const full = fullness(loadOf([...a.vertices, ...b.vertices]), capacity);
    if (full <= 1) pairs.push({ pair: [a, b], full });
  }
  return pairs.sort((p, q) => p.full - q.full).map(({ pair }) => pair);
}

function inOrder(tree: SheetTree, parts: readonly (readonly TreeVertex[])[]): SheetPlan {
  const first = (part: readonly TreeVertex[]): number => part[0]?.rank ?? 0;
  return { tree, parts: [...parts].sort((p, q) => first(p) - first(q)).map((vertices) => partOf(tree, vertices)) };
}

/** A leg goes with the point nearer the root; a leg that closes a loop with the point it leaves. */
function partOf(tree: SheetTree, vertices: readonly TreeVertex[]): SheetPart {
  const points = new Set(vertices.map(({ id }) => id));
  const above = new Map(tree.vertices.flatMap((vertex) => (vertex.edge && vertex.parent ? [[vertex.edge.id, vertex.parent.id] as const] : [])));
  const legs = new Set(tree.sketch.edges.filter((edge) => points.has(above.get(edge.id) ?? edge.from)).map((edge) => edge.id));
  for (const node of tree.sketch.model.nodes) if (points.has(tree.sketch.vertexOf(node.pointId))) points.add(node.pointId);
  return { points, legs, vertices };
}

/** Splitting ends at the latest when every point has its own sheet. */
function splitPart(tree: SheetTree, vertices: readonly TreeVertex[], capacity: SheetCapacity): readonly (readonly TreeVertex[])[] {
  const full = fullness(loadOf(vertices), capacity);
  if (full <= 1) return [vertices];
  const cut = bestCut(tree, vertices, capacity, Math.ceil(full));
  return cut ? cut.flatMap((part) => splitPart(tree, part, capacity)) : [vertices];
}

/** The least share of a sheet worth a sheet. */
const LEAST_SHARE = 0.12;
/** Prices, in sheets: taking a straight line of dimensions apart, a small branch off its tee, fittings without pipe between; a bolted face is a natural end. */
const PRICE_STRAIGHT = 0.15;
const PRICE_BRANCH = 0.15;
const PRICE_NO_PIPE = 0.1;
const WORTH_BOLTED = 0.08;
/** A loop is opened, or too small a part cut off, only when nothing else can be. */
const PRICE_LOOP = 1e3;
const PRICE_SMALL = 10;
/** A branch smaller than this share of a sheet belongs with its tee. */
const SMALL_BRANCH = 0.4;

function bestCut(tree: SheetTree, vertices: readonly TreeVertex[], capacity: SheetCapacity, sheets: number): readonly (readonly TreeVertex[])[] | null {
  const inside = new Set(vertices);
  const loads = loadsBelow(vertices, inside);
  const whole = fullness(loadOf(vertices), capacity);
  let best: TreeVertex | null = null;
  let bestPrice = Infinity;
  for (const vertex of vertices) {
    if (!vertex.parent || !inside.has(vertex.parent)) continue;
    const after = fullness(loads.get(vertex) ?? NO_LOAD, capacity);
    const before = whole - after;
    const target = whole / sheets;
    const steps = Math.min(sheets - 1, Math.max(1, Math.round(before / target)));
    let price = Math.abs(before - steps * target) / target;
    if (price - WORTH_BOLTED >= bestPrice) continue;
    const joint = partingJoint(tree.sketch, vertex);
    if (!joint) continue;
    if (vertex.looped) price += PRICE_LOOP;
    if (Math.min(before, after) < LEAST_SHARE * whole / sheets) price += PRICE_SMALL;
    if (joint.kind === "bolted") price -= WORTH_BOLTED;
    else if (goesStraight(tree.sketch, vertex)) price += PRICE_STRAIGHT;
    if (vertex.edge?.pieces.length === 0) price += PRICE_NO_PIPE;
    if (vertex.parent.children.length > 1 && after < SMALL_BRANCH) price += PRICE_BRANCH;
    if (price < bestPrice) [best, bestPrice] = [vertex, price];
  }
  if (!best) return null;
  const below = new Set(subtree(best, inside));
  return [vertices.filter((vertex) => !below.has(vertex)), vertices.filter((vertex) => below.has(vertex))];
}

/** What stands at and below each vertex. */
function loadsBelow(vertices: readonly TreeVertex[], inside: ReadonlySet<TreeVertex>): ReadonlyMap<TreeVertex, Load> {
  const loads = new Map<TreeVertex, { welds: number; labels: number }>();
  for (const vertex of vertices) {
    for (let at: TreeVertex | null = vertex; at && inside.has(at); at = at.parent) {
      const there = loads.get(at);
      if (there) {
        there.welds += vertex.load.welds;
        there.labels += vertex.load.labels;
      } else loads.set(at, { ...vertex.load });
    }
  }
  return loads;
}

function subtree(top: TreeVertex, inside: ReadonlySet<TreeVertex>): readonly TreeVertex[] {
  const found: TreeVertex[] = [];
  const stack = [top];
  for (let at = stack.pop(); at; at = stack.pop()) {
    found.push(at);
    for (const child of at.children) if (inside.has(child)) stack.push(child);
  }
  return found;
}

/** Every leg between two sheets, numbered in the order of the sheets they start on. */
export function matchesOf({ tree, parts }: SheetPlan): readonly Match[] {
  const sheetOf = new Map<string, number>();
  parts.forEach((part, i) => part.vertices.forEach(({ id }) => sheetOf.set(id, i + 1)));
  const found: Omit<Match, "mark">[] = [];
  const treeEdges = new Set(tree.vertices.map(({ edge }) => edge?.id));
  for (const vertex of tree.vertices) {
    if (!vertex.edge || !vertex.parent) continue;
    const [fromSheet, toSheet] = [sheetOf.get(vertex.parent.id) ?? 1, sheetOf.get(vertex.id) ?? 1];
    if (fromSheet !== toSheet) found.push({ legId: vertex.edge.id, jointKey: partingJoint(tree.sketch, vertex)?.key ?? null, pointId: vertex.id, fromSheet, toSheet });
  }
  for (const edge of tree.sketch.edges) {
    if (treeEdges.has(edge.id) || edge.stub !== null || edge.neighbour) continue;
    const [fromSheet, toSheet] = [sheetOf.get(edge.from) ?? 1, sheetOf.get(edge.to) ?? 1];
    if (fromSheet !== toSheet) found.push({ legId: edge.id, jointKey: null, pointId: edge.to, fromSheet, toSheet });
  }
  const ordered = found.sort((p, q) => p.fromSheet - q.fromSheet || p.toSheet - q.toSheet);
  return ordered.map((match, i) => ({ ...match, mark: `M${i + 1}` }));
}
