/** Certificates with their keys in a .p12 file (PKCS #12): made for a shop, or read from what it uploads. */
import { generateKeyPair, randomBytes } from "node:crypto";
import { promisify } from "node:util";
import forge from "node-forge";

export interface OpenedP12 {
  readonly key: forge.pki.rsa.PrivateKey;
  /** The key's own first, then those that vouch for it. */
  readonly certificates: readonly forge.pki.Certificate[];
}

/** Why a .p12 cannot be used, as a sentence for its owner. */
export class P12Trouble extends Error {
  constructor(
    message: string,
    readonly field: "p12" | "password" = "p12",
  ) {
    super(message);
  }
}

const LEAST_KEY_BITS = 2048;
const YEARS = 10;
/** A certificate begins a day early, so that what is signed in the same moment lies within. */
const DAY_MS = 86_400_000;
/** Longest common name a certificate may carry, characters (RFC 5280, appendix A.1). */
const LONGEST_NAME = 64;
/** A file may ask for any number of rounds to open it; a keystore of today asks for 10 000. */
const MOST_ROUNDS = 100_000;

/** A self-signed certificate for ten years with its key, sealed by a password nobody knows. The key is made beside the event loop. */
export async function makeP12(name: string, now: Date): Promise<{ readonly p12: Uint8Array; readonly password: string }> {
  const pair = await promisify(generateKeyPair)("rsa", { modulusLength: LEAST_KEY_BITS, publicKeyEncoding: { type: "spki", format: "pem" }, privateKeyEncoding: { type: "pkcs8", format: "pem" } });
  const key = forge.pki.privateKeyFromPem(pair.privateKey) as forge.pki.rsa.PrivateKey;
  const certificate = forge.pki.createCertificate();
  certificate.publicKey = forge.pki.publicKeyFromPem(pair.publicKey);
  const serial = randomBytes(16);
  // Positive, and without a leading zero byte (RFC 5280, 4.1.2.2).
  serial[0] = (serial[0]! & 0x3f) | 0x40;
  certificate.serialNumber = serial.toString("hex");
  certificate.validity.notBefore = new Date(now.getTime() - DAY_MS);
  certificate.validity.notAfter = new Date(Date.UTC(now.getUTCFullYear() + YEARS, now.getUTCMonth(), now.getUTCDate()));
  const subject = nameAttributes(name);
  certificate.setSubject(subject);
  certificate.setIssuer(subject);
  certificate.setExtensions([
    { name: "basicConstraints", cA: false, critical: true },
    { name: "keyUsage", digitalSignature: true, nonRepudiation: true, critical: true },
    { name: "subjectKeyIdentifier" },
  ]);
  certificate.sign(key, forge.md.sha256.create());
  const password = randomBytes(32).toString("base64url");
  // Rounds slow down guessing; 256 random bits are not guessed, and each signing opens the file.
  const asn1 = forge.pkcs12.toPkcs12Asn1(key, [certificate], password, { algorithm: "aes256", count: 1 });
  return { p12: Buffer.from(forge.asn1.toDer(asn1).getBytes(), "binary"), password };
}

function nameAttributes(name: string): forge.pki.CertificateField[] {
  const value = [...name.replace(/\s+/g, " ").trim()].slice(0, LONGEST_NAME).join("") || "Shop";
  // The types take the text types of ASN.1 for its classes.
  const valueTagClass = forge.asn1.Type.UTF8 as unknown as forge.asn1.Class;
  return ["commonName", "organizationName"].map((attribute) => ({ name: attribute, value, valueTagClass }));
}

/** @throws P12Trouble when it is no .p12, the password does not open it, or what it holds cannot sign. */
export function openP12(bytes: Uint8Array, password: string): OpenedP12 {
  const p12 = decrypted(parsed(bytes), password);
  const bags = (type: string) => p12.getBags({ bagType: type })[type] ?? [];
  const { oids } = forge.pki;
  const keys = [...bags(oids.pkcs8ShroudedKeyBag!), ...bags(oids.keyBag!)];
  if (keys.length === 0) throw new P12Trouble("That file holds no private key. Export the certificate again together with its key.");
  const key = keys.find((bag) => bag.key)?.key as forge.pki.rsa.PrivateKey | undefined;
  if (key === undefined) throw new P12Trouble("The key in that file is not an RSA key. Sheets are signed with RSA.");
  if (key.n.bitLength() < LEAST_KEY_BITS) throw new P12Trouble(`The key in that file has ${key.n.bitLength()} bits. At least ${LEAST_KEY_BITS} are needed.`);
  const all = bags(oids.certBag!).flatMap((bag) => (bag.cert ? [bag.cert] : []));
  const own = all.find((one) => (one.publicKey as forge.pki.rsa.PublicKey).n?.equals(key.n));
  if (own === undefined) throw new P12Trouble("No certificate in that file belongs to its key.");
  return { key, certificates: [own, ...all.filter((one) => one !== own)] };
}

function parsed(bytes: Uint8Array): forge.asn1.Asn1 {
  let asn1: forge.asn1.Asn1;
  try {
    asn1 = forge.asn1.fromDer(Buffer.from(bytes).toString("binary"));
  } catch {
    throw new P12Trouble("That is not a .p12 file.");
  }
  if (mostRounds(asn1) > MOST_ROUNDS) throw new P12Trouble(`Opening that file takes more than ${MOST_ROUNDS} rounds, by its own word. Export it again with fewer.`);
  return asn1;
}

/** Opens the file's safes. @throws P12Trouble */
function decrypted(asn1: forge.asn1.Asn1, password: string): forge.pkcs12.Pkcs12Pfx {
  try {
    return forge.pkcs12.pkcs12FromAsn1(asn1, false, password);
  } catch (error) {
    const why = error instanceof Error ? error.message : "";
    if (/MAC could not be verified|decrypt/i.test(why)) throw new P12Trouble("That password does not open the .p12.", "password");
    throw new P12Trouble("That is not a .p12 file this server can read. Export it again as PKCS #12 with AES and SHA-256.");
  }
}

/** Largest count of rounds named in the open part of the file: a whole number that follows a salt. */
function mostRounds(node: forge.asn1.Asn1): number {
  const { Type } = forge.asn1;
  if (typeof node.value === "string") return node.type === Type.OCTETSTRING ? roundsWithin(node.value) : 0;
  const parts = node.value as forge.asn1.Asn1[];
  const own = parts.map((part, index) => (part.type === Type.INTEGER && parts[index - 1]?.type === Type.OCTETSTRING ? Number(`0x${forge.util.bytesToHex(part.value as string) || "0"}`) : 0));
  return Math.max(0, ...own, ...parts.map(mostRounds));
}

/** Safes are packed as bytes within the file. */
function roundsWithin(bytes: string): number {
  try {
    return mostRounds(forge.asn1.fromDer(bytes));
  } catch {
    return 0;
  }
}
