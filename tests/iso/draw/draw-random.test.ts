/** A hundred random lines: whatever is typed, no label lies on another and every number is finite. */
import { describe, expect, it } from "vitest";
import { drawn, everyNumber, modelOf, overlappingLabels } from "./draw-helpers";
import { randomRun } from "./random-runs";

describe("random lines", () => {
  it.each(Array.from({ length: 100 }, (_, seed) => seed + 1))("seed %i", (seed) => {
    const model = modelOf(randomRun(seed, seed % 6 === 0 ? 5 + ((seed * 7) % 36) : 5 + (seed % 11)));
    const drawing = drawn(model, { view: ((seed % 4) + 1) as 1 | 2 | 3 | 4 });
    expect(overlappingLabels(drawing.items)).toEqual([]);
    expect(everyNumber(drawing.items).every(Number.isFinite)).toBe(true);
    for (const joint of model.joints) expect(drawing.shown).toContainEqual({ kind: "joint", id: joint.key });
  });
});
