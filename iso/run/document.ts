/**
 * The run document: what a detailer typed, versioned and zod-checked. It is the only thing an editor changes;
 * everything else (model, drawing, sheet) is computed from it. Lengths in millimetres, angles in degrees where
 * the name says Deg, x east, y north, z up. Items stand in item-schema.ts, settings in settings-schema.ts.
 */
import { z } from "zod";
import { itemSchema } from "./item-schema";
import { idSchema as id, lengthMmSchema as lengthMm, positiveMmSchema as positiveMm, shortTextSchema as shortText } from "./scalar-schemas";
import { lineSettingsSchema, pipeSchema } from "./settings-schema";

export { MAX_LENGTH_MM } from "./scalar-schemas";
export * from "./item-schema";
export * from "./settings-schema";

/** Most points one line may hold. */
export const MAX_POINTS = 2_000;

const unit = z.number().finite().min(-1).max(1);

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
  /** "one": keep each spool's isometric on one sheet wherever it can stand there; absent = split when it would be crowded. */
  sheets: z.enum(["auto", "one"]).optional(),
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
    const loops = run.to !== undefined && (!seen.has(run.to) || run.points.some((p) => p.id === run.to));
    if (loops) messages.push(`${run.name || (index === 0 ? "The main run" : `Branch ${run.id}`)} comes back to ${seen.has(run.to ?? "") ? "a point of its own" : "a point that is not there"}.`);
    if (index === 0 && run.from !== null) messages.push("The main run cannot be a branch.");
    if (index > 0 && (run.from === null || !seen.has(run.from))) messages.push(`Branch ${run.name || run.id} leaves from a point that is not there.`);
  });
  return messages;
}
