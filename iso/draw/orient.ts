/** Orient: which of the four views reads best. One view per line, frozen at its first issue. */
import type { View } from "../run/document";
import type { Model } from "../run/model-types";
import { drawnEdges, type DrawnEdge } from "./drawn";
import type { MeasureText } from "./drawing-types";
import { segmentsDistance } from "../geometry/paper";
import { offsetPass } from "./offset-box";
import { placeAll, placePlan, type Placed, type PlacePlan } from "./place";
import { crossingOf, paperBoxAround } from "./plane";
import { axisAngle, project, PROJECTIONS, type Projection } from "./project";
import * as size from "./sizes";
import { sketchOf } from "./sketch";

export const VIEWS: readonly View[] = [1, 2, 3, 4];
/** View 2 (from the south-east: north runs up to the right) wins a tie, as the trade is used to. */
const PREFERENCE: Readonly<Record<View, number>> = { 1: 0.4, 2: 0, 3: 0.6, 4: 0.5 };
/** Stretch at which views are compared. */
const TRIAL_STRETCH = 1;

/** Without a font table a character is taken as 0.8 of the capital height wide (Roboto figures, rounded up). */
export const roughMeasure: MeasureText = (text, capMm) => text.length * capMm * 0.8;

/** The view with the best readable score. Deterministic; view 2 for an empty line. */
export function proposeView(model: Model): View {
  const plan = placePlan(sketchOf(model, null), roughMeasure);
  return bestView(plan);
}

export function bestView(plan: PlacePlan): View {
  let best: View = 2;
  let bestScore = Infinity;
  for (const view of VIEWS) {
    const score = viewScore(plan, PROJECTIONS[view]) + PREFERENCE[view];
    if (score < bestScore - size.PAPER_EPS) [best, bestScore] = [view, score];
  }
  return best;
}

/** Smaller is better: crossings, near touches, off-axis legs that would fall on an axis or draw short, lost room. */
export function viewScore(plan: PlacePlan, projection: Projection): number {
  const placed = placeAll(plan, projection, TRIAL_STRETCH);
  const drawn = drawnEdges(placed);
  const box = paperBoxAround(drawn.flatMap((d) => [d.from, d.to]));
  const area = drawn.length > 0 ? Math.max(1, (box.maxX - box.minX + 60) * (box.maxY - box.minY + 60)) : 1;
  return crowding(drawn) + offAxisScore(drawn, projection) + Math.sqrt(area) / 120 + boxCrowding(placed, drawn);
}

function crowding(drawn: readonly DrawnEdge[]): number {
  let score = 0;
  for (let i = 0; i < drawn.length; i++) {
    for (let j = i + 1; j < drawn.length; j++) {
      const [a, b] = [drawn[i], drawn[j]];
      if (!a || !b || apart(a, b)) continue;
      const joined = a.edge.from === b.edge.to || a.edge.to === b.edge.from || a.edge.from === b.edge.from || a.edge.to === b.edge.to;
      if (joined) score += folded(a, b) ? 12 : 0;
      else if (crossingOf(a, b)) score += 5;
      else if (segmentsDistance(a.from, a.to, b.from, b.to) < size.NEAR_TOUCH) score += 3.5;
    }
  }
  return score;
}

function apart(a: DrawnEdge, b: DrawnEdge): boolean {
  const m = size.NEAR_TOUCH;
  return (
    Math.max(a.from[0], a.to[0]) + m < Math.min(b.from[0], b.to[0]) || Math.max(b.from[0], b.to[0]) + m < Math.min(a.from[0], a.to[0]) ||
    Math.max(a.from[1], a.to[1]) + m < Math.min(b.from[1], b.to[1]) || Math.max(b.from[1], b.to[1]) + m < Math.min(a.from[1], a.to[1])
  );
}

/** Two legs of one point that lie on each other on paper. */
function folded(a: DrawnEdge, b: DrawnEdge): boolean {
  const sign = a.edge.from === b.edge.from || a.edge.to === b.edge.to ? 1 : -1;
  return sign * (a.direction[0] * b.direction[0] + a.direction[1] * b.direction[1]) > Math.cos(size.AXIS_CLEARANCE_RAD);
}

/** Offset boxes that lie over pipe or over each other. */
function boxCrowding(placed: Placed, drawn: readonly DrawnEdge[]): number {
  const lines = offsetPass(placed, drawn).texts.map((text) => text.line);
  let score = 0;
  lines.forEach((line, i) => {
    for (const other of lines.slice(i + 1)) if (crossingOf(line, other)) score += 1.5;
    for (const pipe of drawn) if (crossingOf(line, pipe)) score += 1;
  });
  return score;
}

/** A leg drawn shorter than this share of its length reads as pointing at the reader. */
const FORESHORTENED = 0.8;

/** Counts what the true direction of each off-axis leg would do on paper, before any stretching. */
function offAxisScore(drawn: readonly DrawnEdge[], projection: Projection): number {
  let score = 0;
  for (const { edge } of drawn) {
    if (edge.kind !== "offset") continue;
    const paper = project(projection, edge.real);
    const whole = Math.hypot(edge.real[0], edge.real[1], edge.real[2]);
    const shown = Math.hypot(paper[0], paper[1]) / whole;
    const angle = axisAngle(projection, paper);
    if (angle < size.AXIS_CLEARANCE_RAD) score += 9 * (1 - angle / size.AXIS_CLEARANCE_RAD) + 3;
    if (shown < FORESHORTENED) score += 15 * (FORESHORTENED - shown);
  }
  return score;
}
