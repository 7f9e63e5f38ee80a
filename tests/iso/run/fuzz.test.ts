/** Whatever a person types, a model comes out: no throw, no number that is not one, the same twice. */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { buildModel, nextMarks } from "../../../iso/run/build-model";
import { defaultLineSettings, newRunDocument } from "../../../iso/run/defaults";
import { runDocumentSchema, type RunDocument } from "../../../iso/run/document";
import { newPoint } from "../../../iso/run/edit";
import { emptyMarks, stickMarks } from "../../../iso/run/marks";
import type { Model } from "../../../iso/run/model-types";
import { sampleRuns } from "../../fixtures/sample-runs";
import { documentArbitrary } from "./document-arbitrary";

/** Path of the first number that is not finite, or null. */
function badNumber(value: unknown, path = ""): string | null {
  if (typeof value === "number") return Number.isFinite(value) ? null : path;
  if (Array.isArray(value)) return value.map((v, i) => badNumber(v, `${path}[${i}]`)).find((p) => p !== null) ?? null;
  if (value && typeof value === "object") {
    return Object.entries(value).map(([k, v]) => badNumber(v, `${path}.${k}`)).find((p) => p !== null) ?? null;
  }
  return null;
}

function checkWhole(model: Model): void {
  expect(badNumber({ ...model, document: null })).toBeNull();
  const ids = [...model.components.map((c) => c.id), ...model.pieces.map((p) => p.key)];
  expect(new Set(ids).size).toBe(ids.length);
  const keys = model.joints.map((j) => j.key);
  expect(new Set(keys).size).toBe(keys.length);
  const known = new Set(ids);
  for (const j of model.joints) for (const side of [j.a, j.b]) if (side !== null && !known.has(side)) throw new Error(`joint ${j.key} meets ${side}, which is not there`);
  const inSpools = model.spools.flatMap((s) => [...s.componentIds, ...s.pieceKeys]);
  expect([...inSpools].sort()).toEqual([...ids].sort());
  expect(model.spools.flatMap((s) => s.jointKeys).sort()).toEqual([...keys].sort());
  for (const p of model.problems) expect(p.text).toMatch(/^[A-Z].*\.$/s);
  const numbers = model.joints.flatMap((j) => j.number ?? []);
  expect(new Set(numbers).size).toBe(numbers.length);
}

describe("arbitrary documents", () => {
  it("build without a throw, whole and finite, the same twice", () => {
    fc.assert(
      fc.property(documentArbitrary, (document) => {
        const model = buildModel(document, emptyMarks(), []);
        checkWhole(model);
        expect(buildModel(structuredClone(document), emptyMarks(), [])).toEqual(model);
      }),
      { numRuns: 300, seed: 41 },
    );
  });

  it("mark without a throw when sticky, numbers staying unique", () => {
    fc.assert(
      fc.property(documentArbitrary, documentArbitrary, (before, after) => {
        const marks = nextMarks(after, stickMarks(nextMarks(before, emptyMarks(), [])), []);
        checkWhole(buildModel(after, marks, []));
      }),
      { numRuns: 200, seed: 42 },
    );
  });

  it("are the schema's own (the arbitrary makes nothing the schema refuses)", () => {
    fc.assert(fc.property(documentArbitrary, (document) => runDocumentSchema.safeParse(document).success), { numRuns: 100, seed: 43 });
  });
});

function staircase(points: number): RunDocument {
  const document = newRunDocument("L-1", defaultLineSettings("imperial"));
  const list = Array.from({ length: points }, (_, i) => {
    const step = (axis: number) => ({ text: "", mm: i % 3 === axis ? 2_000 : 0 });
    return { ...newPoint(`p${i}`), offset: { kind: "enu" as const, e: step(0), n: step(1), u: step(2) } };
  });
  return { ...document, runs: [{ ...document.runs[0]!, points: list }] };
}

describe("speed", () => {
  // A fixed small workload in the same run makes the budget hold on a slow or busy machine too.
  const workload = (): number => {
    let sum = 0;
    for (let i = 0; i < 300_000; i++) sum += Math.hypot(i, sum % 7, 1);
    return sum;
  };
  const timed = (run: () => unknown, times: number): number => {
    for (let i = 0; i < 3; i++) run();
    const each = Array.from({ length: times }, () => {
      const start = performance.now();
      run();
      return performance.now() - start;
    });
    return Math.min(...each);
  };

  it("builds 100 points in a small part, and 2 000 points in a few times, of a fixed workload", () => {
    const unit = timed(workload, 7);
    expect(timed(() => buildModel(staircase(100), emptyMarks(), []), 12) / unit).toBeLessThan(1);
    expect(timed(() => buildModel(staircase(2_000), emptyMarks(), []), 3) / unit).toBeLessThan(40);
  });

  it("gives 2 000 points their 1 999 legs and pieces", () => {
    const model = buildModel(staircase(2_000), emptyMarks(), []);
    expect(model.legs).toHaveLength(1_999);
    expect(model.pieces).toHaveLength(1_999);
  });
});

describe("samples", () => {
  for (const [name, document] of Object.entries(sampleRuns)) {
    it(`${name} has nothing that stops it`, () => {
      const model = buildModel(document, emptyMarks(), []);
      checkWhole(model);
      expect(model.problems.filter((p) => p.severity === "stop")).toEqual([]);
    });
  }
});
