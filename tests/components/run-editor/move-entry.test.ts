import { describe, expect, it } from "vitest";
import { INCH_MM } from "@/iso";
import { parseMove } from "@/components/run-editor/move-entry";
import { moveEcho, moveText, straightOnOf } from "@/components/run-editor/move-text";
import type { Offset } from "@/iso";

function offsetOf(text: string, units: "imperial" | "metric" = "imperial"): Offset {
  const result = parseMove(text, units);
  if (!result.ok) throw new Error(result.message);
  return result.value;
}

function enuOf(offset: Offset): readonly number[] {
  if (offset.kind === "polar" || offset.kind === "slope") return [offset.direction.e, offset.direction.n, offset.direction.u].map((c) => c * offset.length.mm);
  return [offset.e.mm, offset.n.mm, offset.u.mm];
}

function near(actual: readonly number[], expected: readonly number[]): void {
  actual.forEach((value, i) => expect(value).toBeCloseTo(expected[i] ?? NaN, 6));
}

describe("a Move cell", () => {
  it.each([
    ["e 3-1 1/2", [37.5, 0, 0]],
    ["e3-1.5", [37.5, 0, 0]],
    ["u 2-8", [0, 0, 32]],
    ["n 1-9 3/4", [0, 21.75, 0]],
    ["un 3-0", [0, 36 * Math.SQRT1_2, 36 * Math.SQRT1_2]],
    ["W 6", [-6, 0, 0]],
    ["down 1'", [0, 0, -12]],
    ["E 2-0 N 1-0 U 3", [24, 12, 3]],
    ["w2-0s1-0d3", [-24, -12, -3]],
    ["2-0, 1-0, -3", [24, 12, -3]],
    ["n30e 10", [5, 10 * Math.cos(Math.PI / 6), 0]],
    ["090/30 10", [10 * Math.cos(Math.PI / 6), 0, 5]],
  ])("reads %s", (text, inches) => {
    near(enuOf(offsetOf(text)), inches.map((value) => value * INCH_MM));
  });

  it("reads a position", () => {
    const offset = offsetOf("@ 10-0, 0, 8-0");
    expect(offset.kind).toBe("absolute");
    near(enuOf(offset), [3048, 0, 2438.4]);
    expect(offsetOf("@ E 1-0 N 2-0 U 3-0").kind).toBe("absolute");
  });

  it("takes a bare number in the line's own unit", () => {
    near(enuOf(offsetOf("e 775", "metric")), [775, 0, 0]);
    near(enuOf(offsetOf("e 6")), [152.4, 0, 0]);
  });

  it("goes straight on when only a length is typed", () => {
    const before = straightOnOf(offsetOf("u 2-8"));
    const result = parseMove("1-0", "imperial", before);
    expect(result.ok && enuOf(result.value)).toEqual([0, 0, 304.8]);
    expect(parseMove("1-0", "imperial", null)).toMatchObject({ ok: false });
  });

  it.each([
    ["e 10-0 @ 1:100", 0.01], ["E 10' @ 2%", 0.02], ["n30e 10-0 @ down 1/4 in/ft", -1 / 48], ["w 6-0 @ -1:50", -0.02],
  ])("reads the slope of %s as a rise over the level length", (text, ratio) => {
    const offset = offsetOf(text);
    expect(offset).toMatchObject({ kind: "slope", direction: { u: 0 }, slope: { ratio: expect.closeTo(ratio, 12) } });
    expect(offsetOf(moveText(offset))).toEqual(offset);
    expect(moveEcho(offset, "imperial")).toMatch(ratio < 0 ? /falls .* lower/ : /rises .* higher/);
  });

  it("goes on in the slope when only a length is typed", () => {
    const before = straightOnOf(offsetOf("e 10-0 @ 1:100"));
    expect(parseMove("5-0", "imperial", before)).toMatchObject({ ok: true, value: { kind: "slope", slope: { ratio: 0.01 }, length: { mm: 1524 } } });
  });

  it.each(["u 10-0 @ 1:100", "e 10-0 @ steep", "e 1-0 n 2-0 @ 1%", "e @ 1%"])("says what to type for the slope %s", (text) => {
    expect(parseMove(text, "imperial")).toMatchObject({ ok: false, message: expect.stringMatching(/[.]$/) });
  });

  it("echoes what it understood", () => {
    expect(parseMove("e 3-1 1/2", "imperial")).toMatchObject({ understood: `3'-1 1/2" east` });
    expect(parseMove("E 2-0 N 1-0 D 3", "imperial")).toMatchObject({ understood: `2'-0" east, 1'-0" north, 3" down` });
  });

  it.each(["e", "x 3-0", "e 3-1 1/3", "e 1 w 2", "un 3 e 2", "@ 1, 2", "1, 2"])("says what to type for %s", (text) => {
    const result = parseMove(text, "imperial");
    expect(result.ok).toBe(false);
    if (!result.ok) expect(result.message).toMatch(/[a-z].*[.]$/i);
  });

  it.each(["e 3-1 1/2", "un 3-0", "W 2-0 N 1-0 D 3", "@ 10-0, 0, 8-0", "2-0, -1-0, 3", "n30e 10", ""])("shows %s again so that it reads the same", (text) => {
    const offset = offsetOf(text);
    near(enuOf(offsetOf(moveText(offset))), enuOf(offset));
    expect(offsetOf(moveText(offset)).kind).toBe(offset.kind);
  });

  it("echoes a stored offset", () => {
    expect(moveEcho(offsetOf("u 2-8"), "imperial")).toBe(`2'-8" up`);
    expect(moveEcho(offsetOf(""), "imperial")).toBe("");
  });
});
