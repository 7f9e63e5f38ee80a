/** Survey texts to observations, or a sentence per reading that does not say enough. Pure; never throws on user data. */
import { AXIS_COMPONENT, ZERO_LENGTH_MM } from "../geometry/tolerances";
import type { Vec3 } from "../geometry/types";
import { parseDirection } from "../units/direction";
import { parseLength } from "../units/length";
import type { SurveyDocument, SurveyReading } from "./survey-document";
import { DEVIATIONS_IN_TOLERANCE, LEAST_SIGMA_MM, LEAST_SIGMA_RAD, SURVEY_TOOLS } from "./survey-tools";
import type { Observation, SurveyNetwork } from "./survey-types";
import { pairName, readingName, sentence, smallLength } from "./survey-words";

const RAD = Math.PI / 180;

export type FindingTone = "wrong" | "caution" | "note";

/** One plain remark. `readingIds` are the readings it is about. */
export interface SurveyFinding {
  readonly code: string;
  readonly tone: FindingTone;
  readonly sentence: string;
  readonly readingIds: readonly string[];
}

export interface ReadSurvey {
  readonly network: SurveyNetwork;
  readonly findings: readonly SurveyFinding[];
}

type Note = (reading: SurveyReading, code: string, tone: FindingTone, sentence: string) => void;

/** Every reading that says enough as observations; the others as findings. */
export function readSurvey(document: SurveyDocument): ReadSurvey {
  const findings: SurveyFinding[] = [];
  const note: Note = (reading, code, tone, words) => void findings.push({ code, tone, sentence: words, readingIds: [reading.id] });
  const fixed = new Map<string, Vec3>();
  const observations = document.readings.filter((reading) => !reading.leftOut).flatMap((reading) => observationsOf(reading, document, fixed, note));
  findings.push(...duplicates(document.readings));
  const named = [...observations.flatMap((o) => [o.from, o.to]), ...fixed.keys()].filter((mark) => mark !== "");
  return { network: { marks: [...new Set(named)], fixed, observations }, findings };
}

/** A name as marks are told apart by: without spaces at its ends, in capitals. */
export function markKey(name: string): string {
  return name.trim().toUpperCase();
}

function observationsOf(reading: SurveyReading, document: SurveyDocument, fixed: Map<string, Vec3>, note: Note): Observation[] {
  const blank = [...reading.first, ...reading.again].every((text) => text.trim() === "");
  const [from, to] = [markKey(reading.from), markKey(reading.to)];
  if (to === "" || ((reading.kind === "tape" || reading.kind === "bearing") && from === "")) {
    if (!blank || from !== "" || to !== "") note(reading, "missing-mark", "caution", `Name the ${reading.kind === "point" ? "mark" : "marks at both ends"} of this ${reading.kind}.`);
    return [];
  }
  if (blank) {
    note(reading, "missing-reading", "caution", `${sentence(readingName(reading))} has no reading yet.`);
    return [];
  }
  if (from === to && reading.kind !== "point") {
    note(reading, "same-mark", "wrong", `${sentence(reading.kind)} from ${to} to itself measures nothing; name two marks.`);
    return [];
  }
  const named = { ...reading, from: reading.kind === "point" ? "" : from, to };
  return reading.kind === "bearing" ? bearing(named, note) : lengths(named, document, fixed, note);
}

function lengths(reading: SurveyReading, { units }: SurveyDocument, fixed: Map<string, Vec3>, note: Note): Observation[] {
  const sigma = lengthSigma(reading, units, note);
  const rows = [reading.first, reading.again].map((texts) => texts.map((text) => lengthOf(reading, text, units, note)));
  for (const at of [0, 1, 2]) disagreement(reading, rows[0]![at] ?? null, rows[1]![at] ?? null, sigma, units, note);
  if (reading.kind === "tape") {
    return rows.flatMap(([value]) => {
      if (value === null || value === undefined) return [];
      if (value > ZERO_LENGTH_MM) return [{ type: "distance", readingId: reading.id, from: reading.from, to: reading.to, value, sigma } as const];
      note(reading, "zero-length", "wrong", `Tape ${pairName(reading)} reads nothing; two marks are some way apart.`);
      return [];
    });
  }
  const whole = rows[0]!;
  if (reading.tool === "known" && reading.kind === "point" && whole.length === 3 && whole.every((v) => v !== null)) {
    fixed.set(reading.to, whole as unknown as Vec3);
    return [];
  }
  return rows.flatMap((row) => row.flatMap((value, axis) => (value === null ? [] : [{ type: "along", axis: axis as 0 | 1 | 2, readingId: reading.id, from: reading.from, to: reading.to, value, sigma } as const])));
}

function lengthOf(reading: SurveyReading, text: string, units: SurveyDocument["units"], note: Note): number | null {
  if (text.trim() === "") return null;
  const parsed = parseLength(text, units);
  if (parsed.ok) return parsed.mm;
  note(reading, "not-read", "wrong", `${sentence(readingName(reading))}: ${parsed.message}`);
  return null;
}

function lengthSigma(reading: SurveyReading, units: SurveyDocument["units"], note: Note): number {
  const own = lengthOf(reading, reading.tolerance, units, note);
  return Math.max((own !== null && own > 0 ? own : SURVEY_TOOLS[reading.tool].lengthMm) / DEVIATIONS_IN_TOLERANCE, LEAST_SIGMA_MM);
}

/** Two readings of one thing by one tool: each may be off by the tolerance, so twice that is too much. */
function disagreement(reading: SurveyReading, first: number | null, again: number | null, sigma: number, units: SurveyDocument["units"], note: Note): void {
  if (first === null || again === null) return;
  const apart = Math.abs(first - again);
  if (apart <= 2 * DEVIATIONS_IN_TOLERANCE * sigma) return;
  note(reading, "readings-disagree", "wrong", `These two disagree by ${smallLength(apart, units)}; measure ${pairName(reading)} again.`);
}

function bearing(reading: SurveyReading, note: Note): Observation[] {
  const own = Number.parseFloat(reading.tolerance);
  const sigma = Math.max((Number.isFinite(own) && own > 0 ? own * RAD : SURVEY_TOOLS[reading.tool].angleRad) / DEVIATIONS_IN_TOLERANCE, LEAST_SIGMA_RAD);
  return [reading.first[0], reading.again[0]].flatMap((text) => {
    if (!text || text.trim() === "") return [];
    const parsed = /^-?\d+(\.\d+)?$/.test(text.trim()) ? parseDirection(`${text.trim()}/0`) : parseDirection(text);
    if (!parsed.ok) {
      note(reading, "not-read", "wrong", `${sentence(readingName(reading))}: ${parsed.message}`);
      return [];
    }
    const level = Math.hypot(parsed.e, parsed.n);
    const levelOnly = /^-?\d+(\.\d+)?$/.test(text.trim());
    const base = { readingId: reading.id, from: reading.from, to: reading.to };
    const azimuth = level > AXIS_COMPONENT ? [{ ...base, type: "azimuth", value: Math.atan2(parsed.e, parsed.n), sigma } as const] : [];
    return levelOnly ? azimuth : [...azimuth, { ...base, type: "elevation", value: Math.atan2(parsed.u, level), sigma } as const];
  });
}

function duplicates(readings: readonly SurveyReading[]): SurveyFinding[] {
  const groups = new Map<string, SurveyReading[]>();
  for (const reading of readings) {
    if (reading.leftOut || reading.kind === "offset" || reading.to.trim() === "") continue;
    const ends = [markKey(reading.from), markKey(reading.to)];
    const key = `${reading.kind}:${(reading.kind === "tape" ? ends.sort() : ends).join("\n")}`;
    groups.set(key, [...(groups.get(key) ?? []), reading]);
  }
  return [...groups.values()].filter((group) => group.length > 1).map((group) => ({
    code: "duplicate", tone: "note" as const, readingIds: group.map((each) => each.id),
    sentence: `${sentence(readingName(group[0]!))} is entered ${group.length} times; each counts as a reading of its own.`,
  }));
}
