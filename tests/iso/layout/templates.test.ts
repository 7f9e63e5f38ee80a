/** Templates wrapped back on their pipes in numbers: the cut must lie on the run, on the mitre's plane, on the elbow's face. */
import { describe, expect, test } from "vitest";
import { buildModel, emptyMarks, pipeWall, tilesOf, type Vec3 } from "@/iso";
import { vecDot, vecLength, vecReject, vecSub } from "@/iso/geometry/vec3";
import type { SaddleInput } from "@/iso/layout/saddle";
import { spoolTemplates, wrapPoint } from "@/iso/layout/spool-templates";
import { elbowTemplate, holeTemplate, mitreTemplate, saddleTemplate, type Template } from "@/iso/layout/template";
import { cutY } from "@/iso/layout/template-items";
import { PAPER_THICKNESS_MM, wrapRadiusMm } from "@/iso/layout/wrap";
import { branchRun, TEMPLATE_RUNS } from "./bench-inputs";

const INCH = 25.4;
const WITHIN_MM = 0.05;
const DEG = Math.PI / 180;

const run6 = pipeWall("6", "STD", "imperial")!;
const branch4 = pipeWall("4", "STD", "imperial")!;

const saddleOf = (set: "on" | "in", angleDeg: number, offsetMm: number): SaddleInput => ({
  runRadiusMm: run6.odMm / 2, branchRadiusMm: branch4.odMm / 2 - (set === "on" ? branch4.wallMm : 0), branchOdMm: branch4.odMm, angleRad: angleDeg * DEG, offsetMm,
});

const [RUN, OUT]: readonly [Vec3, (angleDeg: number) => Vec3] = [[1, 0, 0], (a) => [Math.cos(a * DEG), 0, Math.sin(a * DEG)]];

function saddle(set: "on" | "in", angleDeg: number, offsetMm: number, paperMm = PAPER_THICKNESS_MM): { template: Template; input: SaddleInput; axis: Vec3; zero: Vec3 } {
  const input = saddleOf(set, angleDeg, offsetMm);
  const out = OUT(angleDeg);
  const axis: Vec3 = [-out[0], -out[1], -out[2]];
  const zero: Vec3 = [Math.sin(angleDeg * DEG), 0, -Math.cos(angleDeg * DEG)];
  const template = saddleTemplate({ title: "", facts: [], keep: "", odMm: branch4.odMm, paperMm, axis, zero, saddle: input, skirtMm: 30 });
  if (typeof template === "string") throw new Error(template);
  return { template, input, axis, zero };
}

/** Height of a paper point above the base line of its template. */
const up = (template: Template, y: number): number => template.baseY - y;

describe("saddles wrapped on the branch meet the run's surface", () => {
  const cases = (["on", "in"] as const).flatMap((set) => [90, 75, 60, 45].flatMap((angle) => [0, 9, -14].map((offset) => [set, angle, offset] as const)));
  test.each(cases)("set %s at %d°, axes %d mm apart", (set, angleDeg, offsetMm) => {
    const { template, input, axis, zero } = saddle(set, angleDeg, offsetMm);
    // The foot of the common perpendicular stands where the longest reach ends: its shortest reach is at the top of the cut.
    const topY = Math.min(...template.cut.map(([, y]) => y));
    const shortest = Math.min(...template.cut.map((_, i) => reachOf(input, (2 * Math.PI * i) / (template.cut.length - 1))));
    const right: Vec3 = [axis[1] * zero[2] - axis[2] * zero[1], axis[2] * zero[0] - axis[0] * zero[2], axis[0] * zero[1] - axis[1] * zero[0]];
    const foot: Vec3 = [right[0] * offsetMm, right[1] * offsetMm, right[2] * offsetMm];
    for (const [x, y] of template.cut) {
      const onOutside = wrapPoint(branch4.odMm, PAPER_THICKNESS_MM, axis, zero, foot, x, -(shortest + y - topY));
      // The cut goes square to the branch's own axis: set on, its inner edge is what rests on the run.
      const across = vecReject(vecSub(onOutside, foot), axis);
      const shrink = input.branchRadiusMm / (branch4.odMm / 2);
      const edge: Vec3 = [0, 1, 2].map((k) => onOutside[k]! - across[k]! * (1 - shrink)) as unknown as Vec3;
      expect(Math.abs(vecLength(vecReject(edge, RUN)) - input.runRadiusMm)).toBeLessThan(WITHIN_MM);
    }
  });

  /** Slow and by itself: from the two surfaces' equations, not from the code under test. */
  function reachOf({ runRadiusMm, branchRadiusMm, angleRad, offsetMm }: SaddleInput, phi: number): number {
    const across = offsetMm + branchRadiusMm * Math.sin(phi);
    return (Math.sqrt(runRadiusMm ** 2 - across ** 2) + branchRadiusMm * Math.cos(phi) * Math.cos(angleRad)) / Math.sin(angleRad);
  }

  test("4 on 6 STD: depth 0.682 in set on by the inside radius, 0.881 in set in by the outside (hand sums from ASME B36.10M sizes)", () => {
    const depth = (set: "on" | "in") => {
      const ys = saddle(set, 90, 0).template.cut.map(([, y]) => y);
      return (Math.max(...ys) - Math.min(...ys)) / INCH;
    };
    expect(depth("on")).toBeCloseTo(0.682, 3);
    expect(depth("in")).toBeCloseTo(0.881, 3);
  });

  test("a template that leaves the paper's thickness out is too short to meet itself", () => {
    expect(saddle("on", 90, 0, 0).template.widthMm).toBeCloseTo(Math.PI * branch4.odMm, 9);
    expect(saddle("on", 90, 0).template.widthMm - saddle("on", 90, 0, 0).template.widthMm).toBeCloseTo(Math.PI * PAPER_THICKNESS_MM, 9);
  });

  test("a branch that reaches past its run is told in words", () => {
    const input = saddleOf("in", 90, 60);
    expect(holeTemplate({ title: "", facts: [], saddle: input, paperMm: 0.1 })).toMatch(/past the side of the run/);
  });
});

describe("holes wrapped on the run lie on the branch", () => {
  test.each([["on", 90, 0], ["in", 90, 0], ["in", 60, 8], ["on", 45, -12]] as const)("set %s at %d°, axes %d mm apart", (set, angleDeg, offsetMm) => {
    const input = saddleOf(set, angleDeg, offsetMm);
    const template = holeTemplate({ title: "", facts: [], saddle: input, paperMm: PAPER_THICKNESS_MM });
    if (typeof template === "string") throw new Error(template);
    const [line, across] = [template.lines[0]!, template.across[0]!];
    const out = OUT(angleDeg);
    for (const [x, y] of template.cut) {
      const turn = (x - line.xMm) / wrapRadiusMm(2 * input.runRadiusMm, PAPER_THICKNESS_MM);
      // Up on the paper is the run's direction, x; the branch's side, z, faces the reader; right is then x cross z, -y.
      const point: Vec3 = [across.y - y, -input.runRadiusMm * Math.sin(turn), input.runRadiusMm * Math.cos(turn)];
      const foot: Vec3 = [0, -offsetMm, 0];
      expect(Math.abs(vecLength(vecReject(vecSub(point, foot), out)) - input.branchRadiusMm)).toBeLessThan(WITHIN_MM);
    }
  });
});

describe("mitres and elbows", () => {
  test("a mitre's cut wrapped on the pipe lies in one plane, the cut angle off square", () => {
    const [axis, zero]: readonly [Vec3, Vec3] = [[0, 0, 1], [1, 0, 0]];
    const cutAngleRad = 22.5 * DEG;
    const template = mitreTemplate({ title: "", facts: [], keep: "", odMm: 323.8, paperMm: 0.1, axis, zero, cutAngleRad, skirtMm: 30 });
    const long = wrapPoint(323.8, 0.1, axis, zero, [0, 0, 0], 0, up(template, template.cut[0]![1]));
    const normal: Vec3 = [-Math.sin(cutAngleRad), 0, Math.cos(cutAngleRad)];
    for (const [x, y] of template.cut) expect(Math.abs(vecDot(vecSub(wrapPoint(323.8, 0.1, axis, zero, [0, 0, 0], x, up(template, y)), long), normal))).toBeLessThan(WITHIN_MM);
  });

  test("an elbow's strips end on one plane through the centre point", () => {
    const [odMm, radiusMm, angleRad] = [168.3, 229, 40 * DEG];
    const template = elbowTemplate({ title: "", facts: [], keep: "", odMm, paperMm: 0.1, axis: [0, 0, 1], zero: [1, 0, 0], radiusMm, angleRad, face: "" });
    for (const [x, y] of template.cut) {
      const phi = x / wrapRadiusMm(odMm, 0.1);
      const meridian = radiusMm + (odMm / 2) * Math.cos(phi);
      expect(Math.abs(up(template, y) / meridian - angleRad)).toBeLessThan(WITHIN_MM / meridian);
    }
    // NPS 6 LR at 40° from the millimetre column of ASME B16.9, worked by hand: throat 101.1, sides 159.9, back 218.6 mm.
    const at = (station: number) => up(template, cutY(template, template.lines.find((line) => line.number === String(station))!.xMm));
    expect([at(8), at(4), at(0)].map((mm) => Math.round(mm * 10) / 10)).toEqual([101.1, 159.9, 218.6]);
  });
});

describe("templates of a spool", () => {
  test.each(Object.entries(TEMPLATE_RUNS))("%s: one for every cut end, hole and trimmed elbow", (_, document) => {
    const model = buildModel(document, emptyMarks(), []);
    for (const spool of model.spools) {
      const pieces = model.pieces.filter((piece) => spool.pieceKeys.includes(piece.key));
      const mitred = pieces.flatMap((piece) => piece.ends).filter((one) => one.prep === "mitre").length;
      const count = (kind: string) => model.components.filter((c) => spool.componentIds.includes(c.id) && c.kind === kind).length;
      const { templates, notes } = spoolTemplates(model, spool, PAPER_THICKNESS_MM);
      expect([templates.length, notes]).toEqual([mitred + 2 * count("stub-in") + count("trimmed-elbow"), []]);
    }
  });

  test("the base line of a branch stands as far from its other end as the facts say", () => {
    const model = buildModel(branchRun("on"), emptyMarks(), []);
    const { templates } = spoolTemplates(model, model.spools[0]!, PAPER_THICKNESS_MM);
    // 36 in to the flange face, hub 3, gap 1/8; run centre to ears sqrt(3.3125² - 2.013²) = 2.631, depth 0.682, skirt 30 mm, gap 1/8.
    const wanted = 36 - 3 - 0.125 - 3.3125 - 30 / INCH - 0.125;
    const said = /Base line: (\d+) (\d+)\/(\d+) in/.exec(templates[0]!.facts.join(" "))!;
    expect(Number(said[1]) + Number(said[2]) / Number(said[3])).toBeCloseTo(wanted, 1);
  });
});

describe("tiles", () => {
  const rooms = [[237, 140], [237, 105], [60, 44], [900, 900]] as const;
  test.each(rooms)("windows of %d x %d mm cover every template without a gap and share a strip", (widthMm, heightMm) => {
    for (const [w, h] of [[359.4, 83.7], [1017.6, 205.1], [60, 44], [237.5, 140.5]] as const) {
      const tiles = tilesOf(w, h, { widthMm, heightMm });
      for (const tile of tiles) {
        expect(tile.shown.maxX - tile.shown.minX).toBeLessThanOrEqual(widthMm + 1e-9);
        expect(tile.shown.maxY - tile.shown.minY).toBeLessThanOrEqual(heightMm + 1e-9);
        const next = tiles.find((other) => other.row === tile.row && other.column === tile.column + 1);
        if (next) expect(tile.shown.maxX - next.shown.minX).toBeGreaterThanOrEqual(12 - 1e-9);
        else expect(tile.shown.maxX).toBeCloseTo(w, 9);
        const under = tiles.find((other) => other.column === tile.column && other.row === tile.row + 1);
        if (under) expect(tile.shown.maxY - under.shown.minY).toBeGreaterThanOrEqual(12 - 1e-9);
        else expect(tile.shown.maxY).toBeCloseTo(h, 9);
        if (next) expect(tile.joinsX.at(-1)).toBeCloseTo(next.joinsX[0]!, 9);
        if (under) expect(tile.joinsY.at(-1)).toBeCloseTo(under.joinsY[0]!, 9);
      }
      expect([tiles[0]!.shown.minX, tiles[0]!.shown.minY]).toEqual([0, 0]);
      expect(tiles).toHaveLength(tiles[0]!.rows * tiles[0]!.columns);
    }
  });
});
