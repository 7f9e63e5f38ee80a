/** Mails caught by the local stand-in, the newest first. Demo mode only. */
import { readdir, readFile } from "node:fs/promises";
import path from "node:path";
import { z } from "zod";
import type { OutboxMail } from "@/lib/rules/api-types";
import { refuseNotFound } from "@/lib/server/errors";
import { settings } from "@/lib/server/settings";

const MAILS_SHOWN = 100;
const mailSchema = z.object({ to: z.array(z.string()), subject: z.string(), text: z.string(), receivedAt: z.string() });

/** @throws Refusal 404 outside demo mode. */
export async function outboxMails(): Promise<OutboxMail[]> {
  const { DEMO, OUTBOX_DIR } = settings();
  if (!DEMO || OUTBOX_DIR === undefined) throw refuseNotFound();
  const names = (await readdir(OUTBOX_DIR)).filter((name) => name.endsWith(".json")).sort().reverse().slice(0, MAILS_SHOWN);
  return Promise.all(names.map(async (name) => mailOf(await readFile(path.join(OUTBOX_DIR, name), "utf8"))));
}

function mailOf(text: string): OutboxMail {
  const { to, subject, text: words, receivedAt } = mailSchema.parse(JSON.parse(text));
  return { to: to.join(", "), subject, text: words, at: receivedAt };
}
