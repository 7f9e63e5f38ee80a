/**
 * Which one change would bring every face within: an end trimmed, a flange turned on its holes or squared, a piece longer or
 * shorter, a turn opened or closed, or what stands past a piece turned about it. Each is tried by undoing it on the
 * measured faces beyond it (two Gauss-Newton steps on what is left over, in tolerances), fitting again and judging again.
 */
import { CholeskyDecomposition, Matrix } from "ml-matrix";
import { INCH_MM } from "../units/length";
import type { UnitSystem } from "../run/document";
import { SAME_POINT_MM } from "../geometry/tolerances";
import type { Vec3 } from "../geometry/types";
import { vecAdd, vecAddScaled, vecCross, vecDistance, vecPerpendicular, vecRotate, vecSub } from "../geometry/vec3";
import { formatAngleDeg } from "../units/format";
import { fitOnce, type Fitted, type WantedPlace } from "./as-fitted-fit";
import { judgeFitted } from "./as-fitted-judge";
import { motionPoint, motionWay } from "./as-fitted-motion";
import type { FittedChange, FittedTolerances, Measured } from "./as-fitted-types";
import { holeTurn, type Wanted } from "./as-fitted-wanted";
import { formatFraction } from "./lengths";

interface Candidate {
  readonly kind: FittedChange["kind"];
  readonly mark: string;
  /** Marks of the faces it moves. */
  readonly beyond: ReadonlySet<string>;
  readonly count: 1 | 2;
  /** Moves a measured face of the sheet's frame by amounts in mm or radians. */
  readonly move: (one: Measured, amounts: readonly number[]) => Measured;
  /** null when such an amount cannot be done by it. */
  readonly words: (amounts: readonly number[], size: number) => string | null;
}

interface Setting {
  readonly wanted: Wanted;
  readonly places: ReadonlyMap<string, WantedPlace>;
  readonly tolerances: FittedTolerances;
  readonly units: UnitSystem;
  readonly hold: string;
}

const STEPS = 3;
/** Steps of the differences, mm and radians. */
const STEP = { length: 0.01, angle: 1e-5 };
const MOST_SHOWN = 3;
const KINDS: readonly FittedChange["kind"][] = ["trim", "holes", "lean", "length", "turn", "roll"];

/** The single changes that mend it, handiest first; none when it takes more than one. */
export function mendingChanges(fitted: Fitted, setting: Setting): readonly FittedChange[] {
  const laid = fitted.measured.map((one): Measured => ({
    ...one, centre: motionPoint(fitted.motion, one.centre!), axis: one.axis && motionWay(fitted.motion, one.axis), holes: one.holes.map((hole) => motionPoint(fitted.motion, hole)),
  }));
  const found = candidates(setting).filter(({ beyond }) => laid.some((one) => beyond.has(one.mark)) && (laid.some((one) => !beyond.has(one.mark))))
    .flatMap((candidate) => solved(candidate, laid, setting) ?? []);
  return found.sort((a, b) => KINDS.indexOf(a.change.kind) - KINDS.indexOf(b.change.kind) || a.squares - b.squares).slice(0, MOST_SHOWN).map(({ change }) => change);
}

function solved(candidate: Candidate, laid: readonly Measured[], setting: Setting): { readonly change: FittedChange; readonly squares: number } | null {
  const at = (amounts: readonly number[]) => laid.map((one) => (candidate.beyond.has(one.mark) ? candidate.move(one, amounts.map((x) => -x)) : one));
  const left = (amounts: readonly number[]) => leftOver(at(amounts), setting);
  const step = candidate.kind === "trim" || candidate.kind === "length" ? STEP.length : STEP.angle;
  let amounts: number[] = Array.from({ length: candidate.count }, () => 0);
  for (let round = 0; round < STEPS; round++) {
    const here = left(amounts);
    const slopes = amounts.map((_, k) => left(amounts.map((x, i) => (i === k ? x + step : x))).map((value, i) => (value - here[i]!) / step));
    const normal = new Matrix(slopes.map((a) => slopes.map((b) => a.reduce((sum, x, i) => sum + x * b[i]!, 0))));
    const cholesky = new CholeskyDecomposition(normal);
    if (!cholesky.isPositiveDefinite()) return null;
    const by = cholesky.solve(Matrix.columnVector(slopes.map((a) => -a.reduce((sum, x, i) => sum + x * here[i]!, 0)))).to1DArray();
    amounts = amounts.map((x, i) => x + by[i]!);
  }
  if (!amounts.every(Number.isFinite)) return null;
  if (candidate.kind === "trim") amounts = [rounded(amounts[0]!, setting.units)];
  const size = Math.hypot(...amounts);
  const words = candidate.words(amounts, size);
  if (words === null) return null;
  const fit = fitOnce(at(amounts), setting.places, setting.hold);
  const { verdict } = judgeFitted(fit, setting.wanted, setting.tolerances, setting.units);
  if (verdict !== "go" && verdict !== "near") return null;
  const squares = left(amounts).reduce((sum, x) => sum + x * x, 0);
  return { change: { kind: candidate.kind, mark: candidate.mark, words, amount: candidate.count === 1 ? amounts[0]! : size }, squares };
}

/** A trim is marked with a tape: to 1/16 in, or a millimetre. */
function rounded(mm: number, units: UnitSystem): number {
  const step = units === "metric" ? 1 : INCH_MM / 16;
  return Math.round(mm / step) * step;
}

/** Everything a face is judged by, in tolerances. */
function leftOver(measured: readonly Measured[], { wanted, places, tolerances, hold }: Setting): number[] {
  const fit = fitOnce(measured, places, hold);
  return fit.measured.flatMap((one) => {
    const place = places.get(one.mark)!;
    const at = motionPoint(fit.motion, one.centre!);
    const off = vecSub(at, place.position).map((x) => x / tolerances.positionMm);
    if (!place.direction) return off;
    const face = wanted.faces.find((f) => f.mark === one.mark)!;
    const lean = one.axis ? vecCross(place.direction, motionWay(fit.motion, one.axis)).map((x) => x / tolerances.squareSlope) : [];
    const holes = holeTurn(face, at, one.holes.map((hole) => motionPoint(fit.motion, hole)));
    return [...off, ...lean, ...(holes === null || !face.holes ? [] : [(holes * face.holes.circleMm) / 2 / tolerances.holesMm])];
  });
}

function candidates({ wanted, units }: Setting): Candidate[] {
  return [
    ...wanted.faces.flatMap((face) => faceCandidates(face, units)),
    ...wanted.pieces.flatMap((piece) => pieceCandidates(piece, pastPiece(wanted, piece), wanted, units)),
    ...wanted.corners.map((corner) => turnCandidate(corner, marksBeyond(wanted, corner.componentId))),
  ];
}

/** Faces and corners on the downstream side of a part: joints name the upstream side first. */
export function marksBeyond({ joints, faces, corners }: Wanted, part: string): ReadonlySet<string> {
  const reached = new Set(joints.filter((joint) => joint.a === part).map((joint) => joint.b!));
  for (const from of reached) {
    for (const { a, b } of joints) {
      const next = a === from ? b! : b === from ? a! : part;
      if (next !== part) reached.add(next);
    }
  }
  return new Set([...faces.filter((face) => reached.has(face.owner)), ...corners.filter((corner) => reached.has(corner.componentId))].map(({ mark }) => mark));
}

/** What stands past a piece, its own open end too. */
function pastPiece(wanted: Wanted, piece: Wanted["pieces"][number]): ReadonlySet<string> {
  const own = wanted.faces.filter((face) => face.owner === piece.key && vecDistance(face.position, piece.end) < SAME_POINT_MM);
  return new Set([...marksBeyond(wanted, piece.key), ...own.map((face) => face.mark)]);
}

function faceCandidates(face: Wanted["faces"][number], units: UnitSystem): Candidate[] {
  const { mark, direction } = face;
  const beyond = new Set([mark]);
  const sides = [vecPerpendicular(direction), vecCross(direction, vecPerpendicular(direction))];
  const trim: Candidate = {
    kind: "trim", mark, beyond, count: 1, move: (one, [mm]) => shifted(one, direction, mm!),
    words: ([mm]) => (mm! > 0 ? `Trim ${formatFraction(mm!, units)} at end ${mark}.` : null),
  };
  const holes: Candidate = {
    kind: "holes", mark, beyond, count: 1, move: (one, [rad]) => ({ ...one, holes: one.holes.map((hole) => turned(hole, one.centre!, direction, rad!)) }),
    words: ([rad], size) => (face.holes ? `Turn the flange at end ${mark} by ${formatAngleDeg(size)} ${rad! > 0 ? "clockwise" : "counter-clockwise"} looking at its face (${formatFraction((size * face.holes.circleMm) / 2, units)} round the bolt circle).` : null),
  };
  const lean: Candidate = {
    kind: "lean", mark, beyond, count: 2, move: (one, amounts) => amounts.reduce((moved, rad, i) => swung(moved, one.centre!, sides[i]!, rad), one),
    words: (_, size) => `Square up the face at end ${mark}: it leans ${formatAngleDeg(size)}, ${formatFraction(Math.sin(size) * face.odMm, units)} across the OD.`,
  };
  return face.kind === "plain" ? [trim, lean] : face.kind === "flange" ? [holes, lean] : [lean];
}

function pieceCandidates(piece: Wanted["pieces"][number], beyond: ReadonlySet<string>, wanted: Wanted, units: UnitSystem): Candidate[] {
  const endsOpen = wanted.faces.some((face) => face.owner === piece.key && beyond.has(face.mark));
  return [
    {
      kind: "length", mark: piece.mark, beyond, count: 1, move: (one, [mm]) => shifted(one, piece.direction, mm!),
      // What is too long towards an open end is trimmed there.
      words: ([mm], size) => (endsOpen && mm! > 0 ? null : `Piece ${piece.mark} is ${formatFraction(size, units)} ${mm! > 0 ? "long: take that out of it and weld it again" : "short: replace it"}.`),
    },
    {
      kind: "roll", mark: piece.mark, beyond, count: 1, move: (one, [rad]) => swung(one, piece.end, piece.direction, rad!),
      words: ([rad], size) => `Turn what stands past piece ${piece.mark} by ${formatAngleDeg(size)} ${rad! > 0 ? "counter-clockwise" : "clockwise"}, looking along flow (${formatFraction((size * piece.odMm) / 2, units)} on the OD).`,
    },
  ];
}

function turnCandidate(corner: Wanted["corners"][number], beyond: ReadonlySet<string>): Candidate {
  return {
    kind: "turn", mark: corner.mark, beyond: new Set([...beyond].filter((mark) => mark !== corner.mark)), count: 1, move: (one, [rad]) => swung(one, corner.position, corner.normal, rad!),
    words: ([rad], size) => `${corner.name.charAt(0)}${corner.name.slice(1).toLowerCase()}: ${rad! > 0 ? "it turns too far; open it" : "it turns too little; close it"} by ${formatAngleDeg(size)}.`,
  };
}

function shifted(one: Measured, way: Vec3, mm: number): Measured {
  return { ...one, centre: vecAddScaled(one.centre!, way, mm), holes: one.holes.map((hole) => vecAddScaled(hole, way, mm)) };
}

function turned(point: Vec3, about: Vec3, axis: Vec3, rad: number): Vec3 {
  return vecAdd(about, vecRotate(vecSub(point, about), axis, rad));
}

function swung(one: Measured, about: Vec3, axis: Vec3, rad: number): Measured {
  return { ...one, centre: turned(one.centre!, about, axis, rad), axis: one.axis && vecRotate(one.axis, axis, rad), holes: one.holes.map((hole) => turned(hole, about, axis, rad)) };
}

