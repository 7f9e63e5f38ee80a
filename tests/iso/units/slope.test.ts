/** Slopes as typed: rise over level run (common practice). */
import { describe, expect, it } from "vitest";
import { parseSlope, slopeText } from "../../../iso/units/slope";

const READ: readonly (readonly [string, number, string])[] = [
  ["2%", 0.02, "rises 2 %, 1:50"], ["0.5 %", 0.005, "rises 0.5 %, 1:200"], ["1:100", 0.01, "rises 1 %, 1:100"], ["1 in 40", 0.025, "rises 2.5 %, 1:40"],
  ["1/4 in/ft", 1 / 48, "rises 2.083 %, 1:48"], [`1/4"/ft`, 1 / 48, "rises 2.083 %, 1:48"], ["1/8 in per ft", 1 / 96, "rises 1.042 %, 1:96"],
  ["1 1/2 in/ft", 0.125, "rises 12.5 %, 1:8"], ["\u00bc in/ft", 1 / 48, "rises 2.083 %, 1:48"], ["10 mm/m", 0.01, "rises 1 %, 1:100"],
  ["-1:100", -0.01, "falls 1 %, 1:100"], ["down 1/4 in/ft", -1 / 48, "falls 2.083 %, 1:48"], ["falls 2%", -0.02, "falls 2 %, 1:50"],
  ["up 3%", 0.03, "rises 3 %, 1:33.33"], ["3:1", 3, "rises 300 %, 3:1"], ["0", 0, "level"], ["0%", 0, "level"], ["level", 0, "level"],
];

describe("parseSlope", () => {
  it.each(READ)("reads %s as %d", (text, ratio, understood) => {
    const parsed = parseSlope(text);
    expect(parsed).toMatchObject({ ok: true, understood });
    expect(parsed.ok && parsed.ratio).toBeCloseTo(ratio, 12);
  });

  it.each(["", "2", "steep", "1:0", "1/0 in/ft", "20:1", "1:100:3", "% 2", "1/4 in/ft and something much longer than that"])("refuses %j with one sentence", (text) => {
    const parsed = parseSlope(text);
    expect(parsed.ok).toBe(false);
    expect(!parsed.ok && parsed.message).toMatch(/^\S.*\.?$/);
  });

  it("reads back what it says", () => {
    for (const ratio of [0.01, -0.02, 0.125, 0]) {
      const said = slopeText(ratio).replace(/ %,.*/, "%");
      expect(parseSlope(said)).toMatchObject({ ok: true, ratio: expect.closeTo(ratio, 12) });
    }
  });
});
