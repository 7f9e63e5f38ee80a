/** What a new job hands down to its lines. Every value is common practice and the shop's to change; none is a code's. */
import type { LineSettings, RunDocument, UnitSystem } from "./document";

const INCH = 25.4;
const FOOT = 304.8;

/** Settings of a new line. Root gap and gasket 1/8 in (3 mm), socket pull-back 1/16 in (1.6 mm), slip-on setting 1/4 in (6 mm). */
export function defaultLineSettings(units: UnitSystem): LineSettings {
  const inch = units === "imperial";
  return {
    units,
    pipe: { nps: "4", schedule: "STD", material: "A106 B", specification: "" },
    elbow: "LR",
    ratingClass: 150,
    allowances: {
      rootGapMm: inch ? INCH / 8 : 3, socketPullBackMm: inch ? INCH / 16 : 1.6, gasketMm: inch ? INCH / 8 : 3, slipOnSettingMm: inch ? INCH / 4 : 6,
    },
    standardElbowWithinDeg: 3,
    minimumPupMm: null,
    fieldTrimMm: inch ? 6 * INCH : 150,
    faceIncludesGasket: false,
    shippingBoxMm: inch ? [40 * FOOT, 8 * FOOT, 8 * FOOT] : [12_000, 2_400, 2_400],
    asEntered: { insulation: "", pwht: "", nde: "", test: "", paint: "" },
  };
}

/** A document with an empty main run. `runId` is the caller's id for it. */
export function newRunDocument(number: string, settings: LineSettings, runId = "main"): RunDocument {
  return { version: 1, number, title: "", settings, view: null, runs: [{ id: runId, name: "", from: null, pipe: null, points: [] }], notes: [] };
}
