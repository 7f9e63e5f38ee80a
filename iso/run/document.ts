/**
 * The run document: what a detailer typed, versioned and zod-checked. It is the only thing an editor changes;
 * everything else (model, drawing, sheet) is computed from it. Lengths in millimetres, angles in degrees where
 * the name says Deg, x east, y north, z up. Long because the schema is read as one page.
 */
import { z } from "zod";

/** Longest length a field accepts: one kilometre. Keeps arithmetic finite and typing slips visible. */
export const MAX_LENGTH_MM = 1_000_000;
/** Most points one line may hold. */
export const MAX_POINTS = 2_000;

const id = z.string().regex(/^[A-Za-z0-9_-]{1,40}$/);
const lengthMm = z.number().finite().min(-MAX_LENGTH_MM).max(MAX_LENGTH_MM);
const positiveMm = z.number().finite().min(0).max(MAX_LENGTH_MM);
const shortText = z.string().max(120);
const unit = z.number().finite().min(-1).max(1);

export const NPS_SIZES = ["1/2","3/4","1","1-1/4","1-1/2","2","2-1/2","3","3-1/2","4","5","6","8","10","12","14","16","18","20","22","24"] as const;
export const npsSchema = z.enum(NPS_SIZES);
export type Nps = z.infer<typeof npsSchema>;

export const unitSystemSchema = z.enum(["imperial", "metric"]);
export type UnitSystem = z.infer<typeof unitSystemSchema>;

/** Where a number came from (printed on the sheet; assumed numbers and single readings block release until accepted). */
export const provenanceSchema = z.object({
  kind: z.enum(["measured", "from-drawing", "calculated", "assumed"]),
  toleranceMm: positiveMm.nullable().default(null),
  by: shortText.nullable().default(null),
  at: z.string().max(40).nullable().default(null),
  /** A second reading of the same number, as typed and in mm; null when it was read once. */
  second: z.object({ text: shortText, mm: lengthMm }).nullable().default(null),
});
export type Provenance = z.infer<typeof provenanceSchema>;

/** One typed length: the text as the detailer typed it and what it was understood to be. */
export const entrySchema = z.object({ text: shortText, mm: lengthMm });
export type Entry = z.infer<typeof entrySchema>;

/** Offset of a point from the point before it (for the first point of the main run: from the line's datum). */
export const offsetSchema = z.discriminatedUnion("kind", [
  z.object({ kind: z.literal("enu"), e: entrySchema, n: entrySchema, u: entrySchema }),
  /** A direction (need not be normalised; not all zero) as typed, e.g. "UN" for 45° up-north, and a length along it. */
  z.object({
    kind: z.literal("polar"),
    direction: z.object({ text: shortText, e: unit, n: unit, u: unit }),
    length: entrySchema,
  }),
  z.object({ kind: z.literal("absolute"), e: entrySchema, n: entrySchema, u: entrySchema }),
  /** A level direction, the length measured level along it, and the slope as typed ("1:100", "2%", "1/4 in/ft"); rise over level run, down is negative. */
  z.object({
    kind: z.literal("slope"),
    direction: z.object({ text: shortText, e: unit, n: unit, u: z.literal(0) }),
    length: entrySchema,
    slope: z.object({ text: shortText, ratio: z.number().finite().min(-10).max(10) }),
  }),
]);
export type Offset = z.infer<typeof offsetSchema>;

export const placeSchema = z.enum(["shop", "field", "field-fit"]);
export type Place = z.infer<typeof placeSchema>;

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

export const pointSchema = z.object({
  id,
  offset: offsetSchema,
  item: itemSchema.default({ kind: "none" }),
  /**
   * Where the joints of this point's item are made: `in` is the upstream weld, `out` the downstream one, `branch` the weld
   * that takes the branch pipe, `bolts` its bolted faces (shop unless said; field opens the line there).
   */
  places: z.object({ in: placeSchema, out: placeSchema, branch: placeSchema, bolts: placeSchema }).partial().default({}),
  /**
   * What changes from this point on downstream (a specification break, insulation, tracing); absent = as before. Printed, and
   * the material goes into the lists; nothing is judged by it.
   */
  starts: z.object({ specification: shortText, material: shortText, insulation: shortText, tracing: shortText }).partial().optional(),
  /** True when the run was turned round an odd number of times since the point was made: `in` and `out` of its marks are swapped. */
  flipped: z.boolean().optional(),
  /** Supplied extra length at a field-fit joint of this point, mm; null = the line's. */
  trimMm: positiveMm.nullable().default(null),
  provenance: provenanceSchema.default({ kind: "from-drawing", toleranceMm: null, by: null, at: null, second: null }),
  note: z.string().max(2_000).default(""),
});
export type Point = z.infer<typeof pointSchema>;

export const pipeSchema = z.object({
  nps: npsSchema,
  schedule: z.string().min(1).max(12),
  material: shortText,
  specification: shortText.default(""),
});
export type Pipe = z.infer<typeof pipeSchema>;

export const runSchema = z.object({
  id,
  name: shortText.default(""),
  /** null for the main run; else the tee, outlet or stub-in point this branch leaves from (its first point is offset from that centre). */
  from: id.nullable(),
  /** null = the size of the branch (branchNps of the item it leaves from) in the line's schedule and material. */
  pipe: pipeSchema.nullable().default(null),
  /** A run that comes back: the tee, cross, outlet or stub-in its last point meets, which closes a loop. absent = it ends by itself. */
  to: id.optional(),
  points: z.array(pointSchema).max(MAX_POINTS),
});
export type Run = z.infer<typeof runSchema>;

export const allowancesSchema = z.object({
  rootGapMm: positiveMm,
  socketPullBackMm: positiveMm,
  gasketMm: positiveMm,
  slipOnSettingMm: positiveMm,
  /** Pipe that goes into a threaded fitting beyond what its take-out says, mm; absent = the thread's normal engagement of the tables. */
  threadMakeUpMm: positiveMm.optional(),
});
export type Allowances = z.infer<typeof allowancesSchema>;

/** How marks are given. Firms differ (common practice); a line keeps what its job had. */
export const markRulesSchema = z.object({
  weldPrefix: z.string().max(6),
  weldStart: z.number().int().min(1).max(9_999),
  piecePrefix: z.string().max(6),
  pieceStart: z.number().int().min(1).max(9_999),
  /** Something put in between marked neighbours: the forerunner's number and a letter (5A), or the next free number. */
  added: z.enum(["letter", "next"]),
  spools: z.enum(["letters", "numbers"]),
});
export type MarkRules = z.infer<typeof markRulesSchema>;

export const DEFAULT_MARK_RULES: MarkRules = { weldPrefix: "", weldStart: 1, piecePrefix: "P", pieceStart: 1, added: "letter", spools: "letters" };

/** What a job hands down to each new line, and what a line then owns. */
export const lineSettingsSchema = z.object({
  units: unitSystemSchema,
  pipe: pipeSchema,
  elbow: z.enum(["LR", "SR"]),
  ratingClass: ratingClassSchema,
  allowances: allowancesSchema,
  /** A turn within this of a standard elbow's angle takes the standard elbow (at most 3°). */
  standardElbowWithinDeg: z.number().finite().min(0).max(3),
  /** Shortest pipe between weld toes before a warning, mm; null = 1.5 OD (common practice), not less than 50. */
  minimumPupMm: positiveMm.nullable(),
  /** Supplied extra at a field-fit weld, mm (common practice 100-150 mm or 6 in). */
  fieldTrimMm: positiveMm,
  /** Whether a dimension to a flange face includes the gasket. */
  faceIncludesGasket: z.boolean(),
  /** Shipping box, mm, any order. */
  shippingBoxMm: z.tuple([positiveMm, positiveMm, positiveMm]),
  /** Longest pipe the stock gives, mm: longer pieces are split with a weld; absent = never. */
  stockLengthMm: positiveMm.optional(),
  /** How far a loop may miss its own start, mm, before it is a stop; absent = 3. */
  loopToleranceMm: positiveMm.optional(),
  /** Class of socket-weld and threaded forged fittings; absent = 3000. */
  forgedClass: z.union([z.literal(2000), z.literal(3000), z.literal(6000)]).optional(),
  /** absent = DEFAULT_MARK_RULES. */
  marks: markRulesSchema.optional(),
  /** As entered, per owner's specification; printed, never judged. */
  asEntered: z.object({ insulation: shortText, pwht: shortText, nde: shortText, test: shortText, paint: shortText }),
});
export type LineSettings = z.infer<typeof lineSettingsSchema>;

export const viewSchema = z.union([z.literal(1), z.literal(2), z.literal(3), z.literal(4)]);
/** Looking from: 1 south-west, 2 south-east, 3 north-east, 4 north-west (the corner nearest the reader). */
export type View = z.infer<typeof viewSchema>;

export const runDocumentSchema = z.object({
  version: z.literal(1),
  number: z.string().min(1).max(60),
  title: shortText.default(""),
  settings: lineSettingsSchema,
  /** null = proposed by the drawing's score; set when the detailer chooses, frozen at first issue. */
  view: viewSchema.nullable().default(null),
  /** runs[0] is the main run; the others are branches. */
  runs: z.array(runSchema).min(1).max(200),
  notes: z.array(z.string().max(2_000)).max(40).default([]),
  /** Notes of one spool's sheet only, by its letter. */
  sheetNotes: z.array(z.object({ spool: z.string().max(12), text: z.string().max(2_000) })).max(200).optional(),
});
export type RunDocument = z.infer<typeof runDocumentSchema>;

/**
 * Checks anything as a run document, including what zod's shape alone does not say: unique ids, branches that leave
 * from a point that exists, and the total number of points.
 * @returns the document, or a list of plain sentences. Never throws.
 */
export function parseRunDocument(value: unknown): { ok: true; document: RunDocument } | { ok: false; messages: string[] } {
  const parsed = runDocumentSchema.safeParse(value);
  if (!parsed.success) {
    return { ok: false, messages: parsed.error.issues.slice(0, 20).map((i) => `${i.path.join(".") || "document"}: ${i.message}`) };
  }
  const messages = referenceProblems(parsed.data);
  return messages.length > 0 ? { ok: false, messages } : { ok: true, document: parsed.data };
}

function referenceProblems(document: RunDocument): string[] {
  const seen = new Set<string>();
  const messages: string[] = [];
  for (const run of document.runs) {
    for (const point of run.points) {
      if (seen.has(point.id)) messages.push(`Point id ${point.id} is used twice.`);
      seen.add(point.id);
    }
  }
  if (seen.size > MAX_POINTS) messages.push(`A line may hold ${MAX_POINTS} points; this one has ${seen.size}.`);
  document.runs.forEach((run, index) => {
    if (index === 0 && run.from !== null) messages.push("The main run cannot be a branch.");
    if (index > 0 && (run.from === null || !seen.has(run.from))) messages.push(`Branch ${run.name || run.id} leaves from a point that is not there.`);
  });
  return messages;
}
