/** What each reading does to the surveyed ends: together they are the ends' covariance, as the adjustment has it. */
import { describe, expect, test } from "vitest";
import { emptySurvey, endCrossCovariance, endInfluences, surveyResult, type SurveyDocument, type SurveyReading, type Vec3 } from "@/iso";

const SPOTS: Readonly<Record<string, Vec3>> = { A: [0, 0, 0], B: [96, 0, 0], C: [40, 72, 0], D: [50, 20, 60], E: [110, 60, 40], F: [20, 50, 80] };
const NAMES = Object.keys(SPOTS);

function survey(): SurveyDocument {
  const base = { again: ["", "", ""], tolerance: "", leftOut: false, note: "" };
  const known = ["A", "B", "C"].map((name): SurveyReading => ({ ...base, id: `k${name}`, kind: "point", from: "", to: name, first: SPOTS[name]!.map(String), tool: "known" }));
  const tapes = NAMES.flatMap((from, i) => NAMES.slice(i + 1).flatMap((to): SurveyReading[] => {
    if ("ABC".includes(to)) return [];
    const apart = Math.hypot(...SPOTS[from]!.map((v, k) => v - SPOTS[to]![k]!));
    return [{ ...base, id: `${from}${to}`, kind: "tape", from, to, first: [String(Math.round(apart * 64) / 64)], tool: "tape", again: [from === "D" ? String(Math.round(apart * 64) / 64) : ""] }];
  }));
  const heights = ["D", "E", "F"].map((to): SurveyReading => ({ ...base, id: `h${to}`, kind: "offset", from: "A", to, first: ["", "", String(SPOTS[to]![2])], tool: "level" }));
  return {
    ...emptySurvey("imperial"), readings: [...known, ...tapes, ...heights],
    ends: [
      { id: "one", name: "N1", centre: "D", axis: { kind: "line", back: "F" }, tolerance: "" },
      { id: "two", name: "N2", centre: "E", axis: { kind: "face", points: "W", circle: "6", distances: ["10", "10", "10", "10"] }, tolerance: "" },
    ],
  };
}

describe("influences on surveyed ends", () => {
  const document = survey();
  const { adjustment, ends } = surveyResult(document, 114.3);
  const influences = endInfluences(document, adjustment!, ["one", "two"]);

  test("their squares add up to each end's covariance", () => {
    ends.forEach(({ covariance }, at) => {
      const columns = influences.flatMap((each) => each.columns).map((column) => column.slice(at * 6, at * 6 + 6));
      covariance.forEach((row, i) => row.forEach((value, j) => {
        expect(columns.reduce((sum, column) => sum + column[i]! * column[j]!, 0)).toBeCloseTo(value, 9);
      }));
    });
  });

  test("between two ends of one survey: the adjustment's own block for their centres", () => {
    const cross = endCrossCovariance(document, adjustment!, "one", "two")!;
    const [d, e] = ["D", "E"].map((mark) => adjustment!.order.indexOf(mark) * 3);
    for (const i of [0, 1, 2]) for (const j of [0, 1, 2]) expect(cross[i]![j]!).toBeCloseTo(adjustment!.covariance[d! + i]![e! + j]!, 9);
    expect(Math.max(...cross.flat().map(Math.abs))).toBeGreaterThan(0.001);
  });

  test("each tape is one influence, read twice two columns; the face's readings are one of their own", () => {
    expect(influences.find((each) => each.readingId === "AD")!.name).toBe("Tape A-D");
    expect(influences.find((each) => each.readingId === "DF")!.columns).toHaveLength(2);
    expect(influences.find((each) => each.readingId === "kA")).toBeUndefined();
    const face = influences.find((each) => each.readingId === null)!;
    expect(face.name).toBe("Face of N2, its direction");
    expect(face.columns.every((column) => column.slice(0, 6).every((v) => v === 0))).toBe(true);
  });

  test("an end that is not placed has none", () => {
    expect(endInfluences(document, adjustment!, ["one", "three"])).toEqual([]);
    expect(endCrossCovariance(document, adjustment!, "one", "three")).toBeNull();
  });
});
