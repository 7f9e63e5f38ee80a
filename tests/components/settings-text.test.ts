import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { lengthEntryText, settingsTextSchema, settingsToText } from "@/components/jobs/settings-text";
import { defaultLineSettings } from "@/lib/rules/default-settings";
import { parseLength } from "@/iso";

/** Numbers to a millionth of a millimetre: inches times 25.4 differ from a typed 3/8 in the last bit. */
function rounded(value: unknown): unknown {
  return JSON.parse(
    JSON.stringify(value, (_, part: unknown) => (typeof part === "number" ? Number(part.toFixed(6)) : part)),
  );
}

describe("line settings as a form holds them", () => {
  it.each(["imperial", "metric"] as const)("come back from the %s form as they went in", (units) => {
    const settings = defaultLineSettings(units);
    const back = settingsTextSchema.parse(settingsToText(settings));
    expect(rounded(back)).toEqual(rounded(settings));
  });

  it("keep what is left empty absent, and rules of marks that differ", () => {
    const plain = settingsTextSchema.parse(settingsToText(defaultLineSettings("imperial")));
    for (const key of ["marks", "stockLengthMm", "loopToleranceMm", "forgedClass"]) expect(plain).not.toHaveProperty(key);
    const marks = { weldPrefix: "W-", weldStart: 101, piecePrefix: "", pieceStart: 1, added: "next", spools: "numbers" } as const;
    const usual = defaultLineSettings("metric");
    const full = { ...usual, allowances: { ...usual.allowances, threadMakeUpMm: 12 }, stockLengthMm: 6_000, loopToleranceMm: 2, forgedClass: 6000, marks } as const;
    expect(rounded(settingsTextSchema.parse(settingsToText(full)))).toEqual(rounded(full));
    const wrong = settingsTextSchema.safeParse({ ...settingsToText(usual), weldStart: "0", pieceStart: "x", loopTolerance: "-3" });
    expect(wrong.success ? [] : wrong.error.issues.map((issue) => issue.path[0]).sort()).toEqual(["loopTolerance", "pieceStart", "weldStart"]);
  });

  it("show a length exactly, whatever the unit system", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0, max: 30_000, noNaN: true }),
        fc.constantFrom("imperial", "metric" as const),
        (mm, units) => {
          const read = parseLength(lengthEntryText(mm, units), units);
          // Four decimals of a millimetre are written, so the reading is within half of the last one.
          expect(read.ok && Math.abs(read.mm - mm)).toBeLessThan(0.000_1);
        },
      ),
    );
  });

  it("name the field whose length cannot be read", () => {
    const text = { ...settingsToText(defaultLineSettings("imperial")), rootGap: "3 bananas", withinDeg: "4" };
    const parsed = settingsTextSchema.safeParse(text);
    const fields = parsed.success ? [] : parsed.error.issues.map((issue) => issue.path[0]);
    expect(fields.sort()).toEqual(["rootGap", "withinDeg"]);
  });
});
