/** The form that asks which parts of a set to print. Pure. */
import { z } from "zod";
import { SHEET_PARTS } from "@/iso";
import { sheetSizeSchema } from "./forms";

/** What a browser remembers of it. */
export const sheetSetChoiceSchema = z.object({
  parts: z.array(z.enum(SHEET_PARTS)).min(1, "Choose at least one part."),
  /** "" = as issued, or as the job says. */
  size: z.union([sheetSizeSchema, z.literal("")]),
  fit: z.boolean(),
});

export type SheetSetChoice = z.infer<typeof sheetSetChoiceSchema>;

/** Lengths are cut from a cut map, so it is printed by who says they will verify them. */
export const sheetSetFormSchema = sheetSetChoiceSchema.extend({ verified: z.boolean() }).refine((form) => form.verified || !form.parts.includes("cuts"), {
  path: ["verified"], error: "Tick this before the cut map is printed.",
});

export type SheetSetForm = z.infer<typeof sheetSetFormSchema>;
