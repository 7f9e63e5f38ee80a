/** Typed points to measured faces and corners, and what is wrong with how they were typed. */
import { INCH_MM } from "../units/length";
import type { UnitSystem } from "../run/document";
import type { Vec3 } from "../geometry/types";
import { vecAdd, vecDistance, vecScale, vecSub, vecUnit } from "../geometry/vec3";
import { poseFromHoles } from "../survey/end-frame";
import { fittedLength, type AsFittedDocument, type FittedPoint } from "./as-fitted-document";
import type { FittedFinding, FittedTolerances, Measured } from "./as-fitted-types";
import type { Wanted } from "./as-fitted-wanted";
import { linearToleranceMm } from "./checks";
import { formatFraction } from "./lengths";

export interface ReadFitted {
  readonly measured: readonly Measured[];
  readonly findings: readonly FittedFinding[];
}

/** An axis taken from a point nearer than this tells no direction. */
const AXIS_LEAST_MM = INCH_MM;
const AXIS_GOOD_MM = 6 * INCH_MM;
/** Two names at one spot. */
const SAME_SPOT_MM = 1;
/** Two readings of one centre agree within this. */
const READINGS_MM = INCH_MM / 8;

interface Placed extends Pick<FittedPoint, "of" | "what"> {
  readonly at: Vec3;
}

export function readFitted(document: AsFittedDocument, wanted: Wanted, units: UnitSystem): ReadFitted {
  const findings: FittedFinding[] = [];
  const placed = document.points.filter((point) => !point.leftOut).flatMap((point) => placedPoint(point, document, wanted, findings));
  const marks = [...wanted.faces, ...wanted.corners].map(({ mark }) => mark).filter((mark) => placed.some((p) => p.of === mark));
  const measured = marks.map((mark) => measuredAt(mark, placed.filter((p) => p.of === mark), units, findings));
  findings.push(...sameSpots(measured));
  return { measured, findings };
}

const wrong = (code: string, sentence: string): FittedFinding => ({ code, tone: "wrong", sentence });

function placedPoint(point: FittedPoint, { readAs }: AsFittedDocument, wanted: Wanted, findings: FittedFinding[]): Placed[] {
  const filled = point.at.filter((text) => text.trim() !== "");
  if (filled.length === 0) return [];
  const name = pointName(point);
  const isKnown = wanted.faces.some((f) => f.mark === point.of) || (point.what === "centre" && wanted.corners.some((c) => c.mark === point.of));
  if (!isKnown) {
    findings.push(wrong("name", point.of === "" ? "A point has no name yet: choose the face or corner it was measured at." : `The sheet has no ${name}; it has ends 1 to ${wanted.faces.length}${wanted.corners.length ? ` and corners W1 to W${wanted.corners.length}` : ""}.`));
    return [];
  }
  if (filled.length < 3) {
    findings.push(wrong("half", `${name}: all three of E, N and U are needed.`));
    return [];
  }
  const read = point.at.map((text) => fittedLength(text, readAs));
  const bad = read.findIndex((one) => !one.ok);
  if (bad >= 0) {
    const one = read[bad]!;
    findings.push(wrong("length", `${name}, ${["E", "N", "U"][bad]}: ${one.ok ? "" : one.message}`));
    return [];
  }
  return [{ of: point.of, what: point.what, at: read.map((one) => (one.ok ? one.mm : 0)) as unknown as Vec3 }];
}

/** "End 1", "End 1, on its axis", "Corner W2". */
export function pointName({ of, what }: Pick<FittedPoint, "of" | "what">): string {
  if (of.startsWith("W")) return `Corner ${of}`;
  return `End ${of}${what === "axis" ? ", on its axis" : what === "hole" ? ", bolt hole" : ""}`;
}

function measuredAt(mark: string, points: readonly Placed[], units: UnitSystem, findings: FittedFinding[]): Measured {
  const of = (what: Placed["what"]) => points.filter((p) => p.what === what).map((p) => p.at);
  const [centres, axes, holes] = [of("centre"), of("axis"), of("hole")];
  const apart = Math.max(0, ...centres.flatMap((a, i) => centres.slice(i + 1).map((b) => vecDistance(a, b))));
  if (apart > READINGS_MM) findings.push({ code: "twice", tone: "warn", sentence: `${pointName({ of: mark, what: "centre" })} was measured twice, ${formatFraction(apart, units)} apart; their mean is taken. Measure it again.` });
  const pose = holes.length >= 3 ? poseFromHoles(holes, [0, 0, 1]) : null;
  if (holes.length >= 3 && !pose) findings.push(wrong("holes", `End ${mark}: its bolt holes stand on one line, which gives no face. Take holes round the circle.`));
  if (holes.length > 0 && holes.length < 3 && centres.length === 0) findings.push(wrong("holes", `End ${mark}: three bolt holes or the centre are needed.`));
  const centre = centres.length > 0 ? mean(centres) : (pose?.position ?? null);
  if (centres.length > 0 && pose && vecDistance(mean(centres), pose.position) > READINGS_MM) findings.push({ code: "circle", tone: "warn", sentence: `End ${mark}: the middle of its bolt holes is ${formatFraction(vecDistance(mean(centres), pose.position), units)} from the centre given. One of them is wrong, or the holes were not taken on the face.` });
  return { mark, centre, axis: axisOf(mark, centre, axes, units, findings) ?? pose?.axis ?? null, holes: centre ? holes : [] };
}

function axisOf(mark: string, centre: Vec3 | null, points: readonly Vec3[], units: UnitSystem, findings: FittedFinding[]): Vec3 | null {
  if (points.length === 0) return null;
  if (!centre) {
    findings.push(wrong("axis", `End ${mark}: a point on its axis needs the centre too.`));
    return null;
  }
  const way = vecSub(points.reduce((far, p) => (vecDistance(p, centre) > vecDistance(far, centre) ? p : far)), centre);
  const length = Math.hypot(...way);
  if (length < AXIS_LEAST_MM) {
    findings.push(wrong("axis", `End ${mark}: the point on its axis is ${formatFraction(length, units)} from the centre and gives no direction. Take it a foot or more along the pipe.`));
    return null;
  }
  if (length < AXIS_GOOD_MM) findings.push({ code: "axis-short", tone: "note", sentence: `End ${mark}: the point on its axis is only ${formatFraction(length, units)} from the centre, so the direction is rough.` });
  return vecUnit(way);
}

function mean(points: readonly Vec3[]): Vec3 {
  return vecScale(points.reduce(vecAdd), 1 / points.length);
}

function sameSpots(measured: readonly Measured[]): FittedFinding[] {
  return measured.flatMap((a, i) => measured.slice(i + 1).flatMap((b): FittedFinding[] =>
    a.centre && b.centre && vecDistance(a.centre, b.centre) < SAME_SPOT_MM ? [wrong("same", `${pointName({ of: a.mark, what: "centre" })} and ${pointName({ of: b.mark, what: "centre" })} stand at one spot: one was typed twice.`)] : []));
}

/** Usual tolerances: position as PFI ES-3; square as ASME B31.3 335.1.1 (1/16 in per ft, 1 mm in 200); bolt holes 1/16 in, 1.5 mm; all from memory. */
export function fittedTolerances(document: AsFittedDocument, nominalInches: number, units: UnitSystem): { readonly tolerances: FittedTolerances; readonly findings: readonly FittedFinding[] } {
  const metric = units === "metric";
  const findings: FittedFinding[] = [];
  const value = (text: string, usual: number, what: string) => {
    if (text.trim() === "") return usual;
    const read = fittedLength(text, metric ? "millimetres" : "inches");
    if (read.ok && read.mm > 0) return read.mm;
    findings.push(wrong("tolerance", `Tolerance of ${what}: "${text}" is not a length over zero; the usual one is taken.`));
    return usual;
  };
  const over = metric ? 1000 : 12 * INCH_MM;
  const { position, square, holes } = document.tolerances;
  return {
    tolerances: {
      positionMm: value(position, linearToleranceMm(nominalInches, units), "position"),
      squareSlope: value(square, metric ? 5 : INCH_MM / 16, "squareness") / over,
      holesMm: value(holes, metric ? 1.5 : INCH_MM / 16, "bolt holes"),
    },
    findings,
  };
}
