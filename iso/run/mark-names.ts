/** How marks are spelt: weld numbers, piece marks, spool letters, and the suffix of one that came in between. */

/** Letters that read as figures or as other marks are left out (common practice; the same set as for revisions). */
export const MARK_LETTERS = [..."ABCDEFGHJKLMNPRTUVWY"];

/** A, B, .. Y, AA, AB, .. without I O Q S X Z; index from 0. */
export function letterMark(index: number): string {
  const base = MARK_LETTERS.length;
  let text = "";
  for (let n = index + 1; n > 0; n = Math.floor((n - 1) / base)) text = (MARK_LETTERS[(n - 1) % base] ?? "") + text;
  return text;
}

/**
 * The number inside a mark: 5 of "5", "5A" and "P5A"; 0 when there is none. A prefix that ends in a figure ("L2-1") is
 * told apart by handing it in; otherwise the last figures count.
 */
export function markNumber(mark: string, prefix = ""): number {
  const rest = prefix !== "" && mark.startsWith(prefix) ? mark.slice(prefix.length) : mark;
  const found = /(\d+)\D*$/.exec(rest);
  return found ? Number(found[1]) : 0;
}

/** A mark without the letters of one that came in between: "P5" of "P5A". */
export function markStem(mark: string): string {
  return /^(.*\d)[A-Z]*$/.exec(mark)?.[1] ?? mark;
}
