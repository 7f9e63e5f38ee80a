/** Numbers the simulation of a fit needs: random normal ones, and a matrix turned round. */
import { seededRandom } from "./random";

/** Standard normal numbers (Box and Muller), both of each pair. */
export function normals(seed: number): () => number {
  const random = seededRandom(seed);
  let spare = Number.NaN;
  return () => {
    if (!Number.isNaN(spare)) {
      const kept = spare;
      spare = Number.NaN;
      return kept;
    }
    const size = Math.sqrt(-2 * Math.log(1 - random()));
    const angle = 2 * Math.PI * random();
    spare = size * Math.sin(angle);
    return size * Math.cos(angle);
  };
}

/** Inverse of a matrix (Gauss and Jordan, largest pivot first). */
export function inverted(matrix: readonly (readonly number[])[]): number[][] {
  const n = matrix.length;
  const m = matrix.map((row, i) => [...row, ...Array.from({ length: n }, (_, j) => (i === j ? 1 : 0))]);
  for (let i = 0; i < n; i++) {
    const best = m.slice(i).reduce((top, row, k) => (Math.abs(row[i]!) > Math.abs(m[top]![i]!) ? i + k : top), i);
    [m[i], m[best]] = [m[best]!, m[i]!];
    const pivot = m[i]![i]!;
    m[i] = m[i]!.map((v) => v / pivot);
    for (let k = 0; k < n; k++) if (k !== i) {
      const factor = m[k]![i]!;
      m[k] = m[k]!.map((v, j) => v - factor * m[i]![j]!);
    }
  }
  return m.map((row) => row.slice(n));
}
