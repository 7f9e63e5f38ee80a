/** Shapes of "how sure is the fit". Millimetres and radians; frames are the model's (east, north, up) unless said. */
import type { UnitSystem } from "../run/settings-schema";
import type { Vec3 } from "../geometry/types";
import type { FitPiece } from "./chain";
import type { FitSettings } from "./fit-settings";

/** A small rigid motion: three of translation of the far end's centre, mm, then three of rotation, rad. */
export type Twist = readonly number[];

/**
 * Something that may be off. `columns` are what one standard deviation of each of its independent parts does: for ends,
 * twelve numbers (end 0 position, end 0 axis, end 1 position, end 1 axis), true less measured.
 */
export interface EndError {
  readonly id: string;
  readonly kind: "reading" | "end";
  readonly name: string;
  readonly columns: readonly (readonly number[])[];
}

/** Shared: both joints take a part of what is off. Set true: end 0 is made as it should be, all shows at end 1. */
export type FitUp = "shared" | "set-true";

export interface FitInput {
  readonly start: { readonly position: Vec3; readonly axis: Vec3; readonly side: Vec3 };
  /** From end 0 to end 1; the first and the last piece are the joints to them. */
  readonly pieces: readonly FitPiece[];
  readonly end: { readonly position: Vec3; readonly axis: Vec3 };
  readonly odMm: number;
  readonly errors: readonly EndError[];
  readonly settings: FitSettings;
  readonly fitUp: FitUp;
  /** Probability wanted, 0 to 1. */
  readonly target: number;
  readonly units: UnitSystem;
}

export type FitCondition = "gap" | "hi-lo" | "opening" | "rotation";

/** ± of one mismatch, two standard deviations. */
export interface FitMismatch {
  readonly what: "gap" | "hi-lo-level" | "hi-lo-up" | "opening-level" | "opening-up" | "rotation";
  /** At end 1 with end 0 set true, mm; rotation as an arc on the bolt circle or the outside. */
  readonly beforeMm: number;
  /** What is left at each joint after fit-up. */
  readonly atEnd0Mm: number;
  readonly atEnd1Mm: number;
  readonly limitMm: { readonly end0: number | null; readonly end1: number | null };
}

export interface FitJudged {
  readonly joint: string;
  readonly condition: FitCondition;
  readonly probability: number;
}

export interface FitContribution {
  readonly id: string;
  readonly kind: "reading" | "end" | "shop";
  readonly name: string;
  /** Of the variance of the worst mismatch; all together 1. */
  readonly share: number;
  /** Probability if this alone were exact, and if it were half as far off. */
  readonly exact: number;
  readonly halved: number;
}

export interface FitTrim {
  readonly jointId: string;
  readonly joint: string;
  /** Extra length left on at that joint, mm; rounded up to the shop's step. */
  readonly trimMm: number;
  readonly probability: number;
  /** Probability with any amount of trim there. */
  readonly atMost: number;
  readonly reached: boolean;
}

export type FitFlag = "fold" | "near-fold" | "too-loose" | "no-errors" | "bad-input";

export interface FitResult {
  /** null with a flag: then the linear answer means nothing. */
  readonly probability: number | null;
  readonly flag: FitFlag | null;
  /** The verdict, or why there is none. */
  readonly sentence: string;
  readonly mismatches: readonly FitMismatch[];
  /** Every condition by itself, the least likely first. */
  readonly judged: readonly FitJudged[];
  /** Largest share first. */
  readonly contributions: readonly FitContribution[];
  /** Best place for a field-fit weld first; empty where no pipe can be left long. */
  readonly trims: readonly FitTrim[];
  /** What to measure better, in words; "" when nothing helps. */
  readonly advice: string;
}
