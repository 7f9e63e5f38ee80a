/** Lengths and directions as typed and as printed. Readings of the dash are common practice. */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { directionWords, formatAngleDeg, formatFeetInches, formatInches, formatLength, formatTerm, formatWeight, INCH_MM, MAX_LENGTH_MM, parseDirection, parseLength } from "@/iso";

describe("lengths as typed on an imperial line", () => {
  it.each([
    [`2' 6 1/2"`, 30.5, `2'-6 1/2"`], ["2-6 1/2", 30.5, `2'-6 1/2"`], ["2-6-1/2", 30.5, `2'-6 1/2"`], ["2-6", 30, `2'-6"`],
    ["6-1/2", 6.5, `6 1/2"`], [`30.5"`, 30.5, `2'-6 1/2"`], ["2'6", 30, `2'-6"`], ["1/2", 0.5, `1/2"`], ["37 1/2", 37.5, `3'-1 1/2"`],
    ["37½", 37.5, `3'-1 1/2"`], ["2′ 6½″", 30.5, `2'-6 1/2"`], ["2’6”", 30, `2'-6"`], ["-2-6", -30, `-2'-6"`], ["−1/2", -0.5, `-1/2"`],
    ["2 ft 6 1/2 in", 30.5, `2'-6 1/2"`], ["2ft6in", 30, `2'-6"`], ["2.5'", 30, `2'-6"`], ["10'", 120, `10'-0"`], [".5", 0.5, `1/2"`],
    ["37", 37, `3'-1"`], ["1⁄2", 0.5, `1/2"`], [`2'-0 1/2"`, 24.5, `2'-0 1/2"`], ["0-6", 6, `6"`], ["-0", 0, `0"`], ["+3", 3, `3"`],
  ])("%s", (text, inches, understood) => {
    expect(parseLength(text, "imperial")).toEqual({ ok: true, mm: (inches * 127) / 5, understood });
  });

  it("reads millimetres, centimetres and metres, and echoes the exact inches beside the tape's", () => {
    expect(parseLength("775mm", "imperial")).toEqual({ ok: true, mm: 775, understood: `2'-6 1/2" (30.5118")` });
    expect(parseLength("12 cm", "imperial")).toMatchObject({ ok: true, mm: 120 });
    expect(parseLength("0.5m", "imperial")).toMatchObject({ ok: true, mm: 500 });
  });

  it.each(["", "   ", "abc", "NaN", "Infinity", "1e5", "2--6", "6-", "-", "1/0", "6 1/3", "6 3/2", "1,500", "2.5' 6", "99999999", "9".repeat(400), "2'6'", "'", '"'])("refuses %j in one sentence", (text) => {
    const parsed = parseLength(text, "imperial");
    expect(parsed).toMatchObject({ ok: false });
    expect(!parsed.ok && parsed.message).toMatch(/^["A-Z0-9].*[.]$/);
  });

  it("says what to type for thirteen inches after feet", () => {
    expect(parseLength("2-13", "imperial")).toEqual({ ok: false, message: `13 inches after feet makes another foot; type 3'-1" if that is meant, or 37" in inches.` });
  });
});

describe("lengths as typed on a metric line", () => {
  it("takes a bare number as millimetres and inches by their mark", () => {
    expect(parseLength("775", "metric")).toEqual({ ok: true, mm: 775, understood: "775 mm" });
    expect(parseLength(`30.5"`, "metric")).toEqual({ ok: true, mm: 774.7, understood: "774.7 mm" });
    expect(parseLength("2' 6", "metric")).toEqual({ ok: true, mm: 762, understood: "762 mm" });
    expect(parseLength("-12.5", "metric")).toMatchObject({ mm: -12.5 });
  });

  it("refuses what could be either", () => {
    expect(parseLength("2-6", "metric")).toMatchObject({ ok: false });
    expect(parseLength("37 1/2", "metric")).toMatchObject({ ok: false });
  });
});

describe("round trips", () => {
  const sixteenths = fc.integer({ min: -16 * 39_000, max: 16 * 39_000 });

  it("imperial: what is printed reads back as the same sixteenth", () => {
    fc.assert(
      fc.property(sixteenths, (n) => {
        const mm = (n * 127) / 80;
        for (const text of [formatLength(mm, "imperial"), `${formatInches(mm)}"`]) {
          const parsed = parseLength(text, "imperial");
          expect(parsed.ok && Math.abs(parsed.mm - mm) < 1e-6).toBe(true);
        }
      }),
      { seed: 1, numRuns: 2_000 },
    );
  });

  it("any length prints to the nearest sixteenth", () => {
    fc.assert(
      fc.property(fc.double({ min: -MAX_LENGTH_MM + 2, max: MAX_LENGTH_MM - 2, noNaN: true }), (mm) => {
        const parsed = parseLength(formatLength(mm, "imperial"), "imperial");
        expect(parsed.ok && Math.abs(parsed.mm - mm) <= INCH_MM / 32 + 1e-5).toBe(true);
      }),
      { seed: 2, numRuns: 2_000 },
    );
  });

  it("metric: whole millimetres", () => {
    fc.assert(
      fc.property(fc.integer({ min: -MAX_LENGTH_MM, max: MAX_LENGTH_MM }), (mm) => {
        expect(parseLength(formatLength(mm, "metric"), "metric")).toMatchObject({ ok: true, mm });
      }),
      { seed: 3, numRuns: 500 },
    );
  });

  it("never throws, whatever is typed", () => {
    fc.assert(
      fc.property(fc.oneof(fc.string(), fc.stringMatching(/^[0-9'"/ .-]{0,12}$/)), fc.constantFrom("imperial" as const, "metric" as const), (text, units) => {
        const parsed = parseLength(text, units);
        expect(parsed.ok ? Number.isFinite(parsed.mm) && Math.abs(parsed.mm) <= MAX_LENGTH_MM : parsed.message.length > 0).toBe(true);
        expect(typeof parseDirection(text).ok).toBe("boolean");
      }),
      { seed: 4, numRuns: 3_000 },
    );
  });
});

describe("numbers as printed", () => {
  it("rounds once, halves away from zero, and never prints minus nothing", () => {
    expect(formatFeetInches(952.5)).toBe(`3'-1 1/2"`);
    expect(formatFeetInches(11.99 * 25.4)).toBe(`1'-0"`);
    expect(formatFeetInches(-0.1)).toBe(`0"`);
    expect(formatLength(228.5, "metric")).toBe("229");
    expect(formatLength(-228.5, "metric")).toBe("-229");
    expect(formatInches(32.887 * 25.4)).toBe("32 7/8");
    expect(formatTerm(3.890125 * 25.4, "imperial")).toBe("3 57/64");
    expect(formatTerm(98.44, "metric")).toBe("98.4");
    expect(formatInches(Number.NaN)).toBe("?");
    expect(formatAngleDeg(Math.PI / 4)).toBe("45.00°");
    expect(formatWeight(1, "imperial")).toBe("2.2 lb");
    expect(formatWeight(100, "imperial")).toBe("220 lb");
  });
});

describe("directions", () => {
  const half = Math.SQRT1_2;
  it.each([
    ["E", [1, 0, 0], "east"], ["up", [0, 0, 1], "up"], ["D", [0, 0, -1], "down"], ["UN", [0, half, half], "45° up, north"],
    ["ne", [half, half, 0], "north-east"], ["N30E", [0.5, Math.sqrt(3) / 2, 0], "azimuth 30°"], ["90/-90", [0, 0, -1], "down"],
    ["045/30", [Math.sqrt(6) / 4, Math.sqrt(6) / 4, 0.5], "30° up, north-east"], ["N-E", [half, half, 0], "north-east"],
  ])("%s", (text, expected, understood) => {
    const parsed = parseDirection(text);
    if (!parsed.ok) throw new Error(parsed.message);
    [parsed.e, parsed.n, parsed.u].forEach((x, i) => expect(x).toBeCloseTo(expected[i]!, 12));
    expect(parsed.understood).toBe(understood);
  });

  it.each(["", "EW", "EE", "E120N", "N30S", "400/10", "10/100", "abc", "E".repeat(50)])("refuses %j", (text) => {
    expect(parseDirection(text)).toMatchObject({ ok: false });
  });

  it("finds words for any vector", () => expect(directionWords(0, 0, -3)).toBe("down"));
});
