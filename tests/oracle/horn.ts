/**
 * The other way to the best rigid motion: Horn's unit quaternion, the eigenvector of the largest eigenvalue of a symmetric
 * 4 by 4 matrix of sums (B. K. P. Horn, "Closed-form solution of absolute orientation using unit quaternions", J. Opt. Soc.
 * Am. A 4 (1987) 629, section 4). The eigenvector is found here by shifted power iteration, so that no library is shared.
 */
type Vec = readonly [number, number, number];

export interface HornMotion {
  readonly turn: (at: Vec) => Vec;
  readonly move: (at: Vec) => Vec;
}

const SQUARINGS = 48;

export function hornMotion(measured: readonly Vec[], wanted: readonly Vec[], weights: readonly number[]): HornMotion {
  const total = weights.reduce((a, b) => a + b, 0);
  const mean = (points: readonly Vec[]): Vec => [0, 1, 2].map((k) => points.reduce((sum, p, i) => sum + weights[i]! * p[k]!, 0) / total) as unknown as Vec;
  const [from, to] = [mean(measured), mean(wanted)];
  const s = (a: number, b: number) => measured.reduce((sum, p, i) => sum + weights[i]! * (p[a]! - from[a]!) * (wanted[i]![b]! - to[b]!), 0);
  const [xx, xy, xz, yx, yy, yz, zx, zy, zz] = [s(0, 0), s(0, 1), s(0, 2), s(1, 0), s(1, 1), s(1, 2), s(2, 0), s(2, 1), s(2, 2)];
  const n = [
    [xx + yy + zz, yz - zy, zx - xz, xy - yx],
    [yz - zy, xx - yy - zz, xy + yx, zx + xz],
    [zx - xz, xy + yx, yy - xx - zz, yz + zy],
    [xy - yx, zx + xz, yz + zy, zz - xx - yy],
  ];
  const [w, x, y, z] = leading(n);
  const turn = ([a, b, c]: Vec): Vec => [
    (w * w + x * x - y * y - z * z) * a + 2 * (x * y - w * z) * b + 2 * (x * z + w * y) * c,
    2 * (x * y + w * z) * a + (w * w - x * x + y * y - z * z) * b + 2 * (y * z - w * x) * c,
    2 * (x * z - w * y) * a + 2 * (y * z + w * x) * b + (w * w - x * x - y * y + z * z) * c,
  ];
  const shift = turn(from);
  return { turn, move: (at) => turn(at).map((v, k) => v - shift[k]! + to[k]!) as unknown as Vec };
}

/** Eigenvector of the largest eigenvalue: squaring the shifted matrix makes the power iteration converge in a few rounds. */
function leading(matrix: readonly (readonly number[])[]): readonly [number, number, number, number] {
  const size = Math.max(...matrix.map((row) => row.reduce((sum, value) => sum + Math.abs(value), 0)), Number.MIN_VALUE);
  let power = matrix.map((row, i) => row.map((value, j) => value / size + (i === j ? 1 : 0)));
  for (let round = 0; round < SQUARINGS; round++) {
    const squared = power.map((row) => power.map((_, j) => row.reduce((sum, value, k) => sum + value * power[k]![j]!, 0)));
    const scale = Math.max(...squared.flat().map(Math.abs));
    power = squared.map((row) => row.map((value) => value / scale));
  }
  const column = power.map((_, j) => power.map((row) => row[j]!)).sort((a, b) => Math.hypot(...b) - Math.hypot(...a))[0]!;
  const length = Math.hypot(...column);
  return column.map((value) => value / length) as unknown as readonly [number, number, number, number];
}
