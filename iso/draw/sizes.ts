/** Paper sizes and tolerances of the drawing, in millimetres on paper unless the name says otherwise (common practice; judged by eye at A3). */

/** Line widths. */
export const PIPE_WIDTH = 0.7;
export const DIMENSION_WIDTH = 0.3;
export const EXTENSION_WIDTH = 0.22;
export const BOX_WIDTH = 0.25;
export const HATCH_WIDTH = 0.18;
export const LEADER_WIDTH = 0.2;
export const SYMBOL_WIDTH = 0.5;
export const MARK_WIDTH = 0.3;

export const HATCH_SPACING = 2.2;
/** Gap left in the rear pipe where two pipes cross on paper. */
export const HIDDEN_GAP = 4;
export const WELD_DOT = 3.0;
/** Capital heights: dimension numbers, and everything else (ISO 3098 least height, from memory). */
export const DIMENSION_CAP = 3.5;
export const TEXT_CAP = 2.5;

/** Dimension lines: the first off the pipe, each next one beyond it. */
export const DIMENSION_FIRST = 12;
export const DIMENSION_NEXT = 7.5;
export const EXTENSION_GAP = 2.4;
export const EXTENSION_GAP_FLANGE = 5;
export const EXTENSION_OVERSHOOT = 1.6;
export const ARROW_LENGTH = 2.6;
export const ARROW_HALF = 0.55;
/** Under this span a dimension's ends are dots. */
export const DOT_SPAN = 8;

export const BALLOON = 6.2;
/** Weld mark: hexagon, corner to corner. Two figures at 2.5 mm fit these marks with half a millimetre to spare; larger ones lengthen every leader. */
export const HEXAGON = 6.8;
export const PIECE_HEIGHT = 4.8;

/** Room of the symbols along the pipe, from the working point. */
export const ELBOW_ARM = 6;
export const TEE_ARM = 5;
export const FLANGE_ARM = 4;
export const VALVE_HALF = 6;
export const REDUCER_ROOM = 10;
export const CAP_ROOM = 3;
export const COUPLING_HALF = 4;
export const GASKET_ROOM = 0.9;
export const BLIND_ROOM = 1.2;
/** Length of dashed neighbour pipe beyond the last weld of a spool. */
export const STUB_ROOM = 9;
export const FLANGE_STROKE_HALF = 3.6;
export const HUB_STROKE_HALF = 1.9;
export const VALVE_HALF_HEIGHT = 3.1;

/** Target length of a leg: TARGET_LEAST + TARGET_ROOT * s * sqrt(real mm). */
export const TARGET_LEAST = 9;
export const TARGET_ROOT = 0.55;
/** Largest stretch s a small line is given to fill its paper. */
export const STRETCH_MOST = 4.5;
/** Least room of drawn pipe on a leg, beyond its symbols. */
export const PIPE_LEAST = 6.5;
/** Parallel things that see each other keep this distance on their common axis. */
export const ORDER_GAP = 11;
/** A pipe that passes closer than this to another's end reads as touching it. */
export const NEAR_TOUCH = 8;

/** Off-axis legs keep this angle from every axis on paper, radians (12 degrees, with a hair to spare). */
export const AXIS_CLEARANCE_RAD = (12.4 * Math.PI) / 180;
/** And this from the axis of a pipe they meet (20 degrees, likewise): nearer they read as going along it. */
export const NEIGHBOUR_CLEARANCE_RAD = (20.3 * Math.PI) / 180;

/** Model-frame tolerances, millimetres. */
export const MERGE_MM = 30;
export const SEE_MM = 600;
/** A leg's component smaller than this, or than LEVEL_RATIO of its length, is no component at all. */
export const LEVEL_MM = 2;
export const LEVEL_RATIO = 0.002;
/** A leg that rises or falls less than this against its level length is a slope and drawn level (about 6 degrees). */
export const SLOPE_RATIO = 0.105;
/** How far a port or piece may stand beside its leg's line and still be on it: an eccentric reducer's shift. */
export const BESIDE_MM = 130;
/** Two paper numbers closer than this are one. */
export const PAPER_EPS = 1e-6;
/** Directions whose cosine is above this are the same for a port and its leg. */
export const PORT_COSINE = 0.97;
/** A roll this near a quarter turn is square, radians (0.2 degrees): a fitter's level reads no finer. */
export const ROLL_SQUARE_RAD = (0.2 * Math.PI) / 180;
/** Pipe that rises by less than this share of its length still has an underside to name (about 6 degrees). */
export const LEVEL_SINE = 0.105;
