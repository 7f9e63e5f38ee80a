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

/** Radians (0.1 deg). A turn smaller than this is straight pipe: 1/16 in of typed rounding on 3 ft. */
export const STRAIGHT_RAD = 0.1 * (Math.PI / 180);

/** Millimetres (1/32 in). Two fittings whose weld faces stand one root gap apart within this are welded face to face. */
export const FACE_TO_FACE_MM = 25.4 / 32;

/** Millimetres (1/16 in). Two readings of one length that differ by more than this disagree, when no tolerance is given. */
export const READINGS_AGREE_MM = 25.4 / 16;

/** Radians (3 deg). Largest mismatch taken up at one weld without asking the engineer (a usual limit, common practice). */
export const WELD_MISMATCH_RAD = 3 * (Math.PI / 180);

/** Times the closing's scale. |F| at or under this is the noise of float64: the closing is exact. */
export const CLOSING_NOISE = 2e-16;

/** Times the closing's scale. Under it Newton is in its last, squaring steps and judges itself by |F| alone. */
export const CLOSING_QUADRATIC = 1e-6;

/** Times the closing's scale. S under this is a fold, where angles mean nothing. */
export const CLOSING_FOLD = 1e-13;

/** Radians. A polygon of pipe directions narrower than this holds nothing that float64 could tell apart. */
export const CLOSING_SMALLEST_POLYGON = 1e-11;

/** Radians. A bend this small has vanished, and a limit passed by this little is kept: the agreed tolerance of the check values. */
export const CLOSING_ANGLE = 1e-9;

/** The caller's unit. A pipe this little shorter than nothing has length zero: the agreed tolerance of the check values. */
export const CLOSING_LENGTH = 1e-9;

/** Times the closing's scale, added to CLOSING_LENGTH so that millimetres and kilometres are judged like inches. */
export const CLOSING_LENGTH_SHARE = 1e-12;

/** Radians (0.05°). A bend this near 90° is a whole elbow: less than its own tolerance shows. */
export const CLOSING_STANDARD_ANGLE = (0.05 * Math.PI) / 180;

/** Radians. A polygon of pipe directions no wider than this across its last cut is a thread: the centre's own rounding is as wide. */
export const CLOSING_THREAD = 1e-6;

/** Radians (0.005 deg). An elbow this near its own angle is square: half of the last printed digit of an angle. */
export const SQUARE_RAD = 0.005 * (Math.PI / 180);

/** Radians (1 deg). A turn nearer than this to a half turn folds the line back on itself. */
export const FOLD_RAD = Math.PI / 180;

/** Unit-less. What is left of a unit vector across an axis must be longer than this to give a direction of its own. */
export const NEARLY_ALONG = 1e-6;

/** Paper millimetres. A curve written as chords stays within this: a tenth of the thinnest line. */
export const FLATTEN_MM = 0.02;

/** Radians, and share of a lever. Step of the differences by which a snapped piece is refitted: the cube root of float64's grain. */
export const SNAP_REFIT = 6e-6;

/** Currency, and share of a plan's cost. A saving this small is the noise of the linear programme. */
export const NEST_WORTH = 1e-6;

/** Kilograms. A spool lighter than this has no centre of gravity worth a number: only nonsense lengths weigh so little. */
export const WEIGHTLESS_KG = 1e-9;

/** Millimetres. A survey's adjustment has settled when no mark moves by more: a millionth of what a tape shows. */
export const SURVEY_STEP_MM = 1e-7;

/** Share of the largest eigenvalue of a survey's normal equations. Under it nothing holds that freedom: float64 noise, squared readings included. */
export const SURVEY_RANK = 1e-10;

/** Unit-less. A redundancy number under this means that no other reading controls the reading. */
export const SURVEY_UNCONTROLLED = 1e-6;

/** Share of the largest standardised residual. Readings within it explain a misfit equally well. */
export const SURVEY_EQUAL_SHARE = 0.02;

/** Radians. Two directions this near are one when standard turns are put together: rounding of a few rotations. */
export const WAYS_ANGLE = 1e-9;

/** Millimetres. A way whose last straight misses the end by more is thrown away: a thousandth of what the insertion promises. */
export const WAYS_CLOSES_MM = 1e-7;

/** Millimetres. A face this near the one before it, less one gap, is welded to it: far under what a root gap shows. */
export const WAYS_DIRECT_MM = 1e-6;

/** Unit-less. Three directions whose triple product is under this span no room to solve three lengths in. */
export const WAYS_FLAT = 1e-9;

/** Radians of a family's parameter. Ends of intervals, roots and shortest places are refined to this. */
export const WAYS_REFINED = 1e-12;

/** Times the length. Two lengths that differ by less are one, so that float noise decides no order. */
export const WAYS_SAME_LENGTH = 1e-6;

/** Millimetres. A straight this near its shortest pup stands at it: finer than any saw. */
export const WAYS_AT_BOUND_MM = 1e-3;

/** Radians of a family's parameter. Step to the neighbours a shortest way is compared with. */
export const WAYS_BESIDE_RAD = 1e-4;

/** Share of an end's error that may stay at a weld before it is said. */
export const WAYS_STAYS_SHARE = 1e-3;

/** Millimetres. Least give of a joint that is fitted, so that a limit of nothing leaves its sums solvable: a hundredth of a tape's finest. */
export const FIT_LEAST_MM = 1e-3;

/** Radians. The same of its angles: a thousandth of a millimetre across a metre. */
export const FIT_LEAST_RAD = 1e-6;

/** Share of a variance. What is left of it under this is rounding: that freedom does not move. */
export const FIT_RANK = 1e-12;

/** Share of a step by which a length may be over and still count as the step: float noise. */
export const FIT_STEP_SLACK = 1e-9;
