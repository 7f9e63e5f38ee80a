/** Pipe: one thick centre line whatever its size (ISO 128-2, from memory), elbows rounded, the rear pipe broken at a crossing. */
import type { PaperPoint } from "../geometry/types";
import type { Component } from "../run/model-types";
import type { Arm, ArmPart } from "./arms";
import { edgePlace, edgePoint, type DrawnEdge, type PassInk } from "./drawn";
import type { DisplayItem, Ink, Ref } from "./drawing-types";
import { isTurnLeg } from "./paper-model";
import { lineItem } from "./paths";
import type { Placed } from "./place";
import { crossingOf, remainingStretches, type Segment } from "./plane";
import * as size from "./sizes";
import { mitrePieces, returnInk, turnItems, TURN_KINDS, turnsOf } from "./turns";

/** Symbols that stand in place of the pipe line. */
const SOLID_KINDS: ReadonlySet<Component["kind"]> = new Set(["valve", "reducer-concentric", "reducer-eccentric", "gasket", "cap", "socket-cap", "flange-blind", "outlet", "instrument"]);
export const NEIGHBOUR_DASH: readonly number[] = [2.4, 1.4];

/** One straight stretch of drawn pipe, as distances along its edge. */
export interface Stretch {
  readonly drawn: DrawnEdge;
  readonly from: number;
  readonly to: number;
  readonly neighbour: boolean;
}

export function pipeStretches(placed: Placed, drawn: readonly DrawnEdge[]): readonly Stretch[] {
  return drawn.filter((d) => !isTurnLeg(d.edge.leg)).flatMap((d) => {
    const { fromArm, toArm } = d.edge;
    const cuts = [...partCuts(fromArm).map(([a, b]) => [a, b] as const), ...partCuts(toArm).map(([a, b]) => [d.length - b, d.length - a] as const)];
    const foreign = foreignRanges(placed, d);
    return remainingStretches(d.length, cuts).flatMap(([from, to]) => splitByNeighbour(d, from, to, foreign));
  });
}

function partCuts(arm: Arm): readonly (readonly [number, number])[] {
  const turns = (part: ArmPart): boolean => TURN_KINDS.has(part.component.kind);
  return arm.parts.filter((part) => turns(part) || SOLID_KINDS.has(part.component.kind)).map((part) => [part.inner, part.outer] as const);
}

/** Ranges of an edge that belong to a neighbour spool. */
function foreignRanges(placed: Placed, d: DrawnEdge): readonly (readonly [number, number])[] {
  const { whole, isOwn } = placed.sketch;
  if (whole) return [];
  const ranges: (readonly [number, number])[] = [];
  const { fromArm, toArm, pieces, stub } = d.edge;
  for (const part of fromArm.parts) if (!isOwn(part.component.id)) ranges.push([part.inner, part.outer]);
  for (const part of toArm.parts) if (!isOwn(part.component.id)) ranges.push([d.length - part.outer, d.length - part.inner]);
  const start = stub === "from" ? 0 : fromArm.room;
  const end = stub === "to" ? d.length : d.length - toArm.room;
  if (stub || (pieces.length === 0 && d.edge.neighbour)) return [...ranges, [start, end]];
  for (const piece of pieces) if (!isOwn(piece.key)) ranges.push([Math.max(start, edgePlace(d, piece.start) - 0.5), Math.min(end, edgePlace(d, piece.end) + 0.5)]);
  return ranges;
}

function splitByNeighbour(drawn: DrawnEdge, from: number, to: number, foreign: readonly (readonly [number, number])[]): readonly Stretch[] {
  const clipped = foreign.map(([a, b]) => [Math.max(a, from), Math.min(b, to)] as const).filter(([a, b]) => b > a + 0.05);
  const own = remainingStretches(to - from, clipped.map(([a, b]) => [a - from, b - from] as const));
  return [
    ...own.map(([a, b]) => ({ drawn, from: a + from, to: b + from, neighbour: false })),
    ...clipped.map(([a, b]) => ({ drawn, from: a, to: b, neighbour: true })),
  ];
}

export function pipePass(placed: Placed, drawn: readonly DrawnEdge[], stretches: readonly Stretch[]): PassInk {
  const hidden = hiddenCuts(stretches);
  const items: DisplayItem[] = [];
  const heavy: Segment[] = [];
  stretches.forEach((stretch, i) => {
    const ref: Ref = { kind: "leg", id: stretch.drawn.edge.id };
    heavy.push({ from: edgePoint(stretch.drawn, stretch.from), to: edgePoint(stretch.drawn, stretch.to) });
    for (const [a, b] of remainingStretches(stretch.to - stretch.from, hidden[i] ?? [])) {
      const from = edgePoint(stretch.drawn, stretch.from + a);
      const to = edgePoint(stretch.drawn, stretch.from + b);
      items.push(lineItem("halo", null, from, to, size.PIPE_WIDTH + 1.2, "paper"));
      items.push(pipeLine(ref, from, to, stretch.neighbour));
    }
  });
  for (const turn of turnsOf(placed, drawn)) {
    items.push(...turnItems(turn, mitrePieces(placed, turn.component.pointId)));
    const middle: PaperPoint = [turn.start[0] / 4 + turn.corner[0] / 2 + turn.end[0] / 4, turn.start[1] / 4 + turn.corner[1] / 2 + turn.end[1] / 4];
    heavy.push({ from: turn.start, to: middle }, { from: middle, to: turn.end });
  }
  const returns = returnInk(placed, drawn);
  return { items: [...items, ...returns.items], heavy: [...heavy, ...returns.heavy], light: [] };
}

function pipeLine(ref: Ref, from: PaperPoint, to: PaperPoint, neighbour: boolean): DisplayItem {
  const ink: Ink = neighbour ? "grey" : "ink";
  return neighbour ? lineItem("pipe", ref, from, to, size.PIPE_WIDTH, ink, NEIGHBOUR_DASH) : lineItem("pipe", ref, from, to, size.PIPE_WIDTH, ink);
}

/** For each stretch the intervals to leave open where a nearer pipe crosses it. Depth is taken from drawn coordinates. */
export function hiddenCuts(stretches: readonly Stretch[]): readonly (readonly (readonly [number, number])[])[] {
  const cuts: [number, number][][] = stretches.map(() => []);
  const lines = stretches.map((s) => ({ from: edgePoint(s.drawn, s.from), to: edgePoint(s.drawn, s.to) }));
  for (let i = 0; i < lines.length; i++) {
    for (let j = i + 1; j < lines.length; j++) {
      const [a, b, p, q] = [lines[i], lines[j], stretches[i], stretches[j]];
      if (!a || !b || !p || !q) continue;
      const crossing = crossingOf(a, b);
      if (!crossing) continue;
      const nearer = depthAt(p, crossing.t) >= depthAt(q, crossing.s);
      const [rear, at, list] = nearer ? [q, crossing.s, cuts[j]] : [p, crossing.t, cuts[i]];
      const sine = Math.abs(p.drawn.direction[0] * q.drawn.direction[1] - p.drawn.direction[1] * q.drawn.direction[0]);
      const half = Math.min(6, size.HIDDEN_GAP / 2 / Math.max(sine, 0.3));
      const along = at * (rear.to - rear.from);
      list?.push([Math.max(0, along - half), along + half]);
    }
  }
  return cuts;
}

function depthAt(stretch: Stretch, t: number): number {
  const { drawn } = stretch;
  const along = drawn.length > 0 ? (stretch.from + t * (stretch.to - stretch.from)) / drawn.length : 0;
  return drawn.depthFrom + along * (drawn.depthTo - drawn.depthFrom);
}
