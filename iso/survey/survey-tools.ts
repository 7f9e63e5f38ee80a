/** Tools of a survey and how far each may be off when nothing else is said: common practice, the shop's own word wins. */
import { INCH_MM } from "../units/length";
import type { SurveyTool } from "./survey-document";

const RAD = Math.PI / 180;

export interface ToolFacts {
  readonly words: string;
  /** ±, mm, about two standard deviations. */
  readonly lengthMm: number;
  /** ±, radians, about two standard deviations, when it reads a direction. */
  readonly angleRad: number;
}

export const SURVEY_TOOLS: Readonly<Record<SurveyTool, ToolFacts>> = {
  tape: { words: "Tape", lengthMm: INCH_MM / 16, angleRad: 1 * RAD },
  "long-tape": { words: "Long tape, over 30 ft", lengthMm: INCH_MM / 8, angleRad: 1 * RAD },
  laser: { words: "Laser distance meter", lengthMm: INCH_MM / 16, angleRad: 1 * RAD },
  level: { words: "Builder's level", lengthMm: INCH_MM / 16, angleRad: 0.1 * RAD },
  plumb: { words: "Plumb bob", lengthMm: INCH_MM / 16, angleRad: 0.2 * RAD },
  angle: { words: "Digital angle finder", lengthMm: INCH_MM / 16, angleRad: 0.2 * RAD },
  compass: { words: "Compass", lengthMm: INCH_MM / 8, angleRad: 2 * RAD },
  "total-station": { words: "Total station", lengthMm: 2, angleRad: 0.005 * RAD },
  tracker: { words: "Laser tracker", lengthMm: 0.1, angleRad: 0.002 * RAD },
  known: { words: "Known, taken as exact", lengthMm: 0, angleRad: 0 },
};

/** Standard deviations in a tolerance: ± means that 95 of 100 readings lie within it. */
export const DEVIATIONS_IN_TOLERANCE = 2;

/** Least standard deviation, mm and radians, that an entered tolerance comes to. */
export const LEAST_SIGMA_MM = 0.01;
export const LEAST_SIGMA_RAD = 0.00001;
