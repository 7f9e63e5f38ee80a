/** A survey as numbers: marks, observations of them, and what an adjustment answers. Millimetres and radians. */
import type { Vec3 } from "../geometry/types";

/** The datum 0, 0, 0 as an observation's `from`. */
export const DATUM = "";

interface ObservationBase {
  /** Reading it came from; two observations of one reading share it. */
  readonly readingId: string;
  /** Mark it starts at; DATUM for the datum itself. */
  readonly from: string;
  readonly to: string;
  /** Standard deviation, in the observation's own unit; over zero. */
  readonly sigma: number;
  readonly value: number;
}

/** One number somebody read. "along" is the way from `from` to `to` along one axis: 0 east, 1 north, 2 up. */
export type Observation =
  | (ObservationBase & { readonly type: "distance" })
  | (ObservationBase & { readonly type: "along"; readonly axis: 0 | 1 | 2 })
  /** Clockwise from plant north, seen from above, radians. */
  | (ObservationBase & { readonly type: "azimuth" })
  /** Above the level plane, radians. */
  | (ObservationBase & { readonly type: "elevation" });

export interface SurveyNetwork {
  readonly marks: readonly string[];
  /** Marks taken as exactly known. */
  readonly fixed: ReadonlyMap<string, Vec3>;
  readonly observations: readonly Observation[];
}

export interface ObservationResult {
  readonly observation: Observation;
  /** Adjusted less observed, in the observation's own unit. */
  readonly residual: number;
  /** Share of an error in this observation that shows in its own residual: 0 nothing controls it, 1 the others alone decide. */
  readonly redundancy: number;
  /** Standardised residual (w); 0 where nothing controls the observation. */
  readonly standardised: number;
  /** Error of the reading the residual speaks for: observed less what the others say. 0 where nothing controls it. */
  readonly likelyError: number;
  /** Least error found with a chance of 80 % at a risk of 0.1 % of crying wolf; null where nothing controls it. */
  readonly smallestFound: number | null;
}

export interface Adjustment {
  readonly coordinates: ReadonlyMap<string, Vec3>;
  /** Order of the marks in `covariance`, three rows each: east, north, up. */
  readonly order: readonly string[];
  /** mm², from the tolerances stated beforehand. Rows of marks that hang loose mean nothing. */
  readonly covariance: readonly (readonly number[])[];
  readonly observations: readonly ObservationResult[];
  /** Observations more than needed. */
  readonly redundancy: number;
  /** Sum of squared residuals over their standard deviations; its expectation is `redundancy`. */
  readonly weightedSquares: number;
  /** True when the weighted squares stay under the 99.9 % point for this redundancy. */
  readonly fits: boolean;
  /** Freedoms no reading decides and that move the whole network: 3 shifts and 3 turns at most. */
  readonly datumDefect: number;
  /** Marks that can still move against the others. */
  readonly loose: readonly string[];
}
