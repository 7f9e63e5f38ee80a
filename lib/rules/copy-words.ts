/** The word a printed copy carries across it, when its revision is not one to work from now. Pure. */
import type { RevisionState } from "@/iso";

export type CopyWord = "HOLD" | "RETURNED" | "SUPERSEDED" | "VOID";

/** HOLD comes first. One for review has FOR REVIEW across it from the start; AS-BUILT is not crossed out. */
export function copyWord(state: RevisionState, hold: boolean): CopyWord | null {
  if (hold) return "HOLD";
  if (state === "returned") return "RETURNED";
  if (state === "superseded") return "SUPERSEDED";
  return state === "void" ? "VOID" : null;
}
