// @vitest-environment jsdom
import { cleanup, fireEvent, render, screen, waitFor } from "@testing-library/react";
import { SWRConfig } from "swr";
import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { ComparePage } from "@/components/compare/compare-page";
import { nextRow, pickedItems, rowsByRef } from "@/components/compare/compare-picks";
import type { CompareRow, DisplayItem } from "@/iso";
import type { CompareDetail } from "@/lib/rules/compare-types";
import { edited, newPointAt, sheetOf } from "../iso/compare/compare-samples";
import { sampleRuns } from "../fixtures/sample-runs";
import "./browser";

const before = sheetOf(sampleRuns.firstRun!);
const after = sheetOf(edited(sampleRuns.firstRun!, (d) => {
  d.runs[0]!.points[1]!.offset = newPointAt("x", [1_200, 0, 0]).offset;
  d.notes = ["Prime only."];
}), before);

const detail = (pair: CompareDetail["pair"]): CompareDetail => ({
  spool: { id: "s", letter: "A", sheetNumber: "0007" }, line: { id: "l", number: "CW-1001" }, job: { id: "j", number: "26-114" },
  choices: [
    { id: "a", code: "A", state: "superseded", hold: false, description: "First issue", at: "2026-01-02T10:00:00Z" },
    { id: "b", code: "B", state: "for-fabrication", hold: false, description: "Longer", at: "2026-01-03T10:00:00Z" },
  ].slice(0, pair ? 2 : 1) as CompareDetail["choices"],
  pair,
});
const asked: string[] = [];
let answer: CompareDetail | { readonly status: number; readonly message: string };

beforeEach(() => {
  asked.length = 0;
  answer = detail({ from: "a", to: "b", before, after });
  vi.stubGlobal("fetch", async (path: string) => {
    asked.push(path);
    const status = "status" in answer ? answer.status : 200;
    return new Response(JSON.stringify("status" in answer ? { code: "not-found", message: answer.message } : answer), { status, headers: { "content-type": "application/json" } });
  });
});
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});
const show = () => render(<SWRConfig value={{ provider: () => new Map() }}><ComparePage spoolId="s" from={null} to={null} /></SWRConfig>);
// By selector: asking for roles walks the whole drawing each time.
const one = <E extends Element>(selector: string): E => document.querySelector<E>(selector)!;
const there = (selector: string) => waitFor(() => expect(one(selector)).toBeTruthy(), { timeout: 20_000 });
const rowButtons = async () => {
  await there("ol[aria-label='Differences']");
  return document.querySelectorAll<HTMLButtonElement>("ol[aria-label='Differences'] button");
};
const press = async (text: string) => {
  await there("ol[aria-label='Differences']");
  fireEvent.click([...document.querySelectorAll("button")].find((button) => button.textContent === text)!);
};

describe("the comparison's page", () => {
  it("lists every difference by its number, with both numbers and a way to print", async () => {
    show();
    const buttons = await rowButtons();
    expect([...buttons].map((button) => button.textContent)).toEqual([
      expect.stringMatching(/^1Changed ?Length to point 23'-1 1\/2" EE 3'-11 1\/4"$/), expect.stringContaining("Piece P1"), expect.stringContaining("Material: NPS 4 Pipe, STD"), expect.stringContaining("NotePrime only.Not on the drawing"),
    ]);
    expect(one<HTMLAnchorElement>("a[href*='as=pdf']").getAttribute("href")).toBe("/api/spools/s/compare?as=pdf&from=a&to=b");
    expect(one("svg[aria-label^='Overlay of both revisions']").textContent).toContain(`[WAS 3'-1 1/2"]`);
  });

  it("a press on a part picks its row, a second one the next; the keys go through the list and let go", async () => {
    show();
    const buttons = await rowButtons();
    const leg = one("svg[aria-label^='Overlay'] [data-ref='leg:p2']");
    fireEvent.click(leg);
    expect(buttons[0]!.getAttribute("aria-pressed")).toBe("true");
    fireEvent.click(leg);
    expect(buttons[1]!.getAttribute("aria-pressed")).toBe("true");
    const list = one("ol[aria-label='Differences']");
    fireEvent.keyDown(list, { key: "End" });
    expect(document.activeElement).toBe(buttons[3]);
    fireEvent.keyDown(list, { key: "ArrowUp" });
    expect(document.activeElement).toBe(buttons[2]);
    fireEvent.keyDown(list, { key: "Escape" });
    expect([...buttons].some((button) => button.getAttribute("aria-pressed") === "true")).toBe(false);
  });

  it("both drawings move together, and show all again", async () => {
    show();
    await press("Side by side");
    const drawings = [...document.querySelectorAll("svg[aria-label^='Drawing of Rev']")];
    const looks = () => drawings.map((svg) => svg.getAttribute("viewBox"));
    const [whole] = looks();
    fireEvent.keyDown(drawings[0]!, { key: "+" });
    expect(new Set(looks()).size).toBe(1);
    expect(looks()[0]).not.toBe(whole);
    fireEvent.keyDown(drawings[1]!, { key: "0" });
    expect(looks()).toEqual([whole, whole]);
  });

  it("another choice is asked for and stands in the address", async () => {
    show();
    await press("Swap");
    await waitFor(() => expect(asked.at(-1)).toBe("/api/spools/s/compare?as=data&from=b&to=a"));
    expect(window.location.search).toBe("?from=b&to=a");
  });

  it("says so when nothing differs, when there is one only, and why when it is refused", async () => {
    answer = detail({ from: "a", to: "b", before, after: before });
    show();
    expect(await screen.findByText("Nothing differs")).toBeTruthy();
    cleanup();
    answer = detail(null);
    show();
    expect(await screen.findByText("Nothing to compare yet")).toBeTruthy();
    cleanup();
    answer = { status: 404, message: "There is nothing here, or it belongs to another shop." };
    show();
    expect(await screen.findByText(/belongs to another shop/)).toBeTruthy();
  });
});

describe("picks", () => {
  const row = (no: number, more: Partial<CompareRow>): CompareRow => ({ no, kind: "changed", what: "piece", mark: "P1", text: "", before: "", after: "", refsBefore: [], refsAfter: [], at: null, ...more });
  const rows = [row(1, { refsBefore: [{ kind: "leg", id: "x" }] }), row(2, { refsAfter: [{ kind: "leg", id: "x" }] })];
  const line = (layer: DisplayItem["layer"]): DisplayItem => ({ type: "line", layer, ref: { kind: "leg", id: "x" }, from: [0, 0], to: [1, 0], widthMm: 1, ink: "ink" });
  it("are each drawing's own, and both on the overlay", () => {
    expect(["before", "after", "both"].map((side) => rowsByRef(rows, side as "both").get("leg:x"))).toEqual([[1], [2], [1, 2]]);
    expect(pickedItems([line("pipe"), line("hatch")], rows, "after", new Set([2]))).toHaveLength(1);
    expect(pickedItems([line("pipe")], rows, "after", new Set([1]))).toEqual([]);
  });
  it("go round", () => {
    expect([nextRow([1, 2], null), nextRow([1, 2], 1), nextRow([1, 2], 2), nextRow([], 2)]).toEqual([1, 2, 1, null]);
  });
});
