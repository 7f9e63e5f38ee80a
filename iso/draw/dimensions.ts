/**
 * Dimensions: per straight chain the plane is chosen by score among the two other axes, both senses and growing distances,
 * against pipe, symbols, thin lines and numbers already on paper. Every number finds a free place or goes to the label pass.
 */
import type { PaperPoint } from "../geometry/types";
import { chainCrowded, flangedPoints, leavingDirections, straightChains, type Chain } from "./chains";
import { DimensionTrial, type Choice, type DimensionSurroundings } from "./dimension-costs";
import { dimensionItems, textBox } from "./dimension-lines";
import { chainShape, dimensionSet, type ChainShape, type DimensionText } from "./dimension-shape";
import type { DrawnEdge } from "./drawn";
import type { DisplayItem, MeasureText } from "./drawing-types";
import { BOX_STRIDE } from "./label-field";
import type { Placed } from "./place";
import type { PlacedNumber } from "./number-places";
import type { Segment } from "./plane";
import * as size from "./sizes";

export interface DimensionInk {
  readonly items: readonly DisplayItem[];
  readonly light: readonly Segment[];
  /** Numbers and where they stand; labels may still move them along their lines. */
  readonly numbers: readonly PlacedNumber[];
  /** Numbers without a free place beside their line. */
  readonly homeless: readonly DimensionText[];
  readonly shown: readonly string[];
}

export const NO_DIMENSIONS: DimensionInk = { items: [], light: [], numbers: [], homeless: [], shown: [] };

const LEVELS = 4;
const ROUNDS = 2;
/** From this many chains on one round is enough to keep editing quick. */
const ONE_ROUND_FROM = 24;

export function dimensionPass(placed: Placed, drawn: readonly DrawnEdge[], around: DimensionSurroundings, measure: MeasureText): DimensionInk {
  const chains = [...straightChains(drawn)].sort((p, q) => q.edges.length - p.edges.length);
  const flanged = flangedPoints(placed);
  const leaving = leavingDirections(drawn);
  const trial = new DimensionTrial(around);
  const { units } = placed.sketch.model.document.settings;
  const shapes = chains.map((chain) => chainShape(chain, units, flanged, measure));
  const sides = chains.map((chain) => sidesOf(placed, chain, around, leaving));
  const chosen: (Choice | null)[] = chains.map(() => null);
  const rounds = chains.length > ONE_ROUND_FROM ? 1 : ROUNDS;
  for (let round = 0; round < rounds; round++) {
    for (let i = 0; i < chains.length; i++) {
      chosen[i] = null;
      if (round > 0) around.field.forget(i);
      const choice = bestChoice(trial, shapes[i]!, sides[i]!, chosen);
      chosen[i] = choice;
      if (choice) for (let at = 0; at < choice.boxes.length; at += BOX_STRIDE) around.field.hold(choice.boxes, at, i);
    }
  }
  return inkOf(chosen, chains);
}

function inkOf(chosen: readonly (Choice | null)[], chains: readonly Chain[]): DimensionInk {
  const items: DisplayItem[] = [];
  const light: Segment[] = [];
  const numbers: PlacedNumber[] = [];
  const homeless: DimensionText[] = [];
  for (const choice of chosen) {
    if (!choice) continue;
    const set = dimensionSet(choice.shape, choice.across, choice.off);
    items.push(...dimensionItems(set));
    light.push(...set.lines, ...set.extensions);
    set.texts.forEach((text, i) => {
      const at = text.places[choice.places[i]!];
      if (at) numbers.push({ text, box: textBox(text, at) });
      else homeless.push(text);
    });
  }
  return { items, light, numbers, homeless, shown: chains.flatMap((chain) => chain.edges.map(({ edge }) => edge.id)) };
}

/** A way in which a chain's dimensions may stand off its pipe. */
interface Side {
  readonly across: PaperPoint;
  readonly cost: number;
  /** Many marks along the pipe: the strip next to it is better left to them. */
  readonly crowded: boolean;
}

/** The four sides of a chain: along two axes, either sense, the cheapest first so that dearer ones are soon given up. */
function sidesOf(placed: Placed, chain: Chain, around: DimensionSurroundings, leaving: ReadonlyMap<string, readonly PaperPoint[]>): readonly Side[] {
  const crowded = chainCrowded(placed, chain);
  const ids = new Set<string>();
  for (const { edge } of chain.edges) ids.add(edge.from).add(edge.to);
  return ([0, 1, 2] as const)
    .filter((axis) => axis !== chain.axis)
    .flatMap((axis) => [1, -1].map((sign): Side => {
      const along = placed.projection.axes[axis];
      const across: PaperPoint = [along[0] * sign, along[1] * sign];
      return { across, cost: sideCost(chain, ids, across, around, leaving), crowded };
    }))
    .sort((p, q) => p.cost - q.cost);
}

function bestChoice(trial: DimensionTrial, shape: ChainShape, sides: readonly Side[], others: readonly (Choice | null)[]): Choice | null {
  let best: Choice | null = null;
  for (let level = 0; level < LEVELS; level++) {
    for (const { across, cost, crowded } of sides) {
      const base = (crowded && level === 0 ? 9 : level * 5) + cost;
      // Costs that differ by rounding alone are equal: the first of them stays.
      const limit: number = (best?.cost ?? Infinity) - size.PAPER_EPS;
      if (base >= limit) break;
      best = trial.weigh(shape, across, size.DIMENSION_FIRST + level * size.DIMENSION_NEXT, others, base, limit) ?? best;
    }
  }
  return best;
}

/** Prefers outward sides, and never a side on which a pipe leaves one of the chain's points. */
function sideCost(chain: Chain, ids: ReadonlySet<string>, across: PaperPoint, around: DimensionSurroundings, leaving: ReadonlyMap<string, readonly PaperPoint[]>): number {
  let cost = 0;
  for (const id of ids) for (const d of leaving.get(id) ?? []) if (d[0] * across[0] + d[1] * across[1] > 0.97) cost += 45;
  const first = chain.edges[0]?.from ?? [0, 0];
  const last = chain.edges[chain.edges.length - 1]?.to ?? first;
  const [wide, high] = [around.extent.maxX - around.extent.minX, around.extent.maxY - around.extent.minY];
  const reach = Math.max(1, Math.sqrt(wide * wide + high * high) / 2);
  const outward = ((first[0] + last[0]) / 2 - around.centre[0]) * across[0] + ((first[1] + last[1]) / 2 - around.centre[1]) * across[1];
  return Math.round((cost + 6 - Math.max(-6, Math.min(6, (outward / reach) * 12))) / size.PAPER_EPS) * size.PAPER_EPS;
}
