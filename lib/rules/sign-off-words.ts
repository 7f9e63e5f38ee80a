/** Who signed a sheet, in words. Pure. */
import type { SheetInput } from "@/iso";

/** "Pat Ruiz, inspector"; the name alone on sheets signed before the role was kept. */
export function checkedWords({ checkedBy, checkedRole }: SheetInput["revision"]): string {
  return checkedRole === undefined ? checkedBy : `${checkedBy}, ${checkedRole}`;
}
