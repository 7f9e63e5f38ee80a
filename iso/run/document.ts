/**
 * The run document: what a detailer typed, versioned and zod-checked. It is the only thing an editor changes;
 * everything else (model, drawing, sheet) is computed from it. Lengths in millimetres, angles in degrees where
 * the name says Deg, x east, y north, z up.
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
    goes: z.enum(["open", "field-weld", "continued", "existing"]),
    text: shortText.default(""),
  }),
  z.object({ kind: z.literal("elbow"), elbow: z.enum(["lr-90", "sr-90", "lr-45", "trimmed-lr", "trimmed-sr", "sw-90", "sw-45"]) }),
  /** A tee at a branch point. `branchNps` null = same size as the run (straight tee). The branch is a Run with from = this point. */
  z.object({ kind: z.literal("tee"), ends: z.enum(["butt", "socket"]).default("butt"), branchNps: npsSchema.nullable().default(null) }),
  z.object({ kind: z.literal("outlet"), branchNps: npsSchema }),
  z.object({ kind: z.literal("stub-in"), branchNps: npsSchema }),
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
    flange: z.enum(["weld-neck", "slip-on", "socket-weld", "blind"]),
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
    ends: z.enum(["flanged", "butt", "socket"]),
    ratingClass: ratingClassSchema.nullable().default(null),
    mating: z.enum(["weld-neck", "slip-on", "socket-weld"]).default("weld-neck"),
    /** Stem direction; null for the natural one (up, or north on a vertical pipe). */
    stem: axisNameSchema.nullable().default(null),
    /** Shop-given face to face where no table has it, mm. */
    faceToFaceMm: positiveMm.nullable().default(null),
    tag: shortText.default(""),
  }),
  z.object({ kind: z.literal("coupling"), half: z.boolean().default(false) }),
  z.object({ kind: z.literal("cap") }),
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
  points: z.array(pointSchema).max(MAX_POINTS),
});
export type Run = z.infer<typeof runSchema>;

export const allowancesSchema = z.object({
  rootGapMm: positiveMm,
  socketPullBackMm: positiveMm,
  gasketMm: positiveMm,
  slipOnSettingMm: positiveMm,
});
export type Allowances = z.infer<typeof allowancesSchema>;

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
