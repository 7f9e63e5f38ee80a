/** What a survey says in words, and the ends it comes to. Dimensions are our own; geometry checked by hand. */
import { describe, expect, test } from "vitest";
import { emptySurvey, INCH_MM, pastePoints, surveyResult, type SurveyDocument, type SurveyEnd, type SurveyReading, type Vec3 } from "@/iso";
import { endsClash } from "@/iso/survey/survey-ends";

let count = 0;
function tape(from: string, to: string, first: string, again = ""): SurveyReading {
  return { id: `t${(count += 1)}`, kind: "tape", from, to, first: [first], again: [again], tool: "tape", tolerance: "", leftOut: false, note: "" };
}
function point(to: string, at: readonly [string, string, string], tool: SurveyReading["tool"] = "known"): SurveyReading {
  return { id: `p${(count += 1)}`, kind: "point", from: "", to, first: [...at], again: ["", "", ""], tool, tolerance: "", leftOut: false, note: "" };
}
function offset(from: string, to: string, at: readonly [string, string, string]): SurveyReading {
  return { ...point(to, at, "tape"), kind: "offset", from };
}
const survey = (readings: SurveyReading[], ends: SurveyEnd[] = []): SurveyDocument => ({ ...emptySurvey("imperial"), readings, ends });
const codes = (document: SurveyDocument) => surveyResult(document, 114.3).findings.map((each) => each.code);
const words = (document: SurveyDocument) => surveyResult(document, 114.3).findings.map((each) => each.sentence).join(" ");
/** Inches between two points, to a sixty-fourth. */
const inches = (a: readonly number[], b: readonly number[]) => String(Math.round(Math.hypot(...a.map((v, i) => v - b[i]!)) * 64) / 64);

const SPOTS: Readonly<Record<string, Vec3>> = { A: [0, 0, 0], B: [96, 0, 0], C: [40, 72, 0], D: [50, 20, 60], E: [110, 60, 40], F: [20, 50, 80] };
const PAIRS = Object.keys(SPOTS).flatMap((a, i, all) => all.slice(i + 1).map((b) => [a, b] as const));
const LEVELS = [offset("A", "D", ["", "", "60"]), offset("A", "B", ["", "", "0"]), offset("A", "C", ["", "", "0"])];
const network = (change: Readonly<Record<string, string>> = {}) => survey([...PAIRS.map(([a, b]) => tape(a, b, change[`${a}-${b}`] ?? inches(SPOTS[a]!, SPOTS[b]!))), ...LEVELS]);

describe("readings in words", () => {
  test("a whole set of tapes fits and is placed without a starting guess", () => {
    const { adjustment, marks, findings } = surveyResult(network(), 114.3);
    expect(adjustment!.fits).toBe(true);
    expect(findings.map((each) => each.code)).toEqual(["datum"]);
    const [a, b] = ["A", "B"].map((name) => marks.find((each) => each.name === name)!.position);
    expect(Math.hypot(...a!)).toBeLessThan(0.001);
    expect(Math.abs(b![1])).toBeLessThan(0.001);
    const e = marks.find((each) => each.name === "E")!.position;
    const f = marks.find((each) => each.name === "F")!.position;
    expect(Math.hypot(e[0] - f[0], e[1] - f[1], e[2] - f[2]) / INCH_MM).toBeCloseTo(Math.hypot(90, 10, 40), 1);
  });

  test("a tape an inch off is named, with its size and what to do", () => {
    const off = String(Number(inches(SPOTS.D!, SPOTS.F!)) + 1);
    expect(words(network({ "D-F": off }))).toMatch(/Tape D-F disagrees with the rest by about (15\/16|1|1 1\/16) in; measure D-F again\./);
  });

  test("only the reading that is off is blamed on its card, not those it pulls along", () => {
    const { readings } = surveyResult(network({ "D-F": String(Number(inches(SPOTS.D!, SPOTS.F!)) + 1) }), 114.3);
    expect(readings.filter((each) => each.off)).toHaveLength(1);
    expect(readings.some((each) => each.words === "Pulled by a reading that is off")).toBe(true);
  });

  test("one level reading leaves the tilt the other way free, and that is said", () => {
    const tapes = PAIRS.map(([a, b]) => tape(a, b, inches(SPOTS[a]!, SPOTS[b]!)));
    expect(words(survey([...tapes, LEVELS[0]!]))).toContain("holds the tilt one way only");
  });

  test("two readings of one tape that disagree", () => {
    expect(words(survey([tape("D", "F", "43 5/8", "44")]))).toContain("These two disagree by 3/8 in; measure D-F again.");
    expect(codes(survey([tape("D", "F", "43 5/8", "43 11/16")]))).not.toContain("readings-disagree");
  });

  test.each([
    ["D-F", INCH_MM, "millimetres were entered as inches"],
    ["B-E", 1 / 12, "feet were entered as inches"],
  ])("a slip of unit at %s by %s", (pair, factor, told) => {
    const [a, b] = pair.split("-") as [string, string];
    const text = String(Math.round(Number(inches(SPOTS[a]!, SPOTS[b]!)) * factor * 100) / 100);
    expect(words(network({ [pair]: text }))).toContain(`Tape ${pair} reads`);
    expect(words(network({ [pair]: text }))).toContain(told);
  });

  test("all tapes in millimetres among points in inches", () => {
    const known = ["A", "B", "C"].map((mark) => point(mark, SPOTS[mark]!.map(String) as [string, string, string]));
    const tapes = PAIRS.filter(([, b]) => !["B", "C"].includes(b)).map(([a, b]) => tape(a, b, String(Math.round(Number(inches(SPOTS[a]!, SPOTS[b]!)) * 25.4))));
    expect(words(survey([...known, ...tapes]))).toContain("millimetres were entered as inches");
  });

  test("a mark on two tapes is said to hang, and from where to measure", () => {
    const known = ["A", "B", "D", "E"].map((mark) => point(mark, SPOTS[mark]!.map(String) as [string, string, string]));
    expect(words(survey([...known, tape("A", "C", inches(SPOTS.A!, SPOTS.C!)), tape("B", "C", inches(SPOTS.B!, SPOTS.C!))]))).toContain("Mark C hangs on two tapes only (C-A, C-B): give one more from D or E.");
  });

  test("a mark on three tapes from one line can swing", () => {
    const known = [point("A", ["0", "0", "0"]), point("B", ["40", "0", "0"]), point("C", ["80", "0", "0"])];
    const text = words(survey([...known, ...["A", "B", "C"].map((m, i) => tape(m, "D", String(Math.hypot(20 - 40 * i, 30))))]));
    expect(text).toMatch(/Mark D (can still swing: A, B and C stand nearly on one line|is placed within)/);
  });

  test("missing, doubled and impossible readings", () => {
    expect(codes(survey([tape("A", "", "5")]))).toContain("missing-mark");
    expect(codes(survey([tape("A", "B", "")]))).toContain("missing-reading");
    expect(codes(survey([tape("A", "a ", "5")]))).toContain("same-mark");
    expect(codes(survey([tape("A", "B", "0")]))).toContain("zero-length");
    expect(words(survey([tape("A", "B", "5 1/3")]))).toContain("A tape has no 1/3");
    expect(words(survey([tape("A", "B", "5"), tape("B", "A", "5")]))).toContain("Tape A-B is entered 2 times");
    expect(surveyResult(survey([]), 100)).toMatchObject({ marks: [], findings: [] });
  });

  test("tapes alone cannot tell above from below, one level reading can", () => {
    const tapes = PAIRS.map(([a, b]) => tape(a, b, inches(SPOTS[a]!, SPOTS[b]!)));
    expect(codes(survey(tapes))).toContain("mirror");
    expect(codes(survey([...tapes, ...LEVELS]))).not.toContain("mirror");
  });
});

describe("ends", () => {
  const centre = point("N", ["100", "20", "30"], "total-station");
  const end = (axis: SurveyEnd["axis"], name = "N1"): SurveyEnd => ({ id: "e1", name, centre: "N", axis, tolerance: "" });
  const only = (document: SurveyDocument) => surveyResult(document, 114.3).ends[0];

  test("a face read by a level leans as its gaps say: 1/4 in over 12 in at the top looks up", () => {
    const found = only(survey([centre], [end({ kind: "level", points: "E", uprightLean: "1/4", uprightSpan: "12", levelLean: "0", levelSpan: "12" })]))!;
    expect(found.axis[2] / found.axis[0]).toBeCloseTo(0.25 / 12, 9);
    expect(found.axis[1]).toBeCloseTo(0, 9);
    // ± 1/32 in over 12 in each way: √2/384 of a radian.
    expect(found.axisWithinRad).toBeCloseTo(Math.SQRT2 / 384, 5);
    expect(found.positionWithinMm).toBeCloseTo(2 * Math.sqrt(3), 3);
  });

  test("four distances to a plane: looking west at a face to the east, 3 o'clock is north", () => {
    const found = only(survey([centre], [end({ kind: "face", points: "E", circle: "10", distances: ["12", "12 1/2", "12", "12"] })]))!;
    expect(found.axis[1]).toBeGreaterThan(0.02);
    const flat = survey([centre], [end({ kind: "face", points: "E", circle: "10", distances: ["12", "12 1/2", "12", "12"] })]);
    expect(words(flat)).toContain("12 and 6 o'clock together miss 3 and 9 o'clock by 1/2 in");
    const true4 = only(survey([centre], [end({ kind: "face", points: "E", circle: "10", distances: ["12", "12 1/4", "12", "11 3/4"] })]))!;
    expect(true4.axis[1] / true4.axis[0]).toBeCloseTo(0.25 / 5, 9);
  });

  test("bolt holes give the circle's centre and the way it faces", () => {
    const holes = [[0, 4, 3], [0, 4, -3], [0, -4, -3], [0, -3, 4]].map(([e, n, u], i) => point(`H${i}`, [String(10 + e!), String(n), String(u)], "tracker"));
    const found = only(survey(holes, [{ ...end({ kind: "holes", points: "W", marks: ["H0", "H1", "H2", "H3"] }), centre: "" }]))!;
    expect(found.position.map((mm) => mm / INCH_MM)).toEqual([expect.closeTo(10, 6), expect.closeTo(0, 6), expect.closeTo(0, 6)]);
    expect(found.axis).toEqual([expect.closeTo(-1, 9), expect.closeTo(0, 9), expect.closeTo(0, 9)]);
    expect(found.positionWithinMm).toBeLessThan(0.3);
  });

  test("two marks on the pipe: covariance from both, by hand", () => {
    const back = point("K", ["60", "20", "30"], "total-station");
    const found = only(survey([centre, back], [end({ kind: "line", back: "K" })]))!;
    expect(found.axis).toEqual([expect.closeTo(1, 9), expect.closeTo(0, 9), expect.closeTo(0, 9)]);
    // σ 1 mm at both marks 40 in apart: √2/1016 rad sideways in each of two directions, and position tied to axis.
    expect(found.covariance[4]![4]).toBeCloseTo(2 / 1016 ** 2, 10);
    expect(found.covariance[1]![4]).toBeCloseTo(1 / 1016, 7);
  });

  test("what an end lacks is said", () => {
    const told = (axis: SurveyEnd["axis"], readings = [centre]) => words(survey(readings, [end(axis)]));
    expect(told({ kind: "bearing", points: "" })).toContain("say which way it faces");
    expect(told({ kind: "line", back: "N" })).toContain("name another mark");
    expect(told({ kind: "line", back: "K" }, [centre, point("K", ["100", "20", "30"])])).toContain("has no direction");
    expect(told({ kind: "holes", points: "E", marks: ["N"] })).toContain("three bolt holes");
    const line = ["0", "1", "2"].map((n) => point(`L${n}`, [n, "0", "0"], "tracker"));
    expect(told({ kind: "holes", points: "E", marks: ["L0", "L1", "L2"] }, line)).toContain("on one line");
    expect(told({ kind: "bearing", points: "E" }, [tape("A", "B", "5")])).toContain("mark N has no reading yet");
  });

  test("ends in one spot, and ends inside each other", () => {
    const east = { position: [0, 0, 0] as Vec3, axis: [1, 0, 0] as Vec3 };
    const west = (e: number, n = 0) => ({ position: [e, n, 0] as Vec3, axis: [-1, 0, 0] as Vec3 });
    expect(endsClash(east, west(0), 100)).toContain("one spot");
    expect(endsClash(east, west(-50), 100)).toContain("inside its pipe");
    expect(endsClash(east, west(-50, 300), 100)).toBeNull();
    expect(endsClash(east, west(500), 100)).toBeNull();
  });
});

describe("pasted points", () => {
  test("a heading is passed over, sigma becomes a tolerance of two deviations, bad rows are named", () => {
    const ids = Array.from({ length: 9 }, (_, i) => `i${i}`);
    const { readings, refused } = pastePoints("Point,E,N,U,sigma\nA,1000,2000,300,0.5\nB;1;2;3\nC,1,x,3\n,1,2,3", "metric", "total-station", ids);
    expect(readings.map((each) => [each.to, ...each.first, each.tolerance])).toEqual([["A", "1000", "2000", "300", "1"], ["B", "1", "2", "3", ""]]);
    expect(refused).toEqual([`Row 4: "x" is not a length.`, "Row 5: the mark's name is missing."]);
  });
});

test("a mark on three tapes stands on either side of their plane until a level reading says which", () => {
  const known = ["A", "B", "C"].map((mark) => point(mark, SPOTS[mark]!.map(String) as [string, string, string]));
  const tapes = ["A", "B", "C"].map((mark) => tape(mark, "D", inches(SPOTS[mark]!, SPOTS.D!)));
  expect(words(survey([...known, ...tapes]))).toMatch(/Mark D could stand in two places (10'-0"|9'-11 15\/16"|10'-0 1\/16") apart, on either side of A, B and C; the upper place is taken/);
  const below = surveyResult(survey([...known, ...tapes, offset("A", "D", ["", "", "-60"])]), 114.3);
  expect(below.findings).toEqual([]);
  expect(below.marks.find((each) => each.name === "D")!.position[2] / INCH_MM).toBeCloseTo(-60, 1);
});

test("where two readings explain a misfit equally well, both are named", () => {
  const known = ["A", "B", "C"].map((mark) => point(mark, SPOTS[mark]!.map(String) as [string, string, string]));
  // One reading more than needed: no test can tell which of the four is wrong.
  const tapes = ["A", "B", "C"].map((mark) => tape(mark, "D", inches(SPOTS[mark]!, SPOTS.D!)));
  const text = words(survey([...known, ...tapes, offset("A", "D", ["", "", "61"])]));
  expect(text).toMatch(/Tape A-D, tape B-D, tape C-D or offset A-D is off, by about .* (in|\d\"); they explain it equally well, so measure A-D, B-D, C-D and A-D again\./);
});
