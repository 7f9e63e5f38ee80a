/**
 * As fitted: measured spools laid on their sheets. Planted faults must come back as what they are, slips be told from faults,
 * and nothing a person types may throw. Tolerances as PFI ES-3 and ASME B31.3 335.1.1, from memory (see checks.ts).
 */
import { describe, expect, test } from "vitest";
import {
  asFittedMended, buildModel, compareAsFitted, emptyAsFitted, emptyMarks, fittedWanted, parseAsFitted, pasteFitted, vecAdd, vecAddScaled, vecDistance, vecPerpendicular, vecRotate, vecSub, vecUnit,
  type AsFittedDocument, type AsFittedResult, type FittedPoint, type RunDocument, type Vec3, type Wanted,
} from "@/iso";
import { motionPoint } from "@/iso/layout/as-fitted-motion";
import { GOLDEN_RUNS } from "../../fixtures/golden-runs";
import { sampleRuns } from "../../fixtures/sample-runs";
import { seededRandom } from "../../oracle/random";

interface Case {
  readonly wanted: Wanted;
  readonly compare: (document: AsFittedDocument) => AsFittedResult;
}

function caseOf(run: RunDocument, letter = "A"): Case {
  const model = buildModel(run, emptyMarks(), []);
  const spool = model.spools.find((one) => one.letter === letter)!;
  return { wanted: fittedWanted(model, spool), compare: (document) => compareAsFitted(model, spool, document, 4) };
}

/** The measurer's own frame. */
const AWAY_AXIS = vecUnit([1, 2, 3])!;
const away = (p: Vec3): Vec3 => vecAdd(vecRotate(p, AWAY_AXIS, 1.1), [500, -300, 200]);

type Bend = (mark: string, at: Vec3) => Vec3;

/** Every face's centre, a point on its axis, three bolt holes, and the corners, as somebody would measure them. */
function measured({ wanted }: Case, { bend = (_, p) => p, holesRad = 0, factor = 1, frame = away }: { readonly bend?: Bend; readonly holesRad?: number; readonly factor?: number; readonly frame?: (p: Vec3) => Vec3 } = {}): AsFittedDocument {
  const points: FittedPoint[] = [];
  const take = (of: string, what: FittedPoint["what"], at: Vec3) => points.push({ id: `p${points.length}`, of, what, at: frame(bend(of, at)).map((x) => String(x * factor)), leftOut: false });
  for (const face of wanted.faces) {
    take(face.mark, "centre", face.position);
    take(face.mark, "axis", vecAddScaled(face.position, face.direction, -400));
    const { holes } = face;
    if (holes) for (const k of [0, 2, 5]) take(face.mark, "hole", vecAddScaled(face.position, vecRotate(holes.midway, face.direction, -(Math.PI * (2 * k + 1)) / holes.count - (face.mark === "2" ? holesRad : 0)), holes.circleMm / 2));
  }
  for (const corner of wanted.corners) take(corner.mark, "centre", corner.position);
  return emptyAsFitted("metric", points);
}

const only = (document: AsFittedDocument, keep: (point: FittedPoint) => boolean): AsFittedDocument => ({ ...document, points: document.points.filter(keep) });
const codes = (result: AsFittedResult) => result.findings.map((finding) => finding.code);
const first = caseOf(sampleRuns.firstRun!);
const branch = caseOf(sampleRuns.branchWithReducer!);

describe("a spool as drawn", () => {
  test.each([...Object.entries(sampleRuns), ...GOLDEN_RUNS.map((run) => [run.document.number, run.document] as const)])("%s is GO, every face within a millionth", (_, run) => {
    const spool = caseOf(run!);
    const result = spool.compare(measured(spool));
    if (spool.wanted.faces.length === 0) return expect(result.verdict).toBe("none");
    if (result.motion === null) return expect(codes(result).some((code) => code === "line" || code === "few")).toBe(true);
    expect(result.verdict).toBe("go");
    for (const face of result.faces) expect(Math.hypot(...face.off!)).toBeLessThan(1e-6);
    for (const face of result.faces) expect(Math.abs(face.holesRad ?? 0)).toBeLessThan(1e-6);
    for (const pair of result.pairs) expect(pair.actualMm).toBeCloseTo(pair.wantedMm, 6);
  });

  test("the motion takes any point of the measurer's frame to its place", () => {
    const { motion } = first.compare(measured(first));
    for (const p of [[0, 0, 0], [123, -456, 789]] as const) expect(vecDistance(motionPoint(motion!, away(p)), p)).toBeLessThan(1e-6);
  });
});

describe("planted faults come back as the change that mends them", () => {
  const beyond = (marks: string): Bend => (mark, at) => (marks.split(" ").includes(mark) ? vecAddScaled(at, first.wanted.faces[1]!.direction, 12.7) : at);

  test("a plain end half an inch long: trim that much there, then GO", () => {
    const plain = caseOf(sampleRuns.planarOffset!);
    const face = plain.wanted.faces[1]!;
    expect(face.kind).toBe("plain");
    const result = plain.compare(measured(plain, { bend: (mark, at) => (mark === "2" ? vecAddScaled(at, face.direction, 12.7) : at) }));
    expect([result.verdict, result.changes[0]!.words]).toEqual(["trim", "Trim 1/2 in at end 2."]);
    const short = plain.compare(measured(plain, { bend: (mark, at) => (mark === "2" ? vecAddScaled(at, face.direction, -12.7) : at) }));
    expect(short.verdict).toBe("stop");
    expect(short.changes[0]!.words).toMatch(/^Piece P\d is 1\/2 in short/);
  });

  test("the last piece half an inch long: named with that amount", () => {
    const result = first.compare(measured(first, { bend: beyond("2") }));
    expect(result.verdict).toBe("stop");
    expect(result.changes[0]).toMatchObject({ kind: "length" });
    expect(result.changes[0]!.amount).toBeCloseTo(12.7, 2);
  });

  test("a turn a degree too far: that turn, by that angle", () => {
    const corner = first.wanted.corners[1]!;
    const angle = Math.PI / 180;
    const bend: Bend = (mark, at) => (["2", "W3"].includes(mark) ? vecAdd(corner.position, vecRotate(vecSub(at, corner.position), corner.normal, angle)) : at);
    const result = first.compare(measured(first, { bend }));
    expect(result.verdict).toBe("stop");
    const change = result.changes.find((one) => one.kind === "turn")!;
    expect([change.mark, change.amount]).toEqual(["W2", expect.closeTo(angle, 3)]);
    expect(change.words).toContain("turns too far; open it by 1.0");
  });

  test("a flange on the wrong holes: by how much and which way, all else GO", () => {
    const result = first.compare(measured(first, { holesRad: 0.05 }));
    expect(result.faces[1]!.holesRad).toBeCloseTo(0.05, 6);
    expect(result.faces[1]!.words).toEqual([expect.stringContaining("clockwise looking at the face")]);
    expect(result.changes[0]).toMatchObject({ kind: "holes", mark: "2", words: expect.stringContaining("counter-clockwise") as string });
    expect(result.faces[0]!.verdict).toBe("go");
  });

  test("a face that leans a degree, and nothing else", () => {
    const face = first.wanted.faces[1]!;
    const side = vecPerpendicular(face.direction);
    const result = first.compare(only(measured(first, { bend: (mark, at) => (mark === "2" ? vecAdd(face.position, vecRotate(vecSub(at, face.position), side, Math.PI / 180)) : at) }), () => true));
    expect(result.faces[1]!.leanRad! * (180 / Math.PI)).toBeGreaterThan(0.8);
    expect(result.changes.map((change) => change.kind)).toContain("lean");
  });
});

describe("verdicts", () => {
  const long = (mm: number) => first.compare({ ...measured(first, { bend: (mark, at) => (mark === "2" ? vecAddScaled(at, first.wanted.faces[1]!.direction, mm) : at) }), hold: "1" });

  test("one face held: the other comes out by exactly what it is off; go, near and stop by how much of 1/8 in is used", () => {
    expect(long(6.35).faces[1]!.alongMm).toBeCloseTo(6.35, 6);
    expect(long(6.35).faces[0]!.off!.map(Math.abs).every((x) => x < 1e-6)).toBe(true);
    expect([long(2).faces[1]!.verdict, long(3).faces[1]!.verdict, long(3.175 + 0.38).faces[1]!.verdict, long(3.175 + 0.42).faces[1]!.verdict]).toEqual(["go", "near", "near", "stop"]);
  });

  test("tolerances set by hand are the ones judged by; nonsense is said and the usual one taken", () => {
    const document = measured(first, { bend: (mark, at) => (mark === "2" ? vecAddScaled(at, first.wanted.faces[1]!.direction, 6.35) : at) });
    expect(first.compare({ ...document, tolerances: { position: "1/2", square: "1/4", holes: "1/4" } }).verdict).toBe("go");
    const wrong = first.compare({ ...document, tolerances: { position: "-3", square: "x", holes: "" } });
    expect(codes(wrong).filter((code) => code === "tolerance")).toHaveLength(2);
    expect(wrong.tolerances.positionMm).toBeCloseTo(3.175, 9);
  });
});

describe("bad input", () => {
  test.each([["millimetres", 1 / 25.4, "inches"], ["inches", 25.4 / 25.4, "millimetres"], ["feet", 1 / 25.4, "inches"], ["inches", 1 / 304.8, "feet"], ["millimetres", 1 / 1000, "metres"]] as const)("numbers read as %s that are not: said by the ratio of distances, and mended", (readAs, factor, meant) => {
    const document = { ...measured(first, { factor }), readAs };
    const result = first.compare(document);
    const finding = result.findings.find((one) => one.code === "unit")!;
    expect(finding.mend).toEqual({ kind: "read-as", readAs: meant });
    expect(result.verdict).toBe("none");
    expect(first.compare(asFittedMended(document, finding.mend!)).verdict).toBe("go");
  });

  test("names changed over are proposed back, of two and of three", () => {
    for (const names of [{ "1": "2", "2": "1" }, { "1": "2", "2": "3", "3": "1" }] as readonly Record<string, string>[]) {
      const document = asFittedMended(measured(branch), { kind: "rename", names });
      const finding = branch.compare(document).findings.find((one) => one.code === "names")!;
      expect(branch.compare(asFittedMended(document, finding.mend!)).verdict).toBe("go");
    }
  });

  test("a mirrored frame is told and mended, however it came about", () => {
    for (const frame of [([x, y, z]: Vec3): Vec3 => [y, x, z], ([x, y, z]: Vec3): Vec3 => [x, y, -z]]) {
      const document = measured(first, { frame: (p) => frame(away(p)) });
      const finding = first.compare(document).findings.find((one) => one.code === "mirror")!;
      expect(finding.sentence).toContain("mirror image");
      expect(first.compare(asFittedMended(document, finding.mend!)).verdict).toBe("go");
    }
  });

  test("one point measured wrong among five is named; a spool of another size is told", () => {
    const lone = first.compare(measured(first, { bend: (mark, at) => (mark === "W2" ? vecAdd(at, [40, 0, 0]) : at) }));
    expect(lone.findings.find((one) => one.code === "lone")!.mend).toEqual({ kind: "leave-out", of: "W2" });
    expect(codes(first.compare(measured(first, { factor: 1.4 })))).toContain("size");
  });

  test("honest faults are not called slips", () => {
    const random = seededRandom(7);
    for (let k = 0; k < 60; k++) {
      const result = branch.compare(measured(branch, { bend: (_, at) => [at[0] + 6 * (random() - 0.5), at[1] + 6 * (random() - 0.5), at[2] + 6 * (random() - 0.5)] }));
      expect(codes(result).filter((code) => ["unit", "names", "mirror", "size"].includes(code))).toEqual([]);
    }
  });

  test("two points, three on a line, one, none: said, and distances judged where there are two", () => {
    const centres = only(measured(first), (point) => point.what === "centre");
    const two = first.compare(only(centres, (point) => !point.of.startsWith("W")));
    expect([two.verdict, codes(two), two.pairs[0]!.verdict, two.faces[0]!.verdict]).toEqual(["none", ["line"], "go", "none"]);
    const far = first.compare({ ...only(centres, (point) => !point.of.startsWith("W")), points: only(centres, (point) => !point.of.startsWith("W")).points.map((point) => (point.of === "2" ? { ...point, at: [String(Number(point.at[0]) * 1.02), point.at[1]!, point.at[2]!] } : point)) });
    expect(far.verdict).toBe("stop");
    expect(codes(first.compare(only(centres, (point) => point.of === "1")))).toEqual(["few"]);
    expect(first.compare(emptyAsFitted("imperial")).headline).toContain("Nothing is measured yet");
  });

  test("half typed, unreadable, unnamed, unknown, doubled and useless points are each said by name", () => {
    const base = measured(first);
    const add = (...points: Omit<FittedPoint, "id" | "leftOut">[]) => codes(first.compare({ ...base, points: [...base.points, ...points.map((point, i) => ({ ...point, id: `x${i}`, leftOut: false }))] }));
    expect(add({ of: "1", what: "centre", at: ["1", "", "3"] })).toContain("half");
    expect(add({ of: "1", what: "centre", at: ["1", "b", "3"] })).toContain("length");
    expect(add({ of: "", what: "centre", at: ["1", "2", "3"] })).toContain("name");
    expect(add({ of: "9", what: "centre", at: ["1", "2", "3"] })).toContain("name");
    expect(add({ of: "1", what: "centre", at: away([50, 0, 0]).map(String) })).toContain("twice");
    const bare = only(base, (point) => point.what === "centre");
    expect(codes(first.compare({ ...bare, points: [...bare.points, { id: "x", of: "1", what: "axis", at: [...bare.points[0]!.at], leftOut: false }] }))).toContain("axis");
    expect(codes(first.compare({ ...bare, points: [...bare.points, ...[0, 1, 2].map((k): FittedPoint => ({ id: `h${k}`, of: "1", what: "hole", at: [String(k * 40), "0", "0"], leftOut: false }))] }))).toContain("holes");
    expect(codes(first.compare({ ...bare, points: bare.points.map((point) => (point.of === "W1" ? { ...point, at: bare.points[0]!.at } : point)) }))).toContain("same");
    expect(codes(first.compare({ ...base, hold: "7" }))).toContain("hold");
  });

  test("nothing typed makes it throw", () => {
    const random = seededRandom(99);
    const texts = ["", "0", "1e5", "-", "1/0", "999999", "-3 1/2", "NaN", "12'", "𝟙", "1,5", "1e-30"];
    const pick = <T,>(all: readonly T[]): T => all[Math.floor(random() * all.length)]!;
    for (let k = 0; k < 400; k++) {
      const points = Array.from({ length: Math.floor(random() * 12) }, (_, i): FittedPoint => ({ id: `p${i}`, of: pick(["", "1", "2", "3", "W1", "W9"]), what: pick(["centre", "axis", "hole"]), at: [pick(texts), pick(texts), pick(texts)], leftOut: random() < 0.2 }));
      const result = first.compare({ ...emptyAsFitted("imperial", points), hold: pick(["", "1", "2"]), readAs: pick(["inches", "feet", "millimetres", "metres"]), tolerances: { position: pick(texts), square: pick(texts), holes: pick(texts) } });
      expect(result.headline).not.toMatch(/NaN|undefined|Infinity/);
    }
  });
});

describe("documents and pasted rows", () => {
  test("rows of a spreadsheet or an instrument are taken by name", () => {
    const ids = Array.from({ length: 20 }, (_, i) => `id${i}`);
    const { points, refused } = pasteFitted("Name\tE\tN\tU\n1\t0\t0\t0\nend 2\t3-1 1/2\t0\t5\n2 axis\t1\t2\t3\n1 h3\t-1\t2.5\t3\nW2\t4\t5\t6\npump\t1\t2\t3\n3\t1\tx\t2", "inches", ids);
    expect(points.map(({ of, what }) => `${of} ${what}`)).toEqual(["1 centre", "2 centre", "2 axis", "1 hole", "W2 centre"]);
    expect(refused).toEqual([expect.stringContaining('"x" is not a length'), expect.stringContaining('"pump" names no face')]);
  });

  test("what is no document is null", () => {
    expect(parseAsFitted(emptyAsFitted("metric"))).toEqual(emptyAsFitted("metric"));
    for (const value of [null, 3, {}, { ...emptyAsFitted("metric"), hold: "W" }, { ...emptyAsFitted("metric"), readAs: "cubits" }]) expect(parseAsFitted(value)).toBeNull();
  });
});
