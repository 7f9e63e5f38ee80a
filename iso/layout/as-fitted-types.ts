/** What travels between the steps of an as-fitted comparison, and what it gives. */
import type { Vec3 } from "../geometry/types";
import type { AsFittedDocument, FittedMend, ReadAs } from "./as-fitted-document";
import type { Motion } from "./as-fitted-motion";

/** A face or corner as measured, in the measurer's frame, mm. */
export interface Measured {
  readonly mark: string;
  readonly centre: Vec3 | null;
  /** Unit vector along the face's centre line, either way; null = not measured. */
  readonly axis: Vec3 | null;
  readonly holes: readonly Vec3[];
}

export interface FittedFinding {
  readonly code: string;
  readonly tone: "wrong" | "warn" | "note";
  readonly sentence: string;
  /** What mends it, when one change does. */
  readonly mend?: FittedMend;
  readonly mendWords?: string;
}

/** near: within, but over three quarters of a tolerance. trim: one end is cut shorter and all is within. none: nothing to judge by. */
export type FittedVerdict = "go" | "near" | "trim" | "stop" | "none";

export interface FittedTolerances {
  /** +/- in any direction, mm. */
  readonly positionMm: number;
  /** Lean of a face over a length across it. */
  readonly squareSlope: number;
  /** Turn of the bolt holes, measured round their circle, mm. */
  readonly holesMm: number;
}

/** One face or corner laid on the sheet. Numbers are null where they could not be judged. */
export interface FaceResult {
  readonly mark: string;
  readonly name: string;
  /** Measured centre in the sheet's frame. */
  readonly at: Vec3 | null;
  /** Measured less wanted, mm, in the sheet's frame. */
  readonly off: Vec3 | null;
  /** Along the face's outward axis, mm: over zero is long. null for a corner, whose `across` is all of it. */
  readonly alongMm: number | null;
  readonly acrossMm: number | null;
  /** Lean of the face, radians; its gap across the OD, mm; which side leads. */
  readonly leanRad: number | null;
  readonly gapMm: number | null;
  readonly axis: Vec3 | null;
  /** Bolt holes, radians clockwise looking at the face, and along the bolt circle, mm. */
  readonly holesRad: number | null;
  readonly holesMm: number | null;
  readonly verdict: FittedVerdict;
  /** What is off, in words; one per fault or near fault. */
  readonly words: readonly string[];
}

/** Two faces against each other. */
export interface PairResult {
  readonly a: string;
  readonly b: string;
  readonly wantedMm: number;
  readonly actualMm: number;
  /** East, north and up of b from a, measured less wanted, mm; null while the turn is not held. */
  readonly off: Vec3 | null;
  readonly verdict: FittedVerdict;
}

/** One change to the spool that brings every face within. */
export interface FittedChange {
  readonly kind: "trim" | "holes" | "lean" | "length" | "turn" | "roll";
  readonly words: string;
  readonly mark: string;
  /** mm or radians. */
  readonly amount: number;
}

export interface AsFittedResult {
  readonly verdict: FittedVerdict;
  /** One line, first. */
  readonly headline: string;
  readonly findings: readonly FittedFinding[];
  readonly tolerances: FittedTolerances;
  readonly faces: readonly FaceResult[];
  readonly corners: readonly FaceResult[];
  readonly pairs: readonly PairResult[];
  readonly changes: readonly FittedChange[];
  /** Root mean square of what is left over per free reading, mm; null when nothing is. */
  readonly spreadMm: number | null;
  /** null while the points hold no motion. */
  readonly motion: Motion | null;
  readonly readAs: ReadAs;
}

/** A measurement as kept. */
export interface FittedRecord {
  readonly document: AsFittedDocument;
  readonly by: string;
  /** ISO time. */
  readonly at: string;
}
