/** The three ways to cut a closing out, and the words for how each misses. */
import { describe, expect, test } from "vitest";
import { snapBetween, type CloseBetweenInput } from "@/iso";

const INCH = 25.4;
/** A rolling closing of NPS 4 LR elbows: 30 in on, 12 aside, 9 up. */
const input: CloseBetweenInput = {
  end0: { position: [0, 0, 0], direction: [1, 0, 0] }, end1: { position: [30 * INCH, 12 * INCH, 9 * INCH], direction: [-1, 0.3, 0.1] },
  radius0Mm: 6 * INCH, radius1Mm: 6 * INCH, rootGapMm: INCH / 8, thetaMaxRad: Math.PI / 2, units: "imperial", odMm: 4.5 * INCH,
};
const degrees = (text: string) => Number(text.replace("°", ""));
const inches = (text: string) => text.replace(" in", "").split(" ").reduce((sum, part) => sum + part.split("/").map(Number).reduce((a, b) => a / b), 0);

describe("snapping a closing to the shop's steps", () => {
  const choices = snapBetween(input, { angleDeg: 0.25, length: INCH / 16 })!;

  test("exact, snapped and squarest, the last two on the steps", () => {
    expect(choices.map(({ way }) => way)).toEqual(["exact", "snapped", "square"]);
    for (const choice of choices.slice(1)) {
      for (const angle of [choice.angle0, choice.angle1]) expect((degrees(angle) / 0.25) % 1).toBeCloseTo(0, 6);
      expect((inches(choice.pipe) * 16) % 1).toBeCloseTo(0, 6);
    }
    expect(choices[0]!.mismatch).toBeNull();
  });

  test("snapped lies nearer, squarest stands squarer; the words carry gap, high-low, angle and opening", () => {
    const [, snapped, square] = choices;
    expect(snapped!.mismatch!.position).toBeLessThan(square!.mismatch!.position);
    expect(square!.mismatch!.angleDeg).toBeLessThanOrEqual(snapped!.mismatch!.angleDeg);
    for (const { words } of choices.slice(1)) expect(words).toMatch(/^At end 1: gap .*high-low [\d.]+ in, faces open [\d.]+ in across the OD \([\d.]+°\); .*\.$/);
  });

  test("finer steps miss less; a metric line speaks millimetres", () => {
    const finer = snapBetween(input, { angleDeg: 0.05, length: INCH / 64 })!;
    expect(finer[1]!.mismatch!.position).toBeLessThan(choices[1]!.mismatch!.position);
    const metric = snapBetween({ ...input, units: "metric" }, { angleDeg: 0.5, length: 1 })!;
    expect(metric[1]!.words).toMatch(/high-low [\d.]+ mm/);
    expect(metric[1]!.pipe).toMatch(/^\d+ mm$/);
  });

  test("nothing is offered where nothing closes", () => {
    expect(snapBetween({ ...input, end1: { position: [0, 0, 0], direction: [1, 0, 0] } }, { angleDeg: 0.25, length: 1 })).toBeNull();
  });
});
