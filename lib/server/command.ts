/**
 * What every command is handed, and the transaction around it. Log entries and mails are gathered while it runs and
 * written last: entries so that the log's lock is held shortly, mails so that each carries the log's head.
 */
import type { Transaction } from "sequelize";
import type { AuditEvent } from "@/lib/rules/audit-events";
import type { ChainHead } from "@/lib/rules/audit-chain";
import { appendAudit } from "./audit";
import { inTransaction } from "./database";
import { log } from "./log";
import type { Mail } from "./mail";
import { enqueue } from "./queue";
import type { SessionViewer } from "./session";

/** Who acts: enough of a viewer for a command; a program (the demo seed) may act as a person too. */
export type Actor = Pick<SessionViewer, "personId" | "shopId" | "role" | "name">;

export interface ShopLog {
  readonly shopId: string;
  readonly actor: string | null;
}

export interface CommandContext<V = Actor> {
  readonly viewer: V;
  readonly tx: Transaction;
  readonly now: Date;
  /** Tells the log of the viewer's shop, or of the one given. Written when the command ends. */
  audit(event: AuditEvent, where?: ShopLog): void;
  /** Writes the entries told so far and gives the head, for what must carry it (a PDF). Takes the log's lock. */
  auditNow(): Promise<ChainHead>;
  /** Says that there may be nothing to tell: what was asked for is so already. */
  unchanged(): void;
  /** Queues a mail in this transaction. */
  mail(mail: Mail): void;
}

interface Gathered {
  readonly entries: { readonly event: AuditEvent; readonly where: ShopLog }[];
  readonly mails: Mail[];
  readonly heads: { readonly shopId: string; readonly head: ChainHead }[];
  mayBeSilent: boolean;
}

/**
 * Runs a command in one transaction.
 * @param rule "logged": a command that tells the log nothing is a programmer's error and is undone.
 */
export async function runCommand<V extends Actor | null, R>(
  viewer: V,
  rule: "logged" | "unlogged",
  work: (context: CommandContext<V>) => Promise<R>,
): Promise<R> {
  let heads: Gathered["heads"] = [];
  const result = await inTransaction(async (tx) => {
    const gathered: Gathered = { entries: [], mails: [], heads: [], mayBeSilent: rule === "unlogged" };
    const now = new Date();
    const done = await work(contextOf(viewer, tx, now, gathered));
    if (gathered.entries.length > 0) await writeEntries(tx, now, gathered);
    if (!gathered.mayBeSilent && gathered.heads.length === 0) throw new Error("A command changed something without telling the log.");
    await writeMails(tx, gathered);
    heads = gathered.heads;
    return done;
  });
  for (const { shopId, head } of heads) log.info({ shopId, auditSeq: head.seq, auditHash: head.hash }, "log entry");
  return result;
}

function contextOf<V extends Actor | null>(viewer: V, tx: Transaction, now: Date, gathered: Gathered): CommandContext<V> {
  const own = (): ShopLog => {
    if (viewer === null) throw new Error("Nobody is signed in: say which shop's log is meant.");
    return { shopId: viewer.shopId, actor: viewer.personId };
  };
  return {
    viewer,
    tx,
    now,
    audit: (event, where = own()) => void gathered.entries.push({ event, where }),
    auditNow: () => writeEntries(tx, now, gathered),
    unchanged: () => {
      gathered.mayBeSilent = true;
    },
    mail: (mail) => void gathered.mails.push(mail),
  };
}

async function writeEntries(tx: Transaction, now: Date, gathered: Gathered): Promise<ChainHead> {
  for (const { event, where } of gathered.entries.splice(0)) {
    const head = await appendAudit(tx, { ...where, at: now, event });
    gathered.heads.push({ shopId: where.shopId, head });
  }
  const last = gathered.heads[gathered.heads.length - 1];
  if (last === undefined) throw new Error("The log was asked for its head before anything was told.");
  return last.head;
}

async function writeMails(tx: Transaction, gathered: Gathered): Promise<void> {
  const last = gathered.heads[gathered.heads.length - 1];
  const foot = last === undefined ? "" : `\n\n--\nShop log entry ${last.head.seq}: ${last.head.hash}`;
  for (const mail of gathered.mails) await enqueue("mail", { ...mail, text: mail.text + foot }, tx);
}
