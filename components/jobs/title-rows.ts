/** The rows of the title block's form: the sheet's own fields, which only change places, and the shop's, which come and go. */
import { z } from "zod";
import { TITLE_KEYS, TITLE_WORDS, titleOrder, type TitleBlock, type TitleKey } from "@/iso";
import { titleFieldsSchema } from "@/lib/rules/forms";

/** A row with a built-in key, or "own" with what is printed. */
export const titleRowsSchema = z.object({
  rows: z.array(z.object({ key: z.string(), label: z.string(), value: z.string() })).superRefine((rows, context) => {
    rows.forEach((row, at) => {
      if (row.key !== "own") return;
      const read = titleFieldsSchema.safeParse([{ label: row.label, value: row.value }]);
      for (const issue of read.error?.issues ?? []) context.addIssue({ code: "custom", message: issue.message, path: [at, String(issue.path[1] ?? "label")] });
    });
  }),
});
export type TitleRows = z.infer<typeof titleRowsSchema>;
export type TitleRow = TitleRows["rows"][number];

export const MOST_OWN = 6;
export const isOwn = (row: TitleRow): boolean => row.key === "own";

/** Rows in the order they print; keys of own fields that are not there are left out. */
export function rowsOf(fields: TitleBlock["fields"], order: readonly string[] | undefined): TitleRow[] {
  return titleOrder(order).flatMap((key): TitleRow[] => {
    const own = /^own-(\d)$/.exec(key);
    if (!own) return [{ key, label: "", value: "" }];
    const field = fields[Number(own[1]) - 1];
    return field ? [{ key: "own", ...field }] : [];
  });
}

export interface TitleChange {
  readonly fields: { label: string; value: string }[];
  /** Empty when it is the usual order. */
  readonly titleOrder: TitleKey[];
}

/** What rows are kept as: own fields in the order they stand, and the order of all. */
export function changeOf(rows: readonly TitleRow[]): TitleChange {
  const own = rows.filter(isOwn);
  const keys = rows.map((row) => (isOwn(row) ? `own-${own.indexOf(row) + 1}` : row.key) as TitleKey);
  const whole = titleOrder(keys);
  const isUsual = whole.every((key, at) => key === TITLE_KEYS[at]);
  return { fields: own.map(({ label, value }) => ({ label: label.trim(), value: value.trim() })), titleOrder: isUsual ? [] : [...whole] };
}

/** What a built-in row is called. */
export function rowName(row: TitleRow): string {
  return isOwn(row) ? row.label.trim() || "new field" : TITLE_WORDS[row.key as keyof typeof TITLE_WORDS];
}
