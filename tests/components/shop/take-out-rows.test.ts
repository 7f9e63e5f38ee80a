/** The shop's list of take-outs: tables, what they lack, and weights; each takes the shop's own word. */
import { describe, expect, it } from "vitest";
import { parseWeightKg, takeOutRows } from "@/components/shop/take-out-rows";
import { buildModel, emptyMarks, weightKeys, type Item } from "@/iso";
import { partWeightKey } from "../../../iso/run/part-weight-key";
import { RunBuilder } from "../../fixtures/run-builder";

const word = (key: string, valueMm: number | null) => ({ key, valueMm, by: "D. Okafor", at: "2026-03-02T09:00:00Z" });
const end: Item = { kind: "end", goes: "field-weld", text: "" };

describe("rows", () => {
  it("show a missing length as missing, and the shop's measure once it has one", () => {
    const find = (words: Parameters<typeof takeOutRows>[0]) => takeOutRows(words, "imperial").find((row) => row.key === "elbow:sr-45:6")!;
    expect(find([])).toMatchObject({ kind: "missing", value: "", words: "SR 45 elbow NPS 6, centre to end", word: null });
    expect(find([word("elbow:sr-45:6", 63.5)])).toMatchObject({ kind: "missing", value: "2 1/2", word: { by: "D. Okafor" } });
  });

  it("show a weight in the shop's unit, and a word on a key nobody lists", () => {
    const rows = takeOutRows([word("weight:valve-gate-flanged:150:4", 54), word("weight:pad::6:2", 1.5)], "metric");
    expect(rows.find((row) => row.key === "weight:valve-gate-flanged:150:4")).toMatchObject({ kind: "weight", value: "54 kg" });
    expect(rows.find((row) => row.key === "weight:pad::6:2")).toMatchObject({ kind: "weight", words: "weight of pad NPS 6 x 2" });
  });

  it("have a place for every part a line leaves unweighed", () => {
    const valve = (ends: "flanged" | "socket"): Item => ({ kind: "valve", valve: "gate", ends, ratingClass: null, mating: "weld-neck", stem: null, faceToFaceMm: 200, tag: "" });
    const line = new RunBuilder("T", "imperial", {}).start(end).go("E", `4'`, valve("flanged")).go("E", `4'`, { kind: "union", ends: "threaded" })
      .go("E", `4'`, { kind: "coupling", half: false }).go("E", `4'`, { kind: "elbow", elbow: "sw-90" }).go("N", `4'`, { kind: "elbow", elbow: "th-90" }).go("E", `4'`, end).done();
    const known = new Set(weightKeys());
    const unweighed = buildModel(line, emptyMarks(), []).components.filter((c) => c.weightKg === null);
    expect(unweighed).toHaveLength(5);
    expect(unweighed.map(partWeightKey).filter((key) => !known.has(key))).toEqual([]);
  });
});

describe("a typed weight", () => {
  it("is in the shop's unit unless it names one (1 lb = 0.45359237 kg exactly)", () => {
    expect(parseWeightKg("120", "imperial")).toBeCloseTo(54.4310844, 9);
    expect([parseWeightKg("54", "metric"), parseWeightKg("54 kg", "imperial"), parseWeightKg("1 lb", "metric")]).toEqual([54, 54, 0.45359237]);
    expect([parseWeightKg("heavy", "metric"), parseWeightKg("-4", "metric"), parseWeightKg("0", "metric")]).toEqual([null, null, null]);
  });
});
