/** Tables of a sheet as a reader uses them: where one goes on, lengths as on a tape, square welds, marks that are there. */
import { describe, expect, it } from "vitest";
import { buildModel, composePages, composeSheet, drawModel, emptyMarks, SHEET_SIZES, type RunDocument, type SheetPage } from "@/iso";
import { measureText } from "@/fonts/widths";
import { flange, RunBuilder } from "../../fixtures/run-builder";
import { sampleRuns } from "../../fixtures/sample-runs";
import { stubDraw, stubInput, stubModel } from "./sheet-stubs";
import { textsOf } from "./text-boxes";

const wordsOf = (page: SheetPage): string[] => textsOf(page).map((item) => item.text);

function sheetOf(document: RunDocument, size: "tabloid" | "letter" = "tabloid"): SheetPage[] {
  return composeSheet({ ...stubInput(size, "for-review", document), marks: emptyMarks() }, measureText);
}

/** Turns 90° but for a hundredth of a degree or so: two sloped legs of a drain. */
const drain = new RunBuilder("DR-1", "imperial", {}, "Drain")
  .start(flange({ text: "SUMP" })).go("D", `1' 8"`).enu(`-12'`, "0", `-3"`).enu("0", `-6'`, `-1 1/2"`).go("D", `1' 10"`, flange()).done();

describe("a table that goes on", () => {
  it.each(SHEET_SIZES)("says on %s on which sheet, and goes on there", (size) => {
    const pages = composePages(stubInput(size, "draft"), stubModel(60), stubDraw, measureText);
    let told = 0;
    pages.forEach((page, index) => {
      const words = wordsOf(page);
      for (const text of words.filter((one) => /^Continued on sheet \d+$/.test(one))) {
        told += 1;
        const sheet = Number(text.slice("Continued on sheet ".length));
        expect(sheet).toBeGreaterThan(index + 1);
        expect(wordsOf(pages[sheet - 1]!).some((one) => one.endsWith("(CONTINUED)")), `${size}: ${text} on sheet ${index + 1}`).toBe(true);
      }
      for (const _ of words.filter((one) => one === "Continued in the next column")) expect(words.some((one) => one.endsWith("(CONTINUED)"))).toBe(true);
    });
    const heads = pages.flatMap(wordsOf).filter((one) => one.endsWith("(CONTINUED)")).length;
    const besides = pages.flatMap(wordsOf).filter((one) => one === "Continued in the next column").length;
    expect(told + besides).toBe(heads);
    expect(told).toBeGreaterThan(0);
  });

  it("says nothing when all is on one sheet", () => {
    expect(sheetOf(sampleRuns.planarOffset!).flatMap(wordsOf).filter((one) => one.startsWith("Continued on"))).toEqual([]);
  });
});

describe("materials", () => {
  it("gives pipe in feet and inches on an imperial line and in millimetres on a metric one", () => {
    // firstRun's four pieces: 28 1/4 + 19 3/4 + 13 + 25 5/8 = 86 5/8 in = 7'-2 5/8".
    expect(sheetOf(sampleRuns.firstRun!).flatMap(wordsOf)).toContain(`7'-2 5/8"`);
    expect(sheetOf(sampleRuns.metricLine!).flatMap(wordsOf)).toContain("3451 mm");
  });

  it("names the pipe a fitting is for, and not the pipe's grade as the fitting's own", () => {
    const [spool] = buildModel(sampleRuns.firstRun!, emptyMarks(), []).spools;
    const materialOf = (start: string) => spool!.materials.find((row) => row.description.startsWith(start))?.material;
    expect(materialOf("Pipe")).toBe("A106 B");
    expect(materialOf("Elbow")).toBe("for A106 B");
    expect(materialOf("Flange")).toBe("for A106 B");
    expect(materialOf("Gate valve")).toBe("as specified");
    expect(buildModel(sampleRuns.socketLine!, emptyMarks(), []).spools[0]!.materials[0]!.description).toBe("Pipe, SCH 80");
  });

  it("breaks no date and no head of a column on narrow paper", () => {
    const words = sheetOf(sampleRuns.branchWithReducer!, "letter").flatMap(wordsOf);
    for (const whole of ["ITEM", "QTY", "DATE", "CHECKED", "APPROVED", "2025-04-14"]) expect(words, whole).toContain(whole);
  });
});

describe("square welds", () => {
  it("print as butt while the mismatch is under 0.1° (the model's own bound for straight pipe), with it from there on", () => {
    const model = buildModel(drain, emptyMarks(), []);
    const off = model.joints.filter((joint) => joint.kind === "butt").map((joint) => (joint.mismatchRad * 180) / Math.PI);
    expect(off.some((degrees) => degrees > 0 && degrees < 0.1)).toBe(true);
    const words = sheetOf(drain).flatMap(wordsOf);
    expect(words).toContain("butt");
    expect(words).toContain("butt, off 0.60°");
    expect(words.filter((one) => /off 0\.0/.test(one))).toEqual([]);
    expect(words.join(" ")).not.toContain("89.9");
    expect(model.problems.filter((problem) => problem.code === "elbow-mismatch")).toHaveLength(2);
  });
});

describe("legend", () => {
  it("explains brackets only where a bracketed dimension stands", () => {
    const room = { widthMm: 240, heightMm: 170, measure: measureText, view: null, spool: null, show: { items: true, welds: true, pieces: true, dimensions: true } };
    for (const document of Object.values(sampleRuns)) {
      const { items, legend } = drawModel(buildModel(document, emptyMarks(), []), room);
      const isBracketed = items.some((item) => item.type === "text" && /^\(\d/.test(item.text));
      expect(legend.includes("reference-dimension"), document.number).toBe(isBracketed);
    }
    expect(drawModel(buildModel(sampleRuns.planarOffset!, emptyMarks(), []), room).legend).not.toContain("reference-dimension");
    expect(drawModel(buildModel(sampleRuns.branchWithReducer!, emptyMarks(), []), room).legend).toContain("reference-dimension");
  });
});
