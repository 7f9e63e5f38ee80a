/** Line settings: what a job hands down to each new line, with pipe, allowances and the rules marks follow. */
import { z } from "zod";
import { fitSettingsSchema } from "../fit/fit-settings";
import { npsSchema, ratingClassSchema } from "./item-schema";
import { positiveMmSchema as positiveMm, shortTextSchema as shortText } from "./scalar-schemas";

export const unitSystemSchema = z.enum(["imperial", "metric"]);
export type UnitSystem = z.infer<typeof unitSystemSchema>;

export const pipeSchema = z.object({
  nps: npsSchema,
  schedule: z.string().min(1).max(12),
  material: shortText,
  specification: shortText.default(""),
});
export type Pipe = z.infer<typeof pipeSchema>;

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
  /** What the shop holds to and what its joints may be off by; absent = usualFitSettings. */
  fit: fitSettingsSchema.optional(),
  /** absent = DEFAULT_MARK_RULES. */
  marks: markRulesSchema.optional(),
  /** As entered, per owner's specification; printed, never judged. */
  asEntered: z.object({ insulation: shortText, pwht: shortText, nde: shortText, test: shortText, paint: shortText }),
});
export type LineSettings = z.infer<typeof lineSettingsSchema>;
