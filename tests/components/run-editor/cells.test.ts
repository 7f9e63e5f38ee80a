import { describe, expect, it } from "vitest";
import { parsePlaces, placesText } from "@/components/run-editor/place-entry";
import { parseProvenance } from "@/components/run-editor/provenance-entry";
import { isTable, pastedCells } from "@/components/run-editor/paste";

describe("a Joint cell", () => {
  it.each([
    ["f", { in: "field" }],
    ["field out", { out: "field" }],
    ["out field", { out: "field" }],
    ["field in, fit out", { in: "field", out: "field-fit" }],
    ["branch fit", { branch: "field-fit" }],
    ["field bolts", { bolts: "field" }],
    ["bolts shop", { bolts: "shop" }],
    ["f, shop bolts", { in: "field", bolts: "shop" }],
    ["shop", {}],
    ["", {}],
  ])("reads %s", (text, places) => {
    const result = parsePlaces(text, "in");
    expect(result).toMatchObject({ ok: true, value: places });
    if (result.ok) expect(parsePlaces(placesText(result.value, "in"), "in")).toMatchObject({ value: places });
  });

  it("means the far weld at a run's first point", () => {
    expect(parsePlaces("f", "out")).toMatchObject({ value: { out: "field" } });
  });

  it.each(["somewhere", "in", "field nowhere", "bolts"])("says what to type for %s", (text) => {
    expect(parsePlaces(text, "in")).toMatchObject({ ok: false, message: expect.stringContaining("Type shop, field or fit") });
  });
});

describe("bolted faces in a Joint cell", () => {
  it("keep their place when the cell is taken as it stands", () => {
    const places = { in: "field", bolts: "shop" } as const;
    expect(parsePlaces(placesText(places, "in"), "in")).toMatchObject({ ok: true, value: places });
  });
  it("are never trimmed to fit", () => {
    expect(parsePlaces("fit bolts", "in")).toMatchObject({ ok: false, message: expect.stringContaining("shop or field") });
  });
});

describe("a Source cell", () => {
  it.each([["m", "measured"], ["d", "from-drawing"], ["drawing", "from-drawing"], ["calc", "calculated"], ["Assumed", "assumed"]])("reads %s", (text, kind) => {
    expect(parseProvenance(text)).toMatchObject({ ok: true, value: kind });
  });
  it("refuses another word", () => {
    expect(parseProvenance("maybe")).toMatchObject({ ok: false });
    expect(parseProvenance("x")).toMatchObject({ ok: false });
  });
});

describe("rows from a spreadsheet", () => {
  const target = { runId: "r", row: 2, column: "move" } as const;
  it("lays lines down and columns to the right", () => {
    const cells = pastedCells("e 3-0\tgate\nu 2-0\t\tf\n", target);
    expect(cells.map((cell) => [cell.target.row, cell.target.column, cell.text])).toEqual([
      [2, "move", "e 3-0"], [2, "item", "gate"], [3, "move", "u 2-0"], [3, "joint", "f"],
    ]);
  });
  it("joins three numbers into one offset", () => {
    expect(pastedCells("2-0\t0\t-1-0\ttee", target).map((cell) => cell.text)).toEqual(["2-0, 0, -1-0", "tee"]);
  });
  it("leaves a plain entry alone", () => {
    expect(isTable("e 3-0")).toBe(false);
    expect(isTable("e 3-0\tgate")).toBe(true);
  });
});
