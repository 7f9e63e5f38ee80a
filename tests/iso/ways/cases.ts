/** Seeded questions for the ways: ends in inches made by walking from one end to the other, and ends at random. */
import type { WaysInput } from "@/iso";
import { NPS4, tiltedFrom, unitOf, type Ends, type P } from "../../oracle/elbow-search";

export const IN = 25.4;
export const mm = (p: P): P => [p[0] * IN, p[1] * IN, p[2] * IN];

/** NPS 4 STD, 1/8 gap, whole LR 90 and 45, pups of 6 in and more. */
export function question(ends: Ends, change: Partial<WaysInput> = {}): WaysInput {
  return {
    end0: { position: mm(ends.p0), direction: ends.d0, nps: "4", straightMm: 0 }, end1: { position: mm(ends.p1), direction: ends.d1, nps: "4", straightMm: 0 },
    schedule: "STD", rootGapMm: ends.gap * IN, angles: [90, 45], radii: ["LR"], trimMaxDeg: 90, minimumPupMm: ends.leastPup * IN, keepOuts: [],
    units: "imperial", takeOuts: [], ...change,
  };
}

export function randomDirection(random: () => number): P {
  const z = 2 * random() - 1;
  const a = 2 * Math.PI * random();
  return [Math.sqrt(1 - z * z) * Math.cos(a), Math.sqrt(1 - z * z) * Math.sin(a), z];
}

/** Ends between which the given elbows close with the given pups (0 = welded face to face), rolled at random or flat. */
export function walkedEnds(random: () => number, angles: readonly number[], pups: readonly number[], flat = false): Ends {
  const [gap, leastPup] = [0.125, 6];
  const d0 = flat ? ([1, 0, 0] as P) : randomDirection(random);
  const p0: P = [20 * random() - 10, 20 * random() - 10, flat ? 0 : 20 * random() - 10];
  let [at, along] = [p0, d0];
  angles.forEach((angle, i) => {
    const before = angles[i - 1];
    const reach = (before ? NPS4.reach.get(before)! : 0) + NPS4.reach.get(angle)! + gap + (pups[i]! > 0 ? pups[i]! + gap : 0);
    at = [at[0] + reach * along[0], at[1] + reach * along[1], at[2] + reach * along[2]];
    const theta = (angle * Math.PI) / 180;
    along = flat ? flatTurn(along, random() < 0.5 ? theta : -theta) : unitOf(tiltedFrom(along, theta, 2 * Math.PI * random()));
  });
  const lastPup = pups[angles.length]!;
  const reach = NPS4.reach.get(angles[angles.length - 1]!)! + gap + (lastPup > 0 ? lastPup + gap : 0);
  const p1: P = [at[0] + reach * along[0], at[1] + reach * along[1], at[2] + reach * along[2]];
  return { p0, d0, p1, d1: [-along[0], -along[1], -along[2]], gap, leastPup };
}

function flatTurn([x, y]: P, angle: number): P {
  return [x * Math.cos(angle) - y * Math.sin(angle), x * Math.sin(angle) + y * Math.cos(angle), 0];
}

export function randomEnds(random: () => number): Ends {
  return { p0: [0, 0, 0], d0: randomDirection(random), p1: [80 * random() - 40, 80 * random() - 40, 80 * random() - 40], d1: randomDirection(random), gap: 0.125, leastPup: 6 };
}

export function pick<T>(random: () => number, from: readonly T[]): T {
  return from[Math.floor(random() * from.length)]!;
}
