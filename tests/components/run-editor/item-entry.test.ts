import { describe, expect, it } from "vitest";
import { itemSchema } from "@/iso";
import { parseItem, suggestItems } from "@/components/run-editor/item-entry";
import { STARTS_HINT, startsText } from "@/components/run-editor/starts-entry";
import { readNps } from "@/components/run-editor/rest-reader";
import { exampleOf } from "@/components/run-editor/item-rest";
import { itemCaution, itemText } from "@/components/run-editor/item-text";
import { ITEM_WORDS } from "@/components/run-editor/item-words";

describe("an Item cell", () => {
  it.each([
    ["wn", { kind: "flange", flange: "weld-neck", ratingClass: null }],
    ["wn 300", { kind: "flange", flange: "weld-neck", ratingClass: 300 }],
    ["nozzle N3", { kind: "flange", goes: "nozzle", text: "N3" }],
    ["gate", { kind: "valve", valve: "gate", ends: "flanged" }],
    ["gate sw 600 HV-101", { kind: "valve", ends: "socket", ratingClass: 600, tag: "HV-101" }],
    ["tee", { kind: "tee", branchNps: null }],
    ["tee 1-1/2 sw", { kind: "tee", branchNps: "1-1/2", ends: "socket" }],
    ["red 3", { kind: "reducer", shape: "concentric", toNps: "3", flat: null }],
    ["ecc 3 flat up", { kind: "reducer", shape: "eccentric", toNps: "3", flat: "U" }],
    ["ecc 4 80", { kind: "reducer", toNps: "4", toSchedule: "80", flat: "D" }],
    ["outlet 2", { kind: "outlet", branchNps: "2" }],
    ["trim sr", { kind: "elbow", elbow: "trimmed-sr" }],
    ["sup shoe", { kind: "support", text: "shoe" }],
    ["cont L-204", { kind: "end", goes: "continued", text: "L-204" }],
    ["glo", { kind: "valve", valve: "globe" }],
    ["", { kind: "none" }],
    ["ret u", { kind: "return", radius: "LR", toward: "U" }],
    ["ret sr north", { kind: "return", radius: "SR", toward: "N" }],
    ["miter 4 r 18", { kind: "mitre", pieces: 4, radiusMm: 457.2 }],
    ["bend 1-8", { kind: "bend", radiusMm: 508 }],
    ["cross 2 sw", { kind: "cross", branchNps: "2", ends: "socket" }],
    ["outlet 1 th in", { kind: "outlet", branchNps: "1", ends: "threaded", set: "in" }],
    ["stub 3 in pad 7 1/2", { kind: "stub-in", branchNps: "3", set: "in", padMm: 190.5 }],
    ["lj 300 short", { kind: "flange", flange: "lap-joint", ratingClass: 300, stubEnd: "short" }],
    ["thf 150", { kind: "flange", flange: "threaded", ratingClass: 150 }],
    ["wn turn 22.5 s gsk 3/16", { kind: "flange", boltHoles: { turnDeg: 22.5, from: "S" }, gasketMm: 4.7625 }],
    ["so exist old header", { kind: "flange", flange: "slip-on", goes: "existing", text: "old header" }],
    ["gate th stem n f2f 9 1/2 V-7", { kind: "valve", ends: "threaded", stem: "N", faceToFaceMm: 241.3, tag: "V-7" }],
    ["inst flg 300 f2f 8 FE-7", { kind: "instrument", ends: "flanged", ratingClass: 300, lengthMm: 203.2, tag: "FE-7" }],
    ["inst PI-101", { kind: "instrument", ends: "threaded", lengthMm: 0, tag: "PI-101" }],
    ["union th", { kind: "union", ends: "threaded" }],
    ["cap sw", { kind: "cap", ends: "socket" }],
    ["cpl th", { kind: "coupling", half: false, ends: "threaded" }],
    ["vent to roof", { kind: "end", goes: "vent", text: "to roof" }],
    ["drain", { kind: "end", goes: "drain" }],
    ["th90", { kind: "elbow", elbow: "th-90" }],
    ["sr45", { kind: "elbow", elbow: "sr-45" }],
  ])("reads %s", (text, item) => {
    const result = parseItem(text);
    expect(result).toMatchObject({ ok: true, value: { item } });
    if (!result.ok) return;
    expect(itemSchema.parse(result.value.item)).toEqual(result.value.item);
    expect(parseItem(itemText(result.value.item, result.value.place))).toMatchObject({ ok: true, value: { item: result.value.item } });
  });

  it("brings the field place with a field weld", () => {
    expect(parseItem("fw")).toMatchObject({ value: { item: { kind: "joint" }, place: "field" } });
    expect(parseItem("ffw")).toMatchObject({ value: { place: "field-fit" } });
  });

  it.each(["red", "red 7", "outlet", "zzz", "cap 3", "red 3 flat d", "tee nine", "ret", "ret sideways", "bend", "bend x", "miter 7", "stub 2 pad", "wn turn 20", "cap blue", "union bw"])("says what to type for %s", (text) => {
    expect(parseItem(text)).toMatchObject({ ok: false, message: expect.stringMatching(/type|choose/i) });
  });

  it.each(ITEM_WORDS.map((word) => word.word))("shows %s again so that it reads the same", (word) => {
    const typed = exampleOf(ITEM_WORDS.find((each) => each.word === word)!);
    const first = parseItem(typed);
    if (!first.ok) throw new Error(first.message);
    expect(itemSchema.safeParse(first.value.item).success).toBe(true);
    const again = parseItem(itemText(first.value.item, first.value.place));
    expect(again).toMatchObject({ ok: true, value: first.value });
  });

  it("reads what changes from the point on, after the item or alone", () => {
    const starts = { specification: "B2", insulation: "2 in" };
    expect(parseItem("gate 300 + spec B2 + ins 2 in")).toMatchObject({ ok: true, value: { item: { kind: "valve" }, starts }, understood: expect.stringContaining("from here specification B2, insulation 2 in") });
    expect(parseItem("+ trace steam")).toMatchObject({ ok: true, value: { item: { kind: "none" }, starts: { tracing: "steam" } } });
    expect(parseItem(`gate ${startsText(starts)}`)).toMatchObject({ value: { starts } });
    expect(parseItem("gate + colour red")).toMatchObject({ ok: false, message: STARTS_HINT });
    expect(parseItem("gate + spec")).toMatchObject({ ok: false });
  });

  it("takes a bare number in the line's own unit", () => {
    expect(parseItem("bend 500", "metric")).toMatchObject({ value: { item: { radiusMm: 500 } } });
    expect(itemText({ kind: "bend", radiusMm: 500 }, null, "metric")).toBe("bend 500");
  });

  it("offers words by their beginning and their full name", () => {
    expect(suggestItems("ga")[0]?.word).toBe("gate");
    expect(suggestItems("slip")[0]?.word).toBe("so");
    expect(suggestItems("short-radius").map((word) => word.word)).toContain("sr");
  });

  it("cautions at nominal take-outs and trimmed elbows (common practice)", () => {
    expect(itemCaution({ kind: "cap" })).toMatch(/measure the fitting/);
    expect(itemCaution({ kind: "elbow", elbow: "trimmed-lr" })).toMatch(/engineer/);
    expect(itemCaution({ kind: "joint" })).toBeNull();
  });

  it("knows pipe sizes however they are written", () => {
    expect([readNps("1.5"), readNps('2"'), readNps("1-1/2"), readNps("7")]).toEqual(["1-1/2", "2", "1-1/2", null]);
  });
});
