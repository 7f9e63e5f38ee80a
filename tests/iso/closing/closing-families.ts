/**
 * Seeded closings by family. All but the impossible ones are walked from end 0 (tests/oracle/closing-walk.ts), so that an
 * answer is known to exist; the impossible ones are made so that a stated reason forbids one. Inches; radii of NPS 2 to 24.
 */
import type { ClosingInput, ClosingReason } from "@/iso";
import { closingWalk, turned, unit, type V, type Walk } from "../../oracle/closing-walk";

export interface Case {
  readonly input: ClosingInput;
  /** How it was walked; null for what cannot be. */
  readonly walk: Walk | null;
  /** Why it must be refused; null when it must close. */
  readonly reason: ClosingReason | null;
}

type Random = () => number;
type Family = (random: Random, index: number) => Case;

const DEG = Math.PI / 180;
const RIGHT = Math.PI / 2;
const RADII = [3, 6, 9, 12, 18, 36];

const cross = (a: V, b: V): V => [a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]];
const dot = (a: V, b: V): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
const pick = <T>(random: Random, list: readonly T[]): T => list[Math.floor(random() * list.length)]!;

export function randomDirection(random: Random): V {
  const z = 2 * random() - 1;
  const t = 2 * Math.PI * random();
  const q = Math.sqrt(1 - z * z);
  return [q * Math.cos(t), q * Math.sin(t), z];
}

function across(random: Random, way: V): V {
  return turned(unit(cross(way, Math.abs(way[2]) < 0.9 ? [0, 0, 1] : [1, 0, 0])), way, 2 * Math.PI * random());
}

/** A closing of any shape: pipes of 0.1 in to 20 ft, bends of 0.1° to 90°, some with tangents and gaps. */
function anyWalk(random: Random, more: Partial<Walk> = {}): Walk {
  const d0 = more.d0 ?? randomDirection(random);
  const angle = () => (0.1 + 89.9 * random()) * DEG;
  return {
    p0: [200 * random(), 200 * random(), 200 * random()], d0, r0: pick(random, RADII), r1: pick(random, RADII),
    a: pick(random, [0, 0, 3, 6.25]), b: pick(random, [0, 0, 4, 12]), gap: pick(random, [0, 0.0625, 0.125]), axis0: across(random, d0),
    theta0: angle(), length: 0.1 + 240 * random() ** 2, roll: 2 * Math.PI * random(), theta1: angle(), ...more,
  };
}

function walked(walk: Walk, thetaMax = RIGHT, reason: ClosingReason | null = null): Case {
  const { p0, d0, r0, r1, a, b, gap } = walk;
  const { p1, d1 } = closingWalk(walk);
  return { input: { p0, d0, p1, d1, r0, r1, a, b, gap, thetaMax }, walk, reason };
}

/** Ends whose axes are square to each other, along the plant's: out of one, a pipe anyhow, into the other. */
function perpendicular(random: Random): Case {
  const d0 = pick<V>(random, [[1, 0, 0], [0, 1, 0], [0, 0, 1], [-1, 0, 0]]);
  const out = pick<V>(random, ([[1, 0, 0], [0, 1, 0], [0, 0, 1], [0, 0, -1]] as V[]).filter((way) => Math.abs(dot(way, d0)) < 0.5));
  const third = cross(d0, out);
  const u = unit([0, 1, 2].map((i) => (0.02 + random()) * d0[i]! + (0.02 + random()) * out[i]! + (2 * random() - 1) * third[i]!) as V);
  const [axis0, axis1] = [unit(cross(d0, u)), unit(cross(u, out))];
  const roll = Math.atan2(dot(cross(axis0, axis1), u), dot(axis0, axis1));
  return walked(anyWalk(random, { d0, axis0, theta0: Math.acos(dot(d0, u)), theta1: Math.acos(dot(u, out)), roll }));
}

/** Within a hair of a special shape: a bend of nearly nothing, a pipe of nearly nothing, whole elbows, parallel ends. */
function nearDegenerate(random: Random, index: number): Case {
  const hair = 10 ** (-5 + 3 * random());
  const walk = anyWalk(random, { gap: 0 });
  if (index % 4 === 0) return walked({ ...walk, [pick(random, ["theta0", "theta1"])]: hair });
  if (index % 4 === 1) return walked({ ...walk, length: 0.01 + 0.2 * random() });
  if (index % 4 === 2) return walked({ ...walk, theta0: RIGHT - hair, theta1: RIGHT - hair });
  return walked({ ...walk, theta1: walk.theta0 + hair, roll: Math.PI + hair });
}

function impossible(random: Random, index: number): Case {
  if (index % 4 === 0) return turnsTooMuch(random);
  if (index % 4 === 1) return tooClose(random);
  const walk = anyWalk(random);
  // One path there is, and it breaks a limit: there is never a second one (CLOSING, "one answer").
  if (index % 4 === 2) return walked({ ...walk, theta0: (91 + 60 * random()) * DEG, length: 20 + 100 * random() }, RIGHT, "theta-max");
  const gap = 0.125;
  return walked({ ...walk, gap, theta0: (20 + 60 * random()) * DEG, theta1: (20 + 60 * random()) * DEG, length: -2 * gap * (0.6 + 0.3 * random()) }, RIGHT, "length");
}

/** The line must turn through more than two elbows of 40° can. */
function turnsTooMuch(random: Random): Case {
  const { input } = walked(anyWalk(random));
  const out = turned(unit([...input.d0] as V), across(random, unit([...input.d0] as V)), (81 + 98 * random()) * DEG);
  return { input: { ...input, d1: [-out[0], -out[1], -out[2]], thetaMax: 40 * DEG }, walk: null, reason: "angle-sum" };
}

/** Parallel ends that face each other on a run too short for the set: v² + h² < 2h(R0 + R1) has no root (CLOSING, closed form). */
function tooClose(random: Random): Case {
  const d0 = randomDirection(random);
  const [r0, r1] = [pick(random, RADII), pick(random, RADII)];
  const set = (0.1 + 1.8 * random()) * (r0 + r1);
  const run = 0.97 * random() * Math.sqrt(2 * set * (r0 + r1) - set * set);
  const aside = across(random, d0);
  const p1 = d0.map((x, i) => run * x + set * aside[i]!) as V;
  return { input: { p0: [0, 0, 0], d0, p1, d1: [-d0[0], -d0[1], -d0[2]], r0, r1, a: 0, b: 0, gap: 0, thetaMax: RIGHT }, walk: null, reason: "no-root" };
}

/** Every family by its name. */
export const FAMILIES: Readonly<Record<string, Family>> = {
  planar: (random) => walked(anyWalk(random, { roll: pick(random, [0, Math.PI]) })),
  rolling: (random) => {
    const theta = (0.1 + 89.9 * random()) * DEG;
    return walked(anyWalk(random, { d0: pick<V>(random, [[1, 0, 0], [0, 1, 0], [0, 0, 1]]), theta0: theta, theta1: theta, roll: Math.PI }));
  },
  perpendicular,
  skew: (random) => walked(anyWalk(random)),
  "unequal radii": (random) => {
    const r0 = pick(random, RADII);
    return walked(anyWalk(random, { r0, r1: pick(random, RADII.filter((radius) => radius !== r0)) }));
  },
  tangents: (random) => walked(anyWalk(random, { a: 0.25 + 24 * random(), b: 0.25 + 24 * random() })),
  "near-degenerate": nearDegenerate,
  impossible,
};
