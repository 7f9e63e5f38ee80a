/**
 * Dimensions: per straight chain the plane is chosen by score among the two other axes, both senses and growing distances,
 * against pipe, symbols, thin lines and numbers already on paper. Every number finds a free place or goes to the label pass.
 */
import type { PaperBox, PaperPoint } from "../geometry/types";
import { chainCrowded, flangedPoints, leavingDirections, straightChains, type Chain } from "./chains";
import { boxCost, lineCost, type Choice, type DimensionSurroundings } from "./dimension-costs";
import { chainWords, dimensionItems, dimensionSet, textBox, type ChainWords, type DimensionSet, type DimensionText } from "./dimension-lines";
import type { DrawnEdge } from "./drawn";
import type { DisplayItem, MeasureText } from "./drawing-types";
import type { LabelField } from "./label-field";
import type { Placed } from "./place";
import type { PlacedNumber } from "./number-places";
import { EMPTY_BOX, type Segment, type TurnedBox } from "./plane";
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
  const chosen: (Choice | null)[] = chains.map(() => null);
  const rounds = chains.length > ONE_ROUND_FROM ? 1 : ROUNDS;
  const words = chains.map((chain) => chainWords(chain, placed.sketch.model.document.settings.units, measure));
  const sides = chains.map((chain) => sidesOf(placed, chain, around, leaving));
  for (let round = 0; round < rounds; round++) {
    chains.forEach((chain, i) => {
      const before = chosen[i];
      if (before) release(around.field, before);
      const others = chosen.filter((choice, j): choice is Choice => j !== i && choice !== null);
      const choice = bestChoice(chain, words[i] ?? NO_WORDS, sides[i] ?? [], around, others, flanged);
      chosen[i] = choice;
      choice.boxes.forEach((box) => around.field.add(entryOf(box)));
    });
  }
  const kept = chosen.filter((choice): choice is Choice => choice !== null);
  return {
    items: kept.flatMap((choice) => dimensionItems(choice.set)),
    light: kept.flatMap((choice) => [...choice.set.lines, ...choice.set.extensions]),
    numbers: kept.flatMap((choice) => choice.set.texts.flatMap((text, i) => {
      const at = choice.places[i];
      return at ? [{ text, box: textBox(text, at) }] : [];
    })),
    homeless: kept.flatMap((choice) => choice.set.texts.filter((_, i) => choice.places[i] === null)),
    shown: chains.flatMap((chain) => chain.edges.map(({ edge }) => edge.id)),
  };
}

const entries = new WeakMap<TurnedBox, { id: string; box: TurnedBox; leader: null }>();
function entryOf(box: TurnedBox): { id: string; box: TurnedBox; leader: null } {
  const entry = entries.get(box) ?? { id: "dimension", box, leader: null };
  entries.set(box, entry);
  return entry;
}

function release(field: LabelField, choice: Choice): void {
  choice.boxes.forEach((box) => field.remove(entryOf(box)));
}

const NO_WORDS: ChainWords = { legs: [], overall: null };

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
  return ([0, 1, 2] as const)
    .filter((axis) => axis !== chain.axis)
    .flatMap((axis) => [1, -1].map((sign): Side => {
      const along = placed.projection.axes[axis];
      const across: PaperPoint = [along[0] * sign, along[1] * sign];
      return { across, cost: sideCost(chain, across, around, leaving), crowded };
    }))
    .sort((p, q) => p.cost - q.cost);
}

function bestChoice(chain: Chain, words: ChainWords, sides: readonly Side[], around: DimensionSurroundings, others: readonly Choice[], flanged: ReadonlySet<string>): Choice {
  let best = null as Choice | null;
  for (let level = 0; level < LEVELS; level++) {
    for (const { across, cost, crowded } of sides) {
      const base = (crowded && level === 0 ? 9 : level * 5) + cost;
      const limit: number = best?.cost ?? Infinity;
      if (base >= limit) break;
      const set = dimensionSet(chain, words, across, size.DIMENSION_FIRST + level * size.DIMENSION_NEXT, flanged);
      best = seated(set, around, others, base, limit) ?? best;
    }
  }
  return best ?? { set: { lines: [], extensions: [], texts: [] }, places: [], boxes: [], cost: 0, reach: EMPTY_BOX };
}

/** Prefers outward sides, and never a side on which a pipe leaves one of the chain's points. */
function sideCost(chain: Chain, across: PaperPoint, around: DimensionSurroundings, leaving: ReadonlyMap<string, readonly PaperPoint[]>): number {
  let cost = 0;
  const ids = new Set(chain.edges.flatMap(({ edge }) => [edge.from, edge.to]));
  for (const id of ids) for (const d of leaving.get(id) ?? []) if (d[0] * across[0] + d[1] * across[1] > 0.97) cost += 45;
  const first = chain.edges[0]?.from ?? [0, 0];
  const last = chain.edges[chain.edges.length - 1]?.to ?? first;
  const reach = Math.max(1, Math.hypot(around.extent.maxX - around.extent.minX, around.extent.maxY - around.extent.minY) / 2);
  const outward = ((first[0] + last[0]) / 2 - around.centre[0]) * across[0] + ((first[1] + last[1]) / 2 - around.centre[1]) * across[1];
  return cost + 6 - Math.max(-6, Math.min(6, (outward / reach) * 12));
}

/** Box round a set of lines and the numbers beside them. */
function reachOf(set: DimensionSet): PaperBox {
  const widest = set.texts.reduce((most, text) => Math.max(most, text.width), 0) + 2 * size.DIMENSION_CAP;
  let { minX, minY, maxX, maxY } = EMPTY_BOX;
  for (const list of [set.lines, set.extensions]) {
    for (const { from, to } of list) {
      minX = Math.min(minX, from[0], to[0]);
      minY = Math.min(minY, from[1], to[1]);
      maxX = Math.max(maxX, from[0], to[0]);
      maxY = Math.max(maxY, from[1], to[1]);
    }
  }
  return { minX: minX - widest, minY: minY - widest, maxX: maxX + widest, maxY: maxY + widest };
}

const boxesApart = (a: PaperBox, b: PaperBox): boolean => a.minX > b.maxX || b.minX > a.maxX || a.minY > b.maxY || b.minY > a.maxY;

/** Prices a set with each number on the cheapest free place of its line; null when that is no cheaper than `limit`. */
function seated(set: DimensionSet, around: DimensionSurroundings, all: readonly Choice[], base: number, limit: number): Choice | null {
  const reach = reachOf(set);
  const others = all.filter((other) => !boxesApart(other.reach, reach));
  const places: (PaperPoint | null)[] = [];
  const boxes: TurnedBox[] = [];
  let cost = base + lineCost(set, around, others, limit - base);
  for (const text of set.texts) {
    if (cost >= limit) break;
    const { at, price } = cheapestPlace(text, set, around, others);
    places.push(at);
    cost += price;
    if (!at) continue;
    const box = textBox(text, at);
    boxes.push(box);
    around.field.add(entryOf(box));
  }
  for (const box of boxes) around.field.remove(entryOf(box));
  return cost < limit ? { set, places, boxes, cost, reach } : null;
}

const PLACE_PRICES = [0, 2, 2, 4, 9, 9, 11, 11] as const;
const PRICE_OF_HOMELESS = 200;

function cheapestPlace(text: DimensionText, set: DimensionSet, around: DimensionSurroundings, others: readonly Choice[]): { readonly at: PaperPoint | null; readonly price: number } {
  let best: PaperPoint | null = null;
  let bestCost = Infinity;
  text.places.forEach((at, i) => {
    const price = PLACE_PRICES[i] ?? 12;
    if (price >= bestCost) return;
    const box = textBox(text, at);
    if (around.field.overlapping(box)) return;
    const total = price + boxCost(box, text, set, around, others);
    if (total < bestCost) [best, bestCost] = [at, total];
  });
  return { at: best, price: best ? bestCost : PRICE_OF_HOMELESS };
}
