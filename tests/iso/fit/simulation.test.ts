/**
 * The linear chance of a fit against building the piece: 50 random closings, 12 000 draws each, by a simulation that shares
 * no code with the core. `npm run bench -- fit` does the same with 100 000 draws each, and times it.
 */
import { describe, expect, test } from "vitest";
import { fitOfClosing } from "@/iso";
import { nominalEnd, simulateFit } from "../../oracle/fit-simulation";
import { checkedCases, simulationOf } from "./cases";

const DRAWS = 12_000;
const cases = checkedCases(50);

describe("predicted chance against simulation", () => {
  test("the simulation's nominal piece ends where the closing does", () => {
    for (const each of cases) {
      const end = nominalEnd(simulationOf(each, 1));
      const { p1, d1 } = each.input.closing;
      expect(Math.hypot(...p1.map((v, i) => v - end[i]!))).toBeLessThan(1e-6);
      expect(Math.hypot(...d1.map((v, i) => v + end[3 + i]!))).toBeLessThan(1e-9);
    }
  });

  test("within two points of 100 on 50 cases, without trim", { timeout: 300_000 }, () => {
    const off = cases.map((each) => fitOfClosing(each.input).probability! - simulateFit(simulationOf(each, DRAWS)));
    expect(off.filter((each) => Math.abs(each) > 0.02)).toEqual([]);
    // Not one-sided either: over the cases the errors cancel.
    expect(Math.abs(off.reduce((sum, each) => sum + each, 0) / off.length)).toBeLessThan(0.004);
  });

  test("the cases are worth the check: chances from low to high, both ways of fitting up, flanges and welds", () => {
    const chances = cases.map((each) => fitOfClosing(each.input).probability!);
    expect(chances.filter((p) => p < 0.4).length).toBeGreaterThan(5);
    expect(chances.filter((p) => p > 0.6 && p < 0.95).length).toBeGreaterThan(8);
    expect(cases.filter(({ input }) => input.fitUp === "set-true").length).toBeGreaterThan(5);
    expect(cases.filter(({ input }) => input.faces!.some(({ kind }) => kind === "flange")).length).toBeGreaterThan(10);
  });

  test("with the trim advised, within two points too", { timeout: 300_000 }, () => {
    const off = cases.slice(0, 12).flatMap((each) => {
      const trim = fitOfClosing(each.input).trims.find(({ jointId }) => jointId.startsWith("elbow"));
      if (!trim) return [];
      return [trim.probability - simulateFit(simulationOf(each, DRAWS, { joint: trim.jointId as "elbow0" | "elbow1", mm: trim.trimMm }))];
    });
    expect(off.length).toBeGreaterThan(8);
    expect(off.filter((each) => Math.abs(each) > 0.02)).toEqual([]);
  });
});
