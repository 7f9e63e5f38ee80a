import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { fitText, PLAIN, wrapText } from "@/iso/sheet/text-setting";
import { measureText } from "@/fonts/widths";
import { cornersOverlap } from "./text-boxes";

const words = fc.array(fc.string({ minLength: 1, maxLength: 30, unit: "grapheme" }).map((word) => word.replace(/[\s\p{Cc}\p{Zl}\p{Zp}]/gu, "") || "x"), { maxLength: 40 });
const fits = (line: string, width: number) => measureText(line, PLAIN.capMm, PLAIN.face) <= width;

describe("wrapText", () => {
  it("keeps every character, in order, in lines that fit", () => {
    fc.assert(
      fc.property(words, fc.double({ min: 8, max: 120, noNaN: true }), (list, width) => {
        const text = list.join(" ").normalize("NFC");
        const lines = wrapText(text, width, PLAIN, measureText);
        expect(lines.join("").replace(/ /g, "")).toBe(text.replace(/ /g, ""));
        for (const line of lines) expect([...line].length <= 1 || fits(line, width)).toBe(true);
      }),
      { seed: 11, numRuns: 300 },
    );
  });

  it("keeps line breaks and makes controls into spaces", () => {
    expect(wrapText("a\nb\u0007c", 50, PLAIN, measureText)).toEqual(["a", "b c"]);
  });

  it("gives one character a line when not even that fits", () => {
    expect(wrapText("abc", 0.1, PLAIN, measureText)).toEqual(["a", "b", "c"]);
  });
});

describe("fitText", () => {
  it("cuts with an ellipsis that fits and says so", () => {
    const text = "Evaporator 2 cooling water return to pump house north";
    const fitted = fitText(text, 30, 2, PLAIN, measureText);
    expect(fitted.cut).toBe(true);
    expect(fitted.lines).toHaveLength(2);
    expect(fitted.lines[1]!.endsWith("…")).toBe(true);
    for (const line of fitted.lines) expect(fits(line, 30)).toBe(true);
  });

  it("leaves a text that fits alone", () => {
    expect(fitText("NTS", 30, 1, PLAIN, measureText)).toEqual({ lines: ["NTS"], cut: false });
  });
});

describe("cornersOverlap, the eye of these tests", () => {
  const square = (x: number, y: number) => [[x, y], [x + 2, y], [x + 2, y + 2], [x, y + 2]] as const;
  it("sees an overlap, a touch and a gap apart", () => {
    expect(cornersOverlap(square(0, 0), square(1, 1), 0.05)).toBe(true);
    expect(cornersOverlap(square(0, 0), square(2, 0), 0.05)).toBe(false);
    expect(cornersOverlap(square(0, 0), square(5, 5), 0.05)).toBe(false);
  });
});

it("never parts inches from their fraction at a line's end", () => {
  const text = `begins at 35 7/16 and 12'-10 3/16" of 4 pieces 3/8 apart`;
  for (let widthMm = 24; widthMm < 120; widthMm += 3) {
    const lines = wrapText(text, widthMm, PLAIN, measureText);
    expect(lines.join(" ")).toBe(text);
    for (const line of lines.slice(1)) expect(line).not.toMatch(/^(7|3)\/16/);
  }
});
