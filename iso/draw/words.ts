/** Words and numbers the drawing prints. Rounding happens here, once, where a number meets the reader. */
import { vecDot, vecLength, vecSub } from "../geometry/vec3";
import type { Vec3 } from "../geometry/types";
import type { UnitSystem } from "../run/document";
import type { Leg, Model } from "../run/model-types";
import { formatAngleDeg, formatLength } from "../units/format";
import { FOOT_MM, INCH_MM } from "../units/length";
import type { MeasureText } from "./drawing-types";
import * as size from "./sizes";
import type { SketchEdge } from "./sketch";

export type OffsetWord = "RUN" | "ROLL" | "RISE" | "FALL";

export interface OffsetNaming {
  readonly title: "VERTICAL OFFSET" | "HORIZONTAL OFFSET" | "ROLLING OFFSET";
  /** Word of each axis; null where the leg has no component. */
  readonly words: readonly [OffsetWord | null, OffsetWord | null, OffsetWord | null];
  /** Axis of RUN. */
  readonly runAxis: 0 | 1 | 2;
}

export function legNumber(leg: Leg, units: UnitSystem): string {
  return leg.unverified ? `${formatLength(leg.lengthMm, units)} VIF` : formatLength(leg.lengthMm, units);
}

/** The number of a drawn leg; in square brackets what it was, on a comparison of two revisions. */
export function edgeNumber({ leg, was }: SketchEdge, units: UnitSystem): string {
  return was === undefined ? legNumber(leg, units) : `${legNumber(leg, units)} [WAS ${was}]`;
}

/** RUN goes with the leg before (or after) when that follows an axis the offset uses, else with the longer level component. */
export function offsetNaming(model: Model, edge: SketchEdge): OffsetNaming {
  const { real } = edge;
  const node = (pointId: string) => model.nodes.find((other) => other.pointId === pointId);
  const along = (direction: Vec3 | null | undefined): 0 | 1 | 2 | null => {
    for (const axis of [0, 1, 2] as const) if (direction && Math.abs(direction[axis]) > 1 - size.LEVEL_RATIO && real[axis] !== 0) return axis;
    return null;
  };
  const level = Math.abs(real[0]) >= Math.abs(real[1]) ? 0 : 1;
  const runAxis = along(node(edge.leg.fromPointId)?.arriving) ?? along(node(edge.leg.toPointId)?.leaving) ?? (real[level] !== 0 ? level : 2);
  const upright: OffsetWord = real[2] > 0 ? "RISE" : "FALL";
  const word = (axis: 0 | 1 | 2): OffsetWord | null =>
    real[axis] === 0 ? null : axis === runAxis ? (axis === 2 ? upright : "RUN") : axis === 2 ? upright : runAxis === 2 && real[1 - axis] === 0 ? "RUN" : "ROLL";
  const count = real.filter((c) => c !== 0).length;
  const title = count === 3 ? "ROLLING OFFSET" : real[2] === 0 ? "HORIZONTAL OFFSET" : "VERTICAL OFFSET";
  return { title, words: [word(0), word(1), word(2)], runAxis };
}

/** Sum of legs as printed: each rounded first, so that the reader's own addition agrees with the bracketed overall. */
export function overallNumber(legs: readonly Leg[], units: UnitSystem): string {
  const step = units === "imperial" ? INCH_MM / 16 : 1;
  return `(${formatLength(legs.reduce((sum, leg) => sum + Math.round(leg.lengthMm / step) * step, 0), units)})`;
}

export function travelText(edge: SketchEdge, units: UnitSystem): string {
  return `TRAVEL ${edgeNumber(edge, units)}`;
}

export interface EdgeNeed {
  /** Least paper length of each component that is not zero. */
  readonly least: readonly [number, number, number];
  /** Least paper length of an off-axis leg itself; 0 for the others. */
  readonly travel: number;
}

/** Paper a leg needs for its symbols and words. */
export function edgeNeed(model: Model, edge: SketchEdge, measure: MeasureText): EdgeNeed {
  const units = model.document.settings.units;
  const arms = edge.fromArm.room + edge.toArm.room;
  if (edge.stub) {
    const stub = arms + size.STUB_ROOM;
    return { least: [stub, stub, stub], travel: edge.kind === "offset" ? stub : 0 };
  }
  const pipe = edge.pieces.length > 0 ? size.PIPE_LEAST * edge.pieces.length : 0;
  if (edge.kind !== "offset") {
    const text = measure(edgeNumber(edge, units), size.DIMENSION_CAP, "regular") + 2;
    const least = Math.max(arms + pipe, text, size.TARGET_LEAST);
    return { least: [least, least, least], travel: 0 };
  }
  const naming = offsetNaming(model, edge);
  const word = (axis: 0 | 1 | 2): number => {
    const name = naming.words[axis];
    return name === null ? 0 : measure(`${name} ${formatLength(Math.abs(edge.real[axis]), units)}`, size.DIMENSION_CAP, "regular") + 2.5;
  };
  const travel = Math.max(arms + pipe, arms + 3 + measure(travelText(edge, units), size.DIMENSION_CAP, "regular"));
  return { least: [word(0), word(1), word(2)], travel };
}

/** Wished paper length of a real one at stretch s. */
export function targetLength(realMm: number, stretch: number): number {
  return size.TARGET_LEAST + size.TARGET_ROOT * stretch * Math.sqrt(Math.abs(realMm));
}

/** True offset: the leg's reach square to its run axis, mm. */
export function setLength(edge: SketchEdge, runAxis: 0 | 1 | 2): number {
  const way = vecSub(edge.leg.to, edge.leg.from);
  return Math.sqrt(Math.max(0, vecDot(way, way) - way[runAxis] * way[runAxis]));
}

/** Slope of a leg as the trade writes it: 1:n from 1 in 50 down, in/ft in imperial, else percent. */
export function slopeText(leg: Leg, units: UnitSystem): string {
  const level = Math.hypot(leg.to[0] - leg.from[0], leg.to[1] - leg.from[1]);
  const ratio = level > 0 ? Math.abs(leg.to[2] - leg.from[2]) / level : 0;
  if (units === "imperial") return `${formatLength(ratio * FOOT_MM, "imperial")} PER FT`;
  if (ratio > 0 && ratio <= 1 / 50 && Math.abs(1 / ratio - Math.round(1 / ratio)) < 0.05) return `1:${Math.round(1 / ratio)}`;
  return `${(ratio * 100).toFixed(2).replace(/\.?0+$/, "")} %`;
}

/** An angle as a fitter says it: two figures at most after the point, none where they are noughts. */
export function shortAngle(rad: number): string {
  return formatAngleDeg(rad).replace(/\.?0+°$/, "°").replace(/^°$/, "0°");
}

/** Angle of a leg above (or below) the level, radians. */
export function riseAngle(leg: Leg): number {
  const way = vecSub(leg.to, leg.from);
  return Math.asin(Math.min(1, Math.abs(way[2]) / Math.max(vecLength(way), size.LEVEL_MM)));
}
