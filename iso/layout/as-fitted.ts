/**
 * As fitted: a measured spool laid on its sheet. Points are read, slips looked for, the best rigid motion found (or one
 * face held), every face judged along its axis, across it, in its lean and on its bolt holes, faces judged against each
 * other, and the one change named that would mend it. Pure; nothing a person types makes it throw.
 */
import type { UnitSystem } from "../run/document";
import type { Model, Spool } from "../run/model-types";
import { mendingChanges } from "./as-fitted-changes";
import type { AsFittedDocument } from "./as-fitted-document";
import { fitMeasured, wantedPlaces, type Fitted } from "./as-fitted-fit";
import { judgeFitted, worstVerdict, type Judged } from "./as-fitted-judge";
import { fittedTolerances, readFitted } from "./as-fitted-read";
import { slipFindings } from "./as-fitted-slips";
import type { AsFittedResult, FittedChange, FittedFinding, FittedVerdict } from "./as-fitted-types";
import { fittedWanted, type Wanted } from "./as-fitted-wanted";
import { formatFraction } from "./lengths";

/** Compares. @param nominalInches of the spool's largest pipe, for the usual tolerance. */
export function compareAsFitted(model: Model, spool: Spool, document: AsFittedDocument, nominalInches: number): AsFittedResult {
  return compareWith(fittedWanted(model, spool), document, nominalInches, model.document.settings.units);
}

export function compareWith(wanted: Wanted, document: AsFittedDocument, nominalInches: number, units: UnitSystem): AsFittedResult {
  const { tolerances, findings: ofTolerances } = fittedTolerances(document, nominalInches, units);
  const read = readFitted(document, wanted, units);
  const places = wantedPlaces(wanted);
  const findings: FittedFinding[] = [...ofTolerances, ...read.findings];
  const hold = read.measured.some((one) => one.mark === document.hold && one.centre !== null) ? document.hold : "";
  if (document.hold !== "" && hold === "") findings.push({ code: "hold", tone: "warn", sentence: `End ${document.hold} is to be held, but its centre was not measured: all ends are fitted instead.` });
  const fitted = fitMeasured(read.measured, places, hold);
  const empty = { findings, tolerances, readAs: document.readAs, changes: [], spreadMm: null, motion: null };
  if (!fitted) return { ...empty, ...nothingJudged(wanted), verdict: "none", headline: "Nothing is measured yet. Three points that do not stand on one line place a spool: face centres, points on their axes, bolt holes or corners." };
  const slips = slipFindings(document, fitted, places, tolerances);
  findings.push(...slips, ...freedomFindings(fitted));
  if (hold === "" && fitted.free === "nothing" && slips.length === 0 && fitted.measured.length === 2) findings.push({ code: "two", tone: "note", sentence: "With two faces the fit shares what is off between them. Hold one of them to see where the other comes to stand." });
  const judged = judgeFitted(fitted, wanted, tolerances, units);
  const isSound = fitted.free === "nothing" && slips.every(({ tone }) => tone !== "wrong");
  const changes = isSound && judged.verdict === "stop" ? mendingChanges(fitted, { wanted, places, tolerances, units, hold }) : [];
  const slipped = slips.some(({ tone }) => tone === "wrong");
  const verdict: FittedVerdict = slipped || (fitted.free !== "nothing" && judged.verdict !== "stop") ? "none" : changes[0]?.kind === "trim" ? "trim" : judged.verdict;
  return {
    ...empty, findings, faces: judged.faces, corners: judged.corners, pairs: judged.pairs, changes, verdict,
    spreadMm: fitted.free === "nothing" && fitted.spare > 0 ? Math.sqrt(fitted.squares / fitted.spare) : null,
    motion: fitted.free === "nothing" ? fitted.motion : null,
    headline: slipped ? "Not judged: the points themselves are in doubt. Mend what is said below first." : headlineOf(verdict, judged, changes, formatFraction(tolerances.positionMm, units)),
  };
}

function nothingJudged(wanted: Wanted): Pick<AsFittedResult, "faces" | "corners" | "pairs"> {
  const blank = { at: null, off: null, alongMm: null, acrossMm: null, leanRad: null, gapMm: null, axis: null, holesRad: null, holesMm: null, verdict: "none" as const, words: [] };
  return { faces: wanted.faces.map(({ mark, name }) => ({ ...blank, mark, name })), corners: wanted.corners.map(({ mark, name }) => ({ ...blank, mark, name })), pairs: [] };
}

function freedomFindings(fitted: Fitted): FittedFinding[] {
  if (fitted.free === "nothing") return [];
  const count = fitted.measured.length;
  if (count === 1) return [{ code: "few", tone: "wrong", sentence: "One point alone places nothing. Measure the other faces too." }];
  const why = count === 2 ? "Two points leave the spool free to turn about the line between them" : "These points stand nearly on one line, and the spool is free to turn about it";
  return [{ code: "line", tone: "warn", sentence: `${why}: only their distances can be judged. Add a point off that line: another face, a corner, a point on an axis or three bolt holes.` }];
}

function headlineOf(verdict: FittedVerdict, judged: Judged, changes: readonly FittedChange[], tolerance: string): string {
  const unseen = judged.faces.filter((face) => face.verdict === "none").map((face) => face.mark);
  const rest = unseen.length === 0 ? "" : ` Not judged: end${unseen.length > 1 ? "s" : ""} ${unseen.join(", ")}.`;
  const faults = [...judged.faces, ...judged.corners].filter((one) => one.verdict === "stop" || one.verdict === "near");
  const fault = faults.find((one) => one.verdict === "stop") ?? faults[0];
  const named = fault ? `${fault.mark.startsWith("W") ? "corner" : "end"} ${fault.mark} ${fault.words.join("; ")}` : pairFault(judged);
  if (verdict === "trim") return `TRIM: ${changes[0]!.words} Then all that was measured is within +/- ${tolerance}.${rest}`;
  if (verdict === "stop") return `STOP: ${named}.${changes[0] ? ` ${changes[0].words}` : ""} Do not pull, jack or heat to fit.${rest}`;
  if (verdict === "near") return `WITHIN, BUT NEAR: ${named}.${rest}`;
  if (verdict === "go") return `GO: all that was measured is within +/- ${tolerance}.${rest}`;
  return judged.pairs.length > 0 ? `Only distances are judged: within +/- ${tolerance}. Where the faces stand is not.` : `Not judged.${rest}`;
}

function pairFault({ pairs }: Judged): string {
  const worst = worstVerdict(pairs.map((pair) => pair.verdict));
  const pair = pairs.find((one) => one.verdict === worst);
  return pair ? `ends ${pair.a} and ${pair.b} do not stand as the sheet says from each other` : "out of tolerance";
}
