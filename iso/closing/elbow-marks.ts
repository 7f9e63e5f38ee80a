/** Where to mark a trimmed elbow: arcs along its surface, measured with a tape from the uncut end. */

export interface ElbowMarks {
  /** Centre to end of the trimmed elbow, R·tan(θ/2). */
  readonly takeOutMm: number;
  /** Arc along the inside of the bend, (R - OD/2)θ. */
  readonly throatMm: number;
  /** Arc along both sides, Rθ. */
  readonly sideMm: number;
  /** Arc along the outside of the bend, (R + OD/2)θ. */
  readonly backMm: number;
  /** Straight distances between the same marks. */
  readonly throatChordMm: number;
  readonly backChordMm: number;
  /** Arcs at equal steps round the pipe, from the back round by the sides and the throat: (R + OD/2·cos φ)θ. */
  readonly roundMm: readonly number[];
  /** What is left of a 90, without the kerf, degrees; null when more than a 90 is wanted. */
  readonly restOf90Deg: number | null;
}

/**
 * Marks of an elbow cut to an angle. Any one unit of length does (the names say Mm because the house uses it).
 * Geometry of a torus; the 45° case of R 3, OD 2 is printed in "Math To Build On" (1993): 3.1416 and 1.5708.
 * @param angleRad angle to keep, 0 to π.
 * @param steps how many marks round the pipe.
 */
export function elbowMarks(radiusMm: number, odMm: number, angleRad: number, steps = 16): ElbowMarks {
  const arc = (shift: number) => (radiusMm + shift) * angleRad;
  const chord = (shift: number) => 2 * (radiusMm + shift) * Math.sin(angleRad / 2);
  const rest = 90 - (angleRad * 180) / Math.PI;
  return {
    takeOutMm: radiusMm * Math.tan(angleRad / 2),
    throatMm: arc(-odMm / 2), sideMm: arc(0), backMm: arc(odMm / 2),
    throatChordMm: chord(-odMm / 2), backChordMm: chord(odMm / 2),
    roundMm: Array.from({ length: steps }, (_, i) => arc((odMm / 2) * Math.cos((2 * Math.PI * i) / steps))),
    restOf90Deg: rest >= 0 ? rest : null,
  };
}
