/** The smallest box over rotations: known boxes, and a dense grid of rotations (tests/oracle/box-search.ts) on random spools. */
import { describe, expect, it } from "vitest";
import type { Vec3 } from "../../../iso/geometry/types";
import { vecAddScaled, vecRotate, vecUnit } from "../../../iso/geometry/vec3";
import { boxFits, shippingBox, type Disc } from "../../../iso/run/shipping-box";
import { ringPoints, searchBox } from "../../oracle/box-search";
import { seededRandom } from "../../oracle/random";

const ROOM: Vec3 = [12_192, 2_438.4, 2_438.4];
const WIDE: Vec3 = [1e9, 1e9, 1e9];

/** A pipe as its two rims. */
const pipe = (from: Vec3, along: Vec3, length: number, radiusMm: number): Disc[] => {
  const axis = vecUnit(along)!;
  return [{ centre: from, axis, radiusMm }, { centre: vecAddScaled(from, axis, length), axis, radiusMm }];
};
const turn = (discs: readonly Disc[], axis: Vec3, rad: number): Disc[] => discs.map((d) => ({ ...d, centre: vecRotate(d.centre, axis, rad), axis: vecRotate(d.axis, axis, rad) }));

function randomSpool(seed: number): Disc[] {
  const random = seededRandom(seed);
  const discs: Disc[] = [];
  let at: Vec3 = [0, 0, 0];
  let way: Vec3 = [1, 0, 0];
  for (let i = 0; i < 3 + (seed % 4); i++) {
    const length = 300 + random() * 2_500;
    discs.push(...pipe(at, way, length, 57));
    at = vecAddScaled(at, way, length);
    const axis = vecUnit([random() - 0.5, random() - 0.5, random() - 0.5])!;
    way = vecRotate(way, axis, random() < 0.6 ? Math.PI / 2 : random() * 1.2);
  }
  return discs;
}

describe("known boxes", () => {
  it("a straight pipe turned any way is its length by its diameter twice", () => {
    for (const rad of [0, 0.3, 0.7854, 1.2]) {
      const { sizeMm } = shippingBox(turn(pipe([10, 20, 30], [1, 0, 0], 3_000, 57), vecUnit([1, 2, 3])!, rad), ROOM);
      expect(sizeMm).toEqual([expect.closeTo(3_000, 0), expect.closeTo(114, 0), expect.closeTo(114, 0)]);
    }
  });

  it("a U of three square legs lies flat, whichever way it stood", () => {
    const u = [...pipe([0, 0, 0], [1, 0, 0], 2_000, 50), ...pipe([2_000, 0, 0], [0, 1, 0], 1_000, 50), ...pipe([2_000, 1_000, 0], [-1, 0, 0], 2_000, 50)];
    for (const rad of [0, 0.4, 1]) {
      const { sizeMm } = shippingBox(turn(u, vecUnit([3, -1, 2])!, rad), ROOM);
      expect(sizeMm[0]).toBeCloseTo(2_050, -1);
      expect(sizeMm[1]).toBeCloseTo(1_100, -1);
      expect(sizeMm[2]).toBeCloseTo(100, 0);
    }
  });

  it("a zigzag along a diagonal goes into a room its upright box does not fit", () => {
    const zigzag = Array.from({ length: 6 }, (_, i) => pipe([i * 1_500, Math.floor((i + 1) / 2) * 2 * 700, 0], [1, 0, 0], 1_500, 57)).flat();
    const upright: Vec3 = [9_114, 4_314, 114];
    expect(boxFits(upright, ROOM)).toBe(false);
    const found = shippingBox(zigzag, ROOM);
    expect(found.overMm).toBe(0);
    expect(boxFits(found.sizeMm, ROOM)).toBe(true);
  });

  it("says by how much a spool stands out of the room", () => {
    const long = pipe([0, 0, 0], [1, 1, 0], 16_000, 57);
    const { overMm } = shippingBox(long, ROOM);
    expect(overMm).toBeGreaterThan(2_000);
    expect(Math.abs(overMm / searchBox(ringPoints(long), 2, ROOM).leastOver - 1)).toBeLessThan(0.05);
  });
});

describe("against a dense grid of rotations", () => {
  it("is no more than 1 % above the smallest volume of the grid on 30 random spools, and its excess over a room within 1 % of the room", () => {
    const room: Vec3 = [3_000, 900, 900];
    for (let seed = 1; seed <= 30; seed++) {
      const discs = randomSpool(seed);
      const grid = searchBox(ringPoints(discs), 6, room);
      const { sizeMm } = shippingBox(discs, WIDE);
      const volume = sizeMm[0] * sizeMm[1] * sizeMm[2];
      if (volume > grid.volume * 1.01) throw new Error(`seed ${seed}: ${volume} against ${grid.volume}, ${sizeMm.join(" x ")} against ${grid.sizes.join(" x ")}`);
      const over = shippingBox(discs, room).overMm;
      if (over > grid.leastOver + room[0] * 0.01) throw new Error(`seed ${seed}: stands out by ${over}, the grid says ${grid.leastOver}`);
    }
  });

  it("holds the spool: no rim point outside it along its longest side", () => {
    for (let seed = 40; seed < 60; seed++) {
      const discs = randomSpool(seed);
      const { sizeMm, along } = shippingBox(discs, ROOM);
      const at = ringPoints(discs).map((p) => p[0] * along[0] + p[1] * along[1] + p[2] * along[2]);
      expect(Math.max(...at) - Math.min(...at)).toBeLessThan(sizeMm[0] + 0.001);
    }
  });

  it("is the same for the same spool, and agrees with itself on many rims", () => {
    const discs = randomSpool(7);
    expect(shippingBox(discs, ROOM)).toEqual(shippingBox(discs, ROOM));
    const many = discs.flatMap((d) => Array.from({ length: 20 }, (_, i) => ({ ...d, radiusMm: d.radiusMm * (1 - i / 40) })));
    const [few, all] = [shippingBox(discs, WIDE).sizeMm, shippingBox(many, WIDE).sizeMm];
    expect(all[0] * all[1] * all[2]).toBeLessThan(few[0] * few[1] * few[2] * 1.02);
  });
});
