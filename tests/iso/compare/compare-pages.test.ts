/** Pages of a comparison: everything inside the frame, nothing under 2.5 mm, no text on a text, and all of the list. */
import { describe, expect, it } from "vitest";
import { composeComparePages, frameBox, inkBounds, type SheetInput, type SheetPage, type SheetSize } from "@/iso";
import { measureText } from "@/fonts/widths";
import { compareRows } from "@/lib/rules/compare-rows";
import { GOLDEN_RUNS } from "../../fixtures/golden-runs";
import { sampleRuns } from "../../fixtures/sample-runs";
import { overlappingTexts, textCorners, textsOf } from "../sheet/text-boxes";
import { edited, newPointAt, sheetOf, type Editable } from "./compare-samples";

function pagesOf(before: SheetInput, after: SheetInput) {
  const rows = compareRows(before, after);
  return { rows, pages: composeComparePages(before, after, { rows }, measureText) };
}

function pairOf(document: SheetInput["document"], change: (copy: Editable) => void, size: SheetSize = "tabloid", more: Parameters<typeof sheetOf>[2] = {}) {
  const before = sheetOf(document, null, { size });
  return [before, sheetOf(edited(document, change), before, { size, ...more })] as const;
}

const words = (pages: readonly SheetPage[]): string => pages.flatMap((page) => textsOf(page).map(({ text }) => text)).join(" ");

/** A comma's tail may reach into the paper kept between a label and a number. */
const TAIL_MM = 0.5;

function expectReadable(pages: readonly SheetPage[], what: string): void {
  for (const page of pages) {
    const frame = frameBox(page.widthMm, page.heightMm);
    for (const item of textsOf(page)) {
      expect(item.capMm, `${what}: ${item.text}`).toBeGreaterThanOrEqual(2.5 - 1e-9);
      for (const [x, y] of textCorners(item)) expect(x >= frame.minX && x <= frame.maxX && y >= frame.minY && y <= frame.maxY, `${what}, ${page.name}: "${item.text}" leaves the frame at ${x.toFixed(1)}, ${y.toFixed(1)}`).toBe(true);
    }
    const ink = inkBounds(page.items.filter((item) => item.type !== "text"), measureText);
    expect(ink.minX >= frame.minX - 0.01 && ink.minY >= frame.minY - 0.01 && ink.maxX <= frame.maxX + 0.01 && ink.maxY <= frame.maxY + 0.01, `${what}, ${page.name}: ink leaves the frame`).toBe(true);
    expect(overlappingTexts(page, TAIL_MM), `${what}, ${page.name}`).toEqual([]);
  }
}

/** A jog into the second leg, another length at the end, and a note: what a field change often comes to. */
function fieldChange(d: Editable): void {
  const { points } = d.runs[0]!;
  const last = points.at(-1)!;
  if (last.offset.kind === "polar") last.offset.length.mm += 250;
  points.splice(1, 0, newPointAt("j1", [0, 0, 600]) as (typeof points)[0]);
  d.notes = [...d.notes, "Clear the new cable tray by 4 in."];
}

describe("pages of a comparison", () => {
  for (const size of ["letter", "tabloid", "A4", "A3"] as const) {
    it(`${size}: pairs of golden runs read, on every page`, () => {
      for (const { name, document } of GOLDEN_RUNS.filter((_, i) => i % (size === "tabloid" ? 5 : 9) === 0)) {
        const { pages } = pagesOf(...pairOf(document, fieldChange, size));
        expectReadable(pages, `${name} ${size}`);
      }
    });
  }

  it("overlay and list on every paper; both drawings beside each other on large paper", () => {
    const longer = (d: Editable) => void (d.runs[0]!.points[1]!.offset = newPointAt("x", [1_200, 0, 0]).offset);
    const names = (size: SheetSize) => pagesOf(...pairOf(sampleRuns.firstRun!, longer, size)).pages.map((page) => page.name);
    expect(names("letter")).toEqual(["1 overlay", "2 list"]);
    expect(names("tabloid")).toEqual(["1 overlay", "2 list", "3 side by side"]);
  });

  it("says what is compared, in what states, and that nobody works from it", () => {
    const { pages, rows } = pagesOf(...pairOf(sampleRuns.firstRun!, fieldChange));
    const text = words(pages);
    expect(text).toContain(`from rev A, SUPERSEDED to rev B, FOR FABRICATION. ${rows.length} differences.`);
    expect(text).toContain("Cut, fit and weld from the sheet in force, never from a comparison.");
    expect(text).toContain("layout and records aid");
    for (const page of pages) expect(page.items.some((item) => item.type === "text" && item.ink === "pale" && item.text === "COMPARISON")).toBe(true);
    const held = pagesOf(...pairOf(sampleRuns.firstRun!, fieldChange, "A3", { hold: true })).pages;
    for (const page of held) expect(page.items.some((item) => item.type === "text" && item.ink === "pale" && item.text === "HOLD")).toBe(true);
  });

  it("lists every row with its number, and a note of 2 000 characters whole", () => {
    const note = Array.from({ length: 250 }, (_, i) => `word${i}`).join(" ").slice(0, 2_000);
    const { pages, rows } = pagesOf(...pairOf(sampleRuns.valveStation!, (d) => {
      fieldChange(d);
      d.notes.push(note);
    }, "letter"));
    const lists = words(pages.filter((page) => page.name.endsWith("list")));
    for (const row of rows) expect(lists).toMatch(new RegExp(`\\b${row.no}\\b`));
    for (const word of note.split(" ").slice(0, -1)) expect(lists).toContain(word);
    expect(lists).not.toContain("…");
  });

  it("every difference of a spool too large for one overlay is on one of several", () => {
    const { pages, rows } = pagesOf(...pairOf(longRun(), (d) => {
      for (const at of [2, 30, 58]) d.runs[0]!.points[at]!.offset = newPointAt("x", [0, 1_800, 0]).offset;
    }, "letter"));
    const overlays = pages.filter((page) => page.name.endsWith("overlay"));
    expect(overlays.length).toBeGreaterThan(1);
    const led = words(overlays);
    for (const row of rows.filter(({ at }) => at !== null)) expect(numbersIn(led).has(row.no), `row ${row.no}: ${row.text}`).toBe(true);
    expectReadable(pages, "long run");
  });

  it("nothing differs: it says so, and has no list", () => {
    const { pages } = pagesOf(...pairOf(sampleRuns.firstRun!, () => undefined));
    expect(words(pages)).toContain("Nothing differs.");
    expect(pages.some((page) => page.name.endsWith("list"))).toBe(false);
  });

  it("a spool that left the line is still compared", () => {
    const [before, after] = pairOf(sampleRuns.firstRun!, () => undefined);
    const { pages, rows } = pagesOf(before, { ...after, spool: "Q" });
    expect(rows.length).toBeGreaterThan(0);
    expectReadable(pages, "no such spool");
  });
});

/** A stair of sixty flights: more than one small sheet holds. */
function longRun(): SheetInput["document"] {
  const points = Array.from({ length: 60 }, (_, i) => newPointAt(`s${i}`, i === 0 ? [0, 0, 0] : i % 3 === 0 ? [0, 0, 900] : i % 3 === 1 ? [1_500, 0, 0] : [0, 1_200, 0], i === 0 || i === 59 ? { kind: "end", goes: "open", text: "" } : { kind: "none" }));
  return { ...sampleRuns.firstRun!, runs: [{ ...sampleRuns.firstRun!.runs[0]!, points }] };
}

/** Row numbers that an overlay's blocks name, ranges spelt out. */
function numbersIn(text: string): ReadonlySet<number> {
  const blocks = [...text.matchAll(/(?:ADDED|REMOVED|MOVED|CHANGED|WAS HERE) ([\d, -]+)/g)].flatMap(([, list]) => list!.split(","));
  return new Set(blocks.flatMap((part) => {
    const [from, to] = part.trim().split("-").map(Number);
    return Array.from({ length: (to ?? from!) - from! + 1 }, (_, i) => from! + i);
  }));
}
