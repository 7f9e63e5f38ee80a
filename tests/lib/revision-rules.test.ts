import { describe, expect, it } from "vitest";
import { isTransition, REVISION_LETTERS, revisionCodeNext, signRefusal, submitRefusal } from "@/lib/rules/revision-rules";

describe("revision codes", () => {
  it("skip the letters that read as other characters: I O Q S X Z (common practice)", () => {
    for (const letter of "IOQSXZ") expect(REVISION_LETTERS).not.toContain(letter);
    const codes: string[] = [];
    for (let code: string | null = null, n = 0; n < 45; n++) codes.push((code = revisionCodeNext(code)));
    expect(codes.slice(0, 10)).toEqual(["A", "B", "C", "D", "E", "F", "G", "H", "J", "K"]);
    expect(codes.slice(18, 23)).toEqual(["W", "Y", "AA", "AB", "AC"]);
    expect(new Set(codes).size).toBe(45);
  });
  it("carry over past the last letter", () => {
    expect(revisionCodeNext("AY")).toBe("BA");
    expect(revisionCodeNext("YY")).toBe("AAA");
  });
});

describe("transitions", () => {
  it("follow draft, for review, returned or for fabrication, superseded or void, as-built", () => {
    expect(isTransition("for-review", "for-fabrication")).toBe(true);
    expect(isTransition("for-fabrication", "as-built")).toBe(true);
    expect(isTransition("as-built", "superseded")).toBe(true);
    expect(isTransition("returned", "for-fabrication")).toBe(false);
    expect(isTransition("void", "for-fabrication")).toBe(false);
    expect(isTransition("superseded", "for-review")).toBe(false);
  });
});

describe("who may sign", () => {
  const facts = {
    role: "inspector",
    personId: "p1",
    state: "for-review",
    hold: false,
    submittedById: "p2",
    touchedByIds: ["p2"],
    othersWhoMaySign: 1,
  } as const;
  it("an inspector who never touched the content", () => expect(signRefusal(facts)).toBeNull());
  it("never the one who submitted or touched it", () => {
    expect(signRefusal({ ...facts, submittedById: "p1" })).toMatch(/second person/);
    expect(signRefusal({ ...facts, touchedByIds: ["p1"] })).toMatch(/second person/);
  });
  it("tells a shop of one that it needs a second person", () => {
    expect(signRefusal({ ...facts, role: "owner", submittedById: "p1", othersWhoMaySign: 0 })).toMatch(/invite an inspector/);
  });
  it("nobody signs on hold, twice, or in another role", () => {
    expect(signRefusal({ ...facts, hold: true })).toMatch(/HOLD/);
    expect(signRefusal({ ...facts, state: "for-fabrication" })).toMatch(/only one that is FOR REVIEW/);
    expect(signRefusal({ ...facts, role: "detailer" })).toMatch(/inspector or the owner/);
    expect(signRefusal({ ...facts, role: "fitter" })).toMatch(/inspector or the owner/);
  });
});

describe("who may submit", () => {
  it("a detailer or owner with nothing open and nothing that stops it", () => {
    expect(submitRefusal({ role: "detailer", openRevisionCode: null, stops: [] })).toBeNull();
    expect(submitRefusal({ role: "inspector", openRevisionCode: null, stops: [] })).toMatch(/detailer or the owner/);
    expect(submitRefusal({ role: "owner", openRevisionCode: "B", stops: [] })).toMatch(/Revision B is already/);
    expect(submitRefusal({ role: "owner", openRevisionCode: null, stops: ["The pipe does not fit."] })).toMatch(/does not fit/);
  });
});
