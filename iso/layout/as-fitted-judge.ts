/** Deviations of a fitted spool, face by face and pair by pair, against the tolerances. Signs: measured less wanted. */
import { INCH_MM } from "../units/length";
import type { UnitSystem } from "../run/document";
import type { Vec3 } from "../geometry/types";
import { vecAngle, vecDistance, vecDot, vecLength, vecReject, vecSub } from "../geometry/vec3";
import { formatAngleDeg } from "../units/format";
import type { Fitted } from "./as-fitted-fit";
import { motionPoint, motionWay } from "./as-fitted-motion";
import type { FaceResult, FittedTolerances, FittedVerdict, Measured, PairResult } from "./as-fitted-types";
import { holeTurn, type Wanted, type WantedFace } from "./as-fitted-wanted";
import { formatFraction } from "./lengths";

/** A reading is as fine as the tape: half of 1/32 in, or half a millimetre, is not held against it. */
export const readingGrainMm = (units: UnitSystem): number => (units === "metric" ? 0.5 : INCH_MM / 64);
/** Over this share of a tolerance it is within, but near. */
const NEAR_SHARE = 0.75;
const RANK: readonly FittedVerdict[] = ["none", "go", "near", "trim", "stop"];

export interface Judged {
  readonly faces: readonly FaceResult[];
  readonly corners: readonly FaceResult[];
  readonly pairs: readonly PairResult[];
  readonly verdict: FittedVerdict;
}

export function worstVerdict(all: readonly FittedVerdict[]): FittedVerdict {
  return all.reduce<FittedVerdict>((worst, one) => (RANK.indexOf(one) > RANK.indexOf(worst) ? one : worst), "none");
}

export function judgeFitted(fitted: Fitted, wanted: Wanted, tolerances: FittedTolerances, units: UnitSystem): Judged {
  const held = fitted.free === "nothing";
  const of = (mark: string) => fitted.measured.find((one) => one.mark === mark) ?? null;
  const faces = wanted.faces.map((face) => faceResult(face, of(face.mark), held ? fitted : null, tolerances, units));
  const corners = wanted.corners.map((corner) => cornerResult(corner, of(corner.mark), held ? fitted : null, tolerances, units));
  const pairs = pairResults(fitted, wanted, held, tolerances, units);
  return { faces, corners, pairs, verdict: worstVerdict([...faces, ...corners, ...pairs].map((one) => one.verdict)) };
}

/** go, near or stop by how much of a tolerance is used. */
function judged(offMm: number, toleranceMm: number, units: UnitSystem): FittedVerdict {
  const size = Math.abs(offMm);
  if (size > toleranceMm + readingGrainMm(units)) return "stop";
  return size > NEAR_SHARE * toleranceMm + readingGrainMm(units) ? "near" : "go";
}

const NOTHING: Omit<FaceResult, "mark" | "name"> = { at: null, off: null, alongMm: null, acrossMm: null, leanRad: null, gapMm: null, axis: null, holesRad: null, holesMm: null, verdict: "none", words: [] };

function faceResult(face: WantedFace, measured: Measured | null, fit: Fitted | null, tolerances: FittedTolerances, units: UnitSystem): FaceResult {
  const { mark, name } = face;
  if (!measured?.centre || !fit) return { ...NOTHING, mark, name };
  const at = motionPoint(fit.motion, measured.centre);
  const off = vecSub(at, face.position);
  const alongMm = vecDot(off, face.direction);
  const across = vecReject(off, face.direction);
  const axis = measured.axis ? motionWay(fit.motion, measured.axis) : null;
  const leanRad = axis ? vecAngle(axis, face.direction) : null;
  const gapMm = leanRad === null ? null : Math.sin(leanRad) * face.odMm;
  const holesRad = holeTurn(face, at, measured.holes.map((hole) => motionPoint(fit.motion, hole)));
  const holesMm = holesRad === null || !face.holes ? null : (holesRad * face.holes.circleMm) / 2;
  const checks: readonly (readonly [number, number, string])[] = [
    [alongMm, tolerances.positionMm, `${said(alongMm, units)} ${alongMm > 0 ? "long" : "short"} along its axis`],
    [vecLength(across), tolerances.positionMm, `off its line: ${wayWords(across, units)}`],
    ...(gapMm === null ? [] : [[gapMm, Math.max(tolerances.squareSlope * face.odMm, readingGrainMm(units)), `leans ${formatAngleDeg(leanRad!)}, ${said(gapMm, units)} across the OD`] as const]),
    ...(holesMm === null ? [] : [[holesMm, tolerances.holesMm, `bolt holes turned ${formatAngleDeg(Math.abs(holesRad!))} ${holesRad! > 0 ? "clockwise" : "counter-clockwise"} looking at the face, ${said(holesMm, units)} round the circle`] as const]),
  ];
  const verdicts = checks.map(([amount, tolerance]) => judged(amount, tolerance, units));
  return { mark, name, at, off, alongMm, acrossMm: vecLength(across), leanRad, gapMm, axis, holesRad, holesMm, verdict: worstVerdict(verdicts), words: checks.flatMap(([, , words], i) => (verdicts[i] === "go" ? [] : [words])) };
}

function cornerResult({ mark, name, position }: { readonly mark: string; readonly name: string; readonly position: Vec3 }, measured: Measured | null, fit: Fitted | null, tolerances: FittedTolerances, units: UnitSystem): FaceResult {
  if (!measured?.centre || !fit) return { ...NOTHING, mark, name };
  const at = motionPoint(fit.motion, measured.centre);
  const off = vecSub(at, position);
  const verdict = judged(vecLength(off), tolerances.positionMm, units);
  return { ...NOTHING, mark, name, at, off, acrossMm: vecLength(off), verdict, words: verdict === "go" ? [] : [`off: ${wayWords(off, units)}`] };
}

function pairResults(fitted: Fitted, wanted: Wanted, held: boolean, tolerances: FittedTolerances, units: UnitSystem): PairResult[] {
  const centred = wanted.faces.flatMap((face) => {
    const centre = fitted.measured.find((one) => one.mark === face.mark)?.centre;
    return centre ? [{ face, centre }] : [];
  });
  return centred.flatMap((a, i) => centred.slice(i + 1).map((b): PairResult => {
    const wantedMm = vecDistance(a.face.position, b.face.position);
    const actualMm = vecDistance(a.centre, b.centre);
    const off = held ? vecSub(vecSub(motionPoint(fitted.motion, b.centre), motionPoint(fitted.motion, a.centre)), vecSub(b.face.position, a.face.position)) : null;
    const amounts = [actualMm - wantedMm, ...(off ?? [])];
    return { a: a.face.mark, b: b.face.mark, wantedMm, actualMm, off, verdict: worstVerdict(amounts.map((mm) => judged(mm, tolerances.positionMm, units))) };
  }));
}

const said = (mm: number, units: UnitSystem): string => formatFraction(Math.abs(mm), units);

const WAYS = [["east", "west"], ["north", "south"], ["up", "down"]] as const;

/** "1/8 in up, 1/16 in west"; what the tape cannot show is left out. */
export function wayWords(off: Vec3, units: UnitSystem): string {
  const parts = WAYS.flatMap(([plus, minus], i) => (Math.abs(off[i]!) >= readingGrainMm(units) ? [`${said(off[i]!, units)} ${off[i]! > 0 ? plus : minus}`] : []));
  return parts.join(", ") || "nothing a tape shows";
}
