/** The dimension record: every number of the comparison stands on it, no text on another, nothing past the frame, in four sizes. */
import { describe, expect, test } from "vitest";
import { composeAsFittedPages, type SheetSize } from "@/iso";
import { measureText } from "@/fonts/widths";
import { sampleDocument } from "../../factories";
import { sampleMeasurement } from "../../measurements";
import { benchInput, TEMPLATE_RUNS } from "../layout/bench-inputs";
import { overlappingTexts, textsOf } from "./text-boxes";

const SIZES: readonly SheetSize[] = ["letter", "tabloid", "A4", "A3"];
const run = sampleDocument("L-1");
const record = (longMm: number) => ({ document: { ...sampleMeasurement(longMm), note: "On stands, bay 3. ".repeat(100) }, by: "Danny Ruiz", at: "2026-12-01T15:00:00Z" });
const words = (size: SheetSize, longMm: number | null) => composeAsFittedPages(benchInput(run, size), longMm === null ? null : record(longMm), measureText);

describe.each(SIZES)("%s", (size) => {
  test("no text stands on another and none is under 2.5 mm, record and form", () => {
    for (const longMm of [0, 19.05, null]) {
      for (const page of words(size, longMm)) {
        expect(overlappingTexts(page)).toEqual([]);
        for (const item of textsOf(page)) expect(item.capMm).toBeGreaterThanOrEqual(2.5);
        for (const { at } of textsOf(page)) expect(at[0] >= 0 && at[0] <= page.widthMm && at[1] >= 0 && at[1] <= page.heightMm).toBe(true);
      }
    }
  });

  test("verdict, who, tolerances, deviations, the points as typed and the sign-off are all on it", () => {
    const text = words(size, 19.05).flatMap((page) => textsOf(page).map((item) => item.text)).join(" ");
    for (const said of ["TRIM: Trim 3/4 in at end 2", "Danny Ruiz, 2026-12-01 15:00 UTC", "PFI ES-3", "END 2", "619.05", "MEASURED", "CHECKED", "ACCEPTED", "SHEET 1 OF", "PLANT N", "Do not pull, jack or heat"]) expect(text).toContain(said);
  });
});

test("runs of every kind compose, with a form for each", () => {
  for (const document of Object.values(TEMPLATE_RUNS)) expect(composeAsFittedPages(benchInput(document, "letter"), null, measureText).length).toBeGreaterThan(0);
});
