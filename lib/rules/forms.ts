/**
 * What people send, checked the same way in the browser (by field, while typing) and at the route handler. Each schema
 * is the JSON body of one write; lengths are millimetres, ids are strings. Messages are the sentences a person reads.
 */
import { z } from "zod";
import { lineSettingsSchema, npsSchema, TITLE_KEYS, unitSystemSchema } from "@/iso";

const text = (max: number) =>
  z.string({ error: "Enter a text." }).trim().max(max, `At most ${max} characters.`);
const needed = (what: string, max: number) => text(max).min(1, `Enter ${what}.`);
const uuid = z.uuid("That is not an id.");

export const emailSchema = z
  .string()
  .trim()
  .toLowerCase()
  .max(200, "At most 200 characters.")
  .pipe(z.email("Enter an e-mail address, such as name@shop.example."));
/** bcrypt reads 72 bytes at most, so a longer one is refused instead of cut. */
export const passwordSchema = z
  .string()
  .min(12, "Use at least 12 characters; a few words in a row do well.")
  .refine((value) => new TextEncoder().encode(value).length <= 72, "Use at most 72 characters.");
export const roleSchema = z.enum(["owner", "detailer", "inspector", "fitter"], { error: "Choose a role." });
export const sheetSizeSchema = z.enum(["letter", "tabloid", "A4", "A3"], { error: "Choose a sheet size." });
/** A tick that has to be there, with the sentence when it is not. */
const ticked = (sentence: string) => z.literal(true, { error: sentence });

export const signInSchema = z.object({
  email: emailSchema,
  password: z.string().min(1, "Enter your password.").max(200, "At most 200 characters."),
});

export const signUpSchema = z.object({
  shopName: needed("the name of the shop", 80),
  name: needed("your name as it is printed on sheets", 80),
  email: emailSchema,
  password: passwordSchema,
});

const token = z.string().min(16, "This link is not complete.").max(200, "This link is not complete.");
export const invitationAcceptSchema = z.object({
  token,
  name: needed("your name as it is printed on sheets", 80),
  password: passwordSchema,
});
export const resetRequestSchema = z.object({ email: emailSchema });
export const resetConfirmSchema = z.object({ token, password: passwordSchema });

export const shopSwitchSchema = z.object({ shopId: uuid });
export const inviteSchema = z.object({ email: emailSchema, role: roleSchema });
export const memberSchema = z.object({ role: roleSchema });

export const titleFieldsSchema = z
  .array(z.object({ label: needed("a label", 30), value: text(80) }))
  .max(6, "At most 6 fields of your own.");

/** Order of the title block's fields; empty = the usual one. */
export const titleOrderSchema = z.array(z.enum(TITLE_KEYS, { error: "The title block has no such field." })).max(TITLE_KEYS.length);

export const stockRowSchema = z.object({
  nps: npsSchema,
  schedule: needed("a schedule", 12),
  material: needed("a material", 120),
  lengthMm: z
    .number({ error: "Enter a length." })
    .finite()
    .positive("Longer than nothing.")
    .max(30_000, "At most 30 m."),
  quantity: z
    .number({ error: "Enter a number." })
    .int("A whole number.")
    .min(0, "Not under 0.")
    .max(10_000, "At most 10,000.")
    .nullable(),
  /** What one length costs, in the shop's own money; absent = not entered. Quantity null = as many as wanted. */
  cost: z.number({ error: "Enter a cost." }).finite().positive("Over 0.").max(1_000_000, "At most 1,000,000.").optional(),
  /** Of all lengths of the row; absent = not known. */
  heat: text(60).optional(),
});

/** A saw and what its cut takes, mm. */
export const sawSchema = z.object({
  name: needed("the saw's name", 40),
  kerfMm: z.number({ error: "Enter a length." }).finite().min(0, "Not under 0.").max(20, "At most 20 mm."),
});
/** How the shop cuts lengths up. */
export const nestingSchema = z.object({
  saws: z.array(sawSchema).min(1, "Enter at least one saw.").max(8, "At most 8 saws."),
  endTrimMm: z.number({ error: "Enter a length." }).finite().min(0, "Not under 0.").max(500, "At most 500 mm."),
  leastOffcutMm: z.number({ error: "Enter a length." }).finite().min(0, "Not under 0.").max(10_000, "At most 10 m."),
  /** What a rest that goes back is worth, as a share of new pipe of its length. */
  offcutShare: z.number({ error: "Enter a percentage." }).finite().min(0, "Not under 0.").max(0.95, "At most 95 %."),
});

/** PATCH of the shop; what is absent stays. */
export const shopSettingsSchema = z
  .object({
    name: needed("the name of the shop", 80),
    fields: titleFieldsSchema,
    titleOrder: titleOrderSchema,
    sheetSize: sheetSizeSchema,
    defaults: lineSettingsSchema,
    stock: z.array(stockRowSchema).max(200, "At most 200 rows."),
    nesting: nestingSchema,
  })
  .partial();

/** One word on a take-out: confirmed as tabulated (null) or what the shop measured, mm. */
export const takeOutSchema = z.object({
  key: needed("which take-out", 120),
  valueMm: z
    .number({ error: "Enter a length." })
    .finite()
    .positive("Longer than nothing.")
    .max(5_000, "At most 5 m.")
    .nullable(),
});

export const jobNewSchema = z.object({
  number: needed("a job number", 40),
  title: needed("a title", 120),
  client: text(120),
  area: text(120),
  units: unitSystemSchema,
});

/** PATCH of a job; what is absent stays. */
export const jobSettingsSchema = z
  .object({
    number: needed("a job number", 40),
    title: needed("a title", 120),
    client: text(120),
    area: text(120),
    open: z.boolean(),
    fields: titleFieldsSchema,
    titleOrder: titleOrderSchema,
    sheetSize: sheetSizeSchema,
    plantNorthDeg: z
      .number({ error: "Enter degrees, 0 to 359.9." })
      .finite()
      .min(0, "From 0 degrees.")
      .lt(360, "Under 360 degrees."),
    defaults: lineSettingsSchema,
  })
  .partial();

export const lineNewSchema = z.object({ number: needed("a line number", 60), title: text(120) });
export const lineCopySchema = lineNewSchema;
/** PATCH of a line's head; what is absent stays. */
export const lineHeadSchema = z
  .object({ number: needed("a line number", 60), title: text(120), archived: z.boolean() })
  .partial();

export const submitSchema = z.object({
  description: needed("what this revision is for", 200),
  size: sheetSizeSchema,
});

const reason = z
  .string({ error: "Give a reason." })
  .trim()
  .min(3, "Give a reason the next person can act on.")
  .max(500, "At most 500 characters.");
export const reasonSchema = z.object({ reason });

export const signSchema = z.object({
  password: z.string().min(1, "Enter your password again to sign.").max(200, "At most 200 characters."),
  /** Points whose unverified dimension the signer accepts. */
  accepted: z.array(z.string().max(60)).max(2_000),
  verified: ticked("Confirm this to release the sheet."),
});

export const asBuiltSchema = z.object({ reason, verified: ticked("Confirm this to close the spool.") });

export const workKindSchema = z.enum(["cut", "fit-up", "weld", "visual", "actual"]);
/** Fields of a work entry, as entered; which kind takes which is said by WORK_FIELDS. */
export const WORK_FIELDS = {
  cut: ["heat", "length", "remarks"],
  "fit-up": ["gap", "remarks"],
  weld: ["welder", "procedure", "heatA", "heatB", "remarks"],
  visual: ["result", "remarks"],
  actual: ["actual", "remarks"],
} as const satisfies Readonly<Record<z.infer<typeof workKindSchema>, readonly string[]>>;

export const workSchema = z
  .object({
    kind: workKindSchema,
    mark: needed("the mark", 40),
    key: needed("which piece or weld", 160),
    values: z.record(z.string().max(20), text(200)),
  })
  .superRefine((entry, context) => {
    const known: readonly string[] = WORK_FIELDS[entry.kind];
    for (const field of Object.keys(entry.values)) {
      if (!known.includes(field))
        context.addIssue({
          code: "custom",
          path: ["values", field],
          message: "This entry has no such field.",
        });
    }
    const missing = { weld: "welder", visual: "result", actual: "actual", cut: null, "fit-up": null }[
      entry.kind
    ];
    if (missing && !entry.values[missing])
      context.addIssue({
        code: "custom",
        path: ["values", missing],
        message: MISSING[missing] ?? "Enter this.",
      });
  });

const MISSING: Readonly<Record<string, string>> = {
  welder: "Enter who welded it.",
  result: "Choose a result.",
  actual: "Enter what was measured.",
};

export type SignInForm = z.infer<typeof signInSchema>;
export type SignUpForm = z.infer<typeof signUpSchema>;
export type InvitationAcceptForm = z.infer<typeof invitationAcceptSchema>;
export type InviteForm = z.infer<typeof inviteSchema>;
export type JobNewForm = z.infer<typeof jobNewSchema>;
export type JobSettingsForm = z.infer<typeof jobSettingsSchema>;
export type LineNewForm = z.infer<typeof lineNewSchema>;
export type SubmitForm = z.infer<typeof submitSchema>;
export type ReasonForm = z.infer<typeof reasonSchema>;
export type SignForm = z.infer<typeof signSchema>;
export type AsBuiltForm = z.infer<typeof asBuiltSchema>;
export type WorkForm = z.infer<typeof workSchema>;
export type ShopSettingsForm = z.infer<typeof shopSettingsSchema>;
