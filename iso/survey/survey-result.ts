/** A survey from its texts to marks, ends and remarks: the one call a page makes. */
import type { Vec3 } from "../geometry/types";
import { adjustNetwork } from "./adjust";
import { adjustmentFindings, isOff } from "./findings";
import { endsClash } from "./survey-ends";
import { surveyEnd, type SurveyEndResult } from "./survey-ends";
import type { SurveyDocument } from "./survey-document";
import { readSurvey, type SurveyFinding } from "./survey-read";
import { DEVIATIONS_IN_TOLERANCE } from "./survey-tools";
import type { Adjustment, SurveyNetwork } from "./survey-types";
import { errorText, sentence } from "./survey-words";

export interface SurveyMarkResult {
  readonly name: string;
  readonly position: Vec3;
  /** ±, mm, each axis, two standard deviations; null while it hangs loose. */
  readonly within: Vec3 | null;
}

export interface SurveyReadingResult {
  readonly readingId: string;
  /** How it fits, in words. */
  readonly words: string;
  readonly off: boolean;
  /** Least redundancy number of its observations. */
  readonly redundancy: number;
}

export interface SurveyResult {
  readonly marks: readonly SurveyMarkResult[];
  readonly ends: readonly SurveyEndResult[];
  readonly readings: readonly SurveyReadingResult[];
  readonly findings: readonly SurveyFinding[];
  readonly adjustment: Adjustment | null;
}

/** @param odMm outside diameter of the pipe, for ends that run into each other. Never throws on user data. */
export function surveyResult(document: SurveyDocument, odMm: number): SurveyResult {
  const { network, findings } = readSurvey(document);
  const found = [...findings];
  if (network.marks.length === 0) return { marks: [], ends: [], readings: [], findings: found, adjustment: null };
  const adjustment = adjustNetwork(network);
  found.push(...adjustmentFindings(document, network, adjustment));
  const named = found.filter((each) => each.code === "outlier" || each.code === "unit-slip").flatMap((each) => each.readingIds);
  const ends = document.ends.flatMap((end) => surveyEnd(end, document, adjustment, found) ?? []);
  found.push(...clashes(ends, odMm));
  return { marks: marksOf(network, adjustment), ends, readings: readingsOf(document, adjustment, named), findings: found, adjustment };
}

function clashes(ends: readonly SurveyEndResult[], odMm: number): SurveyFinding[] {
  return ends.flatMap((first, at) => ends.slice(at + 1).flatMap((second) => {
    const words = endsClash(first, second, odMm);
    return words === null ? [] : [{ code: "ends-clash", tone: "wrong" as const, sentence: `Ends ${first.name} and ${second.name}: ${words}`, readingIds: [first.id, second.id] }];
  }));
}

function marksOf(network: SurveyNetwork, { coordinates, order, covariance, loose }: Adjustment): SurveyMarkResult[] {
  return network.marks.map((name) => {
    const at = order.indexOf(name) * 3;
    const off = (axis: number) => (at < 0 ? 0 : DEVIATIONS_IN_TOLERANCE * Math.sqrt(Math.max(0, covariance[at + axis]![at + axis]!)));
    return { name, position: coordinates.get(name) ?? [0, 0, 0], within: loose.includes(name) ? null : [off(0), off(1), off(2)] };
  });
}

/** @param named readings a finding holds to be wrong: one blunder pulls others past their limit too, and those are not blamed. */
function readingsOf({ readings, units }: SurveyDocument, adjustment: Adjustment, named: readonly string[]): SurveyReadingResult[] {
  return readings.flatMap((reading) => {
    const own = adjustment.observations.filter((each) => each.observation.readingId === reading.id);
    const worst = own.reduce<(typeof own)[number] | null>((most, each) => (most === null || Math.abs(each.standardised) > Math.abs(most.standardised) ? each : most), null);
    if (!worst) return [];
    const redundancy = Math.min(...own.map((each) => each.redundancy));
    const off = named.includes(reading.id);
    const words = off
      ? `off by about ${errorText(worst.observation, worst.likelyError, units)}`
      : isOff(worst.standardised) && named.length > 0 ? "pulled by a reading that is off"
      : worst.redundancy === 0 ? "nothing else checks it" : `fits within ${errorText(worst.observation, worst.residual, units)}`;
    return [{ readingId: reading.id, words: sentence(words), off, redundancy }];
  });
}
