/** Secrets kept in rows: AES-256-GCM under the server's key, bound to the place they belong to. */
import { createCipheriv, createDecipheriv, hkdfSync, randomBytes } from "node:crypto";
import { settings } from "./settings";

const CIPHER = "aes-256-gcm";
const KEY_BYTES = 32;
const NONCE_BYTES = 12;
const TAG_BYTES = 16;
const VERSION = "v1";

function sealingKey(): Uint8Array {
  return new Uint8Array(hkdfSync("sha256", settings().SEALING_KEY, "", "quarterline sealed secrets", KEY_BYTES));
}

/** @param place what the secret belongs to (shop and purpose): moved to another place it no longer opens. */
export function sealSecret(secret: Uint8Array, place: string): string {
  const nonce = randomBytes(NONCE_BYTES);
  const cipher = createCipheriv(CIPHER, sealingKey(), nonce, { authTagLength: TAG_BYTES }).setAAD(Buffer.from(place));
  const sealed = Buffer.concat([nonce, cipher.update(secret), cipher.final(), cipher.getAuthTag()]);
  return `${VERSION}.${sealed.toString("base64url")}`;
}

/** The secret, or null when it was sealed under another key or for another place, or is damaged. */
export function openSecret(sealed: string, place: string): Uint8Array | null {
  const [version, text] = sealed.split(".");
  const bytes = Buffer.from(text ?? "", "base64url");
  if (version !== VERSION || bytes.length < NONCE_BYTES + TAG_BYTES) return null;
  const decipher = createDecipheriv(CIPHER, sealingKey(), bytes.subarray(0, NONCE_BYTES), { authTagLength: TAG_BYTES });
  decipher.setAAD(Buffer.from(place)).setAuthTag(bytes.subarray(-TAG_BYTES));
  try {
    return Buffer.concat([decipher.update(bytes.subarray(NONCE_BYTES, -TAG_BYTES)), decipher.final()]);
  } catch {
    return null;
  }
}
