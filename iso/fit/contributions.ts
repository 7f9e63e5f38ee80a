/** What each reading and each tolerance does to the fit: its part of the worst mismatch, and the chance without it. */
import type { FitSource } from "./errors";
import type { FitCondition, FitContribution } from "./fit-types";
import { FEWER_POINTS } from "./normal-points";
import { chancesOf } from "./probability";
import type { SharedJoint } from "./share";
import { covarianceOf, factorOf } from "./twist";

/** Rows of a joint that a condition is judged by, each as a length or an angle of one kind. */
export function conditionRows(joint: SharedJoint, condition: FitCondition): number[][] {
  const row = (k: number, factor = 1) => joint.rows[k]!.map((v) => v * factor);
  switch (condition) {
    case "gap":
      return [row(0)];
    case "hi-lo":
      return [row(1), row(2)];
    case "opening":
      return [row(3), row(4)];
    case "rotation":
      return [row(1), row(2), row(5, joint.limits.holes?.radiusMm ?? 0)];
  }
}

/** Variance of a condition from these columns. */
export function conditionVariance(rows: readonly (readonly number[])[], columns: readonly (readonly number[])[]): number {
  return columns.reduce((sum, column) => sum + rows.reduce((part, row) => part + row.reduce((d, v, i) => d + v * column[i]!, 0) ** 2, 0), 0);
}

/**
 * @param worst condition whose variance is shared out.
 * @param probability the chance as it is, counted on all points.
 */
export function contributionsOf(sources: readonly FitSource[], joints: readonly SharedJoint[], worst: { readonly joint: SharedJoint; readonly condition: FitCondition }, probability: number, odMm: number): FitContribution[] {
  const rows = conditionRows(worst.joint, worst.condition);
  const parts = sources.map((source) => conditionVariance(rows, source.columns));
  const all = parts.reduce((sum, part) => sum + part, 0);
  const whole = covarianceOf(sources.flatMap((source) => source.columns));
  const chance = (covariance: readonly (readonly number[])[]) => chancesOf(joints, factorOf(covariance), odMm, FEWER_POINTS).probability;
  const base = chance(whole);
  return sources
    .map((source, at) => {
      const own = covarianceOf(source.columns);
      const without = (kept: number) => whole.map((line, i) => line.map((v, j) => v - (1 - kept) * own[i]![j]!));
      const better = (kept: number) => Math.min(Math.max(probability + chance(without(kept)) - base, 0), 1);
      return { id: source.id, kind: source.kind, name: source.name, share: all > 0 ? parts[at]! / all : 0, exact: better(0), halved: better(0.25) };
    })
    .sort((a, b) => b.share - a.share);
}
