/**
 * What may happen to a revision, to whom, and what its code is. Pure: the database repeats the transitions in a
 * trigger, so that no second door exists.
 */
import { STATE_WORDS, type RevisionState } from "@/iso";
import type { Role } from "./api-types";

/** Letters a revision may carry: I, O, Q, S, X and Z are left out, since they read as other characters (common practice). */
export const REVISION_LETTERS = "ABCDEFGHJKLMNPRTUVWY";

/** The next revision code after `previous`: A, B, ... Y, AA, AB, ... ; null gives the first. */
export function revisionCodeNext(previous: string | null): string {
  if (previous === null || previous === "") return REVISION_LETTERS.charAt(0);
  const digits = [...previous].map((letter) => REVISION_LETTERS.indexOf(letter));
  for (let at = digits.length - 1; at >= 0; at--) {
    const digit = digits[at] ?? 0;
    if (digit < REVISION_LETTERS.length - 1) {
      digits[at] = digit + 1;
      return digits.map((d) => REVISION_LETTERS.charAt(d)).join("");
    }
    digits[at] = 0;
  }
  return REVISION_LETTERS.charAt(0).repeat(digits.length + 1);
}

const TRANSITIONS: Readonly<Record<RevisionState, readonly RevisionState[]>> = {
  draft: ["for-review"],
  "for-review": ["returned", "for-fabrication", "void"],
  returned: [],
  "for-fabrication": ["superseded", "void", "as-built"],
  "as-built": ["superseded", "void"],
  superseded: [],
  void: [],
};

/** Whether a revision may go from one state to another. */
export function isTransition(from: RevisionState, to: RevisionState): boolean {
  return TRANSITIONS[from].includes(to);
}

/** Live: the one the bench works from. */
export function isLive(state: RevisionState): boolean {
  return state === "for-fabrication" || state === "as-built";
}

export interface SignFacts {
  readonly role: Role;
  readonly personId: string;
  readonly state: RevisionState;
  readonly hold: boolean;
  readonly submittedById: string;
  /** Everyone who touched the line's content since this spool's last signed revision. */
  readonly touchedByIds: readonly string[];
  /** Whether any other live member of the shop could sign. */
  readonly othersWhoMaySign: number;
}

/** Why this person may not sign, as a sentence; null when they may. */
export function signRefusal(facts: SignFacts): string | null {
  if (facts.role !== "owner" && facts.role !== "inspector") return "Only an inspector or the owner signs a revision.";
  if (facts.state !== "for-review") return `This revision is ${STATE_WORDS[facts.state]}; only one that is FOR REVIEW can be signed.`;
  if (facts.hold) return "This revision is on HOLD. Release it first.";
  if (facts.submittedById === facts.personId || facts.touchedByIds.includes(facts.personId)) {
    const alone = facts.othersWhoMaySign === 0 ? " Nobody else in this shop may sign: invite an inspector." : "";
    return `You worked on this content since it was last signed, so a second person has to sign it.${alone}`;
  }
  return null;
}

/** Why this person may not submit the spool for review, as a sentence; null when they may. */
export function submitRefusal(facts: { role: Role; openRevisionCode: string | null; stops: readonly string[] }): string | null {
  if (facts.role !== "owner" && facts.role !== "detailer") return "Only a detailer or the owner submits a revision.";
  if (facts.openRevisionCode !== null) return `Revision ${facts.openRevisionCode} is already FOR REVIEW. It has to be signed or returned first.`;
  if (facts.stops.length > 0) return `Mend this first: ${facts.stops[0]}`;
  return null;
}
