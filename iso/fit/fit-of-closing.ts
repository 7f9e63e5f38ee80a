/** How sure the proven closing of two ends fits: its chain, and a flag where it stands near a fold. */
import type { ClosingInput, ClosingSolution } from "../closing/closing-types";
import { closingSensitivity } from "../closing/sensitivity";
import type { UnitSystem } from "../run/settings-schema";
import { vecUnit } from "../geometry/vec3";
import { DEVIATIONS_IN_TOLERANCE } from "../survey/survey-tools";
import { closingChain } from "./closing-chain";
import { flagged, fitOfChain } from "./fit-of-chain";
import type { FitSettings } from "./fit-settings";
import type { FitFace } from "./chain";
import type { EndError, FitResult, FitUp } from "./fit-types";

export interface ClosingFitInput {
  /** As solveClosing takes it, in millimetres. */
  readonly closing: ClosingInput;
  readonly solution: ClosingSolution;
  readonly odMm: number;
  readonly units: UnitSystem;
  readonly errors: readonly EndError[];
  readonly settings: FitSettings;
  readonly fitUp: FitUp;
  readonly target: number;
  readonly faces?: readonly [FitFace, FitFace];
}

/** A bend that the survey's tolerance turns by more than this is a guess (as the closing itself warns). */
const SHAKY_BEND_RAD = Math.PI / 180;

/** Never throws on user data. */
export function fitOfClosing(input: ClosingFitInput): FitResult {
  const { closing, solution } = input;
  const [d0, d1] = [vecUnit(closing.d0), vecUnit(closing.d1)];
  if (!d0 || !d1 || !input.errors.every(({ columns }) => columns.flat().every(Number.isFinite))) return flagged("bad-input");
  const fold = foldOf(input);
  if (fold) return flagged(fold);
  const { start, pieces } = closingChain(closing, solution, input.faces);
  return fitOfChain({
    start: { position: start.at, axis: start.along, side: start.side }, pieces, end: { position: closing.p1, axis: d1 },
    odMm: input.odMm, errors: input.errors, settings: input.settings, fitUp: input.fitUp, target: input.target, units: input.units,
  });
}

/** Fold: the positions' error is as long as the closing is stiff. Near it: it turns a bend by more than a degree. */
function foldOf({ closing, solution, errors }: ClosingFitInput): "fold" | "near-fold" | null {
  const columns = errors.flatMap((error) => error.columns);
  const apart = (column: readonly number[]) => [0, 1, 2].map((i) => column[6 + i]! - column[i]!);
  const tolerance = DEVIATIONS_IN_TOLERANCE * Math.sqrt(columns.reduce((sum, column) => sum + apart(column).reduce((s, v) => s + v * v, 0), 0));
  if (solution.roll !== null && solution.lambdaMin <= tolerance) return "fold";
  const rates = closingSensitivity(closing, solution);
  if (!rates) return null;
  const turned = [rates.theta0, rates.theta1].map((theta) => DEVIATIONS_IN_TOLERANCE * Math.sqrt(columns.reduce((sum, column) => sum + positionTurn(theta, column) ** 2, 0)));
  return turned.some((rad) => !(rad <= SHAKY_BEND_RAD)) ? "near-fold" : null;
}

/** What a column's positions alone turn a bend by: rates stand as end 1 first, then end 0. */
function positionTurn(theta: readonly number[], column: readonly number[]): number {
  return [0, 1, 2].reduce((sum, i) => sum + theta[i]! * column[6 + i]! + theta[6 + i]! * column[i]!, 0);
}
