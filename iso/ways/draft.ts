/** A way in the making: which fittings in which order, the direction and the length of each straight. */
import { WAYS_DIRECT_MM } from "../geometry/tolerances";
import type { Vec3 } from "../geometry/types";
import type { Nps } from "../run/document";
import { formatDecimal } from "../units/format";
import { isLegal, pipeAt, straightRules, type StraightRule } from "./layout";
import type { WaysProblem } from "./problem";
import type { StockElbow } from "./stock";
import type { ElbowRadius, WayKind, WayTurn } from "./ways-types";

export type DraftTurn = Omit<WayTurn, "corner">;

export interface Draft {
  readonly kind: WayKind;
  readonly turns: readonly DraftTurn[];
  readonly reducerAt: number | null;
  /** Unit direction of each straight, end 0's axis first, into end 1 last. */
  readonly directions: readonly Vec3[];
  /** Corner-to-corner length of each straight. */
  readonly lengths: readonly number[];
  /** A straight whose faces are welded although they stand a hair off one gap: an elbow ground to an elbow. */
  readonly ground?: number;
  /** What the ends are cut back by. */
  readonly trims?: { readonly end0Mm: number; readonly end1Mm: number };
  readonly warnings?: readonly string[];
}

/** The turn of a whole elbow. */
export function stockTurn(elbow: StockElbow, nps: Nps): DraftTurn {
  return {
    fitting: { make: "elbow", name: elbow.name, radius: elbow.radius, whole: true, tabulated: elbow.tabulated },
    nps, angleRad: elbow.angleRad, radiusMm: elbow.radiusMm, takeOutMm: elbow.takeOutMm, source: elbow.source, unverified: elbow.unverified,
  };
}

/** The turn of an elbow cut to an angle. */
export function trimmedTurn(radius: ElbowRadius, stock: { readonly mm: number; readonly source: string; readonly unverified: boolean }, angleRad: number, nps: Nps): DraftTurn {
  return {
    fitting: { make: "elbow", name: `${radius} cut to ${formatDecimal((angleRad * 180) / Math.PI, 2)}°`, radius, whole: false, tabulated: false },
    nps, angleRad, radiusMm: stock.mm, takeOutMm: stock.mm * Math.tan(angleRad / 2),
    source: `R·tan(θ/2) with R from ${stock.source}`, unverified: stock.unverified,
  };
}

/** Every choice of whole elbows for k turns, sizes by where the reducer stands. */
export function stockChoices(problem: WaysProblem, k: number, reducerAt: number | null): readonly (readonly DraftTurn[])[] {
  let choices: readonly (readonly DraftTurn[])[] = [[]];
  for (let i = 0; i < k; i += 1) {
    const { nps, stock } = pipeAt(problem, i, reducerAt);
    choices = choices.flatMap((before) => stock.map((elbow) => [...before, stockTurn(elbow, nps)]));
  }
  return choices;
}

export function rulesOf(problem: WaysProblem, turns: readonly DraftTurn[], reducerAt: number | null): StraightRule[] {
  return straightRules(problem, turns.map((t) => t.takeOutMm), reducerAt);
}

/** Whether every straight of a draft leaves its faces welded or room for a pipe. */
export function isLegalDraft(draft: Draft, rules: readonly StraightRule[]): boolean {
  return draft.lengths.every((length, j) => {
    const rule = rules[j];
    return rule !== undefined && isLegal(length - rule.baseMm, rule);
  });
}

/** The drafts that no other beats in both welds and length; of equal ones the first. */
export function unbeaten(drafts: readonly Draft[], rules: (draft: Draft) => readonly StraightRule[]): Draft[] {
  const judged = drafts.map((draft) => ({ draft, welds: pipesIn(draft, rules(draft)), length: totalOf(draft.lengths) }));
  judged.sort((a, b) => a.welds - b.welds || a.length - b.length);
  let shortest = Infinity;
  return judged.flatMap(({ draft, length }) => {
    if (length >= shortest - WAYS_DIRECT_MM) return [];
    shortest = length;
    return [draft];
  });
}

/** Each pipe brings one weld more than faces welded to each other. */
function pipesIn({ lengths }: Draft, rules: readonly StraightRule[]): number {
  return lengths.filter((length, j) => Math.abs(length - (rules[j]?.baseMm ?? 0)) > WAYS_DIRECT_MM).length;
}

/** Sum of corner-to-corner lengths. */
export function totalOf(lengths: readonly number[]): number {
  return lengths.reduce((sum, length) => sum + length, 0);
}
