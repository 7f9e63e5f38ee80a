/** The plan's picture: to scale, every piece there, cuts and rests told apart without colour; the rows say the same. */
import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, it } from "vitest";
import { BarPicture } from "@/components/nest/bar-picture";
import { groupInput } from "@/lib/rules/nest-input";
import { planWord, type NestResult, type NestSource } from "@/lib/rules/nest-plans";
import { planGroups, planRows } from "@/lib/rules/nest-table";

const stock = { nps: "4", schedule: "STD", material: "ASTM A106 Gr B" };
const source: NestSource = {
  version: 1, saw: { name: "Band saw", kerfMm: 2 }, endTrimMm: 10, leastOffcutMm: 300, offcutShare: 0.5, heat: null, seconds: 1,
  groups: [{ ...stock, specification: "A1", units: "metric", pieces: [{ id: "a", mark: "A-1", line: "L-1", spool: "A", length: 2500 }, { id: "b", mark: "A-2", line: "L-1", spool: "A", length: 1500 }] }],
  stock: [
    { id: "length-1", kind: "length", ...stock, schedule: " std ", lengthMm: 6000, quantity: 4, cost: 120, heat: "" },
    { id: "cut", kind: "offcut", ...stock, lengthMm: 1600, quantity: 1, cost: null, heat: "H-1" },
    { id: "other", kind: "length", ...stock, nps: "6", lengthMm: 6000, quantity: null, cost: 1, heat: "" },
  ],
  spools: [], leftOut: [],
};
const bar = { stockId: "length-1", stockLength: 6000, heat: null, pieces: [{ mark: "a", length: 2500 }, { mark: "b", length: 1500 }], rest: 1986, returned: true };
const result: NestResult = { groups: [{ bars: [bar], unplaced: [], cost: 100.14, bound: 99, proven: false, method: "best-fit", patterns: 3, costed: true }], heats: { "0:0": "H-9" } };

describe("a plan's picture", () => {
  const plan = planGroups(source, result)[0]!;
  const markup = renderToStaticMarkup(<BarPicture bar={plan.bars[0]!} longestMm={6000} units="metric" label="Length 1" />);
  it("stands to scale: the second piece begins after the trim, the first piece and one cut", () => {
    expect(plan.bars[0]!.pieces.map((p) => p.startMm)).toEqual([10, 2512]);
    // 1 000 units for 6 000 mm.
    expect(markup).toContain(`x="${(2512 / 6000) * 1000}"`);
    expect(markup.match(/fill="var\(--color-dye-tint\)"/g)).toHaveLength(2);
  });
  it("says marks, lengths and the rest, and hatches the trim", () => {
    for (const word of ["A-1", "2500", "A-2", "1500", "rest", "1986"]) expect(markup).toContain(word);
    expect(markup).toContain("url(#scrap-0-0)");
  });
  it("keeps the heat that was read off the length, in rows too", () => {
    expect(plan.bars[0]!.heat).toBe("H-9");
    const rows = planRows({ source, result, title: "", state: "cut" });
    expect(rows).toHaveLength(3);
    expect(rows[2]).toEqual([1, "4", "STD", "ASTM A106 Gr B", "full length", "6000", "H-9", 2, "L-1", "A", "A-2", "1500", 1500, 2512, 1986, "yes"]);
  });
});

describe("a plan's problem", () => {
  it("holds stock of the same pipe only, in whole units, less what others took", () => {
    const { input, costed } = groupInput(source, source.groups[0]!, new Map([["length-1", 1]]));
    expect(costed).toBe(true);
    expect(input.stocks).toEqual([{ id: "length-1", length: 6000, quantity: 3, cost: 120, heat: null }, { id: "cut", length: 1600, quantity: 1, cost: 16, heat: "H-1" }]);
    expect(input).toMatchObject({ kerf: 2, endTrim: 10, leastOffcut: 300, offcutValue: 0.01 });
  });
  it("counts in sixteenths of an inch for imperial lines: 20 ft are 3 840, a cut of 1.6 mm two of them", () => {
    const inches: NestSource = { ...source, saw: { name: "s", kerfMm: 1.6 }, stock: [{ ...source.stock[0]!, lengthMm: 6096 }] };
    const { input } = groupInput(inches, { ...source.groups[0]!, units: "imperial" }, new Map());
    expect(input.stocks[0]!.length).toBe(3840);
    expect(input.kerf).toBe(2);
  });
  it("says proven only of a plan that is", () => {
    expect(planWord({ proven: true, cost: 10, bound: 10 })).toMatch(/^Proven/);
    expect(planWord({ proven: false, cost: 100, bound: 99 })).toBe("Not proven: no plan costs less than 99.00, so at most 1.00 % could be saved.");
  });
});
