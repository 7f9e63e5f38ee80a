/** The certificate a shop signs sheets with: made at first need, replaced by an upload or a new one; old rows stay. */
import { QueryTypes } from "sequelize";
import { detachedSignature, isIssuerKept, type SigningKey } from "@/pdf/sign-sheet";
import type { CommandContext } from "@/lib/server/command";
import { certificateFacts, certificateRefusal, dayOf } from "@/lib/server/certificate-facts";
import { getDb } from "@/lib/server/database";
import { refuseConflict, refuseInvalid } from "@/lib/server/errors";
import { makeP12, openP12, P12Trouble } from "@/lib/server/p12";
import { inShop, type ShopMember } from "@/lib/server/scope";
import { openSecret, sealSecret } from "@/lib/server/sealing";
import { Shop, ShopCertificate } from "@/models";

export interface SigningCertificate {
  readonly id: string;
  readonly subject: string;
  readonly key: SigningKey;
}

/**
 * The shop's certificate, opened. A shop without one, or whose own one ended or was sealed under a key this server no
 * longer has, gets a new one. @throws Refusal 409 when an uploaded one ended or cannot be opened: the owner decides then.
 */
export async function signingCertificate(context: CommandContext): Promise<SigningCertificate> {
  const newest = await lockedNewest(context);
  if (newest === null) return makeCertificate(context);
  const { id, subject } = newest;
  const key = openRow(newest);
  if (key !== null && newest.validTo > context.now) return { id, subject, key };
  if (newest.origin === "made") return makeCertificate(context);
  const why = key === null ? "cannot be opened with this server's key" : `ended on ${dayOf(newest.validTo)}`;
  throw refuseConflict(`The shop's certificate ${why}, so nothing can be signed. The owner uploads another, or makes one, on the Shop page.`);
}

/** A new self-signed certificate under the shop's name. */
export async function makeCertificate(context: CommandContext): Promise<SigningCertificate> {
  const shop = await Shop.findOne({ where: { id: context.viewer.shopId }, rejectOnEmpty: true, transaction: context.tx });
  const { p12, password } = await makeP12(shop.name, context.now);
  return keepRow(context, "made", p12, password, openP12(p12, password));
}

/** Takes a .p12 with its password. @throws Refusal 400 saying what is wrong with it; neither is kept or logged then. */
export async function uploadCertificate(context: CommandContext, { p12, password }: { readonly p12: Uint8Array; readonly password: string }): Promise<SigningCertificate> {
  const key = openedUpload(p12, password);
  const problem = certificateRefusal(key.certificates[0]!, context.now) ?? trialProblem(key, context.now);
  if (problem !== null) throw refuseInvalid(problem, { p12: problem });
  return keepRow(context, "uploaded", p12, password, key);
}

function openedUpload(p12: Uint8Array, password: string): SigningKey {
  try {
    return openP12(p12, password);
  } catch (error) {
    if (error instanceof P12Trouble) throw refuseInvalid(error.message, { [error.field]: error.message });
    throw error;
  }
}

/** Signs nothing much, so that a certificate that cannot sign is found now and not at the first sheet. */
function trialProblem(key: SigningKey, now: Date): string | null {
  const cannot = "This server cannot sign with that certificate. Ask who issued it for an RSA certificate for signing documents.";
  try {
    detachedSignature(new Uint8Array(1), key, now);
    return isIssuerKept(key) ? null : cannot;
  } catch {
    return cannot;
  }
}

async function keepRow(context: CommandContext, origin: "made" | "uploaded", p12: Uint8Array, password: string, key: SigningKey): Promise<SigningCertificate> {
  const { viewer, tx, now } = context;
  const newest = await lockedNewest(context);
  const facts = certificateFacts(key.certificates);
  const sealed = { sealedP12: sealSecret(p12, placeOf(viewer, "p12")), sealedPassword: sealSecret(Buffer.from(password), placeOf(viewer, "password")) };
  const row = await inShop(viewer).add(ShopCertificate, { ...facts, ...sealed, origin, ordinal: (newest?.ordinal ?? 0) + 1, at: now, by: viewer.personId }, tx);
  context.audit({ type: "certificate.kept", data: { certificateId: row.id, origin, subject: facts.subject, fingerprint: facts.fingerprint, validTo: dayOf(facts.validTo) } });
  return { id: row.id, subject: facts.subject, key };
}

/** The certificate in use, with the shop's certificates to ourselves until the transaction ends: two first signings make one. */
async function lockedNewest({ viewer, tx }: CommandContext): Promise<ShopCertificate | null> {
  await getDb().query("SELECT pg_advisory_xact_lock(hashtextextended('certificate:' || $shopId, 0))", { bind: { shopId: viewer.shopId }, type: QueryTypes.SELECT, transaction: tx });
  return inShop(viewer).first(ShopCertificate, {}, tx, { order: [["ordinal", "DESC"]] });
}

function openRow(row: ShopCertificate): SigningKey | null {
  const p12 = openSecret(row.sealedP12, placeOf(row, "p12"));
  const password = openSecret(row.sealedPassword, placeOf(row, "password"));
  return p12 === null || password === null ? null : openP12(p12, Buffer.from(password).toString("utf8"));
}

function placeOf({ shopId }: ShopMember, what: "p12" | "password"): string {
  return `${shopId}:certificate-${what}`;
}
