/** Surveyed ends in the closing: exact position and axis, how well they are known, and points marked as measured. */
import { describe, expect, test } from "vitest";
import { buildModel, closeBetween, emptyMarks, emptySurvey, newRunDocument, surveyResult, type SurveyReading } from "@/iso";
import { EMPTY_END, readClosingForm, type ClosingForm } from "@/components/run-editor/closing-form";
import { planInsert } from "@/components/run-editor/closing-insert";
import { endFromSurvey, endsAsked, takenFrom } from "@/components/run-editor/surveyed-ends";
import { defaultLineSettings } from "@/lib/rules/default-settings";

const point = (to: string, e: string, n: string, u: string): SurveyReading => ({ id: `p${to}`, kind: "point", from: "", to, first: [e, n, u], again: ["", "", ""], tool: "total-station", tolerance: "", leftOut: false, note: "" });
const survey = {
  ...emptySurvey("imperial"),
  readings: [point("A", "0", "0", "0"), point("B", "60", "20 1/2", "0")],
  ends: [
    { id: "n1", name: "N1", centre: "A", axis: { kind: "bearing" as const, points: "E" }, tolerance: "" },
    { id: "n2", name: "N2", centre: "B", axis: { kind: "bearing" as const, points: "W" }, tolerance: "" },
  ],
};
const { ends } = surveyResult(survey, 114.3);

describe("closing between surveyed ends", () => {
  test("the address asks for two ends, or none", () => {
    expect(endsAsked("?close=n1,n2")).toEqual(["survey:n1", "survey:n2"]);
    expect(endsAsked("?close=n1")).toBeNull();
    expect(endsAsked("")).toBeNull();
  });

  test("a row's end is not a surveyed one", () => {
    expect(endFromSurvey(ends, "row-id", "imperial")).toBeNull();
  });

  test("goes into the run as measured, within what the survey says", () => {
    const document = newRunDocument("L-1", defaultLineSettings("imperial"));
    const model = buildModel(document, emptyMarks(), []);
    const taken = (choice: string) => ({ ...EMPTY_END, ...endFromSurvey(ends, choice, "imperial")! });
    const form: ClosingForm = { nps: "4", rootGap: String(document.settings.allowances.rootGapMm) + "mm", end0: taken("survey:n1"), end1: taken("survey:n2") };
    expect(takenFrom(form.end1)).toBe("survey:n2");
    expect(form.end1).toMatchObject({ direction: "W", n: '1\'-8 1/2"' });
    const read = readClosingForm(form, "imperial", []);
    if (!read.ok) throw new Error(JSON.stringify(read.messages));
    // Two points of a total station, ± 2 mm in each of three ways: 2·√3 each, joined.
    expect(read.input.toleranceMm).toBeCloseTo(2 * Math.sqrt(6), 6);
    const found = closeBetween(read.input);
    if (!found.ok) throw new Error(found.sentence);
    const plan = planInsert(form, found, read.input, model, { by: "Ida", at: "2026-01-01T00:00:00Z", ids: ["a", "b", "c", "d"] });
    if (!plan.ok) throw new Error(plan.message);
    const kinds = plan.document.runs[0]!.points.map((each) => each.provenance.kind);
    expect(kinds).toEqual(["measured", "calculated", "calculated", "measured"]);
    expect(plan.document.runs[0]!.points[0]!.provenance.toleranceMm).toBeCloseTo(2 * Math.sqrt(3), 6);
  });
});
