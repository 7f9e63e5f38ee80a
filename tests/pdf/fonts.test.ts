import { readFileSync } from "node:fs";
import path from "node:path";
import * as fontkit from "fontkit";
import { describe, expect, it } from "vitest";
import { FACES, FACE_NAMES } from "@/fonts/families";
import { SUBSTITUTE, printableCharacters, printableText } from "@/fonts/printable";
import { EM_PER_CAPITAL, measureText } from "@/fonts/widths";

const open = (file: string) => fontkit.create(readFileSync(path.resolve("fonts", file))) as fontkit.Font;
const fonts = Object.fromEntries(FACE_NAMES.map((face) => [face, open(FACES[face].file)]));

describe("faces on paper", () => {
  it("have a drawn glyph and the table's width for every printable character", () => {
    const characters = printableCharacters();
    expect(characters.length).toBeGreaterThan(800);
    for (const face of FACE_NAMES) {
      for (const character of characters) {
        const glyph = fonts[face]!.glyphForCodePoint(character.codePointAt(0)!);
        expect(glyph.id, `${face} ${character}`).toBeGreaterThan(0);
        expect(measureText(character, 1456, face), `${face} ${character}`).toBeCloseTo(glyph.advanceWidth, 6);
        const drawn = glyph.path.commands.length > 0;
        expect(drawn || character === " ", `${face} ${character} is blank`).toBe(true);
      }
    }
  });

  it("measure a capital height of 1 as 1.4066 em, and the widths DRAWING.md read off paper", () => {
    expect(EM_PER_CAPITAL).toBeCloseTo(1.4066, 4);
    expect(measureText("12345", 3.5, "regular")).toBeCloseTo(13.8, 1);
    expect(measureText("12'-10 3/16\"", 3.5, "regular")).toBeCloseTo(26.4, 0);
  });

  it("print every character the trade needs", () => {
    const text = "ABCXYZ abcxyz 0123456789 '\"/-.,:;()[]#&@%+=<>*!? ° ± Ø × · – — … ½ ¼ ¾ ⅛ ⅜ ⅝ ⅞ ≤ ≥ ≈ µ Ω é ü ñ ø å ß Ł";
    expect(printableText(text)).toEqual({ text, unknown: [] });
  });
});

describe("printableText", () => {
  it("prints plain fractions and look-alikes", () => {
    expect(printableText("3\u20441\u00A0in \u2300 60 \u2192 N").text).toBe("3/1 in Ø 60 -> N");
    expect(printableText("e\u0301").text).toBe("é");
    expect(printableText("a\u200Bb\u0007c").text).toBe("abc");
  });

  it("replaces what has no glyph visibly and lists it once", () => {
    expect(printableText("配管 A 配 🙂")).toEqual({ text: `${SUBSTITUTE}${SUBSTITUTE} A ${SUBSTITUTE} ${SUBSTITUTE}`, unknown: ["配", "管", "🙂"] });
    expect(measureText("配", 2.5, "bold")).toBe(measureText(SUBSTITUTE, 2.5, "bold"));
  });

  it("leaves a lone surrogate as a substitute instead of throwing", () => {
    expect(printableText("a\uD800b").text).toBe(`a${SUBSTITUTE}b`);
  });
});
