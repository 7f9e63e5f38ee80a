/**
 * A made-up piece as a chain of straights, turns, rolls and joints, walked from end 0 to end 1: where each stands in the
 * model, and what a small error of each does at the far end. The same steps as a fitter's: along, about the bend's centre,
 * about the pipe's own axis.
 */
import type { Vec3 } from "../geometry/types";
import { vecAddScaled, vecCross, vecRotate, vecUnit } from "../geometry/vec3";

/** What stands at an end: plain pipe to be welded to, or a flange. */
export type FitFace =
  | { readonly kind: "butt" }
  | { readonly kind: "flange"; readonly boltCircleMm: number };

export type FitPiece =
  /** `cut` false: stands there already, its length is part of the survey. */
  | { readonly kind: "straight"; readonly lengthMm: number; readonly cut: boolean; readonly name: string }
  /** Bends toward the side. */
  | { readonly kind: "turn"; readonly angleRad: number; readonly radiusMm: number; readonly name: string }
  /** Turns the side about the axis, counter-clockwise seen against the way along. `set` false: only turns the frame. */
  | { readonly kind: "roll"; readonly angleRad: number; readonly set: boolean; readonly name: string }
  /** `trimmable`: a pipe on one side of it can be left long. */
  | { readonly kind: "joint"; readonly id: string; readonly gapMm: number; readonly name: string; readonly made: "shop" | "field"; readonly face: FitFace; readonly trimmable: boolean };

export interface ChainFrame {
  readonly at: Vec3;
  readonly along: Vec3;
  /** Square to along: where the next turn goes. */
  readonly side: Vec3;
}

export interface ChainStep {
  readonly piece: FitPiece;
  readonly before: ChainFrame;
  readonly after: ChainFrame;
}

/** Every piece with the frames at its two ends. */
export function walkChain(start: ChainFrame, pieces: readonly FitPiece[]): ChainStep[] {
  let before = start;
  return pieces.map((piece) => {
    const step = { piece, before, after: stepped(before, piece) };
    before = step.after;
    return step;
  });
}

/** Centre of a turn that starts in a frame. */
export function turnCentre({ at, side }: ChainFrame, radiusMm: number): Vec3 {
  return vecAddScaled(at, side, radiusMm);
}

/** Axis a turn goes about, right-handed. */
export function turnAxis({ along, side }: ChainFrame): Vec3 {
  return vecCross(along, side);
}

function stepped(frame: ChainFrame, piece: FitPiece): ChainFrame {
  switch (piece.kind) {
    case "straight":
      return { ...frame, at: vecAddScaled(frame.at, frame.along, piece.lengthMm) };
    case "joint":
      return { ...frame, at: vecAddScaled(frame.at, frame.along, piece.gapMm) };
    case "roll":
      return { ...frame, side: vecRotate(frame.side, frame.along, piece.angleRad) };
    case "turn": {
      const axis = turnAxis(frame);
      const centre = turnCentre(frame, piece.radiusMm);
      const side = vecRotate(frame.side, axis, piece.angleRad);
      const along = vecRotate(frame.along, axis, piece.angleRad);
      return { at: vecAddScaled(centre, side, -piece.radiusMm), along: vecUnit(along) ?? along, side };
    }
  }
}
