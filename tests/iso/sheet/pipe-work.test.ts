/** What the bench reads of mitres, bends, threads, turns and added welds; numbers by the geometry beside each. */
import { describe, expect, it } from "vitest";
import { composeSheet, emptyMarks, type RunDocument } from "@/iso";
import { measureText } from "@/fonts/widths";
import { bend, elbow, end, flange, mitre, pipe, RunBuilder } from "../../fixtures/run-builder";
import { stubInput } from "./sheet-stubs";
import { textsOf } from "./text-boxes";

const words = (document: RunDocument): string =>
  composeSheet({ ...stubInput("tabloid", "for-review", document), marks: emptyMarks() }, measureText).flatMap(textsOf).map((item) => item.text).join("\n");
const open = end("open", "BEVEL");

describe("pipe work on the sheet", () => {
  it("NPS 6 mitre of three pieces: segment 7.33 in on the centre line, back and throat OD tan 22.5° (2.744 in) apart each way", () => {
    const text = words(new RunBuilder("T", "imperial", { pipe: pipe("6") }).start(open).go("E", "5'", mitre(3)).go("N", "5'", open).done());
    expect(text).toContain("MITRE CUTS");
    // 18 tan 22.5° - 1/8 = 7.3308; plus and minus 6.625 tan 22.5° = 2.7442: 10.0750 and 4.5866, to the nearest 1/64.
    for (const part of ["10 5/64", "7 21/64", "4 19/32", "22.50°"]) expect(text).toContain(part);
    expect(text).toMatch(/mitre butt, cut\s+22\.50°/);
    expect(text).not.toContain("over 3°");
  });

  it("a bend begins 26 in from the end and is 15 45/64 in long (R 10, 90°)", () => {
    const text = words(new RunBuilder("T", "imperial", { pipe: pipe("2") }).start(open).go("E", "3'", bend(254)).go("N", "4'", open).done());
    for (const part of ["BENDS OF THE PIPE", "26", "15 45/64"]) expect(text).toContain(part);
  });

  it("threads, turned holes, a roll off the square, the welds of short stock and the notes of this sheet are said", () => {
    const text = words({
      ...new RunBuilder("T", "imperial", { pipe: pipe("2"), stockLengthMm: 3_000 }).start(flange({ boltHoles: { turnDeg: 22.5, from: "W" } })).go("E", "30'").go("N", "3'").go("E30U", "3'", elbow("lr-90")).go("E30U", "1'", open).done(),
      sheetNotes: [{ spool: "A", text: "SHIP PLUGGED" }, { spool: "B", text: "NOT HERE" }],
    });
    expect(text).toContain("FITTING TURNS");
    expect(text).toMatch(/CC?W, arc/);
    expect(text).toContain("22.50° clockwise, seen from the west");
    expect(text).toMatch(/Welds? \d.* added because the stock/);
    expect(text).toContain("SHIP PLUGGED");
    expect(text).not.toContain("NOT HERE");
    expect(words(new RunBuilder("T", "imperial", { pipe: pipe("1", "XS") }).start(open).go("E", "2'", elbow("th-90")).go("N", "2'", open).done())).toContain("MAKE-UP");
  });
});
