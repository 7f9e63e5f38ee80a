/** Bodies of the writes on packages. */
import { z } from "zod";
import { MOST_SHEETS, PACKAGE_EXTRAS } from "./packages";

const text = (max: number) => z.string({ error: "Enter a text." }).trim().max(max, `At most ${max} characters.`);
const day = z.iso.date({ error: "Enter a date." });

export const transmittalSchema = z.object({
  number: text(40).min(1, "Enter the transmittal's number."),
  date: day,
  purpose: text(200).min(1, "Say what it is sent for."),
  recipient: text(200).min(1, "Say who it goes to."),
  replyBy: day.or(z.literal("")).default(""),
  remark: text(1_000).default(""),
});

export const packageNewSchema = z.object({
  title: text(120).default(""),
  revisionIds: z.array(z.uuid()).min(1, "Choose at least one sheet.").max(MOST_SHEETS, `At most ${MOST_SHEETS.toLocaleString("en-US")} sheets in one package.`),
  form: z.enum(["pdf", "zip"]),
  copies: z.enum(["marked", "originals"]).default("marked"),
  extras: z.array(z.enum(PACKAGE_EXTRAS)).max(PACKAGE_EXTRAS.length).default([]),
  paper: z.enum(["letter", "tabloid", "A4", "A3"]).nullable().default(null),
  transmittal: transmittalSchema.nullable().default(null),
});
/** As the form holds it while it is filled in. */
export type PackageFormValues = z.input<typeof packageNewSchema>;
export type PackageNewForm = z.output<typeof packageNewSchema>;

export const packageReceiptSchema = z.object({
  receivedBy: text(120).min(1, "Say who acknowledged it."),
  receivedOn: day,
  remark: text(1_000).default(""),
});
export type PackageReceiptForm = z.output<typeof packageReceiptSchema>;
