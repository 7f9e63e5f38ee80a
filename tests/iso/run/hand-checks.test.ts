/** Cut lengths worked by hand from the standards' tables; gaps and gaskets 1/8 in, no gasket at the sheet's own end. */
import { describe, expect, it } from "vitest";
import { buildModel } from "../../../iso/run/build-model";
import { emptyMarks } from "../../../iso/run/marks";
import type { Model } from "../../../iso/run/model-types";
import type { RunDocument } from "../../../iso/run/document";
import { firstRun } from "../../fixtures/sample-runs";

const INCH = 25.4;
const build = (document: RunDocument): Model => buildModel(document, emptyMarks(), []);
const cutInches = (model: Model): number[] => model.pieces.map((p) => p.cutLengthMm / INCH);

describe("the first run (take-outs: ASME B16.9, B16.5, B16.10)", () => {
  it("cuts 28 1/4, 19 3/4, 13 and 25 5/8 in", () => {
    const cuts = cutInches(build(firstRun));
    [28.25, 19.75, 13, 25.625].forEach((inches, i) => expect(cuts[i]).toBeCloseTo(inches, 9));
    expect(cuts).toHaveLength(4);
  });
});
