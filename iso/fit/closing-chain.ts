/** The proven closing of two ends as a chain: gap, straight, bend, gap, pipe, gap, bend, straight, gap. */
import type { Vec3 } from "../geometry/types";
import { vecPerpendicular, vecReject, vecScale, vecUnit } from "../geometry/vec3";
import type { ClosingInput, ClosingSolution } from "../closing/closing-types";
import type { ChainFrame, FitFace, FitPiece } from "./chain";

export interface ClosingChain {
  readonly start: ChainFrame;
  readonly pieces: readonly FitPiece[];
}

const BUTT: FitFace = { kind: "butt" };

/**
 * @param input unit axes, millimetres, radians, as solveClosing takes it.
 * @param faces what stands at end 0 and at end 1.
 */
export function closingChain(input: ClosingInput, s: ClosingSolution, faces: readonly [FitFace, FitFace] = [BUTT, BUTT]): ClosingChain {
  const along = vecUnit(input.d0) ?? input.d0;
  const [bends0, bends1] = [s.kind !== "single1" && s.kind !== "straight", s.kind !== "single0" && s.kind !== "straight"];
  const side = firstSide(input, s, along, bends0, bends1);
  const pipe = s.kind !== "elbow-to-elbow";
  const pieces: FitPiece[] = [joint("end0", "end 0", input.gap, "field", faces[0], !bends0 || input.a > 0)];
  if (bends0) {
    if (input.a > 0) pieces.push(straight(input.a, "straight at end 0"));
    pieces.push({ kind: "turn", angleRad: s.theta0, radiusMm: input.r0, name: "elbow at end 0" });
    // Where nothing stands between the elbows, the joint takes the little that is over.
    pieces.push(joint("elbow0", pipe ? "the joint of elbow 0 and pipe" : "the joint between the elbows", pipe ? input.gap : s.length + 2 * input.gap, "shop", BUTT, pipe));
  }
  if (pipe) pieces.push(straight(s.pipeLength, "pipe"));
  if (bends1) {
    if (pipe) pieces.push(joint("elbow1", "the joint of pipe and elbow 1", input.gap, "shop", BUTT, true));
    if (bends0) pieces.push({ kind: "roll", angleRad: s.roll ?? 0, set: true, name: "roll of elbow 1" });
    pieces.push({ kind: "turn", angleRad: s.theta1, radiusMm: input.r1, name: "elbow at end 1" });
    if (input.b > 0) pieces.push(straight(input.b, "straight at end 1"));
  }
  pieces.push(joint("end1", "end 1", input.gap, "field", faces[1], !bends1 || input.b > 0));
  return { start: { at: input.p0, along, side }, pieces };
}

/** Where the first bend goes; any side where there is none. */
function firstSide(input: ClosingInput, s: ClosingSolution, along: Vec3, bends0: boolean, bends1: boolean): Vec3 {
  const toward = bends0 ? vecReject(s.u, along) : bends1 ? vecReject(vecScale(input.d1, -1), along) : null;
  return (toward && vecUnit(toward)) ?? vecPerpendicular(along);
}

function straight(lengthMm: number, name: string): FitPiece {
  return { kind: "straight", lengthMm, cut: true, name };
}

function joint(id: string, name: string, gapMm: number, made: "shop" | "field", face: FitFace, trimmable: boolean): FitPiece {
  return { kind: "joint", id, name, gapMm, made, face, trimmable: trimmable && face.kind === "butt" };
}
