import { describe, expect, it } from "vitest";
import { itemSchema } from "@/iso";
import { parseItem, suggestItems } from "@/components/run-editor/item-entry";
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
  ])("reads %s", (text, item) => {
    const result = parseItem(text);
    expect(result).toMatchObject({ ok: true, value: { item } });
  });

  it("brings the field place with a field weld", () => {
    expect(parseItem("fw")).toMatchObject({ value: { item: { kind: "joint" }, place: "field" } });
    expect(parseItem("ffw")).toMatchObject({ value: { place: "field-fit" } });
  });

  it.each(["red", "red 7", "outlet", "zzz", "cap 3", "red 3 flat d", "tee nine"])("says what to type for %s", (text) => {
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
