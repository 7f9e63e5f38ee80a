/** Keystores as shops bring them: made here with node-forge from a key of the day. Kinds that a shop may bring by mistake too. */
import { generateKeyPairSync } from "node:crypto";
import forge from "node-forge";

export interface P12Wish {
  readonly password: string;
  readonly commonName?: string;
  readonly bits?: number;
  readonly from?: Date;
  readonly to?: Date;
  /** Rounds of work the file asks for. */
  readonly rounds?: number;
  /** By default both. */
  readonly holds?: "both" | "no-key" | "other-key";
  readonly keyUsage?: Readonly<Record<string, boolean>>;
  readonly algorithm?: "3des" | "aes256";
}

const keys = new Map<number, forge.pki.rsa.KeyPair>();

/** One key per length and run: making them is slow. */
function keyPair(bits: number, other = false): forge.pki.rsa.KeyPair {
  const name = other ? -bits : bits;
  const known = keys.get(name);
  if (known !== undefined) return known;
  const { privateKey, publicKey } = generateKeyPairSync("rsa", { modulusLength: bits, publicKeyEncoding: { type: "spki", format: "pem" }, privateKeyEncoding: { type: "pkcs8", format: "pem" } });
  const made = { privateKey: forge.pki.privateKeyFromPem(privateKey) as forge.pki.rsa.PrivateKey, publicKey: forge.pki.publicKeyFromPem(publicKey) as forge.pki.rsa.PublicKey };
  keys.set(name, made);
  return made;
}

/** A .p12 with an office's certificate. */
export function uploadedP12({ password, commonName = "Quay Street Pipe Works", bits = 2048, from = new Date("2020-01-01"), to = new Date("2090-01-01"), rounds = 2048, holds = "both", keyUsage, algorithm = "aes256" }: P12Wish): Buffer {
  const { privateKey, publicKey } = keyPair(bits);
  const certificate = forge.pki.createCertificate();
  certificate.publicKey = publicKey;
  certificate.serialNumber = "4a0b";
  certificate.validity.notBefore = from;
  certificate.validity.notAfter = to;
  const name = [{ name: "commonName", value: commonName, valueTagClass: forge.asn1.Type.UTF8 as unknown as forge.asn1.Class }];
  certificate.setSubject(name);
  certificate.setIssuer(name);
  if (keyUsage) certificate.setExtensions([{ name: "keyUsage", critical: true, ...keyUsage }]);
  certificate.sign(privateKey, forge.md.sha256.create());
  const key = holds === "no-key" ? null : holds === "other-key" ? keyPair(bits, true).privateKey : privateKey;
  const asn1 = forge.pkcs12.toPkcs12Asn1(key as forge.pki.rsa.PrivateKey, [certificate], password, { algorithm, count: rounds });
  return Buffer.from(forge.asn1.toDer(asn1).getBytes(), "binary");
}
