/** What may be asked of the routes that hand out files. */
import { z } from "zod";
import { SHEET_PARTS, type SheetPart } from "@/iso";
import { sheetSizeSchema } from "@/lib/rules/forms";

const of = z.enum(["issued", "draft"], { error: "Say of=issued or of=draft." }).nullable().default(null);
const list = <W extends "materials" | "cuts" | "welds">(what: W) =>
  z.object({ what: z.literal(what), as: z.enum(["csv", "xlsx"], { error: "Lists come as csv or xlsx." }).default("csv"), of });

export const listExportSchema = [list("materials"), list("cuts"), list("welds")] as const;

export const drawingExportSchema = z.object({
  what: z.literal("drawing"),
  as: z.enum(["svg", "dxf"], { error: "Drawings come as svg or dxf." }).default("svg"),
  of,
  /** Of a draft; an issued sheet has the size it was issued in. Absent = the job's. */
  size: sheetSizeSchema.nullable().default(null),
  /** From 1. */
  sheet: z.coerce.number({ error: "The sheet is a number." }).int().min(1, "Sheets count from 1.").max(999, "There is no such sheet.").default(1),
});

export const pointsExportSchema = z.object({ what: z.literal("points"), as: z.literal("csv", { error: "Points come as csv." }).default("csv") });

export const benchPrintSchema = z.object({
  kind: z.enum(["layout", "templates"], { error: "Say kind=layout or kind=templates." }),
  of,
  /** Absent = as the sheet was issued, or the job's for a draft. */
  size: sheetSizeSchema.nullable().default(null),
  /** Thickness of the paper that templates are printed on, mm; absent = ordinary printing paper. */
  paper: z.coerce.number({ error: "The paper's thickness is a number of millimetres." }).min(0, "Paper has a thickness.").max(1, "Paper is at most 1 mm thick.").nullable().default(null),
});

const isPart = (word: string): word is SheetPart => (SHEET_PARTS as readonly string[]).includes(word);

export const sheetSetSchema = z.object({
  /** "sheet,cuts,welds": each once, in any order. */
  parts: z.string({ error: "Say which parts, as parts=sheet,cuts,welds." }).max(100).transform((text, context): SheetPart[] => {
    const words = text.split(",").map((word) => word.trim()).filter((word) => word !== "");
    const known = words.filter(isPart);
    if (known.length === 0 || known.length < words.length) {
      context.addIssue({ code: "custom", message: `Parts are ${SHEET_PARTS.join(", ")}; take at least one.` });
      return z.NEVER;
    }
    return SHEET_PARTS.filter((part) => known.includes(part));
  }),
  of,
  size: sheetSizeSchema.nullable().default(null),
  /** fit=1 keeps everything inside printers' margins; true-scale pages keep their scale. */
  fit: z.enum(["0", "1"], { error: "Say fit=1 or leave it out." }).default("0"),
  paper: benchPrintSchema.shape.paper,
}).transform(({ fit, ...rest }) => ({ ...rest, safeMargins: fit === "1" }));
