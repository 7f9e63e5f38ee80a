/** A turn cut from pipe: where its pieces are cut. Any one unit of length does (the names say Mm because the house uses it). */

export interface MitreCut {
  /** Each end is cut this far off square: turn / (2·welds), radians. */
  readonly cutAngleRad: number;
  /** Working point's tangent point to the middle of the first cut, R·tan(cut angle): the straight part of an end piece. */
  readonly endCentreMm: number;
  /** Middle segments between the two end pieces. */
  readonly segments: number;
  readonly segmentCentreMm: number;
  readonly segmentBackMm: number;
  readonly segmentThroatMm: number;
  /** Longest less shortest side of one cut, OD·tan(cut angle). */
  readonly longShortMm: number;
  /** Set-back from the long point at equal steps round the pipe, starting at the long point (the back). */
  readonly setbackMm: readonly number[];
  /** Arc on the outside between two stations. */
  readonly spacingMm: number;
}

/**
 * Cuts of a mitre whose middle segments touch a circle of radius R from outside. Geometry of a plane through a cylinder:
 * set-back (OD/2)·tan α·(1 - cos φ), α = turn / (2·welds).
 * @param turnRad total turn, 0 to π; @param welds at least 1; @param steps stations round the pipe.
 */
export function mitreCut(radiusMm: number, odMm: number, turnRad: number, welds: number, steps = 16): MitreCut {
  const cutAngleRad = turnRad / (2 * welds);
  const slope = Math.tan(cutAngleRad);
  return {
    cutAngleRad,
    endCentreMm: radiusMm * slope,
    segments: welds - 1,
    segmentCentreMm: 2 * radiusMm * slope,
    segmentBackMm: 2 * (radiusMm + odMm / 2) * slope,
    segmentThroatMm: 2 * (radiusMm - odMm / 2) * slope,
    longShortMm: odMm * slope,
    setbackMm: Array.from({ length: steps }, (_, i) => (odMm / 2) * slope * (1 - Math.cos((2 * Math.PI * i) / steps))),
    spacingMm: (Math.PI * odMm) / steps,
  };
}
