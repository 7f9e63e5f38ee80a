/**
 * Cut map, weld map, legend and the set they make: nothing overlaps, leaves its frame or is set under 2.5 mm on any golden
 * run and paper; sums come out by a second way; long lists, long words and empty spools are handled.
 */
import { describe, expect, test } from "vitest";
import {
  buildModel, composeCutMapPages, composeLegendPages, composeWeldMapPages, emptyMarks, formatInches, formatLength, frameBox, inkBounds, SAFE_MARGIN_MM, SHEET_PARTS, SHEET_SIZES, sheetFacts, sheetSetPages,
  type MeasureText, type SheetInput, type SheetPage, type SheetSetExtras,
} from "@/iso";
import { cutMapDrafts } from "@/iso/sheet/cut-map";
import { placePages } from "@/iso/sheet/page-draft";
import { weldLogTable } from "@/iso/sheet/weld-log";
import { measureText } from "@/fonts/widths";
import { GOLDEN_RUNS } from "../../fixtures/golden-runs";
import { sampleRuns } from "../../fixtures/sample-runs";
import { benchInput } from "../layout/bench-inputs";
import { stubDocument, stubInput, stubModel } from "./sheet-stubs";
import { expectReadable, textsOf } from "./text-boxes";

const KINDS = { cuts: composeCutMapPages, welds: composeWeldMapPages, legend: composeLegendPages } as const satisfies Record<string, (input: SheetInput, measure: MeasureText) => SheetPage[]>;
const PRINTED = { by: "Danny Ruiz", at: "2026-12-01T15:20:00Z" };
const textOf = (pages: readonly SheetPage[]): string => pages.flatMap((page) => textsOf(page).map(({ text }) => text)).join(" ");

/** Ink of a page stays within its frame line. */
function expectInside(page: SheetPage, what: string, leastMarginMm?: number): void {
  const frame = frameBox(page.widthMm, page.heightMm, leastMarginMm);
  const { minX, minY, maxX, maxY } = inkBounds(page.items, measureText);
  expect([what, minX > frame.minX - 0.5, minY > frame.minY - 0.5, maxX < frame.maxX + 0.5, maxY < frame.maxY + 0.5]).toEqual([what, true, true, true, true]);
}

describe.each(SHEET_SIZES)("on %s, every golden run", (size) => {
  test.each(Object.keys(KINDS) as (keyof typeof KINDS)[])("%s: texts apart, inside the frame, 2.5 mm and more", (kind) => {
    for (const { document } of GOLDEN_RUNS) {
      const pages = KINDS[kind](benchInput(document, size, "for-review"), measureText);
      expect(pages.length).toBeGreaterThan(0);
      pages.forEach((page) => {
        expectReadable(page, `${document.number} ${kind}`);
        expectInside(page, `${document.number} ${kind} ${page.name}`);
      });
    }
  });
});

describe("a sweep that can fail", () => {
  test("a page with a text moved onto another, out of the frame, or set small is found", () => {
    const [page] = composeCutMapPages(benchInput(sampleRuns.firstRun!, "letter"), measureText);
    const texts = textsOf(page!);
    const changed = (change: object): SheetPage => ({ ...page!, items: [...page!.items, { ...texts[0]!, ...change }] });
    expect(() => expectReadable(changed({ at: texts[3]!.at }), "on another")).toThrow();
    expect(() => expectReadable(changed({ at: [5, 5] }), "outside")).toThrow(/leaves the frame/);
    expect(() => expectReadable(changed({ at: [100, 190], capMm: 2.4 }), "small")).toThrow();
  });
});

/** "37 1/2", "3/8", "12.5": what a reader takes it for. */
function numberOf(text: string): number {
  return text.trim().split(" ").reduce((sum, part) => {
    const [top, bottom] = part.split("/").map(Number);
    return sum + (bottom === undefined ? top! : top! / bottom);
  }, 0);
}

/** The sums as printed: from the first text that begins with a figure and a word, to the one with the result. */
function printedSums(page: SheetPage): { readonly terms: readonly number[]; readonly result: number }[] {
  const texts = textsOf(page).map(({ text }) => text);
  const sums: string[] = [];
  for (let i = 0; i < texts.length; i += 1) {
    if (!/^\d[\d /.]*\*? [a-z]/.test(texts[i]!) || / (in|mm)$/.test(texts[i]!)) continue;
    let sum = texts[i]!;
    while (!sum.includes(" = ") && !/^= /.test(texts[i + 1] ?? "") && i + 1 < texts.length) sum += ` ${texts[(i += 1)]!}`;
    if (!sum.includes(" = ")) sum += ` ${texts[(i += 1)] ?? ""}`;
    // A result that broke off its equals sign stands on the next line.
    if (/=\s*$/.test(sum)) sum += ` ${texts[(i += 1)] ?? ""}`;
    sums.push(sum);
  }
  return sums.map((sum) => {
    const [left, right] = sum.split(" = ") as [string, string];
    const terms = left.split(/ (?=[−+] )/).map((term) => {
      const [, sign, times, value] = /^(?:([−+]) )?(?:(\d+) × )?(\d+ \d+\/\d+|\d+\/\d+|\d+(?:\.\d+)?)/.exec(term)!.map((part) => part ?? "");
      return (sign === "−" ? -1 : 1) * Number(times || 1) * numberOf(value!);
    });
    return { terms, result: numberOf(right.replace(/[^\d /.].*$/, "")) };
  });
}

describe("the sum on every bar", () => {
  test.each(GOLDEN_RUNS.map(({ document }) => [document.number, document] as const))("%s: printed terms add up to the printed cut length", (_number, document) => {
    const input = benchInput(document, "tabloid");
    const { pieces } = sheetFacts(input, modelOf(input));
    const sums = composeCutMapPages(input, measureText).flatMap(printedSums);
    expect(sums.length).toBe(pieces.length);
    const fine = document.settings.units === "metric" ? { term: 0.05, result: 0.5 } : { term: 1 / 128, result: 1 / 32 };
    sums.forEach(({ terms, result }, i) => {
      const total = terms.reduce((sum, term) => sum + term, 0);
      // Each term is rounded to its nearest step, at most six alike count once with their number, and the result once.
      expect(Math.abs(total - result), `${pieces[i]!.mark}: ${terms.join(" ")} = ${result}`).toBeLessThanOrEqual((pieces[i]!.terms.length * fine.term) + fine.result + 1e-9);
      expect(result).toBeCloseTo(numberOf(document.settings.units === "metric" ? formatLength(pieces[i]!.cutLengthMm, "metric") : formatInches(pieces[i]!.cutLengthMm)), 9);
    });
  });
});

function modelOf(input: SheetInput) {
  return buildModel(input.document, input.marks, input.takeOuts);
}

describe("a set", () => {
  const input = benchInput(sampleRuns.valveStation!, "tabloid", "for-fabrication");

  test("its parts follow one another, numbered through, and the index says where each begins", () => {
    const { pages, bookmarks, of } = sheetSetPages(input, [...SHEET_PARTS].reverse(), { printed: PRINTED }, measureText);
    expect(bookmarks.map(({ part }) => part)).toEqual(SHEET_PARTS);
    expect(of).toBe(pages.length);
    pages.forEach((page, i) => {
      expect(textsOf(page).map(({ text }) => text).join(" ")).toMatch(new RegExp(`SHEET ${i + 1} OF ${of}|SHEET ${i + 1} of ${of}`));
      expect(page.name.startsWith(`${i + 1} `)).toBe(true);
      expect(textOf([page])).toContain("Printed 2026-12-01 15:20 UTC by Danny Ruiz.");
      expect(textOf([page])).toContain("FOR FABRICATION");
      expect(page.items.some((item) => item.layer === "qr")).toBe(true);
    });
    const index = textsOf(pages[bookmarks.find(({ part }) => part === "index")!.page - 1]!).map(({ text }) => text);
    for (const { part, page, title } of bookmarks) if (part !== "index") expect(index.some((text, i) => text.startsWith(title) && index.slice(i, i + 4).includes(String(page))), title).toBe(true);
    bookmarks.reduce((next, { page, pages: count }) => {
      expect(page).toBe(next);
      return next + count;
    }, 1);
  });

  test("stored pages take the spool sheet's place and are counted", () => {
    const { pages, bookmarks, of } = sheetSetPages(input, ["sheet", "cuts"], { storedSheetPages: 3 }, measureText);
    expect(bookmarks).toMatchObject([{ part: "sheet", page: 1, pages: 3 }, { part: "cuts", page: 4 }]);
    expect([of, textOf(pages)]).toEqual([3 + pages.length, expect.stringContaining(`SHEET 4 OF ${of}`)]);
  });

  test("equal input gives equal pages; no part gives none; an unknown one is left out", () => {
    const once = () => JSON.stringify(sheetSetPages(input, ["cuts", "welds", "legend"], { printed: PRINTED }, measureText));
    expect(once()).toBe(once());
    expect(sheetSetPages(input, [], {}, measureText)).toEqual({ pages: [], bookmarks: [], of: 0 });
    expect(sheetSetPages(input, ["nothing" as never, "legend"], {}, measureText).bookmarks).toHaveLength(1);
  });

  test.each(SHEET_SIZES)("on %s, kept off the paper's edge, lettering keeps its height and templates their size", (size) => {
    for (const name of ["skewClosing", "valveStation", "metricLine"]) {
      const set = sheetSetPages(benchInput(sampleRuns[name]!, size, "for-review"), SHEET_PARTS, { printed: PRINTED, safeMargins: true }, measureText);
      for (const page of set.pages) {
        expectReadable(page, `${name} ${size}`, SAFE_MARGIN_MM);
        expectInside(page, `${name} ${size} ${page.name}`, SAFE_MARGIN_MM);
      }
    }
  });
});

describe("the record on paper", () => {
  const input = benchInput(sampleRuns.firstRun!, "letter");
  const model = modelOf(input);
  const piece = model.pieces[0]!;
  const weld = model.joints.find((joint) => joint.number === "2")!;
  const entry = (kind: "cut" | "fit-up" | "weld" | "visual", key: string, values: Record<string, string>, at: string, by = "D. Kowal") => ({ kind, key, values, at, by });
  const extras: SheetSetExtras = {
    work: {
      readAt: "2026-12-01T15:20:00Z",
      entries: [
        entry("cut", piece.key, { heat: "OLD-1", length: "28" }, "2026-11-30T09:00:00Z"), entry("cut", piece.key, { heat: "HX-9", length: "28 1/4" }, "2026-11-30T10:00:00Z"),
        entry("fit-up", weld.key, { gap: "1/8" }, "2026-11-30T11:00:00Z"), entry("weld", weld.key, { welder: "W-07", procedure: "BW-1 r2", heatA: "", heatB: "F-220" }, "2026-11-30T12:00:00Z"),
        entry("visual", weld.key, { result: "rejected" }, "2026-11-30T13:00:00Z", "I. Solheim"), entry("weld", weld.key, { welder: "W-09", procedure: "BW-1 r2" }, "2026-12-01T08:00:00Z"),
        entry("weld", weld.key, { welder: "W-09", procedure: "BW-1 r3" }, "2026-12-01T08:10:00Z"), entry("visual", weld.key, { result: "accepted" }, "2026-12-01T09:00:00Z", "I. Solheim"),
      ],
    },
  };

  test("the newest entry of each kind counts; a weld after a reject is repair R1, a correction is none", () => {
    const row = weldLogTable(sheetFacts(input, model), extras)!.rows.find(({ cells }) => JSON.stringify(cells[0]).includes('"2"'))!;
    const words = row.cells.map((cell) => (typeof cell === "string" ? cell : cell.map(({ text }) => text).join(" ")));
    // Heat A falls back on the cut piece upstream where the welder wrote none.
    expect([words[4], words[5], words[8], words[9]]).toEqual(["BW-1 r3", weld.a === piece.key ? "HX-9" : "", "W-09", "2026-12-01"]);
    expect([words[7], words[10], words[12]]).toEqual(["D. Kowal 2026-11-30", "accepted I. Solheim 2026-12-01", "R1"]);
    const cuts = textOf(composeCutMapPages(input, measureText, extras));
    expect([cuts.includes("HX-9"), cuts.includes("OLD-1"), cuts.includes("Cuts as recorded 2026-12-01 15:20 UTC.")]).toEqual([true, false, true]);
  });

  test.each(SHEET_SIZES)("on %s a full record and planned stock leave every text apart and inside", (size) => {
    for (const name of ["valveStation", "socketLine", "skewClosing"]) {
      const full = benchInput(sampleRuns[name]!, size, "for-fabrication");
      const { pieces, joints } = modelOf(full);
      const at = "2026-11-30T10:00:00Z";
      const by = "Bartholomew Featherstonehaugh";
      const entries = [
        ...pieces.map(({ key }) => entry("cut", key, { heat: "HEAT-2026-00417-B", length: `4' 10 15/16"` }, at, by)),
        ...joints.flatMap(({ key }) => [entry("fit-up", key, { gap: "1/8" }, at, by), entry("weld", key, { welder: "W-07, W-11", procedure: "CBW-SMAW-P1-01 rev 2", heatA: "HEAT-2026-00417-B", heatB: "F-220-A" }, at), entry("visual", key, { result: "rejected" }, at, by)]),
      ];
      const stock = Object.fromEntries(pieces.map(({ key }) => [key, { plan: "Chiller house and rack east, week 48, second try", length: 12, stockMm: 6096, offcut: true, heat: "HEAT-2026-00417-B", cut: 1, cuts: 5, startMm: 1234, plannedMm: 900 }]));
      for (const page of sheetSetPages(full, ["cuts", "welds"], { stock, work: { entries, readAt: at }, printed: { by, at } }, measureText).pages) {
        expectReadable(page, `${name} ${size} recorded`);
        expectInside(page, `${name} ${size} recorded ${page.name}`);
      }
    }
  });

  test("without a record the log says so and leaves blanks of 9 mm and more", () => {
    const table = weldLogTable(sheetFacts(input, model), {})!;
    expect(table.lead[0]).toMatch(/^A blank log: what was recorded is not shown/);
    for (const row of table.rows) expect(row.leastMm).toBeGreaterThan(9);
  });

  test("stock planned at another length says that it has changed", () => {
    const place = { plan: "Rack 1", length: 2, stockMm: 6096, offcut: true, heat: "M-1", cut: 1, cuts: 3, startMm: 0, plannedMm: piece.cutLengthMm + 25.4 };
    const text = textOf(composeCutMapPages(input, measureText, { stock: { [piece.key]: place } }));
    expect(text).toMatch(/FROM no\. 2, offcut of 20'-0", heat M-1: cut 1 of 3, begins at 0\./);
    expect(text.replace(/\s+/g, " ")).toContain("the length has changed since.");
    const same = textOf(composeCutMapPages(input, measureText, { stock: { [piece.key]: { ...place, plannedMm: piece.cutLengthMm + 0.2 } } }));
    expect(same).not.toContain("has changed since");
  });
});

describe("what does not fit, or is not there", () => {
  test("3 000 pieces and their welds: each card once, in time that grows with their number", () => {
    const cost = (count: number): number => {
      const before = process.cpuUsage();
      const pages = placePages(cutMapDrafts(sheetFacts(stubInput("letter", "for-fabrication"), stubModel(count)), {}, 1, measureText));
      const { user, system } = process.cpuUsage(before);
      const marks = pages.flatMap((page) => textsOf(page).filter(({ text, face, anchor }) => face === "bold" && anchor === "middle" && /^P\d+$/.test(text)));
      expect(marks.length).toBe(count);
      expect(new Set(marks.map(({ text }) => text)).size).toBe(count);
      return user + system;
    };
    cost(100);
    const [some, many] = [cost(300), cost(3000)];
    // Ten times the pieces, at most thirty times the work: nothing is looked for in the whole list again and again.
    expect(many / some).toBeLessThan(30);
  }, 60_000);

  test.each(SHEET_SIZES)("on %s: no pieces, no spool, very long marks, sizes and materials", (size) => {
    const empty = stubInput(size, "for-review");
    for (const parts of [["cuts"], ["welds"], ["bench"], ["legend"]] as const) {
      const { pages } = sheetSetPages({ ...empty, marks: emptyMarks() }, parts, {}, measureText);
      expect(textOf(pages)).toMatch(/No spool A in this line yet|SYMBOLS|LINES/);
      for (const page of pages) expectReadable(page, `${size} ${parts[0]} without a spool`);
    }
    const model = stubModel(3);
    const long = "ASTM A333 Gr 6 low-temperature seamless, normalized, impact tested at -50 degrees, supplementary requirement S5";
    const pieces = model.pieces.map((piece, i) => ({ ...piece, mark: "L2-AREA-51-P1234567A", material: long, terms: Array.from({ length: i === 0 ? 60 : 4 }, (_, k) => ({ ...piece.terms[0]!, valueMm: 100 + k, label: `${k} centre of support number ${k} to the next` })) }));
    const pages = placePages(cutMapDrafts(sheetFacts({ ...empty, document: stubDocument(["x".repeat(2000)]) }, { ...model, pieces }), {}, 1, measureText));
    for (const page of pages) {
      expectReadable(page, `${size} long`);
      expectInside(page, `${size} long ${page.name}`);
    }
    expect(textOf(pages)).toContain("continued");
  });

  test("a piece that does not fit says so where its length would stand", () => {
    const model = stubModel(1);
    const pieces = model.pieces.map((piece) => ({ ...piece, cutLengthMm: -12.7 }));
    const text = textOf(placePages(cutMapDrafts(sheetFacts(stubInput("letter", "draft"), { ...model, pieces }), {}, 1, measureText)));
    expect(text.match(/DOES NOT FIT/g)?.length).toBe(2);
  });
});
