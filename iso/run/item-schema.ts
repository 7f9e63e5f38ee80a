/** What may stand at a point of a run: every item with its fields. Absent optional fields mean what their comment says. */
import { z } from "zod";
import { positiveMmSchema as positiveMm, shortTextSchema as shortText } from "./scalar-schemas";

export const NPS_SIZES = ["1/2","3/4","1","1-1/4","1-1/2","2","2-1/2","3","3-1/2","4","5","6","8","10","12","14","16","18","20","22","24"] as const;
export const npsSchema = z.enum(NPS_SIZES);
export type Nps = z.infer<typeof npsSchema>;

export const ratingClassSchema = z.union([z.literal(150), z.literal(300), z.literal(600), z.literal(900), z.literal(1500)]);
export type RatingClass = z.infer<typeof ratingClassSchema>;

/** A direction named by an axis: east, west, north, south, up, down. */
export const axisNameSchema = z.enum(["E", "W", "N", "S", "U", "D"]);
export type AxisName = z.infer<typeof axisNameSchema>;

/** Bolt holes: straddle the natural centre line, or turned this many degrees clockwise, seen from `from`. */
const boltHolesSchema = z.union([
  z.literal("straddle"),
  z.object({ turnDeg: z.number().finite().min(0).max(360), from: axisNameSchema }),
]);

export const itemSchema = z.discriminatedUnion("kind", [
  /** Nothing named. At a change of direction the model takes the standard elbow or a trimmed one by itself. */
  z.object({ kind: z.literal("none") }),
  /** An open pipe end (bevelled), with where it goes. */
  z.object({
    kind: z.literal("end"),
    goes: z.enum(["open", "field-weld", "continued", "existing", "vent", "drain"]),
    text: shortText.default(""),
    /** The point is the end of what stands outside: the pipe is cut one root gap short of it. Absent = the pipe ends at the point. */
    gapped: z.literal(true).optional(),
  }),
  z.object({
    kind: z.literal("elbow"),
    elbow: z.enum(["lr-90", "sr-90", "lr-45", "sr-45", "trimmed-lr", "trimmed-sr", "sw-90", "sw-45", "th-90", "th-45"]),
  }),
  /**
   * A 180 degree return. The point is where the arriving centre line meets the plane of the return's two ends; the centre
   * line leaves backwards from there, shifted `toward` by the return's centre-to-centre distance.
   */
  z.object({ kind: z.literal("return"), radius: z.enum(["LR", "SR"]).default("LR"), toward: axisNameSchema }),
  /** A turn cut from pipe: `pieces` counts the two pipes it joins. Radius null = 1.5 NPS; two pieces meet at the point itself. */
  z.object({ kind: z.literal("mitre"), pieces: z.number().int().min(2).max(5).default(3), radiusMm: positiveMm.nullable().default(null) }),
  /** The pipe itself is bent at this centre-line radius: nothing is cut here. */
  z.object({ kind: z.literal("bend"), radiusMm: positiveMm }),
  /** A tee at a branch point. `branchNps` null = same size as the run (straight tee). The branch is a Run with from = this point. */
  z.object({ kind: z.literal("tee"), ends: z.enum(["butt", "socket", "threaded"]).default("butt"), branchNps: npsSchema.nullable().default(null) }),
  /** Two branches, opposite each other. */
  z.object({ kind: z.literal("cross"), ends: z.enum(["butt", "socket", "threaded"]).default("butt"), branchNps: npsSchema.nullable().default(null) }),
  z.object({
    kind: z.literal("outlet"), branchNps: npsSchema,
    /** Absent = butt, set on. */
    ends: z.enum(["butt", "socket", "threaded"]).optional(),
    set: z.enum(["on", "in"]).optional(),
  }),
  z.object({
    kind: z.literal("stub-in"), branchNps: npsSchema,
    /** Absent = set on. */
    set: z.enum(["on", "in"]).optional(),
    /** Reinforcing pad: its outside diameter as given, mm; absent = none. */
    padMm: positiveMm.optional(),
  }),
  /** The point is the LARGE end (weld plane). Going down or up in size is read from the sizes. */
  z.object({
    kind: z.literal("reducer"),
    shape: z.enum(["concentric", "eccentric"]),
    toNps: npsSchema,
    toSchedule: z.string().max(12).nullable().default(null),
    /** Flat side of an eccentric reducer; the centre line shifts towards it. */
    flat: axisNameSchema.nullable().default(null),
  }),
  /** The point is the contact face. At a run's end the flange is the end; within a run it is a pair of flanges and a gasket. */
  z.object({
    kind: z.literal("flange"),
    flange: z.enum(["weld-neck", "slip-on", "socket-weld", "threaded", "lap-joint", "blind"]),
    /** Stub end of a lap-joint flange; absent = long. */
    stubEnd: z.enum(["long", "short"]).optional(),
    /** Gasket of this face where it differs from the line's, mm. */
    gasketMm: positiveMm.optional(),
    ratingClass: ratingClassSchema.nullable().default(null),
    boltHoles: boltHolesSchema.default("straddle"),
    /** For a pair within a run: which flange's face the point marks. */
    gasketSide: z.enum(["before", "after"]).default("after"),
    goes: z.enum(["nozzle", "continued", "existing", "open"]).default("open"),
    text: shortText.default(""),
  }),
  /** The point is the valve's centre. A flanged valve brings its mating flanges and gaskets. */
  z.object({
    kind: z.literal("valve"),
    valve: z.enum(["gate", "globe", "check", "ball", "butterfly"]),
    ends: z.enum(["flanged", "butt", "socket", "threaded"]),
    ratingClass: ratingClassSchema.nullable().default(null),
    mating: z.enum(["weld-neck", "slip-on", "socket-weld", "threaded", "lap-joint"]).default("weld-neck"),
    /** Stem direction; null for the natural one (up, or north on a vertical pipe). */
    stem: axisNameSchema.nullable().default(null),
    /** Shop-given face to face where no table has it, mm. */
    faceToFaceMm: positiveMm.nullable().default(null),
    tag: shortText.default(""),
    /** A check valve that lets flow pass against the run's direction; absent = along it. */
    against: z.boolean().optional(),
  }),
  z.object({ kind: z.literal("coupling"), half: z.boolean().default(false), ends: z.enum(["socket", "threaded"]).optional() }),
  z.object({ kind: z.literal("union"), ends: z.enum(["socket", "threaded"]).default("socket") }),
  z.object({ kind: z.literal("cap"), ends: z.enum(["butt", "socket", "threaded"]).optional() }),
  /** A measuring instrument: within a run it takes `lengthMm` face to face between flanges or welds, at an end it closes the run. */
  z.object({
    kind: z.literal("instrument"), tag: shortText.default(""),
    ends: z.enum(["flanged", "butt", "socket", "threaded"]).default("threaded"),
    ratingClass: ratingClassSchema.nullable().default(null),
    lengthMm: positiveMm.default(0),
  }),
  z.object({ kind: z.literal("support"), text: shortText.default("") }),
  /** A plain weld on straight pipe. */
  z.object({ kind: z.literal("joint") }),
]);
export type Item = z.infer<typeof itemSchema>;
export type ItemKind = Item["kind"];
