/** How a survey's readings and numbers are named to whoever took them. */
import type { UnitSystem } from "../run/document";
import { formatAngleDeg, formatDecimal, formatFeetInches, formatInches } from "../units/format";
import type { SurveyReading } from "./survey-document";
import type { Observation } from "./survey-types";

/** A small length: `3/8 in`, `10 mm`. */
export function smallLength(mm: number, units: UnitSystem): string {
  const size = Math.abs(mm);
  if (units === "metric") return `${formatDecimal(size, size < 10 ? 1 : 0)} mm`;
  const text = formatInches(size, size < 1 ? 64 : 16);
  return text === "0" ? "under 1/64 in" : size > 12 * 25.4 ? formatFeetInches(size) : `${text} in`;
}

/** A length as its tape shows it. */
export function readLength(mm: number, units: UnitSystem): string {
  return units === "metric" ? `${formatDecimal(mm, 0)} mm` : formatFeetInches(mm);
}

/** Size of an observation's error in its own unit. */
export function errorText(observation: Observation, amount: number, units: UnitSystem): string {
  return observation.type === "azimuth" || observation.type === "elevation" ? formatAngleDeg(Math.abs(amount)) : smallLength(amount, units);
}

const AXIS_WORDS = ["east", "north", "up"] as const;
const datum = (mark: string) => (mark === "" ? "datum" : mark);

/** `D-F`, as one says it to the mate at the other end of the tape. */
export function pairName(reading: Pick<SurveyReading, "kind" | "from" | "to">): string {
  return reading.kind === "point" ? reading.to : `${datum(reading.from)}-${datum(reading.to)}`;
}

const KINDS: Readonly<Record<SurveyReading["kind"], string>> = { tape: "tape", offset: "offset", bearing: "bearing", point: "point" };

/** `tape D-F`, `offset datum-A east`. */
export function readingName(reading: Pick<SurveyReading, "kind" | "from" | "to">, observation?: Observation): string {
  const axis = observation?.type === "along" ? ` ${AXIS_WORDS[observation.axis]}` : observation?.type === "elevation" ? " up or down" : "";
  return `${KINDS[reading.kind]} ${pairName(reading)}${axis}`;
}

export function joined(words: readonly string[], last = "and"): string {
  if (words.length < 2) return words[0] ?? "";
  return `${words.slice(0, -1).join(", ")} ${last} ${words[words.length - 1]}`;
}

export function sentence(words: string): string {
  return words.charAt(0).toUpperCase() + words.slice(1);
}
