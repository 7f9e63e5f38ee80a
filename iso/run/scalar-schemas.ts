/** Scalars of the run document's schema: identifiers, lengths and short texts, with the bounds every field keeps to. */
import { z } from "zod";

/** Longest length a field accepts: one kilometre. Keeps arithmetic finite and typing slips visible. */
export const MAX_LENGTH_MM = 1_000_000;

export const idSchema = z.string().regex(/^[A-Za-z0-9_-]{1,40}$/);
export const lengthMmSchema = z.number().finite().min(-MAX_LENGTH_MM).max(MAX_LENGTH_MM);
export const positiveMmSchema = z.number().finite().min(0).max(MAX_LENGTH_MM);
export const shortTextSchema = z.string().max(120);
