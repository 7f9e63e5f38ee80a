/** Unguessable words for links. The link carries the token; the database keeps only its hash. */
import { createHash, randomBytes } from "node:crypto";

const TOKEN_BYTES = 32;
const STATUS_TOKEN_BYTES = 18;

/** A new token for a mailed link, 43 characters, safe in an address. */
export function newToken(): string {
  return randomBytes(TOKEN_BYTES).toString("base64url");
}

/** A new token for a printed QR code: shorter, so that the code stays coarse enough to scan; 144 bits. */
export function newStatusToken(): string {
  return randomBytes(STATUS_TOKEN_BYTES).toString("base64url");
}

/** SHA-256 of text, lower-case hex: what is kept of a token, and what the log's chain is made with. */
export function sha256Text(text: string): string {
  return createHash("sha256").update(text, "utf8").digest("hex");
}
