/** Arbitrary run documents for fast-check: anything the schema lets through, with repeated ids, zero directions and lost branches. */
import fc from "fast-check";
import { NPS_SIZES, type Item, type LineSettings, type Offset, type Point, type Run, type RunDocument } from "../../../iso/run/document";
import { defaultLineSettings } from "../../../iso/run/defaults";

const nps = fc.constantFrom(...NPS_SIZES);
const ratingClass = fc.constantFrom(null, 150 as const, 300 as const, 600 as const, 900 as const, 1500 as const);
const axis = fc.constantFrom("E" as const, "W" as const, "N" as const, "S" as const, "U" as const, "D" as const);
const text = fc.string({ maxLength: 12 });
const mm = fc.oneof(fc.constantFrom(0, 0, 304.8, 609.6, -609.6, 1_000_000, -1_000_000, 1e-12), fc.double({ min: -5_000, max: 5_000, noNaN: true }), fc.integer({ min: -3_000, max: 3_000 }));
const entry = fc.record({ text, mm });
const unit = fc.oneof(fc.constantFrom(0, 0, 1, -1), fc.double({ min: -1, max: 1, noNaN: true }));

const offset: fc.Arbitrary<Offset> = fc.oneof(
  fc.record({ kind: fc.constant("enu" as const), e: entry, n: entry, u: entry }),
  fc.record({ kind: fc.constant("polar" as const), direction: fc.record({ text, e: unit, n: unit, u: unit }), length: entry }),
  fc.record({ kind: fc.constant("absolute" as const), e: entry, n: entry, u: entry }),
  fc.record({
    kind: fc.constant("slope" as const), direction: fc.record({ text, e: unit, n: unit, u: fc.constant(0 as const) }), length: entry,
    slope: fc.record({ text, ratio: fc.oneof(fc.constantFrom(0, 0.01, -0.25), fc.double({ min: -10, max: 10, noNaN: true })) }),
  }),
);

const ends = fc.constantFrom("butt" as const, "socket" as const, "threaded" as const);
const set = fc.constantFrom("on" as const, "in" as const);
/** A length that is never negative, some of them nonsense. */
const size = fc.oneof(fc.constantFrom(0, 76.2, 152.4, 1_000_000), fc.double({ min: 0, max: 2_000, noNaN: true }));

const item: fc.Arbitrary<Item> = fc.oneof(
  fc.constant<Item>({ kind: "none" }),
  fc.record({ kind: fc.constant("end" as const), goes: fc.constantFrom("open" as const, "field-weld" as const, "continued" as const, "existing" as const, "vent" as const, "drain" as const), text }),
  fc.record({ kind: fc.constant("elbow" as const), elbow: fc.constantFrom("lr-90" as const, "sr-90" as const, "lr-45" as const, "sr-45" as const, "th-90" as const, "th-45" as const, "trimmed-lr" as const, "trimmed-sr" as const, "sw-90" as const, "sw-45" as const) }),
  fc.record({ kind: fc.constant("tee" as const), ends, branchNps: fc.option(nps) }),
  fc.record({ kind: fc.constant("cross" as const), ends, branchNps: fc.option(nps) }),
  fc.record({ kind: fc.constant("outlet" as const), branchNps: nps, ends, set }, { requiredKeys: ["kind", "branchNps"] }),
  fc.record({ kind: fc.constant("stub-in" as const), branchNps: nps, set, padMm: size }, { requiredKeys: ["kind", "branchNps"] }),
  fc.record({ kind: fc.constant("return" as const), radius: fc.constantFrom("LR" as const, "SR" as const), toward: axis }),
  fc.record({ kind: fc.constant("mitre" as const), pieces: fc.integer({ min: 2, max: 5 }), radiusMm: fc.option(size) }),
  fc.record({ kind: fc.constant("bend" as const), radiusMm: size }),
  fc.record({ kind: fc.constant("union" as const), ends: fc.constantFrom("socket" as const, "threaded" as const) }),
  fc.record({
    kind: fc.constant("instrument" as const), tag: text, ends: fc.constantFrom("flanged" as const, "butt" as const, "socket" as const, "threaded" as const), ratingClass, lengthMm: size,
  }),
  fc.record({ kind: fc.constant("reducer" as const), shape: fc.constantFrom("concentric" as const, "eccentric" as const), toNps: nps, toSchedule: fc.option(fc.constantFrom("STD", "XS", "nonsense")), flat: fc.option(axis) }),
  fc.record({
    kind: fc.constant("flange" as const), flange: fc.constantFrom("weld-neck" as const, "slip-on" as const, "socket-weld" as const, "threaded" as const, "lap-joint" as const, "blind" as const), ratingClass,
    boltHoles: fc.oneof(fc.constant("straddle" as const), fc.record({ turnDeg: fc.double({ min: 0, max: 360, noNaN: true }), from: axis })),
    gasketSide: fc.constantFrom("before" as const, "after" as const), goes: fc.constantFrom("nozzle" as const, "continued" as const, "existing" as const, "open" as const), text,
  }),
  fc.record({
    kind: fc.constant("valve" as const), valve: fc.constantFrom("gate" as const, "globe" as const, "check" as const, "ball" as const, "butterfly" as const),
    ends: fc.constantFrom("flanged" as const, "butt" as const, "socket" as const, "threaded" as const), ratingClass,
    mating: fc.constantFrom("weld-neck" as const, "slip-on" as const, "socket-weld" as const, "threaded" as const, "lap-joint" as const),
    stem: fc.option(axis), faceToFaceMm: fc.option(fc.double({ min: 0, max: 1_000_000, noNaN: true })), tag: text,
  }),
  fc.record({ kind: fc.constant("coupling" as const), half: fc.boolean(), ends: fc.constantFrom("socket" as const, "threaded" as const) }, { requiredKeys: ["kind", "half"] }),
  fc.record({ kind: fc.constant("cap" as const), ends }, { requiredKeys: ["kind"] }),
  fc.record({ kind: fc.constant("support" as const), text }),
  fc.constant<Item>({ kind: "joint" }),
);

const place = fc.constantFrom("shop" as const, "field" as const, "field-fit" as const);
const places = fc.record({ in: place, out: place, branch: place, bolts: place }, { requiredKeys: [] });

/** Ids from a small pool, so that some repeat; some are names every object answers to. */
const pointId = fc.oneof(fc.integer({ min: 0, max: 30 }).map((n) => `p${n}`), fc.constantFrom("__proto__", "constructor", "toString"));

export const pointArbitrary: fc.Arbitrary<Point> = fc.record({
  id: pointId, offset, item, places, trimMm: fc.option(fc.double({ min: 0, max: 1_000, noNaN: true })),
  provenance: fc.record({
    kind: fc.constantFrom("measured" as const, "from-drawing" as const, "calculated" as const, "assumed" as const), toleranceMm: fc.option(fc.double({ min: 0, max: 50, noNaN: true })),
    by: fc.option(text), at: fc.option(text), second: fc.option(entry),
  }),
  note: text, flipped: fc.boolean(), starts: fc.record({ specification: text, material: text, insulation: text, tracing: text }, { requiredKeys: [] }),
}, { requiredKeys: ["id", "offset", "item", "places", "trimMm", "provenance", "note"] });

const pipe = fc.record({ nps, schedule: fc.constantFrom("STD", "XS", "40", "10S", "160", "nonsense"), material: text, specification: text });

const settings: fc.Arbitrary<LineSettings> = fc.record({
  units: fc.constantFrom("imperial" as const, "metric" as const), pipe, elbow: fc.constantFrom("LR" as const, "SR" as const), ratingClass: fc.constantFrom(150 as const, 300 as const, 600 as const),
  gap: fc.constantFrom(0, 3.175, 1_000_000), within: fc.double({ min: 0, max: 3, noNaN: true }), faceIncludesGasket: fc.boolean(), pup: fc.option(fc.double({ min: 0, max: 1_000, noNaN: true })),
  stockLengthMm: fc.option(fc.constantFrom(0, 1, 300, 6_000), { nil: undefined }), forgedClass: fc.option(fc.constantFrom(2000 as const, 3000 as const, 6000 as const), { nil: undefined }),
  threadMakeUpMm: fc.option(fc.constantFrom(0, 15, 1_000_000), { nil: undefined }),
}).map(({ units, pipe: p, elbow, ratingClass: c, gap, within, faceIncludesGasket, pup, stockLengthMm, forgedClass, threadMakeUpMm }) => ({
  ...defaultLineSettings(units), pipe: p, elbow, ratingClass: c, standardElbowWithinDeg: within, faceIncludesGasket, minimumPupMm: pup,
  ...(stockLengthMm === undefined ? {} : { stockLengthMm }), ...(forgedClass === undefined ? {} : { forgedClass }),
  allowances: { rootGapMm: gap, socketPullBackMm: 1.6, gasketMm: 3, slipOnSettingMm: 6, ...(threadMakeUpMm === undefined ? {} : { threadMakeUpMm }) },
}));

const branchRun = (index: number): fc.Arbitrary<Run> =>
  fc.record({ id: fc.constant(`run-${index}`), name: text, from: pointId, to: pointId, pipe: fc.option(pipe), points: fc.array(pointArbitrary, { maxLength: 6 }) }, { requiredKeys: ["id", "name", "from", "pipe", "points"] });

/** Any document the schema's shape accepts (references between runs may be broken: that is parseRunDocument's to say). */
export const documentArbitrary: fc.Arbitrary<RunDocument> = fc.record({
  version: fc.constant(1 as const), number: fc.string({ minLength: 1, maxLength: 10 }), title: text, settings, view: fc.constant(null),
  main: fc.array(pointArbitrary, { maxLength: 14 }), branches: fc.tuple(branchRun(1), branchRun(2), branchRun(3)), many: fc.integer({ min: 0, max: 3 }), notes: fc.array(text, { maxLength: 2 }),
}).map(({ main, branches, many, ...rest }) => ({ ...rest, runs: [{ id: "main", name: "", from: null, pipe: null, points: main }, ...branches.slice(0, many)] }));
