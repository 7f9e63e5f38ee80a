/**
 * Lays a way piece by piece as a fitter would and says where it ends: gap, pipe, gap, fitting, along the directions the
 * way gives. Given only cut lengths, names of fittings and directions; centre-to-end lengths come from the caller's own
 * table. Shares no code with iso.
 */
export type Spot = readonly [number, number, number];

export interface LaidStraight { direction: Spot; cut: number | null }

/** Where the last face meets end 1 (its gap included), and the angles turned at each fitting, degrees. */
export function layWay(start: Spot, straights: readonly LaidStraight[], reaches: readonly number[], gap: number): { end: Spot; turned: number[] } {
  let at = start;
  const go = (d: Spot, k: number): void => {
    at = [at[0] + d[0] * k, at[1] + d[1] * k, at[2] + d[2] * k];
  };
  straights.forEach(({ direction, cut }, j) => {
    const before = reaches[j - 1];
    if (before !== undefined) go(direction, before);
    go(direction, gap);
    if (cut !== null) {
      go(direction, cut);
      go(direction, gap);
    }
    const after = reaches[j];
    if (after !== undefined) go(direction, after);
  });
  const turned = straights.slice(1).map(({ direction }, j) => {
    const a = straights[j]!.direction;
    const side = Math.hypot(a[1] * direction[2] - a[2] * direction[1], a[2] * direction[0] - a[0] * direction[2], a[0] * direction[1] - a[1] * direction[0]);
    return (Math.atan2(side, a[0] * direction[0] + a[1] * direction[1] + a[2] * direction[2]) * 180) / Math.PI;
  });
  return { end: at, turned };
}
