/** Ends of a survey: position and axis out of the face, with their covariance, or the sentence why there is none yet. */
import { Matrix } from "ml-matrix";
import { SAME_POINT_MM } from "../geometry/tolerances";
import type { Vec3 } from "../geometry/types";
import { vecAddScaled, vecDistance, vecUnit } from "../geometry/vec3";
import { parseDirection } from "../units/direction";
import { INCH_MM, parseLength } from "../units/length";
import { axisFromFace, axisFromLine, axisLeaned, faceFrame, poseFromHoles, type EndPose } from "./end-frame";
import type { SurveyDocument, SurveyEnd } from "./survey-document";
import { markKey, type SurveyFinding } from "./survey-read";
import { DEVIATIONS_IN_TOLERANCE } from "./survey-tools";
import type { Adjustment } from "./survey-types";
import { smallLength } from "./survey-words";

export interface SurveyEndResult extends EndPose {
  readonly id: string;
  readonly name: string;
  /** Six by six: position E, N, U in mm, then axis E, N, U. */
  readonly covariance: readonly (readonly number[])[];
  /** Largest two-deviation radius of the position, mm. */
  readonly positionWithinMm: number;
  /** The same of the axis, radians. */
  readonly axisWithinRad: number;
}

/** ± of one reading at a face, and of a bearing, when nothing is entered: a tape against a straight-edge, an angle finder (common practice). */
const FACE_TOLERANCE_MM = INCH_MM / 32;
const AXIS_TOLERANCE_RAD = (0.2 * Math.PI) / 180;
const STEP = 0.001;

/** What an end is made of: marks (three numbers each), own readings with their deviation, and the function of both. */
interface EndModel {
  readonly marks: readonly string[];
  readonly own: readonly number[];
  readonly sigma: number;
  readonly pose: (places: readonly Vec3[], own: readonly number[]) => EndPose | null;
}

type Refused = (sentence: string) => null;

/** One end; null with a finding added when it cannot be had. */
export function surveyEnd(end: SurveyEnd, document: SurveyDocument, adjustment: Adjustment, findings: SurveyFinding[]): SurveyEndResult | null {
  const refuse: Refused = (words) => {
    findings.push({ code: "end", tone: "wrong", sentence: `End ${end.name || "without a name"}: ${words}`, readingIds: [end.id] });
    return null;
  };
  const model = modelOf(end, document, refuse, (words) => void findings.push({ code: "face-not-flat", tone: "caution", sentence: `End ${end.name}: ${words}`, readingIds: [end.id] }));
  if (!model) return null;
  const missing = model.marks.filter((mark) => !adjustment.coordinates.has(mark));
  if (missing.length > 0) return refuse(`mark ${missing[0]} has no reading yet.`);
  const loose = model.marks.filter((mark) => adjustment.loose.includes(mark));
  if (loose.length > 0) return refuse(`mark ${loose[0]} still hangs loose, so this end is not placed.`);
  const places = model.marks.map((mark) => adjustment.coordinates.get(mark)!);
  const pose = model.pose(places, model.own);
  if (!pose) return refuse(end.axis.kind === "holes" ? "these bolt holes lie on one line; take some from all round the flange." : "its two marks are in one spot, so it has no direction.");
  return withSpread(end, model, places, pose, adjustment);
}

function modelOf(end: SurveyEnd, { units }: SurveyDocument, refuse: Refused, remark: (words: string) => void): EndModel | null {
  const { axis } = end;
  const centre = markKey(end.centre);
  if (centre === "" && axis.kind !== "holes") return refuse("name the mark at the centre of its face.");
  if (axis.kind === "line") {
    const back = markKey(axis.back);
    if (back === "" || back === centre) return refuse("name another mark on the pipe's centre line, behind the face.");
    return { marks: [centre, back], own: [], sigma: 0, pose: ([at, behind]) => poseOf(at!, axisFromLine(behind!, at!)) };
  }
  const points = parseDirection(axis.points);
  if (!points.ok) return refuse(axis.points.trim() === "" ? "say which way it faces, out to the gap: E, UN, 045/30." : points.message);
  const facing: Vec3 = [points.e, points.n, points.u];
  const length = (text: string) => (text.trim() === "" ? null : parseLength(text, units));
  const tolerance = length(end.tolerance);
  const sigma = (tolerance?.ok && tolerance.mm > 0 ? tolerance.mm : FACE_TOLERANCE_MM) / DEVIATIONS_IN_TOLERANCE;
  if (axis.kind === "holes") {
    const marks = [...new Set(axis.marks.map(markKey).filter((mark) => mark !== ""))];
    return marks.length < 3 ? refuse("name three bolt holes or more.") : { marks, own: [], sigma: 0, pose: (places) => poseFromHoles(places, facing) };
  }
  if (axis.kind === "bearing") {
    const { right, up } = faceFrame(facing);
    const degrees = Number.parseFloat(end.tolerance);
    const off = degrees > 0 ? (degrees * Math.PI) / 180 : AXIS_TOLERANCE_RAD;
    return { marks: [centre], own: [0, 0], sigma: off / DEVIATIONS_IN_TOLERANCE, pose: ([at], [a, b]) => poseOf(at!, vecUnit(vecAddScaled(vecAddScaled(facing, right, a!), up, b!))) };
  }
  if (axis.kind === "level") {
    const read = [axis.uprightLean, axis.levelLean, axis.uprightSpan, axis.levelSpan].map(length);
    const [upright, level, uprightSpan, levelSpan] = read.map((each) => (each?.ok ? each.mm : null));
    if (upright === null || level === null || upright === undefined || level === undefined) return refuse("read the face in two directions: with the level upright, and level.");
    if (!uprightSpan || !levelSpan || uprightSpan <= 0 || levelSpan <= 0) return refuse("enter how long the level is that the gaps were read over.");
    return { marks: [centre], own: [upright, level], sigma, pose: ([at], [a, b]) => poseOf(at!, axisLeaned(facing, a! / uprightSpan, b! / levelSpan)) };
  }
  return faceModel(axis, centre, facing, sigma, units, refuse, remark);
}

function faceModel(axis: Extract<SurveyEnd["axis"], { kind: "face" }>, centre: string, facing: Vec3, sigma: number, units: SurveyDocument["units"], refuse: Refused, remark: (words: string) => void): EndModel | null {
  const circle = parseLength(axis.circle, units);
  if (!circle.ok || circle.mm <= SAME_POINT_MM) return refuse("enter the diameter of the circle the distances were read on.");
  const read = axis.distances.flatMap((text, clock) => {
    const parsed = text.trim() === "" ? null : parseLength(text, units);
    return parsed?.ok ? [{ clock, mm: parsed.mm }] : [];
  });
  if (read.length < 3) return refuse("a face needs three distances to the plane, better four.");
  const { residuals } = axisFromFace(facing, circle.mm / 2, read);
  // Four distances, three unknowns: each residual is a quarter of what 12 + 6 misses 3 + 9 by.
  const off = Math.max(...residuals.map(Math.abs)) * 4;
  if (off > 2 * DEVIATIONS_IN_TOLERANCE * sigma) remark(`12 and 6 o'clock together miss 3 and 9 o'clock by ${smallLength(off, units)}; measure the four distances again.`);
  return { marks: [centre], own: read.map(({ mm }) => mm), sigma, pose: ([at], own) => poseOf(at!, axisFromFace(facing, circle.mm / 2, read.map(({ clock }, k) => ({ clock, mm: own[k]! }))).axis) };
}

function poseOf(position: Vec3, axis: Vec3 | null): EndPose | null {
  return axis ? { position, axis } : null;
}

/** What an end's position and axis (six rows) change by with each number it is made of. */
export interface EndSlopes {
  /** Marks it hangs on; three columns each, east, north, up. */
  readonly marks: readonly string[];
  readonly slopes: Matrix;
  /** Its own readings stand in the columns after the marks, each with this standard deviation. */
  readonly own: number;
  readonly sigma: number;
}

/** The slopes of an end at the adjusted places; null where it has no pose. */
export function endSlopes(end: SurveyEnd, document: SurveyDocument, adjustment: Adjustment): EndSlopes | null {
  const model = modelOf(end, document, () => null, () => undefined);
  const places = model?.marks.map((mark) => adjustment.coordinates.get(mark));
  if (!model || !places || places.some((place) => place === undefined)) return null;
  const known = places as Vec3[];
  const pose = model.pose(known, model.own);
  return pose && { marks: model.marks, slopes: slopesOf(model, known, pose), own: model.own.length, sigma: model.sigma };
}

function slopesOf(model: EndModel, places: readonly Vec3[], pose: EndPose): Matrix {
  const inputs = [...places.flat(), ...model.own];
  const at = (values: readonly number[]): number[] => {
    const moved = places.map((_, k) => values.slice(k * 3, k * 3 + 3) as unknown as Vec3);
    const found = model.pose(moved, values.slice(places.length * 3)) ?? pose;
    return [...found.position, ...found.axis];
  };
  const columns = inputs.map((value, k) => {
    const shifted = (by: number) => at(inputs.map((each, i) => (i === k ? value + by : each)));
    const [above, below] = [shifted(STEP), shifted(-STEP)];
    return above.map((each, i) => (each - below[i]!) / (2 * STEP));
  });
  return new Matrix(columns).transpose();
}

function withSpread(end: SurveyEnd, model: EndModel, places: readonly Vec3[], pose: EndPose, adjustment: Adjustment): SurveyEndResult {
  const slopes = slopesOf(model, places, pose);
  const covariance = slopes.mmul(inputCovariance(model, adjustment)).mmul(slopes.transpose());
  const within = (from: number) => DEVIATIONS_IN_TOLERANCE * Math.sqrt(Math.max(0, [0, 1, 2].reduce((sum, i) => sum + covariance.get(from + i, from + i), 0)));
  return { ...pose, id: end.id, name: end.name, covariance: covariance.to2DArray(), positionWithinMm: within(0), axisWithinRad: within(3) };
}

function inputCovariance(model: EndModel, { order, covariance }: Adjustment): Matrix {
  const size = model.marks.length * 3 + model.own.length;
  const joint = Matrix.zeros(size, size);
  const rows = model.marks.map((mark) => order.indexOf(mark) * 3);
  rows.forEach((row, a) => rows.forEach((column, b) => {
    if (row < 0 || column < 0) return;
    for (let i = 0; i < 3; i += 1) for (let j = 0; j < 3; j += 1) joint.set(a * 3 + i, b * 3 + j, covariance[row + i]![column + j]!);
  }));
  model.own.forEach((_, k) => joint.set(model.marks.length * 3 + k, model.marks.length * 3 + k, model.sigma ** 2));
  return joint;
}

/** Two ends that cannot both be there: in one spot, or each behind the other's face within a pipe's width. null when all is well. */
export function endsClash(first: EndPose, second: EndPose, odMm: number): string | null {
  const apart = vecDistance(first.position, second.position);
  if (apart <= SAME_POINT_MM) return "both ends are in one spot.";
  const behind = (a: EndPose, b: EndPose): boolean => {
    const way = b.position.map((v, k) => v - a.position[k]!) as unknown as Vec3;
    const along = way[0] * a.axis[0] + way[1] * a.axis[1] + way[2] * a.axis[2];
    return along < 0 && Math.sqrt(Math.max(apart ** 2 - along ** 2, 0)) < odMm;
  };
  return behind(first, second) && behind(second, first) ? "each lies behind the other's face, inside its pipe." : null;
}
