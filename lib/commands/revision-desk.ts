/** What the commands of the revision desk share: the locked revision with its spool and line, and who is told. */
import { Op } from "sequelize";
import { isTransition } from "@/lib/rules/revision-rules";
import type { Role } from "@/lib/rules/api-types";
import { STATE_WORDS, type RevisionState, type SheetInput } from "@/iso";
import { holdersOf } from "@/lib/queries/copies-out";
import { holderNote } from "@/lib/rules/copies";
import type { ChainHead } from "@/lib/rules/audit-chain";
import type { MailText } from "@/lib/rules/mail-texts";
import type { SheetFacts } from "@/lib/rules/revision-mails";
import { sheetNumberText } from "@/lib/rules/sheet-number";
import type { CommandContext } from "@/lib/server/command";
import { refuseConflict } from "@/lib/server/errors";
import { inShop, type ShopMember } from "@/lib/server/scope";
import { settings } from "@/lib/server/settings";
import { Line, Membership, Person, Revision, Spool } from "@/models";
import type { SigningCertificate } from "./keep-certificate";
import { storeSheet } from "./render-sheet";

export interface DeskCase {
  readonly revision: Revision;
  readonly spool: Spool;
  readonly line: Line;
}

/**
 * A revision with its spool and line. The spool is locked first, by every command of the desk, so that two decisions
 * about one spool never overlap and never deadlock; the revision is read after that. @throws Refusal 404.
 */
export async function deskCase({ viewer, tx }: CommandContext, revisionId: string): Promise<DeskCase> {
  const shop = inShop(viewer);
  const { spoolId } = await shop.one(Revision, revisionId, tx);
  const spool = await shop.locked(Spool, spoolId, tx);
  const revision = await shop.locked(Revision, revisionId, tx);
  return { revision, spool, line: await shop.one(Line, spool.lineId, tx) };
}

/** @throws Refusal 409 when the state does not allow the step. */
export function assertStep(revision: Revision, to: RevisionState): void {
  if (!isTransition(revision.state, to)) {
    throw refuseConflict(`Revision ${revision.code} is ${STATE_WORDS[revision.state]}; it cannot become ${STATE_WORDS[to]}. Load the page again to see who changed it.`);
  }
}

/** What log events and mails name a revision by. */
export function namedIn({ revision, spool }: DeskCase): { revisionId: string; sheetNumber: string; code: string } {
  return { revisionId: revision.id, sheetNumber: sheetNumberText(spool.sheetNumber), code: revision.code };
}

/** Renders and keeps a sheet of the revision (storeSheet), and tells the log its hash. */
export async function keepSheet(
  context: CommandContext,
  desk: DeskCase,
  kind: "review" | "fabrication",
  input: SheetInput,
  contentKey: string,
  head: ChainHead,
  certificate: SigningCertificate | null = null,
): Promise<void> {
  const sha256 = await storeSheet(context, desk.revision, kind, input, contentKey, head, certificate);
  context.audit({ type: "sheet.stored", data: { ...namedIn(desk), kind, sha256 } });
}

/** What a mail says of a sheet, with a link into the shop. */
export function mailFacts({ viewer }: CommandContext, { revision, spool, line }: DeskCase, path: string): SheetFacts {
  return { sheetNumber: sheetNumberText(spool.sheetNumber), line: line.number, spool: spool.letter, code: revision.code, by: viewer.name, link: `${settings().BASE_URL}${path}` };
}

interface Member {
  readonly personId: string;
  readonly role: Role;
  readonly email: string;
}

/** Everyone in the shop now, with their role and address. */
export async function shopMembers(member: ShopMember, tx: CommandContext["tx"]): Promise<Member[]> {
  const rows = await inShop(member).all(Membership, { removedAt: null }, tx);
  const people = await Person.findAll({ where: { id: { [Op.in]: rows.map((row) => row.personId) } }, transaction: tx });
  const email = new Map(people.map((person) => [person.id, person.email]));
  return rows.map((row) => ({ personId: row.personId, role: row.role, email: email.get(row.personId) ?? "" }));
}

/**
 * Mails everyone whose role is named, those named themselves, and those who hold copies of a revision with what they
 * hold; but never the one who acts.
 * @param heldId the revision whose copies count; null = nobody's copies do
 */
export async function tell(context: CommandContext, roles: readonly Role[], people: readonly string[], mail: MailText, heldId: string | null = null): Promise<void> {
  const holders = heldId === null ? new Map<string, never>() : await holdersOf(context.viewer, heldId, context.tx);
  for (const { personId, role, email } of await shopMembers(context.viewer, context.tx)) {
    const meant = roles.includes(role) || people.includes(personId) || holders.has(personId);
    const text = mail.text + holderNote(holders.get(personId) ?? []);
    if (meant && personId !== context.viewer.personId) context.mail({ to: email, ...mail, text });
  }
}
