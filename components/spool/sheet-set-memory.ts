/** What was last chosen of a set, kept in this browser; the tick that lengths are verified is asked each time. */
import { sheetSetChoiceSchema, type SheetSetChoice } from "@/lib/rules/sheet-set-form";

const KEY = "quarterline.set";

const FIRST: SheetSetChoice = { parts: ["sheet", "cuts", "welds"], size: "", fit: false };

export function recallSet(): SheetSetChoice {
  try {
    const found = sheetSetChoiceSchema.safeParse(JSON.parse(localStorage.getItem(KEY) ?? "null"));
    return found.success ? found.data : FIRST;
  } catch {
    return FIRST;
  }
}

export function rememberSet({ parts, size, fit }: SheetSetChoice): void {
  try {
    localStorage.setItem(KEY, JSON.stringify({ parts, size, fit }));
  } catch {
    // Without a store the next set begins with the usual parts.
  }
}
