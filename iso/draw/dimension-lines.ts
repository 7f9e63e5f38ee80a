/** One candidate for a chain's dimensions: lines, extension lines, arrows and numbers for a side and a distance. */
import type { PaperPoint } from "../geometry/types";
import type { UnitSystem } from "../run/document";
import type { Chain } from "./chains";
import type { DisplayItem, MeasureText, Ref } from "./drawing-types";
import { centredBox, centredText, circleSegments, lineItem, pathItem, polygonSegments } from "./paths";
import { readingAngle, type Segment, type TurnedBox } from "./plane";
import * as size from "./sizes";
import { edgeNumber, overallNumber } from "./words";

export interface DimensionText {
  readonly ref: Ref;
  readonly text: string;
  readonly width: number;
  readonly capMm: number;
  readonly from: PaperPoint;
  readonly to: PaperPoint;
  readonly angle: number;
  /** Places for the number, best first. */
  readonly places: readonly PaperPoint[];
}

export interface DimensionSet {
  readonly lines: readonly Segment[];
  readonly extensions: readonly Segment[];
  readonly texts: readonly DimensionText[];
}

/** Distance of a number's middle from its line: half its capitals and a hair of paper. */
const TEXT_OFF = size.DIMENSION_CAP / 2 + 0.9;

/** What a chain's dimensions say: measured once, since every side and distance tried says the same. */
export interface ChainWords {
  readonly legs: readonly DimensionWord[];
  /** The overall; null for a chain of one leg. */
  readonly overall: DimensionWord | null;
}

interface DimensionWord {
  readonly ref: Ref;
  readonly text: string;
  readonly width: number;
}

export function chainWords(chain: Chain, units: UnitSystem, measure: MeasureText): ChainWords {
  const word = (id: string, text: string): DimensionWord => ({ ref: { kind: "dimension", id }, text, width: measure(text, size.DIMENSION_CAP, "regular") });
  const first = chain.edges[0];
  const last = chain.edges[chain.edges.length - 1];
  return {
    legs: chain.edges.map(({ edge }) => word(edge.id, edgeNumber(edge, units))),
    overall: first && last && first !== last ? word(`${first.edge.id}..${last.edge.id}`, overallNumber(chain.edges.map(({ edge }) => edge.leg), units)) : null,
  };
}

/**
 * @param across unit paper vector the extension lines run along
 * @param off distance of the first line from the pipe, mm along `across`
 * @param flanged working points where a flange stroke stands
 */
export function dimensionSet(chain: Chain, words: ChainWords, across: PaperPoint, off: number, flanged: ReadonlySet<string>): DimensionSet {
  const shift = (p: PaperPoint, k: number): PaperPoint => [p[0] + across[0] * k, p[1] + across[1] * k];
  const lines: Segment[] = [];
  const texts: DimensionText[] = [];
  const reach = new Map<string, { at: PaperPoint; off: number }>();
  chain.edges.forEach(({ edge, from, to }, i) => {
    const line = { from: shift(from, off), to: shift(to, off) };
    const word = words.legs[i];
    lines.push(line);
    if (word) texts.push(textOn(line, word));
    reach.set(edge.from, { at: from, off });
    reach.set(edge.to, { at: to, off });
  });
  const first = chain.edges[0];
  const last = chain.edges[chain.edges.length - 1];
  if (first && last && words.overall) {
    const line = { from: shift(first.from, off + size.DIMENSION_NEXT), to: shift(last.to, off + size.DIMENSION_NEXT) };
    lines.push(line);
    texts.push(textOn(line, words.overall));
    reach.set(first.edge.from, { at: first.from, off: off + size.DIMENSION_NEXT });
    reach.set(last.edge.to, { at: last.to, off: off + size.DIMENSION_NEXT });
  }
  const extensions = [...reach].map(([id, { at, off: far }]) => ({
    from: shift(at, flanged.has(id) ? size.EXTENSION_GAP_FLANGE : size.EXTENSION_GAP), to: shift(at, far + size.EXTENSION_OVERSHOOT),
  }));
  return { lines, extensions, texts };
}

/** A number with its places: above its line first, as the trade writes it; beside it when the line is too short. */
function textOn(line: Segment, { ref, text, width }: DimensionWord): DimensionText {
  const way: PaperPoint = [line.to[0] - line.from[0], line.to[1] - line.from[1]];
  const span = Math.hypot(way[0], way[1]);
  const angle = readingAngle(way);
  const along: PaperPoint = [Math.cos(angle), Math.sin(angle)];
  const up: PaperPoint = [Math.sin(angle), -Math.cos(angle)];
  const middle: PaperPoint = [(line.from[0] + line.to[0]) / 2, (line.from[1] + line.to[1]) / 2];
  const at = (k: number, off: number): PaperPoint => [middle[0] + along[0] * k + up[0] * off, middle[1] + along[1] * k + up[1] * off];
  const beside = span / 2 + width / 2 + 3;
  const slack = Math.max(0, (span - width) / 2 - 1);
  const places = [at(0, TEXT_OFF), at(slack, TEXT_OFF), at(-slack, TEXT_OFF), at(0, -TEXT_OFF), at(beside, TEXT_OFF), at(-beside, TEXT_OFF), at(beside, -TEXT_OFF), at(-beside, -TEXT_OFF)];
  return { ref, text, width, capMm: size.DIMENSION_CAP, from: line.from, to: line.to, angle, places };
}

export function textBox(text: DimensionText, at: PaperPoint): TurnedBox {
  return centredBox(at, text.width, text.capMm, text.angle);
}

/** Lines, extension lines and arrows of a chosen set. */
export function dimensionItems(set: DimensionSet): readonly DisplayItem[] {
  const items: DisplayItem[] = [];
  for (const { from, to } of set.extensions) items.push(lineItem("dimension", null, from, to, size.EXTENSION_WIDTH));
  set.lines.forEach((line, i) => {
    const text = set.texts[i];
    const ref = text?.ref ?? null;
    items.push(lineItem("dimension", ref, line.from, line.to, size.DIMENSION_WIDTH), ...dimensionEnds(line, ref));
  });
  return items;
}

export function numberItem(text: DimensionText, at: PaperPoint): DisplayItem {
  return centredText("dimension-text", text.ref, at, text.text, { capMm: text.capMm, rotateRad: text.angle });
}

function dimensionEnds(line: Segment, ref: Ref | null): readonly DisplayItem[] {
  const way: PaperPoint = [line.to[0] - line.from[0], line.to[1] - line.from[1]];
  const span = Math.hypot(way[0], way[1]);
  if (span < size.DOT_SPAN) return [line.from, line.to].map((at) => pathItem("dimension", ref, circleSegments(at, 0.6), { fill: "ink" }));
  const u: PaperPoint = [way[0] / span, way[1] / span];
  const arrow = (tip: PaperPoint, sign: 1 | -1): DisplayItem => {
    const back: PaperPoint = [tip[0] + u[0] * size.ARROW_LENGTH * sign, tip[1] + u[1] * size.ARROW_LENGTH * sign];
    const side: PaperPoint = [-u[1] * size.ARROW_HALF, u[0] * size.ARROW_HALF];
    return pathItem("dimension", ref, polygonSegments([tip, [back[0] + side[0], back[1] + side[1]], [back[0] - side[0], back[1] - side[1]]]), { fill: "ink" });
  };
  return [arrow(line.from, 1), arrow(line.to, -1)];
}
