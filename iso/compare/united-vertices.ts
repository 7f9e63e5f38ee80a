/**
 * Which working points of two revisions stand at one place on paper.
 *
 * A drawing is not to scale: of a leg only its way counts (along which axes, in which sense), its length is the number's
 * to say. So the earlier drawing may use a point of the later one as long as every leg of both can still be drawn the way it
 * runs. Along one axis by itself that is a question of order: a leg without a component there ties its ends to one
 * coordinate, a leg with one puts one end before the other. All is well while no chain of such orders comes back to where it
 * began. Points are taken over one after another, along flow and then against it, and the better of the two is kept; what
 * cannot be taken over gets a place of its own. Where only lengths changed every point is taken over at once.
 */
import type { Vec3 } from "../geometry/types";
import { AXES } from "../draw/clusters";
import type { Sketch, SketchEdge } from "../draw/sketch";

/** A leg between two places, by number. */
interface Tie {
  readonly from: number;
  readonly to: number;
  readonly real: Vec3;
}

/** Ids of the points of the earlier sketch that stand where the later one has them. */
export function unitedVertices(before: Sketch, after: Sketch): ReadonlySet<string> {
  const shared = [...before.vertices.keys()].filter((id) => after.vertices.has(id));
  const numbers = numbersOf(before, after);
  const later = soundTies(after.edges.map((edge) => tieOf(edge, (id) => numbers.after.get(id)!)), numbers.count);
  const own = soundEdges(before, numbers);
  const holds = (united: ReadonlySet<string>): boolean => {
    const place = (id: string): number => (united.has(id) ? numbers.after : numbers.before).get(id)!;
    return isSound([...later, ...own.map((edge) => tieOf(edge, place))], numbers.count);
  };
  const all = new Set(shared);
  if (holds(all)) return all;
  const [along, against] = [taken(shared, holds), taken([...shared].reverse(), holds)];
  return against.size > along.size ? against : along;
}

function taken(ids: readonly string[], holds: (united: ReadonlySet<string>) => boolean): ReadonlySet<string> {
  const united = new Set<string>();
  for (const id of ids) if (!holds(united.add(id))) united.delete(id);
  return united;
}

interface Numbers {
  readonly after: ReadonlyMap<string, number>;
  readonly before: ReadonlyMap<string, number>;
  readonly count: number;
}

function numbersOf(before: Sketch, after: Sketch): Numbers {
  const later = new Map([...after.vertices.keys()].map((id, i) => [id, i]));
  const own = new Map([...before.vertices.keys()].map((id, i) => [id, later.size + i]));
  return { after: later, before: own, count: later.size + own.size };
}

const tieOf = (edge: SketchEdge, place: (id: string) => number): Tie => ({ from: place(edge.from), to: place(edge.to), real: edge.real });

/** A line may contradict itself by a hair (a loop of slopes, drawn level): then the legs that do so are left out of the question. */
function soundTies(ties: readonly Tie[], count: number): readonly Tie[] {
  if (isSound(ties, count)) return ties;
  const kept: Tie[] = [];
  for (const tie of ties) if (isSound([...kept, tie], count)) kept.push(tie);
  return kept;
}

function soundEdges(sketch: Sketch, { before, count }: Numbers): readonly SketchEdge[] {
  const edges = new Map(sketch.edges.map((edge) => [tieOf(edge, (id) => before.get(id)!), edge]));
  return soundTies([...edges.keys()], count).map((tie) => edges.get(tie)!);
}

/** Whether all ties can be drawn the way they run. */
function isSound(ties: readonly Tie[], count: number): boolean {
  return AXES.every((axis) => {
    const parent = Int32Array.from({ length: count }, (_, i) => i);
    const root = (at: number): number => {
      let top = at;
      while (parent[top] !== top) top = parent[top] = parent[parent[top]!]!;
      return top;
    };
    for (const { from, to, real } of ties) if (real[axis] === 0) parent[root(from)] = root(to);
    const orders = ties.filter(({ real }) => real[axis] !== 0).map(({ from, to, real }) => (real[axis] > 0 ? [root(from), root(to)] : [root(to), root(from)]) as readonly [number, number]);
    return hasNoCycle(orders, count);
  });
}

/** Takes away again and again what nothing stands before; a cycle is what stays. */
function hasNoCycle(orders: readonly (readonly [number, number])[], count: number): boolean {
  const into = new Int32Array(count);
  const next = new Map<number, number[]>();
  for (const [low, high] of orders) {
    into[high]!++;
    const list = next.get(low);
    if (list) list.push(high);
    else next.set(low, [high]);
  }
  const free: number[] = [];
  for (let at = 0; at < count; at++) if (into[at] === 0) free.push(at);
  let gone = 0;
  for (let at = free.pop(); at !== undefined; at = free.pop()) {
    gone++;
    for (const high of next.get(at) ?? []) if (--into[high]! === 0) free.push(high);
  }
  return gone === count;
}
