/** How a sheet's number reads: the count as the shop hands it out, padded so that lists sort. */
const DIGITS = 4;

/** 7 -> "0007"; nothing before the first submission. */
export function sheetNumberText(count: number | null): string {
  return count === null ? "" : String(count).padStart(DIGITS, "0");
}
