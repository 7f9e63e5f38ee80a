/**
 * Orient: which of the four views reads best. One view per line, frozen at its first issue. The score is a list of named
 * terms, each a count or a share times its weight; smaller is better.
 */
import type { View } from "../run/document";
import type { Model } from "../run/model-types";
import type { MeasureText } from "./drawing-types";
import { shortfall } from "./off-axis";
import { layoutAt, layoutBox, layoutLines, placePlan, type PlacePlan } from "./place";
import { project, PROJECTIONS, type Projection } from "./project";
import { conflictsOf } from "./separate";
import * as size from "./sizes";
import { sketchOf } from "./sketch";

export const VIEWS: readonly View[] = [1, 2, 3, 4];
/** View 2 (from the south-east: north runs up to the right) wins a tie, as the trade is used to. */
const PREFERENCE: Readonly<Record<View, number>> = { 1: 0.4, 2: 0, 3: 0.6, 4: 0.5 };
/** Stretch at which views are compared. */
const TRIAL_STRETCH = 1;

export type ViewTerm = "crossings" | "nearTouches" | "folds" | "degenerateLegs" | "foreshortenedLegs" | "lengthInversions" | "lostScale" | "boxCrossings" | "habit";

/** What one of each costs, against a pipe that passes too near another. */
export const VIEW_WEIGHTS: Readonly<Record<ViewTerm, number>> = {
  /** One pipe behind another: readable with its gap, still a riddle. */
  crossings: 5,
  /** An end or a pipe within 8 mm of a pipe it does not meet; counts how near, too. */
  nearTouches: 1,
  /** Two legs of one point drawn over each other. */
  folds: 12,
  /** An off-axis leg that its true direction would lay on an axis (share of the clearance it misses, and the fact). */
  degenerateLegs: 9,
  /** Share of its length an off-axis leg loses beyond a fifth: it points at the reader. */
  foreshortenedLegs: 15,
  /** Share of pairs of straight legs where the clearly longer one is drawn shorter. */
  lengthInversions: 8,
  /** Side of the paper the drawing takes, in units of 120 mm: what it loses in scale. */
  lostScale: 1,
  /** A pipe or another box over an offset's box. */
  boxCrossings: 1,
  habit: 1,
};

/** Without a font table a character is taken as 0.8 of the capital height wide (Roboto figures, rounded up). */
export const roughMeasure: MeasureText = (text, capMm) => text.length * capMm * 0.8;

/** The view with the best readable score. Deterministic; view 2 for an empty line. Measured by the sheet's own fonts it is the one the sheet takes. */
export function proposeView(model: Model, measure: MeasureText = roughMeasure): View {
  return bestView(placePlan(sketchOf(model, null), measure));
}

export function bestView(plan: PlacePlan): View {
  let best: View = 2;
  let bestScore = Infinity;
  for (const view of VIEWS) {
    const score = scoreOf(viewTerms(plan, view));
    if (score < bestScore - size.PAPER_EPS) [best, bestScore] = [view, score];
  }
  return best;
}

export function scoreOf(terms: Readonly<Record<ViewTerm, number>>): number {
  return (Object.keys(VIEW_WEIGHTS) as ViewTerm[]).reduce((sum, term) => sum + VIEW_WEIGHTS[term] * terms[term], 0);
}

/** The terms of a view's score, before their weights. */
export function viewTerms(plan: PlacePlan, view: View): Readonly<Record<ViewTerm, number>> {
  const projection = PROJECTIONS[view];
  const layout = layoutAt(plan, projection, TRIAL_STRETCH);
  const lines = layoutLines(plan, layout);
  const conflicts = conflictsOf(plan, lines);
  const box = layoutBox(plan, layout);
  const area = plan.edges.length > 0 ? Math.max(1, (box.maxX - box.minX + 60) * (box.maxY - box.minY + 60)) : 1;
  return {
    crossings: conflicts.filter(({ cost }) => cost <= CLEAN_CROSSING).length,
    nearTouches: conflicts.reduce((sum, { cost }) => sum + (cost <= CLEAN_CROSSING ? 0 : Math.min(cost, MOST_OF_ONE)), 0),
    folds: foldsOf(plan, lines),
    ...offAxisTerms(plan, projection),
    lengthInversions: inversions(plan, lines),
    lostScale: Math.sqrt(area) / 120,
    boxCrossings: boxCrossings(plan, lines),
    habit: PREFERENCE[view],
  };
}

/** Cost of a conflict that is no more than a crossing in mid-pipe; and the most one pair may weigh. */
const CLEAN_CROSSING = 1;
const MOST_OF_ONE = 12;

/** Pairs of legs of one point that lie on each other on paper. */
function foldsOf(plan: PlacePlan, lines: Float64Array): number {
  let count = 0;
  const way = (i: number, from: boolean): readonly [number, number] => {
    const sign = from ? 1 : -1;
    const [x, y] = [(lines[i * 4 + 2]! - lines[i * 4]!) * sign, (lines[i * 4 + 3]! - lines[i * 4 + 1]!) * sign];
    const length = Math.hypot(x, y) || 1;
    return [x / length, y / length];
  };
  const at: (readonly [number, boolean])[][] = plan.ids.map(() => []);
  plan.edges.forEach((_, i) => {
    at[plan.from[i]!]!.push([i, true]);
    at[plan.to[i]!]!.push([i, false]);
  });
  for (const legs of at) {
    for (let p = 0; p < legs.length; p++) {
      for (let q = p + 1; q < legs.length; q++) {
        const [a, b] = [way(...legs[p]!), way(...legs[q]!)];
        if (a[0] * b[0] + a[1] * b[1] > FOLD_COSINE) count++;
      }
    }
  }
  return count;
}

const FOLD_COSINE = Math.cos(size.AXIS_CLEARANCE_RAD);

/** A leg drawn shorter than this share of its length reads as pointing at the reader. */
const FORESHORTENED = 0.8;

/** What the true direction of each off-axis leg would do on paper, before any stretching. */
function offAxisTerms(plan: PlacePlan, projection: Projection): Pick<Record<ViewTerm, number>, "degenerateLegs" | "foreshortenedLegs"> {
  let degenerateLegs = 0;
  let foreshortenedLegs = 0;
  for (const { index, clear } of plan.offsets) {
    const { real } = plan.edges[index]!;
    const [x, y] = project(projection, real);
    const short = Math.min(1, shortfall(projection, x, y, clear) / size.AXIS_CLEARANCE_RAD);
    if (short > 0) degenerateLegs += short + 1 / 3;
    foreshortenedLegs += Math.max(0, FORESHORTENED - Math.hypot(x, y) / Math.hypot(real[0], real[1], real[2]));
  }
  return { degenerateLegs, foreshortenedLegs };
}

/** A leg is clearly longer than another from this ratio on. */
const CLEARLY = 1.5;
/** Legs compared: the longest ones say enough. */
const COMPARED = 40;

/** Share of pairs of legs with pipe where the clearly longer one is drawn shorter. */
function inversions(plan: PlacePlan, lines: Float64Array): number {
  const legs = plan.edges.map((edge, i) => ({ real: edge.leg.lengthMm, drawn: Math.hypot(lines[i * 4 + 2]! - lines[i * 4]!, lines[i * 4 + 3]! - lines[i * 4 + 1]!), with: edge.stub === null && edge.pieces.length > 0 }))
    .filter((leg) => leg.with).sort((p, q) => q.real - p.real).slice(0, COMPARED);
  let pairs = 0;
  let wrong = 0;
  for (let i = 0; i < legs.length; i++) {
    for (let j = i + 1; j < legs.length; j++) {
      if (legs[i]!.real < CLEARLY * legs[j]!.real) continue;
      pairs++;
      if (legs[i]!.drawn < legs[j]!.drawn - size.PAPER_EPS) wrong++;
    }
  }
  return pairs === 0 ? 0 : wrong / pairs;
}

/** Pipes that cross the parallelogram an offset's box stands on. */
function boxCrossings(plan: PlacePlan, lines: Float64Array): number {
  let count = 0;
  for (const { index } of plan.offsets) {
    const [x0, x1] = [Math.min(lines[index * 4]!, lines[index * 4 + 2]!), Math.max(lines[index * 4]!, lines[index * 4 + 2]!)];
    const [y0, y1] = [Math.min(lines[index * 4 + 1]!, lines[index * 4 + 3]!), Math.max(lines[index * 4 + 1]!, lines[index * 4 + 3]!)];
    for (let i = 0; i < plan.edges.length; i++) {
      if (i === index || plan.from[i] === plan.to[index] || plan.to[i] === plan.from[index] || plan.from[i] === plan.from[index] || plan.to[i] === plan.to[index]) continue;
      const [ax, ay, bx, by] = [lines[i * 4]!, lines[i * 4 + 1]!, lines[i * 4 + 2]!, lines[i * 4 + 3]!];
      if (Math.max(ax, bx) > x0 && Math.min(ax, bx) < x1 && Math.max(ay, by) > y0 && Math.min(ay, by) < y1) count++;
    }
  }
  return count;
}
