/** What travels between the as-fitted route and its section of the spool page. */
import { z } from "zod";
import type { AsFittedDocument, FittedVerdict } from "@/iso";
import { sheetSizeSchema } from "./forms";

/** Largest body of a measurement, bytes. */
export const MEASUREMENT_MAX_BYTES = 128 * 1024;

/** The document is any object here; whether it is a measurement is asked of the core, which knows its shape. */
export const measurementSchema = z.object({
  document: z.custom<object>((value) => typeof value === "object" && value !== null, "The measurement is missing."),
});

/** Which record to print; absent = the form to fill in by hand. */
export const recordPrintSchema = z.object({
  record: z.uuid("There is no such record.").nullable().default(null),
  size: sheetSizeSchema.nullable().default(null),
});

export interface MeasurementRow {
  readonly id: string;
  readonly revisionId: string;
  readonly revisionCode: string;
  readonly document: AsFittedDocument;
  readonly verdict: FittedVerdict;
  readonly headline: string;
  readonly by: string;
  readonly at: string;
}
