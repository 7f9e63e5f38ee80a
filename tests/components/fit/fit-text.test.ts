/** Tolerances of a fit in a form and back, errors of both ends, and the field-fit weld in the run. */
import { describe, expect, it } from "vitest";
import { buildModel, closeBetween, emptyMarks, newRunDocument, usualFitSettings, type ClosingFound } from "@/iso";
import { lengthEntryText, settingsTextSchema, settingsToText } from "@/components/jobs/settings-text";
import { endErrors, endsCovariance } from "@/components/fit/known-ends";
import { withFieldFit } from "@/components/fit/take-trim";
import { EMPTY_END, readClosingForm, type ClosingForm } from "@/components/run-editor/closing-form";
import { planInsert } from "@/components/run-editor/closing-insert";
import { defaultLineSettings } from "@/lib/rules/default-settings";

describe("settings of a fit", () => {
  it.each(["imperial", "metric"] as const)("usual ones are left out, own ones come back as they went in (%s)", (units) => {
    const settings = defaultLineSettings(units);
    expect(settingsTextSchema.parse(settingsToText(settings))).not.toHaveProperty("fit");
    const usual = usualFitSettings(units);
    const fit = { shop: { ...usual.shop, cutLengthMm: 2.4, elbowAngleDeg: 0.25 }, limits: { ...usual.limits, flangeParallelPercent: 0.4 } };
    const back = settingsTextSchema.parse(settingsToText({ ...settings, fit })).fit!;
    for (const part of ["shop", "limits"] as const) for (const [key, value] of Object.entries(fit[part])) expect((back[part] as Record<string, number>)[key]).toBeCloseTo(value, 3);
  });

  it("refuses what is no tolerance, at its own field", () => {
    const wrong = settingsTextSchema.safeParse({ ...settingsToText(defaultLineSettings("imperial")), fitCutLength: "-1/16", fitRoll: "fifty", fitFlangeParallel: "0", fitBoltHole: "2 ft" });
    expect(wrong.success ? [] : wrong.error.issues.map((issue) => issue.path[0]).sort()).toEqual(["fitBoltHole", "fitCutLength", "fitFlangeParallel", "fitRoll"]);
  });
});

describe("ends nobody surveyed", () => {
  it("position ± each way and axis ± across it, the two ends apart", () => {
    const errors = endErrors([{ axis: [1, 0, 0], surveyedId: null }, { axis: [0, 0, 1], surveyedId: "gone" }], null, { positionMm: 3, axisRad: 0.02 });
    const covariance = endsCovariance(errors);
    expect(covariance.map((row, i) => Number(row[i]!.toFixed(8)))).toEqual([2.25, 2.25, 2.25, 0, 1e-4, 1e-4, 2.25, 2.25, 2.25, 1e-4, 1e-4, 0]);
    expect(covariance[0]![6]).toBe(0);
  });
});

describe("field-fit weld taken over", () => {
  const document = newRunDocument("L-1", defaultLineSettings("imperial"));
  const gap = lengthEntryText(document.settings.allowances.rootGapMm, "imperial");
  const form: ClosingForm = { nps: "4", rootGap: gap, end0: { ...EMPTY_END, e: "0", n: "0", u: "0", direction: "E" }, end1: { ...EMPTY_END, e: "60", n: "20 1/2", u: "0", direction: "W" } };
  const read = readClosingForm(form, "imperial", []);
  if (!read.ok) throw new Error(JSON.stringify(read.messages));
  const found = closeBetween(read.input) as ClosingFound;
  const plan = planInsert(form, found, read.input, buildModel(document, emptyMarks(), []), { by: "Ida", at: "2026-01-01T00:00:00Z", ids: ["a", "b", "c", "d"] });
  if (!plan.ok) throw new Error(plan.message);

  it.each(["elbow0", "elbow1"])("the pipe is cut longer by the trim, with a field-fit weld at %s", (jointId) => {
    const trimMm = 3 * 25.4 / 8;
    const plain = buildModel(plan.document, emptyMarks(), []);
    const fitted = buildModel(withFieldFit(plan.document, document, found, { jointId, trimMm }), emptyMarks(), []);
    const longest = (model: typeof plain) => Math.max(...model.pieces.map((piece) => piece.cutLengthMm));
    expect(longest(fitted) - longest(plain)).toBeCloseTo(trimMm, 6);
    expect(fitted.joints.filter(({ place }) => place === "field-fit")).toHaveLength(1);
  });

  it("a joint that is no elbow's changes nothing", () => {
    expect(withFieldFit(plan.document, document, found, { jointId: "end1", trimMm: 10 })).toBe(plan.document);
  });
});
