/** The model's cut lengths against the second walk (tests/oracle/walk-pieces.ts), several hundred seeded random runs. */
import fc from "fast-check";
import { expect, it } from "vitest";
import { buildModel } from "../../../iso/run/build-model";
import { emptyMarks } from "../../../iso/run/marks";
import { defaultLineSettings, newRunDocument } from "../../../iso/run/defaults";
import { newPoint, pointInsert } from "../../../iso/run/edit";
import type { Item, Nps, RunDocument } from "../../../iso/run/document";
import { flange, joint, pipe, support, tee, valve } from "../../fixtures/run-builder";
import { HAND_TABLE, walkPieces, type Stand, type WalkPoint } from "../../oracle/walk-pieces";

const INCH = 25.4;
const LANDS_MM = 1e-6;
type Triple = readonly [number, number, number];

const ITEMS: Readonly<Record<Stand, Item>> = {
  "open-end": { kind: "end", goes: "open", text: "BEVEL" }, "end-flange": flange(), turn: { kind: "none" }, "turn-sr": { kind: "none" },
  tee: tee(), gate: valve(), globe: valve({ valve: "globe" }), pair: flange(), weld: joint, through: support(),
};

/** One move: a turn of a kind, a length, and what stands at its end if the next move goes straight on. */
const move = fc.record({
  turn: fc.oneof(fc.constantFrom(0, 90, 45), fc.double({ min: 5, max: 86, noNaN: true }), fc.double({ min: 88, max: 90, noNaN: true })),
  roll: fc.oneof(fc.constantFrom(0, 90, 180, 270), fc.double({ min: 0, max: 360, noNaN: true })),
  length: fc.integer({ min: 60 * 16, max: 400 * 16 }),
  stand: fc.constantFrom<Stand>("tee", "gate", "globe", "pair", "weld", "through"),
});
const script = fc.record({
  nps: fc.constantFrom(...Object.keys(HAND_TABLE)), shortRadius: fc.boolean(),
  ends: fc.tuple(fc.constantFrom<Stand>("open-end", "end-flange"), fc.constantFrom<Stand>("open-end", "end-flange")),
  moves: fc.array(move, { minLength: 1, maxLength: 12 }),
});
type Script = typeof script extends fc.Arbitrary<infer T> ? T : never;

function cross(a: Triple, b: Triple): Triple {
  return [a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]];
}

/** Turns a direction by `turn` degrees, in the plane rolled `roll` degrees about it. */
function turned(d: Triple, turn: number, roll: number): Triple {
  const some: Triple = Math.abs(d[2]) < 0.9 ? [0, 0, 1] : [0, 1, 0];
  const raw = cross(d, some);
  const size = Math.hypot(...raw);
  const side: Triple = [raw[0] / size, raw[1] / size, raw[2] / size];
  const up = cross(side, d);
  const [t, r] = [(turn * Math.PI) / 180, (roll * Math.PI) / 180];
  const mix = (k: 0 | 1 | 2) => d[k] * Math.cos(t) + (side[k] * Math.cos(r) + up[k] * Math.sin(r)) * Math.sin(t);
  return [mix(0), mix(1), mix(2)];
}

function walkPoints(s: Script): WalkPoint[] {
  const points: WalkPoint[] = [{ stand: s.ends[0], step: [0, 0, 0] }];
  let d: Triple = [1, 0, 0];
  s.moves.forEach((m, i) => {
    if (i > 0) d = turned(d, m.turn, m.roll);
    const next = s.moves[i + 1];
    const inches = m.length / 16;
    const stand = !next ? s.ends[1] : next.turn === 0 ? m.stand : s.shortRadius ? "turn-sr" : "turn";
    points.push({ stand, step: [d[0] * inches, d[1] * inches, d[2] * inches] });
  });
  return points;
}

function documentOf(s: Script, points: readonly WalkPoint[]): RunDocument {
  const settings = { ...defaultLineSettings("imperial"), pipe: pipe(s.nps as Nps), elbow: s.shortRadius ? "SR" as const : "LR" as const };
  return points.reduce((document, p, i) => {
    const [e, n, u] = p.step.map((inches) => ({ text: "", mm: inches * INCH })) as [never, never, never];
    return pointInsert(document, "main", i, { ...newPoint(`p${i}`), offset: { kind: "enu", e, n, u }, item: ITEMS[p.stand] });
  }, newRunDocument("W-1", settings));
}

it("lands on every cut point within 1e-6 mm, laid end to end with take-outs typed from the tables", () => {
  let walked = 0;
  fc.assert(
    fc.property(script, (s) => {
      const points = walkPoints(s);
      const model = buildModel(documentOf(s, points), emptyMarks(), []);
      const landed = walkPieces(s.nps, points, model.pieces.map((p) => p.cutLengthMm / INCH));
      let at: Triple = [0, 0, 0];
      const wanted = points.flatMap((p): Triple[] => {
        at = [at[0] + p.step[0], at[1] + p.step[1], at[2] + p.step[2]];
        return p.stand === "through" ? [] : [at];
      });
      expect(landed).toHaveLength(wanted.length);
      expect(model.pieces).toHaveLength(wanted.length - 1);
      landed.forEach((p, i) => {
        const off = Math.hypot(p[0] - wanted[i]![0], p[1] - wanted[i]![1], p[2] - wanted[i]![2]) * INCH;
        if (!(off < LANDS_MM)) throw new Error(`point ${i} of NPS ${s.nps} lands ${off} mm off`);
        walked += 1;
      });
    }),
    { numRuns: 600, seed: 20_240 },
  );
  expect(walked).toBeGreaterThan(3_000);
});

it("places each piece between the weld faces: its ends are its cut length apart and the gaps close the rest", () => {
  fc.assert(
    fc.property(script, (s) => {
      const model = buildModel(documentOf(s, walkPoints(s)), emptyMarks(), []);
      for (const p of model.pieces) {
        const apart = Math.hypot(p.end[0] - p.start[0], p.end[1] - p.start[1], p.end[2] - p.start[2]);
        const sum = p.terms.reduce((total, t) => total + t.valueMm, 0);
        if (!(Math.abs(apart - p.cutLengthMm) < LANDS_MM && Math.abs(sum - p.cutLengthMm) < LANDS_MM)) throw new Error(`piece ${p.key}: ${apart}, ${sum}, ${p.cutLengthMm}`);
      }
    }),
    { numRuns: 200, seed: 7 },
  );
});
