/** What pages show and send of the certificates a shop signs sheets with. Pure. */
import { z } from "zod";

/** Largest .p12 taken, bytes; with its chain one has some thousands. */
export const P12_MAX_BYTES = 64 * 1024;
/** The same as base64 in JSON, with room for the password. */
export const P12_BODY_MAX_BYTES = 96 * 1024;
/** From how many days before its end a certificate's page warns. */
const WARN_DAYS = 60;
const DAY_MS = 86_400_000;

export interface CertificateRow {
  readonly id: string;
  readonly origin: "made" | "uploaded";
  readonly subject: string;
  readonly issuer: string;
  /** SHA-256 of the certificate, lower-case hex. */
  readonly fingerprint: string;
  readonly validFrom: string;
  readonly validTo: string;
  /** Public part, to hand to those who check signatures. */
  readonly pem: string;
  readonly at: string;
  readonly by: string;
}

export const certificateUploadSchema = z.object({
  /** Bytes of the file as base64. */
  p12: z.string().min(1, "Choose a .p12 file.").max(Math.ceil((P12_MAX_BYTES * 4) / 3) + 4, "A .p12 of this size is not taken: at most 64 KB.").regex(/^[A-Za-z0-9+/]+={0,2}$/, "That is not a .p12 file."),
  password: z.string().max(500, "That password is too long."),
});

export type CertificateUpload = z.infer<typeof certificateUploadSchema>;

/** What the owner should know of a certificate's end; null while there is time. */
export function endWarning(validTo: string, now: Date): string | null {
  const days = Math.floor((Date.parse(validTo) - now.getTime()) / DAY_MS);
  if (days < 0) return "This certificate has ended. Nothing can be signed with it.";
  return days <= WARN_DAYS ? `This certificate ends in ${days === 1 ? "1 day" : `${days} days`}. Replace it before then.` : null;
}

/** A fingerprint as it is read aloud: pairs of hex digits. */
export function fingerprintText(fingerprint: string): string {
  return (fingerprint.toUpperCase().match(/../g) ?? []).join(":");
}
