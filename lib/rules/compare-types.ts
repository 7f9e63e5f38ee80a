/** What may be asked of a comparison, and what its page is given. */
import { z } from "zod";
import type { RevisionState, SheetInput } from "@/iso";
import { sheetSizeSchema } from "./forms";

/** A revision by its id, or the sheet as it would be now. */
const sideSchema = z.union([z.literal("draft"), z.uuid()], { error: "Choose a revision, or the draft." });

export const compareQuerySchema = z.object({
  /** Absent = the signed revision before the other one. */
  from: sideSchema.nullable().default(null),
  /** Absent = the newest there is. */
  to: sideSchema.nullable().default(null),
  /** Pages to print, or the two inputs for the screen. */
  as: z.enum(["pdf", "data"], { error: "Say as=pdf or as=data." }).default("pdf"),
  /** Absent = as the later of the two was issued. */
  size: sheetSizeSchema.nullable().default(null),
});
export type CompareAsked = z.output<typeof compareQuerySchema>;

/** What can be chosen on either side, oldest first, the draft last. */
export interface CompareChoice {
  readonly id: string;
  readonly code: string;
  readonly state: RevisionState;
  readonly hold: boolean;
  readonly description: string;
  /** When it was submitted; "" for the draft. */
  readonly at: string;
}

export interface CompareDetail {
  readonly spool: { readonly id: string; readonly letter: string; readonly sheetNumber: string };
  readonly line: { readonly id: string; readonly number: string };
  readonly job: { readonly id: string; readonly number: string };
  readonly choices: readonly CompareChoice[];
  /** null while there are no two to compare. */
  readonly pair: { readonly from: string; readonly to: string; readonly before: SheetInput; readonly after: SheetInput } | null;
}

/** Which two are compared when a side is left open; null when there are no two. */
export function chosenPair(choices: readonly CompareChoice[], from: string | null, to: string | null): { readonly from: string; readonly to: string } | null {
  const known = (id: string | null): boolean => id === null || choices.some((choice) => choice.id === id);
  if (!known(from) || !known(to)) return null;
  const later = to ?? [...choices].reverse().find((choice) => choice.id !== from)?.id;
  const place = choices.findIndex((choice) => choice.id === later);
  const earlier = from ?? (choices.slice(0, place).reverse().find(isIssued) ?? choices[place - 1] ?? choices[place + 1])?.id;
  return later === undefined || earlier === undefined ? null : { from: earlier, to: later };
}

/** Signed at some time: what a spool may have been built from. */
const isIssued = ({ state }: CompareChoice): boolean => state === "for-fabrication" || state === "as-built" || state === "superseded";
