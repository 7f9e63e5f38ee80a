import { describe, expect, it } from "vitest";
import { buildModel, composePages, composeSheet, emptyMarks, formatInches, formatLength, SHEET_SIZES, sheetSizeMm, wordAcross } from "@/iso";
import type { RevisionState, SheetInput, SheetPage } from "@/iso";
import { measureText } from "@/fonts/widths";
import { sampleRuns } from "../../fixtures/sample-runs";
import { stubDocument, stubDraw, stubInput, stubModel } from "./sheet-stubs";
import { expectReadable as expectPageReadable, textCorners, textsOf } from "./text-boxes";

const STATES: readonly RevisionState[] = ["draft", "for-review", "returned", "for-fabrication", "superseded", "void", "as-built"];
const words = (pages: readonly SheetPage[]): string[] => pages.flatMap((page) => textsOf(page).map((item) => item.text));
const joined = (pages: readonly SheetPage[]): string => words(pages).join(" ");

const expectReadable = (pages: readonly SheetPage[], what: string): void => pages.forEach((page) => expectPageReadable(page, what));

function sampleInput(name: string, size: SheetInput["size"], state: RevisionState = "for-review"): SheetInput {
  const document = sampleRuns[name]!;
  const spool = buildModel(document, emptyMarks(), []).spools[0]!.letter;
  return { ...stubInput(size, state, document), marks: emptyMarks(), spool };
}

describe("a sheet of each size", () => {
  for (const size of SHEET_SIZES) {
    it(`${size}: every state composes, reads and says its word`, () => {
      for (const state of STATES) {
        for (const hold of [false, true]) {
          const base = stubInput(size, state);
          const input = { ...base, revision: { ...base.revision, hold } };
          const pages = composePages(input, stubModel(4), stubDraw, measureText);
          expectReadable(pages, `${size} ${state}`);
          for (const page of pages) {
            expect(page).toMatchObject(sheetSizeMm(size));
            const text = joined([page]);
            expect(text).toContain(state.replace("-", " ").toUpperCase().replace("AS BUILT", "AS-BUILT"));
            if (hold) expect(text).toContain("HOLD");
            expect(text).toContain("HPS-0147");
            expect(text).toContain("layout and records aid");
          }
        }
      }
    });
  }

  it("puts the word across every page but those that may be worked to", () => {
    expect(STATES.map((state) => wordAcross(state, false))).toEqual(["DRAFT", "FOR REVIEW", "RETURNED", null, "SUPERSEDED", "VOID", null]);
    expect(STATES.map((state) => wordAcross(state, true))).toEqual(["HOLD", "HOLD", "HOLD", "HOLD", "SUPERSEDED", "VOID", "HOLD"]);
    const pages = composePages(stubInput("letter", "void"), stubModel(4), stubDraw, measureText);
    for (const page of pages) {
      const across = page.items.filter((item) => item.type === "text" && item.ink === "pale");
      expect(across.map((item) => item.type === "text" && item.text)).toEqual(["VOID"]);
      // First item of the page: everything else is painted over it.
      expect(page.items[0]).toBe(across[0]);
      for (const [x, y] of textCorners(across[0] as never, 0)) {
        expect(x > 20 && x < page.widthMm - 10 && y > 10 && y < page.heightMm - 10).toBe(true);
      }
    }
  });
});

describe("real spools", () => {
  for (const name of Object.keys(sampleRuns)) {
    it(`${name} reads on every size and shows every cut length and weld`, () => {
      for (const size of SHEET_SIZES) {
        const input = sampleInput(name, size);
        const model = buildModel(input.document, input.marks, []);
        const spool = model.spools.find((one) => one.letter === input.spool)!;
        const pages = composeSheet(input, measureText);
        expectReadable(pages, `${name} ${size}`);
        const text = words(pages);
        for (const piece of model.pieces.filter((one) => spool.pieceKeys.includes(one.key))) {
          expect(text).toContain(piece.mark);
          const cut = input.units === "metric" ? formatLength(piece.cutLengthMm, "metric") : formatInches(piece.cutLengthMm);
          expect(text, `${name} ${piece.mark}`).toContain(cut);
        }
        for (const joint of model.joints.filter((one) => spool.jointKeys.includes(one.key) && one.number !== null)) expect(text).toContain(joint.number);
      }
    });
  }

  it("shows the hand-checked cut lengths of the first run: 28 1/4, 19 3/4, 13, 25 5/8 in (TRADE.md hand checks)", () => {
    const text = words(composeSheet(sampleInput("firstRun", "tabloid"), measureText));
    for (const cut of ["28 1/4", "19 3/4", "13", "25 5/8"]) expect(text).toContain(cut);
    expect(text).toContain("37 1/2 face to centre");
    expect(text).toContain("3 weld-neck hub, 6 LR 90");
    expect(text).toContain("2 × 1/8 root gap");
  });

  it("gives equal pages for equal input", () => {
    const input = sampleInput("branchWithReducer", "A3");
    expect(JSON.stringify(composeSheet(input, measureText))).toBe(JSON.stringify(composeSheet(structuredClone(input), measureText)));
  });
});

describe("bad and extreme input", () => {
  it("says that a spool is not there instead of failing", () => {
    const pages = composeSheet({ ...sampleInput("firstRun", "letter"), spool: "ZZ" }, measureText);
    expect(joined(pages)).toContain("No spool ZZ in this line yet.");
    expectReadable(pages, "no spool");
  });

  it("flows 60 pieces and 120 welds over pages, each once, with heads repeated", () => {
    for (const size of SHEET_SIZES) {
      const pages = composePages(stubInput(size, "draft"), stubModel(60), stubDraw, measureText);
      expectReadable(pages, `60 pieces ${size}`);
      const text = words(pages);
      for (let piece = 1; piece <= 60; piece += 1) expect(text.filter((one) => one === `P${piece}`).length, `P${piece} ${size}`).toBe(piece === 1 ? 2 : 1);
      expect(text.filter((one) => one.endsWith("(CONTINUED)")).length).toBeGreaterThan(1);
      expect(text.filter((one) => one === "CUT LENGTH").length).toBe(text.filter((one) => one.startsWith("CUT LIST")).length);
      expect(text.filter((one) => one.startsWith("VERIFY BY TAPE")).length).toBe(text.filter((one) => one.startsWith("CUT LIST")).length);
      const counts = [`${pages.length} of ${pages.length}`, `SHEET ${pages.length} OF ${pages.length}`];
      expect(counts.some((count) => joined(pages).includes(count))).toBe(true);
    }
  });

  it("prints a note of 2 000 characters whole", () => {
    const sentence = "Reroute clear of the cable tray and keep the valve stem reachable from grade. ";
    const note = sentence.repeat(26).slice(0, 2_000).trim();
    for (const size of SHEET_SIZES) {
      const document = stubDocument([note, "x".repeat(2_000)]);
      const pages = composePages(stubInput(size, "draft", document), stubModel(4, document), stubDraw, measureText);
      expectReadable(pages, `long note ${size}`);
      const text = words(pages);
      const from = text.findIndex((one) => one.startsWith("Reroute clear"));
      expect(from).toBeGreaterThan(0);
      expect(text.join(" ").replace(/\s+/g, "")).toContain("Rerouteclearofthecabletray");
      expect(text.filter((one) => /^x+$/.test(one)).join("").length).toBe(2_000);
    }
  });

  it("cuts what does not fit the title block with an ellipsis and shows it whole among the notes", () => {
    const base = stubInput("letter", "draft");
    const client = "Consolidated Northern Dairy and Food Processing Cooperative Society of the Lower Valley, Limited";
    const input = { ...base, titleBlock: { ...base.titleBlock, client, shopName: "W".repeat(300) } };
    const pages = composePages(input, stubModel(2), stubDraw, measureText);
    expectReadable(pages, "long client");
    expect(words(pages).some((text) => text.endsWith("…"))).toBe(true);
    expect(joined(pages).replace(/\s+/g, "")).toContain(`CLIENT:${client.replace(/\s+/g, "")}`);
  });

  it("keeps very long names, codes and histories inside their boxes", () => {
    const base = stubInput("A4", "for-fabrication");
    const rows = Array.from({ length: 30 }, (_, index) => ({ code: `A${index}`, description: "long description ".repeat(30), date: "2025-01-01", by: "Q".repeat(60), checked: "", approved: "Z Z Z Z Z" }));
    const revision = { ...base.revision, sheetNumber: "SHEET-NUMBER-WITHOUT-END-0000000000000000000001", code: "AB12", checkedBy: "N".repeat(200), rows };
    expectReadable(composePages({ ...base, revision }, stubModel(2), stubDraw, measureText), "long history A4");
    expectReadable(composePages({ ...base, size: "A3", revision }, stubModel(2), stubDraw, measureText), "long history A3");
  });

  it("says so when a piece does not fit, and marks take-outs from memory", () => {
    const model = stubModel(3);
    const pieces = model.pieces.map((piece, index) => (index === 1 ? { ...piece, cutLengthMm: -12.7 } : piece));
    const text = joined(composePages(stubInput("tabloid", "draft"), { ...model, pieces }, stubDraw, measureText));
    expect(text).toContain("DOES NOT FIT");
    expect(text).toContain("6* LR 90");
    expect(text.replace(/\s+/g, " ")).toContain("* Take-out from memory, not yet confirmed");
  });
});
