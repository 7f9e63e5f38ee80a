/**
 * A straight chain as its dimensions see it, in flat numbers: the same for every side and distance tried, so that trying one is
 * sums over these and nothing is spelled out but what is chosen.
 */
import type { PaperPoint } from "../geometry/types";
import type { UnitSystem } from "../run/document";
import type { Chain } from "./chains";
import type { MeasureText, Ref } from "./drawing-types";
import { readingAngle, type Segment } from "./plane";
import * as size from "./sizes";
import { edgeNumber, overallNumber } from "./words";

/** Numbers of a foot of an extension line: its place on the pipe, the gap kept from it, and how far beyond the first line it goes. */
export const FOOT_STRIDE = 4;
/** Places tried for a number. */
export const PLACES = 8;

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

export interface ChainShape {
  /** What is measured, as lines on the pipe, four numbers each: the legs in their order, then the overall. */
  readonly lines: Float64Array;
  /** How far beyond the first line each of them stands, mm. */
  readonly off: Float64Array;
  readonly feet: Float64Array;
  readonly words: readonly WordShape[];
}

/** A line's number: its box, and its places from the line's middle, which no side or distance changes. */
export interface WordShape {
  readonly ref: Ref;
  readonly text: string;
  readonly width: number;
  readonly angle: number;
  readonly cos: number;
  readonly sin: number;
  readonly places: Float64Array;
}

/** Distance of a number's middle from its line: half its capitals and a hair of paper. */
const TEXT_OFF = size.DIMENSION_CAP / 2 + 0.9;

/** @param flanged working points where a flange stroke stands */
export function chainShape(chain: Chain, units: UnitSystem, flanged: ReadonlySet<string>, measure: MeasureText): ChainShape {
  const { edges } = chain;
  const first = edges[0];
  const last = edges[edges.length - 1];
  const whole = first && last && first !== last ? { first, last } : null;
  const count = edges.length + (whole ? 1 : 0);
  const lines = new Float64Array(count * 4);
  const off = new Float64Array(count);
  const feet = new Map<string, { readonly at: PaperPoint; readonly far: number }>();
  edges.forEach(({ edge, from, to }, i) => {
    lines.set(from, i * 4);
    lines.set(to, i * 4 + 2);
    feet.set(edge.from, { at: from, far: 0 });
    feet.set(edge.to, { at: to, far: 0 });
  });
  const words = edges.map(({ edge }, i) => wordShape(lines, i, edge.id, edgeNumber(edge, units), measure));
  if (whole) {
    lines.set(whole.first.from, edges.length * 4);
    lines.set(whole.last.to, edges.length * 4 + 2);
    off[edges.length] = size.DIMENSION_NEXT;
    feet.set(whole.first.edge.from, { at: whole.first.from, far: size.DIMENSION_NEXT });
    feet.set(whole.last.edge.to, { at: whole.last.to, far: size.DIMENSION_NEXT });
    words.push(wordShape(lines, edges.length, `${whole.first.edge.id}..${whole.last.edge.id}`, overallNumber(edges.map(({ edge }) => edge.leg), units), measure));
  }
  const flat = new Float64Array(feet.size * FOOT_STRIDE);
  let foot = 0;
  for (const [id, { at, far }] of feet) {
    flat.set([at[0], at[1], flanged.has(id) ? size.EXTENSION_GAP_FLANGE : size.EXTENSION_GAP, far + size.EXTENSION_OVERSHOOT], foot);
    foot += FOOT_STRIDE;
  }
  return { lines, off, feet: flat, words };
}

/** A number with its places: above its line first, as the trade writes it; beside it when the line is too short. */
function wordShape(lines: Float64Array, line: number, id: string, text: string, measure: MeasureText): WordShape {
  const way: PaperPoint = [lines[line * 4 + 2]! - lines[line * 4]!, lines[line * 4 + 3]! - lines[line * 4 + 1]!];
  const span = Math.sqrt(way[0] * way[0] + way[1] * way[1]);
  const width = measure(text, size.DIMENSION_CAP, "regular");
  const angle = readingAngle(way);
  const cos = Math.cos(angle);
  const sin = Math.sin(angle);
  const beside = span / 2 + width / 2 + 3;
  const slack = Math.max(0, (span - width) / 2 - 1);
  const along = [0, slack, -slack, 0, beside, -beside, beside, -beside];
  const places = new Float64Array(PLACES * 2);
  for (let i = 0; i < PLACES; i++) {
    const up = i === 3 || i > 5 ? -TEXT_OFF : TEXT_OFF;
    places[i * 2] = cos * along[i]! + sin * up;
    places[i * 2 + 1] = sin * along[i]! - cos * up;
  }
  return { ref: { kind: "dimension", id }, text, width, angle, cos, sin, places };
}

/** The dimensions of a chain spelled out. @param across unit paper vector the extension lines run along @param off of the first line from the pipe, mm */
export function dimensionSet({ lines, off: further, feet, words }: ChainShape, across: PaperPoint, off: number): DimensionSet {
  const shifted = (list: Float64Array, at: number, by: number): PaperPoint => [list[at]! + across[0] * by, list[at + 1]! + across[1] * by];
  const drawn = words.map((_, i): Segment => ({ from: shifted(lines, i * 4, off + further[i]!), to: shifted(lines, i * 4 + 2, off + further[i]!) }));
  const extensions: Segment[] = [];
  for (let at = 0; at < feet.length; at += FOOT_STRIDE) extensions.push({ from: shifted(feet, at, feet[at + 2]!), to: shifted(feet, at, off + feet[at + 3]!) });
  return { lines: drawn, extensions, texts: words.map((word, i) => textOn(drawn[i]!, word)) };
}

function textOn({ from, to }: Segment, { ref, text, width, angle, places }: WordShape): DimensionText {
  const x = (from[0] + to[0]) / 2;
  const y = (from[1] + to[1]) / 2;
  const spelled: PaperPoint[] = [];
  for (let i = 0; i < PLACES; i++) spelled.push([x + places[i * 2]!, y + places[i * 2 + 1]!]);
  return { ref, text, width, capMm: size.DIMENSION_CAP, from, to, angle, places: spelled };
}
