/** What an adjustment says about the readings, in the words of whoever has to go back with the tape. */
import { INCH_MM } from "../units/length";
import { adjustNetwork } from "./adjust";
import { firstPlaces } from "./best-places";
import { chiSquareLimit, OUTLIER_LIMIT } from "./chi-square";
import { mirrorFindings } from "./mirror";
import { predictObservation } from "./observations";
import type { SurveyDocument, SurveyReading } from "./survey-document";
import type { SurveyFinding } from "./survey-read";
import { suspectsOf } from "./suspects";
import { DATUM, type Adjustment, type Observation, type SurveyNetwork } from "./survey-types";
import { errorText, joined, pairName, readingName, readLength, sentence } from "./survey-words";

/** Slips of unit: millimetres for inches, inches for feet, and back. */
const FACTORS = [
  { factor: INCH_MM, words: "millimetres were entered as inches" },
  { factor: 1 / INCH_MM, words: "inches were entered as millimetres" },
  { factor: 12, words: "inches were entered as feet" },
  { factor: 1 / 12, words: "feet were entered as inches" },
] as const;
/** A slip of unit explains a reading when it comes this near, in deviations of the reading. */
const SLIP_WITHIN = 12;
/** Times the usual limit of the weighted squares that still counts as fitting once a slip is mended: it rounds to its own unit. */
const SLIP_LEEWAY = 3;
/** Suspects removed one after the other at most. */
const MOST_OUTLIERS = 3;
/** The weighted squares per spare reading from which a slip of unit is looked for. */
const GROSS = 400;
/** A mark known no better than this many times the coarsest length tolerance is called weak. */
const WEAK_TIMES = 15;

export function adjustmentFindings(document: SurveyDocument, network: SurveyNetwork, adjustment: Adjustment): SurveyFinding[] {
  const readingOf = (id: string) => document.readings.find((each) => each.id === id);
  return [
    ...looseFindings(network, adjustment),
    ...outlierFindings(document, network, adjustment, readingOf),
    ...mirrorFindings(network, adjustment, document.units),
    ...weakFindings(document, network, adjustment),
    ...datumFindings(network, adjustment),
  ];
}

function looseFindings(network: SurveyNetwork, { loose, coordinates }: Adjustment): SurveyFinding[] {
  const firm = network.marks.filter((mark) => !loose.includes(mark));
  return loose.map((mark) => {
    const ties = network.observations.filter((o) => o.from === mark || o.to === mark);
    const partners = [...new Set(ties.map((o) => (o.to === mark ? o.from : o.to)))].filter((other) => other !== DATUM);
    const tapes = ties.every((o) => o.type === "distance");
    const others = firm.filter((other) => !partners.includes(other));
    const from = others.length > 0 ? `from ${joined(others.slice(0, 3), "or")}` : "by a level reading or an offset";
    const told = tapes && partners.length >= 3
      ? `mark ${mark} can still swing: ${joined(partners)} stand nearly on one line${loose.length > 1 ? " or swing with it" : ""}; give one reading more, ${from}, or a level reading.`
      : `mark ${mark} hangs on ${COUNTS[partners.length] ?? partners.length} ${tapes ? (partners.length === 1 ? "tape" : "tapes") : "readings"} only${partners.length > 0 ? ` (${partners.map((other) => `${mark}-${other}`).join(", ")})` : ""}: give one more ${from}.`;
    return { code: "loose", tone: "wrong" as const, sentence: sentence(told), readingIds: ties.map((o) => o.readingId) };
  }).filter(() => coordinates.size > 1);
}

const COUNTS: Readonly<Record<number, string>> = { 0: "no", 1: "one", 2: "two", 3: "three" };

function outlierFindings(document: SurveyDocument, network: SurveyNetwork, adjustment: Adjustment, readingOf: (id: string) => SurveyReading | undefined): SurveyFinding[] {
  const slip = adjustment.redundancy > 0 && adjustment.weightedSquares > GROSS * adjustment.redundancy ? unitSlip(document, network, readingOf) : null;
  if (slip) return [slip];
  const findings: SurveyFinding[] = [];
  let [rest, now] = [network, adjustment];
  for (let n = 0; n < MOST_OUTLIERS; n += 1) {
    const suspects = suspectsOf(now);
    const worst = suspects[0];
    if (!worst) break;
    const ids = [...new Set(suspects.map((each) => each.observation.readingId))];
    const names = document.readings.filter((each) => ids.includes(each.id));
    const by = errorText(worst.observation, worst.likelyError, document.units);
    findings.push({
      code: "outlier", tone: "wrong", readingIds: ids,
      sentence: ids.length > 1
        ? `${sentence(joined(names.map((each) => readingName(each)), "or"))} is off, by about ${by}; they explain it equally well, so measure ${joined(names.map(pairName))} again.`
        : `${sentence(readingName(names[0] ?? { kind: "tape", from: worst.observation.from, to: worst.observation.to }, worst.observation))} disagrees with the rest by about ${by}; measure ${names[0] ? pairName(names[0]) : "it"} again.`,
    });
    rest = { ...rest, observations: rest.observations.filter((o) => !ids.includes(o.readingId)) };
    now = adjustNetwork(rest);
    if (now.loose.length > adjustment.loose.length || now.redundancy <= 0) break;
  }
  if (findings.length === 0 && !adjustment.fits) {
    findings.push({ code: "misfit", tone: "caution", readingIds: [], sentence: "No single reading stands out, yet together they fit worse than their tolerances allow: a coarser tolerance, or a second reading of each, would tell." });
  }
  return findings;
}

/** The reading without which all fits and which a slip of unit brings into line; else all tapes at once. null when neither. */
function unitSlip(document: SurveyDocument, network: SurveyNetwork, readingOf: (id: string) => SurveyReading | undefined): SurveyFinding | null {
  const lengths = network.observations.filter((o) => o.type === "distance" || o.type === "along");
  const ids = [...new Set(lengths.map((o) => o.readingId))];
  const enough = chiSquareLimit(Math.max(network.observations.length - 3 * network.marks.length, 1)) * SLIP_LEEWAY;
  let best: { finding: SurveyFinding; squares: number } | null = null;
  for (const id of ids) {
    const without = firstPlaces({ ...network, observations: network.observations.filter((o) => o.readingId !== id) });
    if (without.squares > Math.min(enough, best?.squares ?? enough)) continue;
    for (const observation of lengths.filter((o) => o.readingId === id)) {
      const expected = predictObservation(observation, without.places).value;
      const slip = FACTORS.find(({ factor }) => Math.abs(observation.value / factor - expected) < SLIP_WITHIN * observation.sigma);
      if (slip) best = { finding: slipFinding(observation, expected, slip.words, document, readingOf(id)), squares: without.squares };
    }
  }
  return best?.finding ?? allTapesSlip(network, enough);
}

function slipFinding(observation: Observation, expected: number, words: string, { units }: SurveyDocument, reading: SurveyReading | undefined): SurveyFinding {
  const name = reading ? readingName(reading, observation) : "a reading";
  return {
    code: "unit-slip", tone: "wrong", readingIds: [observation.readingId],
    sentence: `${sentence(name)} reads ${readLength(observation.value, units)} where the others make it ${readLength(expected, units)}: it looks as if ${words}.`,
  };
}

function allTapesSlip(network: SurveyNetwork, enough: number): SurveyFinding | null {
  if (network.observations.every((o) => o.type === "distance") && network.fixed.size < 2) return null;
  for (const { factor, words } of FACTORS) {
    const scaled = { ...network, observations: network.observations.map((o) => (o.type === "distance" ? { ...o, value: o.value / factor } : o)) };
    if (firstPlaces(scaled).squares <= enough) {
      return { code: "unit-slip", tone: "wrong", readingIds: network.observations.filter((o) => o.type === "distance").map((o) => o.readingId), sentence: `The tapes do not fit the other readings, but would if all of them were mixed up alike: it looks as if ${words}.` };
    }
  }
  return null;
}

function weakFindings({ units }: SurveyDocument, network: SurveyNetwork, { order, covariance, loose }: Adjustment): SurveyFinding[] {
  const coarsest = Math.max(...network.observations.map((o) => (o.type === "distance" || o.type === "along" ? o.sigma : 0)), 0);
  return order.flatMap((mark, at) => {
    const within = Math.sqrt(Math.max(0, covariance[at * 3]![at * 3]! + covariance[at * 3 + 1]![at * 3 + 1]! + covariance[at * 3 + 2]![at * 3 + 2]!));
    if (loose.includes(mark) || coarsest === 0 || within < WEAK_TIMES * coarsest) return [];
    const partners = [...new Set(network.observations.flatMap((o) => (o.type !== "distance" ? [] : o.to === mark ? [o.from] : o.from === mark ? [o.to] : [])))];
    return [{ code: "weak", tone: "caution" as const, readingIds: [], sentence: `Mark ${mark} is placed within ${readLength(2 * within, units)} only${partners.length >= 3 ? `: it lies almost in one plane with ${joined(partners.slice(0, 4))}` : ""}; a level reading or an offset would hold it.` }];
  });
}

function datumFindings(network: SurveyNetwork, { datumDefect, coordinates, loose }: Adjustment): SurveyFinding[] {
  const [a, b, c] = network.marks;
  const findings: SurveyFinding[] = [];
  if (datumDefect === 6 && a && b && c) {
    findings.push({ code: "datum", tone: "note", readingIds: [], sentence: `Nothing ties these marks to plant coordinates: ${a} is taken as zero, ${b} as east of it and ${c} as level with them. Give an offset from the datum, a level reading and a bearing to turn them into plant directions.` });
  } else if (datumDefect > 0 && a) {
    const eastward = b && network.observations.every((o) => o.type !== "azimuth" && (o.type !== "along" || o.axis === 2));
    findings.push({ code: "datum", tone: "note", readingIds: [], sentence: `Nothing ties these marks to plant coordinates: ${a} is taken as zero${eastward ? ` and ${b} as east of it` : ""}.` });
    if (datumDefect === 5) findings.push({ code: "tilt", tone: "caution", readingIds: [], sentence: "One level reading holds the tilt one way only: give a second one, between marks off that line, or all heights and axes may lean." });
  }
  const tapesOnly = network.observations.every((o) => o.type === "distance");
  const deep = [...coordinates.entries()].filter(([mark, place]) => !loose.includes(mark) && Math.abs(place[2]) > INCH_MM);
  if (tapesOnly && datumDefect === 6 && deep[0]) {
    findings.push({ code: "mirror", tone: "caution", readingIds: [], sentence: `Tapes alone cannot tell above from below: ${deep[0][0]} is taken ${deep[0][1][2] > 0 ? "above" : "below"} the level of ${joined([a, b, c].filter((m): m is string => !!m))}. One level reading settles it.` });
  }
  return findings;
}

/** Whether an observation's residual is past what chance explains. */
export function isOff(standardised: number): boolean {
  return Math.abs(standardised) > OUTLIER_LIMIT;
}
