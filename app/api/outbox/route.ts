import { outboxMails } from "@/lib/queries/outbox";
import { readPublic } from "@/lib/server/read";

/** Demo mode only: the local stand-in's mails, for anybody on this machine, since a new person reads theirs before signing in. */
export const GET = readPublic({ run: () => outboxMails() });
