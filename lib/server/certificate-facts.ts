/** What is shown and kept of a certificate, and whether it may sign now. */
import { createHash } from "node:crypto";
import forge from "node-forge";

export interface CertificateFacts {
  readonly subject: string;
  readonly issuer: string;
  /** SHA-256 of the certificate, lower-case hex. */
  readonly fingerprint: string;
  readonly validFrom: Date;
  readonly validTo: Date;
  /** Itself and those that vouch for it, as text. */
  readonly certificatePem: string;
}

const LONGEST_TEXT = 400;

/** @param certificates the key's own first */
export function certificateFacts(certificates: readonly forge.pki.Certificate[]): CertificateFacts {
  const own = certificates[0]!;
  const der = Buffer.from(forge.asn1.toDer(forge.pki.certificateToAsn1(own)).getBytes(), "binary");
  return {
    subject: nameText(own.subject.attributes),
    issuer: nameText(own.issuer.attributes),
    fingerprint: createHash("sha256").update(der).digest("hex"),
    validFrom: own.validity.notBefore,
    validTo: own.validity.notAfter,
    certificatePem: certificates.map((one) => forge.pki.certificateToPem(one).replace(/\r/g, "")).join(""),
  };
}

/** Why a certificate may not sign at a time, as a sentence; null when it may. */
export function certificateRefusal(certificate: forge.pki.Certificate, now: Date): string | null {
  const { notBefore, notAfter } = certificate.validity;
  if (notAfter <= now) return `That certificate ended on ${dayOf(notAfter)}. Upload one that is in force.`;
  if (notBefore > now) return `That certificate begins on ${dayOf(notBefore)}. Upload one that is in force.`;
  const usage = certificate.getExtension("keyUsage") as { digitalSignature?: boolean; nonRepudiation?: boolean } | null | undefined;
  return usage && !usage.digitalSignature && !usage.nonRepudiation ? "That certificate is not for signing, by its own word." : null;
}

/** "2036-12-01". */
export function dayOf(date: Date): string {
  return date.toISOString().slice(0, 10);
}

/** The common name, with the organization where it is another. */
function nameText(attributes: readonly forge.pki.CertificateField[]): string {
  const named = (name: string) => attributes.filter((one) => one.name === name).map((one) => readable(one));
  const texts = [...new Set([...named("commonName"), ...named("organizationName")])].filter((text) => text !== "");
  return (texts.join(", ") || "No name").slice(0, LONGEST_TEXT);
}

/** The library gives names as they are encoded. */
function readable({ value, valueTagClass }: forge.pki.CertificateField): string {
  const bytes = typeof value === "string" ? value : "";
  const type = Number(valueTagClass);
  const text = type === Number(forge.asn1.Type.BMPSTRING) ? Buffer.from(bytes, "binary").swap16().toString("utf16le") : Buffer.from(bytes, "binary").toString(type === Number(forge.asn1.Type.UTF8) ? "utf8" : "latin1");
  return text.replace(/[\u0000-\u001f\u007f]/g, " ").trim();
}
