/** Rules of marks as a form's texts and back. */
import { z } from "zod";
import { DEFAULT_MARK_RULES, type MarkRules } from "@/iso";

const prefix = z.string().max(6, "At most 6 characters.");

/** The fields of a form that hold rules of marks. */
export const markTextShape = {
  weldPrefix: prefix,
  weldStart: z.string(),
  piecePrefix: prefix,
  pieceStart: z.string(),
  added: z.enum(["letter", "next"]),
  spools: z.enum(["letters", "numbers"]),
};

type MarkTexts = z.infer<z.ZodObject<typeof markTextShape>>;

/** What the fields start with. */
export function markRulesToText(rules: MarkRules | undefined): MarkTexts {
  const marks = rules ?? DEFAULT_MARK_RULES;
  return { ...marks, weldStart: String(marks.weldStart), pieceStart: String(marks.pieceStart) };
}

/** The rules of marks; absent when they are the usual ones, so that such settings stay as they were stored. */
export function markRules(values: MarkTexts, context: z.RefinementCtx): { marks?: MarkRules } {
  const marks: MarkRules = {
    weldPrefix: values.weldPrefix.trim(),
    weldStart: firstNumber(values.weldStart, "weldStart", context),
    piecePrefix: values.piecePrefix.trim(),
    pieceStart: firstNumber(values.pieceStart, "pieceStart", context),
    added: values.added,
    spools: values.spools,
  };
  return (Object.keys(marks) as (keyof MarkRules)[]).every((key) => marks[key] === DEFAULT_MARK_RULES[key]) ? {} : { marks };
}

function firstNumber(text: string, field: string, context: z.RefinementCtx): number {
  const value = Number(text.trim());
  if (text.trim() !== "" && Number.isInteger(value) && value >= 1 && value <= 9_999) return value;
  context.addIssue({ code: "custom", path: [field], message: "Enter a whole number, 1 to 9999." });
  return 1;
}
