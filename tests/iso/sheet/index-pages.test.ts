/** The sheet index: every sheet of a package on paper with its page, heads repeated, texts apart. */
import { describe, expect, it } from "vitest";
import { composeIndexPages, SHEET_SIZES, type IndexEntry, type IndexInput, type SheetSize } from "@/iso";
import { measureText } from "@/fonts/widths";
import { expectReadable, textsOf } from "./text-boxes";

const STATES = ["for-fabrication", "for-review", "superseded", "as-built"] as const;
const entries = (count: number): IndexEntry[] => Array.from({ length: count }, (_, i) => ({
  sheetNumber: String(i + 1).padStart(4, "0"), code: "ABC"[i % 3]!, state: STATES[i % 4]!, hold: i % 7 === 3, title: `4-CWS-${1100 + i} spool A, chilled water supply to the chiller house`, pages: 1 + (i % 3), firstPage: 3 + i * 2,
}));
const input = (size: SheetSize, of: readonly IndexEntry[]): IndexInput => ({
  entries: of, size, number: "PACKAGE 0012", title: "Rack east, for erection", madeAt: "2026-11-16T15:20:00Z", madeBy: "R. Castell",
  titleBlock: { shopName: "Halyard Pipe & Spool", client: "Brightwater Dairy Cooperative", project: "Evaporator 2", jobNumber: "25-041", area: "Unit 12" },
});

describe.each(SHEET_SIZES)("an index on %s", (size) => {
  it.each([0, 1, 40, 700])("of %i sheets: each with its revision, state, title and page", (count) => {
    const all = entries(count);
    const pages = composeIndexPages(input(size, all), measureText);
    for (const page of pages) expectReadable(page, `index of ${count} on ${size}`);
    const texts = pages.flatMap((page) => textsOf(page).map((text) => text.text));
    for (const { sheetNumber, firstPage } of all) expect([texts.includes(sheetNumber), texts.includes(String(firstPage))]).toEqual([true, true]);
    expect(texts.filter((text) => /HOLD$/.test(text)).length).toBe(all.filter((entry) => entry.hold).length);
    expect(texts.filter((text) => text === "ON PAGE").length).toBe(pages.length);
    pages.forEach((page, i) => expect(textsOf(page).map(({ text }) => text)).toContain(`SHEET ${i + 1} OF ${pages.length}`));
    if (count === 0) expect(texts).toContain("No sheets in it.");
  });
});

it("takes its place among other pages, as many as before", () => {
  const alone = composeIndexPages(input("letter", entries(90)), measureText);
  const placed = composeIndexPages({ ...input("letter", entries(90)), place: { first: 2, of: 190 } }, measureText);
  expect(placed.length).toBe(alone.length);
  expect(textsOf(placed[1]!).map(({ text }) => text)).toContain("SHEET 3 OF 190");
  expect(placed.map(({ name }) => name)[0]).toBe("2 index");
});
