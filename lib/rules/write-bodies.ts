/** Bodies no form of a page sends as such, limits of uploads, and the ids in addresses. The rest is in forms.ts. */
import { z } from "zod";

/** Largest sketch or photo, and largest logo, in bytes. */
export const UPLOAD_MAX_BYTES = 10 * 1024 * 1024;
export const LOGO_MAX_BYTES = 2 * 1024 * 1024;
/** Largest JSON body of an ordinary write, and of a run document (2 000 points with notes), in bytes. */
export const BODY_MAX_BYTES = 256 * 1024;
export const DOCUMENT_MAX_BYTES = 6 * 1024 * 1024;

export const idSchema = z.uuid();

/**
 * A save of a run document: `version` is the one the editor started from. The document is any object here; whether it
 * is a run document is asked of parseRunDocument of iso, which says why not in sentences.
 */
export const lineSaveSchema = z.object({
  version: z.int({ error: "The version is missing." }).min(1, "The version is missing.").max(2_000_000_000, "The version is missing."),
  document: z.custom<object>((value) => typeof value === "object" && value !== null, "The document is missing."),
});

/** Largest survey document, bytes. */
export const SURVEY_MAX_BYTES = 512 * 1024;

/** A save of a survey: `version` is the one it started from, 0 when there was none yet. */
export const surveySaveSchema = z.object({
  version: z.int({ error: "The version is missing." }).min(0, "The version is missing.").max(2_000_000_000, "The version is missing."),
  document: z.custom<object>((value) => typeof value === "object" && value !== null, "The survey is missing."),
});

/** For writes that say nothing but that they happen. */
export const emptySchema = z.object({});
