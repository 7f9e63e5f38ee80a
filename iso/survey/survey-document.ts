/**
 * The survey document: what somebody read in the field, as typed. Texts stay texts, so that half an entry is kept too;
 * survey-read.ts turns them into numbers or says what is wrong. Stored per line with a version, like the run document.
 */
import { z } from "zod";
import { idSchema as id } from "../run/scalar-schemas";
import { unitSystemSchema } from "../run/settings-schema";

export const MAX_READINGS = 400;
export const MAX_ENDS = 20;

const typed = z.string().max(60);
const markName = z.string().max(24);

export const surveyToolSchema = z.enum(["tape", "long-tape", "laser", "level", "plumb", "angle", "compass", "total-station", "tracker", "known"]);
export type SurveyTool = z.infer<typeof surveyToolSchema>;

export const surveyReadingSchema = z.object({
  id,
  /** tape: one length. offset: E, N, U from `from` (blank = datum). bearing: direction from mark to mark. point: E, N, U of a mark. */
  kind: z.enum(["tape", "offset", "bearing", "point"]),
  from: markName,
  to: markName,
  /** As typed: one text for tape and bearing, three (E, N, U; a blank one was not read) for offset and point. */
  first: z.array(typed).max(3),
  /** The second reading of the same; all blank when read once. */
  again: z.array(typed).max(3),
  tool: surveyToolSchema,
  /** As typed; blank = the tool's own. A length, or degrees for a bearing. */
  tolerance: typed,
  /** Left out of the adjustment, kept in the record. */
  leftOut: z.boolean(),
  note: z.string().max(200),
});
export type SurveyReading = z.infer<typeof surveyReadingSchema>;

/** How the axis of an end was found. `points` is the direction the end faces, as typed: E, UN, 045/30. */
export const surveyAxisSchema = z.discriminatedUnion("kind", [
  /** A mark on the pipe's centre line behind the end's centre. */
  z.object({ kind: z.literal("line"), back: markName }),
  z.object({ kind: z.literal("bearing"), points: typed }),
  /** A level held upright and one held level against the face: how far its top, and its right edge, lean back over the span. */
  z.object({ kind: z.literal("level"), points: typed, uprightLean: typed, uprightSpan: typed, levelLean: typed, levelSpan: typed }),
  /** Distances from the face to a plane square to `points`, at 12, 3, 6 and 9 o'clock looking at the face; one may be blank. */
  z.object({ kind: z.literal("face"), points: typed, circle: typed, distances: z.array(typed).length(4) }),
  /** Centres of three or more bolt holes, marks of the survey. */
  z.object({ kind: z.literal("holes"), points: typed, marks: z.array(markName).max(12) }),
]);
export type SurveyAxis = z.infer<typeof surveyAxisSchema>;

export const surveyEndSchema = z.object({
  id,
  name: markName,
  /** Mark at the centre of the face; blank with bolt holes, whose circle gives it. */
  centre: markName,
  axis: surveyAxisSchema,
  /** As typed; blank = usual: degrees for a bearing, a length for the others. */
  tolerance: typed,
});
export type SurveyEnd = z.infer<typeof surveyEndSchema>;

export const surveyDocumentSchema = z.object({
  schema: z.literal(1),
  units: unitSystemSchema,
  readings: z.array(surveyReadingSchema).max(MAX_READINGS),
  ends: z.array(surveyEndSchema).max(MAX_ENDS),
  note: z.string().max(2_000),
});
export type SurveyDocument = z.infer<typeof surveyDocumentSchema>;

export function emptySurvey(units: SurveyDocument["units"]): SurveyDocument {
  return { schema: 1, units, readings: [], ends: [], note: "" };
}

/** A survey document from anything, or null when it is none. */
export function parseSurveyDocument(value: unknown): SurveyDocument | null {
  const parsed = surveyDocumentSchema.safeParse(value);
  return parsed.success ? parsed.data : null;
}
