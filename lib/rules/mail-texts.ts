/** The mails of accounts, as plain text. Pure: names and links are handed in. */
import type { Role } from "./api-types";

export interface MailText {
  readonly subject: string;
  readonly text: string;
}

/** To somebody asked to join a shop. */
export function invitationMail(facts: { readonly shop: string; readonly by: string; readonly role: Role; readonly link: string; readonly days: number }): MailText {
  return {
    subject: `Join ${facts.shop} on Quarterline`,
    text: [
      `${facts.by} asks you to join ${facts.shop} as ${facts.role}.`,
      `Open this link to join. It works once and runs out in ${facts.days} days:`,
      facts.link,
      "If you do not know this shop, leave this mail alone.",
    ].join("\n\n"),
  };
}

/** To somebody who forgot their password. */
export function resetMail(facts: { readonly link: string; readonly minutes: number }): MailText {
  return {
    subject: "Set a new password for Quarterline",
    text: [
      `Open this link to set a new password. It works once and runs out in ${facts.minutes} minutes:`,
      facts.link,
      "If you did not ask for it, leave this mail alone: nothing has changed.",
    ].join("\n\n"),
  };
}

/** To somebody whose password was just set anew. */
export function passwordSetMail(): MailText {
  return {
    subject: "Your Quarterline password was set anew",
    text: "The password of your account was set anew by a mailed link, and you were signed out everywhere. If that was not you, ask for a new link at once and tell the owner of your shop.",
  };
}
