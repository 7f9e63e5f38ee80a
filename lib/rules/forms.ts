/**
 * What each write accepts, as zod schemas shared by the pages' forms and the route handlers. Messages are sentences
 * for the person who types. Unknown fields are left out; text is trimmed.
 */
import { z } from "zod";
import { lineSettingsSchema, MAX_LENGTH_MM, npsSchema, type RunDocument } from "@/iso";

/** Shortest password accepted; the longest is what bcrypt reads, 72 bytes. */
export const PASSWORD_MIN = 10;
export const PASSWORD_MAX_BYTES = 72;
/** Largest sketch or photo, and largest logo, in bytes. */
export const UPLOAD_MAX_BYTES = 10 * 1024 * 1024;
export const LOGO_MAX_BYTES = 2 * 1024 * 1024;

const requiredText = (what: string, max: number) =>
  z.string({ error: `Enter ${what}.` }).trim().min(1, `Enter ${what}.`).max(max, `At most ${max} characters.`).refine(isPlain, "Leave out control characters.");
const optionalText = (max: number) =>
  z.string({ error: "Enter text." }).trim().max(max, `At most ${max} characters.`).refine(isPlain, "Leave out control characters.");

/** PostgreSQL stores no NUL, and no name of ours needs a control character but the line break of a note. */
function isPlain(text: string): boolean {
  return !/[\u0000-\u0008\u000b-\u001f\u007f]/.test(text.replaceAll("\r", ""));
}

export const idSchema = z.uuid("This is not an id.");
export const roleSchema = z.enum(["owner", "detailer", "inspector", "fitter"], { error: "Choose a role." });
export const emailSchema = z
  .string({ error: "Enter an e-mail address." })
  .trim()
  .toLowerCase()
  .max(254, "At most 254 characters.")
  .pipe(z.email("Enter an e-mail address, such as name@shop.com."));
export const passwordSchema = z
  .string({ error: "Enter a password." })
  .min(PASSWORD_MIN, `At least ${PASSWORD_MIN} characters.`)
  .refine((text) => new TextEncoder().encode(text).length <= PASSWORD_MAX_BYTES, `At most ${PASSWORD_MAX_BYTES} characters.`)
  .refine((text) => !text.includes("\u0000"), "Leave out control characters.");
const typedPassword = z.string({ error: "Enter your password." }).min(1, "Enter your password.").max(1_000, "That is not your password.");
const tokenSchema = z.string({ error: "The link is incomplete." }).min(20, "The link is incomplete.").max(200, "The link is incomplete.");
const personName = requiredText("your name", 120);

export const signInForm = z.object({ email: emailSchema, password: typedPassword });
export const signUpForm = z.object({
  shopName: requiredText("the shop's name", 120),
  name: personName,
  email: emailSchema,
  password: passwordSchema,
  units: z.enum(["imperial", "metric"]).default("imperial"),
});
/** A new person gives a name; someone who already has an account proves it with their password. */
export const acceptForm = z.object({ token: tokenSchema, name: personName.optional(), password: typedPassword });
export const resetRequestForm = z.object({ email: emailSchema });
export const resetConfirmForm = z.object({ token: tokenSchema, password: passwordSchema });
export const shopSwitchForm = z.object({ shopId: idSchema });
export const invitationForm = z.object({ email: emailSchema, role: roleSchema });
export const roleForm = z.object({ role: roleSchema });

export const sheetSizeSchema = z.enum(["letter", "tabloid", "A4", "A3"], { error: "Choose a sheet size." });
export const titleFieldsSchema = z
  .array(z.object({ label: requiredText("a label", 40), value: optionalText(120) }), { error: "Enter the fields as a list." })
  .max(6, "At most 6 extra fields.");
const stockSchema = z
  .array(
    z.object({
      nps: npsSchema,
      schedule: requiredText("a schedule", 12),
      material: requiredText("a material", 120),
      lengthMm: z.number({ error: "Enter a length." }).positive("Enter a length over zero.").max(MAX_LENGTH_MM, "That is longer than a kilometre."),
      quantity: z.int("Enter a whole number.").min(0, "Enter 0 or more.").max(100_000, "At most 100 000."),
    }),
  )
  .max(500, "At most 500 rows of stock.");

export const shopForm = z
  .object({
    name: requiredText("the shop's name", 120),
    titleBlock: z.object({ fields: titleFieldsSchema }),
    sheetSize: sheetSizeSchema,
    defaults: lineSettingsSchema,
    stock: stockSchema,
  })
  .partial();

/** `valueMm` null confirms the value as tabulated; a number replaces it with what the shop measured. */
export const takeOutForm = z.object({
  key: requiredText("the fitting", 120),
  valueMm: z.number({ error: "Enter a length." }).positive("Enter a length over zero.").max(MAX_LENGTH_MM, "That is longer than a kilometre.").nullable(),
});

const jobFields = {
  number: requiredText("the job number", 60),
  title: optionalText(120),
  client: optionalText(120),
  area: optionalText(120),
  open: z.boolean({ error: "Say yes or no." }),
  fields: titleFieldsSchema,
  sheetSize: sheetSizeSchema,
  plantNorthDeg: z.number({ error: "Enter degrees." }).min(-360, "Between -360 and 360.").max(360, "Between -360 and 360."),
  defaults: lineSettingsSchema,
};
/** A new job: only its number is needed, the rest comes from the shop's settings. */
export const jobForm = z.object(jobFields).partial().required({ number: true });
export const jobPatchForm = z.object(jobFields).partial();

const lineNumber = requiredText("the line number", 60);
export const lineForm = z.object({ number: lineNumber, title: optionalText(120).default("") });
export const linePatchForm = z.object({ number: lineNumber, title: optionalText(120), archived: z.boolean() }).partial();
export const lineCopyForm = z.object({ number: lineNumber, title: optionalText(120).optional(), jobId: idSchema.optional() });
/** `version` is the one the editor started from; the document is checked by parseRunDocument of iso. */
export const lineSaveForm = z.object({
  version: z.int("The version is missing.").min(1, "The version is missing.").max(2_000_000_000, "The version is missing."),
  document: z.custom<RunDocument>((value) => typeof value === "object" && value !== null, "The document is missing."),
});

const note = (what: string) => requiredText(what, 2_000);
/** `version`: the line's version the submitter looked at; a newer one answers 409. */
export const submitForm = z.object({ description: note("what this revision is for"), version: z.int().min(1).optional() });
/** `accepted`: point ids of the unverified dimensions accepted by name. */
export const signForm = z.object({ password: typedPassword, accepted: z.array(z.string().max(60)).max(5_000).default([]) });
export const reasonForm = z.object({ reason: note("the reason") });
export const emptyForm = z.object({});
export const workKindSchema = z.enum(["cut", "fit-up", "weld", "visual", "actual"], { error: "Choose what was done." });
export const workForm = z.object({
  kind: workKindSchema,
  mark: requiredText("the mark", 60),
  key: requiredText("the mark", 200),
  values: z.record(requiredText("a name", 60), optionalText(500)).refine((values) => Object.keys(values).length <= 20, "At most 20 values."),
});

export type SignUpForm = z.infer<typeof signUpForm>;
export type AcceptForm = z.infer<typeof acceptForm>;
export type ShopForm = z.infer<typeof shopForm>;
export type JobForm = z.infer<typeof jobForm>;
export type JobPatchForm = z.infer<typeof jobPatchForm>;
export type LineForm = z.infer<typeof lineForm>;
export type LinePatchForm = z.infer<typeof linePatchForm>;
export type LineCopyForm = z.infer<typeof lineCopyForm>;
export type TakeOutForm = z.infer<typeof takeOutForm>;
export type WorkForm = z.infer<typeof workForm>;
