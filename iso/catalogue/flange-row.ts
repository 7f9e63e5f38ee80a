/** One flange of the B16.5 tables, every length in inches as an exact fraction. */
import type { Nps, RatingClass } from "../run/document";
import type { Memory } from "./row";

export interface FlangeRow {
  readonly ratingClass: RatingClass;
  readonly nps: Nps;
  readonly outsideIn: number;
  readonly thicknessIn: number;
  readonly raisedFaceIn: number;
  /** Lengths through the hub; null where the standard has no such flange. */
  readonly weldNeckIn: number;
  readonly slipOnIn: number | null;
  readonly socketWeldIn: number | null;
  readonly threadedIn: number | null;
  readonly lapJointIn: number | null;
  readonly boltCircleIn: number;
  readonly bolts: number;
  /** Nominal bolt size, inches, as a fraction: "5/8". */
  readonly boltSize: string;
  readonly holeIn: number;
  readonly studIn: number;
  readonly lengthMemory: Memory;
  readonly lapJointMemory: Memory;
  readonly thicknessMemory: Memory;
  readonly drillingMemory: Memory;
  readonly source: string;
}
