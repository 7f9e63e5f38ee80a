/** Bodies of the writes on cutting plans and offcuts. */
import { z } from "zod";
import { stockRowSchema } from "./forms";

const text = (max: number) => z.string({ error: "Enter a text." }).trim().max(max, `At most ${max} characters.`);

/** Longest search, seconds. */
const LONGEST_SEARCH = 30;

export const nestNewSchema = z.object({
  spoolIds: z.array(z.uuid()).min(1, "Choose at least one spool.").max(500, "At most 500 spools."),
  saw: text(40).min(1, "Choose a saw."),
  /** Only stock of this heat; "" = any. */
  heat: text(60).default(""),
  seconds: z.number().int().min(1).max(LONGEST_SEARCH, `At most ${LONGEST_SEARCH} seconds.`).default(5),
});
export type NestNewForm = z.infer<typeof nestNewSchema>;

/** Heats read off the lengths as they are taken: "group:bar" to heat. */
export const nestCutSchema = z.object({
  heats: z.record(z.string().regex(/^\d{1,4}:\d{1,5}$/, "That is no length of the plan."), text(60)).default({}),
  verified: z.literal(true, { error: "Confirm this to lock the plan." }),
});
export type NestCutForm = z.infer<typeof nestCutSchema>;

export const offcutNewSchema = stockRowSchema.pick({ nps: true, schedule: true, material: true, lengthMm: true }).extend({ heat: text(60) });
export type OffcutNewForm = z.infer<typeof offcutNewSchema>;
