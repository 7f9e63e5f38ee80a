/** The certificates a shop signs sheets with: the one in use first, those before it after. Never keys or passwords. */
import type { CertificateRow } from "@/lib/rules/certificates";
import { inShop, type ShopMember } from "@/lib/server/scope";
import { ShopCertificate } from "@/models";
import { peopleNames } from "./people-names";

const PUBLIC = ["id", "origin", "subject", "issuer", "fingerprint", "validFrom", "validTo", "certificatePem", "at", "by"];

export async function shopCertificates(member: ShopMember): Promise<CertificateRow[]> {
  const rows = await inShop(member).all(ShopCertificate, {}, null, { attributes: PUBLIC, order: [["ordinal", "DESC"]] });
  const nameOf = await peopleNames(rows.map((row) => row.by));
  return rows.map(({ id, origin, subject, issuer, fingerprint, validFrom, validTo, certificatePem, at, by }) => ({
    id, origin, subject, issuer, fingerprint, validFrom: validFrom.toISOString(), validTo: validTo.toISOString(), pem: certificatePem, at: at.toISOString(), by: nameOf(by),
  }));
}
