/** The mails of the revision desk, as plain text. Pure: names and links are handed in. */
import type { MailText } from "./mail-texts";

export interface SheetFacts {
  readonly sheetNumber: string;
  readonly line: string;
  readonly spool: string;
  readonly code: string;
  readonly by: string;
  readonly link: string;
}

const name = (f: SheetFacts) => `sheet ${f.sheetNumber} (${f.line}, spool ${f.spool}) revision ${f.code}`;
const short = (f: SheetFacts) => `Sheet ${f.sheetNumber} rev ${f.code}`;

/** To those who may sign. */
export function submittedMail(f: SheetFacts, description: string): MailText {
  return { subject: `${short(f)}: FOR REVIEW`, text: `${f.by} submitted ${name(f)} for review: ${description}\n\nReview it here:\n${f.link}` };
}

/** To the one who submitted it. */
export function returnedMail(f: SheetFacts, reason: string): MailText {
  return { subject: `${short(f)}: RETURNED`, text: `${f.by} returned ${name(f)}.\n\nReason: ${reason}\n\nOpen it here:\n${f.link}` };
}

/** To those who work from it. */
export function signedMail(f: SheetFacts, superseded: string | null): MailText {
  const old = superseded === null ? "" : `\n\nRevision ${superseded} is SUPERSEDED: take its prints off the bench and destroy them.`;
  return { subject: `${short(f)}: FOR FABRICATION`, text: `${f.by} signed ${name(f)} for fabrication.${old}\n\nOpen it here:\n${f.link}` };
}

/** To those who work from it: stop. */
export function heldMail(f: SheetFacts, reason: string): MailText {
  return { subject: `${short(f)}: HOLD`, text: `${f.by} put ${name(f)} on HOLD. Stop work on it.\n\nReason: ${reason}\n\nOpen it here:\n${f.link}` };
}

/** To those who work from it: go on. */
export function releasedMail(f: SheetFacts, reason: string): MailText {
  return { subject: `${short(f)}: released from hold`, text: `${f.by} released ${name(f)} from hold.\n\nReason: ${reason}\n\nOpen it here:\n${f.link}` };
}

/** To those who work from it: it is dead. */
export function voidedMail(f: SheetFacts, reason: string): MailText {
  return { subject: `${short(f)}: VOID`, text: `${f.by} voided ${name(f)}. Take its prints off the bench and destroy them.\n\nReason: ${reason}\n\nOpen it here:\n${f.link}` };
}

/** To those who made it. */
export function asBuiltMail(f: SheetFacts, remark: string): MailText {
  return { subject: `${short(f)}: AS-BUILT`, text: `${f.by} closed ${name(f)} as built.\n\nRemark: ${remark}\n\nOpen it here:\n${f.link}` };
}
