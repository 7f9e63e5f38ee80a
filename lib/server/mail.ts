/** Mail over SMTP. Plain text only: what a mail says must read the same everywhere, and carries no tracking. */
import nodemailer, { type Transporter } from "nodemailer";
import { settings } from "./settings";

export interface Mail {
  readonly to: string;
  readonly subject: string;
  readonly text: string;
}

const CONNECT_LIMIT_MS = 5_000;
const SEND_LIMIT_MS = 20_000;

const shared = globalThis as typeof globalThis & { quarterlineMail?: Transporter };

function transport(): Transporter {
  shared.quarterlineMail ??= nodemailer.createTransport({
    url: settings().SMTP_URL,
    connectionTimeout: CONNECT_LIMIT_MS,
    greetingTimeout: CONNECT_LIMIT_MS,
    socketTimeout: SEND_LIMIT_MS,
    // Nothing a user typed may make the server read a file or fetch an address.
    disableFileAccess: true,
    disableUrlAccess: true,
  } as Parameters<typeof nodemailer.createTransport>[1]);
  return shared.quarterlineMail;
}

/** Hands one mail to the SMTP server. @throws when it is not accepted; the queue then tries again. */
export async function sendMail(mail: Mail): Promise<void> {
  await transport().sendMail({
    from: settings().MAIL_FROM,
    to: { name: "", address: mail.to },
    subject: mail.subject.replace(/[\r\n]+/g, " "),
    text: mail.text,
  });
}

/** Whether the SMTP server answers; never throws. */
export async function mailReachable(): Promise<boolean> {
  try {
    return await transport().verify();
  } catch {
    return false;
  }
}
