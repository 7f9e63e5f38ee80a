/**
 * Every tolerance of the core, with its unit and its reason. A room that needs another one adds it here, so that no
 * bare 1e-6 stands anywhere else.
 */

/** Millimetres. Two model points closer than this are one point: far under what a tape or a cut can show. */
export const SAME_POINT_MM = 1e-6;

/** Millimetres. A length this far below zero is still zero: float64 noise of coordinates up to a kilometre. */
export const ZERO_LENGTH_MM = 1e-9;

/** Millimetres. Loops and re-entered numbers that differ by less close: a hundredth of a tape's 1/64 in. */
export const LOOP_CLOSES_MM = 0.005;

/** Unit-less. Length of a vector under which it has no direction. */
export const ZERO_VECTOR = 1e-12;

/** Radians (5.7e-8 deg). Directions closer than this are parallel: rounding of unit vectors, far under a fitter's square. */
export const PARALLEL_RAD = 1e-9;

/** Unit-less. A component of a unit vector below this is zero, so that a leg counts as on-axis. */
export const AXIS_COMPONENT = 1e-9;

/** Paper millimetres. Paper coordinates closer than this are the same: a twentieth of the thinnest line. */
export const SAME_PAPER_MM = 0.01;

/** Fraction of a rounding step by which a number may miss a half and still round up: decimal entries such as 0.1 in. */
export const HALF_STEP_SLACK = 1e-7;
