/** "Close between ends" as the editor asks it: millimetres in, words and working points out. */
import type { UnitSystem } from "../run/document";
import type { Vec3 } from "../geometry/types";
import { CLOSING_STANDARD_ANGLE } from "../geometry/tolerances";
import { vecAddScaled, vecUnit } from "../geometry/vec3";
import { formatAngleDeg, formatInches, formatLength, formatTerm } from "../units/format";
import { INCH_MM } from "../units/length";
import { closingAdvice } from "./advice";
import type { ClosingInput, ClosingKind, ClosingReason, ClosingSolution } from "./closing-types";
import { closingSpread } from "./end-spread";
import { elbowMarks, type ElbowMarks } from "./elbow-marks";
import { solveClosing } from "./solver";

/** A fixed pipe end: its centre, and the axis pointing out of it (towards the gap to be closed). */
export interface ClosingEnd {
  readonly position: Vec3;
  readonly direction: Vec3;
}

export interface CloseBetweenInput {
  readonly end0: ClosingEnd;
  readonly end1: ClosingEnd;
  readonly radius0Mm: number;
  readonly radius1Mm: number;
  /** Straight tangents of the elbows on the side of each end; 0 when left out. */
  readonly tangents?: { readonly end0Mm: number; readonly end1Mm: number };
  readonly rootGapMm: number;
  /** Largest angle an elbow can be cut to: π/2 from a 90. */
  readonly thetaMaxRad: number;
  readonly units: UnitSystem;
  readonly odMm: number;
  /** What the measurements may be off by; 1/16 in when left out. */
  readonly toleranceMm?: number;
  /** What is known of the ends, instead of one tolerance: twelve by twelve, position and axis (mm, 1) of end 0, then of end 1. */
  readonly endsCovariance?: readonly (readonly number[])[];
}

/** One of the two elbows. */
export interface ClosingBend {
  readonly end: 0 | 1;
  readonly angleRad: number;
  readonly angleDeg: number;
  /** `46.75°` */
  readonly angleText: string;
  readonly takeOutMm: number;
  readonly takeOutText: string;
  readonly radiusMm: number;
  /** "90" when a whole 90 does; else it is trimmed to the marks. */
  readonly elbow: "90" | "trimmed";
  readonly marks: ElbowMarks;
  readonly marksText: { readonly throat: string; readonly sides: string; readonly back: string };
  /** Where the two centre lines meet: the point to insert into the run. */
  readonly workingPoint: Vec3;
}

export interface ClosingWarning {
  readonly code: "trimmed-elbow" | "ill-conditioned" | "slight-bend" | "no-pipe";
  readonly sentence: string;
}

export interface ClosingFound {
  readonly ok: true;
  readonly kind: ClosingKind;
  /** The solver's own answer, millimetres and radians. */
  readonly solution: ClosingSolution;
  /** Present bends, end 0 first. */
  readonly bends: readonly ClosingBend[];
  readonly pipeLengthMm: number;
  /** On a tape: `33 3/16"`, or whole millimetres `849 mm`. */
  readonly pipeText: string;
  /** Roll from the plane of the first bend to that of the second, looking from end 0 to end 1, clockwise positive; null when a bend is absent. */
  readonly rollDeg: number | null;
  readonly rollText: string | null;
  /** The same as an arc on the pipe's outside, π·OD·deg/360, without sign. */
  readonly rollArcMm: number | null;
  readonly rollArcText: string | null;
  /** Working points to insert between the two ends, in order. */
  readonly points: readonly Vec3[];
  readonly warnings: readonly ClosingWarning[];
}

export interface ClosingRefused {
  readonly ok: false;
  readonly reason: ClosingReason;
  readonly sentence: string;
  readonly whatWouldWork: string | null;
}

const DEFAULT_TOLERANCE_MM = INCH_MM / 16;
/** How far the single gap of an elbow welded straight to an elbow may be from the root gap: a fitter grinds that away (common practice). */
const ELBOW_TO_ELBOW_WITHIN_MM = INCH_MM / 64;
/** A bend slighter than this is hardly to be cut; the mismatch is taken at the weld instead. */
/** A bend that the ends' errors turn by more than this is a guess. */
const SHAKY_BEND_RAD = Math.PI / 180;
const SLIGHT_BEND_RAD = (0.5 * Math.PI) / 180;
const DEG = 180 / Math.PI;

/**
 * The only way to close between two fixed ends with two cut elbows and one pipe, or the refusal with what would work.
 * @param input millimetres, radians; directions need not be unit vectors. Never throws on user data.
 */
export function closeBetween(input: CloseBetweenInput): ClosingFound | ClosingRefused {
  const asked = solverInput(input);
  const result = solveClosing(asked);
  const solution = result.solutions[0];
  if (!solution) {
    const sentence = result.sentence ?? "These ends cannot be closed.";
    return { ok: false, reason: result.reason ?? "bad-input", sentence, whatWouldWork: closingAdvice(asked, result, input.units) };
  }
  const bends = bendsOf(input, asked, solution);
  const roll = solution.roll;
  const arcMm = roll === null ? null : (Math.abs(roll) / 2) * input.odMm;
  return {
    ok: true, kind: solution.kind, solution, bends,
    pipeLengthMm: solution.pipeLength, pipeText: tapeText(solution.pipeLength, input.units),
    rollDeg: solution.rollDeg, rollText: roll === null ? null : formatAngleDeg(roll),
    rollArcMm: arcMm, rollArcText: arcMm === null ? null : tapeText(arcMm, input.units),
    points: bends.map((b) => b.workingPoint),
    warnings: warningsOf(bends, solution, isShaky(asked, solution, result.warnings.length > 0, input), input),
  };
}

/** The solver's question: unit axes, and what is left out filled in. */
export function solverInput(input: CloseBetweenInput): ClosingInput {
  const axis = (d: Vec3): Vec3 => (Array.isArray(d) && d.length === 3 ? (vecUnit(d) ?? d) : d);
  return {
    p0: input.end0?.position, p1: input.end1?.position, d0: axis(input.end0?.direction), d1: axis(input.end1?.direction),
    r0: input.radius0Mm, r1: input.radius1Mm,
    a: input.tangents?.end0Mm ?? 0, b: input.tangents?.end1Mm ?? 0,
    gap: input.rootGapMm, thetaMax: input.thetaMaxRad,
    tolerance: input.toleranceMm ?? DEFAULT_TOLERANCE_MM,
    elbowToElbowWithin: ELBOW_TO_ELBOW_WITHIN_MM,
  };
}

function bendsOf(input: CloseBetweenInput, asked: ClosingInput, s: ClosingSolution): ClosingBend[] {
  const bends: ClosingBend[] = [];
  if (s.kind !== "single1" && s.kind !== "straight") {
    bends.push(bendOf(0, s.theta0, s.takeoff0, asked.r0, vecAddScaled(asked.p0, asked.d0, asked.a + asked.gap + s.takeoff0), input));
  }
  if (s.kind !== "single0" && s.kind !== "straight") {
    bends.push(bendOf(1, s.theta1, s.takeoff1, asked.r1, vecAddScaled(asked.p1, asked.d1, asked.b + asked.gap + s.takeoff1), input));
  }
  return bends;
}

function bendOf(end: 0 | 1, angleRad: number, takeOutMm: number, radiusMm: number, workingPoint: Vec3, { odMm, units }: CloseBetweenInput): ClosingBend {
  const marks = elbowMarks(radiusMm, odMm, angleRad);
  return {
    end, angleRad, angleDeg: angleRad * DEG, angleText: formatAngleDeg(angleRad),
    takeOutMm, takeOutText: termText(takeOutMm, units), radiusMm,
    elbow: Math.abs(angleRad - Math.PI / 2) <= CLOSING_STANDARD_ANGLE ? "90" : "trimmed",
    marks,
    marksText: { throat: tapeText(marks.throatMm, units), sides: tapeText(marks.sideMm, units), back: tapeText(marks.backMm, units) },
    workingPoint,
  };
}

/** Whether the errors of the ends turn a bend by more than a degree: by what is known of both, else by one tolerance each way. */
function isShaky(asked: ClosingInput, solution: ClosingSolution, byTolerance: boolean, { endsCovariance }: CloseBetweenInput): boolean {
  const spread = endsCovariance && closingSpread(asked, solution, endsCovariance);
  return spread ? Math.max(spread.theta0, spread.theta1) > SHAKY_BEND_RAD : byTolerance;
}

function warningsOf(bends: readonly ClosingBend[], s: ClosingSolution, shaky: boolean, input: CloseBetweenInput): ClosingWarning[] {
  const warnings: ClosingWarning[] = [];
  const trimmed = bends.filter((b) => b.elbow === "trimmed");
  if (trimmed.length > 0) {
    warnings.push({ code: "trimmed-elbow", sentence: `Trimmed ${trimmed.length > 1 ? "elbows" : "elbow"}, ${trimmed.map((b) => b.angleText).join(" and ")}: confirm with the engineer that trimming is permitted.` });
  }
  if (shaky) {
    const off = input.endsCovariance ? "What the survey may be off by" : `${tapeText(input.toleranceMm ?? DEFAULT_TOLERANCE_MM, input.units)} of error in the measurements`;
    warnings.push({ code: "ill-conditioned", sentence: `${off} turns a bend by more than 1°: measure again, twice, or leave room for a longer pipe.` });
  }
  if (bends.some((b) => b.angleRad < SLIGHT_BEND_RAD)) {
    warnings.push({ code: "slight-bend", sentence: "A bend under half a degree is hardly to be cut; think of taking it as mismatch at the weld." });
  }
  if (s.kind === "elbow-to-elbow") {
    warnings.push({ code: "no-pipe", sentence: "No pipe: elbow is welded straight to elbow with one root gap." });
  }
  return warnings;
}

function tapeText(mm: number, units: UnitSystem): string {
  return units === "metric" ? `${formatLength(mm, units)} mm` : `${formatInches(mm)}"`;
}

function termText(mm: number, units: UnitSystem): string {
  return units === "metric" ? `${formatTerm(mm, units)} mm` : `${formatTerm(mm, units)}"`;
}
