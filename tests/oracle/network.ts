/**
 * A second answer for survey networks, sharing no code with the core: plain Gauss-Newton by normal equations from the
 * true places, numeric derivatives, Gaussian elimination with pivots, the datum held by fixing marks outright.
 */
export type OraclePoint = [number, number, number];

export interface OracleReading {
  readonly kind: "distance" | "along" | "azimuth" | "elevation";
  readonly axis?: number;
  /** -1 is the datum. */
  readonly from: number;
  readonly to: number;
  readonly value: number;
  readonly sigma: number;
}

/** What a reading would be with the marks there. */
export function oracleValue(reading: OracleReading, points: readonly OraclePoint[]): number {
  const a = reading.from < 0 ? [0, 0, 0] : points[reading.from]!;
  const b = points[reading.to]!;
  const d = [b[0]! - a[0]!, b[1]! - a[1]!, b[2]! - a[2]!];
  if (reading.kind === "distance") return Math.sqrt(d[0]! * d[0]! + d[1]! * d[1]! + d[2]! * d[2]!);
  if (reading.kind === "along") return d[reading.axis!]!;
  if (reading.kind === "azimuth") return Math.atan2(d[0]!, d[1]!);
  return Math.atan2(d[2]!, Math.sqrt(d[0]! * d[0]! + d[1]! * d[1]!));
}

const STEP_MM = 0.05;

function off(reading: OracleReading, points: readonly OraclePoint[]): number {
  const raw = reading.value - oracleValue(reading, points);
  return reading.kind === "azimuth" ? raw - 2 * Math.PI * Math.round(raw / (2 * Math.PI)) : raw;
}

/** Sum of squared misses over their standard deviations. */
export function oracleSquares(readings: readonly OracleReading[], points: readonly OraclePoint[]): number {
  return readings.reduce((sum, reading) => sum + (off(reading, points) / reading.sigma) ** 2, 0);
}

/** A·x = b by elimination; throws when singular. */
export function eliminate(rows: number[][], right: number[]): number[] {
  const n = right.length;
  const m = rows.map((row, i) => [...row, right[i]!]);
  for (let c = 0; c < n; c += 1) {
    let pivot = c;
    for (let r = c + 1; r < n; r += 1) if (Math.abs(m[r]![c]!) > Math.abs(m[pivot]![c]!)) pivot = r;
    if (Math.abs(m[pivot]![c]!) < 1e-14) throw new Error("singular");
    [m[c], m[pivot]] = [m[pivot]!, m[c]!];
    for (let r = 0; r < n; r += 1) {
      if (r === c) continue;
      const f = m[r]![c]! / m[c]![c]!;
      for (let k = c; k <= n; k += 1) m[r]![k] = m[r]![k]! - f * m[c]![k]!;
    }
  }
  return m.map((row, i) => row[n]! / row[i]!);
}

export interface OracleAnswer {
  readonly points: OraclePoint[];
  /** Inverse of the normal matrix over the free numbers. */
  readonly covariance: number[][];
  readonly free: readonly (readonly [number, number])[];
}

/** The least-squares places from a start near the truth. `held` lists the numbers (mark, axis) that do not move. */
export function oracleAdjust(readings: readonly OracleReading[], start: readonly OraclePoint[], held: readonly (readonly [number, number])[]): OracleAnswer {
  const points = start.map((p) => [...p] as OraclePoint);
  const isHeld = (mark: number, axis: number) => held.some(([m, a]) => m === mark && a === axis);
  const free = points.flatMap((_, mark) => [0, 1, 2].filter((axis) => !isHeld(mark, axis)).map((axis) => [mark, axis] as const));
  let normal: number[][] = [];
  for (let round = 0; round < 60; round += 1) {
    const slopes = readings.map((reading) => free.map(([mark, axis]) => slope(reading, points, mark, axis) / reading.sigma));
    const misses = readings.map((reading) => off(reading, points) / reading.sigma);
    normal = free.map((_, i) => free.map((__, j) => slopes.reduce((sum, row) => sum + row[i]! * row[j]!, 0)));
    const step = eliminate(normal, free.map((_, i) => slopes.reduce((sum, row, k) => sum + row[i]! * misses[k]!, 0)));
    free.forEach(([mark, axis], i) => (points[mark]![axis] = points[mark]![axis]! + step[i]!));
    if (Math.max(...step.map(Math.abs)) < 1e-10) break;
  }
  const covariance = free.map((_, i) => eliminate(normal, free.map((__, j) => (i === j ? 1 : 0))));
  return { points, covariance, free };
}

function slope(reading: OracleReading, points: OraclePoint[], mark: number, axis: number): number {
  if (reading.from !== mark && reading.to !== mark) return 0;
  const at = points[mark]![axis]!;
  points[mark]![axis] = at + STEP_MM;
  const up = off(reading, points);
  points[mark]![axis] = at - STEP_MM;
  const down = off(reading, points);
  points[mark]![axis] = at;
  return (down - up) / (2 * STEP_MM);
}
